import type { Range } from '../model/index.ts';

/** The range from `low` to `high`, or nothing where they are out of order or not numbers. */
export function rangeBetween(low: number, high: number): Range | undefined {
  return low <= high ? { low, high } : undefined;
}

/** What two ranges share; nothing where they do not meet. [1, 3] and [2, 5] share [2, 3]. */
export function shared(one: Range, other: Range): Range | undefined {
  return rangeBetween(Math.max(one.low, other.low), Math.min(one.high, other.high));
}

/** Whether two ranges have a value in common. Ranges that only touch do. */
export function meet(one: Range, other: Range): boolean {
  return shared(one, other) !== undefined;
}

/** Whether a value lies in a range, its ends included. */
export function includes(range: Range, value: number): boolean {
  return range.low <= value && value <= range.high;
}

/** The smallest range that holds both. */
export function hull(one: Range, other: Range): Range {
  return { low: Math.min(one.low, other.low), high: Math.max(one.high, other.high) };
}

/** The same range about 0 with its sign turned: [1, 2] becomes [−2, −1]. */
export function negated({ low, high }: Range): Range {
  return { low: -high, high: -low };
}

/** Moves both ends by the same amount. */
export function shifted({ low, high }: Range, by: number): Range {
  return { low: low + by, high: high + by };
}

/**
 * The natural logarithms of a range. A part at or below zero has none: [−0.005, 0.005]
 * becomes everything up to ln 0.005, and a range wholly below zero becomes nothing.
 */
export function logarithms({ low, high }: Range): Range | undefined {
  if (!(high > 0)) return undefined;
  return { low: low > 0 ? Math.log(low) : -Infinity, high: Math.log(high) };
}

/** The values whose natural logarithms fill the range. */
export function exponentials({ low, high }: Range): Range {
  return { low: Math.exp(low), high: Math.exp(high) };
}

/** The range of the distances from 0: [−3, 2] becomes [0, 3]. */
export function magnitudes({ low, high }: Range): Range {
  const far = Math.max(Math.abs(low), Math.abs(high));
  return { low: low <= 0 && high >= 0 ? 0 : Math.min(Math.abs(low), Math.abs(high)), high: far };
}

/** The values of a rising function over a range. */
export function rising(range: Range, of: (value: number) => number): Range {
  return { low: of(range.low), high: of(range.high) };
}

/** The values of a falling function over a range. */
export function falling(range: Range, of: (value: number) => number): Range {
  return { low: of(range.high), high: of(range.low) };
}
