import type { Range } from '../model/index.ts';

/**
 * A range with so many decimals, rounded outwards so that nothing in it is
 * lost: 2.3912 to 2.4367 with 2 decimals is "2.39 to 2.44". It is "about 0.75"
 * where both ends look the same and "at least 3.2" where it has no upper end.
 */
export function rangeInWords({ low, high }: Range, decimals: number): string {
  const places = Math.min(Math.max(decimals, 0), 10);
  const [from, to] = [outwards(low, places, Math.floor), outwards(high, places, Math.ceil)];
  if (low === -Infinity && high === Infinity) return 'any number';
  if (low === -Infinity) return `at most ${to}`;
  if (high === Infinity) return `at least ${from}`;
  if (from !== to) return `${from} to ${to}`;
  return low === high ? from : `about ${from}`;
}

/** Rounds with `direction`, forgiving the last bits of a double: 2.39 stays 2.39. */
function outwards(value: number, places: number, direction: (value: number) => number): string {
  const scaled = value * 10 ** places;
  const nearest = Math.round(scaled);
  const whole = Math.abs(scaled - nearest) < 1e-7 ? nearest : direction(scaled);
  return (whole / 10 ** places).toFixed(places);
}

/**
 * How many decimals show the ends of a range apart with `digits` digits that
 * count: 0.7536 to 0.7571 needs 3 of them for "0.753 to 0.758".
 */
export function decimalsFor({ low, high }: Range, digits: number): number {
  const sizes = [low, high].filter((value) => value !== 0 && Number.isFinite(value));
  if (sizes.length === 0) return 0;
  const smallest = Math.min(...sizes.map(Math.abs));
  return Math.min(10, Math.max(0, digits - 1 - Math.floor(Math.log10(smallest))));
}

/** The p-value below which only "below 0.0001" is said, as statistics programs do. */
const SMALLEST_P = 0.0001;

/** A range of p-values with two digits that count, never more than four decimals. */
export function pRangeInWords({ low, high }: Range): string {
  if (high < SMALLEST_P) return 'below 0.0001';
  const within = { low: Math.max(0, low), high: Math.min(1, high) };
  if (low < SMALLEST_P) return `at most ${outwards(within.high, 4, Math.ceil)}`;
  return rangeInWords(within, Math.max(2, Math.min(4, decimalsFor(within, 2))));
}

/** A count with its noun: "1 result", "1,204 words". */
export function counted(count: number, noun: string, plural = `${noun}s`): string {
  return `${grouped(count)} ${count === 1 ? noun : plural}`;
}

/** 3412 as "3,412". */
export function grouped(count: number): string {
  return String(count).replace(/\B(?=(\d{3})+$)/g, ',');
}

/** "a", "a and b", "a, b and c". */
export function listed(items: readonly string[]): string {
  if (items.length < 2) return items.join('');
  return `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`;
}
