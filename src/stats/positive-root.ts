import { rootBetween } from './root.ts';
import type { Tails } from './tails.ts';

/** How far from one the logarithm of a positive double may be. */
const LARGEST_LOG = 709;

/**
 * The positive x at which a rising function of ln x crosses zero, sought from
 * x = `near` outwards. Where there is no crossing within the doubles the answer
 * is 0 or ∞, whichever end it lies beyond.
 */
export function positiveRoot(f: (x: number) => number, near: number): number {
  const onLog = (u: number): number => f(Math.exp(u));
  const start = Math.log(near);
  const upwards = onLog(start) < 0;
  let inner = start;
  for (let reach = 0.25; ; reach *= 2) {
    const outer = clampLog(upwards ? inner + reach : inner - reach);
    const value = onLog(outer);
    if (value === 0) return Math.exp(outer);
    if (value > 0 === upwards) return Math.exp(rootBetween(onLog, inner, outer));
    if (Math.abs(outer) === LARGEST_LOG) return upwards ? Infinity : 0;
    inner = outer;
  }
}

/**
 * The positive x with the probability `lower` below it, sought from `near`, on
 * the logarithm of whichever tail is the smaller.
 */
export function positiveQuantile(
  tailsAt: (x: number) => Tails,
  lower: number,
  near: number,
): number {
  if (lower < 0.5) return positiveRoot((x) => Math.log(tailsAt(x).lower / lower), near);
  return positiveRoot((x) => Math.log((1 - lower) / tailsAt(x).upper), near);
}

function clampLog(u: number): number {
  return Math.min(LARGEST_LOG, Math.max(-LARGEST_LOG, u));
}
