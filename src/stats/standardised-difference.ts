import type { Maybe } from './absence.ts';
import { refuseInfinite, refuseNonPositive } from './admissible.ts';

/** π/√3, the standard deviation of a logistic variable: 1.8138. */
const LOGISTIC_DEVIATION = Math.PI / Math.sqrt(3);

/**
 * The standardised mean difference behind an odds ratio of the same outcome cut in two:
 * ln(OR) √3/π. 0.5 gives −0.382. Source: Chinn (2000); the Cochrane Handbook rounds
 * π/√3 to 1.81. Assumes a logistic outcome with equal variances.
 */
export function standardisedDifferenceOfOdds(oddsRatio: number): Maybe<number> {
  return refuseNonPositive({ oddsRatio }) ?? Math.log(oddsRatio) / LOGISTIC_DEVIATION;
}

/** The odds ratio of a standardised mean difference: 0.5 gives 2.477. Source: Chinn (2000). */
export function oddsRatioOfStandardisedDifference(difference: number): Maybe<number> {
  return refuseInfinite({ difference }) ?? Math.exp(difference * LOGISTIC_DEVIATION);
}
