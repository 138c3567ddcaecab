import {
  type Block, type BlockKind, type Format, type Line, type Manuscript, type Notice,
  type Section, type Span,
} from '../model/index.ts';
import { captionLabel, looksLikeNote } from './captions.ts';
import {
  blankComposition, breakLine, closeBlock, type Composition, finished, markSince, openBlock,
  separateCells, textSince, write,
} from './composition.ts';
import { isNumberedHeading, knownHeading, labelLength } from './headings.ts';
import { withSections } from './sections.ts';
import { tablesAmong, type WrittenBlock } from './table-surroundings.ts';
import {
  type Inline, plainWords, type ToldBlock, type ToldTable, type ToldWords, type Words,
} from './told.ts';
import { gridOfTold, placeTold, type WrittenTold } from './told-grid.ts';

/** A manuscript in the making: its text, its blocks, and from which source lines they came. */
interface Sheet {
  readonly composition: Composition;
  readonly blocks: WrittenBlock[];
  readonly lines: Line[];
}

/** Words that stand in no line of their own get the section later: it is not known here. */
const UNKNOWN: Section = { role: 'other', heading: '' };

/**
 * Makes a manuscript of the blocks that a form tells. What forms tell alike is
 * told apart here: captions, notes under tables, labels run into paragraphs,
 * headings that are only set as such, sections, and which caption is whose.
 */
export function composeTold(
  told: readonly ToldBlock[],
  name: string,
  format: Format,
  notices: readonly Notice[] = [],
): Manuscript {
  const sheet: Sheet = { composition: blankComposition(), blocks: [], lines: [] };
  for (const block of withTitle(told)) {
    if (block.kind === 'table') writeTable(sheet, block);
    else writeWords(sheet, block);
  }
  const plain = finished(sheet.composition, name, format);
  const blocks = withSections(plain.text, sheet.blocks);
  return {
    ...plain,
    blocks,
    tables: tablesAmong(plain.text, sheet.blocks),
    lines: sheet.lines,
    notices,
  };
}

function writeWords({ composition, blocks, lines }: Sheet, { kind, words }: ToldWords): void {
  const written = writeBlock(composition, lines, kind, words);
  if (written === undefined) return;
  const { start, end } = written.span;
  const text = textSince(composition, start).slice(0, end - start);
  if (kind !== 'paragraph') blocks.push(written);
  else blocks.push(...paragraphBlocks(text, words, written.span, blocks.at(-1)?.kind));
}

function writeBlock(
  composition: Composition,
  lines: Line[],
  kind: BlockKind,
  words: readonly Inline[],
): Block | undefined {
  openBlock(composition, kind, UNKNOWN);
  writeInlines(composition, lines, words);
  const count = composition.blocks.length;
  closeBlock(composition);
  return composition.blocks[count];
}

/** What a paragraph turns out to be by its words and by what stands before it. */
function paragraphBlocks(
  text: string,
  words: readonly Inline[],
  span: Span,
  before: BlockKind | undefined,
): readonly WrittenBlock[] {
  if (captionLabel(text) !== '') return [{ kind: 'caption', span }];
  if ((before === 'table' || before === 'note') && looksLikeNote(text)) {
    return [{ kind: 'note', span }];
  }
  if (isSetAsHeading(text, words)) return [{ kind: 'heading', span }];
  const label = labelLength(text);
  if (label === 0) return [{ kind: 'paragraph', span }];
  const split = span.start + label;
  const gap = text.slice(label).length - text.slice(label).trimStart().length;
  const own = { start: span.start, end: split };
  if (split + gap >= span.end) return [{ kind: 'heading', span, runIn: true }];
  return [
    { kind: 'heading', span: own, runIn: true },
    { kind: 'paragraph', span: { start: split + gap, end: span.end } },
  ];
}

/** The longest line that is taken for a heading because all of it is bold or in italics. */
const LONGEST_HEADING = 100;

/** A known heading alone in its paragraph, or a short line all of which is set apart. */
function isSetAsHeading(text: string, words: readonly Inline[]): boolean {
  if (knownHeading(text) !== undefined) return true;
  if (text.length > LONGEST_HEADING || !/^[A-Z\d]/.test(text) || /[.,;:]$/.test(text)) return false;
  const isApart = words.every((inline) =>
    inline.kind !== 'words' || inline.look !== undefined || inline.text.trim() === '');
  const isWordy = /\p{L}{3}/u.test(text) && !/[=<>%]|\d\.\d/.test(text);
  return isApart && (isWordy || isNumberedHeading(text));
}

/** Writes words out. Line ends and tabs that no words stand before or behind are none. */
function writeInlines(composition: Composition, lines: Line[], inlines: readonly Inline[]): void {
  const begin = composition.length;
  let due: 'break' | 'tab' | undefined;
  for (const inline of inlines) {
    if (inline.kind !== 'words') due = composition.length > begin ? inline.kind : undefined;
    else if (due === undefined || inline.text.trim() !== '') {
      if (due === 'break') breakLine(composition);
      else if (due === 'tab') separateCells(composition);
      due = undefined;
      writeWordsOf(composition, lines, inline);
    }
  }
}

function writeWordsOf(composition: Composition, lines: Line[], { text, mark, line }: Words): void {
  const start = composition.length;
  write(composition, text);
  if (mark !== undefined) markSince(composition, mark, start);
  if (line !== undefined) noteLine(lines, line, { start, end: composition.length });
}

/** Words of the same source line go on the line; its span begins with its first word. */
function noteLine(lines: Line[], number: number, span: Span): void {
  const last = lines.at(-1);
  if (span.end === span.start) return;
  if (last?.number === number) {
    lines[lines.length - 1] = { ...last, span: { ...last.span, end: span.end } };
  } else lines.push({ span, number, numbering: 'counted' });
}

function writeTable(sheet: Sheet, table: ToldTable): void {
  const { composition, blocks, lines } = sheet;
  const caption =
    table.caption === undefined
      ? undefined
      : writeBlock(composition, lines, 'caption', table.caption);
  if (caption !== undefined) blocks.push(caption);
  const placed = placeTold(table.cells);
  const [first] = placed.cells;
  if (first === undefined) return;
  openBlock(composition, 'table', UNKNOWN);
  const written: WrittenTold[] = [];
  let row = first.row;
  for (const cell of placed.cells) {
    if (cell.row !== row) breakLine(composition);
    else if (cell !== first) separateCells(composition);
    row = cell.row;
    const start = composition.length;
    writeInlines(composition, lines, cell.cell.words);
    written.push({ ...cell, span: { start, end: composition.length } });
  }
  const count = composition.blocks.length;
  closeBlock(composition);
  const block = composition.blocks[count];
  if (block === undefined) return;
  const tied = caption === undefined ? {} : { caption: caption.span };
  blocks.push({ kind: 'table', span: block.span, ...tied, grid: gridOfTold(written, placed) });
}

/** The first block is the title if it stands by itself, has no stop and reports no numbers. */
function withTitle(told: readonly ToldBlock[]): readonly ToldBlock[] {
  const [first, ...others] = told;
  if (first === undefined || first.kind === 'table' || others.length === 0) return told;
  if (first.kind !== 'paragraph' && first.kind !== 'heading') return told;
  if (told.some(({ kind }) => kind === 'title')) return told;
  const words = plainWords(first.words);
  if (words.length > 300 || words === '' || /[.;:,]$|[=<>%]|\d\.\d/.test(words)) return told;
  if (knownHeading(words) !== undefined || captionLabel(words) !== '') return told;
  return [{ ...first, kind: 'title' }, ...others];
}
