import { type Cell, type Printed, quote, type Reading, type Table } from '../model/index.ts';

/**
 * A whole number in a cell, with the total behind its stroke and the share in its bracket:
 * "45", "45 (37.5)", "45/120".
 */
export interface Whole {
  readonly count: Printed;
  readonly total?: Printed;
  /** The number in the bracket, which is a percentage in most tables and not in all. */
  readonly share?: number;
}

/** A table by its places, as a rule that adds or compares whole columns needs it. */
export interface TableCells {
  readonly table: Table;
  /** The first row below the headings. */
  readonly firstRow: number;
  readonly words: (row: number, column: number) => string;
  readonly heading: (column: number) => string;
  /** What stands before a row's numbers, with the label of the group that it stands in. */
  readonly margin: (row: number) => string;
  /** The whole number that a cell holds, if it holds one and nothing else. */
  readonly whole: (row: number, column: number) => Whole | undefined;
  /** The size that a heading gives its column, "Placebo (n = 120)". */
  readonly size: (column: number) => number | undefined;
}

/** Tables laid out once, for several rules ask for them. */
const LAID_OUT = new WeakMap<Table, TableCells>();

/** Lays a table out by its places; a cell that spans several stands in each of them. */
export function cellsOf({ manuscript }: Reading, table: Table): TableCells {
  const known = LAID_OUT.get(table);
  if (known !== undefined) return known;
  const made = layOut(manuscript.text, table);
  LAID_OUT.set(table, made);
  return made;
}

function layOut(text: string, table: Table): TableCells {
  const places = placesOf(table);
  const at = (row: number, column: number): Cell | undefined =>
    places.get(row * table.columnCount + column);
  const words = (row: number, column: number): string => {
    const cell = at(row, column);
    return cell === undefined ? '' : quote(text, cell.span).replace(/\s+/g, ' ').trim();
  };
  const firstRow = headingRowsOf(table);
  const heading = (column: number): string => Array.from({ length: firstRow }, (_, row) =>
    words(row, column)).filter((part, row, all) => part !== '' && part !== all[row - 1]).join(' ');
  const groups = groupsOf(table, words);
  const wholes = new Map<Cell, Whole | undefined>();
  return {
    table,
    firstRow,
    words,
    heading,
    margin: (row) => `${groups[row] ?? ''} ${[0, 1].map((column) => words(row, column)).join(' ')}`,
    whole: (row, column) => {
      const cell = at(row, column);
      const isOwn = cell?.row === row && cell.column === column && cell.columnSpan === 1;
      if (!isOwn || row < firstRow) return undefined;
      if (!wholes.has(cell)) wholes.set(cell, wholeIn(text, cell));
      return wholes.get(cell);
    },
    size: (column) => sizeIn(heading(column)),
  };
}

/** For each row the label of the last row above that holds a label and nothing else. */
function groupsOf(
  { rowCount, columnCount }: Table,
  words: (row: number, column: number) => string,
): readonly string[] {
  let group = '';
  return Array.from({ length: rowCount }, (_, row) => {
    const label = words(row, 0);
    const others = Array.from({ length: columnCount - 1 }, (_unused, at) => words(row, at + 1));
    if (label !== '' && others.every((part) => part === '' || part === label)) group = label;
    return group;
  });
}

function placesOf(table: Table): ReadonlyMap<number, Cell> {
  const places = new Map<number, Cell>();
  for (const cell of table.cells) {
    const lastRow = Math.min(table.rowCount, cell.row + cell.rowSpan);
    const lastColumn = Math.min(table.columnCount, cell.column + cell.columnSpan);
    for (let row = cell.row; row < lastRow; row++) {
      for (let column = cell.column; column < lastColumn; column++) {
        const place = row * table.columnCount + column;
        if (!places.has(place)) places.set(place, cell);
      }
    }
  }
  return places;
}

function headingRowsOf({ cells, rowCount }: Table): number {
  const bodies = cells.filter(({ header, column }) => !header && column > 0);
  return bodies.reduce((first, { row }) => Math.min(first, row), rowCount);
}

const GROUPED = String.raw`\d{1,3}(?:[, \u00a0\u2009\u202f]\d{3})+|\d+`;

// 45   45 (37.5)   1,234 (20.1%)   45/120   45/120 (37.5%)   45ᵃ   but not: 1.2   45–60   45 (12)
const WHOLE = new RegExp(
  `^(${GROUPED})(?:\\s?[/∕]\\s?(${GROUPED}))?`
    + '(?:\\s?[([]\\s?(\\d{1,3}(?:[.·,]\\d+)?)\\s?%?\\s?[)\\]])?\\s?[a-e*†‡§#]{0,2}$',
);

function wholeIn(text: string, { span }: Cell): Whole | undefined {
  const words = quote(text, span);
  const start = span.start + (words.length - words.trimStart().length);
  const match = words.trim().match(WHOLE);
  const [whole, first, second, inside] = match ?? [];
  if (whole === undefined || first === undefined) return undefined;
  const count = printedAt(first, start);
  const share = inside === undefined ? {} : { share: Number(inside.replace(/[·,]/, '.')) };
  if (second === undefined) return { count, ...share };
  return { count, total: printedAt(second, start + whole.indexOf(second, first.length)), ...share };
}

function printedAt(text: string, start: number): Printed {
  const plain = text.replace(/\D/g, '');
  return {
    text,
    plain,
    value: Number(plain),
    decimals: 0,
    percent: false,
    span: { start, end: start + text.length },
  };
}

// Placebo (n = 1,204)   Cases, N=45
const SIZE = new RegExp(`\\bn\\s?=\\s?(${GROUPED})`, 'i');

function sizeIn(heading: string): number | undefined {
  const found = heading.match(SIZE)?.[1];
  return found === undefined ? undefined : Number(found.replace(/\D/g, ''));
}

/** The rows or columns from one up to, and not with, another: range(1, 3) is 1, 2. */
export function range(from: number, to: number): readonly number[] {
  return Array.from({ length: Math.max(0, to - from) }, (_, at) => from + at);
}
