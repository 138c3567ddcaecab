import { contains, type RatioResult, type Reading, type Table } from '../model/index.ts';
import { agreementOf, limitsStand } from './arithmetic.ts';
import { ratiosOfTable } from './neighbours.ts';

/** So many ratios of a column, and so many of them, must have a p of their own that follows. */
const FEWEST = 3;
const MOST_WITH_P = 0.9;
const MOST_FOLLOWING = 0.7;

/** What the columns of a table tell, asked once for all their rows. */
const FOLLOWING = new WeakMap<Table, Map<number, boolean>>();

/**
 * Whether a ratio's p stands in its own row of a table whose p-values are evidently those of
 * its intervals: nearly every ratio of the column has one, and most of them follow. A p for a
 * whole factor is printed once for its rows, and leaves the others without.
 */
export function hasPOfItsRow(reading: Reading, { cell, p }: RatioResult): boolean {
  if (cell === undefined || p === undefined) return false;
  const { table, cell: { row, column } } = cell;
  return followsDownColumn(reading, table, column) && table.cells.some((other) =>
    other.row === row && other.rowSpan === 1 && contains(other.span, p.span));
}

function followsDownColumn(reading: Reading, table: Table, column: number): boolean {
  const columns = FOLLOWING.get(table) ?? new Map<number, boolean>();
  FOLLOWING.set(table, columns);
  const known = columns.get(column);
  if (known !== undefined) return known;
  const ratios = ratiosOfTable(reading, table).filter((ratio) =>
    ratio.cell?.cell.column === column && hasSoundLimits(ratio));
  const withP = ratios.filter(({ p }) => p?.tests === 'result');
  const following = withP.filter(follows);
  const found = withP.length >= FEWEST && withP.length >= MOST_WITH_P * ratios.length
    && following.length >= MOST_FOLLOWING * withP.length;
  columns.set(column, found);
  return found;
}

function hasSoundLimits({ estimate, interval }: RatioResult): boolean {
  return interval !== undefined && limitsStand(estimate, interval, 'binary');
}

function follows({ estimate, interval, p }: RatioResult): boolean {
  return interval !== undefined
    && agreementOf(estimate, interval, 'binary', p).outcome !== 'neither';
}
