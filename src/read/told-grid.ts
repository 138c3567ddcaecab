import type { Span } from '../model/index.ts';
import { type GridCell, isData, withGroupLabels } from './grid.ts';
import { type PlacedCell, placeCells } from './spanning-cells.ts';
import type { WrittenGrid } from './table-surroundings.ts';
import { plainWords, type ToldCell } from './told.ts';

/** A told cell with its place; `span` is where its words were written. */
export interface WrittenTold extends PlacedCell<ToldCell> {
  readonly span: Span;
}

/** Told cells in their places, without the empty ones, which only keep a place. */
export interface PlacedTold {
  readonly cells: readonly PlacedCell<ToldCell>[];
  readonly rowCount: number;
  readonly columnCount: number;
}

/** Finds each cell's column; empty cells hold their place for the others and then go. */
export function placeTold(cells: readonly ToldCell[]): PlacedTold {
  const { cells: all, rowCount, columnCount } = placeCells(cells);
  const placed = all.filter(({ cell }) => plainWords(cell.words) !== '');
  return { cells: placed, rowCount, columnCount };
}

/**
 * The grid of written cells. Where the form marks no header rows they are told by
 * their words, and labels of the first column reach down over rows without one.
 */
export function gridOfTold(
  written: readonly WrittenTold[],
  { rowCount, columnCount }: PlacedTold,
): WrittenGrid {
  const isMarked = written.some(({ cell }) => cell.header);
  const headerRows = isMarked ? 0 : headerRowsOf(written);
  const cells = written.map((told): GridCell<Span> => {
    const { cell, row, column, span } = told;
    const words = plainWords(cell.words);
    return {
      pieces: [{ item: span, words, left: column, right: column + cell.columnSpan }],
      row,
      column,
      rowSpan: Math.min(cell.rowSpan, rowCount - row),
      columnSpan: cell.columnSpan,
      header: cell.header || row < headerRows,
    };
  });
  const reaching = written.some(({ cell }) => cell.rowSpan > 1)
    ? cells
    : withGroupLabels(cells, rowCount);
  return {
    cells: reaching.map(({ pieces, ...cell }) => ({ ...cell, span: pieces[0]?.item as Span })),
    rowCount,
    columnCount,
  };
}

/**
 * Header rows are those above the first row with a label and, right of it, data.
 * A row with nothing but a label, under a header, heads a group and is none.
 */
function headerRowsOf(written: readonly WrittenTold[]): number {
  let hasHeads = false;
  for (const [first, ...others] of rowsOf(written)) {
    if (first === undefined) continue;
    const isLabelled = first.column === 0;
    const isGroup = isLabelled && others.length === 0 && hasHeads;
    const isBody = isLabelled && others.some(({ cell }) => isData(plainWords(cell.words)));
    if (isGroup || isBody) return first.row;
    hasHeads ||= others.length > 0;
  }
  return 0;
}

function rowsOf(written: readonly WrittenTold[]): readonly (readonly WrittenTold[])[] {
  const rows: WrittenTold[][] = [];
  for (const cell of written) {
    const last = rows.at(-1);
    if (last?.[0]?.row === cell.row) last.push(cell);
    else rows.push([cell]);
  }
  return rows;
}
