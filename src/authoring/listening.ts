import { indexAt, type RatioResult, type Reading, type Result, type Span } from '../model/index.ts';
import type { Contrast } from '../stats/contrast.ts';

/*
 * Where an article's own words name a method or a unit, a rule listens. Only words
 * near the numbers count, within their own block.
 */

/**
 * The text around a span, up to `reach` characters to each side within its own
 * block, in which a rule listens for words such as "bootstrap".
 */
export function wordsAround({ manuscript }: Reading, span: Span, reach = 300): string {
  const block = manuscript.blocks[indexAt(manuscript.blocks, span.start)];
  const from = Math.max(block?.span.start ?? 0, span.start - reach);
  const to = Math.min(block?.span.end ?? manuscript.text.length, span.end + reach);
  return manuscript.text.slice(from, to);
}

/** Words by which a ratio is per unit of something measured, and compares no two groups. */
// 1.04 (1.01 to 1.07) per year          each additional drink       a 1-SD increase
//                     ^^^               ^^^^                          ^^^^^^^^^^^
const PER_UNIT = new RegExp(
  '\\b(?:per|each|every|one.unit|increments?|\\d+.unit|(?:two|ten|10).fold'
    + '|as a continuous|continuous (?:variable|scale|score)'
    + '|(?:SD|standard deviation'
    + '|\\d+.(?:units?|points?|years?|[a-zµ]{0,2}(?:g|l|m|mol))(?:/[a-z]+)?)'
    + ' (?:increase|decrease|rise|change|higher|lower))\\b',
  'i',
);

/** Whether a ratio compares two groups: so unless it names a unit, or the words near it do. */
export function contrastOf(reading: Reading, { about, span }: RatioResult): Contrast {
  const isPerUnit = about.unit !== undefined || PER_UNIT.test(wordsAround(reading, span, 80));
  return isPerUnit ? 'unknown' : 'binary';
}

/**
 * Words that name an interval made otherwise than by Wald's method and its kin. A
 * method's name counts where it stands beside a word for an interval, or near the result.
 */
// the 95% bootstrap CI was …     Exact confidence limits were …
//         ^^^^^^^^^^^^           ^^^^^^^^^^^^^^^^^^^^^^^
const OTHER_INTERVAL = new RegExp(
  '\\b(?:bootstrap\\w*|credible|posterior|Bayes\\w*|Firth\\w*|penali[sz]ed|jackknife|Monte Carlo'
    + '|profile.likelihood|(?:exact|mid-?P|Clopper.Pearson) (?:95% )?'
    + '(?:confidence (?:limits|intervals?)|CIs?|limits|intervals?))\\b',
  'i',
);

/** The words near a result that name a kind of interval which need not be symmetric. */
export function otherIntervalNamed(
  reading: Reading,
  { span, interval }: Pick<Result, 'span' | 'interval'>,
): string | undefined {
  if (interval?.type === 'credible') return 'credible interval';
  return wordsAround(reading, span).match(OTHER_INTERVAL)?.[0];
}

/** Words that name another test than that of no effect which the interval answers to. */
const OTHER_TEST = new RegExp(
  'χ|\\b(?:chi|chi.squared?|log.?rank|likelihood.ratio|Fisher\\S* exact|exact test|permutation'
    + '|Wilcoxon|Gray\\S* test|Bonferroni|Holm|Hochberg|Dunnett|false discovery|FDR'
    + '|multiple (?:testing|comparisons)'
    + '|multiplicity|one.sided|one.tailed|non.?inferiority|superiority|equivalence'
    + '|overall p|global p)\\b',
  'i',
);

/** The words near a p-value that name another test or an adjustment of it. */
export function otherTestNamed(reading: Reading, span: Span): string | undefined {
  return wordsAround(reading, span, 120).match(OTHER_TEST)?.[0];
}
