/** A cell with its extent, as markup gives it: row by row, without its column. */
export interface SpanningCell {
  readonly row: number;
  readonly rowSpan: number;
  readonly columnSpan: number;
}

/** A cell with the place that the rows above leave for it. */
export interface PlacedCell<Cell> {
  readonly cell: Cell;
  readonly row: number;
  readonly column: number;
}

/** The grid that cells make. */
export interface PlacedCells<Cell> {
  readonly cells: readonly PlacedCell<Cell>[];
  readonly rowCount: number;
  readonly columnCount: number;
}

/** No table in print is wider or longer; a larger span is taken for this. */
export const WIDEST = 200;

/** The most rows that one cell may span. */
export const TALLEST = 1000;

/**
 * Gives each cell its column: the first that no cell above or before it takes.
 * A cell over two rows takes a place in the next row too, as in HTML and JATS.
 */
export function placeCells<Cell extends SpanningCell>(
  cells: readonly Cell[],
): PlacedCells<Cell> {
  /** For each column, up to which row (not included) it is taken. */
  const taken: number[] = [];
  const placed: PlacedCell<Cell>[] = [];
  let [row, column, rowCount] = [-1, 0, 0];
  for (const cell of cells) {
    if (cell.row !== row) [row, column] = [cell.row, 0];
    while ((taken[column] ?? 0) > row) column++;
    placed.push({ cell, row, column });
    for (let at = column; at < column + cell.columnSpan; at++) taken[at] = row + cell.rowSpan;
    column += cell.columnSpan;
    rowCount = Math.max(rowCount, row + 1);
  }
  return { cells: placed, rowCount, columnCount: taken.length };
}
