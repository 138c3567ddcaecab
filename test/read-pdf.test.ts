import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { quote, type Manuscript } from '../src/model/index.ts';
import { ReadError, readManuscript } from '../src/read/index.ts';
import type { Draft } from '../src/read/pdf/draft.ts';
import { withFigures } from '../src/read/pdf/figure-text.ts';
import { restore } from '../src/read/pdf/substitutions.ts';
import { expectWellFormed } from './read-invariants.ts';

const FIXTURES = new URL('../fixtures/manuscripts/', import.meta.url);
const NAMES = ['ferry-cohort', 'granary-case-control', 'tarvicine-trial'] as const;

async function readPdf(path: string): Promise<Manuscript> {
  return readManuscript(new Uint8Array(readFileSync(new URL(path, FIXTURES))), path);
}

/** Words without the line breaks, hyphens and marks by which forms of one text differ. */
function loose(words: string): string {
  return words
    .replace(/’/g, "'")
    .replace(/[-‐]\n/g, '')
    .replace(/\[\d[\d,–]*\]/g, '')
    .replace(/\s+/g, '');
}

describe.each(NAMES)('the PDF of %s', (name) => {
  test('is well formed, on all its pages', async () => {
    const manuscript = await readPdf(`${name}.pdf`);
    expectWellFormed(manuscript);
    expect(manuscript.notices).toEqual([]);
    expect(manuscript.pages.length).toBeGreaterThan(1);
    expect(manuscript.lines.every(({ page, box }) => page !== undefined && box !== undefined)).toBe(
      true,
    );
  });

  test('has the paragraphs of its source, each whole and in their order', async () => {
    const { text, blocks, marks } = await readPdf(`${name}.pdf`);
    const unmarked = marks.reduceRight(
      (left, { span }) => left.slice(0, span.start) + left.slice(span.end),
      text,
    );
    const removed = (offset: number): number =>
      marks.reduce(
        (sum, { span }) => sum + Math.max(0, Math.min(offset, span.end) - span.start),
        0,
      );
    const read = blocks
      .filter(({ kind }) => kind === 'paragraph')
      .map(({ span }) =>
        loose(unmarked.slice(span.start - removed(span.start), span.end - removed(span.end))),
      );
    const source = readFileSync(new URL(`${name}/manuscript.txt`, FIXTURES), 'utf8');
    const expected = source
      .split('\n\n')
      .filter((words) => /^[A-Z][^\n\t]{150,}$/.test(words))
      .map(loose);
    expect(expected.length).toBeGreaterThan(8);
    const found = expected.map((words) =>
      read.findIndex(
        (paragraph) => words.endsWith(paragraph) && paragraph.length > 0.6 * words.length,
      ),
    );
    expect(expected.filter((_, i) => (found[i] ?? -1) < 0)).toEqual([]);
    expect(found).toEqual([...found].sort((a, b) => a - b));
  });

  test('has the tables of its source, cell by cell', async () => {
    const { text, tables } = await readPdf(`${name}.pdf`);
    const source = readFileSync(new URL(`${name}/manuscript.txt`, FIXTURES), 'utf8');
    const expected = source.split('\n\n').filter((block) => block.includes('\t'));
    const read = tables.map((table) =>
      Array.from({ length: table.rowCount }, (_, row) =>
        table.cells
          .filter((cell) => cell.row === row)
          .map((cell) => loose(quote(text, cell.span)))
          .join(' | '),
      ),
    );
    const plain = (cell: string): string => loose(cell.replace('ᵃ', 'a').replace('²', '2'));
    expect(read).toEqual(
      expected.map((rows) =>
        rows.split('\n').map((row) =>
          row
            .split('\t')
            .map(plain)
            .filter((cell) => cell !== '')
            .join(' | '),
        ),
      ),
    );
    expect(tables.map(({ label }) => label)).toEqual(['Table 1', 'Table 2']);
    expect(tables.every(({ caption }) => caption !== undefined)).toBe(true);
  });

  test('knows its sections', async () => {
    const { text, blocks } = await readPdf(`${name}.pdf`);
    const roles = [
      ...new Set(
        blocks.filter(({ kind }) => kind !== 'furniture').map(({ section }) => section.role),
      ),
    ];
    expect(roles.filter((role) => role !== 'other')).toEqual([
      'title',
      'abstract',
      'introduction',
      'methods',
      'results',
      'discussion',
      'references',
    ]);
    const references = blocks
      .filter(({ kind }) => kind === 'references')
      .map(({ span }) => quote(text, span))
      .join('\n');
    expect(references).toMatch(/^1\. /);
  });
});

test('running heads, running feet and page numbers are set apart', async () => {
  const { text, blocks } = await readPdf('ferry-cohort.pdf');
  const apart = blocks
    .filter(({ kind }) => kind === 'furniture')
    .map(({ span }) => quote(text, span));
  expect(apart).toEqual([
    'Night sailings and atrial fibrillation\tDraft for review',
    '1',
    'Night sailings and atrial fibrillation\tDraft for review',
    '2',
  ]);
});

test('raised marks are known, and stay beside their words', async () => {
  const { text, marks } = await readPdf('tarvicine-trial.pdf');
  expect(marks).toHaveLength(2);
  expect(marks.map(({ kind, span }) => [kind, text.slice(span.start - 5, span.end)])).toEqual([
    ['superscript', 'back.1'],
    ['superscript', 'fore,2'],
  ]);
});

const SHEETS = readdirSync(new URL('numbered/', FIXTURES)).filter((file) => file.endsWith('.pdf'));

describe('line numbers in the margin', () => {
  test('are tried on sheets of two typesetters', () => {
    expect(SHEETS.length).toBe(8);
  });

  test.each(SHEETS)('are right for every line of %s', async (sheet) => {
    const manuscript = await readPdf(`numbered/${sheet}`);
    expectWellFormed(manuscript);
    const { text, lines, blocks } = manuscript;
    const body = lines.filter(({ span }) => text.startsWith('[', span.start));
    expect(body.length).toBeGreaterThanOrEqual(44);
    for (const { span, number, numbering } of body) {
      expect(`${numbering} ${number}`).toBe(`printed ${/\[(\d+)\]/.exec(quote(text, span))?.[1]}`);
    }
    // no number of the margin is left in the text
    const words = blocks
      .filter(({ kind }) => kind !== 'furniture')
      .map(({ span }) => quote(text, span))
      .join('\n');
    expect(words.split('\n').filter((line) => !line.startsWith('['))).toEqual([]);
  });

  test('are right for the lines of a manuscript, and count on where tables have none', async () => {
    const { text, lines } = await readPdf('granary-case-control.pdf');
    const numbered = lines.filter(({ numbering }) => numbering === 'printed');
    expect(numbered.map(({ number }) => number)).toEqual(numbered.map((_, i) => i + 1));
    const line = lines.find(({ span }) => quote(text, span).includes('were reported by 76 (53.5%)'));
    expect(line).toMatchObject({ page: 2, number: 45, numbering: 'printed' });
  });
});

describe('tables that do not fit', () => {
  // row 7 holds 1.07 (0.57, 2.07)
  const ratioOf = (row: number): string =>
    `1.${String(row).padStart(2, '0')} (0.${row + 50}, 2.${String(row).padStart(2, '0')})`;
  const ratiosIn = ({ text, tables }: Manuscript): readonly string[] =>
    tables.flatMap(({ cells }) =>
      cells.filter(({ header, column }) => !header && column === 2).map(({ span }) => quote(text, span)),
    );

  test('are read when they are turned, with their heads and notes', async () => {
    const manuscript = await readPdf('tables/turned.pdf');
    expectWellFormed(manuscript);
    expect(ratiosIn(manuscript)).toEqual([1, 2, 3, 4, 5, 6, 7, 8].map(ratioOf));
    expect(manuscript.tables.map(({ label, notes }) => [label, notes.length])).toEqual([['Table 1', 1]]);
    const box = manuscript.lines.find(({ page }) => page === 2)?.box;
    expect(box?.height).toBeGreaterThan(box?.width ?? Infinity);
  });

  test('are read on over the next page, under the same label and with their heads', async () => {
    const manuscript = await readPdf('tables/continued.pdf');
    expectWellFormed(manuscript);
    expect(ratiosIn(manuscript)).toEqual(Array.from({ length: 48 }, (_, i) => ratioOf(i + 1)));
    expect(manuscript.tables.map(({ label }) => label)).toEqual(['Table 2', 'Table 2']);
    const heads = manuscript.tables.map(({ cells }) => cells.filter(({ header }) => header).length);
    expect(heads).toEqual([3, 3]);
  });
});

describe('the text of a figure', () => {
  const column = { phrases: [], left: 0, right: 200 };
  const draft = (kind: Draft['kind'], words: string, right: number): Draft => ({
    kind,
    lines: [{ page: 1, column, phrases: [], words, left: 0, right, baseline: 0, size: 9, font: 'f', frame: { turns: 0 } }],
  });
  const kinds = (drafts: readonly Draft[]): readonly string[] => withFigures(drafts).map(({ kind }) => kind);
  const prose = draft('paragraph', 'We asked everyone who lived in the towns.', 190);
  const labels = [draft('heading', 'Ferry towns', 60), draft('paragraph', '0.03', 20), draft('paragraph', 'Years', 30)];

  test('above its caption is set apart', () => {
    expect(kinds([prose, ...labels, draft('caption', 'Figure 2. Towns', 90)]))
      .toEqual(['paragraph', 'figure', 'figure', 'figure', 'caption']);
  });

  test('is not taken from headings, prose or tables', () => {
    expect(kinds([prose, ...labels, draft('caption', 'Table 2. Towns', 90)])).not.toContain('figure');
    expect(kinds([...labels.slice(0, 1), draft('caption', 'Figure 2. Towns', 90)])).not.toContain('figure');
    expect(kinds([prose, prose, prose, draft('caption', 'Figure 2. Towns', 90)])).not.toContain('figure');
  });
});

test('a Buffer of Node is read like any other bytes, in every form', async () => {
  const forms = ['ferry-cohort.pdf', ...['txt', 'docx', 'html', 'tex', 'md', 'xml'].map((form) => `ferry-cohort/manuscript.${form}`)];
  for (const form of forms) {
    const buffer = readFileSync(new URL(form, FIXTURES));
    const before = Buffer.from(buffer);
    const { text } = await readManuscript(buffer, form);
    expect(text).toContain('2.18');
    expect(buffer.equals(before)).toBe(true);
  }
});

describe('a PDF that cannot be read', () => {
  test.each([
    ['password.pdf', 'protected by a password', 'without one'],
    ['damaged.pdf', 'damaged or incomplete', 'print it to a new PDF'],
    ['scan.pdf', 'holds no text', 'text recognition'],
    ['picture.pdf', 'named .pdf but is a PNG picture', 'or PDF'],
    ['empty.pdf', 'empty', 'saved or downloaded'],
    ['no-pages.pdf', 'no pages', 'Export it again'],
    ['text.pdf', 'named .pdf but is plain text', 'Rename it'],
  ])('%s is refused with what it is and what to do', async (file, what, next) => {
    const reading = readPdf(`unreadable/${file}`);
    await expect(reading).rejects.toBeInstanceOf(ReadError);
    await expect(reading).rejects.toThrow(what);
    await expect(reading).rejects.toThrow(next);
  });
});

test('reading leaves the bytes as they were, and stops at the page limit with a notice', async () => {
  const bytes = new Uint8Array(readFileSync(new URL('granary-case-control.pdf', FIXTURES)));
  const before = bytes.slice();
  const seen: number[] = [];
  const { pages, notices } = await readManuscript(bytes, 'a.pdf', {
    maxPages: 2,
    onPage: (page) => seen.push(page),
  });
  expect(bytes).toEqual(before);
  expect(pages).toHaveLength(2);
  expect(seen).toEqual([1, 2]);
  expect(notices.map(({ message }) => message)).toEqual(['Only the first 2 of 4 pages were read.']);
});

describe('characters that a file stores in place of others', () => {
  test('are undone where they are used throughout, and said', () => {
    const { text, notices } = restore('0Æ72 (0Æ58–0Æ90), P ¼ 0Æ004 and n ¼ 120; 1.06e1.12, 0.58e0.90');
    expect(text).toBe('0·72 (0·58–0·90), P = 0·004 and n = 120; 1.06–1.12, 0.58–0.90');
    expect(notices).toHaveLength(3);
  });

  test('are left where they may be meant', () => {
    const text = 'Ærø has 1½ and 2¼ ferries; ‡ P < 0.05; 3.39e8';
    expect(restore(text)).toEqual({ text, notices: [] });
  });
});

const CORPUS = new URL('../../shared/corpus/', import.meta.url);

describe.each(['odd-pdf', 'pdf', 'pairs'])('the PDFs of the material folder, %s', (folder) => {
  const directory = new URL(`${folder}/`, CORPUS);
  const present = existsSync(directory);
  test.skipIf(!present)(
    `are read or refused with a sentence${present ? '' : ' (not run: ../shared/corpus is missing)'}`,
    async () => {
      const files = readdirSync(directory).filter((file) => file.endsWith('.pdf'));
      expect(files.length).toBeGreaterThan(10);
      for (const file of files) {
        const bytes = new Uint8Array(readFileSync(new URL(file, directory)));
        const read = await readManuscript(bytes, file).catch((cause: unknown) => cause);
        if (read instanceof Error) expect(read, file).toBeInstanceOf(ReadError);
        else expectWellFormed(read as Manuscript);
      }
    },
    300_000,
  );
});
