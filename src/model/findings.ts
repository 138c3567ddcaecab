import type { Claim, Prevalence } from './claim.ts';
import type { Count, Result } from './result.ts';

/** Everything that was found in a manuscript's text, in reading order. */
export interface Findings {
  readonly results: readonly Result[];
  readonly claims: readonly Claim[];
  /** Every count printed with its total or percentage, whether or not a result uses it. */
  readonly counts: readonly Count[];
  readonly prevalences: readonly Prevalence[];
}
