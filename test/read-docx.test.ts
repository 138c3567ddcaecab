import { strToU8, zipSync } from 'fflate';
import { describe, expect, test } from 'vitest';
import { quote, type Manuscript } from '../src/model/index.ts';
import { ReadError, readManuscript } from '../src/read/index.ts';
import { cellsOf, marksOf, outline } from './made/outline.ts';
import { cell, paragraph, row, run, smallDocx, type SmallDocx } from './made/small-docx.ts';
import { expectWellFormed } from './read-invariants.ts';

async function read(docx: SmallDocx): Promise<Manuscript> {
  const manuscript = await readManuscript(smallDocx(docx), 'paper.docx');
  expectWellFormed(manuscript);
  return manuscript;
}

const STYLES = `
  <w:style w:type="paragraph" w:styleId="berschrift1"><w:name w:val="heading 1"/></w:style>
  <w:style w:type="paragraph" w:styleId="Own"><w:name w:val="Own"/><w:basedOn w:val="berschrift1"/></w:style>
  <w:style w:type="paragraph" w:styleId="Titel"><w:name w:val="Title"/></w:style>
  <w:style w:type="paragraph" w:styleId="Ring"><w:name w:val="a"/><w:basedOn w:val="Ring"/></w:style>
  <w:style w:type="character" w:styleId="Raised"><w:name w:val="footnote reference"/>
    <w:rPr><w:vertAlign w:val="superscript"/></w:rPr></w:style>`;

describe('a Word document', () => {
  test('becomes blocks with their sections, by its styles in any language', async () => {
    const manuscript = await read({
      styles: STYLES,
      body: [
        paragraph(run('Tar and cough in ferry towns'), '<w:pStyle w:val="Titel"/>'),
        paragraph(run('Methods'), '<w:pStyle w:val="berschrift1"/>'),
        paragraph(run('We asked.'), '<w:pStyle w:val="Ring"/>'),
        paragraph(run('Results'), '<w:pStyle w:val="Own"/>'),
        paragraph(run('Of the town', '<w:b/>')),
        paragraph(run('It was ') + run('so', '<w:i/>') + run('.')),
        paragraph(run('Deeper'), '<w:outlineLvl w:val="2"/>'),
      ].join(''),
    });
    expect(manuscript.format).toBe('docx');
    expect(outline(manuscript)).toEqual([
      'title | title | Tar and cough in ferry towns',
      'heading | methods | Methods',
      'paragraph | methods | We asked.',
      'heading | results | Results',
      'heading | results | Of the town',
      'paragraph | results | It was so.',
      'heading | results | Deeper',
    ]);
  });

  test('with tracked changes is read as after all of them', async () => {
    const { text } = await read({
      body: paragraph(
        `${run('OR 1.')}<w:del><w:r><w:delText>95</w:delText></w:r></w:del><w:ins>${run('59')}</w:ins>` +
          `<w:moveFrom>${run(' moved')}</w:moveFrom>${run(' hidden', '<w:vanish/>')}${run(' shown', '<w:vanish w:val="0"/>')}`,
      ),
    });
    expect(text).toBe('OR 1.59 shown');
  });

  test('keeps raised and lowered marks off the numbers', async () => {
    const manuscript = await read({
      styles: STYLES,
      body: paragraph(
        run('P = 0.05') + run('12', '<w:vertAlign w:val="superscript"/>') + run(' CO') +
          run('2', '<w:vertAlign w:val="subscript"/>') + run(' noted') + run('a', '<w:rStyle w:val="Raised"/>'),
      ),
    });
    expect(marksOf(manuscript)).toEqual(['P = 0.05^12', '.0512 CO_2', 'O2 noted^a']);
  });

  test('with equations keeps their signs and brackets', async () => {
    const letter = (words: string): string => `<m:r><m:t>${words}</m:t></m:r>`;
    const manuscript = await read({
      body: paragraph(
        `${run('(')}<m:oMath><m:sSup><m:e>${letter('χ')}</m:e><m:sup>${letter('2')}</m:sup></m:sSup>` +
          `<m:d><m:e>${letter('2')}</m:e></m:d>${letter('=5.6, p&lt;0.05')}` +
          `<m:f><m:num>${letter('a')}</m:num><m:den>${letter('b')}</m:den></m:f></m:oMath>${run(')')}`,
      ),
    });
    expect(manuscript.text).toBe('(χ2(2)=5.6, p<0.05a/b)');
    expect(marksOf(manuscript)).toEqual(['(χ^2']);
  });

  test('with symbols, tabs and breaks keeps what they print', async () => {
    const { text } = await read({
      body: paragraph(
        `${run('age ')}<w:r><w:sym w:font="Symbol" w:char="F0B3"/></w:r>${run('65')}<w:r><w:tab/></w:r>` +
          `${run('1')}<w:r><w:noBreakHyphen/></w:r>${run('2')}<w:r><w:br/></w:r>${run('next')}`,
      ),
    });
    expect(text).toBe('age ≥65\t1‑2\nnext');
  });

  test('has its footnotes after their paragraph and its endnotes at the end', async () => {
    const note = (id: string, words: string): string =>
      `<w:footnote w:id="${id}">${paragraph(run(words))}</w:footnote>`;
    const manuscript = await read({
      footnotes: `<w:footnote w:type="separator" w:id="0">${paragraph('')}</w:footnote>${note('2', 'By post.')}`,
      endnotes: `<w:endnote w:id="2">${paragraph(run('At last.'))}</w:endnote>`,
      body:
        paragraph(`${run('We asked')}<w:r><w:footnoteReference w:id="2"/></w:r>` +
          `${run(' all')}<w:r><w:endnoteReference w:id="2"/></w:r>${run('.')}`) + paragraph(run('They answered.')),
    });
    expect(outline(manuscript)).toEqual([
      'paragraph | other | We asked1 all2.', 'note | other | By post.',
      'paragraph | other | They answered.', 'note | other | At last.',
    ]);
    expect(marksOf(manuscript)).toEqual(['We asked^1', 'ked1 all^2']);
  });

  test('reads text boxes once, after their paragraph, and not their older twin', async () => {
    const box = `<w:txbxContent>${paragraph(run('In a box.'))}</w:txbxContent>`;
    const manuscript = await read({
      body: `<w:p>${run('Before')}<w:r><mc:AlternateContent xmlns:mc="http://schemas.openxmlformats.org/markup-compatibility/2006">` +
        `<mc:Choice>${box}</mc:Choice><mc:Fallback>${box}</mc:Fallback></mc:AlternateContent></w:r>${run(' after.')}</w:p>`,
    });
    expect(outline(manuscript)).toEqual(['paragraph | other | Before after.', 'paragraph | other | In a box.']);
  });

  test('may name its elements by other prefixes', async () => {
    const bytes = zipSync({
      'word/document.xml': strToU8(
        '<ns0:document xmlns:ns0="http://purl.oclc.org/ooxml/wordprocessingml/main"><ns0:body><ns0:p><ns0:r>' +
          '<ns0:t>OR 1.59</ns0:t></ns0:r></ns0:p></ns0:body></ns0:document>',
      ),
    });
    expect((await readManuscript(bytes, 'a.docx')).text).toBe('OR 1.59');
  });
});

describe('a table in a Word document', () => {
  const head = row(cell('Town') + cell('Adjusted', '<w:gridSpan w:val="2"/>'));
  const body =
    paragraph(run('Table 2. Odds of cough')) +
    `<w:tbl>${head}${row(cell('') + cell('OR') + cell('95% CI'))}` +
    `${row(cell('Ferry', '<w:vMerge w:val="restart"/>') + cell('1.59') + cell('1.05–2.41'))}` +
    `${row(cell('', '<w:vMerge/>') + cell('0.80') + cell('–'))}` +
    `${row(cell('Gone') + cell('9.9') + cell('9–10'), '<w:del w:id="1"/>')}</w:tbl>` +
    paragraph(run('* Adjusted for age.'));

  test('becomes a grid with its spans, header rows, label, caption and notes', async () => {
    const manuscript = await read({ body });
    const [table] = manuscript.tables;
    expect(cellsOf(manuscript, table)).toEqual([
      'h 0,0: Town', 'h 0,1 over 2 columns: Adjusted', 'h 1,1: OR', 'h 1,2: 95% CI',
      '2,0 over 2 rows: Ferry', '2,1: 1.59', '2,2: 1.05–2.41', '3,1: 0.80', '3,2: –',
    ]);
    expect([table?.label, table?.rowCount, table?.columnCount]).toEqual(['Table 2', 4, 3]);
    expect(quote(manuscript.text, table?.caption ?? { start: 0, end: 0 })).toBe('Table 2. Odds of cough');
    expect(table?.notes.map((note) => quote(manuscript.text, note))).toEqual(['* Adjusted for age.']);
  });

  test('may mark its header rows itself, and hold a table in a cell', async () => {
    const inner = `<w:tbl>${row(cell('a') + cell('b'))}${row(cell('c') + cell('d'))}</w:tbl>`;
    const manuscript = await read({
      body: `<w:tbl>${row(cell('1990') + cell('2000'), '<w:tblHeader/>')}` +
        `${row(cell('x') + `<w:tc>${inner}</w:tc>`)}</w:tbl>`,
    });
    expect(cellsOf(manuscript, manuscript.tables[0])).toEqual([
      'h 0,0: 1990', 'h 0,1: 2000', '1,0: x', '1,1: a\tb\nc\td',
    ]);
    expect(manuscript.tables).toHaveLength(1);
  });

  test('with spans beyond reason is cut to what print can hold', async () => {
    const manuscript = await read({ body: `<w:tbl>${row(cell('1', '<w:gridSpan w:val="99999999"/>'))}</w:tbl>` });
    expect(manuscript.tables[0]?.columnCount).toBe(200);
  });
});

describe('a Word file that cannot be read', () => {
  test.each([
    ['cut off', smallDocx({ body: paragraph(run('x'.repeat(500))) }).slice(0, 700), 'damaged or incomplete'],
    ['without a document', zipSync({ 'word/media/a.txt': strToU8('x') }), 'holds no document'],
    ['without a word', smallDocx({ body: paragraph('') }), 'holds no text'],
    ['with a password', Uint8Array.from([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1]), 'password'],
  ])('%s is refused with a sentence', async (_, bytes, words) => {
    const reading = readManuscript(bytes, 'paper.docx');
    await expect(reading).rejects.toBeInstanceOf(ReadError);
    await expect(reading).rejects.toThrow(words);
  });

  test('that swells when unpacked is refused before it is unpacked', async () => {
    const bomb = zipSync({ 'word/document.xml': new Uint8Array(120 * 2 ** 20) });
    expect(bomb.length).toBeLessThan(300_000);
    await expect(readManuscript(bomb, 'a.docx')).rejects.toThrow('far too large once unpacked');
  });

  test('that lies about its size is read no further than it says', async () => {
    const bytes = smallDocx({ body: paragraph(run('OR 1.59 '.repeat(5000))) });
    const lying = withSize(bytes, 'word/document.xml', 1000);
    const read = await readManuscript(lying, 'a.docx').catch((cause: unknown) => cause);
    if (read instanceof Error) expect(read).toBeInstanceOf(ReadError);
    else expect((read as Manuscript).text.length).toBeLessThan(1000);
  });

  test('whose parts lead out of it is read without them', async () => {
    const bytes = zipSync({
      '../../word/document.xml': strToU8('<w:document/>'),
      '/etc/passwd': strToU8('x'),
      'word/document.xml': strToU8('<w:document xmlns:w="x/wordprocessingml/2006/main"><w:p><w:r><w:t>In.</w:t></w:r></w:p></w:document>'),
    });
    expect((await readManuscript(bytes, 'a.docx')).text).toBe('In.');
  });
});

/** A zip whose directory gives another size for one of its files. */
function withSize(zip: Uint8Array, name: string, size: number): Uint8Array {
  const bytes = zip.slice();
  const view = new DataView(bytes.buffer);
  for (let at = 0; at < bytes.length - 46; at++) {
    if (view.getUint32(at, true) !== 0x02014b50) continue;
    const found = new TextDecoder().decode(bytes.subarray(at + 46, at + 46 + view.getUint16(at + 28, true)));
    if (found === name) view.setUint32(at + 24, size, true);
  }
  return bytes;
}

describe('damaged or hostile markup', () => {
  test.each([
    ['unclosed', `<w:p>${run('OR 1.59')}<w:tbl><w:tr><w:tc><w:p>`],
    ['crossed', `<w:p><w:r><w:t>OR 1.59</w:p></w:r></w:t>`],
    ['deep', `${paragraph(run('OR 1.59'))}${'<w:sdt>'.repeat(50_000)}`],
    ['tables in tables', `${paragraph(run('OR 1.59'))}${'<w:tbl><w:tr><w:tc>'.repeat(5000)}`],
    ['cells outside tables', `<w:tc><w:tr>${paragraph(run('OR 1.59'))}</w:tr></w:tc>`],
  ])('%s is read as far as it goes', async (_, body) => {
    expect((await read({ body })).text).toContain('OR 1.59');
  });
});
