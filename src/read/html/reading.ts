import type { Mark } from '../../model/index.ts';
import type { Inline, Look, ToldBlock, ToldWords } from '../told.ts';

/** The attributes of an element, as written. */
export type Attributes = Readonly<Record<string, string>>;

/** A block of words that is being read. */
export interface OpenBlock {
  readonly kind: ToldWords['kind'];
  readonly words: Inline[];
}

/** A cell that is being read, with the words in it. */
export interface OpenCell {
  readonly words: Inline[];
  readonly attributes: Attributes;
  readonly header: boolean;
}

/** A cell that was read. */
export interface ReadCell {
  readonly words: readonly Inline[];
  readonly row: number;
  readonly rowSpan: number;
  readonly columnSpan: number;
  readonly header: boolean;
}

/** An element that is open, with what it began. */
export interface OpenElement {
  readonly tag: string;
  readonly marks: boolean;
  readonly looks: boolean;
  /** How many elements it has held so far. */
  parts: number;
}

/** A figure that is being read: the number of blocks before it, and its caption. */
export interface OpenFigure {
  readonly firstBlock: number;
  caption: readonly Inline[] | undefined;
}

/** A table that is being read. Tables that only lay out the page turn into paragraphs. */
export interface OpenTable {
  readonly cells: ReadCell[];
  row: number;
  part: 'head' | 'body' | 'foot';
  /** Rows of the foot that hold a single cell: notes. */
  readonly footRows: Set<number>;
  cell: OpenCell | undefined;
  caption: readonly Inline[] | undefined;
  isLayout: boolean;
}

/** What is known while a page is read, element by element. */
export interface Reading {
  readonly blocks: ToldBlock[];
  block: OpenBlock | undefined;
  /** Tables that are open, the innermost last. */
  readonly tables: OpenTable[];
  /** The caption that is being read, and of what it is. */
  caption: { readonly of: 'table' | 'figure'; readonly words: Inline[] } | undefined;
  readonly figures: OpenFigure[];
  readonly path: OpenElement[];
  /** How many elements deep the part is that is passed over; 0 where text is read. */
  passedOver: number;
  readonly marks: Mark['kind'][];
  readonly looks: Look[];
  /** How deep in preformatted text, whose line ends are printed. */
  inPreformatted: number;
}

/** The state before the first element. */
export function startReading(): Reading {
  return {
    blocks: [], block: undefined, tables: [], caption: undefined, figures: [], path: [],
    passedOver: 0, marks: [], looks: [], inPreformatted: 0,
  };
}

/** Where words go: into a caption, a cell, or the open block. */
export function target(reading: Reading): Inline[] {
  if (reading.caption !== undefined) return reading.caption.words;
  const table = reading.tables.at(-1);
  if (table?.isLayout === false) return table.cell?.words ?? [];
  reading.block ??= { kind: 'paragraph', words: [] };
  return reading.block.words;
}

/** Writes words as they are set around. */
export function say(reading: Reading, text: string): void {
  if (text === '') return;
  const mark = reading.marks.at(-1);
  const look = reading.looks.at(-1);
  target(reading).push({
    kind: 'words',
    text,
    ...(mark === undefined ? {} : { mark }),
    ...(look === undefined ? {} : { look }),
  });
}

/** Ends the open block, if any, and begins another where a kind is given. */
export function nextBlock(reading: Reading, kind?: OpenBlock['kind']): void {
  if (reading.block !== undefined && reading.block.words.length > 0) {
    reading.blocks.push(reading.block);
  }
  reading.block = kind === undefined ? undefined : { kind, words: [] };
}
