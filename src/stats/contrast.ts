import type { Lean } from './leaning-region.ts';
import type { Strip } from './strip.ts';

/**
 * What a result compares. A `binary` contrast is of two groups: treated with
 * untreated, one level of a factor with its reference. A `per unit` one is of a
 * measured quantity, whose unit is arbitrary. `unknown` where the text does not tell.
 */
export type Contrast = 'binary' | 'per unit' | 'unknown';

/** How far methods lean: by the kind of contrast, or for a difference on its own scale. */
export type Leaner = 'binary' | 'per unit' | 'difference';

/** The kinds of contrast that may be meant, those that lean least first. */
export function possibleLeaners(contrast: Contrast | Leaner): readonly Leaner[] {
  return contrast === 'unknown' ? ['binary', 'per unit'] : [contrast];
}

/**
 * The greatest |ln A| of an honest interval for a contrast that is not known to be
 * of two groups: found to cover the profile intervals of every continuous term in
 * models with 20 events or more (own measurements on published data sets, at most 0.16).
 */
const GREATEST_LOG_ASYMMETRY = 0.3;

/**
 * Half a count moves z by half the standard error of a log odds, hazard or rate ratio, and by
 * more where the standard error is smaller for the same counts, as that of a risk ratio.
 */
const CONTINUITY = { binary: 0.5, 'per unit': 1, unknown: 1, difference: 0.5 } as const;

/** The multiplier of an interval whose level gives no better. */
const USUAL_MULTIPLIER = 1.96;

/**
 * How far methods may lean for this contrast (see `lean.ts`). The bound on |d ln I/dψ|
 * is 1 for two groups; for others it is what lets the arms of the interval differ by the
 * factor e^0.3, since ln A is about a third of reach·k·s. For an odds, hazard or rate
 * ratio of two groups choose `binary`; a risk ratio of a common outcome leans further.
 */
export function leanOf(
  contrast: Contrast | Leaner,
  strips: readonly Strip[],
  leaning: Pick<Lean, 'interval' | 'p'> = { interval: true, p: true },
): Lean {
  const arm = typicalArm(strips);
  const reach = contrast === 'binary' || !(arm > 0)
    ? 1
    : Math.max(contrast === 'difference' ? 0 : 1, (3 * GREATEST_LOG_ASYMMETRY) / arm);
  return {
    ...leaning,
    reach,
    continuity: CONTINUITY[contrast] * (contrast === 'difference' ? reach : 1),
    unevenTails: (0.25 * reach * arm) / USUAL_MULTIPLIER,
  };
}

/** Half the width of the interval, or what it would be from the other numbers; 0 if unknown. */
function typicalArm(strips: readonly Strip[]): number {
  const [lower, upper] = [-1, 1].map((side) =>
    strips.find((strip) => strip.kind === 'limit' && Math.sign(strip.multiplier) === side));
  if (lower && upper) return halfway(upper) / 2 - halfway(lower) / 2;
  const spread = strips.find((strip) => strip.kind === 'spread');
  if (spread) return USUAL_MULTIPLIER * halfway(spread);
  const position = strips.find((strip) => strip.kind === 'position');
  const statistic = strips.find((strip) => strip.kind === 'statistic');
  if (!position) return 0;
  if (lower ?? upper) return Math.abs(halfway(position) - halfway((lower ?? upper) as Strip));
  return statistic ? (USUAL_MULTIPLIER * Math.abs(halfway(position))) / halfway(statistic) : 0;
}

/** The middle of a strip's range; its finite end where the other is infinite. */
function halfway({ range: { low, high } }: Strip): number {
  if (low === -Infinity || high === Infinity) return low === -Infinity ? high : low;
  return (low + high) / 2;
}
