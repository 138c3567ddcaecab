import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Maybe } from './absence.ts';
import { refuseCounts } from './admissible.ts';
import { multiplier } from './normal.ts';
import { studentP } from './student-t.ts';

/** Pearson's correlation put to the test. */
export interface CorrelationTest {
  readonly t: number;
  readonly degreesOfFreedom: number;
  readonly p: number;
  /** Fisher's, through artanh r with standard error 1/√(n − 3); absent for 3 pairs. */
  readonly interval: Maybe<Range>;
}

/**
 * The test of no correlation, t = r √((n − 2)/(1 − r²)), and Fisher's (1921) interval:
 * 0.3 among 50 has t = 2.18, p = 0.034, 0.024 to 0.534. Assumes two normal variables.
 */
export function correlationTest(r: number, pairs: number, level = 95): Maybe<CorrelationTest> {
  const refusal = refuseCounts({ pairs });
  if (refusal) return refusal;
  if (!(Math.abs(r) < 1)) return absence(`a correlation of ${r} is not strictly between −1 and 1`);
  if (pairs < 3) return absence('it takes three pairs');
  const reach = multiplier(level);
  if (isAbsence(reach)) return reach;
  const degreesOfFreedom = pairs - 2;
  const t = r * Math.sqrt(degreesOfFreedom / ((1 - r) * (1 + r)));
  const p = studentP(t, degreesOfFreedom);
  if (isAbsence(p)) return p;
  const half = reach / Math.sqrt(pairs - 3);
  const interval = pairs === 3
    ? absence('three pairs leave no interval')
    : { low: Math.tanh(Math.atanh(r) - half), high: Math.tanh(Math.atanh(r) + half) };
  return { t, degreesOfFreedom, p, interval };
}
