import {
  type Cell, cover, indexAt, type Inheritable, type Mark, type Printed, type PValue, quote, type Result,
} from '../../model/index.ts';
import type { Item } from '../parse/item.ts';
import { A_RATIO, AN_AMOUNT, fitsNumbers } from '../resolve/naming.ts';
import { resultOf } from '../resolve/results.ts';
import type { Naming } from '../vocabulary.ts';
import { type CellValue, valuesIn } from './cell-values.ts';
import { type Heading, headingOf, joinHeadings } from './heading.ts';
import type { Sheet } from './sheet.ts';

/**
 * The results of a table. What a cell's numbers are values of is told by the cell
 * itself, the heading over its column, the label before its row, the group it
 * stands in, the caption, and the notes, in this order.
 */
export function resultsInTable(sheet: Sheet): readonly Result[] {
  const { table } = sheet.grid;
  const inForce = columnHeadings(sheet);
  const results: Result[] = [];
  for (let row = sheet.labels.headingRows; row < table.rowCount; row++) {
    if (replaceHeadings(sheet, row, inForce)) continue;
    results.push(...resultsInRow(sheet, row, inForce));
  }
  return results;
}

/** The headings over the columns, joined over their levels. */
function columnHeadings({ grid, labels, itemsOf }: Sheet): Heading[] {
  return Array.from({ length: grid.table.columnCount }, (_, column) => {
    const cells: Cell[] = [];
    for (let row = 0; row < labels.headingRows; row++) {
      const cell = grid.at(row, column);
      if (cell !== undefined && cells.at(-1) !== cell) cells.push(cell);
    }
    return joinHeadings(cells.map((cell) => headingOf(itemsOf(cell))).filter(isSaid));
  });
}

/** Whether a level of a heading says anything at all. */
function isSaid(heading: Heading): boolean {
  return heading.names.length > 0 || heading.label !== undefined || heading.p !== undefined
    || heading.limit !== undefined || heading.plain || heading.adjusted !== undefined;
}

/**
 * Cells in the body that name quantities head what is below them, as in a second
 * panel. Says whether the row holds nothing else.
 */
function replaceHeadings({ grid, itemsOf }: Sheet, row: number, inForce: Heading[]): boolean {
  if (grid.isHeaderRow(row)) return true;
  const first = grid.at(row, 0);
  const isAcross = first !== undefined && first.columnSpan > 1
    && first.columnSpan >= grid.table.columnCount - 1;
  if (isAcross) {
    const heading = headingOf(itemsOf(first));
    const names = heading.names.some(({ firm, quantity }) => firm && quantity.kind === 'ratio');
    if (names && heading.label !== undefined) inForce.fill(heading);
    return true;
  }
  let [hasHeading, hasNumber] = [false, false];
  for (let column = 1; column < grid.table.columnCount; column++) {
    const cell = grid.at(row, column);
    if (cell === undefined || cell.row !== row || cell === grid.at(row, 0)) continue;
    const items = itemsOf(cell);
    if (items.some(({ kind }) => kind === 'number' || kind === 'p')) {
      hasNumber = true;
      continue;
    }
    const heading = headingOf(items);
    if (heading.names.some(({ firm }) => firm) || heading.label !== undefined || heading.p !== undefined) {
      inForce[column] = heading;
      hasHeading = true;
    }
  }
  return hasHeading && !hasNumber;
}

/** A value with the cell and the column it stands in. */
interface Placed {
  readonly value: CellValue;
  readonly cell: Cell;
  readonly column: number;
  /** Its place among the values of its cell, and how many there are. */
  readonly index: number;
  readonly count: number;
}

function resultsInRow(
  sheet: Sheet,
  row: number,
  inForce: readonly Heading[],
): readonly Result[] {
  const placed = joinedIntervals(stacked(sheet, row), inForce);
  const margin = headingOf(labelItems(sheet, row));
  const below = headingOf(labelItems(sheet, row + 1));
  return placed.flatMap((entry) => {
    const naming = namingOf(sheet, entry, margin, inForce);
    if (naming === undefined) return [];
    const result = makeResult(sheet, row, entry, naming, inForce, placed);
    const p = below.p === undefined || result.p !== undefined ? undefined : pBelow(sheet, row, entry, below.p);
    return [p === undefined ? result : { ...result, p }];
  });
}

/**
 * The values of a row, with the intervals that stand in the row below.
 *
 * ```
 * Compound population | 0.97        or   HR      | 0.606
 *                     | (0.95–1.00)      90% CI  | 0.425, 0.864
 * ```
 */
function stacked(sheet: Sheet, row: number): readonly Placed[] {
  const own = placedInRow(sheet, row);
  if (!own.some(isLoneEstimate) || !continuesBelow(sheet, row)) return own;
  const below = placedInRow(sheet, row + 1);
  return own.map((entry) => {
    const interval = below.find(({ column }) => column === entry.column);
    return isLoneEstimate(entry) && isInterval(interval)
      ? { ...withLimits(entry, interval.value.limits, interval), cell: entry.cell }
      : entry;
  });
}

/** Whether the row below has no label of its own, or one that only announces intervals. */
function continuesBelow(sheet: Sheet, row: number): boolean {
  const { grid } = sheet;
  const label = grid.at(row + 1, 0);
  if (row + 1 >= grid.table.rowCount) return false;
  if (label === grid.at(row, 0) || grid.words(row + 1, 0) === '') return true;
  const heading = headingOf(labelItems(sheet, row + 1));
  return heading.label !== undefined && heading.names.length === 0;
}

/** The p-value in the row below, where that row holds p-values. */
function pBelow(
  { grid, itemsOf }: Sheet,
  row: number,
  { column }: Placed,
  tests: PValue['tests'],
): PValue | undefined {
  const cell = grid.at(row + 1, column);
  return cell === undefined ? undefined : pIn(itemsOf(cell), tests, 0, 1);
}

function placedInRow({ grid, itemsOf }: Sheet, row: number): readonly Placed[] {
  const placed: Placed[] = [];
  for (let column = 0; column < grid.table.columnCount; column++) {
    const cell = grid.at(row, column);
    if (cell === undefined || cell.row !== row || cell.column !== column) continue;
    const values = valuesIn(itemsOf(cell));
    if (column === 0 && !values.some(({ limits, estimate }) => limits && estimate)) continue;
    values.forEach((value, index) => placed.push({ value, cell, column, index, count: values.length }));
  }
  return placed;
}

/**
 * Joins an estimate with the interval in the next cell, or with the two limits in
 * the next two.
 *
 * ```
 * 1.87 | (1.56, 2.25)        1.87 | 1.56 | 2.25
 * ```
 */
function joinedIntervals(
  placed: readonly Placed[],
  inForce: readonly Heading[],
): readonly Placed[] {
  const joined: Placed[] = [];
  for (let at = 0; at < placed.length; at++) {
    const entry = placed[at] as Placed;
    const [next, afterNext] = [placed[at + 1], placed[at + 2]];
    if (isInterval(next) && isLoneEstimate(entry) && next.column === endOf(entry)) {
      joined.push(withLimits(entry, next.value.limits, next));
      at++;
      continue;
    }
    const limits = splitLimits(entry, next, afterNext, inForce);
    if (limits !== undefined && afterNext !== undefined) {
      joined.push(withLimits(entry, limits, afterNext));
      at += 2;
    } else joined.push(entry);
  }
  return joined;
}

type WithLimits = Placed & { readonly value: { readonly limits: NonNullable<CellValue['limits']> } };
type WithEstimate = Placed & { readonly value: { readonly estimate: NonNullable<CellValue['estimate']> } };

function isInterval(entry: Placed | undefined): entry is WithLimits {
  return entry?.value.limits !== undefined && entry.value.estimate === undefined;
}

function isLoneEstimate(entry: Placed | undefined): entry is WithEstimate {
  return entry?.value.estimate !== undefined && entry.value.limits === undefined
    && entry.index === entry.count - 1;
}

/** The limits that stand in the two cells behind an estimate, as their headings say. */
function splitLimits(
  entry: Placed,
  next: Placed | undefined,
  afterNext: Placed | undefined,
  inForce: readonly Heading[],
): CellValue['limits'] | undefined {
  if (!isLoneEstimate(entry) || !isLoneEstimate(next) || !isLoneEstimate(afterNext)) return undefined;
  const isSplit = inForce[next.column]?.limit === 'lower' && inForce[afterNext.column]?.limit === 'upper';
  const [lower, upper] = [next.value.estimate, afterNext.value.estimate];
  return isSplit ? { lower, upper, span: cover(lower.span, upper.span) } : undefined;
}

function endOf({ cell }: Placed): number {
  return cell.column + cell.columnSpan;
}

function withLimits(
  entry: Placed,
  limits: NonNullable<CellValue['limits']>,
  { value, cell }: Placed,
): Placed {
  const { estimate } = entry.value;
  const p = value.p ?? entry.value.p;
  const isBeside = cell.row === entry.cell.row && estimate !== undefined;
  const span = isBeside ? cover(estimate.span, limits.span) : (estimate?.span ?? limits.span);
  return {
    ...entry,
    cell: { ...entry.cell, columnSpan: cell.column + cell.columnSpan - entry.cell.column },
    value: { ...(estimate === undefined ? {} : { estimate }), limits, span, ...(p === undefined ? {} : { p }) },
  };
}

function labelItems({ grid, itemsOf }: Sheet, row: number): readonly Item[] {
  const cell = grid.at(row, 0);
  return cell === undefined ? [] : itemsOf(cell);
}

/** What a value is a value of, or undefined where it is no result. */
function namingOf(
  sheet: Sheet,
  entry: Placed,
  margin: Heading,
  inForce: readonly Heading[],
): Naming | undefined {
  const { value, column } = entry;
  const heading = inForce[column];
  if (heading?.p !== undefined && value.limits === undefined) return undefined;
  const over = nameFor(heading, entry);
  if (value.limits === undefined) {
    return isBareRatio(sheet, entry, over) && !isOfTheModel(sheet, entry) ? over : undefined;
  }
  if (value.estimate === undefined) return undefined;
  if (isOfTheModel(sheet, entry)) return AN_AMOUNT;
  const noted = noteOn(sheet, entry.cell)?.names.find(({ firm }) => firm);
  if (noted !== undefined && fitsNumbers(noted, value)) return noted;
  if (over !== undefined) return over;
  if (heading?.spread && heading.label === undefined) return undefined;
  if (heading?.plain) return AN_AMOUNT;
  const beside = nameFor(margin, entry);
  if (beside !== undefined) return beside;
  if (margin.spread) return AN_AMOUNT;
  const { caption, notes, context } = sheet;
  const isOther = caption.spread || saysOther(caption) || (notes.spread && heading?.label === undefined);
  const inherited = nameFor(caption, entry) ?? (isOther ? AN_AMOUNT : nameFor(notes, entry));
  if (inherited !== undefined) return inherited;
  if (!fitsNumbers(A_RATIO, value)) return AN_AMOUNT;
  const announced = heading?.label ?? caption.label ?? notes.label;
  if (announced === undefined) return undefined;
  return sheet.hasNegative() ? AN_AMOUNT : (context.customs.naming ?? AN_AMOUNT);
}

/**
 * What the note says that a cell's mark points to, where it names a quantity.
 *
 * ```
 * 0.19 (0.07 to 0.31)ᵇ     ᵇ Mean difference.
 *                    ^     ^^^^^^^^^^^^^^^^^
 * ```
 */
function noteOn({ context, notesByMark }: Sheet, { span }: Cell): Heading | undefined {
  if (notesByMark().size === 0) return undefined;
  for (let at = Math.max(0, indexAt(context.marks, span.start)); at < context.marks.length; at++) {
    const mark = context.marks[at] as Mark;
    if (mark.span.start >= span.end) return undefined;
    const note = mark.span.start < span.start ? undefined : notesByMark().get(quote(context.text, mark.span).trim());
    if (note !== undefined) return note;
  }
  return undefined;
}

/** Rows that tell of the model as a whole; its intercept is no ratio of anything either. */
const OF_THE_MODEL = /^\(?(constant|intercept|hosmer|correctly|observations?|nagelkerke|cox (&|and) snell|pseudo|r2|aic|bic|log[- ]likelihood|model fit|chi|wald|likelihood ratio)(?!\p{L})/iu;

function isOfTheModel({ grid }: Sheet, { cell }: Placed): boolean {
  return OF_THE_MODEL.test(grid.words(cell.row, 0));
}

/** Whether a caption speaks of shares, rates or means, if only loosely. */
function saysOther({ names }: Heading): boolean {
  return names.some(({ quantity }) => quantity.kind !== 'ratio');
}

/**
 * The name in a heading for a value: the one in the value's place where a cell holds
 * as many values as the heading has names, else the first that can have such numbers.
 */
function nameFor(heading: Heading | undefined, { value, index, count }: Placed): Naming | undefined {
  const firm = heading?.names.filter((name) => name.firm) ?? [];
  const distinct = firm.filter((name, at) => name.quantity !== firm[at - 1]?.quantity);
  if (count > 1 && distinct.length === count) return distinct[index];
  return distinct.find((name) => fitsNumbers(name, value));
}

/** A ratio without an interval: under a ratio's own heading, and no reference category. */
function isBareRatio(
  { grid }: Sheet,
  { value, cell, count }: Placed,
  over: Naming | undefined,
): boolean {
  const { estimate } = value;
  if (over?.quantity.kind !== 'ratio' || !over.firm || estimate === undefined || count > 1) return false;
  const isReference = estimate.value === 1 || /ref/i.test(grid.words(cell.row, cell.column));
  return !isReference && !estimate.percent && estimate.decimals > 0;
}

function makeResult(
  sheet: Sheet,
  row: number,
  entry: Placed,
  naming: Naming,
  inForce: readonly Heading[],
  placed: readonly Placed[],
): Result {
  const { value, cell, column } = entry;
  const { labels, caption, notes, context, grid } = sheet;
  const heading = inForce[column];
  const stated = heading?.label?.level ?? levelInMargin(sheet, row) ?? inForce[column + 1]?.label?.level
    ?? inForce.find(({ label }) => label?.level !== undefined)?.label?.level;
  const level = stated ?? caption.label?.level ?? notes.label?.level ?? context.customs.level;
  const p = value.p?.value ?? pBeside(sheet, row, entry, inForce, placed);
  const adjusted = heading?.adjusted ?? caption.adjusted;
  const inferred: Inheritable[] = [
    ...(heading?.names.includes(naming) ? [] : ['measure' as const]),
    ...(stated === undefined && level !== undefined ? ['level' as const] : []),
  ];
  return resultOf(naming, {
    ...(value.estimate === undefined ? {} : { estimate: value.estimate }),
    ...(value.limits === undefined ? {} : { limits: value.limits }),
    ...(level === undefined ? {} : { level }),
    ...(p === undefined ? {} : { p }),
    ...(adjusted === undefined ? {} : { adjusted }),
    span: value.span,
    type: heading?.label?.type ?? caption.label?.type ?? 'confidence',
    inferred,
    cell: { table: grid.table, cell, row: labels.row(row), column: labels.column(column) },
    about: { term: labels.row(row) },
  });
}

/** The level that the label of a row states, or that of the row below which holds its intervals. */
function levelInMargin(sheet: Sheet, row: number): number | undefined {
  const own = headingOf(labelItems(sheet, row)).label?.level;
  return own ?? (continuesBelow(sheet, row) ? headingOf(labelItems(sheet, row + 1)).label?.level : undefined);
}

/**
 * The p-value of a row that belongs to an estimate: in the nearest p column to its
 * right, before the next estimate. One that spans several rows tests them together.
 */
function pBeside(
  { grid, itemsOf }: Sheet,
  row: number,
  { column, cell, index, count }: Placed,
  inForce: readonly Heading[],
  placed: readonly Placed[],
): PValue | undefined {
  const next = placed.find((other) => other.column > column && other.value.limits !== undefined);
  const isP = (at: number): boolean => inForce[at]?.p !== undefined;
  let at = cell.column + cell.columnSpan;
  while (at < (next?.column ?? inForce.length) && !isP(at)) at++;
  if (!isP(at) || at >= (next?.column ?? inForce.length)) at = precedes(inForce, column) ? column - 1 : -1;
  const beside = grid.at(row, at);
  const tests = inForce[at]?.p;
  if (tests !== 'result' || beside === undefined) return undefined;
  return pIn(itemsOf(beside), beside.rowSpan > 1 ? 'factor' : tests, index, count);
}

/** Whether a table puts p-values before their estimates: "p | OR (95% CI)". */
function precedes(inForce: readonly Heading[], column: number): boolean {
  const isRatio = (heading: Heading | undefined): boolean => heading?.names.some(({ quantity }) =>
    quantity.kind === 'ratio') === true;
  return inForce[column - 1]?.p !== undefined && !isRatio(inForce[column - 2]);
}

/** Above 1 a number in a column of p-values is a slip only where it is printed as they are: "1.33". */
function looksLikeP({ value, decimals }: Printed): boolean {
  return value < 10 && decimals >= 2;
}

// 0.03   <0.001   = .02   p<0.05   0.003*
function pIn(
  items: readonly Item[],
  tests: PValue['tests'],
  index: number,
  count: number,
): PValue | undefined {
  const said = items.find((item) => item.kind === 'p');
  if (said !== undefined) return { ...said.value, tests };
  const numbers = items.flatMap(({ kind }, at) => (kind === 'number' ? [at] : []));
  const at = numbers[index] ?? -1;
  const number = items[at];
  if (number?.kind !== 'number' || numbers.length !== count) return undefined;
  const before = items[at - 1];
  const relation = (before?.kind === 'relation' ? before.relation : undefined) ?? '=';
  const { printed } = number;
  if (printed.value > 1 && relation === '=' && !looksLikeP(printed)) return undefined;
  return { relation, printed, tests, span: before === undefined ? printed.span : cover(before.span, printed.span) };
}
