import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Maybe } from './absence.ts';
import { log10TwoSidedP, multiplier, twoSidedP, zOfTwoSidedP } from './normal.ts';
import { falling, logarithms, magnitudes } from './ranges.ts';
import type { Scale } from './reported-numbers.ts';
import { isPrintedValue, unrounded, type PrintedValue } from './rounding.ts';

/*
 * The arithmetic that a reader can follow by hand, one step after the other, as in
 * Altman & Bland (BMJ 2011;343:d2304 and d2090) and the Cochrane Handbook 6.3: the
 * standard error from the width of the interval, z from the estimate, p from z.
 * `feasible-region.ts` takes all numbers together and is sharper.
 */

/** A standard error, z and p worked out from an estimate with its interval, or with its p. */
export interface WorkedOut {
  /** Of the log of a ratio, or of a difference. */
  readonly standardError: number;
  readonly z: number;
  readonly p: number;
  readonly log10P: number;
  /** Where an interval symmetric on its scale is centred: 0.722 for 0.58 to 0.90. */
  readonly midpoint: number;
}

/**
 * Standard error, z and two-sided p from exact numbers: 0.81 (0.70 to 0.94) at 95%
 * gives 0.0752, −2.80 and 0.0051.
 */
export function workedOut(
  scale: Exclude<Scale, 'ratio as it is'>,
  estimate: number,
  interval: Range,
  level: number,
): Maybe<WorkedOut> {
  const reach = multiplier(level);
  if (isAbsence(reach)) return reach;
  const theta = toScale(estimate, scale);
  const [low, high] = [toScale(interval.low, scale), toScale(interval.high, scale)];
  if (!Number.isFinite(theta)) return absence(`${estimate} has no place on the ${scale} scale`);
  if (!(Number.isFinite(low) && Number.isFinite(high))) {
    return absence('a limit is infinite, or has no place on the scale');
  }
  if (!(low < high)) return absence('the limits are out of order or equal');
  const standardError = (high - low) / (2 * reach);
  const z = theta / standardError;
  const midpoint = fromScale((low + high) / 2, scale);
  return { standardError, z, p: twoSidedP(z), log10P: log10TwoSidedP(z), midpoint };
}

/** What printed limits and a printed estimate give, step by step, each number as its range. */
export interface WorkedOutRanges {
  readonly standardError: Range;
  readonly p: Range;
  readonly midpoint: Range;
}

/**
 * The same from printed numbers. 2.00 (0.98 to 4.05) gives standard errors from 0.3604 to
 * 0.3636 and p from 0.0536 to 0.0575.
 */
export function workedOutRanges(
  scale: Exclude<Scale, 'ratio as it is'>,
  estimate: PrintedValue,
  lower: PrintedValue,
  upper: PrintedValue,
  level: number,
): Maybe<WorkedOutRanges> {
  const reach = multiplier(level);
  if (isAbsence(reach)) return reach;
  const [theta, low, high] = [estimate, lower, upper].map((printed) =>
    finiteRange(printed, scale));
  if (!theta || !low || !high) {
    return absence('a printed number may stand for one without a logarithm');
  }
  if (!(low.low < high.high)) return absence('the limits are out of order');
  const standardError = {
    low: Math.max(0, high.low - low.high) / (2 * reach),
    high: (high.high - low.low) / (2 * reach),
  };
  const distance = magnitudes(theta);
  const z = {
    low: distance.low / standardError.high,
    high: distance.high === 0 ? 0 : distance.high / standardError.low,
  };
  const ends = { low: (low.low + high.low) / 2, high: (low.high + high.high) / 2 };
  return {
    standardError,
    p: falling(z, twoSidedP),
    midpoint: { low: fromScale(ends.low, scale), high: fromScale(ends.high, scale) },
  };
}

/** An interval worked out from an estimate and its exact two-sided p. */
export interface IntervalFromP {
  readonly z: number;
  readonly standardError: number;
  readonly interval: Range;
}

/**
 * The standard error and interval that an estimate and its p imply: 17 with p = 0.032 gives
 * 7.93 and 1.5 to 32.5. No answer at no effect, where p says nothing of the standard error.
 */
export function intervalFromP(
  scale: Exclude<Scale, 'ratio as it is'>,
  estimate: number,
  p: number,
  level: number,
): Maybe<IntervalFromP> {
  const reach = multiplier(level);
  if (isAbsence(reach)) return reach;
  if (!(p > 0 && p < 1)) return absence(`a p-value of ${p} does not tell the standard error`);
  const theta = toScale(estimate, scale);
  if (!Number.isFinite(theta)) return absence(`${estimate} has no place on the ${scale} scale`);
  if (theta === 0) return absence('at no effect p does not tell the standard error');
  const z = zOfTwoSidedP(p);
  const standardError = Math.abs(theta) / z;
  const interval = {
    low: fromScale(theta - reach * standardError, scale),
    high: fromScale(theta + reach * standardError, scale),
  };
  return { z, standardError, interval };
}

function finiteRange(printed: PrintedValue, scale: Scale): Range | undefined {
  if (!isPrintedValue(printed) || !Number.isFinite(printed.value)) return undefined;
  const range = unrounded(printed);
  const onScale = scale === 'log' ? logarithms(range) : range;
  return onScale && onScale.low !== -Infinity ? onScale : undefined;
}

function toScale(value: number, scale: Scale): number {
  return scale === 'log' ? Math.log(value) : value;
}

function fromScale(value: number, scale: Scale): number {
  return scale === 'log' ? Math.exp(value) : value;
}
