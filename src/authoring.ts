/*
 * All that a rule may import. A rule is a card that an expert of the field can
 * read and write, so what it needs is gathered here under the field's own words.
 */

export * from './authoring/areas-in-text.ts';
export * from './authoring/arithmetic.ts';
export * from './authoring/crude-layouts.ts';
export * from './authoring/define-rule.ts';
export * from './authoring/explaining.ts';
export * from './authoring/interaction-test.ts';
export * from './authoring/groups-of-whole.ts';
export * from './authoring/listening.ts';
export * from './authoring/named-numbers.ts';
export * from './authoring/numbers-in-text.ts';
export * from './authoring/prevalence.ts';
export * from './authoring/neighbours.ts';
export * from './authoring/p-column.ts';
export * from './authoring/printed-numbers.ts';
export * from './authoring/row-mates.ts';
export * from './authoring/printed-twice.ts';
export * from './authoring/same-print.ts';
export * from './authoring/sayings.ts';
export * from './authoring/sections.ts';
export * from './authoring/shared-words.ts';
export * from './authoring/table-cells.ts';
export * from './authoring/table-view.ts';
export * from './authoring/verdicts.ts';
export * from './authoring/wording.ts';
export type {
  Claim,
  CoefficientResult,
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
  Table,
  Verdict,
} from './model/index.ts';
export { contains, cover, describePlace, indexAt, placeOf, quote } from './model/index.ts';
export { isAbsence } from './stats/absence.ts';
export type { Agreement } from './stats/agreement.ts';
export {
  type CoefficientRow,
  coefficientRow,
  pOfWald,
  ratioOfCoefficient,
} from './stats/coefficient-row.ts';
export type { Contrast } from './stats/contrast.ts';
export { type CrudeMatch, matchesOfCounts } from './stats/crude-ratio.ts';
export {
  countsBehindPercent,
  type PercentOfCount,
  percentOfCount,
} from './stats/percent-of-count.ts';
export { smallestStandardErrors } from './stats/information-bound.ts';
export { type PartsAndTotal, partsAndTotal } from './stats/parts-and-total.ts';
export { uncut, unrounded, unroundedTwice } from './stats/rounding.ts';
