import type { Range } from '../../model/index.ts';
import type { Recomputation, Worked } from '../../report/recomputation.ts';
import { probabilityInWords, significant } from '../../report/worked-in-words.ts';
import { isAbsence } from '../../stats/absence.ts';
import { differenceAgreement } from '../../stats/agreement.ts';
import { type AucPrecision, aucPrecision } from '../../stats/auc.ts';
import { unrounded } from '../../stats/rounding.ts';
import { InputProblem, quoted } from './input-problem.ts';
import type { Typed } from './typed-number.ts';
import {
  numberInWords, reportedNumbers, resultInWords, type TypedResult, USUAL_LEVEL,
} from './typed-result.ts';

/** An area under the ROC curve with the sizes of the two groups. */
export interface TypedDiscrimination {
  readonly result: TypedResult;
  /** How many had the event, and how many had not. */
  readonly events?: number;
  readonly others?: number;
}

/** How sure an area under the ROC curve is, as far as its size and the group sizes tell. */
export function recomputeDiscrimination(typed: TypedDiscrimination): Recomputation {
  const { events, others } = typed;
  const result = asShares(typed.result);
  const { estimate, level = USUAL_LEVEL } = result;
  if (estimate === undefined || events === undefined || others === undefined) {
    throw new InputProblem('The area and the sizes of both groups are needed: type them such as '
      + 'recompute discrimination 0.78 --events 40 --others 120.');
  }
  const found = precisionAt(estimate.value, events, others, level);
  return {
    form: 'discrimination',
    understood: `${resultInWords(result)}, ${events} with and ${others} without the event`,
    outcome: 'not compared',
    answer: [
      `With groups of this size the ${level}% interval is about `
        + `${significant(found.interval.low, 3)} to ${significant(found.interval.high, 3)} `
        + `(standard error ${significant(found.standardError, 3)}).`,
      ...besidePrinted(result, found),
    ],
    groups: [{ label: 'from sizes', values: valuesOf(estimate, events, others, level) }],
    working: workingOf(estimate, events, others, found),
    perhaps: [],
    reservations: [
      'The formula assumes exponential scores; DeLong’s interval, from the data, is mostly 0.6 to '
        + '1.6 times as wide. The area is taken as found in these people, without correction for '
        + 'optimism.',
      'p is of an area of 0.5, no discrimination at all: a small one does not make a good model.',
    ],
    comment: '',
    sources: ['Hanley & McNeil 1982, Radiology 143:29. Largest standard error: Birnbaum & Klose '
      + '1957.'],
  };
}

/** "78%" as 0.78, for areas and limits alike. */
function asShares(result: TypedResult): TypedResult {
  const { estimate, lower, upper } = result;
  return {
    ...result,
    ...(estimate === undefined ? {} : { estimate: asShare(estimate) }),
    ...(lower === undefined ? {} : { lower: asShare(lower) }),
    ...(upper === undefined ? {} : { upper: asShare(upper) }),
  };
}

function asShare(number: Typed): Typed {
  const { value, decimals, percent } = number;
  if (!percent && value >= 0 && value <= 1) return number;
  if (percent && value >= 0 && value <= 100) {
    const [share, places] = [value / 100, decimals + 2];
    return { value: share, decimals: places, percent: false, plain: share.toFixed(places) };
  }
  throw new InputProblem(`An area under the ROC curve of ${quoted(numberInWords(number))} is not `
    + 'between 0 and 1: type it as 0.78 or 78%.');
}

function precisionAt(auc: number, events: number, others: number, level: number): AucPrecision {
  const found = aucPrecision(auc, events, others, level);
  if (!isAbsence(found)) return found;
  throw new InputProblem(`There is no standard error for an area of ${auc} with ${events} and `
    + `${others} people: the area must lie between 0 and 1, not on them, and each group hold `
    + 'somebody.');
}

/** The ranges over the areas that round to the printed one: its ends and itself. */
function valuesOf(
  estimate: Typed, events: number, others: number, level: number,
): readonly Worked[] {
  const { low, high } = unrounded(estimate);
  const areas = [low, estimate.value, high].filter((area) => area > 0 && area < 1);
  const all = areas.map((area) => precisionAt(area, events, others, level));
  const over = (of: (one: AucPrecision) => number): Range => {
    const values = all.map(of);
    return { low: Math.min(...values), high: Math.max(...values) };
  };
  const row = (quantity: string, of: (one: AucPrecision) => number, note?: string): Worked => ({
    quantity, unit: 'number', value: over(of), ...(note === undefined ? {} : { note }),
  });
  return [
    row('standard error', (one) => one.standardError),
    row('lower limit', (one) => one.interval.low, `${level}%`),
    row('upper limit', (one) => Math.min(1, one.interval.high), `${level}%`),
    row('largest standard error', (one) => one.largestStandardError, 'of any scores'),
    row('z', (one) => one.z, 'against 0.5'),
    { quantity: 'p', unit: 'probability', value: over((one) => one.p), note: 'two-sided, of 0.5' },
  ];
}

/** How a printed interval stands to the one from the sizes. */
function besidePrinted(result: TypedResult, { standardError }: AucPrecision): readonly string[] {
  if (result.lower === undefined) return [];
  const found = differenceAgreement(reportedNumbers(result));
  if (found.outcome !== 'within rounding' && found.outcome !== 'within another standard method') {
    return ['The printed interval is not centred on the area; one made on the logit scale or by '
      + 'bootstrap need not be.'];
  }
  const { low, high } = found.implied.standardError;
  const times = significant((low + high) / 2 / standardError, 2);
  return [`The printed interval stands for a standard error of ${significant(low, 3)} to `
    + `${significant(high, 3)}, ${times} times this one.`];
}

function workingOf(
  { plain }: Typed, events: number, others: number, found: AucPrecision,
): readonly string[] {
  const { q1, q2, standardError } = found;
  return [
    `Q1 is ${plain} / (2 − ${plain}) = ${significant(q1, 4)} and Q2 is 2 × ${plain}² / `
      + `(1 + ${plain}) = ${significant(q2, 4)}.`,
    `The standard error is √{[A(1 − A) + (${events} − 1)(Q1 − A²) + (${others} − 1)(Q2 − A²)] / `
      + `(${events} × ${others})} = ${significant(standardError, 4)}, where A is ${plain}.`,
    `Against an area of 0.5, whose standard error is ${significant(found.nullStandardError, 4)}, `
      + `z is ${significant(found.z, 3)} and the two-sided p `
      + `${probabilityInWords({ low: found.p, high: found.p })}.`,
  ];
}
