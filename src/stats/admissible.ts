import { absence, type Absence } from './absence.ts';

/*
 * What arguments make sense: each function answers nothing where they do, and
 * the reason where they do not. Every public function of counts, distributions
 * and models asks these first, so that NaN and nonsense never get further.
 */

/** Arguments by the names that a reader knows them by: `{ events: 45, total: 120 }`. */
export type Named = Readonly<Record<string, number>>;

/** The largest count that is worked with, more than there are people. */
export const LARGEST_COUNT = 1e10;

/** Refuses what is not a whole number from 0 to 1e10: −1, 2.5, NaN, ∞. */
export function refuseCounts(counts: Named): Absence | undefined {
  return refuse(counts, isCount, 'is not a count');
}

/** Refuses what is not a finite number above 0; beyond 1e±300 arithmetic has no room left. */
export function refuseNonPositive(numbers: Named): Absence | undefined {
  return refuse(numbers, (x) => x >= 1e-300 && x <= 1e300, 'is not a finite number above 0');
}

/** Refuses negative numbers, NaN and ∞. */
export function refuseNegative(numbers: Named): Absence | undefined {
  return refuse(numbers, (x) => x >= 0 && x < Infinity, 'is not a finite number of at least 0');
}

/** Refuses NaN, ∞ and what is so large, above 1e150, that its square has no place. */
export function refuseUnsquarable(numbers: Named): Absence | undefined {
  return refuse(numbers, (x) => Math.abs(x) <= 1e150, 'is not a number up to 1e150');
}

/** Refuses NaN and ∞. */
export function refuseInfinite(numbers: Named): Absence | undefined {
  return refuse(numbers, Number.isFinite, 'is not a finite number');
}

/** Refuses what is not a share from 0 to 1, both included. */
export function refuseShares(shares: Named): Absence | undefined {
  return refuse(shares, (p) => p >= 0 && p <= 1, 'is not between 0 and 1');
}

/** Refuses what is not strictly between 0 (1e-300) and 1, as a risk with odds both ways is. */
export function refuseClosedShares(shares: Named): Absence | undefined {
  return refuse(shares, (p) => p >= 1e-300 && p < 1, 'is not strictly between 0 and 1');
}

/** Refuses a level of confidence outside 50% to 100%, or so near 100% that nothing is left. */
export function refuseLevel(level: number): Absence | undefined {
  if (level >= 50 && level < 100) return undefined;
  return absence(`a level of ${level}% is not between 50% and 100%`);
}

/** Refuses a part that is larger than its whole: 13 of 12. */
export function refuseExcess(part: number, whole: number, names: string): Absence | undefined {
  if (part <= whole) return undefined;
  return absence(`${part} of ${whole} is not possible for ${names}`);
}

function isCount(n: number): boolean {
  return Number.isInteger(n) && n >= 0 && n <= LARGEST_COUNT;
}

function refuse(
  numbers: Named,
  fits: (x: number) => boolean,
  complaint: string,
): Absence | undefined {
  const misfit = Object.entries(numbers).find(([, x]) => !fits(x));
  return misfit && absence(`${misfit[0]} (${misfit[1]}) ${complaint}`);
}
