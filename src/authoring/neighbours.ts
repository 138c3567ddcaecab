import type { RatioResult, Reading, Result, Table } from '../model/index.ts';
import { neighbouring } from '../stats/neighbour.ts';
import type { ReportedNumbers } from '../stats/reported-numbers.ts';
import { reportedNumbers } from './arithmetic.ts';

/** The ratios of a table, by their columns and by what they print. */
interface Gathered {
  readonly all: RatioResult[];
  readonly columns: Map<number, RatioResult[]>;
  /** By column and limits: "3 1.05 2.41". */
  readonly alike: Map<string, RatioResult[]>;
}

/** Ratios by their tables, gathered once for a whole manuscript. */
const GATHERED = new WeakMap<readonly Result[], ReadonlyMap<Table, Gathered>>();

/** The ratios of a table in reading order. */
export function ratiosOfTable(reading: Reading, table: Table): readonly RatioResult[] {
  return gatheredOf(reading, table)?.all ?? [];
}

/**
 * The other ratios under the same heading of a result's table with the same interval, digit
 * for digit, in reading order; none for a result in prose.
 */
export function othersWithSameInterval(
  reading: Reading,
  result: RatioResult,
): readonly RatioResult[] {
  if (result.cell === undefined) return [];
  const alike = gatheredOf(reading, result.cell.table)?.alike.get(keyOf(result)) ?? [];
  return alike.filter((other) => other !== result);
}

function gatheredOf({ findings }: Reading, table: Table): Gathered | undefined {
  const known = GATHERED.get(findings.results) ?? gather(findings.results);
  GATHERED.set(findings.results, known);
  return known.get(table);
}

function gather(results: readonly Result[]): ReadonlyMap<Table, Gathered> {
  const tables = new Map<Table, Gathered>();
  for (const result of results) {
    if (result.kind !== 'ratio' || result.cell === undefined) continue;
    const { table, cell: { column } } = result.cell;
    const known: Gathered = tables.get(table)
      ?? { all: [], columns: new Map(), alike: new Map() };
    tables.set(table, known);
    known.all.push(result);
    append(known.columns, column, result);
    if (result.interval !== undefined) append(known.alike, keyOf(result), result);
  }
  return tables;
}

function append<Key>(lists: Map<Key, RatioResult[]>, key: Key, result: RatioResult): void {
  const list = lists.get(key);
  if (list === undefined) lists.set(key, [result]);
  else list.push(result);
}

function keyOf({ cell, interval }: RatioResult): string {
  return `${cell?.cell.column} ${interval?.lower.plain} ${interval?.upper.plain}`;
}

/** In tables longer than this a limit in common is too likely to be a chance. */
const MOST_ROWS = 60;

/**
 * Where a row's limits disagree with its estimate and another row of its column prints the same
 * interval or limit, a sentence that says so: "The row “Obese” has the same upper limit, 3.253."
 * At most one.
 */
export function neighbourInWords(reading: Reading, result: RatioResult): readonly string[] {
  const row = strayed(reading, result, 'interval');
  if (row?.interval === undefined) return sharedLimit(result, othersWithInterval(reading, result));
  const { lower, upper } = row.interval;
  return [`${named(row)} has the same interval, ${lower.plain} to ${upper.plain}.`];
}

/** So many decimals make it unlikely that two rows share a p-value by chance. */
const TELLING_DECIMALS = 3;

/** The same of a p-value that does not follow: "The row “Obese” has the same p-value, 0.109." */
export function neighbourOfPInWords(reading: Reading, result: RatioResult): readonly string[] {
  const { p } = result;
  if (p === undefined || p.printed.decimals < TELLING_DECIMALS) return [];
  if (p.printed.value <= 0.001) return [];
  const row = strayed(reading, result, 'p');
  return row === undefined ? [] : [`${named(row)} has the same p-value, ${p.printed.plain}.`];
}

/** The first row from which a part may have strayed, printed there with the same digits. */
function strayed(
  reading: Reading,
  result: RatioResult,
  part: 'interval' | 'p',
): RatioResult | undefined {
  const { estimate, interval } = result;
  const others = othersWithInterval(reading, result);
  if (interval === undefined || estimate === undefined) return undefined;
  const numbersOf = (row: RatioResult): ReportedNumbers => reportedNumbers(
    row.estimate, row.interval ?? interval, row.p?.tests === 'result' ? row.p : undefined);
  const found = neighbouring(numbersOf(result), others.map(numbersOf))
    .find((one) => one.likeness === 'same digits' && one.part === part);
  return found === undefined ? undefined : others[found.row];
}

/** The other ratios with an interval under the same heading, in a table that is not too long. */
function othersWithInterval(reading: Reading, result: RatioResult): readonly RatioResult[] {
  const { cell } = result;
  const column = cell === undefined
    ? [] : gatheredOf(reading, cell.table)?.columns.get(cell.cell.column) ?? [];
  if (column.length > MOST_ROWS) return [];
  return column.filter((other) => other !== result && other.interval !== undefined);
}

/** So many rows away a limit in common is more than a chance. */
const NEAR = 2;

/** One limit in common with a row close by, printed with two decimals or more. */
function sharedLimit({ interval, cell }: RatioResult, others: readonly RatioResult[]): readonly string[] {
  for (const [name, limit] of [['lower', interval?.lower], ['upper', interval?.upper]] as const) {
    if (limit === undefined || limit.decimals < 2) continue;
    const row = others.find((other) => other.interval?.[name].plain === limit.plain
      && Math.abs((other.cell?.cell.row ?? Infinity) - (cell?.cell.row ?? 0)) <= NEAR);
    if (row !== undefined) return [`${named(row)} has the same ${name} limit, ${limit.plain}.`];
  }
  return [];
}

function named({ cell }: RatioResult): string {
  return cell === undefined || cell.row === '' ? 'Another row' : `The row “${cell.row}”`;
}
