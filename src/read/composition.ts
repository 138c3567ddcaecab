import type {
  Block, BlockKind, Format, Manuscript, Mark, Notice, Section, Span, Table,
} from '../model/index.ts';
import { type PlacedCell, placeCells, type SpanningCell } from './spanning-cells.ts';

/**
 * A manuscript in the making, for forms that say themselves what is a paragraph, a
 * heading or a table: their readers write text into it, block after block.
 */
export interface Composition {
  readonly parts: string[];
  readonly blocks: Block[];
  readonly tables: Table[];
  readonly marks: Mark[];
  readonly notices: Notice[];
  /** How long the text is so far, in UTF-16 code units. */
  length: number;
  open: OpenBlock | undefined;
}

interface OpenBlock {
  readonly kind: BlockKind;
  readonly section: Section;
  readonly start: number;
  /** Whether nothing was written yet since the block, its line or its cell began. */
  fresh: boolean;
  /** The space that is due before the next word; it is dropped where none comes. */
  due: string;
}

/** An empty manuscript, to be written into. */
export function blankComposition(): Composition {
  return {
    parts: [], blocks: [], tables: [], marks: [], notices: [], length: 0, open: undefined,
  };
}

function append(composition: Composition, text: string): void {
  composition.parts.push(text);
  composition.length += text.length;
}

/** Ends the block that is open, if any, and begins another. */
export function openBlock(composition: Composition, kind: BlockKind, section: Section): void {
  closeBlock(composition);
  if (composition.length > 0) append(composition, '\n\n');
  composition.open = { kind, section, start: composition.length, fresh: true, due: '' };
}

/** Ends the block that is open; one without a word in it leaves no trace. */
export function closeBlock(composition: Composition): void {
  const { open } = composition;
  composition.open = undefined;
  if (open === undefined || composition.length === open.start) return;
  const span = { start: open.start, end: endOfWords(composition, open.start) };
  if (span.end === span.start) return;
  composition.blocks.push({ kind: open.kind, section: open.section, span });
}

/** Where the last word ends: a table's last cells may be empty. */
function endOfWords({ parts, length }: Composition, start: number): number {
  let end = length;
  for (let at = parts.length - 1; at >= 0 && end > start; at--) {
    const part = parts[at] as string;
    const words = part.trimEnd();
    end -= part.length - words.length;
    if (words !== '') break;
  }
  return Math.max(end, start);
}

/** Spaces beyond these are layout: some markup is pushed into place by hundreds of them. */
const WIDEST_GAP = 16;

/**
 * Writes into the open block. White space in markup is no text: any run of it,
 * line ends included, becomes one space between words. Other spaces are kept.
 */
export function write(composition: Composition, text: string): void {
  const { open } = composition;
  if (open === undefined || text === '') return;
  const joined = (open.due + text).replace(/[ \t\r\n]+/g, ' ');
  const words = open.fresh ? joined.trimStart() : joined;
  const body = words.trimEnd();
  open.due = words.slice(body.length, body.length + WIDEST_GAP);
  if (body === '') return;
  append(composition, body);
  open.fresh = false;
}

/** Begins a new line within the open block, as a line break in a cell does. */
export function breakLine(composition: Composition): void {
  const { open } = composition;
  if (open === undefined || composition.length === open.start) return;
  append(composition, '\n');
  [open.due, open.fresh] = ['', true];
}

/** Parts a cell from the one before by a tab, which keeps their numbers apart. */
export function separateCells(composition: Composition): void {
  const { open } = composition;
  if (open === undefined || composition.length === open.start) return;
  append(composition, '\t');
  [open.due, open.fresh] = ['', true];
}

/** The text that was written since a place. */
export function textSince({ parts, length }: Composition, start: number): string {
  const words: string[] = [];
  let from = length;
  for (let at = parts.length - 1; at >= 0 && from > start; at--) {
    const part = parts[at] as string;
    words.push(part);
    from -= part.length;
  }
  return words.reverse().join('');
}

/** Records that what was written since `start` is raised or lowered. */
export function markSince(composition: Composition, kind: Mark['kind'], start: number): void {
  const written = textSince(composition, start);
  const from = start + written.length - written.trimStart().length;
  if (composition.length > from) {
    composition.marks.push({ kind, span: { start: from, end: composition.length } });
  }
}

/** Puts a table's cells, written row by row, into their grid. Empty ones only keep their place. */
export function closeTable(
  composition: Composition,
  label: string,
  caption: Span | undefined,
  cells: readonly WrittenCell[],
): void {
  const { cells: all, rowCount, columnCount } = placeCells(cells);
  const placed = all.filter(({ cell }) => cell.span.end > cell.span.start);
  const [first, last] = [placed[0], placed.at(-1)];
  if (first === undefined || last === undefined) return;
  composition.tables.push({
    span: { start: first.cell.span.start, end: last.cell.span.end },
    label,
    ...(caption === undefined ? {} : { caption }),
    notes: [],
    cells: placed.map(({ cell, row, column }: PlacedCell<WrittenCell>) => ({
      span: cell.span,
      row,
      column,
      rowSpan: cell.rowSpan,
      columnSpan: cell.columnSpan,
      header: cell.header,
    })),
    rowCount,
    columnCount,
  });
}

/** A cell whose text stands in the composition. */
export interface WrittenCell extends SpanningCell {
  readonly span: Span;
  readonly header: boolean;
}

/** Adds notes to the tables from `first` on, as found behind them. */
export function addNotes(composition: Composition, first: number, notes: readonly Span[]): void {
  for (let at = first; at < composition.tables.length; at++) {
    const table = composition.tables[at] as Table;
    composition.tables[at] = { ...table, notes: [...table.notes, ...notes] };
  }
}

/** The manuscript that was written. */
export function finished(composition: Composition, name: string, format: Format): Manuscript {
  closeBlock(composition);
  return {
    name,
    format,
    text: composition.parts.join(''),
    blocks: composition.blocks,
    tables: composition.tables,
    lines: [],
    pages: [],
    marks: composition.marks,
    notices: composition.notices,
  };
}
