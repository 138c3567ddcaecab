/*
 * All that a rule may import. A rule is a card that an expert of the field can
 * read and write, so what it needs is gathered here under the field's own words.
 */

export * from './authoring/arithmetic.ts';
export * from './authoring/define-rule.ts';
export * from './authoring/explaining.ts';
export * from './authoring/listening.ts';
export * from './authoring/printed-numbers.ts';
export * from './authoring/table-view.ts';
export * from './authoring/verdicts.ts';
export * from './authoring/wording.ts';
export type {
  Claim,
  Count,
  Disagreement,
  Findings,
  Grade,
  Interval,
  Judgement,
  Prevalence,
  Printed,
  PValue,
  Range,
  RatioResult,
  Reading,
  Result,
  Rule,
  Span,
  Verdict,
} from './model/index.ts';
export { contains, cover, quote } from './model/index.ts';
export { isAbsence } from './stats/absence.ts';
export type { Agreement } from './stats/agreement.ts';
export type { Contrast } from './stats/contrast.ts';
export {
  countsBehindPercent,
  type PercentOfCount,
  percentOfCount,
} from './stats/percent-of-count.ts';
export { unrounded, unroundedTwice } from './stats/rounding.ts';
