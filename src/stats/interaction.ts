import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Maybe } from './absence.ts';
import { refuseInfinite, refuseNonPositive } from './admissible.ts';
import { ratioFromLog, type EstimatedRatio } from './estimated.ts';
import { multiplier, twoSidedP, upperTail } from './normal.ts';
import { exponentials, falling, magnitudes } from './ranges.ts';

/** A ratio on the log scale with its standard error. */
export interface LogRatio {
  readonly logRatio: number;
  readonly standardError: number;
}

/** How two independent ratios compare: their ratio, and the test that it is 1. */
export interface Interaction extends EstimatedRatio {
  /** In the direction seen; half of the two-sided p, and printed for it now and then. */
  readonly oneSidedP: number;
}

/**
 * The test of a difference between two independent estimates: (E₁ − E₂)/√(SE₁² +
 * SE₂²) on the log scale. 0.67 (0.46 to 0.98) and 0.88 (0.71 to 1.08) differ by a
 * ratio of 0.76 (0.49 to 1.17), p = 0.22, though only the first excludes 1.
 *
 * Source: Altman & Bland (2003). Assumes that the two groups share nobody; the term of
 * one adjusted model differs a little.
 */
export function interactionOf(one: LogRatio, other: LogRatio, level = 95): Maybe<Interaction> {
  const refusal = refuseInfinite({ 'first log ratio': one.logRatio, 'second': other.logRatio })
    ?? refuseNonPositive({
      'first standard error': one.standardError, 'second': other.standardError,
    });
  if (refusal) return refusal;
  const standardError = Math.hypot(one.standardError, other.standardError);
  const ratio = ratioFromLog(one.logRatio - other.logRatio, standardError, level);
  return isAbsence(ratio) ? ratio : { ...ratio, oneSidedP: upperTail(Math.abs(ratio.log.z)) };
}

/** A ratio and its limits, as numbers, on the log scale: the standard error is from the limits. */
export function logRatioFromLimits(ratio: number, limits: Range, level = 95): Maybe<LogRatio> {
  const refusal = refuseNonPositive({
    ratio, 'lower limit': limits.low, 'upper limit': limits.high,
  });
  if (refusal) return refusal;
  const reach = multiplier(level);
  if (isAbsence(reach)) return reach;
  if (!(limits.low < limits.high)) return absence('the limits are out of order, or equal');
  const standardError = (Math.log(limits.high) - Math.log(limits.low)) / (2 * reach);
  return { logRatio: Math.log(ratio), standardError };
}

/** What rounding leaves of an estimate: ranges of the log ratio and its standard error. */
export interface LogRatioRanges {
  readonly logEstimate: Range;
  readonly standardError: Range;
}

/** How two printed ratios compare, as ranges that allow for their rounding. */
export interface InteractionRanges {
  readonly ratio: Range;
  readonly z: Range;
  /** Two-sided. */
  readonly p: Range;
}

/**
 * The interaction test of two printed results, whose log ratios and standard errors
 * are known as ranges (`impliedByRegion` gives them). The ends are those of the
 * ranges taken freely, so that the answer is never too narrow: it may be a little
 * wide, since a printed limit ties the two unknowns together.
 */
export function interactionOfRanges(
  one: LogRatioRanges,
  other: LogRatioRanges,
): Maybe<InteractionRanges> {
  const difference = {
    low: one.logEstimate.low - other.logEstimate.high,
    high: one.logEstimate.high - other.logEstimate.low,
  };
  const least = Math.hypot(one.standardError.low, other.standardError.low);
  const most = Math.hypot(one.standardError.high, other.standardError.high);
  const refusal = refuseInfinite({ 'least difference': difference.low, 'largest': difference.high })
    ?? refuseNonPositive({ 'least standard error': least, 'largest standard error': most });
  if (refusal) return refusal;
  if (difference.low > difference.high || least > most) return absence('a range is out of order');
  const z = {
    low: difference.low / (difference.low < 0 ? least : most),
    high: difference.high / (difference.high > 0 ? least : most),
  };
  return { ratio: exponentials(difference), z, p: falling(magnitudes(z), twoSidedP) };
}
