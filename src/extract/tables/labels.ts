import type { Grid } from './grid.ts';

/** The words of a table's margins: a heading over each column, a label before each row. */
export interface Labels {
  readonly headingRows: number;
  readonly column: (column: number) => string;
  readonly row: (row: number) => string;
  /** The group that a row stands in, "" where it stands in none. */
  readonly group: (row: number) => string;
}

/**
 * Reads a table's margins. A heading joins its levels from top to bottom; a row
 * with a label and nothing else heads the rows below it.
 */
export function labelsOf(grid: Grid, isEmptyRow: (row: number) => boolean): Labels {
  const { rowCount, columnCount } = grid.table;
  let headingRows = 0;
  while (headingRows < rowCount && grid.isHeaderRow(headingRows)) headingRows++;
  while (headingRows > 1 && isGroupRow(grid, headingRows - 1)) headingRows--;
  const columns = Array.from({ length: columnCount }, (_, column) =>
    joined(range(0, headingRows).map((row) => grid.words(row, column)), ' '));
  const groups = groupsOf(grid, headingRows, isEmptyRow);
  return {
    headingRows,
    column: (column) => columns[column] ?? '',
    group: (row) => groups[row] ?? '',
    row: (row) => joined([groups[row] ?? '', ...labelCells(grid, row)], ' / '),
  };
}

/** Whether the last of the rows read as headings holds a label alone: the first group's. */
function isGroupRow(grid: Grid, row: number): boolean {
  const label = grid.at(row, 0);
  if (row === 0 || label === undefined || label.columnSpan > 1) return false;
  if (grid.words(row, 0) === '') return false;
  return range(1, grid.table.columnCount).every((column) => grid.words(row, column) === '');
}

function groupsOf(
  grid: Grid,
  headingRows: number,
  isEmptyRow: (row: number) => boolean,
): readonly string[] {
  let group = '';
  const groups: string[] = [];
  for (let row = 0; row < grid.table.rowCount; row++) {
    const label = grid.words(row, 0);
    const isHeading = row >= headingRows && label !== '' && isEmptyRow(row);
    if (isHeading) group = label;
    groups.push(isHeading ? '' : group);
  }
  return groups;
}

/** The cells before the first number: the label, perhaps in several columns. */
function labelCells(grid: Grid, row: number): readonly string[] {
  const first = grid.words(row, 0);
  const second = grid.at(row, 1);
  const isLabel = second !== undefined && second !== grid.at(row, 0) && isWordy(grid.words(row, 1));
  return isLabel ? [first, grid.words(row, 1)] : [first];
}

function isWordy(words: string): boolean {
  return /\p{L}{3}/u.test(words) && !/^ref/i.test(words);
}

/** Joins words that differ from those right before them, leaving out what is empty. */
function joined(parts: readonly string[], separator: string): string {
  return parts.filter((part, at) => part !== '' && part !== parts[at - 1]).join(separator);
}

function range(from: number, to: number): readonly number[] {
  return Array.from({ length: Math.max(0, to - from) }, (_, at) => from + at);
}
