import { absence, isAbsence, type Absence, type Maybe } from './absence.ts';
import { refuseNonPositive } from './admissible.ts';
import { multiplier, zOfUpperTail } from './normal.ts';

/**
 * The ratio of the standard error implied by an interval at its stated level to the
 * true one, where the interval has in truth another level: 90% limits called 95% give
 * 0.8392. The signature by which a mistaken level shows beside a p-value.
 */
export function levelSignature(actual: number, stated: number): Maybe<number> {
  const reached = multiplier(actual);
  if (isAbsence(reached)) return reached;
  return multiplierSignature(reached, stated);
}

/** The same for an interval made with a multiplier: 1 called 95% gives 0.5102, 2 gives 1.0204. */
export function multiplierSignature(reached: number, stated: number): Maybe<number> {
  const assumed = multiplier(stated);
  if (isAbsence(assumed)) return assumed;
  return refuseNonPositive({ multiplier: reached }) ?? reached / assumed;
}

/** What a correction for several tests does to one p-value and to the level of an interval. */
export interface Multiplicity {
  readonly bonferroni: number;
  readonly sidak: number;
  /** The level, in percent, of each interval when all together shall have 95%. */
  readonly level: number;
  readonly multiplier: number;
}

/**
 * Bonferroni's and Šidák's corrections of a p-value for so many tests, with Bonferroni's
 * level for intervals: p = 0.019 and 3 tests give 0.057, 0.0559, and 98.33%.
 */
export function multiplicity(p: number, tests: number): Maybe<Multiplicity> {
  const refusal = refuseTests(p, tests);
  if (refusal) return refusal;
  return {
    bonferroni: Math.min(1, p * tests),
    sidak: -Math.expm1(tests * Math.log1p(-p)),
    level: 100 - 5 / tests,
    multiplier: zOfUpperTail(0.025 / tests),
  };
}

function refuseTests(p: number, tests: number): Absence | undefined {
  if (!(p >= 0 && p <= 1)) return absence(`${p} is not a probability`);
  if (Number.isInteger(tests) && tests >= 1) return undefined;
  return absence(`${tests} is no number of tests`);
}
