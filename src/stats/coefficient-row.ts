import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Maybe } from './absence.ts';
import { multiplier, twoSidedP } from './normal.ts';
import { exponentials, falling, magnitudes, meet, negated } from './ranges.ts';
import { refuseUnprinted, unrounded, type PrintedValue } from './rounding.ts';

/**
 * What a printed regression coefficient and its standard error give for the other
 * columns of their row, each as the range that the rounding allows.
 */
export interface CoefficientRow {
  /** exp(b). */
  readonly ratio: Range;
  /** (b/SE)²; absent without a standard error. */
  readonly wald?: Range;
  /** Two-sided, from b/SE. */
  readonly p?: Range;
  readonly lower?: Range;
  readonly upper?: Range;
}

/**
 * The row of a coefficient: 0.693 with standard error 0.210 gives a ratio of 1.9987 to
 * 2.0007, limits of 1.3230 to 1.3270 and 3.0135 to 3.0225, and p of 0.00093 to 0.00100.
 */
export function coefficientRow(
  coefficient: PrintedValue,
  standardError: PrintedValue | undefined,
  level = 95,
): Maybe<CoefficientRow> {
  const reach = multiplier(level);
  if (isAbsence(reach)) return reach;
  const refusal = refuseUnprinted({ coefficient, 'standard error': standardError ?? coefficient });
  if (refusal) return refusal;
  const b = unrounded(coefficient);
  const ratio = exponentials(b);
  if (standardError === undefined) return { ratio };
  const s = unrounded(standardError);
  if (s.high < 0) return absence('a standard error cannot be negative');
  const error = { low: Math.max(0, s.low), high: s.high };
  const z = quotients(magnitudes(b), error);
  return {
    ratio,
    wald: { low: z.low ** 2, high: z.high ** 2 },
    p: falling(z, twoSidedP),
    lower: exponentials({ low: b.low - reach * error.high, high: b.high - reach * error.low }),
    upper: exponentials({ low: b.low + reach * error.low, high: b.high + reach * error.high }),
  };
}

/** The p that a printed Wald statistic on one degree of freedom stands for. */
export function pOfWald(wald: PrintedValue): Maybe<Range> {
  const refusal = refuseUnprinted({ 'Wald statistic': wald });
  if (refusal) return refusal;
  const { low, high } = unrounded(wald);
  if (high < 0) return absence('a Wald statistic cannot be negative');
  return falling({ low: Math.sqrt(Math.max(0, low)), high: Math.sqrt(high) }, twoSidedP);
}

/** How a printed ratio stands to exp(b): equal within rounding, its reciprocal is, or neither. */
export function ratioOfCoefficient(
  coefficient: PrintedValue,
  ratio: PrintedValue,
): Maybe<'same' | 'reciprocal' | 'neither'> {
  const refusal = refuseUnprinted({ coefficient, ratio });
  if (refusal) return refusal;
  const printed = unrounded(ratio);
  if (meet(exponentials(unrounded(coefficient)), printed)) return 'same';
  return meet(exponentials(negated(unrounded(coefficient))), printed) ? 'reciprocal' : 'neither';
}

function quotients(distance: Range, error: Range): Range {
  return {
    low: distance.low === 0 ? 0 : distance.low / error.high,
    high: distance.high === 0 ? 0 : distance.high / error.low,
  };
}
