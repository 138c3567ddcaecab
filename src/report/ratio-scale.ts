import type { Printed, Result } from '../model/index.ts';

/**
 * How many standard errors an interval of a level in percent reaches to each
 * side: 1.959964 for 95. Undefined for a level that no interval has.
 */
export type Multiplier = (level: number) => number | undefined;

/** The level that an interval is taken to have where none is printed, in percent. */
const USUAL_LEVEL = 95;

/** The natural logarithm of a ratio's estimate: 0.4637 for 1.59. Undefined at zero and below. */
export function logEstimateOf(result: Result): number | undefined {
  if (result.kind !== 'ratio' || result.estimate === undefined) return undefined;
  return logOf(result.estimate);
}

/**
 * The standard error that an interval implies: half its width over the
 * multiplier of its level, on the log scale for a ratio and on the scale of the
 * estimate for a difference or a coefficient; for a coefficient the printed one,
 * if there is one. Undefined for other kinds, whose intervals are made in many ways.
 *
 * From the limits as printed, so it is as exact as their digits: 1.05 to 2.41
 * gives 0.2120, and any value from 0.2081 to 0.2158 would print the same.
 */
export function standardErrorOf(result: Result, multiplier: Multiplier): number | undefined {
  if (result.kind === 'coefficient' && result.standardError !== undefined) {
    return finite(result.standardError.value);
  }
  const { interval } = result;
  const scale = scaleOf(result);
  if (interval === undefined || scale === undefined) return undefined;
  const [lower, upper] = [scale(interval.lower), scale(interval.upper)];
  const reach = multiplier(interval.level ?? USUAL_LEVEL);
  if (lower === undefined || upper === undefined || reach === undefined) return undefined;
  return upper < lower ? undefined : (upper - lower) / (2 * reach);
}

/** Whether a standard error rests on a level that nobody printed. */
export function levelIsAssumed({ interval }: Result): boolean {
  return interval !== undefined && interval.level === undefined;
}

function scaleOf({ kind }: Result): ((printed: Printed) => number | undefined) | undefined {
  switch (kind) {
    case 'ratio': return logOf;
    case 'difference': return ({ value }) => finite(value);
    case 'coefficient': return ({ value }) => finite(value);
    default: return undefined;
  }
}

function logOf({ value }: Printed): number | undefined {
  return value > 0 ? finite(Math.log(value)) : undefined;
}

function finite(value: number): number | undefined {
  return Number.isFinite(value) ? value : undefined;
}
