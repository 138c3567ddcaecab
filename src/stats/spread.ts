import type { Range } from '../model/index.ts';

/**
 * The values of a function of two numbers over two ranges, when it moves one way in
 * each of them while the other is held: its ends then lie at the four corners. x − y
 * over 1 to 2 and 0 to 5 is −4 to 2.
 */
export function spreadOverCorners(
  one: Range,
  other: Range,
  of: (x: number, y: number) => number,
): Range {
  const corners = [
    of(one.low, other.low), of(one.low, other.high),
    of(one.high, other.low), of(one.high, other.high),
  ];
  return { low: Math.min(...corners), high: Math.max(...corners) };
}

/** What lies within `half` of a value on both sides: 5 and 2 give 3 to 7. */
export function rangeAround(value: number, half: number): Range {
  return { low: value - half, high: value + half };
}

/** Both ends of a range over a positive number. */
export function dividedBy({ low, high }: Range, divisor: number): Range {
  return { low: low / divisor, high: high / divisor };
}
