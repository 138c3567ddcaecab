import { probabilityInWords, significant, valueInWords } from '../../report/worked-in-words.ts';
import { isAbsence } from '../../stats/absence.ts';
import { altmanBlandP } from '../../stats/altman-bland.ts';
import { intervalFromP, workedOut, workedOutRanges } from '../../stats/interval-arithmetic.ts';
import { multiplier } from '../../stats/normal.ts';
import type { TypedScale } from './together.ts';
import type { Typed } from './typed-number.ts';
import { numberInWords, type TypedResult, USUAL_LEVEL } from './typed-result.ts';

/*
 * The arithmetic as a reader does it with a calculator, in sentences that stand by
 * themselves: from the numbers as printed, and beside each answer the range of it over all
 * numbers that round to the printed ones.
 */

/** Standard error, middle, z and p from an estimate with its limits. */
export function fromLimits(result: TypedResult, scale: TypedScale): readonly string[] {
  const { estimate, lower, upper, level = USUAL_LEVEL } = result;
  if (lower === undefined || upper === undefined) return [];
  const centre = estimate ?? lower;
  const limits = { low: lower.value, high: upper.value };
  const exact = workedOut(scale, centre.value, limits, level);
  const ranges = workedOutRanges(scale, centre, lower, upper, level);
  const reach = multiplier(level);
  if (isAbsence(exact) || isAbsence(ranges) || isAbsence(reach)) return [];
  const [l, u] = [lower, upper].map((limit) => onScale(limit, scale));
  const mark = lower.percent ? '%' : '';
  const error = `${significant(exact.standardError, 4)}${mark}`;
  const unit = lower.percent ? 'percent' : 'number';
  return [
    `The standard error of the ${whatOf(result, scale)} is the width of the ${level}% interval `
      + `over twice ${reach.toFixed(3)}: (${u} − ${l}) / ${(2 * reach).toFixed(3)} = ${error}, or `
      + `${valueInWords(ranges.standardError, unit)} for all limits that round to these.`,
    middleSentence(result, scale, exact.midpoint, valueInWords(ranges.midpoint, unit)),
    ...(estimate === undefined ? [] : [
      `z is ${onScale(estimate, scale)} / ${error} = ${significant(exact.z, 3)}, and its two-sided `
        + `p is ${probabilityInWords({ low: exact.p, high: exact.p })}, or `
        + `${probabilityInWords(ranges.p)} allowing for rounding${handFormula(exact.z)}.`,
    ]),
  ];
}

function middleSentence(
  { estimate, lower, upper }: TypedResult, scale: TypedScale, midpoint: number, range: string,
): string {
  const [l, u] = [lower, upper].map((limit) => (limit === undefined ? '' : signed(limit)));
  const made = scale === 'log' ? `√(${l} × ${u})` : `(${l} + ${u}) / 2`;
  const printed = estimate === undefined ? '' : `; ${numberInWords(estimate)} is printed`;
  const on = scale === 'log' ? ' on the log scale' : '';
  return `The middle of the limits${on} is ${made} = ${significant(midpoint, 4)}, or ${range} `
    + `allowing for rounding${printed}.`;
}

/** Altman & Bland's formula for pocket calculators, as far as it is as good as exact. */
function handFormula(z: number): string {
  const p = altmanBlandP(Math.abs(z));
  return isAbsence(p) || Math.abs(z) > 4 ? ''
    : ` (by the formula exp(−0.717z − 0.416z²): ${significant(p, 2)})`;
}

/** The standard error and the interval from an estimate and its exact p. */
export function fromP(result: TypedResult, scale: TypedScale): readonly string[] {
  const { estimate, p, level = USUAL_LEVEL } = result;
  if (estimate === undefined || p === undefined || p.relation !== '=') return [];
  const twoSided = p.oneSided ? 2 * p.printed.value : p.printed.value;
  const found = intervalFromP(scale, estimate.value, twoSided, level);
  if (isAbsence(found)) return [];
  const { low, high } = found.interval;
  const doubled = p.oneSided ? ', which is two-sided ' + significant(twoSided, 2) : '';
  return [
    `From the estimate and p = ${p.printed.plain} alone${doubled}: z is `
      + `${significant(found.z, 3)}, the standard error |${onScale(estimate, scale)}| / `
      + `${significant(found.z, 3)} = ${significant(found.standardError, 4)}, and the ${level}% `
      + `interval ${significant(low, 3)} to ${significant(high, 3)}.`,
  ];
}

function onScale(number: Typed, scale: TypedScale): string {
  return scale === 'log' ? `ln ${numberInWords(number)}` : signed(number);
}

/** A negative number in brackets, so that it can stand behind a sign. */
function signed(number: Typed): string {
  return number.value < 0 ? `(${numberInWords(number)})` : numberInWords(number);
}

function whatOf({ name }: TypedResult, scale: TypedScale): string {
  return scale === 'log' ? `log ${name}` : name;
}
