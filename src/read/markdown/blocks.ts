import { captionLabel } from '../captions.ts';
import { toldByHtml } from '../html/read-html.ts';
import { plainWords, type ToldBlock, type ToldTable, type ToldWords } from '../told.ts';
import { type Called, inlinesOf } from './inlines.ts';
import type { SourceLine } from './source-line.ts';
import { tableAt, toldCells } from './tables.ts';

/** What is known while the lines are gone through. */
interface Reading {
  readonly lines: readonly SourceLine[];
  readonly blocks: ToldBlock[];
  readonly called: Called;
  /** The lines of the open block, without their markers. */
  open: SourceLine[];
  kind: ToldWords['kind'];
  /** Whether it is an item of a list. */
  isItem: boolean;
  /** A caption that waits for the table after it. */
  caption: ToldTable['caption'];
  tables: number;
}

/** The blocks of a source, in one pass over its lines. */
export function blocksOf(lines: readonly SourceLine[]): readonly ToldBlock[] {
  const reading: Reading = {
    lines, blocks: [], called: { notes: new Map(), references: new Map() }, open: [],
    kind: 'paragraph', isItem: false, caption: undefined, tables: 0,
  };
  for (let at = frontMatter(reading); at < lines.length;) at += readAt(reading, at);
  close(reading);
  dropCaption(reading);
  return reading.blocks;
}

/** A caption whose table never came is a block of its own. */
function dropCaption(reading: Reading): void {
  const { caption: words } = reading;
  if (words !== undefined) reading.blocks.push({ kind: 'caption', words });
  reading.caption = undefined;
}

const SETTINGS_END = /^(?:---|\.\.\.)\s*$/;

/** The settings before the text, of which only the title is printed. */
function frontMatter({ lines, blocks, called }: Reading): number {
  if (!/^---\s*$/.test(lines[0]?.text ?? '')) return 0;
  const end = lines.slice(0, 500).findIndex(({ text }, i) => i > 0 && SETTINGS_END.test(text));
  if (end < 0) return 0;
  for (const { text, number } of lines.slice(1, end)) {
    const title = /^title:\s*["']?(.+?)["']?\s*$/.exec(text)?.[1];
    if (title !== undefined && !/^[|>]/.test(title)) {
      blocks.push({ kind: 'title', words: inlinesOf(title, number, called) });
    }
  }
  return end + 1;
}

/** Reads what begins at a line; says how many lines that took. */
function readAt(reading: Reading, at: number): number {
  const line = reading.lines[at] as SourceLine;
  const text = withoutQuoteMarks(line.text);
  if (text.trim() === '') {
    close(reading);
    return 1;
  }
  return (
    fenceAt(reading, at) ?? commentAt(reading, at) ?? markupAt(reading, at) ??
    writtenTableAt(reading, at) ?? singleLine(reading, text, line.number)
  );
}

/** More quotation marks than these before a line are words. */
const QUOTES = /^(?:[ ]{0,3}>[ ]?){1,20}/;

function withoutQuoteMarks(text: string): string {
  return text.replace(QUOTES, '');
}

/** ``` … ```: program text of a report is not printed; other text is kept line by line. */
function fenceAt(reading: Reading, at: number): number | undefined {
  const { lines } = reading;
  const fence = /^\s{0,3}(`{3,}|~{3,})\s*(.*)$/.exec(lines[at]?.text ?? '');
  if (fence === null) return undefined;
  close(reading);
  const mark = fence[1] as string;
  let end = at + 1;
  while (end < lines.length && !lines[end]?.text.trim().startsWith(mark)) end++;
  if (!/^\{/.test(fence[2] as string)) {
    const words = lines.slice(at + 1, end).flatMap(({ text, number }, i) => [
      ...(i > 0 ? [{ kind: 'break' } as const] : []),
      { kind: 'words', text, line: number } as const,
    ]);
    reading.blocks.push({ kind: 'paragraph', words });
  }
  return end + 1 - at;
}

function commentAt(reading: Reading, at: number): number | undefined {
  const { lines } = reading;
  if (!/^\s*<!--/.test(lines[at]?.text ?? '')) return undefined;
  close(reading);
  let end = at;
  while (end < lines.length && !lines[end]?.text.includes('-->')) end++;
  return end + 1 - at;
}

/** A table or a figure in HTML goes to its end; it is read as such. */
function markupAt(reading: Reading, at: number): number | undefined {
  const { lines } = reading;
  const tag = /^\s{0,3}<(table|figure)\b/i.exec(lines[at]?.text ?? '')?.[1];
  if (tag === undefined) return undefined;
  close(reading);
  const closing = new RegExp(`</${tag}>`, 'i');
  let end = at;
  while (end < lines.length && !closing.test(lines[end]?.text ?? '')) end++;
  const html = lines.slice(at, end + 1).map(({ text }) => text).join('\n');
  const { number } = lines[at] as SourceLine;
  reading.blocks.push(...toldByHtml(html).blocks.map((block) => atLine(block, number)));
  return end + 1 - at;
}

function atLine(block: ToldBlock, line: number): ToldBlock {
  const placed = (words: ToldWords['words']): ToldWords['words'] =>
    words.map((inline) => (inline.kind === 'words' ? { ...inline, line } : inline));
  if (block.kind !== 'table') return { ...block, words: placed(block.words) };
  const cells = block.cells.map((cell) => ({ ...cell, words: placed(cell.words) }));
  const { caption } = block;
  return { ...block, cells, ...(caption === undefined ? {} : { caption: placed(caption) }) };
}

function writtenTableAt(reading: Reading, at: number): number | undefined {
  const table = tableAt(reading.lines, at);
  if (table === undefined) return undefined;
  close(reading);
  const cells = toldCells(table, (source, line) => inlinesOf(source, line, reading.called));
  const { caption } = reading;
  reading.blocks.push({ kind: 'table', cells, ...(caption === undefined ? {} : { caption }) });
  reading.caption = undefined;
  return table.length;
}

const HEADING = /^\s{0,3}(#{1,6})(?:\s+(.*?))?(?:\s+#+)?\s*$/;
const UNDERLINE = /^\s{0,3}(=+|-+)\s*$/;
const RULE = /^\s{0,3}(?:(?:\*\s*){3,}|(?:-\s*){3,}|(?:_\s*){3,})$/;
const ITEM = /^\s*(?:[-*+]|(\d{1,9}[.)]))\s+(?=\S)/;
const NOTE = /^\s{0,3}\[\^([^\]\s]{1,80})\]:\s*/;
const ADDRESS = /^\s{0,3}\[[^\]^]{1,200}\]:\s+\S+/;
const CAPTION = /^\s{0,3}(?:[Tt]able)?:\s+(?=\S)/;
const DIVISION =
  /^\s{0,3}(?::{3,}.*|<\/?(?:div|section|span|p|center|details|summary)\b[^>]*>)\s*$/i;

function singleLine(reading: Reading, text: string, number: number): number {
  const heading = HEADING.exec(text);
  if (heading !== null) {
    open(reading, heading[1] === '#' ? 'title' : 'heading', heading[2] ?? '', number);
    close(reading);
  } else if (reading.open.length > 0 && UNDERLINE.test(text) && reading.kind === 'paragraph') {
    reading.kind = text.includes('=') ? 'title' : 'heading';
    close(reading);
  } else if (RULE.test(text) || DIVISION.test(text)) close(reading);
  else if (reading.open.length > 0 && !interrupts(reading, text)) {
    reading.open.push({ text, number });
  } else startBlock(reading, text, number);
  return 1;
}

/** A line that begins with "12." goes on with its sentence, except in a list or as its start. */
function interrupts({ isItem, kind }: Reading, text: string): boolean {
  const item = ITEM.exec(text);
  if (item === null) return NOTE.test(text) || (kind === 'note' && ADDRESS.test(text));
  return isItem || item[1] === undefined || /^1[.)]$/.test(item[1]);
}

function startBlock(reading: Reading, text: string, number: number): void {
  const note = NOTE.exec(text);
  const item = ITEM.exec(text);
  if (note !== null) startNote(reading, note, text, number);
  else if (ADDRESS.test(text)) close(reading);
  else if (CAPTION.test(text)) open(reading, 'caption', text.replace(CAPTION, ''), number);
  else if (item === null) open(reading, 'paragraph', text, number);
  else {
    // the number of an item is printed, its bullet says nothing
    const label = item[1] === undefined ? '' : `${item[1].replace(/[.)]/, '\\$&')} `;
    open(reading, 'paragraph', label + text.slice(item[0].length), number);
    reading.isItem = true;
  }
}

function startNote(reading: Reading, note: RegExpExecArray, text: string, number: number): void {
  open(reading, 'note', `[^${note[1]}] ${text.slice(note[0].length)}`, number);
}

function open(reading: Reading, kind: ToldWords['kind'], text: string, number: number): void {
  close(reading);
  reading.kind = kind;
  reading.open = [{ text, number }];
}

/** Ends the open block, if any. */
function close(reading: Reading): void {
  const { open: lines, kind, called, blocks } = reading;
  const [first] = lines;
  [reading.open, reading.kind, reading.isItem] = [[], 'paragraph', false];
  if (first === undefined) return;
  const written = lines.map(({ text }) => text.trimStart()).join('\n');
  const source = written.replace(/\s{0,9}\{[#.][^}\n]*\}\s{0,9}$/, '');
  const words = inlinesOf(source, first.number, called);
  if (kind === 'caption') keepCaption(reading, words, first.number);
  else blocks.push({ kind, words });
}

/** "Table: Odds ratios" belongs to the table before it, or else to the next. */
function keepCaption(reading: Reading, words: ToldWords['words'], line: number): void {
  const number = `Table ${++reading.tables}. `;
  const labelled = captionLabel(plainWords(words)) === ''
    ? [{ kind: 'words', text: number, line } as const, ...words]
    : words;
  const last = reading.blocks.at(-1);
  if (last?.kind === 'table' && last.caption === undefined) {
    reading.blocks[reading.blocks.length - 1] = { ...last, caption: labelled };
  } else {
    dropCaption(reading);
    reading.caption = labelled;
  }
}
