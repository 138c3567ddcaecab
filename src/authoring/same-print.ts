import type { Printed } from '../model/index.ts';
import { unrounded } from '../stats/rounding.ts';

/** Of the rounding range, so much is left off at both ends: 0.68 and 0.69 meet in 0.685 alone. */
const INSIDE = 1e-6;

/**
 * Whether two printed numbers may be one number, rounded to the same or to fewer digits:
 * "0.72" and "0.724" may, "0.72" and "0.73" may not, though both may come from 0.725.
 */
export function samePrint(one: Printed, other: Printed): boolean {
  const [first, second] = [unrounded(one), unrounded(other)];
  const margin = INSIDE * 10 ** -Math.max(one.decimals, other.decimals);
  return first.low + margin < second.high - margin && second.low + margin < first.high - margin;
}

/** How many digits of a number tell it from others: 3 for "1.05", 2 for "0.72", 1 for "0.9". */
export function tellingDigits({ plain }: Pick<Printed, 'plain'>): number {
  return plain.replace(/^[-+]?[0.]*/, '').replace('.', '').length;
}
