import type { ToldTable } from '../told.ts';
import { BLOCKS, HEADINGS, LOOKS, MARKS, RAISED_PARTS } from './elements.ts';
import { layOutPage } from './in-table.ts';
import { nextBlock, type OpenFigure, type Reading, say, target } from './reading.ts';

/** Begins what an element begins by itself: a mark, a look, a part of a formula. */
export function openElement(reading: Reading, tag: string): void {
  const around = reading.path.at(-1);
  const place = around === undefined ? 0 : around.parts++;
  const part = around === undefined ? undefined : RAISED_PARTS.get(around.tag)?.[place];
  if (around?.tag === 'mfrac' && place === 1) say(reading, '/');
  const mark = part ?? MARKS.get(tag);
  const look = LOOKS.get(tag);
  if (mark !== undefined) reading.marks.push(mark);
  if (look !== undefined) reading.looks.push(look);
  reading.path.push({ tag, marks: mark !== undefined, looks: look !== undefined, parts: 0 });
}

/** Ends what the innermost element began by itself. */
export function closeElement({ path, marks, looks }: Reading): void {
  const element = path.pop();
  if (element?.marks === true) marks.pop();
  if (element?.looks === true) looks.pop();
}

/** Begins a block, or a line within a cell or a caption. */
export function openInText(reading: Reading, tag: string): void {
  if (HEADINGS.has(tag)) {
    layOutPage(reading);
    nextBlock(reading, tag === 'h1' ? 'title' : 'heading');
  } else if (tag === 'br') target(reading).push({ kind: 'break' });
  else if (BLOCKS.has(tag)) openBlock(reading, tag);
}

function openBlock(reading: Reading, tag: string): void {
  if (tag === 'pre') reading.inPreformatted++;
  if (tag === 'figcaption') reading.caption = { of: 'figure', words: [] };
  else breakBlock(reading);
  if (tag === 'figure') {
    reading.figures.push({ firstBlock: reading.blocks.length, caption: undefined });
  }
}

/** Paragraphs in a cell or a caption stand in lines of their own; elsewhere they are blocks. */
function breakBlock(reading: Reading): void {
  const inCell = reading.tables.at(-1)?.isLayout === false;
  if (!inCell && reading.caption === undefined) {
    nextBlock(reading);
    return;
  }
  const words = target(reading);
  const last = words.at(-1);
  if (last !== undefined && last.kind !== 'break') words.push({ kind: 'break' });
}

/** Ends a block, or a line within a cell or a caption. */
export function closeInText(reading: Reading, tag: string): void {
  if (HEADINGS.has(tag)) nextBlock(reading);
  else if (tag === 'figcaption') closeFigureCaption(reading);
  else if (BLOCKS.has(tag)) closeBlock(reading, tag);
}

function closeBlock(reading: Reading, tag: string): void {
  if (tag === 'pre') reading.inPreformatted = Math.max(0, reading.inPreformatted - 1);
  breakBlock(reading);
  if (tag === 'figure') closeFigure(reading, reading.figures.pop());
}

function closeFigureCaption(reading: Reading): void {
  const words = reading.caption?.words ?? [];
  reading.caption = undefined;
  const figure = reading.figures.at(-1);
  if (figure === undefined) reading.blocks.push({ kind: 'caption', words });
  else figure.caption = words;
}

/** A figure's caption is that of the table in it, or else stands before what is in it. */
function closeFigure({ blocks }: Reading, figure: OpenFigure | undefined): void {
  if (figure?.caption === undefined) return;
  const { firstBlock, caption } = figure;
  let at = firstBlock;
  while (at < blocks.length && blocks[at]?.kind !== 'table') at++;
  const table = blocks[at] as ToldTable | undefined;
  if (table !== undefined && table.caption === undefined) blocks[at] = { ...table, caption };
  else blocks.splice(firstBlock, 0, { kind: 'caption', words: caption });
}
