import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Absence, type Maybe } from './absence.ts';
import { refuseCounts, refuseInfinite, refuseNonPositive } from './admissible.ts';
import { twoSidedP } from './normal.ts';
import { rangeAround } from './spread.ts';
import { studentMultiplier, studentOfTwoSidedP, studentP } from './student-t.ts';

/** A group as a table of baseline or outcome prints it. */
export interface GroupSummary {
  readonly mean: number;
  readonly standardDeviation: number;
  readonly size: number;
}

/** A t test with the interval of the difference. */
export interface TTest {
  readonly t: number;
  readonly degreesOfFreedom: number;
  readonly p: number;
  readonly interval: Range;
}

/** How the means of two groups compare. */
export interface MeanComparison {
  readonly difference: number;
  /** Student's, with one variance for both. */
  readonly pooled: TTest;
  /** Welch's, with one for each and Satterthwaite's degrees of freedom. */
  readonly welch: TTest;
  /** The difference in pooled standard deviations, and with Hedges' correction 1 − 3/(4 df − 1). */
  readonly cohen: number;
  readonly hedges: number;
  /**
   * The normal p if the printed deviations were standard errors of the means: where
   * this, and not the others, is the printed p, the two may have been taken for each other.
   */
  readonly pIfStandardErrors: number;
}

/**
 * The t tests of two groups from their means, standard deviations and sizes: 10 (2.3) of
 * 50 against 12 (3.1) of 48 give t = −3.64 on 96, Welch's −3.62 on 86.6. Level in percent.
 */
export function compareMeans(
  first: GroupSummary,
  second: GroupSummary,
  level = 95,
): Maybe<MeanComparison> {
  const refusal = refuseGroup(first) ?? refuseGroup(second);
  if (refusal) return refusal;
  const difference = first.mean - second.mean;
  const df = first.size + second.size - 2;
  const squares = (first.size - 1) * first.standardDeviation ** 2
    + (second.size - 1) * second.standardDeviation ** 2;
  const deviation = Math.sqrt(squares / df);
  const pooledError = deviation * Math.sqrt(1 / first.size + 1 / second.size);
  const parts = [first, second].map((group) => group.standardDeviation ** 2 / group.size);
  const [one, two] = parts as [number, number];
  const welchDf = (one + two) ** 2 / (one ** 2 / (first.size - 1) + two ** 2 / (second.size - 1));
  const pooled = testOf(difference, pooledError, df, level);
  const welch = testOf(difference, Math.sqrt(one + two), welchDf, level);
  if (isAbsence(pooled)) return pooled;
  if (isAbsence(welch)) return welch;
  const cohen = difference / deviation;
  const asErrors = difference / Math.hypot(first.standardDeviation, second.standardDeviation);
  return {
    difference, pooled, welch, cohen,
    hedges: cohen * (1 - 3 / (4 * df - 1)),
    pIfStandardErrors: twoSidedP(asErrors),
  };
}

/** A standard error and deviation behind a mean difference with its p. */
export interface SpreadFromP {
  readonly t: number;
  readonly standardError: number;
  /** Of both groups, if they share one. */
  readonly standardDeviation: number;
}

/**
 * The standard error behind a mean difference and its two-sided p from a t test: 3.8 with
 * p = 0.008 and groups of 25 and 22 has t = 2.776, so 1.369, and a standard deviation of
 * 4.68. Source: Cochrane Handbook 6.5.2.3.
 */
export function spreadFromP(
  difference: number,
  p: number,
  firstSize: number,
  secondSize: number,
): Maybe<SpreadFromP> {
  const refusal = refuseInfinite({ difference }) ?? refuseSize(firstSize) ?? refuseSize(secondSize);
  if (refusal) return refusal;
  const t = studentOfTwoSidedP(p, firstSize + secondSize - 2);
  if (isAbsence(t)) return t;
  const standardError = Math.abs(difference) / t;
  const standardDeviation = standardError / Math.sqrt(1 / firstSize + 1 / secondSize);
  return { t, standardError, standardDeviation };
}

/**
 * By what to divide the width of an interval of a mean to get its standard error: 4.128
 * for 24 degrees of freedom at 95%, where the normal has 3.92. Cochrane Handbook 6.5.2.2.
 */
export function widthDivisor(degreesOfFreedom: number, level = 95): Maybe<number> {
  const reach = studentMultiplier(level, degreesOfFreedom);
  return isAbsence(reach) ? reach : 2 * reach;
}

function testOf(difference: number, error: number, df: number, level: number): Maybe<TTest> {
  const reach = studentMultiplier(level, df);
  const t = difference / error;
  const p = studentP(t, df);
  if (isAbsence(reach)) return reach;
  if (isAbsence(p)) return p;
  return { t, degreesOfFreedom: df, p, interval: rangeAround(difference, reach * error) };
}

function refuseGroup({ mean, standardDeviation, size }: GroupSummary): Absence | undefined {
  return refuseInfinite({ mean }) ?? refuseNonPositive({ standardDeviation }) ?? refuseSize(size);
}

function refuseSize(size: number): Absence | undefined {
  const refusal = refuseCounts({ size });
  return refusal ?? (size < 2 ? absence('it takes two people in a group') : undefined);
}
