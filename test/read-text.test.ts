import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { quote, type Manuscript } from '../src/model/index.ts';
import { ReadError, readManuscript, readText } from '../src/read/index.ts';
import { expectWellFormed } from './read-invariants.ts';

const PASTED = `Cold rooms and chilblains in a cohort of cheese makers

Abstract
BACKGROUND: Little is known.
RESULTS: The hazard ratio was 0.72
(95% CI 0.58 to 0.90).

Keywords: cheese; cold

1. Introduction
Rooms are cold.

2.1 Patients and rooms
As in Table 2 of the guild's book.

Results

Patients
There were 120.

Table 1. Rooms
Room\tOR (95% CI)\tP
North\t1.2 (0.8-1.9)\t0.3
South\t1 (ref)\t
* By odds.

References
1. Aldermoor P. Rinds. Journal of Rinds 2010;1:2.
2. Bellwether Q. Cold. Cellar Notes 2011;3:4.
`;

function outline({ text, blocks }: Manuscript): readonly string[] {
  return blocks.map(
    ({ kind, span, section }) => `${kind}/${section.role}: ${quote(text, span).slice(0, 24)}`,
  );
}

function rows({ text, tables }: Manuscript): readonly (readonly string[])[] {
  const [table] = tables;
  if (table === undefined) return [];
  return Array.from({ length: table.rowCount }, (_, row) =>
    table.cells.filter((cell) => cell.row === row).map((cell) => quote(text, cell.span)),
  );
}

describe('pasted text', () => {
  test('is divided into blocks that know their section', () => {
    expect(outline(readText(PASTED, 'pasted'))).toEqual([
      'title/title: Cold rooms and chilblain',
      'heading/abstract: Abstract',
      'heading/abstract: BACKGROUND:',
      'paragraph/abstract: Little is known.',
      'heading/abstract: RESULTS:',
      'paragraph/abstract: The hazard ratio was 0.7',
      'heading/other: Keywords:',
      'paragraph/other: cheese; cold',
      'heading/introduction: 1. Introduction',
      'paragraph/introduction: Rooms are cold.',
      'heading/introduction: 2.1 Patients and rooms',
      'paragraph/introduction: As in Table 2 of the gui',
      'heading/results: Results',
      'heading/results: Patients',
      'paragraph/results: There were 120.',
      'caption/results: Table 1. Rooms',
      'table/results: Room\tOR (95% CI)\tP\nNorth',
      'note/results: * By odds.',
      'heading/references: References',
      'references/references: 1. Aldermoor P. Rinds. J',
    ]);
  });

  test('keeps a paragraph of several lines as one block', () => {
    const { text, blocks } = readText(PASTED, 'pasted');
    expect(blocks.map(({ span }) => quote(text, span))).toContain(
      'The hazard ratio was 0.72\n(95% CI 0.58 to 0.90).',
    );
  });

  test('is well formed and unchanged, whatever is pasted', () => {
    const words = fc.constantFrom(
      'Results',
      'RESULTS:',
      'Table 1.',
      '0.72',
      '(0.58',
      '–0.90)',
      'of',
      '120',
      'a.',
      '12',
      '³',
      '\t',
      '  ',
      '   ',
      '\n',
      '\r\n',
      '\n\n',
      '\u00a0',
    );
    fc.assert(
      fc.property(fc.array(words, { maxLength: 60 }), (parts) => {
        const text = parts.join(' ');
        const manuscript = readText(text, 'any');
        expectWellFormed(manuscript);
        if (manuscript.notices.length === 0) expect(manuscript.text).toBe(text);
      }),
    );
  });

  test('may be empty', () => {
    expect(readText('', 'nothing')).toMatchObject({ text: '', blocks: [], lines: [] });
  });
});

describe('tables in pasted text', () => {
  test('with tabs become grids, with their caption and notes', () => {
    const manuscript = readText(PASTED, 'pasted');
    expect(rows(manuscript)).toEqual([
      ['Room', 'OR (95% CI)', 'P'],
      ['North', '1.2 (0.8-1.9)', '0.3'],
      ['South', '1 (ref)'],
    ]);
    expect(manuscript.tables[0]).toMatchObject({ label: 'Table 1', columnCount: 3 });
    expect(manuscript.tables[0]?.cells.map(({ header }) => header)).toEqual([
      true,
      true,
      true,
      false,
      false,
      false,
      false,
      false,
    ]);
    expect(manuscript.tables[0]?.notes.map((span) => quote(manuscript.text, span))).toEqual([
      '* By odds.',
    ]);
  });

  test('aligned with spaces become grids, with rows that are only a label', () => {
    const manuscript = readText(
      [
        'Group            Cases (n = 20)   Controls',
        'Sex',
        '  Men            12 (60)          10 (50)',
        '  Women                           10 (50)',
      ].join('\n'),
      'aligned',
    );
    expect(rows(manuscript)).toEqual([
      ['Group', 'Cases (n = 20)', 'Controls'],
      ['Sex'],
      ['Men', '12 (60)', '10 (50)'],
      ['Women', '10 (50)'],
    ]);
    expect(
      manuscript.tables[0]?.cells.find((cell) => cell.row === 3 && cell.column > 0)?.column,
    ).toBe(2);
  });

  test('are not seen in sentences with two spaces after a full stop', () => {
    expect(
      readText('One was cold.  Two were not.\nThree were.  Four were not.', 'typed').tables,
    ).toEqual([]);
  });
});

describe('line numbers pasted with the text', () => {
  const typed = [
    'A study of cold rooms',
    'The odds ratio was',
    '1.59 (95% CI 1.05–2.41).',
    '12 rooms were warm and',
    '13 were cold.',
    'The end.',
  ];

  test('on every line are taken as places, not as text', () => {
    const manuscript = readText(
      typed.map((line, i) => `${String(i + 41).padStart(4)}  ${line}`).join('\n'),
      'numbered',
    );
    expect(manuscript.text).toBe(typed.join('\n'));
    expect(manuscript.lines.map(({ number, numbering }) => [number, numbering])).toEqual(
      typed.map((_, i) => [i + 41, 'printed']),
    );
    expect(manuscript.notices).toHaveLength(1);
  });

  test('5 by 5 give every line between them its number', () => {
    const long = Array.from({ length: 23 }, (_, i) => `words of line ${i + 1} in the sheet`);
    const pasted = long
      .map((line, i) =>
        (i + 1) % 5 === 0 ? `${String(i + 1).padStart(3)} ${line}` : `    ${line}`,
      )
      .join('\n');
    const manuscript = readText(pasted, 'by fives');
    expect(manuscript.text).toBe(long.join('\n'));
    expect(manuscript.lines.map(({ number }) => number)).toEqual(long.map((_, i) => i + 1));
  });

  test('are not seen in a list of numbers that does not rise line by line', () => {
    const text = '12 were cold\n15 were warm\n9 were neither\n3 were lost\n7 stayed\n8 went';
    expect(readText(text, 'counts')).toMatchObject({ text, notices: [] });
  });
});

describe('a text file', () => {
  const bytes = (...codes: readonly number[]): Uint8Array => Uint8Array.from(codes);

  test('in UTF-8, with or without a byte order mark, is read as it is', async () => {
    const text = 'Hazard ratio 0·72 (0·58–0·90)';
    const encoded = new TextEncoder().encode(text);
    expect((await readManuscript(encoded, 'a.txt')).text).toBe(text);
    expect((await readManuscript(bytes(0xef, 0xbb, 0xbf, ...encoded), 'a.txt')).text).toBe(text);
  });

  test('in UTF-16 is read by its byte order mark', async () => {
    const units = Array.from('OR 1.59', (char) => char.charCodeAt(0));
    expect(
      (await readManuscript(bytes(0xff, 0xfe, ...units.flatMap((u) => [u, 0])), 'a.txt')).text,
    ).toBe('OR 1.59');
    expect(
      (await readManuscript(bytes(0xfe, 0xff, ...units.flatMap((u) => [0, u])), 'a.txt')).text,
    ).toBe('OR 1.59');
  });

  test('in another encoding is read as Windows-1252, with a notice', async () => {
    const manuscript = await readManuscript(bytes(0x30, 0xb7, 0x37, 0x32, 0x96, 0x31), 'a.txt');
    expect(manuscript.text).toBe('0·72–1');
    expect(manuscript.notices[0]?.message).toContain('Windows-1252');
  });

  test.each([
    ['nothing', bytes(), 'a.txt', 'The file is empty'],
    ['blanks', bytes(0x20, 0x0a), 'a.txt', 'no text but blanks'],
    ['bytes of no text', bytes(0x41, 0x00, 0x01, 0x42), 'a.txt', 'not text'],
    ['a picture', bytes(0x89, 0x50, 0x4e, 0x47), 'a.png', 'a PNG picture'],
    ['an old Word document', bytes(0xd0, 0xcf, 0x11, 0xe0), 'a.doc', 'old Word document'],
  ])('of %s is refused with a sentence', async (_, content, name, words) => {
    const reading = readManuscript(content, name);
    await expect(reading).rejects.toBeInstanceOf(ReadError);
    await expect(reading).rejects.toThrow(words);
  });

  test('that is too large is refused with both sizes', async () => {
    await expect(
      readManuscript(new Uint8Array(2 ** 21), 'a.txt', { maxBytes: 2 ** 20 }),
    ).rejects.toThrow('2.0 MB');
  });
});
