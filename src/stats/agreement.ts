import { isAbsence } from './absence.ts';
import { conflicts, type Conflict } from './conflict.ts';
import { leanOf, possibleLeaners, type Contrast, type Leaner } from './contrast.ts';
import { explanations, type Explanation } from './explanation.ts';
import { feasibleRegion, isFeasible, type Region } from './feasible-region.ts';
import {
  impliedByRegion, impliedLeaning, othersImply, type Implied, type OthersImply,
} from './implied.ts';
import { agreesLeaning, type Lean } from './leaning-region.ts';
import { repairs, type Repair } from './repair.ts';
import {
  stripsOf, usualReading, type Reading, type ReportedNumbers, type Scale,
} from './reported-numbers.ts';
import type { Strip } from './strip.ts';

/** Which of the printed numbers must come from another method than Wald's for all to agree. */
export type Leaning = 'p' | 'interval' | 'interval and p';

/**
 * How the printed numbers of one result stand to each other.
 *
 * - `within rounding`: one estimate and standard error give all of them by Wald's method.
 *   `spare` counts the numbers beyond the two that fix the unknowns: at 0 nothing was tested.
 * - `within another standard method`: profile-likelihood, exact or score intervals, or
 *   likelihood-ratio, score, log-rank or exact p-values of the same data could give them. No flag.
 * - `neither`: no rounding and no standard method reconciles them.
 * - `cannot tell`: too few numbers, or one that has no place on the scale.
 */
export type Agreement =
  | {
      readonly outcome: 'within rounding';
      readonly implied: Implied;
      readonly region: Region;
      readonly spare: number;
    }
  | {
      readonly outcome: 'within another standard method';
      readonly leaning: Leaning;
      /** The narrower kind of contrast for which methods can lean so far. */
      readonly contrast: Leaner;
      readonly implied: Implied;
      readonly conflicts: readonly Conflict[];
    }
  | {
      readonly outcome: 'neither';
      readonly conflicts: readonly Conflict[];
      /** For each printed number, what the others imply. */
      readonly othersImply: readonly OthersImply[];
      /** Single slips that would restore agreement, likeliest first: candidates. */
      readonly repairs: readonly Repair[];
      /** Honest readings that would reconcile all numbers, in the order to think of them. */
      readonly explanations: readonly Explanation[];
    }
  | {
      readonly outcome: 'cannot tell';
      readonly because: string;
      readonly explanations: readonly Explanation[];
    };

/**
 * Whether the printed numbers of a ratio (odds ratio, hazard ratio, …) can have come
 * from one analysis: 0.72 (0.58 to 0.90) with p = 0.004 can, within rounding.
 * `contrast` says whether it compares two groups, where methods differ least.
 */
export function agreement(numbers: ReportedNumbers, contrast: Contrast = 'unknown'): Agreement {
  return agreementOn('log', numbers, contrast);
}

/**
 * The same for a difference (of risks, of means) or a coefficient, whose interval is made on
 * its own scale: 17 (1.4 to 32.6) with p = 0.032 agrees within rounding.
 */
export function differenceAgreement(numbers: ReportedNumbers): Agreement {
  return agreementOn('difference', numbers, 'difference');
}

/**
 * The outcome alone, without what is told of it: some microseconds, where a
 * disagreement told in full takes a millisecond or two. For tables and simulations.
 */
export function outcomeOf(
  numbers: ReportedNumbers,
  contrast: Contrast = 'unknown',
): Agreement['outcome'] {
  const strips = stripsOf(numbers, usualReading(numbers, 'log'));
  if (isAbsence(strips) || strips.length < 2) return 'cannot tell';
  if (isFeasible(strips)) return 'within rounding';
  return leastLean(strips, contrast) ? 'within another standard method' : 'neither';
}

function agreementOn(
  scale: Scale,
  numbers: ReportedNumbers,
  contrast: Contrast | Leaner,
): Agreement {
  const reading = usualReading(numbers, scale);
  const strips = stripsOf(numbers, reading);
  if (isAbsence(strips)) {
    const found = explanations(numbers, reading, contrast);
    return { outcome: 'cannot tell', because: strips.because, explanations: found };
  }
  if (strips.length < 2) {
    const because = 'one number alone can be compared with nothing';
    return { outcome: 'cannot tell', because, explanations: [] };
  }
  const region = feasibleRegion(strips);
  const implied = impliedByRegion(region, scale);
  return implied
    ? { outcome: 'within rounding', implied, region, spare: strips.length - 2 }
    : disagreement(numbers, strips, reading, contrast);
}

/** What is said of numbers that rounding alone does not reconcile. */
function disagreement(
  numbers: ReportedNumbers,
  strips: readonly Strip[],
  reading: Reading,
  contrast: Contrast | Leaner,
): Agreement {
  const inConflict = conflicts(strips);
  const leaning = leastLeaning(strips, reading.scale, contrast);
  if (leaning) {
    return { outcome: 'within another standard method', ...leaning, conflicts: inConflict };
  }
  return {
    outcome: 'neither',
    conflicts: inConflict,
    explanations: explanations(numbers, reading, contrast),
    othersImply: othersImply(strips, reading, leanOf(contrast, strips)),
    repairs: repairs(numbers, reading),
  };
}

/** The least lean within which the numbers agree, with what it implies. */
function leastLeaning(
  strips: readonly Strip[],
  scale: Scale,
  contrast: Contrast | Leaner,
): Pick<LeaningAgreement, 'leaning' | 'contrast' | 'implied'> | undefined {
  const found = leastLean(strips, contrast);
  const implied = found && impliedLeaning(strips, scale, found.lean);
  return implied && { leaning: found.leaning, contrast: found.contrast, implied };
}

/** The first lean within which the numbers agree: two groups first, p alone first. */
function leastLean(
  strips: readonly Strip[],
  contrast: Contrast | Leaner,
): { readonly lean: Lean; readonly leaning: Leaning; readonly contrast: Leaner } | undefined {
  for (const kind of possibleLeaners(contrast)) {
    for (const leaning of LEANINGS) {
      const lean = leanOf(kind, strips, { interval: leaning !== 'p', p: leaning !== 'interval' });
      if (agreesLeaning(strips, lean)) return { lean, leaning, contrast: kind };
    }
  }
  return undefined;
}

type LeaningAgreement = Extract<Agreement, { outcome: 'within another standard method' }>;

const LEANINGS = ['p', 'interval', 'interval and p'] as const;
