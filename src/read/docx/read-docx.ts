import type { Manuscript, Notice } from '../../model/index.ts';
import { composeTold } from '../compose-told.ts';
import { readMarkup } from '../markup.ts';
import { ReadError } from '../read-error.ts';
import { plainWords, type ToldBlock } from '../told.ts';
import { mainPart, type Parts, partsOf } from './archive.ts';
import { close, open } from './in-text.ts';
import { localAttributes, prefixesOf, usualName } from './names.ts';
import { type Notes, type Reading, say, startReading } from './reading.ts';
import { type Styles, stylesOf } from './styles.ts';

/**
 * Reads a Word document: paragraphs with their styles, tables, equations,
 * footnotes and endnotes, text boxes. Tracked deletions are left out and
 * insertions kept: the text is the one that accepting all changes gives. Line
 * numbers, running heads and comments are no text of the manuscript.
 */
export function readDocx(bytes: Uint8Array, name: string): Manuscript {
  const parts = partsOf(bytes);
  const main = mainPart(parts);
  const styles = stylesOf(partNamed(parts, 'styles'));
  const footnotes = notesOf(partNamed(parts, 'footnotes'), styles);
  const endnotes = notesOf(partNamed(parts, 'endnotes'), styles);
  const reading = startReading(styles, footnotes, endnotes);
  const notices = read(parts.get(main) ?? '', reading);
  const told = [...(reading.flows[0]?.blocks ?? []), ...reading.atEnd];
  requireWords(told);
  return composeTold(told, name, 'docx', notices);
}

/** "word/styles.xml", or "word/styles2.xml" where the program that wrote the file counts. */
function partNamed(parts: Parts, stem: string): string {
  const name = [...parts.keys()].find((part) => part.startsWith(`word/${stem}`));
  return name === undefined ? '' : (parts.get(name) ?? '');
}

function notesOf(xml: string, styles: Styles): Notes {
  const reading = startReading(styles, new Map(), new Map());
  read(xml, reading);
  return reading.found;
}

function requireWords(told: readonly ToldBlock[]): void {
  const hasWords = told.some((block) =>
    block.kind === 'table'
      ? block.cells.some(({ words }) => plainWords(words) !== '')
      : plainWords(block.words) !== '');
  if (hasWords) return;
  throw new ReadError(
    'The Word file holds no text: it is empty, or its pages are pictures. ' +
      'Check that it is the right file, or save it as PDF with its text.',
  );
}

/** Elements whose words are none of the manuscript: deleted, moved away, or written twice. */
const PASSED_OVER: ReadonlySet<string> = new Set([
  'w:del', 'w:moveFrom', 'mc:Fallback', 'w:rt', 'w:rPrChange', 'w:pPrChange', 'w:tblPrChange',
  'w:trPrChange', 'w:tcPrChange', 'w:sectPrChange', 'm:degHide', 'm:deg',
]);

function read(xml: string, reading: Reading): readonly Notice[] {
  return readMarkup(xml, 'xml', {
    open: (tag, attributes) => openTag(reading, tag, attributes),
    text: (text) => writeText(reading, text),
    close: () => closeTag(reading),
  });
}

function openTag(
  reading: Reading,
  tag: string,
  attributes: Readonly<Record<string, string>>,
): void {
  reading.prefixes ??= prefixesOf(attributes);
  const name = usualName(tag, reading.prefixes);
  if (name === 'w:del' && reading.path.at(-1) === 'w:trPr') markRowDeleted(reading);
  reading.path.push(name);
  if (reading.passedOver > 0 || PASSED_OVER.has(name)) reading.passedOver++;
  else open(reading, name, localAttributes(attributes));
}

function markRowDeleted({ tables }: Reading): void {
  const table = tables.at(-1);
  if (table !== undefined) table.isDeletedRow = true;
}

function writeText(reading: Reading, text: string): void {
  if (reading.passedOver > 0) return;
  const element = reading.path.at(-1);
  if (element === 'w:t' || element === 'm:t') say(reading, text);
}

function closeTag(reading: Reading): void {
  const name = reading.path.pop();
  if (reading.passedOver > 0) reading.passedOver--;
  else if (name !== undefined) close(reading, name);
}
