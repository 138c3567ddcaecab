import { absence, type Maybe } from './absence.ts';

/**
 * The two-sided p by Altman & Bland's formula for pocket calculators (BMJ 2011;343:d2304),
 * exp(−0.717 z − 0.416 z²): z = 1.96 gives 0.0496 where the exact value is 0.0500. To
 * show by the side of the exact one; nothing is decided by it.
 */
export function altmanBlandP(z: number): Maybe<number> {
  if (!(z >= 0 && z < Infinity)) return absence(`a z of ${z} is not zero or a positive number`);
  return Math.exp(-0.717 * z - 0.416 * z * z);
}

/**
 * The z of a two-sided p by their other formula (BMJ 2011;343:d2090),
 * −0.862 + √(0.743 − 2.404 ln p): p = 0.032 gives 2.141 where the exact value is 2.144.
 */
export function altmanBlandZ(p: number): Maybe<number> {
  if (!(p > 0 && p <= 1)) return absence(`a p-value of ${p} is not above 0 and at most 1`);
  return -0.862 + Math.sqrt(0.743 - 2.404 * Math.log(p));
}
