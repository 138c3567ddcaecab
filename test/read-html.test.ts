import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { describePlace, type Manuscript, placeOf, quote } from '../src/model/index.ts';
import { ReadError, readManuscript } from '../src/read/index.ts';
import { cellsOf, marksOf, outline } from './made/outline.ts';
import { expectWellFormed } from './read-invariants.ts';

async function read(body: string): Promise<Manuscript> {
  const page = `<!DOCTYPE html><html><head><title>x</title><style>p {}</style></head><body>${body}</body></html>`;
  const manuscript = await readManuscript(new TextEncoder().encode(page), 'paper.html');
  expectWellFormed(manuscript);
  return manuscript;
}

describe('a page', () => {
  test('becomes blocks with their sections, with tags left open', async () => {
    const manuscript = await read(`<h1>Tar and cough in ferry towns</h1><div>By <b>Ilse</b><h2>Methods</h2>
      <p>We asked.<p>Of the town.<ul><li>One<li>Two</ul><h2>Results</h2><p><strong>Cough in winter</strong></p>
      <p>It was <em>so</em>,<br>and p&lt;0.05; p<0.01.</p>`);
    expect(manuscript.format).toBe('html');
    expect(outline(manuscript)).toEqual([
      'title | title | Tar and cough in ferry towns',
      'paragraph | other | By Ilse',
      'heading | methods | Methods', 'paragraph | methods | We asked.', 'paragraph | methods | Of the town.',
      'paragraph | methods | One', 'paragraph | methods | Two',
      'heading | results | Results', 'heading | results | Cough in winter',
      'paragraph | results | It was so,\nand p<0.05; p<0.01.',
    ]);
  });

  test('leaves out what it hides, runs or navigates by, and what was struck out', async () => {
    const { text } = await read(`<nav>Home</nav><script>var OR = 1.5;</script><template><p>T</p></template>
      <p hidden>A</p><p style="display: none">B</p><p>OR <del>1.95</del><ins>1.59</ins>
      <span aria-hidden="true">1.59</span></p><noscript>C</noscript>`);
    expect(text).toBe('OR 1.59');
  });

  test('keeps raised marks off the numbers, and spaces that are no white space', async () => {
    const manuscript = await read('<p>P&nbsp;=&nbsp;<b>0.05</b><sup>12</sup>, CO<sub>2</sub> and 1&thinsp;234</p>');
    expect(manuscript.text).toBe('P\u00a0=\u00a00.0512, CO2 and 1\u2009234');
    expect(marksOf(manuscript)).toEqual(['P\u00a0=\u00a00.05^12', '0512, CO_2']);
  });

  test('reads formulas as they are printed', async () => {
    const manuscript = await read(`<p><math><msup><mi>χ</mi><mn>2</mn></msup><mo>=</mo><mn>5.6</mn>
      <mfrac><mi>a</mi><mi>b</mi></mfrac><annotation>\\chi</annotation></math></p>`);
    expect(manuscript.text.replace(/\s/g, '')).toBe('χ2=5.6a/b');
    expect(marksOf(manuscript)).toEqual(['χ^2']);
  });

  test('says in which paragraph words stand, having neither pages nor lines', async () => {
    const manuscript = await read('<h2>Results</h2><p>One.</p><p>Two words.</p>');
    const start = manuscript.text.indexOf('words');
    expect(describePlace(placeOf(manuscript, { start, end: start + 5 }))).toBe('paragraph 2');
  });
});

describe('a table in a page', () => {
  const rows = `<thead><tr><th rowspan=2>Town<th colspan=2>Adjusted<tr><th>OR<th>95% CI</thead>
    <tbody><tr><td rowspan=2>Ferry<sup>a</sup><td>1.59<td>1.05<br>2.41<tr><td>0.80<td>&ndash;</tbody>
    <tfoot><tr><td colspan=3>a The port.</tfoot>`;

  test('becomes a grid with its spans, header rows, caption and notes', async () => {
    const manuscript = await read(`<table><caption><b>Table 2.</b> Odds of cough</caption>${rows}</table><p>* By age.</p>`);
    const [table] = manuscript.tables;
    expect(cellsOf(manuscript, table)).toEqual([
      'h 0,0 over 2 rows: Town', 'h 0,1 over 2 columns: Adjusted', 'h 1,1: OR', 'h 1,2: 95% CI',
      '2,0 over 2 rows: Ferrya', '2,1: 1.59', '2,2: 1.05\n2.41', '3,1: 0.80', '3,2: –',
    ]);
    expect([table?.label, table?.rowCount, table?.columnCount]).toEqual(['Table 2', 4, 3]);
    expect(quote(manuscript.text, table?.caption ?? { start: 0, end: 0 })).toBe('Table 2. Odds of cough');
    expect(table?.notes.map((note) => quote(manuscript.text, note))).toEqual(['a The port.', '* By age.']);
    expect(manuscript.text).toContain('1.59\t1.05\n2.41');
  });

  test.each([
    ['above it in a figure', (table: string) => `<figure><figcaption>Table 1. Odds</figcaption>${table}</figure>`],
    ['below it in a figure', (table: string) => `<figure>${table}<figcaption>Table 1. Odds</figcaption></figure>`],
    ['in the paragraph before it', (table: string) => `<p>Table 1. Odds</p>${table}`],
  ])('takes the caption %s', async (_, around) => {
    const manuscript = await read(around('<table><tr><td>Town<td>OR<tr><td>Noss<td>1.2 (0.8–1.9)</table>'));
    const [table] = manuscript.tables;
    expect(table?.label).toBe('Table 1');
    expect(cellsOf(manuscript, table)).toEqual(['h 0,0: Town', 'h 0,1: OR', '1,0: Noss', '1,1: 1.2 (0.8–1.9)']);
  });

  test('that only lays out the page is none', async () => {
    const manuscript = await read(`<table><tr><td>Left<td><h2>Results</h2><p>OR 1.59.</p>
      <table><tr><th>Town<th>OR<tr><td>Noss<td>1.2</table></table>`);
    expect(outline(manuscript).slice(0, 3)).toEqual([
      'title | title | Left', 'heading | results | Results', 'paragraph | results | OR 1.59.',
    ]);
    expect(manuscript.tables).toHaveLength(1);
  });

  test('with spans beyond reason is cut to what print can hold', async () => {
    const { tables } = await read('<table><tr><td colspan="99999999">1<td rowspan="-3">2</table>');
    expect(tables[0]?.columnCount).toBe(201);
  });
});

test('a page without words is refused with a sentence', async () => {
  const reading = read('<div id="app"></div><script>load()</script>');
  await expect(reading).rejects.toBeInstanceOf(ReadError);
  await expect(reading).rejects.toThrow('print it to PDF');
});

describe('damaged or hostile markup', () => {
  test.each([
    ['unclosed', '<p>OR 1.59<table><tr><td>1<sup>2'],
    ['crossed', '<p><b><i>OR 1.59</b></i></table></td></p></sup>'],
    ['deep', `<p>OR 1.59</p>${'<div>'.repeat(100_000)}`],
    ['deep tables', `<p>OR 1.59</p>${'<table><tr><td>'.repeat(20_000)}`],
    ['marks without end', `<p>OR 1.59</p>${'<sup>1'.repeat(20_000)}`],
    ['entities that stand for each other', '<p>OR 1.59 &lol9;&#99999999;&#0;</p>'],
    ['spaces by the thousand', `<p>OR${'&nbsp;'.repeat(20_000)}</p><p>OR 1.59</p>`],
  ])('%s is read as far as it goes', async (_, body) => {
    expect((await read(body)).text).toContain('OR 1.59');
  });

  test('gives a well-formed manuscript, whatever it is', async () => {
    const pieces = fc.constantFrom(
      '<p>', '</p>', '<b>', '<sup>', '</sup>', '<table>', '</table>', '<tr>', '<td>', '<td colspan=2>',
      '<td rowspan=3>', '<th>', '<caption>', '</caption>', '<figure>', '<figcaption>', '</figure>', '<h1>',
      '</h2>', '<br>', '&nbsp;', 'OR 1.59 ', '<thead>', '<tfoot>', '<pre>\n a', '</pre>', '<li>', '<msup>',
    );
    await fc.assert(
      fc.asyncProperty(fc.array(pieces, { maxLength: 40 }), async (parts) => {
        await read(`Begins.${parts.join('')}`);
      }),
    );
  });

  test('that lies too deep says so', async () => {
    const { notices } = await read(`<p>OR 1.59</p>${'<div>'.repeat(100_000)}`);
    expect(notices[0]?.message).toContain('deeper than in any page');
  });
});
