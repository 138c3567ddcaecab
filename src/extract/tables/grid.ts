import { type Cell, quote, type Table } from '../../model/index.ts';

/** A table by its rows and columns; a spanning cell stands in every place it covers. */
export interface Grid {
  readonly table: Table;
  readonly at: (row: number, column: number) => Cell | undefined;
  /** The words of a cell, with white space folded; "" where there is none. */
  readonly words: (row: number, column: number) => string;
  readonly isHeaderRow: (row: number) => boolean;
}

/** Lays a table's cells out. Costs no more than the places they cover. */
export function gridOf(text: string, table: Table): Grid {
  const places = new Map<number, Cell>();
  const width = Math.max(1, table.columnCount);
  for (const cell of table.cells) {
    const lastRow = Math.min(table.rowCount, cell.row + cell.rowSpan);
    const lastColumn = Math.min(width, cell.column + cell.columnSpan);
    for (let row = cell.row; row < lastRow; row++) {
      for (let column = cell.column; column < lastColumn; column++) {
        if (!places.has(row * width + column)) places.set(row * width + column, cell);
      }
    }
  }
  const at = (row: number, column: number): Cell | undefined =>
    column < width ? places.get(row * width + column) : undefined;
  const words = (row: number, column: number): string => wordsOf(text, at(row, column));
  const headerRows = new Set<number>();
  for (let row = 0; row < table.rowCount; row++) {
    const cells = rowCells(at, row, width);
    if (cells.length > 0 && cells.every(({ header }) => header)) headerRows.add(row);
  }
  return { table, at, words, isHeaderRow: (row) => headerRows.has(row) };
}

function rowCells(
  at: (row: number, column: number) => Cell | undefined,
  row: number,
  width: number,
): readonly Cell[] {
  const cells: Cell[] = [];
  for (let column = 0; column < width; column++) {
    const cell = at(row, column);
    if (cell !== undefined && cells.at(-1) !== cell) cells.push(cell);
  }
  return cells;
}

/** The words of a cell, with white space folded. */
export function wordsOf(text: string, cell: Cell | undefined): string {
  return cell === undefined ? '' : quote(text, cell.span).replace(/\s+/g, ' ').trim();
}
