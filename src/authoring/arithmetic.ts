import type { Interval, Printed, PValue, Range } from '../model/index.ts';
import { isAbsence } from '../stats/absence.ts';
import { type Agreement, agreement } from '../stats/agreement.ts';
import type { Contrast } from '../stats/contrast.ts';
import { zOfTwoSidedP } from '../stats/normal.ts';
import { effectOfOddsRatio } from '../stats/number-needed-to-treat.ts';
import type { ReportedNumbers } from '../stats/reported-numbers.ts';
import { probabilitiesBehind, unrounded } from '../stats/rounding.ts';
import { insideLimits, limitsInOrder } from './printed-numbers.ts';

/**
 * How a ratio's estimate, its limits and the given p stand to each other: see
 * `agreement`. Of two groups less is honest than of a unit.
 */
export function agreementOf(
  estimate: Printed | undefined,
  interval: Interval,
  contrast: Contrast,
  p?: PValue,
): Agreement {
  return agreement(reportedNumbers(estimate, interval, p), contrast);
}

/** The printed numbers of a ratio in the form in which the arithmetic takes them. */
export function reportedNumbers(
  estimate: Printed | undefined,
  { lower, upper, level }: Interval,
  p: PValue | undefined,
): ReportedNumbers {
  return {
    lower,
    upper,
    ...(estimate === undefined ? {} : { estimate }),
    ...(level === undefined ? {} : { level }),
    ...(p === undefined ? {} : { p: { ...p, ...p.printed } }),
  };
}

/**
 * How much an interval leans: |ln A|, where A is its upper arm over its lower one on the log
 * scale, at the least that rounding allows. 0.72 (0.58 to 0.98) leans by 0.25; an interval
 * whose arms may be equal by 0. Assumes limits above zero with the estimate between them.
 */
export function leastAsymmetry(estimate: Printed, interval: Interval): number {
  const [lower, upper] = [unrounded(interval.lower), unrounded(interval.upper)];
  const { low, high } = unrounded(estimate);
  const longestUpper = Math.log(upper.high / low) / Math.log(low / lower.high);
  const longestLower = Math.log(high / lower.low) / Math.log(upper.low / high);
  return Math.max(0, -Math.log(positive(longestUpper)), -Math.log(positive(longestLower)));
}

/** A ratio of arms, of which one may vanish in the rounding: then they are not far apart. */
function positive(ratioOfArms: number): number {
  return ratioOfArms > 0 ? ratioOfArms : Infinity;
}

/**
 * So much on the log scale may the arms of an honest interval differ for reasons that a text
 * seldom gives: a ratio per unit of something measured that is not called so (own fits of
 * published data: 0.16 at most), a bootstrap, a risk ratio turned from an odds ratio.
 */
const UNEXPLAINED_LEAN = 0.13;

/**
 * Whether a lean beyond what a likelihood of two groups allows is still too little to ask
 * about: 1.39 (1.07 to 1.89) leans by 0.11 at least, 0.72 (0.58 to 0.98) by 0.25.
 */
export function leansLittle(estimate: Printed, interval: Interval): boolean {
  return leastAsymmetry(estimate, interval) <= UNEXPLAINED_LEAN;
}

/**
 * Whether limits and estimate can stand together, so that more may be asked of them: in order,
 * the estimate inside, and not further off the middle than any usual method allows. Where they
 * cannot, limits-in-order, estimate-inside-interval or interval-symmetry has said so.
 */
export function limitsStand(
  estimate: Printed | undefined,
  interval: Interval,
  contrast: Contrast,
): boolean {
  if (!limitsInOrder(interval)) return false;
  if (estimate === undefined) return true;
  if (!insideLimits(estimate, interval)) return false;
  return agreementOf(estimate, interval, contrast).outcome !== 'neither'
    || (contrast === 'binary' && leansLittle(estimate, interval));
}

/**
 * How far apart a printed p and an implied range of p lie on the scale of z, where other
 * tests of the same data differ by 0.1 to 0.3: 0 where they meet. 0.003 lies 0.71 from 0.027.
 */
export function distanceInZ(p: PValue, implied: Range): number {
  const printed = probabilitiesOf(p);
  if (printed === undefined) return Infinity;
  const sides = p.oneSided === true ? 2 : 1;
  const z = (probability: number): number => zOfTwoSidedP(Math.min(1, probability));
  const beyond = z(printed.high * sides) - z(implied.low);
  const short = z(implied.high) - z(printed.low * sides);
  return Math.max(0, beyond, short);
}

/**
 * The probabilities that a printed p stands for: "p = 0.03" for 0.025 to 0.035, "p < 0.001"
 * for 0 to 0.001. Nothing where it is none.
 */
export function probabilitiesOf({ relation, printed }: PValue): Range | undefined {
  const found = probabilitiesBehind(relation, printed);
  return isAbsence(found) ? undefined : found;
}

/**
 * The two-sided p of no effect that follows from the limits alone, by the standard
 * method: 1.05 to 2.41 at 95% gives 0.025 to 0.033. Nothing where a limit has no logarithm.
 */
export function impliedP(interval: Interval): Range | undefined {
  const found = agreementOf(undefined, interval, 'binary');
  return found.outcome === 'within rounding' ? found.implied.p : undefined;
}

/**
 * The estimate on which limits centre on the log scale, their geometric mean: 0.58 to 0.98
 * gives 0.749 to 0.759. Nothing where a limit has no logarithm.
 */
export function impliedEstimate(interval: Interval): Range | undefined {
  const found = agreementOf(undefined, interval, 'binary');
  return found.outcome === 'within rounding' ? found.implied.estimate : undefined;
}

/**
 * The risk ratio that an odds ratio comes to where a share `p0` of the unexposed has the
 * outcome: OR / (1 − p0 + p0 × OR) (Zhang & Yu 1998). It rises with the odds ratio. An
 * odds ratio of 2 is a risk ratio of 1.82 at 10%, and of 1.43 at 40%.
 */
export function riskRatioAt(p0: number, { low, high }: Range): Range | undefined {
  const [lowest, highest] = [low, high].map((oddsRatio) => effectOfOddsRatio(oddsRatio, p0));
  if (lowest === undefined || highest === undefined) return undefined;
  if (isAbsence(lowest) || isAbsence(highest)) return undefined;
  return { low: lowest.treatedRisk / p0, high: highest.treatedRisk / p0 };
}
