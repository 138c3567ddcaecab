import { isAbsence, type Maybe } from './absence.ts';
import type { Reading } from './reported-numbers.ts';
import { studentMultiplier, studentQuantile } from './student-t.ts';

/** Which of the printed numbers were made with Student's t. */
export type StudentPart = 'interval and p' | 'p';

/** Degrees of freedom that are tried first; below 5 few report, beyond 300 t is normal. */
const STEPS = [5, 6, 8, 10, 13, 17, 22, 30, 40, 55, 75, 100, 150, 200, 300] as const;

/**
 * The least and most degrees of freedom, from 5 to 300, at which reading the
 * p-value, or interval and p, by t satisfies the test; nothing where none does.
 */
export function reconcilingDegrees(
  part: StudentPart,
  usual: Reading,
  fits: (reading: Reading) => boolean,
): { readonly least: number; readonly most: number } | undefined {
  const holds = (degrees: number) => fits(studentReading(part, usual, degrees));
  const fitting = STEPS.map(holds);
  const first = fitting.indexOf(true);
  const last = fitting.lastIndexOf(true);
  if (first < 0) return undefined;
  return {
    least: edge(STEPS[first] as number, STEPS[first - 1] ?? (STEPS[first] as number), holds),
    most: edge(STEPS[last] as number, STEPS[last + 1] ?? (STEPS[last] as number), holds),
  };
}

/** The last whole number on the way from one that holds to one that does not. */
function edge(inside: number, outside: number, holds: (degrees: number) => boolean): number {
  let [good, bad] = [inside, outside];
  while (Math.abs(good - bad) > 1) {
    const middle = Math.round((good + bad) / 2);
    if (holds(middle)) good = middle;
    else bad = middle;
  }
  return good;
}

/** The usual reading with t in place of the normal distribution for one part or both. */
export function studentReading(part: StudentPart, usual: Reading, degrees: number): Reading {
  const multiplierOf = (level: number) => studentMultiplier(level, degrees);
  const statisticOf = (upper: number) => studentStatistic(upper, degrees);
  return {
    ...usual,
    ...(part === 'p' ? {} : { multiplierOf }),
    statisticOf,
  };
}

/** Quantiles go no further out; t plays no part in p-values that small. */
const SMALLEST_TAIL = 1e-300;

function studentStatistic(upper: number, degrees: number): number {
  if (upper <= 0) return Infinity;
  if (upper >= 1) return -Infinity;
  return orThrow(studentQuantile(Math.max(upper, SMALLEST_TAIL), degrees));
}

function orThrow(answer: Maybe<number>): number {
  if (isAbsence(answer)) throw new RangeError(answer.because);
  return answer;
}
