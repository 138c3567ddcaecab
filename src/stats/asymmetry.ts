import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Maybe } from './absence.ts';
import { refuseNonPositive } from './admissible.ts';
import { multiplier } from './normal.ts';
import { refuseUnprinted, unrounded, type PrintedValue } from './rounding.ts';

/**
 * How lopsided an interval is on the log scale: the upper arm over the lower,
 * (ln u − ln e) / (ln e − ln l), 1 for a Wald interval. 14.0 (3.5 to 122.2) has 1.56.
 */
export function asymmetryIndex(estimate: number, { low, high }: Range): Maybe<number> {
  const refusal = refuseNonPositive({ estimate, 'lower limit': low, 'upper limit': high });
  if (refusal) return refusal;
  if (!(low < estimate && estimate < high)) {
    return absence('the estimate does not lie between its limits');
  }
  return Math.log(high / estimate) / Math.log(estimate / low);
}

/**
 * The asymmetry indices that printed numbers allow. The index falls with the estimate and
 * rises with both limits, so its ends come from theirs; an arm that rounding may have
 * shortened to nothing makes an end 0 or infinite.
 */
export function asymmetryRange(
  estimate: PrintedValue,
  lower: PrintedValue,
  upper: PrintedValue,
): Maybe<Range> {
  const refusal = refuseUnprinted({ estimate, 'lower limit': lower, 'upper limit': upper });
  if (refusal) return refusal;
  const [e, l, u] = [unrounded(estimate), unrounded(lower), unrounded(upper)];
  if (!(l.low > 0 && e.low > 0 && u.high < Infinity)) {
    return absence('a printed number may stand for one without a logarithm');
  }
  if (!(l.low <= e.high && e.low <= u.high)) {
    return absence('the estimate does not lie between its limits');
  }
  const upperArm = { low: Math.max(0, Math.log(u.low / e.high)), high: Math.log(u.high / e.low) };
  const lowerArm = { low: Math.max(0, Math.log(e.low / l.high)), high: Math.log(e.high / l.low) };
  return { low: upperArm.low / lowerArm.high, high: upperArm.high / lowerArm.low };
}

/** What the cells of a 2×2 table say of the lopsidedness of its likelihood intervals. */
export interface ExpectedAsymmetry {
  /** γ, the skewness of the log odds ratio's likelihood at the estimate. */
  readonly skewness: number;
  /** ln A of a profile-likelihood interval, to third order: multiplier·γ/3. */
  readonly logAsymmetry: number;
  /** The greatest |ln A| that any table with this standard error can have: multiplier·s/3. */
  readonly bound: number;
}

/**
 * The skewness γ = (1/b² + 1/c² − 1/a² − 1/d²)/s³ of a 2×2 table's log odds ratio, with
 * s² = 1/a + 1/b + 1/c + 1/d, and the asymmetry it gives a likelihood interval. Own
 * derivation from the Taylor series of the profile likelihood; |γ| ≤ s (see `lean.ts`).
 * Within 0.005 of true profile intervals for the tables of textbooks: 37, 162, 4, 159
 * gives ln A = 0.259, and the profile interval 0.261.
 */
export function expectedAsymmetry(
  a: number,
  b: number,
  c: number,
  d: number,
  level: number,
): Maybe<ExpectedAsymmetry> {
  const reach = multiplier(level);
  if (isAbsence(reach)) return reach;
  const refusal = refuseNonPositive({ a, b, c, d });
  if (refusal) return refusal;
  const standardError = Math.sqrt(1 / a + 1 / b + 1 / c + 1 / d);
  const third = 1 / (b * b) + 1 / (c * c) - 1 / (a * a) - 1 / (d * d);
  const skewness = third / standardError ** 3;
  return {
    skewness,
    logAsymmetry: (reach / 3) * skewness,
    bound: (reach / 3) * standardError,
  };
}
