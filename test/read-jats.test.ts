import { describe, expect, it } from 'vitest';
import { describePlace, type Manuscript, placeOf, quote } from '../src/model/index.ts';
import { readManuscript } from '../src/read/index.ts';

const article = (body: string, front = ''): Promise<Manuscript> => readManuscript(
  new TextEncoder().encode(`<?xml version="1.0"?><!DOCTYPE article><article><front><article-meta>
    <title-group><article-title>Tar and cough in ferry towns</article-title></title-group>
    <contrib-group><contrib><name><surname>Ostrava</surname></name></contrib></contrib-group>
    <abstract><sec><title>Results</title><p>OR 1.59 (95% CI 1.05&#x2013;2.41).</p></sec></abstract>${front}
    </article-meta></front><body>${body}</body></article>`),
  'article.xml',
);

const blocksOf = ({ text, blocks }: Manuscript): readonly string[] =>
  blocks.map(({ kind, section, span }) => `${kind} | ${section.role} | ${quote(text, span)}`);

describe('an article in JATS', () => {
  it('becomes blocks with their sections, in reading order', async () => {
    const manuscript = await article(`<sec sec-type="methods"><title>What we did</title><p>We asked.</p>
      <sec><title>People</title><p>Of the town.</p></sec></sec>
      <sec><title>Results</title><p>It was <italic>so</italic>.</p></sec>`);
    expect(manuscript.format).toBe('jats');
    expect(blocksOf(manuscript)).toEqual([
      'title | title | Tar and cough in ferry towns',
      'heading | abstract | Results',
      'paragraph | abstract | OR 1.59 (95% CI 1.05–2.41).',
      'heading | methods | What we did',
      'paragraph | methods | We asked.',
      'heading | methods | People',
      'paragraph | methods | Of the town.',
      'heading | other | Results',
      'paragraph | results | It was so.',
    ]);
  });

  it('leaves names and addresses aside, and keeps references apart', async () => {
    const { text, blocks } = await article('<p>Text.</p>');
    expect(text).not.toContain('Ostrava');
    const { blocks: cited } = await article('<ref-list><ref><mixed-citation>Noss A. Tar.</mixed-citation></ref></ref-list>');
    expect(cited.at(-1)?.kind).toBe('references');
    expect(blocks.some(({ kind }) => kind === 'references')).toBe(false);
  });

  it('marks what is raised, so that it joins no number', async () => {
    const { text, marks } = await article('<p>P = 0.05<sup>12</sup> and more <sup>a</sup>.</p>');
    expect(marks.map(({ kind, span }) => `${kind} ${quote(text, span)}`)).toEqual(['superscript 12', 'superscript a']);
  });

  it('says in which paragraph words stand, having neither pages nor lines', async () => {
    const manuscript = await article('<sec><title>Results</title><p>One.</p><p>Two words.</p></sec>');
    const start = manuscript.text.indexOf('words');
    expect(describePlace(placeOf(manuscript, { start, end: start + 5 }))).toBe('paragraph 2');
  });
});

describe('a table in JATS', () => {
  const table = `<table-wrap><label>Table 2.</label><caption><p>Odds of cough</p></caption><table>
    <thead><tr><th rowspan="2">Town</th><th colspan="2">Adjusted</th></tr><tr><th>OR</th><th>95% CI</th></tr></thead>
    <tbody><tr><td rowspan="2">Ferry<sup>a</sup></td><td>1.59</td><td>1.05<break/>2.41</td></tr>
    <tr><td>0.80</td><td>&#x2013;</td></tr></tbody></table>
    <table-wrap-foot><fn><p><sup>a</sup>The port.</p></fn></table-wrap-foot></table-wrap>`;

  it('becomes a grid with its spans, label, caption and notes', async () => {
    const { text, tables } = await article(table);
    const [grid] = tables;
    expect([grid?.label, grid?.rowCount, grid?.columnCount]).toEqual(['Table 2', 4, 3]);
    expect(quote(text, grid?.caption ?? { start: 0, end: 0 })).toBe('Table 2. Odds of cough');
    expect(grid?.notes.map((note) => quote(text, note))).toEqual(['aThe port.']);
    expect(grid?.cells.map(({ span, row, column, header }) =>
      `${header ? 'h' : ''}${row},${column} ${quote(text, span)}`)).toEqual([
      'h0,0 Town', 'h0,1 Adjusted', 'h1,1 OR', 'h1,2 95% CI',
      '2,0 Ferrya', '2,1 1.59', '2,2 1.05\n2.41', '3,1 0.80', '3,2 –',
    ]);
  });

  it('keeps numbers of neighbouring cells apart in the text', async () => {
    expect((await article(table)).text).toContain('1.59\t1.05');
  });

  it('with spans beyond reason is cut to what print can hold', async () => {
    const { tables } = await article('<table-wrap><table><tr><td colspan="99999999">1</td></tr></table></table-wrap>');
    expect(tables[0]?.columnCount).toBe(200);
  });
});

describe('damaged markup', () => {
  it.each([
    ['unclosed', '<sec><title>Results</title><p>OR 1.59 (95% CI 1.05–2.41)'],
    ['crossed', '<sec><p>OR <b>1.59</sec></b></p>'],
    ['deep', '<sec>'.repeat(20_000)],
    ['an entity bomb', '<p>&lol9;&lol9;</p>'],
  ])('%s is read as far as it goes', async (_, body) => {
    expect((await article(body)).text).toContain('Tar and cough');
  });
});
