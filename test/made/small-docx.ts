import { strToU8, zipSync } from 'fflate';

const W = 'http://schemas.openxmlformats.org/wordprocessingml/2006/main';
const M = 'http://schemas.openxmlformats.org/officeDocument/2006/math';
const ROOT = `xmlns:w="${W}" xmlns:m="${M}"`;

/** The parts of a small Word file that may be given; the body is the inside of `w:body`. */
export interface SmallDocx {
  readonly body: string;
  readonly styles?: string;
  readonly footnotes?: string;
  readonly endnotes?: string;
}

/** A Word file made of the parts that reading looks at. */
export function smallDocx({ body, styles = '', footnotes = '', endnotes = '' }: SmallDocx): Uint8Array {
  return zipSync({
    '_rels/.rels': strToU8('<Relationships><Relationship Target="word/document.xml"/></Relationships>'),
    'word/document.xml': strToU8(`<w:document ${ROOT}><w:body>${body}</w:body></w:document>`),
    'word/styles.xml': strToU8(`<w:styles ${ROOT}>${styles}</w:styles>`),
    'word/footnotes.xml': strToU8(`<w:footnotes ${ROOT}>${footnotes}</w:footnotes>`),
    'word/endnotes.xml': strToU8(`<w:endnotes ${ROOT}>${endnotes}</w:endnotes>`),
  });
}

/** A run of words with its properties: `run('2', '<w:vertAlign w:val="superscript"/>')`. */
export function run(words: string, properties = ''): string {
  return `<w:r><w:rPr>${properties}</w:rPr><w:t xml:space="preserve">${words}</w:t></w:r>`;
}

/** A paragraph of runs with its properties. */
export function paragraph(content: string, properties = ''): string {
  return `<w:p><w:pPr>${properties}</w:pPr>${content}</w:p>`;
}

/** A cell with its properties. */
export function cell(words: string, properties = ''): string {
  return `<w:tc><w:tcPr>${properties}</w:tcPr>${paragraph(run(words))}</w:tc>`;
}

/** A row of cells with its properties. */
export function row(cells: string, properties = ''): string {
  return `<w:tr><w:trPr>${properties}</w:trPr>${cells}</w:tr>`;
}
