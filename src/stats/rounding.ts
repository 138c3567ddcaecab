import type { Printed, Range, Relation } from '../model/index.ts';
import { absence, type Absence, type Maybe } from './absence.ts';

/** What of a printed number matters for arithmetic: its value and its last decimal place. */
export type PrintedValue = Pick<Printed, 'value' | 'decimals'>;

/** Whether these can be the value and last place of a printed number: not NaN, whole decimals. */
export function isPrintedValue({ value, decimals }: PrintedValue): boolean {
  return !Number.isNaN(value) && Number.isInteger(decimals) && Math.abs(decimals) <= 400;
}

/** Refuses what is no printed number, by the names a reader knows them by. */
export function refuseUnprinted(
  numbers: Readonly<Record<string, PrintedValue>>,
): Absence | undefined {
  const misfit = Object.entries(numbers).find(([, printed]) => !isPrintedValue(printed));
  return misfit && absence(`the ${misfit[0]} is not a number`);
}

/**
 * How the digits on the page came about. Rounding to nearest is what nearly all
 * software does; numbers cut off after the last digit, and numbers rounded a
 * second time from a table that was itself rounded, are met as well.
 */
export type Rounding = 'to nearest' | 'cut off' | 'twice';

/**
 * Room for the binary representation of decimal fractions: a few units in the
 * last place of a double, far below any digit that is ever printed.
 */
const SLACK = 2 ** -48;

/**
 * Every value that could have been rounded to the number on the page.
 *
 * "0.72" stands for 0.715 to 0.725. Both ends are included because software
 * differs on halves: some rounds them up, some to the even digit. An infinite
 * number stands for itself; NaN throws, since no printed number is NaN.
 */
export function unrounded(printed: PrintedValue): Range {
  return withinLastPlace(printed, 0.5, 0.5);
}

/**
 * Every value whose digits, cut off instead of rounded, give the number on the
 * page: "0.72" stands for 0.72 to 0.73, and "−0.72" for −0.73 to −0.72. A
 * milder reading than `unrounded`, to be tried when that one fails.
 */
export function uncut(printed: PrintedValue): Range {
  const negative = printed.value < 0 || Object.is(printed.value, -0);
  return negative ? withinLastPlace(printed, 1, 0) : withinLastPlace(printed, 0, 1);
}

/**
 * Every value that rounding twice, first to one decimal more, could bring to the
 * number on the page: "0.72" stands for 0.7145 to 0.7255 (0.7145 → 0.715 → 0.72).
 */
export function unroundedTwice(printed: PrintedValue): Range {
  return withinLastPlace(printed, 0.55, 0.55);
}

/** Every value that the number on the page stands for under the given rounding. */
export function valuesBehind(printed: PrintedValue, rounding: Rounding): Range {
  switch (rounding) {
    case 'to nearest':
      return unrounded(printed);
    case 'cut off':
      return uncut(printed);
    case 'twice':
      return unroundedTwice(printed);
    default:
      return rounding satisfies never;
  }
}

/**
 * The probabilities that a printed p-value with its relation stands for: "= 0.03"
 * for 0.025 to 0.035, "< 0.001" for 0 to 0.001, "> 0.99" for 0.99 to 1. A number
 * that stands for no probability, such as 1.2, has no answer.
 */
export function probabilitiesBehind(
  relation: Relation,
  printed: PrintedValue,
  rounding: Rounding = 'to nearest',
): Maybe<Range> {
  const refusal = refuseUnprinted({ 'p-value': printed });
  if (refusal) return refusal;
  const { low, high } = relatedValues(relation, printed, rounding);
  if (!(low <= 1 && high >= 0)) return absence(`${printed.value} is not a probability`);
  return { low: Math.max(0, low), high: Math.min(1, high) };
}

/** The values that stand in the relation to the printed number: "≤ 2" for all up to 2. */
export function relatedValues(
  relation: Relation,
  printed: PrintedValue,
  rounding: Rounding = 'to nearest',
): Range {
  const { value } = printed;
  switch (relation) {
    case '=':
      return valuesBehind(printed, rounding);
    case '<':
    case '<=':
      return { low: -Infinity, high: value };
    case '>':
    case '>=':
      return { low: value, high: Infinity };
    default:
      return relation satisfies never;
  }
}

function withinLastPlace({ value, decimals }: PrintedValue, below: number, above: number): Range {
  if (Number.isNaN(value)) throw new RangeError('a printed number cannot be NaN');
  if (!Number.isFinite(value)) return { low: value, high: value };
  const place = 10 ** -decimals;
  const slack = SLACK * (Math.abs(value) + place);
  return { low: value - below * place - slack, high: value + above * place + slack };
}
