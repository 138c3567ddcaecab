import type { Interval, Printed, Range, Result, Span } from '../model/index.ts';
import { unrounded } from '../stats/rounding.ts';

/** The spans of those numbers that are printed at all, in the order given. */
export function spansOf(numbers: readonly (Printed | undefined)[]): readonly Span[] {
  return numbers.flatMap((number) => (number === undefined ? [] : [number.span]));
}

/** A result's estimate, limits and p, as far as they are printed. */
export function numbersOf({ estimate, interval, p }: Result): readonly (Printed | undefined)[] {
  return [estimate, interval?.lower, interval?.upper, p?.printed];
}

/** Whether two ranges share a value. */
export function overlap(one: Range, other: Range): boolean {
  return one.low <= other.high && other.low <= one.high;
}

/** Whether a number that rounds to `printed` may be exactly `value`. "1.0" may be 1. */
export function mayBe(printed: Printed, value: number): boolean {
  return overlap(unrounded(printed), { low: value, high: value });
}

/**
 * Whether the limits can be those of a ratio: neither below zero, the lower not
 * above the upper. Rules that compute with limits ask this first and otherwise
 * keep silent, since limits-in-order has then said what there is to say.
 */
export function limitsInOrder({ lower, upper }: Interval): boolean {
  return lower.value >= 0 && upper.value >= 0 && unrounded(lower).low <= unrounded(upper).high;
}

/**
 * Whether the estimate, as far as rounding tells, lies between the limits. Rules
 * that compute with all three ask this first: see `limitsInOrder`.
 */
export function insideLimits(estimate: Printed, { lower, upper }: Interval): boolean {
  return overlap(unrounded(estimate), { low: unrounded(lower).low, high: unrounded(upper).high });
}

/** The ratio that means no difference between the groups. */
export const NO_EFFECT = 1;

/**
 * Where a ratio's interval lies with regard to 1. `undecided` is for limits that
 * may have been rounded from 1, as "1.00" may from 0.997 or from 1.004.
 */
export type SideOfOne = 'above' | 'below' | 'around' | 'undecided';

/** Where an interval lies with regard to 1: 1.05 to 2.41 lies above, 0.97 to 2.41 around. */
export function sideOfOne({ lower, upper }: Interval): SideOfOne {
  if (mayBe(lower, NO_EFFECT) || mayBe(upper, NO_EFFECT)) return 'undecided';
  if (lower.value > NO_EFFECT) return 'above';
  return upper.value < NO_EFFECT ? 'below' : 'around';
}

/** The level in percent that a reader takes an interval to have: 95 where none is printed. */
export function levelOf({ level = 95 }: Interval): number {
  return level;
}
