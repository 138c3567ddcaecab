import type { Manuscript } from '../../model/index.ts';
import { finished, write } from '../composition.ts';
import { readMarkup } from '../markup.ts';
import { isLayout, PASSED_OVER } from './elements.ts';
import { closeInTable, openInTable } from './in-table.ts';
import { closeInText, openInText } from './in-text.ts';
import { type Attributes, type Reading, startReading } from './reading.ts';

/**
 * Reads an article in JATS XML, the open standard of article archives: title,
 * abstract, sections, tables with their captions and notes, figures' captions
 * and the reference list. Names, addresses and licences are left aside.
 *
 * The text is what the author printed; white space of the markup is not.
 */
export function readJats(xml: string, name: string): Manuscript {
  const reading = startReading();
  const notices = readMarkup(xml, 'xml', {
    open: (tag, attributes) => openTag(reading, tag, attributes),
    text: (text) => writeText(reading, text),
    close: (tag) => closeTag(reading, tag),
  });
  return { ...finished(reading.composition, name, 'jats'), notices };
}

function openTag(reading: Reading, tag: string, attributes: Attributes): void {
  if (reading.passedOver > 0 || isPassedOver(reading, tag)) {
    reading.passedOver++;
    return;
  }
  const { table } = reading;
  if (table === undefined || !openInTable(reading, table, tag, attributes)) {
    openInText(reading, tag, attributes);
  }
}

/** Labels are read where they name a table or a figure; elsewhere they number lists. */
function isPassedOver(reading: Reading, tag: string): boolean {
  if (tag === 'label') return reading.table === undefined && reading.inCaption === 0;
  return PASSED_OVER.has(tag);
}

function writeText(reading: Reading, text: string): void {
  if (reading.passedOver > 0 || isLayout(reading)) return;
  write(reading.composition, text);
}

function closeTag(reading: Reading, tag: string): void {
  if (reading.passedOver > 0) {
    reading.passedOver--;
    return;
  }
  const { table } = reading;
  if (table === undefined || !closeInTable(reading, table, tag)) closeInText(reading, tag);
}
