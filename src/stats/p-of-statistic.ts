import type { Range, TestResult } from '../model/index.ts';
import { absence, isAbsence, type Maybe } from './absence.ts';
import { chiSquareP } from './chi-square.ts';
import { fP } from './f-distribution.ts';
import { twoSidedP } from './normal.ts';
import { magnitudes } from './ranges.ts';
import { studentP } from './student-t.ts';

/** The statistics whose p-value is known from their value and degrees of freedom. */
export type Statistic = TestResult['statistic'];

/**
 * The p-values that a range of a test statistic can have: two-sided for z and t, the
 * upper tail for χ², F and Cochran's Q. "t(18) = 2.10", which stands for 2.095 to 2.105,
 * has p from 0.0496 to 0.0506. An open end, as of "F > 20", gives p down to 0.
 *
 * Degrees of freedom as printed: none for z, one for t, χ² and Q, two for F.
 */
export function pOfStatistic(
  statistic: Statistic,
  range: Range,
  degreesOfFreedom: readonly number[],
): Maybe<Range> {
  if (!(range.low <= range.high)) return absence('the range of the statistic is out of order');
  const twoSided = statistic === 'z' || statistic === 't';
  if (!twoSided && range.high < 0) return absence(`a ${statistic} statistic cannot be negative`);
  const sizes = twoSided ? magnitudes(range) : { low: Math.max(0, range.low), high: range.high };
  const most = pAt(statistic, sizes.low, degreesOfFreedom);
  const least = sizes.high === Infinity ? 0 : pAt(statistic, sizes.high, degreesOfFreedom);
  if (isAbsence(most)) return most;
  return isAbsence(least) ? least : { low: least, high: most };
}

function pAt(statistic: Statistic, size: number, dfs: readonly number[]): Maybe<number> {
  const due = DEGREES[statistic];
  if (dfs.length !== due) {
    return absence(`${statistic} has ${due} degrees of freedom to print, not ${dfs.length}`);
  }
  const [first = 1, second = 1] = dfs;
  switch (statistic) {
    case 'z':
      return twoSidedP(size);
    case 't':
      return studentP(size, first);
    case 'chi-square':
    case 'Q':
      return chiSquareP(size, first);
    case 'F':
      return fP(size, first, second);
    default:
      return statistic satisfies never;
  }
}

/** How many degrees of freedom go with each statistic. */
const DEGREES: Readonly<Record<Statistic, number>> = { z: 0, t: 1, 'chi-square': 1, Q: 1, F: 2 };
