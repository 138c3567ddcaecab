import { gammaTails } from './incomplete-gamma.ts';

/** A χ² statistic with its degrees of freedom and its p-value, the upper tail. */
export interface ChiSquareTest {
  readonly chiSquare: number;
  readonly degreesOfFreedom: number;
  readonly p: number;
}

/**
 * A statistic worked out here, with its p-value: 25.01388 on 1 has 5.69e-7.
 * `chiSquareP` is for statistics that come from outside and may be nonsense.
 */
export function chiSquareTest(chiSquare: number, degreesOfFreedom: number): ChiSquareTest {
  const { upper } = gammaTails(degreesOfFreedom / 2, chiSquare / 2);
  return { chiSquare, degreesOfFreedom, p: upper };
}
