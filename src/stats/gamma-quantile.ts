import { gammaTails } from './incomplete-gamma.ts';
import { quantile } from './normal.ts';
import { positiveQuantile } from './positive-root.ts';

/**
 * The x at which the incomplete gamma P(a, x) is `lower`, strictly between 0 and
 * 1. Starts from Wilson & Hilferty's (1931) cube. P(1, x) = 0.5 at x = ln 2.
 */
export function gammaQuantile(lower: number, a: number): number {
  const cube = (1 - 1 / (9 * a) + quantile(lower) / (3 * Math.sqrt(a))) ** 3;
  const near = a * Math.max(cube, 1e-6);
  return positiveQuantile((x) => gammaTails(a, x), lower, near);
}
