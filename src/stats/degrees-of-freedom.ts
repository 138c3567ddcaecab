import { absence, type Absence } from './absence.ts';
import type { Named } from './admissible.ts';

/** The fewest degrees of freedom for which tails are worked out; no test has fewer than 1. */
export const FEWEST_DEGREES_OF_FREEDOM = 0.01;

/** The most degrees of freedom for which tails are worked out; the work grows as their root. */
export const MOST_DEGREES_OF_FREEDOM = 1e9;

/**
 * Refuses degrees of freedom below 0.01 and beyond a thousand million. They need not be
 * whole: Welch's are not.
 */
export function refuseDegreesOfFreedom(degrees: Named): Absence | undefined {
  const misfit = Object.entries(degrees)
    .find(([, df]) => !(df >= FEWEST_DEGREES_OF_FREEDOM && df <= MOST_DEGREES_OF_FREEDOM));
  return misfit && absence(`${misfit[0]} (${misfit[1]}) is not between 0.01 and 1e9`);
}
