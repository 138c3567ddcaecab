import { type Cell, type Count, cover, type Printed } from '../../model/index.ts';
import type { Item, NumberItem } from '../parse/item.ts';
import type { Sheet } from './sheet.ts';

/** A count with its percentage, as a cell holds it. */
interface CellCount {
  readonly count: Printed;
  readonly percent: Printed;
  readonly total?: Printed;
  readonly row: number;
  readonly group: string;
}

/**
 * The counts of a table: "45 (37.5)" and "45/120 (37.5%)" under headings that say so.
 *
 * A column's own size ("Placebo (n = 309)") is taken for the total of a count only where
 * most of the column's percentages are of it: percentages may as well be of a row, of
 * those without missing values, or of another group.
 */
export function countsInTable(sheet: Sheet): readonly Count[] {
  const panels = Array.from({ length: sheet.grid.table.columnCount - 1 }, (_, at) =>
    panelsIn(sheet, at + 1)).flat();
  return panels.flatMap((panel) => withTotals(panel, panels));
}

/** The counts of a column, or of a part of it that has a size of its own. */
interface Panel {
  readonly cells: readonly CellCount[];
  readonly size: Printed | undefined;
}

function panelsIn(sheet: Sheet, column: number): readonly Panel[] {
  const { grid, labels } = sheet;
  const panels: Panel[] = [];
  let size = headingSize(sheet, column);
  let cells: CellCount[] = [];
  for (let row = labels.headingRows; row < grid.table.rowCount; row++) {
    const cell = grid.at(row, column);
    if (cell?.row !== row || cell.column !== column) continue;
    const items = sheet.itemsOf(cell);
    const found = saysCounts(sheet, row, column) ? countIn(items, row, labels.group(row)) : undefined;
    const other = found === undefined ? sizeIn(items) : undefined;
    if (found !== undefined) cells.push(found);
    if (other === undefined) continue;
    panels.push({ cells, size });
    [size, cells] = [other, []];
  }
  panels.push({ cells, size });
  return panels;
}

const PERCENTAGES = /%|per\s?cent/i;
const OTHERS = /\bmean|median|\bsd\b|iqr|range|±|\bse\b|ratio|\bci\b|interval/i;

/** Whether the heading, the row's label or its group speak of counts and percentages. */
function saysCounts({ grid, labels }: Sheet, row: number, column: number): boolean {
  const margins = [labels.column(column), grid.words(row, 0), labels.group(row)];
  const cell = grid.words(row, column);
  const isSaid = margins.some((words) => PERCENTAGES.test(words)) || cell.includes('%');
  return isSaid && !margins.some((words) => OTHERS.test(words));
}

// 45 (37.5)   45 (37.5%)   45/120 (37.5)   1,234 (20.1)ᵃ
function countIn(items: readonly Item[], row: number, group: string): CellCount | undefined {
  const count = wholeAt(items, 0);
  if (count === undefined) return undefined;
  const isFraction = items[1]?.kind === 'slash';
  const total = isFraction ? wholeAt(items, 2) : undefined;
  const open = isFraction ? 3 : 1;
  if (items[open]?.kind !== 'open' || items[open + 2]?.kind !== 'close') return undefined;
  const inside = items[open + 1];
  if (inside?.kind !== 'number' || inside.printed.value < 0 || inside.printed.value > 100) return undefined;
  if (items.slice(open + 3).some(({ kind }) => kind === 'number' || kind === 'dash')) return undefined;
  const percent = { ...inside.printed, percent: true };
  return { count, percent, ...(total === undefined ? {} : { total }), row, group };
}

function wholeAt(items: readonly Item[], at: number): Printed | undefined {
  const item = items[at] as NumberItem | undefined;
  const isWhole = item?.kind === 'number' && !item.attached && !item.printed.percent
    && /^\d+$/.test(item.printed.plain);
  return isWhole ? item.printed : undefined;
}

/** The size that the heading of a column gives, if it gives one. */
function headingSize({ grid, labels, itemsOf }: Sheet, column: number): Printed | undefined {
  const sizes: Printed[] = [];
  for (let row = 0; row < labels.headingRows; row++) {
    const cell: Cell | undefined = grid.at(row, column);
    const size = cell === undefined || cell.columnSpan > 1 ? undefined : sizeIn(itemsOf(cell));
    if (size !== undefined && !sizes.includes(size)) sizes.push(size);
  }
  return sizes.length === 1 ? sizes[0] : undefined;
}

// Placebo (n = 309)   Cases, N=214
//          ^^^^^^^           ^^^^^
function sizeIn(items: readonly Item[]): Printed | undefined {
  for (let at = 2; at < items.length; at++) {
    const [name, relation, item] = [items[at - 2], items[at - 1], items[at]];
    const isSize = name?.kind === 'word' && name.word === 'n' && relation?.kind === 'relation';
    if (isSize && item?.kind === 'number' && item.printed.decimals === 0) return item.printed;
  }
  return undefined;
}

/** So many of a column's percentages must be of its size before that is taken for the total. */
const MOST = 0.7;
const FEWEST = 3;

function withTotals(panel: Panel, panels: readonly Panel[]): readonly Count[] {
  const { cells, size } = panel;
  const isColumnwise = fitsOwnSize(panel) || (cells.length < SEVERAL && fitTogether(panels));
  return cells.map((cell): Count => {
    const { count, percent, total } = cell;
    const span = cover(count.span, percent.span);
    if (total !== undefined) return { count, percent, total, span };
    if (size === undefined || !isColumnwise || !isPlainlyOf(cell, panel, panels)) {
      return { count, percent, span };
    }
    return { count, percent, total: size, span };
  });
}

function fitsOwnSize({ cells, size }: Panel): boolean {
  if (size === undefined) return false;
  const fitting = cells.filter((cell) => isOf(cell, size.value)).length;
  return fitting >= FEWEST && fitting >= MOST * cells.length;
}

/** Whether nearly all cells of several short columns are of their column's size. */
function fitTogether(panels: readonly Panel[]): boolean {
  const sized = panels.flatMap(({ cells, size }) =>
    (size === undefined ? [] : cells.map((cell) => isOf(cell, size.value))));
  const fitting = sized.filter((fits) => fits).length;
  return fitting >= SEVERAL && fitting >= NEARLY_ALL * sized.length;
}
/** Whether a count over a total can be printed as this percentage, give or take one last digit. */
function isOf({ count, percent }: CellCount, total: number): boolean {
  const room = 1.01 * 10 ** -percent.decimals;
  return Math.abs((100 * count.value) / total - percent.value) <= room;
}

/** The same without that digit: one more or less may be a missing value or a habit of rounding. */
function isExactly({ count, percent }: CellCount, total: number): boolean {
  return Math.abs((100 * count.value) / total - percent.value) <= 0.5001 * 10 ** -percent.decimals;
}

/** People without a value make a denominator smaller, but seldom by more than this share. */
const MOST_MISSING = 0.1;

/** So many of a column's cells must be of its size before one that is not stands out. */
const NEARLY_ALL = 0.9;
const SEVERAL = 6;

/**
 * Whether a percentage can only be meant of the column's size. One of fewer people may leave
 * out those without a value, or be of a part; one of more people than there are cannot.
 */
function isPlainlyOf(cell: CellCount, panel: Panel, panels: readonly Panel[]): boolean {
  const { cells, size } = panel;
  if (size === undefined) return false;
  if (isOf(cell, size.value)) return isExactly(cell, size.value);
  const implied = (100 * cell.count.value) / cell.percent.value;
  if (!Number.isFinite(implied)) return false;
  if (implied > size.value) return true;
  const isFar = implied < (1 - MOST_MISSING) * size.value && !sharesTotal(cell, cells);
  return isFar && (standsOut(cell, panel) || standsOutOfRow(cell, panel, panels));
}

/** Whether nearly all the other cells of a long column are of its size. */
function standsOut(cell: CellCount, { cells, size }: Panel): boolean {
  const others = cells.filter((other) => other !== cell);
  const alike = others.filter((other) => size !== undefined && isOf(other, size.value)).length;
  return others.length >= SEVERAL && alike >= NEARLY_ALL * others.length;
}

/** Whether its row is of the columns' sizes everywhere else, as nearly all of the table is. */
function standsOutOfRow(cell: CellCount, panel: Panel, panels: readonly Panel[]): boolean {
  const beside = panels.flatMap(({ cells, size }, at) => (panels[at] === panel ? []
    : cells.filter(({ row }) => row === cell.row).map((other) =>
      size !== undefined && isExactly(other, size.value))));
  return beside.length > 0 && beside.every((fits) => fits) && fitTogether(panels);
}

/** Whether the rows of a cell's group add up to a total of their own: 30 (50.0) and 30 (50.0). */
function sharesTotal(cell: CellCount, cells: readonly CellCount[]): boolean {
  const group = cells.filter((other) => other.group === cell.group && other.group !== '');
  const at = cells.indexOf(cell);
  const beside = [[cells[at - 1], cell], [cell, cells[at + 1]]] as const;
  return addUp(group) || beside.some((pair) => addUp(pair.filter((one) => one !== undefined)));
}

/** Whether several percentages are of the sum of their counts. */
function addUp(cells: readonly CellCount[]): boolean {
  const sum = cells.reduce((total, { count }) => total + count.value, 0);
  return cells.length > 1 && cells.every((cell) => isOf(cell, sum));
}
