import { isAbsence } from './absence.ts';
import { leanOf, possibleLeaners, type Contrast, type Leaner } from './contrast.ts';
import { isFeasible } from './feasible-region.ts';
import { agreesLeaning } from './leaning-region.ts';
import { negated } from './ranges.ts';
import { stripsOf, usualReading, type Reading, type ReportedNumbers } from './reported-numbers.ts';
import { reconcilingDegrees } from './student-reading.ts';
import type { Quantity, Strip } from './strip.ts';

/**
 * An honest way in which numbers that disagree by the standard method can have come
 * about, found to reconcile all of them. Offered, never asserted.
 */
export type Explanation =
  /** The interval has one of these levels, not the one stated. 68.27% is ± one standard error. */
  | { readonly kind: 'other level'; readonly stated: number; readonly levels: readonly number[] }
  /** The p-value is one-sided, half the two-sided one. */
  | { readonly kind: 'one-sided p' }
  /** The p-value is two-sided although it is called one-sided. */
  | { readonly kind: 'two-sided p' }
  /** The p-value, or interval and p, come from t with degrees of freedom between these. */
  | {
      readonly kind: 't distribution';
      readonly of: 'interval and p' | 'p';
      readonly least: number;
      readonly most: number;
    }
  /** The p-value is a likelihood-ratio, score, log-rank or exact one beside a Wald interval. */
  | { readonly kind: 'other test'; readonly contrast: Leaner }
  /** The p-value was multiplied for so many tests (Bonferroni), the interval was not widened. */
  | { readonly kind: 'adjusted p'; readonly tests: readonly number[] }
  /** The interval is a profile-likelihood, exact, score or bootstrap one, lopsided in logs. */
  | { readonly kind: 'asymmetric interval'; readonly type: 'likelihood' | 'bootstrap' }
  /** Estimate and limits are the logarithms of ratios. */
  | { readonly kind: 'log scale' }
  /** The interval is symmetric about the ratio itself instead of its logarithm. */
  | { readonly kind: 'natural scale' }
  /** This number is of the opposite comparison: its reciprocal, or its negative, agrees. */
  | { readonly kind: 'reference switched'; readonly of: Quantity }
  /** Digits were cut off instead of rounded, or rounded twice. */
  | { readonly kind: 'other rounding'; readonly rounding: 'cut off' | 'twice' };

/** Levels that intervals are given at, in the order in which they are met. */
const LEVELS = [90, 99, 97.5, 80, 68.27, 95, 98.33, 98.75, 98, 95.45] as const;

const MOST_TESTS = 20;

/**
 * Percentile intervals of the bootstrap lean about one and a half times as far as any
 * likelihood interval: |ln A| up to 1.0·s at 95%, where simulations of logistic models gave
 * 0.6 to 0.85·s in 95 of 100.
 */
const BOOTSTRAP_REACH = 1.53;

/**
 * The explanations that reconcile all printed numbers of a ratio, in the order in
 * which a reviewer would think of them; none where they agree within rounding already.
 */
export function explanations(
  numbers: ReportedNumbers,
  usual: Reading = usualReading(numbers, 'log'),
  contrast: Contrast | Leaner = 'unknown',
): readonly Explanation[] {
  const strips = stripsOf(numbers, usual);
  if (isAbsence(strips)) return asLogarithms(numbers, usual);
  if (isFeasible(strips)) return [];
  return [
    ...otherLevels(numbers, usual),
    ...otherSidedness(numbers, usual),
    ...studentReadings(numbers, usual),
    ...otherTests(strips, contrast),
    ...adjustedP(numbers, usual),
    ...asymmetricIntervals(strips, contrast),
    ...asLogarithms(numbers, usual),
    ...naturalScale(numbers, usual),
    ...switchedReferences(strips),
    ...otherRoundings(numbers, usual),
  ];
}

function fits(numbers: ReportedNumbers, reading: Reading): boolean {
  const strips = stripsOf(numbers, reading);
  return !isAbsence(strips) && strips.length > 2 && isFeasible(strips);
}

function otherLevels(numbers: ReportedNumbers, usual: Reading): readonly Explanation[] {
  const levels = LEVELS.filter(
    (level) => level !== usual.level && fits(numbers, { ...usual, level }));
  return levels.length === 0 ? [] : [{ kind: 'other level', stated: usual.level, levels }];
}

function otherSidedness(numbers: ReportedNumbers, usual: Reading): readonly Explanation[] {
  if (numbers.p === undefined || !fits(numbers, { ...usual, oneSided: !usual.oneSided })) return [];
  return [{ kind: usual.oneSided ? 'two-sided p' : 'one-sided p' }];
}

function studentReadings(numbers: ReportedNumbers, usual: Reading): readonly Explanation[] {
  if (numbers.p === undefined) return [];
  for (const of of ['interval and p', 'p'] as const) {
    const degrees = reconcilingDegrees(of, usual, (reading) => fits(numbers, reading));
    if (degrees) return [{ kind: 't distribution', of, ...degrees }];
  }
  return [];
}

function otherTests(strips: readonly Strip[], contrast: Contrast | Leaner): readonly Explanation[] {
  const found = possibleLeaners(contrast).find((kind) =>
    agreesLeaning(strips, leanOf(kind, strips, { interval: false, p: true })));
  return found === undefined ? [] : [{ kind: 'other test', contrast: found }];
}

function adjustedP(numbers: ReportedNumbers, usual: Reading): readonly Explanation[] {
  if (numbers.p === undefined || numbers.p.relation !== '=') return [];
  const tests: number[] = [];
  for (let count = 2; count <= MOST_TESTS; count++) {
    if (fits(numbers, { ...usual, tests: count })) tests.push(count);
  }
  return tests.length === 0 ? [] : [{ kind: 'adjusted p', tests }];
}

/** The interval may lean; so may the p then, which is often from the same likelihood. */
function asymmetricIntervals(
  strips: readonly Strip[],
  contrast: Contrast | Leaner,
): readonly Explanation[] {
  const lean = leanOf(contrast, strips);
  if (agreesLeaning(strips, lean)) return [{ kind: 'asymmetric interval', type: 'likelihood' }];
  const looser = { ...lean, reach: Math.max(lean.reach, BOOTSTRAP_REACH) };
  return agreesLeaning(strips, looser) ? [{ kind: 'asymmetric interval', type: 'bootstrap' }] : [];
}

function asLogarithms(numbers: ReportedNumbers, usual: Reading): readonly Explanation[] {
  if (usual.scale !== 'log') return [];
  return fits(numbers, { ...usual, scale: 'difference' }) ? [{ kind: 'log scale' }] : [];
}

function naturalScale(numbers: ReportedNumbers, usual: Reading): readonly Explanation[] {
  if (usual.scale !== 'log') return [];
  return fits(numbers, { ...usual, scale: 'ratio as it is' }) ? [{ kind: 'natural scale' }] : [];
}

/** One position at a time taken from the other side of no effect. */
function switchedReferences(strips: readonly Strip[]): readonly Explanation[] {
  return strips.flatMap((strip): readonly Explanation[] => {
    if (strip.kind !== 'position' && !(strip.kind === 'statistic' && !strip.eitherSign)) return [];
    const turned = { ...strip, range: negated(strip.range) };
    const switched = strips.map((other) => (other === strip ? turned : other));
    return isFeasible(switched) ? [{ kind: 'reference switched', of: strip.of }] : [];
  });
}

function otherRoundings(numbers: ReportedNumbers, usual: Reading): readonly Explanation[] {
  return (['twice', 'cut off'] as const)
    .filter((rounding) => fits(numbers, { ...usual, rounding }))
    .map((rounding) => ({ kind: 'other rounding', rounding }));
}
