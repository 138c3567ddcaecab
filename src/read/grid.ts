/**
 * A piece of a table's line with where it stands from left to right, in any
 * unit that is the same for all: points on a page, characters in typed text.
 */
export interface Piece<Item> {
  readonly item: Item;
  readonly words: string;
  readonly left: number;
  readonly right: number;
}

/** A cell of a recovered grid with the pieces it is made of, in reading order. */
export interface GridCell<Item> {
  readonly pieces: readonly Piece<Item>[];
  readonly row: number;
  readonly column: number;
  readonly rowSpan: number;
  readonly columnSpan: number;
  readonly header: boolean;
}

/** Cells in reading order, with the size of their grid. */
export interface Grid<Item> {
  readonly cells: readonly GridCell<Item>[];
  readonly rowCount: number;
  readonly columnCount: number;
  /** How far each column reaches from left to right. */
  readonly columns: readonly Extent[];
}

/** From where to where something reaches, from left to right. */
export interface Extent {
  readonly left: number;
  readonly right: number;
}

/**
 * Recovers a grid from lines of pieces. Pieces that overlap from left to right
 * share a column; one that reaches over several columns, as a heading over two
 * groups does, spans them and does not join them. A heading set beside its
 * column, no farther than `near`, is put over it.
 */
export function gridOf<Item>(rows: readonly (readonly Piece<Item>[])[], near: number): Grid<Item> {
  const apart = columnsOf(rows);
  const headerRows = headerRowsOf(rows, apart[0]);
  const columns = underTheirHeads(apart, rows, headerRows, near);
  const cells = rows.flatMap((pieces, row) =>
    merged(pieces.map((piece) => ({ ...reach(columns, piece), pieces: [piece] }))).map((cell) => ({
      ...cell,
      row,
      rowSpan: 1,
      header: row < headerRows,
    })),
  );
  return { cells, rowCount: rows.length, columnCount: columns.length, columns };
}

// Columns grow from the lines with most pieces: those are the body, not the spanning heads.
function columnsOf(rows: readonly (readonly Piece<unknown>[])[]): readonly Extent[] {
  const fullest = rows.reduce((most, row) => Math.max(most, row.length), 0);
  const columns: Extent[] = [];
  const body = rows.filter((row) => row.length * 2 > fullest).sort((a, b) => b.length - a.length);
  for (const piece of body.flat()) grow(columns, piece);
  for (const piece of rows.flat()) if (touchedBy(columns, piece).length === 0) columns.push(piece);
  return columns.sort((a, b) => a.left - b.left);
}

// P            P
//    0.002  →  0.002     a heading that no row has beside a figure is that column's own
function underTheirHeads(
  columns: readonly Extent[],
  rows: readonly (readonly Piece<unknown>[])[],
  headerRows: number,
  near: number,
): readonly Extent[] {
  const heads = columns.map((column) => usedBy(column, rows.slice(0, headerRows)));
  const bodies = columns.map((column) => usedBy(column, rows.slice(headerRows)));
  const joined: Extent[] = [];
  let before = -1;
  for (const [i, column] of columns.entries()) {
    const last = joined.at(-1);
    const free =
      last !== undefined &&
      before >= 0 &&
      ((!bodies[before] && !heads[i]) || (!heads[before] && !bodies[i]));
    if (free && column.left - last.right <= near) {
      joined[joined.length - 1] = union(last, column);
      before = -1;
    } else {
      joined.push(column);
      before = i;
    }
  }
  return joined;
}

function usedBy(column: Extent, rows: readonly (readonly Piece<unknown>[])[]): boolean {
  return rows.some((row) => row.some((piece) => touchedBy([column], piece).length > 0));
}

/** Joins a piece to the one column it overlaps; a piece over several leaves them apart. */
function grow(columns: Extent[], piece: Extent): void {
  const [first, ...others] = touchedBy(columns, piece);
  const column = first === undefined ? undefined : columns[first];
  if (first === undefined || column === undefined)
    columns.push({ left: piece.left, right: piece.right });
  else if (others.length === 0) columns[first] = union(column, piece);
}

function union(a: Extent, b: Extent): Extent {
  return { left: Math.min(a.left, b.left), right: Math.max(a.right, b.right) };
}

function touchedBy(columns: readonly Extent[], piece: Extent): readonly number[] {
  return columns.flatMap((column, i) =>
    Math.min(column.right, piece.right) > Math.max(column.left, piece.left) ? [i] : [],
  );
}

interface Reach {
  readonly column: number;
  readonly columnSpan: number;
}

function reach(columns: readonly Extent[], piece: Extent): Reach {
  const touched = touchedBy(columns, piece);
  return { column: touched[0] ?? 0, columnSpan: Math.max(1, touched.length) };
}

interface Joint<Item> extends Reach {
  readonly pieces: readonly Piece<Item>[];
}

/** Pieces of one line that fall into the same column are one cell. */
function merged<Item>(pieces: readonly Joint<Item>[]): readonly Joint<Item>[] {
  const cells: Joint<Item>[] = [];
  for (const piece of pieces) {
    const last = cells.at(-1);
    if (last === undefined || piece.column >= last.column + last.columnSpan) cells.push(piece);
    else cells[cells.length - 1] = joined(last, piece);
  }
  return cells;
}

function joined<Item>(a: Joint<Item>, b: Joint<Item>): Joint<Item> {
  const end = Math.max(a.column + a.columnSpan, b.column + b.columnSpan);
  return { pieces: [...a.pieces, ...b.pieces], column: a.column, columnSpan: end - a.column };
}

/** Header rows are those above the first line that has a label and, right of it, data. */
function headerRowsOf(
  rows: readonly (readonly Piece<unknown>[])[],
  labels: Extent | undefined,
): number {
  if (labels === undefined) return 0;
  const first = rows.findIndex(
    ([label, ...others]) =>
      label !== undefined &&
      touchedBy([labels], label).length > 0 &&
      others.some(({ words }) => isData(words)),
  );
  return Math.max(first, 0);
}

// Data:     0.72 (0.58–0.90)     45 (37.5)     <0.001     1 (reference)     Ref.
// Headers:  95% CI      (n = 120)      Model 1      No. (%)      2010–2014      10,000 yuan
const HEADER_WORDS = [
  /\d+(?:\.\d+)?\s?%\s?(?:C|confidence)/gi,
  /\(?\bn\s?=\s?[\d,. ]+\)?/gi,
  /\bmodels? \d/gi,
  /^\D*\b(?:19|20)\d\d\b\D*$/g,
  /ref\w*|not? \w+|to\b|and\b/gi,
] as const;

/** Whether the words of a cell are data, and not those of a heading: "0.72 (0.58–0.90)". */
export function isData(words: string): boolean {
  if (/^ref/i.test(words)) return true;
  const rest = HEADER_WORDS.reduce((left, pattern) => left.replace(pattern, ''), words).trim();
  return /^\W*\d/.test(rest) && !/\p{L}{3}/u.test(rest);
}

/**
 * Lets the labels of the first column reach down over the rows that have none,
 * where the second column holds labels too: "Sex" over "Male" and "Female".
 */
export function withGroupLabels<Item>(
  cells: readonly GridCell<Item>[],
  rowCount: number,
): readonly GridCell<Item>[] {
  const body = cells.filter(({ header }) => !header);
  const second = body.filter(({ column }) => column === 1);
  const worded = second.filter(({ pieces }) => !isData(pieces.map(({ words }) => words).join(' ')));
  const labelled = new Set(cells.filter(({ column }) => column === 0).map(({ row }) => row));
  const bare = second.some(({ row }) => !labelled.has(row));
  if (!bare || worded.length < 0.5 * second.length) return cells;
  return cells.map((cell) =>
    cell.header || cell.column > 0
      ? cell
      : { ...cell, rowSpan: reachDown(cell.row, labelled, rowCount) },
  );
}

function reachDown(row: number, labelled: ReadonlySet<number>, rowCount: number): number {
  let end = row + 1;
  while (end < rowCount && !labelled.has(end)) end++;
  return end - row;
}
