import { captionLabel } from '../captions.ts';
import { plainWords, type ToldBlock, type ToldWords } from '../told.ts';
import { closeInEquation, openInEquation } from './in-equation.ts';
import { closeCell, closeRow, closeTable, openInTable } from './in-table.ts';
import { applyProperty, NO_PROPERTIES } from './properties.ts';
import {
  currentFlow, layOut, type Notes, type OpenParagraph, type Reading, say,
} from './reading.ts';
import { symbolOf } from './symbols.ts';

type Attributes = Readonly<Record<string, string>>;

/** Begins what an element begins. */
export function open(reading: Reading, name: string, attributes: Attributes): void {
  if (name.startsWith('m:')) openInEquation(reading, name, attributes);
  const opener = Object.hasOwn(OPENERS, name) ? OPENERS[name] : undefined;
  if (opener !== undefined) opener(reading, attributes);
  else if (isOfRun(reading)) reading.run = applyProperty(reading.run, name, attributes['val']);
  else openInTable(reading, name, attributes);
}

/** Whether an element says how the words of a run are set, and not those of a paragraph's mark. */
function isOfRun({ path }: Reading): boolean {
  return path.at(-2) === 'w:rPr' && (path.at(-3) === 'w:r' || path.at(-3) === 'm:r');
}

type Opener = (reading: Reading, attributes: Attributes) => void;

const OPENERS: Readonly<Record<string, Opener>> = {
  'w:p': ({ paragraphs }) => {
    paragraphs.push({ words: [], after: [], kind: undefined, properties: NO_PROPERTIES });
  },
  'w:pStyle': (reading, { val = '' }) => setStyle(reading, val),
  'w:outlineLvl': ({ paragraphs }, { val }) => {
    const paragraph = paragraphs.at(-1);
    if (paragraph !== undefined && Number(val) < 9) paragraph.kind ??= 'heading';
  },
  'w:r': startRun,
  'm:r': startRun,
  'w:rStyle': (reading, { val = '' }) => {
    if (isOfRun(reading)) {
      reading.run = { ...reading.styles.get(val)?.properties, ...reading.run };
    }
  },
  'w:tab': (reading) => {
    if (reading.path.at(-2) === 'w:r') layOut(reading, 'tab');
  },
  'w:ptab': (reading) => layOut(reading, 'tab'),
  'w:br': (reading) => layOut(reading, 'break'),
  'w:cr': (reading) => layOut(reading, 'break'),
  'w:noBreakHyphen': (reading) => say(reading, '\u2011'),
  'w:softHyphen': (reading) => say(reading, '\u00ad'),
  'w:sym': (reading, { font, char }) => say(reading, symbolOf(font, char)),
  'w:footnoteReference': (reading, attributes) => {
    refer(reading, reading.footnotes, attributes, reading.paragraphs.at(-1)?.after);
  },
  'w:endnoteReference': (reading, attributes) => {
    refer(reading, reading.endnotes, attributes, reading.atEnd);
  },
  'w:txbxContent': ({ flows }) => {
    flows.push({ kind: 'box', blocks: [] });
  },
  'w:footnote': openNote,
  'w:endnote': openNote,
};

function startRun(reading: Reading): void {
  reading.run = NO_PROPERTIES;
}

function setStyle({ paragraphs, styles }: Reading, id: string): void {
  const paragraph = paragraphs.at(-1);
  const style = styles.get(id);
  if (paragraph === undefined || style === undefined) return;
  if (style.kind !== undefined) paragraph.kind = style.kind;
  paragraph.properties = style.properties;
}

/** A reference prints a raised number, and its note is read after the paragraph or at the end. */
function refer(
  reading: Reading,
  notes: Notes,
  { id = '', customMarkFollows }: Attributes,
  target: ToldBlock[] | undefined,
): void {
  const note = notes.get(id);
  notes.delete(id);
  if (note === undefined) return;
  if (customMarkFollows === undefined) say(reading, String(++reading.noteCount), 'superscript');
  target?.push(...note);
}

function openNote(reading: Reading, { id, type }: Attributes): void {
  reading.noteId = type === undefined || type === 'normal' ? id : undefined;
  reading.flows.push({ kind: 'note', blocks: [] });
}

/** Ends what an element ends. */
export function close(reading: Reading, name: string): void {
  if (name.startsWith('m:')) closeInEquation(reading, name);
  switch (name) {
    case 'w:p':
      closeParagraph(reading);
      break;
    case 'w:tc':
      closeCell(reading);
      break;
    case 'w:tr':
      closeRow(reading);
      break;
    case 'w:tbl':
      closeTable(reading);
      break;
    case 'w:txbxContent':
      closeBox(reading);
      break;
    case 'w:footnote':
    case 'w:endnote':
      closeNote(reading);
      break;
  }
}

function closeParagraph(reading: Reading): void {
  const paragraph = reading.paragraphs.pop();
  if (paragraph === undefined) return;
  const flow = currentFlow(reading);
  flow.blocks.push(blockOf(paragraph));
  const table = flow.kind === 'cell' ? reading.tables.at(-1) : undefined;
  (table?.after ?? flow.blocks).push(...paragraph.after);
}

/** The longest heading; what is longer is a paragraph that was given the wrong style. */
const LONGEST_HEADING = 250;

function blockOf({ words, kind }: OpenParagraph): ToldWords {
  if (kind === undefined) return { kind: 'paragraph', words };
  const plain = plainWords(words);
  const isHeading = captionLabel(plain) === '' && plain.length <= LONGEST_HEADING;
  const isMisnamed = kind === 'heading' && !isHeading;
  return { kind: isMisnamed ? 'paragraph' : kind, words };
}

/** A text box is read after the paragraph that it is tied to. */
function closeBox(reading: Reading): void {
  if (currentFlow(reading).kind !== 'box') return;
  const blocks = reading.flows.pop()?.blocks ?? [];
  (reading.paragraphs.at(-1)?.after ?? currentFlow(reading).blocks).push(...blocks);
}

function closeNote(reading: Reading): void {
  if (currentFlow(reading).kind !== 'note') return;
  const blocks = reading.flows.pop()?.blocks ?? [];
  if (reading.noteId === undefined) return;
  const notes = blocks.map((block): ToldBlock =>
    block.kind === 'table' ? block : { kind: 'note', words: block.words });
  reading.found.set(reading.noteId, notes);
}
