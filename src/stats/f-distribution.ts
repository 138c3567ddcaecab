import { isAbsence, type Maybe } from './absence.ts';
import { refuseClosedShares, refuseNegative, refuseUnsquarable } from './admissible.ts';
import { refuseDegreesOfFreedom } from './degrees-of-freedom.ts';
import { betaTails } from './incomplete-beta.ts';
import { positiveQuantile } from './positive-root.ts';
import type { Tails } from './tails.ts';

/**
 * The tails of Fisher's F for any real degrees of freedom up to 1e9. Above 4 on 1
 * and 98 lies 0.0482678. Source: F as an incomplete beta (Abramowitz & Stegun
 * 26.6.2). Accuracy: 1e-13 of the tail down to 1e-300 while the smaller of the
 * two is below 1e6.
 */
export function fTails(f: number, numeratorDf: number, denominatorDf: number): Maybe<Tails> {
  const refusal = refuseNegative({ F: f }) ?? refuseUnsquarable({ F: f })
    ?? refuseDegreesOfFreedom({ numeratorDf, denominatorDf });
  return refusal ?? tailsOf(f, numeratorDf, denominatorDf);
}

/** The p-value of an F statistic, its upper tail: 3.2 on 2 and 57 gives 0.0481825. */
export function fP(f: number, numeratorDf: number, denominatorDf: number): Maybe<number> {
  const tails = fTails(f, numeratorDf, denominatorDf);
  return isAbsence(tails) ? tails : tails.upper;
}

/**
 * The F with the probability `lower` below it: 0.95 on 2 and 10 gives 4.102821.
 * Accuracy: 1e-14 relative (a root of `fTails`).
 */
export function fQuantile(
  lower: number,
  numeratorDf: number,
  denominatorDf: number,
): Maybe<number> {
  const refusal = refuseClosedShares({ probability: lower })
    ?? refuseDegreesOfFreedom({ numeratorDf, denominatorDf });
  return refusal ?? positiveQuantile((f) => tailsOf(f, numeratorDf, denominatorDf), lower, 1);
}

function tailsOf(f: number, d1: number, d2: number): Tails {
  const odds = (d1 / d2) * f;
  return betaTails(d1 / 2, d2 / 2, odds / (1 + odds), 1 / (1 + odds));
}
