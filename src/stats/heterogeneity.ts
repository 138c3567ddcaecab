import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Maybe } from './absence.ts';
import { refuseCounts, refuseNegative } from './admissible.ts';
import { chiSquareP } from './chi-square.ts';

/** What Cochran's Q says of how much studies differ. */
export interface Heterogeneity {
  readonly degreesOfFreedom: number;
  readonly p: number;
  /** max(0, (Q − df)/Q), in percent. */
  readonly iSquared: number;
  /** Q/df; below 1 where the studies are more alike than chance makes them. */
  readonly hSquared: number;
}

/**
 * Heterogeneity from Q and the number of studies: 152.233 among 13 gives I² = 92.1%,
 * H² = 12.7. Source: Higgins & Thompson (2002). An I² from a REML estimate of τ² differs.
 */
export function heterogeneityOfQ(q: number, studies: number): Maybe<Heterogeneity> {
  const refusal = refuseNegative({ Q: q }) ?? refuseCounts({ studies });
  if (refusal) return refusal;
  if (studies < 2) return absence('it takes two studies');
  const degreesOfFreedom = studies - 1;
  const p = chiSquareP(q, degreesOfFreedom);
  if (isAbsence(p)) return p;
  return {
    degreesOfFreedom,
    p,
    iSquared: iSquared(q, degreesOfFreedom),
    hSquared: q / degreesOfFreedom,
  };
}

/**
 * I², H² and p over the range that a printed Q stands for, I² in percent: Q of 10.15 to
 * 10.25 among 6 studies gives 50.7 to 51.2.
 */
export function heterogeneityOfRange(
  q: Range,
  studies: number,
): Maybe<{ readonly iSquared: Range; readonly hSquared: Range; readonly p: Range }> {
  const low = heterogeneityOfQ(Math.max(0, q.low), studies);
  const high = heterogeneityOfQ(q.high, studies);
  if (isAbsence(low)) return low;
  if (isAbsence(high)) return high;
  if (!(q.low <= q.high)) return absence('the range of Q is out of order');
  return {
    iSquared: { low: low.iSquared, high: high.iSquared },
    hSquared: { low: low.hSquared, high: high.hSquared },
    p: { low: high.p, high: low.p },
  };
}

function iSquared(q: number, df: number): number {
  return q <= df ? 0 : (100 * (q - df)) / q;
}
