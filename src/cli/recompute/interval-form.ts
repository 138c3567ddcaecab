import type { Recomputation, WorkedGroup } from '../../report/recomputation.ts';
import { workedInWords } from '../../report/worked-in-words.ts';
import { type Agreement, differenceAgreement } from '../../stats/agreement.ts';
import {
  agreementInWords, freerInWords, ratioAgreement, reconcilingInWords,
} from './agreement-words.ts';
import { fromLimits, fromP } from './by-hand.ts';
import { InputProblem, quoted } from './input-problem.ts';
import { FROM_OTHERS, impliedGroups, type TypedScale } from './together.ts';
import { finite } from './typed-number.ts';
import {
  numberInWords, reportedNumbers, resultInWords, type TypedResult, USUAL_LEVEL,
} from './typed-result.ts';

const FROM_LIMITS = 'p from an interval: Altman & Bland 2011, BMJ 343:d2304.';
const FROM_P = 'An interval from p: Altman & Bland 2011, BMJ 343:d2090.';

/** An estimate with its limits and its p: whether they agree, and what they imply. */
export function recomputeInterval(
  result: TypedResult, form: 'ratio' | 'difference',
): Recomputation {
  refuseTooFew(result);
  if (result.estimate !== undefined) finite('estimate', result.estimate);
  if (form === 'ratio') refusePercent(result);
  const scale = form === 'ratio' ? 'log' : 'difference';
  const numbers = reportedNumbers(result);
  const found = form === 'ratio' ? ratioAgreement(numbers, result.name)
    : differenceAgreement(numbers);
  const understood = resultInWords(result);
  const groups = impliedGroups(found, numbers, { scale, name: result.name, unit: unitOf(result) });
  const byLimits = fromLimits(result, scale);
  const byP = fromP(result, scale);
  return {
    form,
    understood,
    outcome: found.outcome,
    answer: agreementInWords(found, readingInWords(result)),
    groups,
    working: [...byLimits, ...byP],
    perhaps: [
      ...reconcilingInWords(found), ...(form === 'ratio' ? freerInWords(found, numbers) : []),
    ],
    reservations: reservationsOf(result, scale),
    comment: commentOn(found, groups, understood, methodsOf(result)),
    sources: [...(byLimits.length > 0 ? [FROM_LIMITS] : []), ...(byP.length > 0 ? [FROM_P] : [])],
  };
}

/** Differences of percentages are told in percent. */
function unitOf({ estimate, lower }: TypedResult): 'percent' | 'number' {
  return (estimate ?? lower)?.percent === true ? 'percent' : 'number';
}

function refusePercent({ estimate, lower, upper }: TypedResult): void {
  const percent = [estimate, lower, upper].find((number) => number?.percent);
  if (percent === undefined) return;
  throw new InputProblem(`${quoted(numberInWords(percent))} is no ratio: type ratios as they are, `
    + 'such as 1.59, and a difference in percent behind recompute RD.');
}

function refuseTooFew({ name, estimate, lower, p }: TypedResult): void {
  if (lower !== undefined || (estimate !== undefined && p !== undefined)) return;
  throw new InputProblem(`One number of a ${name} can be compared with nothing: add its limits, `
    + 'such as 1.59 1.05 2.41, or its p-value with --p.');
}

/** "an estimate with its 95% interval and a two-sided p". */
function readingInWords({ level = USUAL_LEVEL, lower, p }: TypedResult): string {
  const interval = lower === undefined ? '' : ` with its ${level}% interval`;
  const sides = p?.oneSided === true ? 'one-sided' : 'two-sided';
  const test = p === undefined ? '' : `${interval === '' ? ' with' : ' and'} a ${sides} p`;
  return `an estimate${interval}${test}`;
}

const SMALL_GROUPS = 'With fewer than about 60 people in a group an interval of means is made with '
  + 't instead of z, which makes the standard error smaller than given here.';

function reservationsOf({ name, level, lower }: TypedResult, scale: TypedScale): readonly string[] {
  return [
    ...(lower !== undefined && level === undefined
      ? ['No level was typed, so that 95% was taken (--level).'] : []),
    ...(scale === 'log'
      ? ['The standard method makes the interval on the log scale. Numbers that agree are not '
        + 'thereby right.'] : []),
    ...(scale === 'log' || name === 'RD' ? [] : [SMALL_GROUPS]),
  ];
}

/** A question to the authors where the numbers disagree, with what the others would make them. */
export function commentOn(
  found: Agreement, groups: readonly WorkedGroup[], understood: string, methods: string,
): string {
  if (found.outcome !== 'neither') return '';
  const [first, second] = groups.filter(({ label }) => label === FROM_OTHERS)
    .flatMap(({ values }) => values)
    .map((value) => `the ${value.quantity} would be ${workedInWords(value)}`);
  const implied = first === undefined ? ''
    : `; by the other numbers ${first}${second === undefined ? '' : `, or else ${second}`}`;
  return `For “${understood}”: these numbers do not follow from one another, whatever their `
    + `rounding${implied}. Could the authors check them against the output of the analysis, or say `
    + `by which ${methods}?`;
}

function methodsOf({ lower, p }: TypedResult): string {
  if (lower === undefined) return 'test the p-value was made';
  return p === undefined ? 'method the interval was made'
    : 'methods interval and p-value were made';
}
