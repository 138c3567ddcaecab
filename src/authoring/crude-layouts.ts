import type { Printed, RatioResult, Reading, Table } from '../model/index.ts';
import { isAbsence } from '../stats/absence.ts';
import { oddsRatio, oddsRatioHalfAdded } from '../stats/odds-ratio.ts';
import { riskRatio } from '../stats/risk-ratio.ts';
import { unrounded } from '../stats/rounding.ts';
import type { TwoByTwo } from '../stats/two-by-two.ts';
import { ratiosOfTable } from './neighbours.ts';
import { cellsOf, range, type TableCells, type Whole } from './table-cells.ts';

/** A printed ratio with the four counts that stand for it in its table. */
export interface RatioWithCounts {
  readonly ratio: RatioResult;
  readonly measure: 'OR' | 'RR';
  readonly counts: TwoByTwo;
  /** The printed counts, to be marked. */
  readonly printed: readonly Printed[];
  /** Whether the counts give the estimate back. */
  readonly fits: boolean;
  /** Whether most other ratios of the column follow from their counts in the same way. */
  readonly confirmed: boolean;
  readonly tally: string;
}

/** So many ratios must follow from their counts, and so large a share, before one stands out. */
const FEWEST = 3;
const MOST = 0.7;

/** A table has no more columns of counts than this that are tried against each other. */
const MOST_COLUMNS = 8;

/**
 * The ratios of a table with the counts that they are made of, as far as the table tells:
 * which columns hold the counts, and whether a row is held against a reference row or two
 * columns against each other, is what makes most of the ratios come out. Adjusted ratios do
 * not, so that their columns fall out by themselves.
 */
export function ratiosWithCounts(reading: Reading, table: Table): readonly RatioWithCounts[] {
  const cells = cellsOf(reading, table);
  const columns = new Map<number, RatioResult[]>();
  for (const result of ratiosOfTable(reading, table)) {
    if (result.cell === undefined || result.adjusted || measureOf(result) === undefined) continue;
    if (result.estimate === undefined || result.estimate.value <= 0) continue;
    const { column } = result.cell.cell;
    const known = columns.get(column);
    if (known === undefined) columns.set(column, [result]);
    else known.push(result);
  }
  return [...columns].flatMap(([column, ratios]) => bestLayout(cells, column, ratios));
}

function measureOf({ measure }: RatioResult): 'OR' | 'RR' | undefined {
  switch (measure) {
    case 'OR':
    case 'POR':
    case 'ratio':
      return 'OR';
    case 'RR':
    case 'PR':
      return 'RR';
    default:
      return undefined;
  }
}

/** The counts of one ratio under one way to read the table. */
type Layout = (row: number) => Pick<RatioWithCounts, 'counts' | 'printed'> | undefined;

function bestLayout(
  cells: TableCells,
  column: number,
  ratios: readonly RatioResult[],
): readonly RatioWithCounts[] {
  const tried = layoutsOf(cells, column).map((layout) => ratios.flatMap((ratio) => {
    const found = layout(ratio.cell?.cell.row ?? -1);
    const measure = measureOf(ratio);
    if (found === undefined || measure === undefined) return [];
    return [{ ratio, measure, ...found, fits: fitsEstimate(measure, found.counts, ratio) }];
  }));
  const [best] = tried.map((rows) => ({ rows, fitting: rows.filter(({ fits }) => fits).length }))
    .toSorted((one, other) => other.fitting - one.fitting || one.rows.length - other.rows.length);
  if (best === undefined || best.fitting === 0) return [];
  const { rows, fitting } = best;
  const confirmed = fitting >= FEWEST && fitting >= MOST * rows.length;
  return rows.map((row) => ({ ...row, confirmed, tally: `${fitting} of ${rows.length}` }));
}

function fitsEstimate(
  measure: 'OR' | 'RR',
  counts: TwoByTwo,
  { estimate }: RatioResult,
): boolean {
  if (estimate === undefined) return false;
  const { low, high } = unrounded(estimate);
  const made = measure === 'OR'
    ? [oddsRatio(counts), oddsRatioHalfAdded(counts)] : [riskRatio(counts)];
  return made.some((found) => !isAbsence(found) && found.ratio >= low && found.ratio <= high);
}

function layoutsOf(cells: TableCells, column: number): readonly Layout[] {
  const { table, firstRow, whole } = cells;
  const rows = range(firstRow, table.rowCount);
  const counted = range(0, table.columnCount)
    .filter((at) => at !== column && rows.some((row) => whole(row, at) !== undefined))
    .slice(0, MOST_COLUMNS);
  const pairs = counted.flatMap((one) => counted.flatMap((other) =>
    (one === other ? [] : [[one, other] as const])));
  return [
    ...pairs.flatMap(([one, other]) => [
      againstReference(cells, column, (row) => nonEvents(whole(row, one), whole(row, other))),
      againstReference(cells, column, (row) => ofTotal(whole(row, one), whole(row, other))),
      sideBySide(cells, one, other),
    ]),
    ...counted.map((at) => againstReference(cells, column, (row) => ofOwnTotal(whole(row, at)))),
  ];
}

/** Events and non-events of one group, with the printed numbers. */
interface Group {
  readonly events: number;
  readonly others: number;
  readonly printed: readonly Printed[];
}

function nonEvents(events: Whole | undefined, others: Whole | undefined): Group | undefined {
  if (events === undefined || others === undefined) return undefined;
  return {
    events: events.count.value, others: others.count.value, printed: [events.count, others.count],
  };
}

function ofTotal(events: Whole | undefined, total: Whole | undefined): Group | undefined {
  if (events === undefined || total === undefined) return undefined;
  return groupOf(events.count, total.count.value, [events.count, total.count]);
}

function ofOwnTotal(whole: Whole | undefined): Group | undefined {
  if (whole?.total === undefined) return undefined;
  return groupOf(whole.count, whole.total.value, [whole.count, whole.total]);
}

function groupOf(events: Printed, total: number, printed: readonly Printed[]): Group | undefined {
  const others = total - events.value;
  return others < 0 ? undefined : { events: events.value, others, printed };
}

/** A row held against the reference row of its group: the nearest above, else below. */
function againstReference(
  { table, firstRow, words, margin }: TableCells,
  column: number,
  groupAt: (row: number) => Group | undefined,
): Layout {
  const isReference = (row: number): boolean => REFERENCE.test(words(row, column));
  const find = (from: number, step: number): Group | undefined => {
    for (let row = from + step; row >= firstRow && row < table.rowCount; row += step) {
      const group = groupAt(row);
      if (group === undefined) return undefined;
      if (isReference(row)) return group;
    }
    return undefined;
  };
  return (row) => {
    if (OWN_COMPARISON.test(margin(row))) return undefined;
    const own = groupAt(row);
    const reference = own === undefined ? undefined : (find(row, -1) ?? find(row, 1));
    return own === undefined || reference === undefined ? undefined : tableOf(own, reference);
  };
}

/** A row that names what it is held against: "Older compared with middle-aged". */
const OWN_COMPARISON = /\b(?:compared (?:with|to)|versus|vs)\b/i;

/** A reference row has 1, a dash or its name where the others have a ratio. */
const REFERENCE = new RegExp(
  '^(?:1(?:[.·]0+)?\\s?(?:[([]?ref\\w*\\.?[)\\]]?)?|[([]?ref\\w*\\.?[)\\]]?|[-–—]+)'
    + '\\s?[a-e*†‡]?$',
  'i',
);

/**
 * Events and people of the two groups that a ratio's own row prints, where it prints just two:
 * "45/120 | 60/118 | 0.74 (0.55–0.99)". Nothing where the row has more or fewer counts.
 */
export function twoGroupsOfRow(reading: Reading, { cell }: RatioResult): TwoGroups | undefined {
  if (cell === undefined) return undefined;
  const cells = cellsOf(reading, cell.table);
  const { row } = cell.cell;
  const columns = range(0, cell.table.columnCount).filter((column) =>
    cells.whole(row, column) !== undefined);
  const groups = columns.map((column) => groupInCell(cells, row, column));
  const [one, other] = groups;
  if (groups.length !== 2 || one === undefined || other === undefined) return undefined;
  const events = one.events + other.events;
  return {
    events,
    total: events + one.others + other.others,
    printed: [...one.printed, ...other.printed],
  };
}

/** The events among all the people of two groups, with the counts as printed. */
export interface TwoGroups {
  readonly events: number;
  readonly total: number;
  readonly printed: readonly Printed[];
}

/** Two columns held against each other: n/N each, or counts below headings with their sizes. */
function sideBySide(cells: TableCells, one: number, other: number): Layout {
  return (row) => {
    const [exposed, unexposed] = [groupInCell(cells, row, one), groupInCell(cells, row, other)];
    if (exposed === undefined || unexposed === undefined) return undefined;
    return tableOf(exposed, unexposed);
  };
}

/** A cell's own group: n/N, or a count below a heading with its size. */
function groupInCell(cells: TableCells, row: number, column: number): Group | undefined {
  const whole = cells.whole(row, column);
  const size = cells.size(column);
  if (whole === undefined || whole.total !== undefined) return ofOwnTotal(whole);
  // A whole number alone, below "%", is a percentage as likely as a count.
  const isPercentage = whole.share === undefined && cells.heading(column).includes('%');
  if (size === undefined || isPercentage || isOfFewer(whole, size)) return undefined;
  return groupOf(whole.count, size, [whole.count]);
}

/** Whether the percentage in a cell is of other people than all that its column has. */
function isOfFewer({ count, share }: Whole, size: number): boolean {
  return share !== undefined && Math.abs((100 * count.value) / size - share) > 1;
}

function tableOf(exposed: Group, unexposed: Group): ReturnType<Layout> {
  return {
    counts: {
      exposedEvents: exposed.events,
      exposedNonEvents: exposed.others,
      unexposedEvents: unexposed.events,
      unexposedNonEvents: unexposed.others,
    },
    printed: [...exposed.printed, ...unexposed.printed],
  };
}
