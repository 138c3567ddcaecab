import type { Range } from '../model/index.ts';
import { isAbsence } from './absence.ts';
import { isFeasible } from './feasible-region.ts';
import { strictlyImplied } from './implied.ts';
import { meet } from './ranges.ts';
import {
  stripsOf, type Reading, type ReportedNumbers, type ReportedP,
} from './reported-numbers.ts';
import { relatedValues } from './rounding.ts';
import { digitsOf, undoneSlips, type Slip, type Undone } from './slip.ts';
import type { Quantity } from './strip.ts';

/**
 * One slip that, undone, makes all printed numbers agree within rounding. A
 * candidate and never "the" correction: several slips often do.
 */
export interface Repair {
  readonly of: Quantity;
  readonly slip: Slip;
  /** As printed, in plain notation: "2.57". For swapped limits both: "0.90 to 0.58". */
  readonly printed: string;
  /** What would agree: "2.75". */
  readonly instead: string;
  /** All the numbers with the slip undone. */
  readonly numbers: ReportedNumbers;
}

/** The fields of the reported numbers that hold one printed number each. */
type Field = 'estimate' | 'lower' | 'upper' | 'p' | 'coefficient' | 'standardError' | 'z' | 'wald';

const FIELDS: readonly (readonly [Field, Quantity])[] = [
  ['estimate', 'estimate'],
  ['lower', 'lower'],
  ['upper', 'upper'],
  ['p', 'p'],
  ['coefficient', 'coefficient'],
  ['standardError', 'standard error'],
  ['z', 'z'],
  ['wald', 'Wald statistic'],
];

/** From the likeliest slip in copying numbers to the least (common practice, no measurement). */
const LIKELIHOOD: readonly Slip[] = [
  'limits swapped',
  'digits transposed',
  'digit changed',
  'digit doubled',
  'point moved',
  'digit lost',
  'sign lost',
];

/**
 * Every single slip in one printed number (or the limits exchanged) whose undoing makes
 * all numbers agree within rounding, likeliest first; among equals, the one nearest to
 * the middle of what the other numbers imply. None where the numbers agree already.
 */
export function repairs(numbers: ReportedNumbers, reading: Reading): readonly Repair[] {
  const strips = stripsOf(numbers, reading);
  if (isAbsence(strips) || isFeasible(strips)) return [];
  const single = FIELDS.flatMap(([field, of]) => {
    const implied = strictlyImplied(of, strips, reading);
    return implied === undefined ? [] : singleRepairs(numbers, field, of, implied, reading);
  });
  return [...swappedLimits(numbers, reading), ...single].sort(
    (one, other) => LIKELIHOOD.indexOf(one.slip) - LIKELIHOOD.indexOf(other.slip),
  );
}

/** The repairs of one number, nearest to the middle of what the others imply first. */
function singleRepairs(
  numbers: ReportedNumbers,
  field: Field,
  of: Quantity,
  implied: Range,
  reading: Reading,
): readonly Repair[] {
  const printed = numbers[field];
  if (printed === undefined) return [];
  const middle = (implied.low + implied.high) / 2;
  return undoneSlips(printed)
    .map((undone) => ({ undone, numbers: withValue(numbers, field, undone) }))
    .filter(({ undone }) => meet(valuesOf(numbers, field, undone), implied))
    .filter((candidate) => agrees(candidate.numbers, reading))
    .sort((one, other) => distance(one.undone, middle) - distance(other.undone, middle))
    .map(({ undone, numbers: repaired }) => ({
      of,
      slip: undone.slip,
      printed: digitsOf(printed) ?? '',
      instead: undone.text,
      numbers: repaired,
    }));
}

function distance({ value }: Undone, middle: number): number {
  return Number.isFinite(middle) ? Math.abs(value.value - middle) : 0;
}

function valuesOf(numbers: ReportedNumbers, field: Field, undone: Undone): Range {
  const relation = field === 'p' ? (numbers.p as ReportedP).relation : '=';
  return relatedValues(relation, undone.value);
}

function withValue(numbers: ReportedNumbers, field: Field, { value }: Undone): ReportedNumbers {
  return { ...numbers, [field]: { ...numbers[field], ...value } };
}

function swappedLimits(numbers: ReportedNumbers, reading: Reading): readonly Repair[] {
  const { lower, upper } = numbers;
  if (lower === undefined || upper === undefined) return [];
  const swapped = { ...numbers, lower: upper, upper: lower };
  if (!agrees(swapped, reading)) return [];
  const [first, second] = [digitsOf(lower) ?? '', digitsOf(upper) ?? ''];
  return [{
    of: 'lower',
    slip: 'limits swapped',
    printed: `${first} to ${second}`,
    instead: `${second} to ${first}`,
    numbers: swapped,
  }];
}

function agrees(numbers: ReportedNumbers, reading: Reading): boolean {
  const strips = stripsOf(numbers, reading);
  return !isAbsence(strips) && isFeasible(strips);
}
