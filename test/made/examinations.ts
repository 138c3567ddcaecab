import type {
  Block, Examination, Flag, Line, Manuscript, Printed, RatioResult, Result, Rule, Span,
} from '../../src/model/index.ts';
import { placeOf } from '../../src/model/index.ts';

/*
 * Examinations made by hand, so that reports are tested without reading,
 * extracting or checking anything. All texts are invented.
 */

/** The span of the first `words` in `text` at or after `from`. */
export function spanOf(text: string, words: string, from = 0): Span {
  const start = text.indexOf(words, from);
  if (start < 0) throw new Error(`no "${words}" in "${text}"`);
  return { start, end: start + words.length };
}

/** The number that stands as `words` in `text`. */
export function printed(text: string, words: string, from = 0): Printed {
  const span = spanOf(text, words, from);
  const plain = words.replace('·', '.').replace('−', '-').replace('%', '');
  return {
    text: words, plain, value: Number(plain), decimals: plain.split('.')[1]?.length ?? 0,
    percent: words.endsWith('%'), span,
  };
}

/** A manuscript of one paragraph a line, every second line of a page numbered in the margin. */
export function manuscriptOf(text: string, more: Partial<Manuscript> = {}): Manuscript {
  const blocks: Block[] = [];
  const lines: Line[] = [];
  let start = 0;
  text.split('\n').forEach((words, index) => {
    const span = { start, end: start + words.length };
    blocks.push({ kind: 'paragraph', span, section: { role: 'results', heading: 'Results' } });
    lines.push({ span, number: 140 + index, numbering: 'printed', page: 4 });
    start += words.length + 1;
  });
  return {
    name: 'saltmarsh.pdf', format: 'pdf', text, blocks, lines, tables: [], marks: [], notices: [],
    pages: [{ number: 4, span: { start: 0, end: text.length }, width: 595, height: 842 }],
    ...more,
  };
}

/** The ratio whose printed numbers are these words of the text. */
export function ratioIn(
  text: string,
  words: { estimate: string; lower: string; upper: string; p?: string },
  more: Partial<RatioResult> = {},
): RatioResult {
  const estimate = printed(text, words.estimate);
  const lower = printed(text, words.lower, estimate.span.end);
  const upper = printed(text, words.upper, lower.span.end);
  const p = words.p === undefined ? undefined : printed(text, words.p, upper.span.end);
  const span = { start: estimate.span.start, end: (p ?? upper).span.end };
  return {
    kind: 'ratio', measure: 'HR', estimate, span, about: {}, inferred: [], counts: [], cited: false,
    interval: {
      lower, upper, level: 95, type: 'confidence',
      span: { start: lower.span.start, end: upper.span.end },
    },
    ...(p === undefined ? {} : {
      p: { relation: '=', printed: p, tests: 'result', span: p.span },
    }),
    ...more,
  };
}

/** A flag on a ratio, with every part filled in. */
export function flagOn(manuscript: Manuscript, result: Result, more: Partial<Flag> = {}): Flag {
  const numbers = [result.estimate, result.interval?.lower, result.interval?.upper];
  return {
    rule: 'estimate-inside-interval',
    grade: 'contradiction',
    span: result.span,
    place: placeOf(manuscript, result.span),
    marks: numbers.flatMap((number) => (number === undefined ? [] : [number.span])),
    because: 'the estimate 0.72 lies below its interval, 0.75 to 0.98',
    recomputed: { quantity: 'estimate', range: { low: 0.8523, high: 0.8631 } },
    working: ['√(0.75 × 0.98) = 0.857', 'with rounding 0.852 to 0.863'],
    innocent: ['A limit may have been copied from another row.', 'Two analyses may be mixed.'],
    comment: 'For “0.72 (95% CI 0.75 to 0.98)” the estimate lies outside its own interval. '
      + 'Could the authors please check these numbers?',
    result,
    ...more,
  };
}

/** An examination in which these flags were raised. */
export function examinationOf(
  manuscript: Manuscript, results: readonly Result[], flags: readonly Flag[],
  more: Partial<Examination['checked']> = {},
): Examination {
  return {
    manuscript,
    findings: { results, claims: [], counts: [], prevalences: [] },
    checked: { flags, unjudged: [], agreed: 12, ...more },
  };
}

/** A rule that is only its card: reports show its question and judge nothing. */
export const cards: readonly Rule[] = [{
  id: 'estimate-inside-interval',
  question: 'Does the estimate lie inside its own interval?',
  why: 'An interval is built around its estimate.',
  source: 'Invented for the test.',
  innocent: ['A limit may have been copied from another row.', 'Two analyses may be mixed.'],
  grade: 'contradiction',
  reads: 'ratio',
  examples: [
    { text: 'hazard ratio 0.72 (95% CI 0.58 to 0.90)', outcome: 'agrees', note: 'inside' },
    { text: 'hazard ratio 0.72 (95% CI 0.75 to 0.98)', outcome: 'disagrees', note: 'below' },
  ],
  judgements: () => [],
  comment: () => '',
}];

const TEXT = 'Of 412 residents 96 died. In the adjusted model the hazard ratio for death among '
  + 'those who were served samphire daily was 0.72 (95% CI 0.75 to 0.98), p = 0.03, after a median '
  + 'of 4.1 years. No other food was associated with death.';

/** One flagged hazard ratio in one paragraph. */
export function flaggedExamination(): Examination {
  const manuscript = manuscriptOf(TEXT);
  const result = ratioIn(TEXT, { estimate: '0.72', lower: '0.75', upper: '0.98', p: '0.03' });
  return examinationOf(manuscript, [result], [flagOn(manuscript, result)], {
    unjudged: [{
      rule: 'estimate-inside-interval', span: result.span,
      because: 'a limit may be rounded from zero, which has no logarithm',
    }],
  });
}
