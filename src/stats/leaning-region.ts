import type { Range } from '../model/index.ts';
import { evenBend, greatestLean, leastLean } from './lean.ts';
import { magnitudes, negated, shared } from './ranges.ts';
import { signsOf, type Strip } from './strip.ts';

/*
 * The outer ring of the feasible region: whether some estimate θ and standard error s
 * agree with all printed numbers when the interval and the p-value may each come
 * from any standard method that leans no further than `lean.ts` allows.
 *
 * For a fixed θ every printed number bounds one of two quantities from one side or both:
 *
 *   v, the arm in standard errors before leaning:   Φ⁻(θ − l) ≤ v ≤ Φ⁺(θ − l),  same for u − θ
 *   s, the standard error:                          from p, z, and a printed s
 *   and both together:     k·s ≤ v ≤ k·s + c·s²   (the continuity correction)
 *
 * and every bound is monotone in θ. So over an interval of θ each bound is extreme at an
 * end, which excludes whole intervals for certain; where the middle satisfies all
 * bounds the ring is not empty. Halving decides all but ties, and those agree: the method
 * never excludes what the bounds allow, to 1e-12 in θ. Lean of interval and p are
 * independent, since a profile interval stands beside a Wald p as often as the reverse.
 */

/** Which numbers may lean, and how far. */
export interface Lean {
  readonly interval: boolean;
  readonly p: boolean;
  /** The bound on |d ln I/dψ|: 1 for a contrast of two groups. */
  readonly reach: number;
  /** The continuity correction of exact methods on the scale of z, in standard errors. */
  readonly continuity: number;
  /**
   * How much z an exact p above a half may have more than its share, because the two
   * tails of a discrete distribution are not even: about a quarter of reach·s.
   */
  readonly unevenTails: number;
}

/** A point of the ring: estimate, standard error, and the arm before leaning. */
export interface LeaningPoint {
  readonly estimate: number;
  readonly standardError: number;
  readonly arm: number;
}

/** What the strips allow for s and v where θ lies in some interval; empty where low > high. */
interface Bounds {
  readonly s: Range;
  readonly v: Range;
}

type LimitStrip = Extract<Strip, { readonly kind: 'limit' }>;
type StatisticStrip = Extract<Strip, { readonly kind: 'statistic' }>;

const EVERYTHING: Range = { low: -Infinity, high: Infinity };
/** The z of a two-sided p of a half. */
const Z_OF_HALF = 0.6744897501960817;
const FINEST = 1e-12;
const MOST_HALVINGS = 4000;

/**
 * A point of the ring: a pair of estimate and standard error, with the arm of the
 * interval, that agrees with all strips within the lean; nothing where there is none.
 * Lower and upper limits are taken to be of one level.
 */
export function leaningPoint(strips: readonly Strip[], lean: Lean): LeaningPoint | undefined {
  for (const sign of signsOf(strips)) {
    const found = search(sign === 1 ? strips : strips.map(mirrored), lean);
    if (found !== undefined) return { ...found, estimate: sign * found.estimate };
  }
  return undefined;
}

/** Whether the strips agree within the lean. */
export function agreesLeaning(strips: readonly Strip[], lean: Lean): boolean {
  return leaningPoint(strips, lean) !== undefined;
}

/** The same strips seen from the other side of zero, where a free sign is positive. */
export function mirrored(strip: Strip): Strip {
  switch (strip.kind) {
    case 'position':
      return { ...strip, range: negated(strip.range) };
    case 'limit':
      return { ...strip, range: negated(strip.range), multiplier: -strip.multiplier };
    case 'spread':
      return strip;
    case 'statistic':
      return strip.eitherSign ? strip : { ...strip, range: negated(strip.range) };
    default:
      return strip satisfies never;
  }
}

/** Halves intervals of θ, breadth first, until a point is found or none is left. */
function search(strips: readonly Strip[], lean: Lean): LeaningPoint | undefined {
  const whole = possibleEstimates(strips);
  if (whole === undefined) return undefined;
  const multiplier = multiplierOf(strips);
  const queue: Range[] = [whole];
  for (let step = 0; step < queue.length; step++) {
    const range = queue[step] as Range;
    if (!isPossible(boundsOver(strips, lean, range), multiplier, lean)) continue;
    const middle = (range.low + range.high) / 2;
    const bounds = boundsOver(strips, lean, { low: middle, high: middle });
    const tied = range.high - range.low <= FINEST * (1 + Math.abs(middle)) || step > MOST_HALVINGS;
    if (tied || isPossible(bounds, multiplier, lean)) return pointOf(middle, bounds, multiplier);
    queue.push({ low: range.low, high: middle }, { low: middle, high: range.high });
  }
  return undefined;
}

/**
 * The ring at one estimate: the ranges of the standard error and of the arm before
 * leaning that agree with all strips. Only positive signs of a free sign.
 */
export interface Section {
  readonly estimate: number;
  readonly s: Range;
  readonly v: Range;
}

/** The ring cut at one estimate, or nothing where no standard error agrees. */
export function sectionAt(
  strips: readonly Strip[],
  lean: Lean,
  multiplier: number,
  estimate: number,
): Section | undefined {
  const { s, v } = boundsOver(strips, lean, { low: estimate, high: estimate });
  const k = multiplier;
  const correction = lean.interval ? lean.continuity : 0;
  const arm = shared(v, { low: k * s.low, high: k * s.high + correction * s.high * s.high });
  if (arm === undefined) return undefined;
  const least = (2 * arm.low) / (k + Math.sqrt(k * k + 4 * correction * arm.low));
  const error = shared(s, { low: least, high: arm.high / k });
  return error && { estimate, s: error, v: arm };
}

/** The estimates that the strips leave possible whatever s is; open ends cut off far outside. */
export function possibleEstimates(strips: readonly Strip[]): Range | undefined {
  const whole = strips.reduce<Range | undefined>(
    (range, strip) => range && shared(range, possibleFor(strip)), EVERYTHING);
  return whole && cutOff(whole, strips);
}

/** The estimates that one strip leaves possible whatever s is: arms are not negative. */
function possibleFor(strip: Strip): Range {
  switch (strip.kind) {
    case 'position':
      return strip.range;
    case 'limit':
      return strip.multiplier < 0
        ? { low: strip.range.low, high: Infinity }
        : { low: -Infinity, high: strip.range.high };
    case 'spread':
      return EVERYTHING;
    case 'statistic':
      return {
        low: strip.range.low > 0 || (strip.range.low === 0 && !strip.eitherSign) ? 0 : -Infinity,
        high: strip.range.high <= 0 && !strip.eitherSign ? 0 : Infinity,
      };
    default:
      return strip satisfies never;
  }
}

/** Cuts an open range of estimates off far outside all printed numbers. */
function cutOff({ low, high }: Range, strips: readonly Strip[]): Range {
  if (low !== -Infinity && high !== Infinity) return { low, high };
  const ends = strips.flatMap(({ range }) => [Math.abs(range.low), Math.abs(range.high)]);
  const far = 40 * (1 + Math.max(...ends.filter((end) => end !== Infinity)));
  return { low: Math.max(low, -far), high: Math.min(high, far) };
}

/** The multiplier that the limits share, or nothing where none is printed. */
export function multiplierOf(strips: readonly Strip[]): number | undefined {
  const limit = strips.find((strip): strip is LimitStrip => strip.kind === 'limit');
  return limit && Math.abs(limit.multiplier);
}

/** Whether some s and v within the bounds satisfy k·s ≤ v ≤ k·s + c·s² (or v = k·s). */
function isPossible({ s, v }: Bounds, multiplier: number | undefined, lean: Lean): boolean {
  if (!(s.low <= s.high && v.low <= v.high)) return false;
  if (multiplier === undefined) return true;
  const longest = multiplier * s.high + (lean.interval ? lean.continuity * s.high * s.high : 0);
  return multiplier * s.low <= v.high && v.low <= longest;
}

/** A point within the bounds, or the nearest to one where the bounds only just touch. */
function pointOf(estimate: number, bounds: Bounds, multiplier: number | undefined): LeaningPoint {
  const k = multiplier ?? 1;
  const { s, v } = bounds;
  const arm = Math.min(Math.max(v.low, k * s.low), v.high);
  const standardError = Math.max(s.low, Math.min(s.high, arm / k));
  return { estimate, standardError, arm };
}

/** The bounds on s and v that hold for at least one θ of the range, or for the one θ. */
function boundsOver(strips: readonly Strip[], lean: Lean, estimates: Range): Bounds {
  let s: Range = { low: 0, high: Infinity };
  let v: Range = lean.interval ? evenBounds(strips, lean) : { low: 0, high: Infinity };
  for (const strip of strips) {
    if (strip.kind === 'limit') v = tighter(v, armBounds(strip, lean, estimates));
    if (strip.kind === 'spread') s = tighter(s, strip.range);
    if (strip.kind === 'statistic') s = tighter(s, errorBounds(strip, lean, estimates));
  }
  return { s, v };
}

/** v from half the width of the interval, which methods hardly change: see `evenBend`. */
function evenBounds(strips: readonly Strip[], { reach }: Lean): Range {
  const lower = strips.find((strip) => strip.kind === 'limit' && strip.multiplier < 0);
  const upper = strips.find((strip) => strip.kind === 'limit' && strip.multiplier > 0);
  if (lower?.kind !== 'limit' || upper?.kind !== 'limit') return { low: 0, high: Infinity };
  const least = Math.max(0, (upper.range.low - lower.range.high) / 2);
  const most = (upper.range.high - lower.range.low) / 2;
  return {
    low: least / evenBend(least / upper.multiplier, reach),
    high: most === Infinity ? Infinity : most * evenBend(most / upper.multiplier, reach),
  };
}

function tighter(one: Range, other: Range): Range {
  return { low: Math.max(one.low, other.low), high: Math.min(one.high, other.high) };
}

/** v between Φ⁻ of the shortest arm and Φ⁺ of the longest that the range of θ allows. */
function armBounds({ range, multiplier }: LimitStrip, lean: Lean, estimates: Range): Range {
  const shortest = multiplier < 0 ? estimates.low - range.high : range.low - estimates.high;
  const longest = multiplier < 0 ? estimates.high - range.low : range.high - estimates.low;
  if (!lean.interval) return { low: Math.max(0, shortest), high: longest };
  return { low: leastLean(shortest, lean.reach), high: greatestLean(longest, lean.reach) };
}

/** s from z₁·s ≤ Λ⁺(θ) and Λ⁻(θ) ≤ z₂·s + c·s², where Λ is θ itself without lean. */
function errorBounds(strip: StatisticStrip, lean: Lean, estimates: Range): Range {
  const leans = lean.p && strip.likelihood;
  const anySign = strip.eitherSign && strip.range.low >= 0;
  const { low, high } = anySign ? magnitudes(estimates) : estimates;
  const most = leans ? signedLean(high, lean.reach, greatestLean, leastLean) : high;
  const least = leans ? signedLean(low, lean.reach, leastLean, greatestLean) : low;
  const above = fromLeast(leans ? leastZ(strip.range.low, lean) : strip.range.low, most);
  const below = fromGreatest(strip.range.high, least, leans ? lean.continuity : 0);
  return tighter(above, below);
}

/** The least z of a p; a large one of an exact method may fall short of its share. */
function leastZ(z: number, { unevenTails }: Lean): number {
  return z > 0 && z < Z_OF_HALF ? Math.max(0, z - unevenTails) : z;
}

type LeanOf = (distance: number, reach: number) => number;

function signedLean(estimate: number, reach: number, ahead: LeanOf, behind: LeanOf): number {
  return estimate >= 0 ? ahead(estimate, reach) : -behind(-estimate, reach);
}

/** The s with z·s ≤ most. */
function fromLeast(z: number, most: number): Range {
  if (z > 0) return { low: 0, high: z === Infinity ? 0 : most / z };
  if (z === 0 || z === -Infinity) return EVERYTHING;
  return { low: most / z, high: Infinity };
}

/** The s with least ≤ z·s + correction·s². */
function fromGreatest(z: number, least: number, correction: number): Range {
  if (z === Infinity) return EVERYTHING;
  if (correction > 0) {
    if (least <= 0) return EVERYTHING;
    const root = Math.sqrt(z * z + 4 * correction * least);
    const low = z >= 0 ? (2 * least) / (z + root) : (root - z) / (2 * correction);
    return { low, high: Infinity };
  }
  if (z > 0) return { low: least / z, high: Infinity };
  if (z === 0) return least <= 0 ? EVERYTHING : { low: Infinity, high: Infinity };
  return { low: 0, high: least / z };
}
