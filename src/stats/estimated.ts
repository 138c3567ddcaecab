import type { Range } from '../model/index.ts';
import { isAbsence, type Maybe } from './absence.ts';
import { refuseInfinite, refuseNonPositive } from './admissible.ts';
import { multiplier, twoSidedP } from './normal.ts';
import { rangeAround } from './spread.ts';

/**
 * An estimate with its standard error, the interval of the level asked for, and
 * Wald's test of no effect, all on the scale on which the standard error is.
 */
export interface Estimated {
  readonly estimate: number;
  readonly standardError: number;
  readonly interval: Range;
  readonly z: number;
  /** Two-sided. */
  readonly p: number;
}

/**
 * A ratio estimated on the log scale: the log with its standard error, and ratio
 * and interval turned back from it. 1.59 (1.05 to 2.41) has the log 0.464 with a
 * standard error of 0.212.
 */
export interface EstimatedRatio {
  readonly ratio: number;
  readonly interval: Range;
  readonly log: Estimated;
}

/**
 * Estimate plus and minus so many standard errors, with z and p against zero.
 * Level in percent. A standard error of 0 has a one-point interval and no z, so
 * it is refused. 0.111 with standard error 0.0241 gives z = 4.61.
 */
export function estimatedFrom(
  estimate: number,
  standardError: number,
  level = 95,
): Maybe<Estimated> {
  const refusal = refuseInfinite({ estimate })
    ?? refuseNonPositive({ 'standard error': standardError });
  if (refusal) return refusal;
  const reach = multiplier(level);
  if (isAbsence(reach)) return reach;
  const z = estimate / standardError;
  const interval = rangeAround(estimate, reach * standardError);
  return { estimate, standardError, interval, z, p: twoSidedP(z) };
}

/**
 * A coefficient of a logistic, Cox or Poisson model, or any other log ratio, with
 * its standard error, as a ratio with Wald's interval: 0.11092114 and 0.02405982
 * give 1.1173 (1.0658 to 1.1713), z = 4.61.
 *
 * Assumes a normal sampling distribution of the log; exact to rounding.
 */
export function ratioFromLog(
  logRatio: number,
  standardError: number,
  level = 95,
): Maybe<EstimatedRatio> {
  const log = estimatedFrom(logRatio, standardError, level);
  if (isAbsence(log)) return log;
  return {
    ratio: Math.exp(logRatio),
    interval: { low: Math.exp(log.interval.low), high: Math.exp(log.interval.high) },
    log,
  };
}
