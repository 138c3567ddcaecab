import type { Range } from '../model/index.ts';
import {
  feasibleRegion, linearRange, magnitudeRange, quotientRange, type Region,
} from './feasible-region.ts';
import {
  leaningExtent, leaningExtents, ofEstimate, ofLimit, ofQuotient, ofStandardError, ofTest,
} from './leaning-extent.ts';
import type { Lean } from './leaning-region.ts';
import { log10TwoSidedP, twoSidedP, upperTail } from './normal.ts';
import { exponentials, falling, magnitudes, rising, shifted } from './ranges.ts';
import type { Reading, Scale } from './reported-numbers.ts';
import type { Quantity, Strip } from './strip.ts';

/** What printed numbers that agree say of the analysis behind them, as ranges. */
export interface Implied {
  /** On the printed scale: a ratio, or a difference. */
  readonly estimate: Range;
  /** The natural logarithm of a ratio; the difference itself on the difference scale. */
  readonly logEstimate: Range;
  /** Of `logEstimate`. */
  readonly standardError: Range;
  /** `logEstimate` over its standard error, with its sign. */
  readonly z: Range;
  /** Two-sided, of no effect. */
  readonly p: Range;
  /** Its base-10 logarithm, which goes on where p is below the smallest double. */
  readonly log10P: Range;
}

/** What a region that is not empty implies; nothing for an empty one. */
export function impliedByRegion(region: Region, scale: Scale): Implied | undefined {
  const logEstimate = linearRange(region, 1, 0);
  const standardError = linearRange(region, 0, 1);
  const z = quotientRange(region);
  const magnitude = magnitudeRange(region);
  if (!logEstimate || !standardError || !z || !magnitude) return undefined;
  return assembled(scale, logEstimate, standardError, z, magnitude);
}

/**
 * What numbers that agree only with lean imply: the widest ranges that any
 * standard method allows, to about 1e-6. Nothing where they disagree even so.
 */
export function impliedLeaning(
  strips: readonly Strip[],
  scale: Scale,
  lean: Lean,
): Implied | undefined {
  const found = leaningExtents(strips, lean, [ofEstimate, ofStandardError, ofQuotient]);
  if (found === undefined) return undefined;
  const [logEstimate, standardError, z] = found as readonly [Range, Range, Range];
  return assembled(scale, logEstimate, standardError, z, magnitudes(z));
}

/** The other printed numbers' say on one of them, on the scale on which it is printed. */
export interface OthersImply {
  readonly of: Quantity;
  /** By the standard method, allowing for rounding; absent where the others disagree too. */
  readonly strict?: Range;
  /** By any standard method. */
  readonly leaning?: Range;
}

/** For each printed number, the values that the others leave open to it. */
export function othersImply(
  strips: readonly Strip[],
  reading: Reading,
  lean: Lean,
): readonly OthersImply[] {
  return strips.map((strip) => {
    const others = strips.filter((other) => other !== strip);
    const strict = strictRange(strip, feasibleRegion(others));
    const leaning = leaningRange(strip, others, lean);
    return {
      of: strip.of,
      ...(strict && { strict: asPrinted(strip, strict, reading) }),
      ...(leaning && { leaning: asPrinted(strip, leaning, reading) }),
    };
  });
}

/**
 * What all other numbers imply for one, on the scale on which it is printed, by the
 * standard method: nothing where they disagree among themselves, or it is not printed.
 */
export function strictlyImplied(
  of: Quantity,
  strips: readonly Strip[],
  reading: Reading,
): Range | undefined {
  const strip = strips.find((candidate) => candidate.of === of);
  if (strip === undefined) return undefined;
  const range = strictRange(strip, feasibleRegion(strips.filter((other) => other !== strip)));
  return range && asPrinted(strip, range, reading);
}

/** The values of a strip's quantity over a region, on the strip's own scale. */
function strictRange(strip: Strip, region: Region): Range | undefined {
  switch (strip.kind) {
    case 'position':
      return linearRange(region, 1, 0);
    case 'limit':
      return linearRange(region, 1, strip.multiplier);
    case 'spread':
      return linearRange(region, 0, 1);
    case 'statistic':
      return strip.eitherSign ? magnitudeRange(region) : quotientRange(region);
    default:
      return strip satisfies never;
  }
}

function leaningRange(strip: Strip, others: readonly Strip[], lean: Lean): Range | undefined {
  switch (strip.kind) {
    case 'position':
      return leaningExtent(others, lean, ofEstimate);
    case 'limit': {
      const limit = strip.multiplier < 0 ? -1 : 1;
      return leaningExtent(others, lean, ofLimit(limit, lean), Math.abs(strip.multiplier));
    }
    case 'spread':
      return leaningExtent(others, lean, ofStandardError);
    case 'statistic':
      return strip.eitherSign
        ? leaningExtent(others, lean, ofTest({ ...lean, p: lean.p && strip.likelihood }))
        : leaningExtent(others, lean, ofQuotient);
    default:
      return strip satisfies never;
  }
}

/** From the strip's scale back to the page's: logs to ratios, z to p or to Wald's statistic. */
function asPrinted(strip: Strip, range: Range, { scale, oneSided }: Reading): Range {
  if (strip.of === 'p') return falling(range, oneSided ? upperTail : twoSidedP);
  if (strip.of === 'coefficient' || strip.kind === 'spread') return range;
  if (strip.kind === 'statistic') return strip.eitherSign ? rising(range, (z) => z * z) : range;
  return offScale(range, scale);
}

function offScale(range: Range, scale: Scale): Range {
  switch (scale) {
    case 'log':
      return exponentials(range);
    case 'ratio as it is':
      return shifted(range, 1);
    case 'difference':
      return range;
    default:
      return scale satisfies never;
  }
}

function assembled(
  scale: Scale,
  logEstimate: Range,
  standardError: Range,
  z: Range,
  magnitude: Range,
): Implied {
  return {
    estimate: offScale(logEstimate, scale),
    logEstimate,
    standardError,
    z,
    p: falling(magnitude, twoSidedP),
    log10P: falling(magnitude, log10TwoSidedP),
  };
}
