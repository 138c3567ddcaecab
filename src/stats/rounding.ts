import type { Printed, Range } from '../model/index.ts';

/**
 * Room for the binary representation of decimal fractions: a few units in the
 * last place of a double, far below any digit that is ever printed.
 */
const SLACK = 2 ** -48;

/**
 * Every value that could have been rounded to the number on the page.
 *
 * "0.72" stands for 0.715 to 0.725. Both ends are included because software
 * differs on halves: some rounds them up, some to the even digit.
 */
export function unrounded({ value, decimals }: Pick<Printed, 'value' | 'decimals'>): Range {
  if (!Number.isFinite(value)) return { low: value, high: value };
  const half = 0.5 * 10 ** -decimals;
  const slack = SLACK * (Math.abs(value) + half);
  return { low: value - half - slack, high: value + half + slack };
}
