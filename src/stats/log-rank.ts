import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Maybe } from './absence.ts';
import {
  refuseClosedShares, refuseCounts, refuseNegative, refuseNonPositive,
} from './admissible.ts';
import { chiSquareTest, type ChiSquareTest } from './chi-square-test.ts';
import { ratioFromLog, type EstimatedRatio } from './estimated.ts';
import { logRatioFromLimits } from './interaction.ts';
import { zOfTwoSidedP } from './normal.ts';

/** Observed and expected events of two groups as a log-rank test counts them. */
export interface ObservedExpected {
  readonly observed: readonly [number, number];
  readonly expected: readonly [number, number];
}

/** What observed and expected events say without the variance. */
export interface LogRankSummary {
  /** Σ (O − E)²/E, which is no larger than the log-rank statistic. */
  readonly conservative: ChiSquareTest;
  /** (O₁/E₁)/(O₂/E₂) (Pike 1972), with standard error √(1/E₁ + 1/E₂) of its log. */
  readonly pike: EstimatedRatio;
  /** The variance of O − E as O₁O₂/(O₁ + O₂). */
  readonly varianceByArms: number;
  /** The variance of O − E as a quarter of the events, for arms of equal size. */
  readonly varianceByQuarter: number;
}

/**
 * The hazard ratio and test from observed and expected events: 14 and 28 where 22.48
 * and 19.52 were expected give χ² = 6.88 and 0.434 (0.237 to 0.796).
 * Source: Peto et al. (1977); Bland & Altman (2004).
 */
export function logRankSummary(counts: ObservedExpected, level = 95): Maybe<LogRankSummary> {
  const { observed: [o1, o2], expected: [e1, e2] } = counts;
  const refusal = refuseCounts({ 'first observed': o1, 'second observed': o2 })
    ?? refuseNonPositive({ 'first expected': e1, 'second expected': e2 });
  if (refusal) return refusal;
  if (o1 === 0 || o2 === 0) return absence('a group has no events');
  const logRatio = Math.log(o1 / e1) - Math.log(o2 / e2);
  const pike = ratioFromLog(logRatio, Math.sqrt(1 / e1 + 1 / e2), level);
  if (isAbsence(pike)) return pike;
  return {
    conservative: chiSquareTest((o1 - e1) ** 2 / e1 + (o2 - e2) ** 2 / e2, 1),
    pike,
    varianceByArms: (o1 * o2) / (o1 + o2),
    varianceByQuarter: (o1 + o2) / 4,
  };
}

/**
 * The log-rank test, and Peto's hazard ratio exp((O − E)/V), of the first group against
 * the second: O 112, E 91.58 and V 40.37 give χ² = 10.33 and 1.658 (1.218 to 2.258).
 * Source: Peto et al. (1977). It leans towards 1 beside Cox's when the effect is large.
 */
export function logRankTest(
  observed: number,
  expected: number,
  variance: number,
  level = 95,
): Maybe<{ readonly test: ChiSquareTest; readonly peto: EstimatedRatio }> {
  const refusal = refuseCounts({ observed }) ?? refuseNegative({ expected })
    ?? refuseNonPositive({ variance });
  if (refusal) return refusal;
  const gap = observed - expected;
  const peto = ratioFromLog(gap / variance, 1 / Math.sqrt(variance), level);
  return isAbsence(peto) ? peto : { test: chiSquareTest((gap * gap) / variance, 1), peto };
}

/** Events as reported: of both arms together (1:1 randomised), or of each. */
export type ReportedEvents =
  | { readonly total: number }
  | { readonly treatment: number; readonly control: number };

/** A hazard ratio behind a log-rank p, with O − E and its variance. */
export interface HazardFromP extends EstimatedRatio {
  readonly observedLessExpected: number;
  readonly variance: number;
}

/**
 * The hazard ratio behind a two-sided log-rank p and the events: V is a quarter of
 * them, or E₁E₂/E from the arms. 485 deaths and p = 0.075 in favour of treatment give
 * 0.851 (0.712 to 1.016). Source: Parmar, Torri & Stewart (1998); Tierney et al. (2007).
 */
export function hazardRatioFromP(
  p: number,
  events: ReportedEvents,
  favours: 'treatment' | 'control',
  level = 95,
): Maybe<HazardFromP> {
  const refusal = refuseClosedShares({ p }) ?? refuseCounts({ ...events });
  if (refusal) return refusal;
  const variance = 'total' in events
    ? events.total / 4
    : (events.treatment * events.control) / (events.treatment + events.control);
  if (!(variance > 0)) return absence('there are no events, or none in an arm');
  const z = (favours === 'treatment' ? -1 : 1) * zOfTwoSidedP(p);
  const found = ratioFromLog(z / Math.sqrt(variance), 1 / Math.sqrt(variance), level);
  if (isAbsence(found)) return found;
  return { ...found, observedLessExpected: z * Math.sqrt(variance), variance };
}

/** What the interval of a hazard ratio says of O − E, V and the number of events. */
export interface LogRankBehindRatio {
  readonly standardError: number;
  readonly variance: number;
  readonly observedLessExpected: number;
  /** 4V: the events it takes in arms of equal size. */
  readonly eventsIfBalanced: number;
}

/** O − E and V behind a hazard ratio: 0.58 (0.42 to 0.80) has V = 37.0, as 148 events. */
export function logRankBehindRatio(
  hazardRatio: number,
  limits: Range,
  level = 95,
): Maybe<LogRankBehindRatio> {
  const found = logRatioFromLimits(hazardRatio, limits, level);
  if (isAbsence(found)) return found;
  const variance = 1 / found.standardError ** 2;
  return {
    standardError: found.standardError,
    variance,
    observedLessExpected: found.logRatio * variance,
    eventsIfBalanced: 4 * variance,
  };
}

/**
 * The hazard ratio of two median survival times if survival is exponential: 12 months
 * for control and 18 for treatment give 0.667. A rough check of direction and size only.
 */
export function hazardRatioOfMedians(treatment: number, control: number): Maybe<number> {
  return refuseNonPositive({ treatment, control }) ?? control / treatment;
}
