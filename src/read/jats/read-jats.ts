import { Parser } from 'htmlparser2';
import type { Manuscript, Section, SectionRole, Span } from '../../model/index.ts';
import {
  addNotes, blankComposition, breakLine, closeBlock, closeTable, type Composition, finished, markSince,
  openBlock, write, type WrittenCell,
} from '../composition.ts';
import { knownHeading } from '../headings.ts';
import { TALLEST, WIDEST } from '../spanning-cells.ts';

/**
 * Reads an article in JATS XML, the open standard of article archives: title,
 * abstract, sections, tables with their captions and notes, figures' captions
 * and the reference list. Names, addresses and licences are left aside.
 */
export function readJats(xml: string, name: string): Manuscript {
  const reading = startReading();
  const parser = new Parser(
    {
      onopentag: (tag, attributes) => openTag(reading, tag, attributes),
      ontext: (text) => writeText(reading, text),
      onclosetag: (tag) => closeTag(reading, tag),
    },
    { xmlMode: true, decodeEntities: true },
  );
  parser.write(xml);
  parser.end();
  return finished(reading.composition, name, 'jats');
}

type Attributes = Readonly<Record<string, string>>;

interface Reading {
  readonly composition: Composition;
  /** The sections that are open, the innermost last. */
  readonly sections: Section[];
  /** Where the raised and lowered marks that are open began. */
  readonly marks: number[];
  /** How many elements deep the part is that is passed over; 0 where text is read. */
  passedOver: number;
  table: OpenTable | undefined;
  /** How deep in a reference list, a figure or a table's foot. */
  inReferences: number;
  /** Titles are headings, but in captions they are words like others. */
  inCaption: number;
  inFoot: number;
}

interface OpenTable {
  label: string;
  caption: Span | undefined;
  readonly firstTable: number;
  readonly notes: Span[];
  cells: WrittenCell[];
  row: number;
  inHead: boolean;
  cell: { readonly start: number; readonly attributes: Attributes; readonly header: boolean } | undefined;
  labelStart: number | undefined;
}

const OUTSIDE: Section = { role: 'other', heading: '' };

function startReading(): Reading {
  return {
    composition: blankComposition(), sections: [], marks: [], passedOver: 0, table: undefined,
    inReferences: 0, inCaption: 0, inFoot: 0,
  };
}

function sectionOf({ sections }: Reading): Section {
  return sections.at(-1) ?? OUTSIDE;
}

/** Elements whose words are no part of what a reader reads as the article. */
const PASSED_OVER = new Set(['journal-meta', 'contrib-group', 'aff', 'author-notes', 'pub-date', 'history',
  'permissions', 'kwd-group', 'funding-group', 'article-id', 'article-categories', 'volume', 'issue',
  'fpage', 'lpage', 'elocation-id', 'self-uri', 'counts', 'custom-meta-group', 'related-article',
  'tex-math', 'alt-title', 'object-id', 'alt-text', 'long-desc', 'graphic', 'media', 'email', 'label']);

/** Labels are read where they name a table or a figure; elsewhere they number lists. */
function isPassedOver(reading: Reading, tag: string): boolean {
  if (tag === 'label') return reading.table === undefined && reading.inCaption === 0;
  return PASSED_OVER.has(tag);
}

function openTag(reading: Reading, tag: string, attributes: Attributes): void {
  if (reading.passedOver > 0 || isPassedOver(reading, tag)) {
    reading.passedOver++;
    return;
  }
  if (reading.table !== undefined && openInTable(reading, reading.table, tag, attributes)) return;
  openInText(reading, tag, attributes);
}

function openInText(reading: Reading, tag: string, attributes: Attributes): void {
  const { composition, sections } = reading;
  switch (tag) {
    case 'article-title':
      if (reading.inReferences === 0) openBlock(composition, 'title', { role: 'title', heading: '' });
      return;
    case 'abstract':
    case 'trans-abstract':
      sections.push({ role: 'abstract', heading: 'Abstract' });
      return;
    case 'sec':
    case 'ack':
    case 'app':
    case 'glossary':
    case 'notes':
      sections.push(sectionFrom(reading, tag, attributes));
      return;
    case 'title':
      if (reading.inCaption > 0) write(composition, ' ');
      else openBlock(composition, 'heading', sectionOf(reading));
      return;
    case 'p':
    case 'disp-quote':
    case 'def':
    case 'fn':
      openParagraph(reading);
      return;
    case 'fig':
      reading.inCaption++;
      openBlock(composition, 'caption', sectionOf(reading));
      return;
    case 'table-wrap':
      openTableWrap(reading);
      return;
    case 'ref-list':
      reading.inReferences++;
      sections.push({ role: 'references', heading: 'References' });
      return;
    case 'ref':
      openBlock(composition, 'references', sectionOf(reading));
      return;
    default:
      openInline(reading, tag);
  }
}

function openParagraph(reading: Reading): void {
  if (reading.inCaption > 0) write(reading.composition, ' ');
  else openBlock(reading.composition, 'paragraph', sectionOf(reading));
}

function openInline({ composition, marks }: Reading, tag: string): void {
  if (tag === 'sup' || tag === 'sub') marks.push(composition.length);
  else if (tag === 'break' || tag === 'hr') breakLine(composition);
  else if (SEPARATED.has(tag)) write(composition, ' ');
}

const SEPARATED = new Set(['list-item', 'term', 'surname', 'given-names', 'year', 'source', 'volume',
  'person-group', 'string-name', 'name', 'pub-id']);

/** The kinds of section that JATS itself names. */
const SECTION_TYPES: Readonly<Record<string, SectionRole>> = {
  intro: 'introduction', introduction: 'introduction', background: 'introduction', methods: 'methods',
  materials: 'methods', 'materials|methods': 'methods', subjects: 'methods', results: 'results',
  discussion: 'discussion', conclusions: 'discussion', conclusion: 'discussion',
  'supplementary-material': 'supplement',
};

function sectionFrom(reading: Reading, tag: string, attributes: Attributes): Section {
  const outer = reading.sections.at(-1);
  if (tag === 'app') return { role: 'supplement', heading: '' };
  if (tag !== 'sec') return { role: 'other', heading: '' };
  if (outer !== undefined && outer.role !== 'other') return outer;
  const role = SECTION_TYPES[(attributes['sec-type'] ?? '').toLowerCase()];
  return { role: role ?? 'other', heading: '' };
}

/** A section that has no name yet takes its first title for its heading, and perhaps its role. */
function nameSection(reading: Reading, title: string): void {
  const section = reading.sections.at(-1);
  if (section === undefined) return;
  if (section.role === 'abstract' && section.heading === 'Abstract' && reading.sections.length > 1) {
    reading.sections[reading.sections.length - 1] = { role: 'abstract', heading: title };
    return;
  }
  if (section.heading !== '') return;
  const role = section.role === 'other' ? (knownHeading(title)?.role ?? 'other') : section.role;
  reading.sections[reading.sections.length - 1] = { role, heading: title };
}

function openTableWrap(reading: Reading): void {
  const { composition } = reading;
  openBlock(composition, 'caption', sectionOf(reading));
  reading.inCaption++;
  reading.table = {
    label: '', caption: undefined, firstTable: composition.tables.length, notes: [], cells: [], row: -1,
    inHead: false, cell: undefined, labelStart: undefined,
  };
}

/** Opens what only tables have; false where the element means the same as elsewhere. */
function openInTable(
  reading: Reading,
  table: OpenTable,
  tag: string,
  attributes: Attributes,
): boolean {
  const { composition } = reading;
  switch (tag) {
    case 'label':
      if (table.cells.length === 0 && reading.inFoot === 0) table.labelStart = composition.length;
      return true;
    case 'table':
      table.caption ??= endCaption(reading);
      openBlock(composition, 'table', sectionOf(reading));
      [table.cells, table.row] = [[], -1];
      return true;
    case 'thead':
      table.inHead = true;
      return true;
    case 'tr':
      table.row++;
      if (table.cells.length > 0) breakLine(composition);
      return true;
    case 'td':
    case 'th':
      openCell(reading, table, tag, attributes);
      return true;
    case 'table-wrap-foot':
      reading.inFoot++;
      return true;
    case 'fn':
    case 'p':
      if (reading.inFoot === 0) return false;
      openBlock(composition, 'note', sectionOf(reading));
      return true;
    default:
      return false;
  }
}

/** Ends the caption, which is the block that was open when the table began. */
function endCaption({ composition }: Reading): Span | undefined {
  const blocks = composition.blocks.length;
  closeBlock(composition);
  return composition.blocks.length > blocks ? composition.blocks.at(-1)?.span : undefined;
}

function openCell(reading: Reading, table: OpenTable, tag: string, attributes: Attributes): void {
  const { composition } = reading;
  const isFirst = table.cells.at(-1)?.row !== table.row;
  if (!isFirst) separateCells(composition);
  const header = table.inHead || tag === 'th';
  table.cell = { start: composition.length, attributes, header };
}

/** A tab between cells keeps their numbers apart. */
function separateCells(composition: Composition): void {
  const { open } = composition;
  if (open === undefined) return;
  composition.parts.push('\t');
  composition.length += 1;
  open.spaceDue = false;
}

function writeText(reading: Reading, text: string): void {
  if (reading.passedOver > 0) return;
  const { table, composition } = reading;
  if (table !== undefined && composition.open?.kind === 'table' && table.cell === undefined) return;
  write(composition, text);
}

function closeTag(reading: Reading, tag: string): void {
  if (reading.passedOver > 0) {
    reading.passedOver--;
    return;
  }
  if (reading.table !== undefined && closeInTable(reading, reading.table, tag)) return;
  closeInText(reading, tag);
}

function closeInText(reading: Reading, tag: string): void {
  const { composition, marks } = reading;
  switch (tag) {
    case 'sup':
    case 'sub':
      markSince(composition, tag === 'sup' ? 'superscript' : 'subscript', marks.pop() ?? composition.length);
      return;
    case 'title':
      closeTitle(reading);
      return;
    case 'article-title':
      if (reading.inReferences === 0) closeBlock(composition);
      else write(composition, ' ');
      return;
    case 'p':
      if (reading.inCaption === 0) closeBlock(composition);
      return;
    case 'label':
      write(composition, ' ');
      return;
    case 'fig':
      reading.inCaption--;
      closeBlock(composition);
      return;
    case 'ref-list':
      reading.inReferences--;
      closeSection(reading);
      return;
    case 'abstract':
    case 'trans-abstract':
    case 'sec':
    case 'ack':
    case 'app':
    case 'glossary':
    case 'notes':
      closeSection(reading);
      return;
    default:
      if (tag === 'ref') closeBlock(composition);
      else if (SEPARATED.has(tag)) write(composition, ' ');
  }
}

function closeSection({ composition, sections }: Reading): void {
  closeBlock(composition);
  sections.pop();
}

function closeTitle(reading: Reading): void {
  const { composition } = reading;
  if (reading.inCaption > 0) {
    write(composition, ' ');
    return;
  }
  const start = composition.open?.start;
  const title = start === undefined ? '' : textSince(composition, start);
  closeBlock(composition);
  nameSection(reading, title);
}

function textSince({ parts, length }: Composition, start: number): string {
  let from = length;
  let words = '';
  for (let at = parts.length - 1; at >= 0 && from > start; at--) {
    words = (parts[at] as string) + words;
    from -= (parts[at] as string).length;
  }
  return words;
}

/** Closes what only tables have; false where the element means the same as elsewhere. */
function closeInTable(reading: Reading, table: OpenTable, tag: string): boolean {
  const { composition } = reading;
  switch (tag) {
    case 'label':
      if (table.labelStart !== undefined) table.label = textSince(composition, table.labelStart).trim();
      table.labelStart = undefined;
      write(composition, ' ');
      return true;
    case 'td':
    case 'th':
      closeCell(composition, table);
      return true;
    case 'thead':
      table.inHead = false;
      return true;
    case 'table':
      closeTable(composition, table.label.replace(/[.:\s]+$/, ''), table.caption, table.cells);
      closeBlock(composition);
      return true;
    case 'fn':
    case 'p':
      return reading.inFoot > 0 && closeNote(composition, table);
    case 'table-wrap-foot':
      closeNote(composition, table);
      reading.inFoot--;
      return true;
    case 'table-wrap':
      closeBlock(composition);
      addNotes(composition, table.firstTable, table.notes);
      reading.inCaption--;
      reading.table = undefined;
      return true;
    default:
      return false;
  }
}

function closeNote(composition: Composition, table: OpenTable): true {
  const blocks = composition.blocks.length;
  if (composition.open?.kind === 'note') closeBlock(composition);
  const note = composition.blocks[blocks];
  if (note !== undefined) table.notes.push(note.span);
  return true;
}

function closeCell(composition: Composition, table: OpenTable): void {
  const { cell, row } = table;
  table.cell = undefined;
  if (cell === undefined || row < 0) return;
  table.cells.push({
    row,
    rowSpan: spanFrom(cell.attributes['rowspan'], TALLEST),
    columnSpan: spanFrom(cell.attributes['colspan'], WIDEST),
    header: cell.header,
    span: { start: Math.min(cell.start, composition.length), end: composition.length },
  });
}

function spanFrom(attribute: string | undefined, most: number): number {
  const value = Number.parseInt(attribute ?? '1', 10);
  return value >= 1 ? Math.min(value, most) : 1;
}
