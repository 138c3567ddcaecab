import { isAbsence, type Maybe } from './absence.ts';
import { refuseNonPositive } from './admissible.ts';
import { multiplier, twoSidedP } from './normal.ts';

/** What it means for two intervals of independent estimates to touch. */
export interface TouchingIntervals {
  /** Of the difference between the two estimates, when their intervals just touch. */
  readonly z: number;
  readonly p: number;
  /** The z when bars of one standard error just touch. */
  readonly zOfBars: number;
}

/**
 * The test of two estimates whose intervals just touch. With equal standard errors at
 * 95% it has z = 2.77, p = 0.0056: intervals that overlap a little may still differ.
 * Source: Schenker & Gentleman (2001). Assumes independent normal estimates.
 */
export function touchingIntervals(
  ratioOfStandardErrors: number,
  level = 95,
): Maybe<TouchingIntervals> {
  const refusal = refuseNonPositive({ ratioOfStandardErrors });
  if (refusal) return refusal;
  const reach = multiplier(level);
  if (isAbsence(reach)) return reach;
  const zOfBars = (1 + ratioOfStandardErrors) / Math.hypot(1, ratioOfStandardErrors);
  return { z: reach * zOfBars, p: twoSidedP(reach * zOfBars), zOfBars };
}
