import { isAbsence } from './absence.ts';
import { isFeasible } from './feasible-region.ts';
import { stripsOf, usualReading, type ReportedNumbers } from './reported-numbers.ts';

/** How the intervals of one table were made, judged by all its rows together. */
export interface TableIntervals {
  /** `not Wald` where more than half the rows are not symmetric on the log scale. */
  readonly made: 'Wald' | 'not Wald';
  /** The share of rows with estimate and limits that are not symmetric within rounding. */
  readonly asymmetric: number;
  /** The rows, counted from 0, that are not symmetric. */
  readonly rows: readonly number[];
}

/**
 * Judges the intervals of a table as a whole. Where most rows are lopsided the
 * authors used another kind of interval (profile-likelihood, exact, bootstrap), and a lopsided
 * row is no finding; where all but one are symmetric, that one is.
 * Nothing for a table without a row that can be judged.
 */
export function tableIntervals(rows: readonly ReportedNumbers[]): TableIntervals | undefined {
  const judged = rows.flatMap((row, i) => {
    const symmetric = isSymmetric(row);
    return symmetric === undefined ? [] : [{ i, symmetric }];
  });
  if (judged.length === 0) return undefined;
  const failing = judged.filter(({ symmetric }) => !symmetric).map(({ i }) => i);
  const asymmetric = failing.length / judged.length;
  return { made: asymmetric > 0.5 ? 'not Wald' : 'Wald', asymmetric, rows: failing };
}

/** Whether estimate and limits agree by Wald's method; nothing where one is missing. */
export function isSymmetric(numbers: ReportedNumbers): boolean | undefined {
  const { estimate, lower, upper, level } = numbers;
  if (estimate === undefined || lower === undefined || upper === undefined) return undefined;
  const alone = { estimate, lower, upper, ...(level === undefined ? {} : { level }) };
  const strips = stripsOf(alone, usualReading(alone, 'log'));
  return isAbsence(strips) || strips.length < 3 ? undefined : isFeasible(strips);
}
