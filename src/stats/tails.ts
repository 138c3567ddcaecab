/**
 * The probabilities below and above a value of a continuous quantity. Both are
 * kept because the smaller one would lose its digits if taken from 1: at t = 20
 * on 30 degrees of freedom the upper one is 3.4e-19.
 */
export interface Tails {
  readonly lower: number;
  readonly upper: number;
}

/** The same tails seen from the other side. */
export function swapped({ lower, upper }: Tails): Tails {
  return { lower: upper, upper: lower };
}

/** Tails of which the lower one is known with all its digits. */
export function fromLower(lower: number): Tails {
  const share = Math.min(1, lower);
  return { lower: share, upper: 1 - share };
}

/**
 * The probabilities of a count: up to and including a value, from it upwards, and
 * the value itself. The first two overlap in the third.
 */
export interface CountTails {
  readonly atMost: number;
  readonly atLeast: number;
  readonly exactly: number;
}
