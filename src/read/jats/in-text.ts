import type { Section, SectionRole } from '../../model/index.ts';
import {
  breakLine, closeBlock, markSince, openBlock, textSince, write,
} from '../composition.ts';
import { knownHeading } from '../headings.ts';
import { SEPARATED } from './elements.ts';
import { type Attributes, type Reading, sectionOf } from './reading.ts';

type Opener = (reading: Reading, attributes: Attributes) => void;

/** What each element outside tables begins. */
const OPENERS: Readonly<Record<string, Opener>> = {
  'article-title': (reading) => {
    if (reading.inReferences === 0) {
      openBlock(reading.composition, 'title', { role: 'title', heading: '' });
    }
  },
  abstract: (reading) => enter(reading, { role: 'abstract', heading: 'Abstract' }),
  'trans-abstract': (reading) => enter(reading, { role: 'abstract', heading: 'Abstract' }),
  sec: (reading, attributes) => enter(reading, sectionFrom(reading, attributes)),
  app: (reading) => enter(reading, { role: 'supplement', heading: '' }),
  ack: (reading) => enter(reading, { role: 'other', heading: '' }),
  glossary: (reading) => enter(reading, { role: 'other', heading: '' }),
  notes: (reading) => enter(reading, { role: 'other', heading: '' }),
  title: (reading) => {
    if (reading.inCaption > 0) write(reading.composition, ' ');
    else openBlock(reading.composition, 'heading', sectionOf(reading));
  },
  p: openParagraph,
  'disp-quote': openParagraph,
  def: openParagraph,
  fn: openParagraph,
  fig: (reading) => {
    reading.inCaption++;
    openBlock(reading.composition, 'caption', sectionOf(reading));
  },
  'table-wrap': openTableWrap,
  'ref-list': (reading) => {
    reading.inReferences++;
    enter(reading, { role: 'references', heading: 'References' });
  },
  ref: (reading) => openBlock(reading.composition, 'references', sectionOf(reading)),
  sup: openMark,
  sub: openMark,
  break: ({ composition }) => breakLine(composition),
  hr: ({ composition }) => breakLine(composition),
};

/** Begins what an element outside tables begins. */
export function openInText(reading: Reading, tag: string, attributes: Attributes): void {
  if (Object.hasOwn(OPENERS, tag)) OPENERS[tag]?.(reading, attributes);
  else if (SEPARATED.has(tag)) write(reading.composition, ' ');
}

function enter({ sections }: Reading, section: Section): void {
  sections.push(section);
}

function openParagraph(reading: Reading): void {
  if (reading.inCaption > 0) write(reading.composition, ' ');
  else openBlock(reading.composition, 'paragraph', sectionOf(reading));
}

function openMark({ marks, composition }: Reading): void {
  marks.push(composition.length);
}

function openTableWrap(reading: Reading): void {
  const { composition } = reading;
  openBlock(composition, 'caption', sectionOf(reading));
  reading.inCaption++;
  reading.table = {
    label: '', caption: undefined, firstTable: composition.tables.length, notes: [], cells: [],
    row: -1, inHead: false, cell: undefined, labelStart: undefined,
  };
}

/** The kinds of section that JATS itself names. */
const SECTION_TYPES: Readonly<Record<string, SectionRole>> = {
  intro: 'introduction', introduction: 'introduction', background: 'introduction',
  methods: 'methods', materials: 'methods', 'materials|methods': 'methods', subjects: 'methods',
  results: 'results', discussion: 'discussion', conclusions: 'discussion',
  conclusion: 'discussion', 'supplementary-material': 'supplement',
};

/** A section within one that has a role belongs to it. */
function sectionFrom({ sections }: Reading, attributes: Attributes): Section {
  const outer = sections.at(-1);
  if (outer !== undefined && outer.role !== 'other') return outer;
  const type = (attributes['sec-type'] ?? '').toLowerCase();
  return { role: Object.hasOwn(SECTION_TYPES, type) ? (SECTION_TYPES[type] ?? 'other') : 'other', heading: '' };
}

/** What each element outside tables ends. */
const CLOSERS: Readonly<Record<string, (reading: Reading) => void>> = {
  sup: (reading) => closeMark(reading, 'superscript'),
  sub: (reading) => closeMark(reading, 'subscript'),
  title: closeTitle,
  'article-title': ({ composition, inReferences }) => {
    if (inReferences === 0) closeBlock(composition);
    else write(composition, ' ');
  },
  p: ({ composition, inCaption }) => {
    if (inCaption === 0) closeBlock(composition);
  },
  label: ({ composition }) => write(composition, ' '),
  fig: (reading) => {
    reading.inCaption--;
    closeBlock(reading.composition);
  },
  'ref-list': (reading) => {
    reading.inReferences--;
    leave(reading);
  },
  ref: ({ composition }) => closeBlock(composition),
  abstract: leave,
  'trans-abstract': leave,
  sec: leave,
  ack: leave,
  app: leave,
  glossary: leave,
  notes: leave,
};

/** Ends what an element outside tables ends. */
export function closeInText(reading: Reading, tag: string): void {
  if (Object.hasOwn(CLOSERS, tag)) CLOSERS[tag]?.(reading);
  else if (SEPARATED.has(tag)) write(reading.composition, ' ');
}

function closeMark({ composition, marks }: Reading, kind: 'superscript' | 'subscript'): void {
  markSince(composition, kind, marks.pop() ?? composition.length);
}

function leave({ composition, sections }: Reading): void {
  closeBlock(composition);
  sections.pop();
}

function closeTitle(reading: Reading): void {
  const { composition } = reading;
  if (reading.inCaption > 0) {
    write(composition, ' ');
    return;
  }
  const title = composition.open === undefined ? '' : textSince(composition, composition.open.start);
  closeBlock(composition);
  nameSection(reading.sections, title);
}

/** A section that has no name yet takes its first title for its heading, and perhaps its role. */
function nameSection(sections: Section[], title: string): void {
  const section = sections.at(-1);
  if (section === undefined) return;
  const isPart = section.role === 'abstract' && sections.length > 1;
  if (isPart) sections[sections.length - 1] = { role: 'abstract', heading: title };
  else if (section.heading === '') {
    const role = section.role === 'other' ? (knownHeading(title)?.role ?? 'other') : section.role;
    sections[sections.length - 1] = { role, heading: title };
  }
}
