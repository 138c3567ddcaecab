import type { Mark } from '../../model/index.ts';
import type { Inline, ToldBlock, ToldTable, ToldWords } from '../told.ts';
import type { Prefixes } from './names.ts';
import { lookOf, NO_PROPERTIES, type Properties } from './properties.ts';
import type { ParagraphKind, Styles } from './styles.ts';

/** Blocks that follow each other: the document's own, a cell's, a text box's, a note's. */
export interface Flow {
  readonly kind: 'document' | 'cell' | 'box' | 'note';
  readonly blocks: ToldBlock[];
}

/** A paragraph that is being read, with what is read after it: its notes and text boxes. */
export interface OpenParagraph {
  readonly words: Inline[];
  readonly after: ToldBlock[];
  kind: ParagraphKind | undefined;
  properties: Properties;
}

/** A cell while its table is read: rows below may make it reach down. */
export interface OpenCell {
  readonly row: number;
  words: readonly Inline[];
  rowSpan: number;
  columnSpan: number;
  header: boolean;
  /** Whether it only goes on with the cell above. */
  continued: boolean;
}

/** A table that is being read. */
export interface OpenTable {
  readonly cells: OpenCell[];
  readonly after: ToldBlock[];
  /** The cell that reaches down in each column, by the column's number. */
  readonly reaching: Map<number, OpenCell>;
  row: number;
  column: number;
  isHeaderRow: boolean;
  isDeletedRow: boolean;
  cell: OpenCell | undefined;
}

/** Notes by their ids. Each is printed once, where it is first referred to. */
export type Notes = Map<string, readonly ToldBlock[]>;

/** What is known while a part of a Word file is read, element by element. */
export interface Reading {
  readonly styles: Styles;
  readonly footnotes: Notes;
  readonly endnotes: Notes;
  prefixes: Prefixes | undefined;
  /** The elements that are open, by their usual names. */
  readonly path: string[];
  passedOver: number;
  readonly flows: Flow[];
  readonly paragraphs: OpenParagraph[];
  readonly tables: OpenTable[];
  run: Properties;
  /** Raised and lowered parts of equations that are open, the innermost last. */
  readonly marks: Mark['kind'][];
  /** Brackets of equations that are open. */
  readonly brackets: { open: string; close: string; between: string; parts: number }[];
  /** Notes that are printed at the document's end. */
  readonly atEnd: ToldBlock[];
  /** How many notes were referred to so far. */
  noteCount: number;
  /** The notes of a part that holds notes, by their ids. */
  readonly found: Notes;
  noteId: string | undefined;
}

/** The state before the first element. */
export function startReading(styles: Styles, footnotes: Notes, endnotes: Notes): Reading {
  return {
    styles, footnotes, endnotes, prefixes: undefined, path: [], passedOver: 0,
    flows: [{ kind: 'document', blocks: [] }], paragraphs: [], tables: [], run: NO_PROPERTIES,
    marks: [], brackets: [], atEnd: [], noteCount: 0, found: new Map(), noteId: undefined,
  };
}

/** The blocks that are being written to. */
export function currentFlow({ flows }: Reading): Flow {
  return flows.at(-1) as Flow;
}

/** Writes words into the open paragraph as the run around them is set. */
export function say(reading: Reading, text: string, mark?: Mark['kind']): void {
  const paragraph = reading.paragraphs.at(-1);
  const properties = { ...paragraph?.properties, ...reading.run };
  if (paragraph === undefined || text === '' || properties.hidden === true) return;
  const own = properties.mark === 'level' ? undefined : properties.mark;
  const raised = mark ?? reading.marks.at(-1) ?? own;
  const look = lookOf(properties);
  paragraph.words.push({
    kind: 'words',
    text,
    ...(raised === undefined ? {} : { mark: raised }),
    ...(look === undefined ? {} : { look }),
  });
}

/** Ends a line, or leaves the gap of a tab, in the open paragraph. */
export function layOut({ paragraphs }: Reading, kind: 'break' | 'tab'): void {
  paragraphs.at(-1)?.words.push({ kind });
}

/** What blocks say when they stand in a cell: a line for each, cells of inner tables by tabs. */
export function flattened(blocks: readonly ToldBlock[]): readonly Inline[] {
  return blocks.flatMap((block, i) => [
    ...(i > 0 ? [{ kind: 'break' } as const] : []),
    ...(block.kind === 'table' ? flattenedTable(block) : (block as ToldWords).words),
  ]);
}

function flattenedTable({ cells }: ToldTable): readonly Inline[] {
  return cells.flatMap((cell, i) => {
    const before = cells[i - 1];
    if (before === undefined) return cell.words;
    return [{ kind: before.row === cell.row ? 'tab' : 'break' } as const, ...cell.words];
  });
}
