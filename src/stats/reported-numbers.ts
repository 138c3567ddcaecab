import type { Range, Relation } from '../model/index.ts';
import { absence, isAbsence, type Maybe } from './absence.ts';
import { multiplier, zOfUpperTail } from './normal.ts';
import { falling, logarithms, rising, shifted } from './ranges.ts';
import {
  isPrintedValue, probabilitiesBehind, valuesBehind, type PrintedValue, type Rounding,
} from './rounding.ts';
import type { Quantity, Strip } from './strip.ts';

/** A p-value as printed: "= 0.03", "< 0.001", with whether the text calls it one-sided. */
export interface ReportedP extends PrintedValue {
  readonly relation: Relation;
  readonly oneSided?: boolean;
}

/**
 * The numbers printed of one result, each absent where it is not printed. Taken
 * as they stand: a hazard ratio 0.72 with limits 0.58 and 0.90 has the estimate 0.72.
 */
export interface ReportedNumbers {
  readonly estimate?: PrintedValue;
  readonly lower?: PrintedValue;
  readonly upper?: PrintedValue;
  /** In percent; 95 is assumed where the text states none. */
  readonly level?: number;
  readonly p?: ReportedP;
  /** The regression coefficient: the log of a ratio, or a difference itself. */
  readonly coefficient?: PrintedValue;
  /** The standard error of the coefficient. */
  readonly standardError?: PrintedValue;
  /** Coefficient over standard error, with its sign. */
  readonly z?: PrintedValue;
  /** The Wald statistic, (coefficient / standard error)². */
  readonly wald?: PrintedValue;
}

/** The scale on which the interval is symmetric; no effect lies at ratio 1 or difference 0. */
export type Scale = 'log' | 'ratio as it is' | 'difference';

/** How the printed numbers are read: the assumptions under which they become strips. */
export interface Reading {
  readonly level: number;
  readonly oneSided: boolean;
  readonly rounding: Rounding;
  readonly scale: Scale;
  /** Multiplies the implied p before it is compared: a Bonferroni correction for so many tests. */
  readonly tests: number;
  /** What an interval of a level reaches in standard errors; normal unless said. */
  readonly multiplierOf: (level: number) => Maybe<number>;
  /** The statistic with the given upper tail; normal unless said. */
  readonly statisticOf: (upperTail: number) => number;
}

/** The usual reading: 95% unless said, two-sided, rounded to nearest, normal, one test. */
export function usualReading({ level, p }: ReportedNumbers, scale: Scale): Reading {
  return {
    level: level ?? 95,
    oneSided: p?.oneSided ?? false,
    rounding: 'to nearest',
    scale,
    tests: 1,
    multiplierOf: multiplier,
    statisticOf: zOfUpperTail,
  };
}

/** The strips of all printed numbers under a reading, or why one of them has none. */
export function stripsOf(numbers: ReportedNumbers, reading: Reading): Maybe<readonly Strip[]> {
  const reach = reading.multiplierOf(reading.level);
  if (isAbsence(reach)) return reach;
  const strips: Strip[] = [];
  const attempts: readonly Maybe<Strip | undefined>[] = [
    positionStrip('estimate', numbers.estimate, reading),
    positionStrip('coefficient', numbers.coefficient, { ...reading, scale: 'difference' }),
    limitStrip('lower', numbers.lower, -reach, reading),
    limitStrip('upper', numbers.upper, reach, reading),
    spreadStrip(numbers.standardError, reading),
    zStrip(numbers.z, reading),
    waldStrip(numbers.wald, reading),
    pStrip(numbers.p, reading),
  ];
  for (const strip of attempts) {
    if (isAbsence(strip)) return strip;
    if (strip !== undefined) strips.push(strip);
  }
  return strips;
}

/** The range behind a printed number on the scale of the reading, no effect at 0. */
export function onScale(range: Range, scale: Scale): Range | undefined {
  switch (scale) {
    case 'log':
      return logarithms(range);
    case 'ratio as it is':
      return shifted(range, -1);
    case 'difference':
      return range;
    default:
      return scale satisfies never;
  }
}

function positionStrip(
  of: Quantity,
  printed: PrintedValue | undefined,
  reading: Reading,
): Maybe<Strip | undefined> {
  const range = rangeRead(of, printed, reading);
  return range === undefined || isAbsence(range) ? range : { kind: 'position', of, range };
}

function limitStrip(
  of: Quantity,
  printed: PrintedValue | undefined,
  multiplier: number,
  reading: Reading,
): Maybe<Strip | undefined> {
  const range = rangeRead(of, printed, reading);
  if (range === undefined || isAbsence(range)) return range;
  return saysNothing(range) ? undefined : { kind: 'limit', of, range, multiplier };
}

/** "∞", or anything else that leaves a limit open, says nothing of θ and s. */
function saysNothing({ low, high }: Range): boolean {
  return low === Infinity || high === -Infinity || (low === -Infinity && high === Infinity);
}

function spreadStrip(
  printed: PrintedValue | undefined,
  reading: Reading,
): Maybe<Strip | undefined> {
  const of = 'standard error';
  const range = rangeRead(of, printed, { ...reading, scale: 'difference' });
  if (range === undefined || isAbsence(range)) return range;
  if (range.high < 0) return absence('a standard error cannot be negative');
  return { kind: 'spread', of, range };
}

function zStrip(printed: PrintedValue | undefined, reading: Reading): Maybe<Strip | undefined> {
  const range = rangeRead('z', printed, { ...reading, scale: 'difference' });
  return range === undefined || isAbsence(range)
    ? range
    : { kind: 'statistic', of: 'z', range, eitherSign: false, likelihood: false };
}

function waldStrip(
  printed: PrintedValue | undefined,
  reading: Reading,
): Maybe<Strip | undefined> {
  const of = 'Wald statistic';
  const squares = rangeRead(of, printed, { ...reading, scale: 'difference' });
  if (squares === undefined || isAbsence(squares)) return squares;
  if (squares.high < 0) return absence('a Wald statistic cannot be negative');
  const range = rising({ low: Math.max(0, squares.low), high: squares.high }, Math.sqrt);
  return { kind: 'statistic', of, range, eitherSign: true, likelihood: false };
}

/** A p as the range of z statistics that give it, of either sign. */
function pStrip(p: ReportedP | undefined, reading: Reading): Maybe<Strip | undefined> {
  if (p === undefined) return undefined;
  const printed = probabilitiesBehind(p.relation, p, reading.rounding);
  if (isAbsence(printed)) return printed;
  const range = falling(unadjusted(printed, reading.tests), (probability) =>
    reading.statisticOf(reading.oneSided ? probability : probability / 2));
  return { kind: 'statistic', of: 'p', range, eitherSign: true, likelihood: true };
}

/** The p before a Bonferroni correction; a corrected p of 1 may come from any above 1/tests. */
function unadjusted({ low, high }: Range, tests: number): Range {
  return { low: low / tests, high: high >= 1 ? 1 : high / tests };
}

function rangeRead(
  of: Quantity,
  printed: PrintedValue | undefined,
  reading: Reading,
): Maybe<Range | undefined> {
  if (printed === undefined) return undefined;
  if (!isPrintedValue(printed)) return absence(`the ${of} is not a number`);
  const range = valuesBehind(printed, reading.rounding);
  return onScale(range, reading.scale) ?? absence(`the ${of} ${printed.value} has no logarithm`);
}
