import type { Interval, Printed, Range } from '../model/index.ts';
import type { Agreement } from '../stats/agreement.ts';
import { isAbsence } from '../stats/absence.ts';
import type { OthersImply } from '../stats/implied.ts';
import { multiplier } from '../stats/normal.ts';
import { levelOf } from './printed-numbers.ts';

/** Text on one line, with single spaces. */
export function flowing(text: string): string {
  return text.replace(/\s+/g, ' ').trim();
}

/** The numbers of a printed interval as a reader would write them: "1.05 to 2.41". */
export function limitsInWords({ lower, upper }: Interval): string {
  return `${lower.plain} to ${upper.plain}`;
}

/** More decimals than this tell a reader nothing. */
const MOST_DECIMALS = 6;

/** How many standard errors an interval of this level reaches to each side: "1.960" at 95%. */
export function multiplierInWords(interval: Interval): string {
  const reach = multiplier(levelOf(interval));
  return isAbsence(reach) ? `z of ${levelOf(interval)}%` : fixed(reach, 3);
}

/**
 * A range with a given number of decimals, rounded outwards so that nothing in
 * it is lost: 2.3912 to 2.4367 with 2 decimals is "2.39 to 2.44".
 */
export function rangeInWords({ low, high }: Range, decimals: number): string {
  const places = Math.min(Math.max(decimals, 0), MOST_DECIMALS);
  const down = roundOutwards(low, places, Math.floor);
  const up = roundOutwards(high, places, Math.ceil);
  return down === up ? down : `${down} to ${up}`;
}

/** A number with so many decimals, within what can be shown: 2.7124 with 2 is "2.71". */
export function fixed(value: number, decimals: number): string {
  return value.toFixed(Math.min(Math.max(decimals, 0), MOST_DECIMALS));
}

/** Rounds with `direction`, forgiving the last bits of a double: 2.39 stays 2.39. */
function roundOutwards(
  value: number,
  decimals: number,
  direction: (value: number) => number,
): string {
  if (!Number.isFinite(value)) return value > 0 ? '∞' : '−∞';
  const scaled = value * 10 ** decimals;
  const nearest = Math.round(scaled);
  const whole = Math.abs(scaled - nearest) < 1e-7 ? nearest : direction(scaled);
  return (whole / 10 ** decimals).toFixed(decimals);
}

/** The p-value below which programs print only "<0.0001". */
const SMALLEST_SHOWN_P = 0.0001;

/**
 * A range of p-values with two significant digits, rounded outwards:
 * "0.036 to 0.054", "at most 0.0005", "below 0.0001".
 */
export function pInWords({ low, high }: Range): string {
  const largest = Math.min(1, high);
  if (largest < SMALLEST_SHOWN_P) return 'below 0.0001';
  return low < SMALLEST_SHOWN_P
    ? `at most ${roundOutwards(largest, decimalsOfP(largest), Math.ceil)}`
    : rangeInWords({ low, high: largest }, decimalsOfP(low));
}

/** Two significant digits of a p-value: 2 decimals for 0.22, 3 for 0.036, at most 4, 0 for 1. */
function decimalsOfP(p: number): number {
  return p >= 1 ? 0 : Math.min(4, Math.max(2, Math.ceil(-Math.log10(p)) + 1));
}

/** What each printed number is called in a sentence. */
const NAMES: Readonly<Partial<Record<OthersImply['of'], string>>> = {
  estimate: 'estimate',
  lower: 'lower limit',
  upper: 'upper limit',
  p: 'p',
};

/**
 * For each printed number that alone stands against the others, what these imply by
 * the standard method: "the other numbers imply an upper limit of 0.88 to 0.91".
 */
export function othersInWords(
  found: Agreement,
  { estimate, interval }: { readonly estimate: Printed; readonly interval: Interval },
): readonly string[] {
  if (found.outcome !== 'neither') return [];
  const decimals = Math.max(estimate.decimals, interval.lower.decimals, interval.upper.decimals);
  return found.othersImply.flatMap(({ of, strict }) => {
    const name = NAMES[of];
    if (name === undefined || strict === undefined) return [];
    const words = of === 'p' ? pInWords(strict) : rangeInWords(strict, decimals);
    return [`the other numbers imply ${/^[aeiou]/.test(name) ? 'an' : 'a'} ${name} of ${words}`];
  });
}

/** A share as a percentage with at most one decimal: 0.345 is "34.5%", 0.4 is "40%". */
export function percentInWords(share: number): string {
  return `${Number((share * 100).toFixed(1))}%`;
}
