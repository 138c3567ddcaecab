import {
  type Block,
  indexAt,
  type Manuscript,
  type Reading,
  type Result,
  type SectionRole,
  type Span,
} from '../model/index.ts';

/** The part of the article in which a span stands: "abstract", "results", … */
export function roleAt({ manuscript }: Reading, span: Span): SectionRole {
  return manuscript.blocks[indexAt(manuscript.blocks, span.start)]?.section.role ?? 'other';
}

/** The block in which a span stands: its paragraph, its caption, its table. */
export function blockAt({ manuscript }: Reading, span: Span): Block | undefined {
  return manuscript.blocks[indexAt(manuscript.blocks, span.start)];
}

/**
 * The kind of place in which an author prints a result. `aside` is where the
 * numbers may be those of others: an introduction, references, a supplement.
 */
export type Zone = 'abstract' | 'prose' | 'table' | 'aside';

/** Where a result is printed; text without known headings is prose. */
export function zoneOf(reading: Reading, { cell, cited, span }: Result): Zone {
  const role = roleAt(reading, span);
  if (ASIDE.has(role)) return 'aside';
  if (cell !== undefined) return 'table';
  if (cited) return 'aside';
  return role === 'abstract' ? 'abstract' : 'prose';
}

const ASIDE: ReadonlySet<SectionRole> =
  new Set(['introduction', 'references', 'supplement', 'title']);

/** A structured abstract has the headings of an article, and is never as long as this. */
const LONGEST_ABSTRACT = 6000;

/**
 * Whether this is a whole article: it has parts of its own on methods and on results, and
 * either an abstract beside them or the length of more than an abstract.
 */
export function isWholeArticle({ manuscript }: Reading): boolean {
  const roles = new Set(manuscript.blocks.map(({ section }) => section.role));
  return roles.has('methods') && roles.has('results')
    && (roles.has('abstract') || manuscript.text.length > LONGEST_ABSTRACT);
}

/**
 * The text of all blocks in those parts of the article, to look for words in it: a word
 * broken at a line's end is whole here, so that offsets are those of no manuscript.
 */
export function textIn({ manuscript }: Reading, roles: readonly SectionRole[]): string {
  return manuscript.blocks
    .filter(({ section }) => roles.includes(section.role))
    .map(({ span }) => manuscript.text.slice(span.start, span.end))
    .join('\n')
    .replace(/(\p{Ll})[-‐\u00ad]\s+(?=\p{Ll})/gu, '$1');
}

/**
 * The labels of tables that the text speaks of and that were not read as tables, perhaps
 * since they are pictures: what is missing in the text may stand in them.
 */
export function tablesNotRead({ manuscript }: Reading): readonly string[] {
  const read = new Set(manuscript.tables.map(({ label }) => numberOf(label)));
  const spoken = [...proseOf(manuscript).matchAll(/\bTables?\s+(\d{1,2})(?![\d.])/g)]
    .map((match) => match[1] as string);
  return [...new Set(spoken)].filter((number) => !read.has(number))
    .map((number) => `Table ${number}`);
}

function numberOf(label: string): string {
  return label.match(/\d+/)?.[0] ?? '';
}

function proseOf({ blocks, text }: Manuscript): string {
  return blocks.filter(({ kind, section }) => kind === 'paragraph' && section.role !== 'references')
    .map(({ span }) => text.slice(span.start, span.end)).join('\n');
}
