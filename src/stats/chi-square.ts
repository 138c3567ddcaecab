import { isAbsence, type Maybe } from './absence.ts';
import { refuseClosedShares, refuseNegative, refuseUnsquarable } from './admissible.ts';
import { refuseDegreesOfFreedom } from './degrees-of-freedom.ts';
import { gammaQuantile } from './gamma-quantile.ts';
import { gammaTails } from './incomplete-gamma.ts';
import type { Tails } from './tails.ts';

/**
 * The tails of χ² for any real degrees of freedom up to 1e9. Above 3.841459 on
 * one lies 0.05. Source: χ² as an incomplete gamma (Abramowitz & Stegun 26.4.19).
 * Accuracy: 1e-13 of the tail down to 1e-300.
 */
export function chiSquareTails(chiSquare: number, degreesOfFreedom: number): Maybe<Tails> {
  const refusal = refuseNegative({ 'chi-square': chiSquare })
    ?? refuseUnsquarable({ 'chi-square': chiSquare })
    ?? refuseDegreesOfFreedom({ degreesOfFreedom });
  return refusal ?? gammaTails(degreesOfFreedom / 2, chiSquare / 2);
}

/** The p-value of a χ² statistic, its upper tail: 33.22 on 8 gives 5.62e-5. */
export function chiSquareP(chiSquare: number, degreesOfFreedom: number): Maybe<number> {
  const tails = chiSquareTails(chiSquare, degreesOfFreedom);
  return isAbsence(tails) ? tails : tails.upper;
}

/**
 * The χ² with the probability `lower` below it: 0.95 on one degree of freedom
 * gives 3.841459. Accuracy: 1e-14 relative (a root of `chiSquareTails`).
 */
export function chiSquareQuantile(lower: number, degreesOfFreedom: number): Maybe<number> {
  const refusal = refuseClosedShares({ probability: lower })
    ?? refuseDegreesOfFreedom({ degreesOfFreedom });
  return refusal ?? 2 * gammaQuantile(lower, degreesOfFreedom / 2);
}
