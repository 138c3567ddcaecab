import type { Mark, Notice } from '../../model/index.ts';
import type { Inline, Look, ToldBlock, ToldWords } from '../told.ts';
import type { Role, Shape } from './commands.ts';
import type { Macro } from './macros.ts';
import type { Numbering } from './numbering.ts';
import { type Source, sourceOf } from './scanning.ts';

/** A group in braces or an environment that is open, with what it ends when it ends. */
export interface Group {
  readonly role: Role;
  /** The environment's name; undefined for braces. */
  readonly environment?: string;
  /** What is set back at its end. */
  readonly mark: Mark['kind'] | undefined;
  readonly look: Look | undefined;
  readonly inMath: boolean;
  /** What follows it of the command whose argument it is. */
  readonly then: Shape;
  /** Where words went before, for arguments that are read apart. */
  readonly apart?: { readonly words: Inline[]; readonly table: OpenTable | undefined };
}

/** A cell while its row is read. */
export interface OpenCell {
  readonly words: Inline[];
  columnSpan: number;
  rowSpan: number;
}

/** A cell that was read. */
export interface ReadCell {
  readonly words: readonly Inline[];
  readonly row: number;
  readonly rowSpan: number;
  readonly columnSpan: number;
}

/** A table that is being read. */
export interface OpenTable {
  readonly cells: ReadCell[];
  row: ReadCell[];
  cell: OpenCell;
  rowNumber: number;
  /** The column the open cell begins in, and up to which row each column is taken from above. */
  column: number;
  readonly taken: Map<number, number>;
  /** The rows above the first rule between rows. */
  headerRows: number | undefined;
  /** Rows since which a long table repeats its head or foot on the next pages, if it does. */
  repeatedFrom: number | undefined;
  /** How many tables are open inside one of its cells. */
  inner: number;
}

/** A floating table or figure that is being read. */
export interface OpenFloat {
  readonly thing: 'Table' | 'Figure';
  readonly blocks: ToldBlock[];
  readonly around: { readonly words: Inline[]; readonly blocks: ToldBlock[] };
  caption: readonly Inline[] | undefined;
}

/** What is known while a source is read, piece by piece. */
export interface Reading {
  /** The file, and above it what commands stand for, the innermost last. */
  readonly sources: Source[];
  readonly groups: Group[];
  /** How many environments of each name are open. */
  readonly environments: Map<string, number>;
  readonly macros: Map<string, Macro>;
  readonly numbering: Numbering;
  readonly counts: { Table: number; Figure: number; footnote: number; reference: number };
  blocks: ToldBlock[];
  words: Inline[];
  paragraphKind: ToldWords['kind'];
  /** Blocks that are read after the open paragraph: notes, and tables within it. */
  after: ToldBlock[];
  table: OpenTable | undefined;
  readonly floats: OpenFloat[];
  pending: Shape;
  mark: Mark['kind'] | undefined;
  look: Look | undefined;
  inMath: boolean;
  /** How many groups are open that are passed over, that are titles, that are read apart. */
  passedOver: number;
  titles: number;
  apart: number;
  /** Whether the text has begun: what stands before is preparation. */
  begun: boolean;
  ended: boolean;
  /** How much more what commands stand for may bring in, in characters. */
  budget: number;
  readonly notices: Notice[];
  readonly hidden: number[];
}

/** The piece of source that is read from now. */
export function currentSource({ sources }: Reading): Source {
  return sources.at(-1) as Source;
}

/** The line of the file that is being read. */
export function lineOf({ sources }: Reading): number {
  return sources[0]?.line ?? 1;
}

/** Where words go: into a cell, or the open paragraph. */
export function target({ table, words }: Reading): Inline[] {
  return table === undefined ? words : table.cell.words;
}

/** Writes words as they are set around; a mark may be given for them alone. */
export function say(reading: Reading, text: string, mark = reading.mark): void {
  if (text === '' || !isReading(reading)) return;
  target(reading).push({
    kind: 'words',
    text,
    line: lineOf(reading),
    ...(mark === undefined ? {} : { mark }),
    ...(reading.look === undefined ? {} : { look: reading.look }),
  });
}

/** Whether words are read here: in the text itself, and in the title before it. */
export function isReading({ passedOver, begun, titles }: Reading): boolean {
  return passedOver === 0 && (begun || titles > 0);
}

/** Ends a printed line, or leaves the gap of a tab. */
export function layOut(reading: Reading, kind: 'break' | 'tab'): void {
  if (isReading(reading)) target(reading).push({ kind });
}

/** Ends the paragraph; what was kept for after it follows. */
export function endParagraph(reading: Reading): void {
  if (reading.table !== undefined || reading.apart > 0) {
    layOut(reading, 'break');
    return;
  }
  const { words, paragraphKind: kind } = reading;
  if (words.length > 0) reading.blocks.push({ kind, words });
  reading.words = [];
  reading.blocks.push(...reading.after);
  reading.after = [];
}

/** The state before the first piece. */
export function startReading(text: string, numbering: Numbering): Reading {
  return {
    sources: [sourceOf(text, 1, true)], groups: [], environments: new Map(), macros: new Map(),
    numbering, counts: { Table: 0, Figure: 0, footnote: 0, reference: 0 }, blocks: [], words: [],
    paragraphKind: 'paragraph', after: [], table: undefined, floats: [], pending: [],
    mark: undefined, look: undefined, inMath: false, passedOver: 0, titles: 0, apart: 0,
    begun: !text.includes('\\begin{document}'), ended: false,
    budget: 4 * text.length + SMALLEST_BUDGET, notices: [], hidden: [],
  };
}

/** What commands of a short source may stand for altogether, in characters. */
const SMALLEST_BUDGET = 100_000;
