import type { Range } from '../model/index.ts';
import { decimalsFor, pRangeInWords, rangeInWords } from './numbers-in-words.ts';
import type { Worked, WorkedUnit } from './recomputation.ts';

/** More decimals than this tell a reader nothing. */
const MOST_DECIMALS = 6;

/**
 * A number to so many significant digits, without an exponent where it is of usual size:
 * 0.21196 with 4 is "0.2120", 2183.4 with 3 is "2183", 0.0000123 with 2 is "1.2e-5".
 */
export function significant(value: number, digits: number): string {
  if (value === 0 || !Number.isFinite(value)) return value === 0 ? '0' : signedInfinity(value);
  const size = Math.abs(value);
  if (size < 1e-4 || size >= HUGE) return shortExponent(value.toExponential(digits - 1));
  return value.toFixed(Math.min(MOST_DECIMALS + 2, decimalsFor({ low: size, high: size }, digits)));
}

function signedInfinity(value: number): string {
  return value > 0 ? '∞' : '-∞';
}

/** A worked-out value in words: "1.76 (95% CI 1.01 to 3.06)", "0.2081 to 0.2158". */
export function workedInWords({ value, interval, unit }: Worked): string {
  if (interval !== undefined) return withInterval(value, interval.limits, interval.level, unit);
  return value === undefined ? '' : valueInWords(value, unit);
}

/** A range rounded outwards, or one number where it is exact, in the terms of its unit. */
export function valueInWords(range: Range, unit: WorkedUnit): string {
  switch (unit) {
    case 'probability': return probabilityInWords(range);
    case 'share': return asPercent(numberInWords(inPercent(range), 1));
    case 'percent': return asPercent(numberInWords(range, 0));
    case 'number': return numberInWords(range, 0);
    default: return unit satisfies never;
  }
}

/**
 * A p-value with two significant digits; below 0.0001 by its power of ten, rounded outwards:
 * "0.029", "0.025 to 0.033", "2.1e-7 to 3.4e-7", "below 1e-300".
 */
export function probabilityInWords({ low, high }: Range): string {
  if (high < 1e-300) return 'below 1e-300';
  if (low === high) return high < 1e-4 ? significant(high, 2) : exactP(high);
  if (low < 1e-4 && high >= 1) return 'any';
  if (high >= 1e-4) return pRangeInWords({ low, high });
  const [from, to] = [powered(low, Math.floor), powered(high, Math.ceil)];
  return low < 1e-300 ? `at most ${to}` : `${from} to ${to}`;
}

/** Two digits that count, and never "1.0" for what is below 1: 0.97, 0.9996. */
function exactP(p: number): string {
  const decimals = Math.max(2, decimalsFor({ low: p, high: p }, 2));
  const words = p.toFixed(decimals);
  return Number(words) === 1 && p < 1 ? p.toFixed(4) : words;
}

function powered(value: number, direction: (value: number) => number): string {
  if (value === 0) return '0';
  const power = Math.floor(Math.log10(value));
  const mantissa = direction((value / 10 ** power) * 10) / 10;
  return mantissa === 10 ? `1e${power + 1}` : `${mantissa}e${power}`;
}

function numberInWords(range: Range, fewest: number): string {
  const { low, high } = range;
  if (low === high) return withDecimals(low, Math.max(fewest, decimalsFor(range, 3)));
  const isHuge = low > 0 && high >= HUGE && Number.isFinite(high);
  if (isHuge) return `${powered(low, Math.floor)} to ${powered(high, Math.ceil)}`;
  return rangeInWords(range, Math.max(fewest, decimalsOfWidth(range)));
}

/** From here on numbers are told by their power of ten. */
const HUGE = 1e7;

/** A width of 0.1 must not become 0.09999999. */
const A_HAIR = 1e-6;

/** Enough decimals to show the width of a range with two digits: 2 for 2.14 to 2.24. */
function decimalsOfWidth(range: Range): number {
  const width = range.high - range.low;
  if (!Number.isFinite(width)) return Math.min(MOST_DECIMALS, decimalsFor(range, 3));
  return Math.min(MOST_DECIMALS, Math.max(0, Math.ceil(-Math.log10(width) - A_HAIR) + 1));
}

function withInterval(
  value: Range | undefined, limits: Range, level: number, unit: WorkedUnit,
): string {
  const scaled = unit === 'share' ? inPercent(limits) : limits;
  const usual = decimalsOfLimits(scaled, unit);
  const decimals = unit === 'number' && hidesOne(scaled, usual) ? usual + 1 : usual;
  const mark = unit === 'share' ? '%' : '';
  const said = (number: number): string => `${withDecimals(number, decimals)}${mark}`;
  const ends = `${level}% CI ${said(scaled.low)} to ${said(scaled.high)}`;
  if (value === undefined) return ends;
  return `${said(unit === 'share' ? value.low * 100 : value.low)} (${ends})`;
}

/** Whether a limit on one side of 1 would be shown as 1: 1.003 needs its third decimal. */
function hidesOne({ low, high }: Range, decimals: number): boolean {
  return [low, high].some((limit) => limit !== 1 && Number(limit.toFixed(decimals)) === 1);
}

function decimalsOfLimits({ low, high }: Range, unit: WorkedUnit): number {
  const width = high - low;
  const usual = Number.isFinite(width) && width > 0 ? Math.ceil(-Math.log10(width)) + 2 : 2;
  return unit === 'share'
    ? Math.min(MOST_DECIMALS, Math.max(1, usual - 1))
    : Math.min(MOST_DECIMALS, Math.max(1, usual, low > 0 ? decimalsFor({ low, high: low }, 2) : 0));
}

/** Large numbers need no decimals, and no zero has a sign: "24373", "0.00". */
function withDecimals(value: number, decimals: number): string {
  if (!Number.isFinite(value)) return signedInfinity(value);
  if (Math.abs(value) >= HUGE) return shortExponent(value.toExponential(2));
  const words = value.toFixed(Math.abs(value) >= 1000 ? 0 : decimals);
  return /^-0\.?0*$/.test(words) ? words.slice(1) : words;
}

function shortExponent(words: string): string {
  return words.replace('e+', 'e');
}

function inPercent({ low, high }: Range): Range {
  return { low: low * 100, high: high * 100 };
}

/** "12.1 to 13.4" as "12.1% to 13.4%". */
function asPercent(words: string): string {
  return words.replace(/\d+(\.\d+)?/g, '$&%');
}
