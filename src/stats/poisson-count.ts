import type { Range } from '../model/index.ts';
import { isAbsence, type Absence, type Maybe } from './absence.ts';
import { refuseCounts, refuseLevel, refuseNonPositive } from './admissible.ts';
import { gammaQuantile } from './gamma-quantile.ts';
import { gammaTails } from './incomplete-gamma.ts';
import { zOfUpperTail } from './normal.ts';
import { poissonP } from './poisson.ts';
import { positiveRoot } from './positive-root.ts';
import { dividedBy } from './spread.ts';

/*
 * Intervals for the mean behind a count of independent events, and for a
 * standardised ratio of observed to expected. Levels are in percent. Overdispersed
 * or clustered counts have wider ones.
 */

/** Garwood's (1936) exact limits: 107 events have 87.69 to 129.30, none has 0 to 3.69. */
export function exactCountInterval(events: number, level = 95): Maybe<Range> {
  const refusal = refuseCounts({ events }) ?? refuseLevel(level);
  if (refusal) return refusal;
  const outside = (100 - level) / 200;
  return {
    low: events === 0 ? 0 : gammaQuantile(outside, events),
    high: gammaQuantile(1 - outside, events + 1),
  };
}

/** Byar's approximation to the exact limits (Breslow & Day 1987): 107 have 87.69 to 129.30. */
export function byarCountInterval(events: number, level = 95): Maybe<Range> {
  const z = refuseLevel(level) ?? zOfUpperTail((100 - level) / 200);
  return isAbsence(z) ? z : byarLimits(events, z);
}

/**
 * Byar's limits at so many standard errors to each side; 1.96 is what most programs and
 * handbooks take for 95%. No events have 0 to 3.668.
 */
export function byarLimits(events: number, reach: number): Maybe<Range> {
  const refusal = refuseCounts({ events }) ?? refuseNonPositive({ reach });
  if (refusal) return refusal;
  const limit = (n: number, side: number): number =>
    n * (1 - 1 / (9 * n) + (side * reach) / (3 * Math.sqrt(n))) ** 3;
  return { low: events === 0 ? 0 : Math.max(0, limit(events, -1)), high: limit(events + 1, 1) };
}

/**
 * Mid-P limits, which count the events seen by half and are narrower: 107 have 88.12
 * to 128.78. Many published standardised ratios have these. Accuracy: 1e-12.
 */
export function midPCountInterval(events: number, level = 95): Maybe<Range> {
  const refusal = refuseCounts({ events }) ?? refuseLevel(level);
  if (refusal) return refusal;
  const outside = (100 - level) / 200;
  const atLeast = (mean: number): number => midTails(events, mean).atLeast;
  const atMost = (mean: number): number => midTails(events, mean).atMost;
  return {
    low: events === 0 ? 0 : positiveRoot((mean) => Math.log(atLeast(mean) / outside), events),
    high: positiveRoot((mean) => Math.log(outside / atMost(mean)), events + 1),
  };
}

/** Observed over expected, with its usual intervals and tests. */
export interface StandardisedRatio {
  readonly ratio: number;
  readonly exact: Range;
  readonly byar: Range;
  readonly midP: Range;
  /** (observed − expected)/√expected. */
  readonly z: number;
  /** Exact, two-sided: the sum over all counts no more probable than the one seen. */
  readonly exactP: number;
}

/**
 * A standardised mortality or incidence ratio: 107 observed where 94 were expected
 * is 1.14 (exact 0.93 to 1.38, mid-P 0.94 to 1.37). The expected number is taken as
 * known, as is usual.
 */
export function standardisedRatio(
  observed: number,
  expected: number,
  level = 95,
): Maybe<StandardisedRatio> {
  const refusal = refuseNonPositive({ expected });
  if (refusal) return refusal;
  const exact = exactCountInterval(observed, level);
  const byar = byarCountInterval(observed, level);
  const midP = midPCountInterval(observed, level);
  const exactP = poissonP(observed, expected);
  if (isAbsence(exact) || isAbsence(byar) || isAbsence(midP) || isAbsence(exactP)) {
    return [exact, byar, midP, exactP].find(isAbsence) as Absence;
  }
  return {
    ratio: observed / expected,
    exact: dividedBy(exact, expected),
    byar: dividedBy(byar, expected),
    midP: dividedBy(midP, expected),
    z: (observed - expected) / Math.sqrt(expected),
    exactP,
  };
}

/** The tails with half of the probability of the count itself taken off. */
function midTails(events: number, mean: number): { atLeast: number; atMost: number } {
  const upTo = gammaTails(events + 1, mean);
  const from = events === 0 ? { lower: 1, upper: 0 } : gammaTails(events, mean);
  // The mean of the tails of neighbouring counts is the tail less half of the count itself.
  return { atLeast: (from.lower + upTo.lower) / 2, atMost: (upTo.upper + from.upper) / 2 };
}
