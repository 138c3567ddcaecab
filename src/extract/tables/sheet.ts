import { type Cell, indexAt, type Mark, quote, type Span, type Table } from '../../model/index.ts';
import type { Definitions } from '../definitions.ts';
import { lex } from '../lex.ts';
import type { NumberStyle } from '../number.ts';
import type { Item } from '../parse/item.ts';
import { readItems } from '../parse/items.ts';
import type { Customs } from '../resolve/results.ts';
import { type Grid, gridOf } from './grid.ts';
import { type Heading, headingOf } from './heading.ts';
import { type Labels, labelsOf } from './labels.ts';

/** What a manuscript tells of how its cells are to be read. */
export interface TableContext {
  readonly text: string;
  readonly style: NumberStyle;
  readonly marks: readonly Mark[];
  readonly definitions: Definitions;
  readonly customs: Customs;
}

/** A table made ready for reading: its grid, its margins, and every cell's items. */
export interface Sheet {
  readonly grid: Grid;
  readonly labels: Labels;
  readonly itemsOf: (cell: Cell) => readonly Item[];
  readonly caption: Heading;
  readonly notes: Heading;
  /** What the notes say, by the raised mark before each: "b" for "ᵇ Mean difference". */
  readonly notesByMark: () => ReadonlyMap<string, Heading>;
  readonly context: TableContext;
  /** Whether any number of the table is negative, so that it holds no ratios alone. */
  readonly hasNegative: () => boolean;
}

/** Makes a table ready for reading. Cells are read when they are first asked for. */
export function sheetOf(table: Table, context: TableContext): Sheet {
  const { text, definitions, style, marks } = context;
  const grid = gridOf(text, table);
  const read = (span: Span): readonly Item[] =>
    readItems(text, lex(text, span, { ...style, cell: true }, marks), definitions);
  const cache = new Map<Cell, readonly Item[]>();
  const itemsOf = (cell: Cell): readonly Item[] => {
    const known = cache.get(cell) ?? read(cell.span);
    cache.set(cell, known);
    return known;
  };
  const isEmptyRow = (row: number): boolean => {
    for (let column = 1; column < table.columnCount; column++) {
      const words = grid.words(row, column);
      if (words !== '' && grid.at(row, column) !== grid.at(row, 0)) return false;
    }
    return true;
  };
  return {
    grid,
    labels: labelsOf(grid, isEmptyRow),
    itemsOf,
    caption: headingOf(table.caption === undefined ? [] : read(table.caption)),
    notes: headingOf(table.notes.flatMap(read)),
    notesByMark: once(() => notesByMark(table, context, read)),
    context,
    hasNegative: () => table.cells.some((cell) => itemsOf(cell).some((item) =>
      item.kind === 'number' && item.printed.value < 0)),
  };
}

/** Each mark in the notes begins what is said of the cells that bear it. */
function notesByMark(
  { notes }: Table,
  { text, marks }: TableContext,
  read: (span: Span) => readonly Item[],
): ReadonlyMap<string, Heading> {
  const byMark = new Map<string, Heading>();
  for (const { start, end } of notes) {
    const own = marksWithin(marks, { start, end });
    own.forEach(({ span }, at) => {
      const said = { start: span.end, end: own[at + 1]?.span.start ?? end };
      byMark.set(quote(text, span).trim(), headingOf(read(said)));
    });
  }
  return byMark;
}

function marksWithin(marks: readonly Mark[], { start, end }: Span): readonly Mark[] {
  const own: Mark[] = [];
  for (let at = Math.max(0, indexAt(marks, start)); at < marks.length; at++) {
    const mark = marks[at] as Mark;
    if (mark.span.start >= end) break;
    if (mark.span.start >= start) own.push(mark);
  }
  return own;
}

function once<Value>(make: () => Value): () => Value {
  let made: Value | undefined;
  return () => (made ??= make());
}
