import { absence, type Maybe } from './absence.ts';
import { refuseCounts } from './admissible.ts';
import { chiSquareTest, type ChiSquareTest } from './chi-square-test.ts';

/**
 * The χ² test that last digits 0 to 9 are equally common, on 9 degrees of freedom, from
 * how often each occurs. Only for 100 or more raw measurements with spare precision:
 * honest instruments are read to the nearest 5 or 10, and digits of ratios, percentages
 * and p-values are not uniform. Never evidence by itself. Source: Mosimann et al. (1995).
 */
export function terminalDigitTest(counts: readonly number[]): Maybe<ChiSquareTest> {
  if (counts.length !== 10) return absence('there are ten digits');
  const refusal = counts.map((count) => refuseCounts({ count })).find((refused) => refused);
  if (refusal) return refusal;
  const total = counts.reduce((so, count) => so + count, 0);
  if (total === 0) return absence('there are no digits');
  const due = total / 10;
  return chiSquareTest(counts.reduce((so, count) => so + (count - due) ** 2 / due, 0), 9);
}

/**
 * How often Benford's law expects a first digit from 1 to 9: log₁₀(1 + 1/d), 0.301 for 1.
 * For quantities over several powers of ten; ratios of odds or hazards span about one.
 */
export function benfordShare(digit: number): Maybe<number> {
  if (!(Number.isInteger(digit) && digit >= 1 && digit <= 9)) {
    return absence('a first digit is 1 to 9');
  }
  return Math.log1p(1 / digit) / Math.LN10;
}
