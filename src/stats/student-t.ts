import { isAbsence, type Maybe } from './absence.ts';
import { refuseClosedShares, refuseLevel, refuseUnsquarable } from './admissible.ts';
import { refuseDegreesOfFreedom } from './degrees-of-freedom.ts';
import { betaTails } from './incomplete-beta.ts';
import { upperTail, zOfUpperTail } from './normal.ts';
import { positiveRoot } from './positive-root.ts';
import type { Tails } from './tails.ts';

/**
 * From here on t is turned into the normal deviate with the same tail (Hill
 * 1970), whose remainder is below 1e-13 of the tail by then. The incomplete beta
 * would be as good, but its work grows with the root of the degrees of freedom.
 */
const MANY = 1e5;

/**
 * The tails of Student's t, for any real degrees of freedom up to 1e9. At
 * t = 2.101 on 18 the upper one is 0.0249962.
 *
 * Source: t as an incomplete beta (Abramowitz & Stegun 26.5.27). Accuracy: 1e-13
 * of the tail down to 1e-300. |t| beyond 1e150 is refused.
 */
export function studentTails(t: number, degreesOfFreedom: number): Maybe<Tails> {
  const refusal = refuseUnsquarable({ t }) ?? refuseDegreesOfFreedom({ degreesOfFreedom });
  if (refusal) return refusal;
  const beyond = tailBeyond(Math.abs(t), degreesOfFreedom);
  return t < 0 ? { lower: beyond, upper: 1 - beyond } : { lower: 1 - beyond, upper: beyond };
}

/** The two-sided p-value of a t statistic of either sign: t = 2.5 on 10 gives 0.031447. */
export function studentP(t: number, degreesOfFreedom: number): Maybe<number> {
  const tails = studentTails(t, degreesOfFreedom);
  return isAbsence(tails) ? tails : Math.min(1, 2 * Math.min(tails.lower, tails.upper));
}

/**
 * The t with the probability `upper` above it: 0.025 on 24 degrees of freedom
 * gives 2.063899. Accuracy: 1e-14 relative (a root of `studentTails`).
 */
export function studentQuantile(upper: number, degreesOfFreedom: number): Maybe<number> {
  const refusal = refuseClosedShares({ 'upper tail': upper })
    ?? refuseDegreesOfFreedom({ degreesOfFreedom });
  if (refusal) return refusal;
  if (upper === 0.5) return 0;
  return upper > 0.5
    ? -quantileAbove(1 - upper, degreesOfFreedom)
    : quantileAbove(upper, degreesOfFreedom);
}

/**
 * How many standard errors an interval of this level (in percent) reaches to each
 * side when the standard error has been estimated on so many degrees of freedom:
 * 95 on 24 gives 2.0639 where the normal has 1.96.
 */
export function studentMultiplier(level: number, degreesOfFreedom: number): Maybe<number> {
  return refuseLevel(level) ?? studentQuantile((100 - level) / 200, degreesOfFreedom);
}

/** The |t| whose two-sided p-value is `p`: 0.008 on 45 degrees of freedom gives 2.7755. */
export function studentOfTwoSidedP(p: number, degreesOfFreedom: number): Maybe<number> {
  return refuseClosedShares({ p }) ?? studentQuantile(p / 2, degreesOfFreedom);
}

function tailBeyond(t: number, df: number): number {
  if (df >= MANY) return upperTail(normalDeviate(t, df));
  const x = df / (df + t * t);
  return betaTails(df / 2, 0.5, x, (t * t) / (df + t * t)).lower / 2;
}

/** Hill's (1970) expansion, Algorithm 395, with its third term. */
function normalDeviate(t: number, df: number): number {
  const a = df - 0.5;
  const b = 48 * a * a;
  const square = a * Math.log1p((t * t) / df);
  const w = Math.sqrt(square);
  const third = w * (((4 * square + 33) * square + 240) * square + 855);
  return w + (w * (square + 3)) / b - third / (10 * b * (b + 0.8 * square * square + 100));
}

function quantileAbove(upper: number, df: number): number {
  const near = Math.max(zOfUpperTail(upper), 1e-3);
  return positiveRoot((t) => Math.log(upper / tailBeyond(t, df)), near);
}
