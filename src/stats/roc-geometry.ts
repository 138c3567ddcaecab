import type { Range } from '../model/index.ts';
import { isAbsence, type Maybe } from './absence.ts';
import { refuseShares } from './admissible.ts';

/** What areas a ROC curve through one point can have. */
export interface RocAreas {
  /** Of any curve: sensitivity × specificity to 1 − (1 − sensitivity)(1 − specificity). */
  readonly any: Range;
  /** Of a concave curve, as of a sensible score: at least the mean of the two. */
  readonly concave: Range;
  /** Of the point alone, joined by straight lines (Cantor & Kattan 2000). */
  readonly oneCut: number;
}

/**
 * The areas that a ROC curve can have if it passes through a sensitivity and a
 * specificity, since it only rises: 0.9 and 0.9 allow 0.81 to 0.99, a concave curve 0.9
 * to 0.99. An area outside is not of the same score on the same people.
 */
export function rocAreas(sensitivity: number, specificity: number): Maybe<RocAreas> {
  const refusal = refuseShares({ sensitivity, specificity });
  if (refusal) return refusal;
  const high = sensitivity + specificity - sensitivity * specificity;
  const oneCut = (sensitivity + specificity) / 2;
  return {
    any: { low: sensitivity * specificity, high },
    concave: { low: oneCut, high },
    oneCut,
  };
}

/** The areas that any curve through rounded sensitivity and specificity can have. */
export function rocAreasOfRanges(sensitivity: Range, specificity: Range): Maybe<Range> {
  const least = rocAreas(sensitivity.low, specificity.low);
  const most = rocAreas(sensitivity.high, specificity.high);
  if (isAbsence(least)) return least;
  return isAbsence(most) ? most : { low: least.any.low, high: most.any.high };
}
