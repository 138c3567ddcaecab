import { extract } from '../src/extract/index.ts';
import type { Result } from '../src/model/index.ts';
import { readManuscript, readText } from '../src/read/index.ts';
import { partsOfResult } from './what-was-read.ts';

/** A table as a test writes it: XML within `<table>`, with what stands around it. */
export interface JatsTable {
  readonly caption?: string;
  readonly head?: string;
  readonly body: string;
  readonly notes?: string;
  /** Prose of the article that holds the table. */
  readonly prose?: string;
}

/** The results in a table of a minimal JATS article. */
export async function resultsInJats(table: JatsTable): Promise<readonly Result[]> {
  const { caption = '', head = '', body, notes = '', prose = '' } = table;
  const thead = head === '' ? '' : `<thead>${head}</thead>`;
  const foot = notes === '' ? '' : `<table-wrap-foot><p>${notes}</p></table-wrap-foot>`;
  const xml = `<?xml version="1.0"?><article><front><article-meta><title-group>
    <article-title>Ferry towns</article-title></title-group></article-meta></front>
    <body><sec><title>Results</title><p>${prose}</p><table-wrap><label>Table 1</label>
    <caption><p>${caption}</p></caption><table>${thead}<tbody>${body}</tbody></table>${foot}
    </table-wrap></sec></body></article>`;
  const manuscript = await readManuscript(new TextEncoder().encode(xml), 'article.xml');
  return (await extract(manuscript)).results.filter(({ cell }) => cell !== undefined);
}

/** The results in a table of typed text, its columns parted by tabs. */
export async function resultsInText(
  caption: string,
  ...rows: readonly string[]
): Promise<readonly Result[]> {
  const text = [`Table 1. ${caption}`, ...rows.map((row) => row.replace(/ *\| */g, '\t'))].join(
    '\n',
  );
  return (await extract(readText(text, 'pasted text'))).results.filter(
    ({ cell }) => cell !== undefined,
  );
}

/** The row of a table: `row('Weavers | 1.45 (1.15–1.83)')`; `row('h', 'Town | OR')` heads it. */
export function row(...[kind, cells]: readonly [string] | readonly ['th', string]): string {
  const [tag, words] = cells === undefined ? ['td', kind] : ['th', cells];
  return `<tr>${words
    .split(' | ')
    .map((cell) => `<${tag}>${cell}</${tag}>`)
    .join('')}</tr>`;
}

/** A ratio in one line, with where it stands: "Weavers: OR 1.45, 1.15 to 1.83 at 95%". */
export function inOneLine(result: Result): string {
  return `${result.cell?.row ?? ''}: ${partsOfResult(result).join(', ')}`;
}

/** The lines of the ratios among results. */
export function ratiosOf(results: readonly Result[]): readonly string[] {
  return results.filter(({ kind }) => kind === 'ratio').map(inOneLine);
}

/** The lines of all results. */
export function linesOf(results: readonly Result[]): readonly string[] {
  return results.map(inOneLine);
}
