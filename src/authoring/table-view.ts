import type { Interval, Printed, RatioResult, Reading, Result, Table } from '../model/index.ts';
import { type TableIntervals, tableIntervals } from '../stats/table-intervals.ts';
import { leastAsymmetry, reportedNumbers } from './arithmetic.ts';
import { insideLimits, limitsInOrder } from './printed-numbers.ts';

/** A ratio of a table with all that its symmetry is judged by. */
interface Row {
  readonly estimate: Printed;
  readonly interval: Interval;
}

/** What a table's ratios tell together. */
interface View {
  readonly intervals: TableIntervals | undefined;
  /** The middle of the rows' asymmetries, |ln A|. */
  readonly usual: number;
  readonly rows: number;
}

/** Tables looked at once, for all their rows ask the same. */
const VIEWS = new WeakMap<Table, View>();

/** Fewer rows than this say nothing of how a table was made. */
const FEWEST_ROWS = 4;

/** A row that leans so many times more than its table does stands out all the same. */
const STANDS_OUT = 4;

/**
 * Whether most intervals of a result's table are lopsided in their own way, so that they
 * were made by another method (profile likelihood, exact, bootstrap) and one lopsided row more
 * is no finding; a row that leans far more than the others still is.
 */
export function sharesLeanOfTable(reading: Reading, { cell, estimate, interval }: RatioResult): boolean {
  if (cell === undefined || estimate === undefined || interval === undefined) return false;
  const { intervals, usual } = viewOf(reading, cell.table);
  if (intervals?.made !== 'not Wald') return false;
  return leastAsymmetry(estimate, interval) <= STANDS_OUT * usual;
}

/** So many rows, and so many of them symmetric, there must be before one that leans stands out. */
const FEWEST_SYMMETRIC = 10;
const MOST_SYMMETRIC = 0.9;

/** A row leans more than a hair, by rounding twice or so, from here on: |ln A|. */
const MORE_THAN_A_HAIR = 0.08;

/**
 * Whether nearly all intervals of a result's table are symmetric on the log scale, so that
 * they are Wald's, and this one is not. What another method might explain elsewhere is then
 * no explanation: one method made the table.
 */
export function standsOutOfTable(
  reading: Reading,
  { cell, estimate, interval }: RatioResult,
): boolean {
  if (cell === undefined || estimate === undefined || interval === undefined) return false;
  const { intervals, rows } = viewOf(reading, cell.table);
  return intervals !== undefined && rows >= FEWEST_SYMMETRIC
    && 1 - intervals.asymmetric >= MOST_SYMMETRIC
    && leastAsymmetry(estimate, interval) >= MORE_THAN_A_HAIR;
}

function viewOf({ findings }: Reading, table: Table): View {
  const known = VIEWS.get(table);
  if (known !== undefined) return known;
  const rows = findings.results.flatMap((result) => rowOf(result, table));
  const leans = rows.map(({ estimate, interval }) => leastAsymmetry(estimate, interval))
    .sort((one, other) => one - other);
  const view: View = {
    intervals: rows.length < FEWEST_ROWS ? undefined
      : tableIntervals(rows.map(({ estimate, interval }) =>
        reportedNumbers(estimate, interval, undefined))),
    usual: leans[leans.length >> 1] ?? 0,
    rows: rows.length,
  };
  VIEWS.set(table, view);
  return view;
}

function rowOf(result: Result, table: Table): readonly Row[] {
  if (result.kind !== 'ratio' || result.cell?.table !== table) return [];
  const { estimate, interval } = result;
  if (estimate === undefined || interval === undefined || interval.lower.value <= 0) return [];
  return limitsInOrder(interval) && insideLimits(estimate, interval) ? [{ estimate, interval }] : [];
}
