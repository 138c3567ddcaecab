import type { Manuscript, Notice } from '../../model/index.ts';
import { composeTold } from '../compose-told.ts';
import { readMarkup } from '../markup.ts';
import { withOneTitle } from '../one-title.ts';
import { ReadError } from '../read-error.ts';
import type { ToldBlock } from '../told.ts';
import { isHidden, PASSED_OVER } from './elements.ts';
import { closeInTable, openInTable } from './in-table.ts';
import { closeElement, closeInText, openElement, openInText } from './in-text.ts';
import { type Attributes, nextBlock, type Reading, say, startReading, target } from './reading.ts';

/**
 * Reads a web page, or a manuscript saved as one: headings, paragraphs, lists,
 * tables with their captions, and formulas. What the page hides, runs or
 * navigates by is no text.
 */
export function readHtml(html: string, name: string): Manuscript {
  const { blocks, notices } = toldByHtml(html);
  const manuscript = composeTold(withOneTitle(blocks), name, 'html', notices);
  if (manuscript.blocks.length > 0) return manuscript;
  throw new ReadError(
    'The page holds no text: perhaps a program in it loads the text later. ' +
      'Open it in a browser, and print it to PDF or save it as a complete page.',
  );
}

/** What markup tells, and what of it was left out. */
export interface Told {
  readonly blocks: readonly ToldBlock[];
  readonly notices: readonly Notice[];
}

/** The blocks that markup tells, also where it stands in the middle of another form. */
export function toldByHtml(html: string): Told {
  const reading = startReading();
  const notices = readMarkup(html, 'html', {
    open: (tag, attributes) => openTag(reading, tag, attributes),
    text: (text) => writeText(reading, text),
    close: (tag) => closeTag(reading, tag),
  });
  nextBlock(reading);
  return { blocks: reading.blocks, notices };
}

function openTag(reading: Reading, tag: string, attributes: Attributes): void {
  if (reading.passedOver > 0 || PASSED_OVER.has(tag) || isHidden(attributes)) {
    reading.passedOver++;
    return;
  }
  openElement(reading, tag);
  if (!openInTable(reading, tag, attributes)) openInText(reading, tag);
}

function writeText(reading: Reading, text: string): void {
  if (reading.passedOver > 0) return;
  if (reading.inPreformatted === 0) {
    say(reading, text);
    return;
  }
  for (const [i, line] of text.split('\n').entries()) {
    if (i > 0) target(reading).push({ kind: 'break' });
    say(reading, line);
  }
}

function closeTag(reading: Reading, tag: string): void {
  if (reading.passedOver > 0) {
    reading.passedOver--;
    return;
  }
  if (!closeInTable(reading, tag)) closeInText(reading, tag);
  closeElement(reading);
}
