import type { Checked, Format, Manuscript, Result, ResultKind } from '../model/index.ts';
import { counted, listed } from './numbers-in-words.ts';
import { countGrades, gradesInWords } from './severity.ts';

const FORMATS: Readonly<Record<Format, string>> = {
  text: 'plain text', pdf: 'PDF', jats: 'JATS XML', docx: 'Word document', html: 'HTML',
  latex: 'LaTeX', markdown: 'Markdown',
};

/** "PDF, 6 pages, 3,412 words." */
export function formInWords({ format, pages, text }: Manuscript): string {
  const length = pages.length === 0 ? [] : [counted(pages.length, 'page')];
  return `${[FORMATS[format], ...length, counted(wordsIn(text), 'word')].join(', ')}.`;
}

function wordsIn(text: string): number {
  let count = 0;
  for (const _ of text.matchAll(/\S+/g)) count += 1;
  return count;
}

const KINDS: Readonly<Record<ResultKind, readonly [one: string, many: string]>> = {
  ratio: ['ratio', 'ratios'],
  coefficient: ['coefficient', 'coefficients'],
  difference: ['difference', 'differences'],
  proportion: ['proportion', 'proportions'],
  discrimination: ['measure of discrimination', 'measures of discrimination'],
  test: ['test statistic', 'test statistics'],
  other: ['other estimate', 'other estimates'],
};

/** "41 results: 28 ratios, 9 proportions and 4 test statistics." */
export function resultsInWords(results: readonly Result[]): string {
  if (results.length === 0) return NOTHING_READ;
  const kinds = (Object.keys(KINDS) as ResultKind[]).flatMap((kind) => {
    const count = results.filter((result) => result.kind === kind).length;
    return count === 0 ? [] : [counted(count, ...KINDS[kind])];
  });
  return `${counted(results.length, 'result')} found: ${listed(kinds)}.`;
}

const NOTHING_READ = 'No result was recognised (an estimate with an interval, a p-value, '
  + 'a count with its percentage), so nothing could be checked.';

/** "52 checks agree. Flagged: 2 contradictions and 1 caution. 4 could not be judged." */
export function checksInWords({ agreed, flags, unjudged }: Checked): string {
  if (agreed + flags.length + unjudged.length === 0) return '';
  const agreeing = `${counted(agreed, 'check')} ${agreed === 1 ? 'agrees' : 'agree'}.`;
  const flagged = flags.length === 0 ? 'Nothing is flagged.'
    : `Flagged: ${gradesInWords(countGrades(flags))}.`;
  const open = unjudged.length === 0 ? [] : [`${unjudged.length} could not be judged.`];
  return [agreeing, flagged, ...open].join(' ');
}
