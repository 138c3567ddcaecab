import type { Range } from '../../model/index.ts';
import type { Recomputation, Worked } from '../../report/recomputation.ts';
import { probabilityInWords, significant, valueInWords } from '../../report/worked-in-words.ts';
import { isAbsence } from '../../stats/absence.ts';
import { differenceAgreement } from '../../stats/agreement.ts';
import { type CoefficientRow, coefficientRow } from '../../stats/coefficient-row.ts';
import { estimatedFrom } from '../../stats/estimated.ts';
import { exponentials } from '../../stats/ranges.ts';
import type { ReportedNumbers } from '../../stats/reported-numbers.ts';
import { unrounded } from '../../stats/rounding.ts';
import {
  agreementInWords, freerInWords, ratioAgreement, reconcilingInWords,
} from './agreement-words.ts';
import { fromLimits } from './by-hand.ts';
import { InputProblem } from './input-problem.ts';
import { commentOn } from './interval-form.ts';
import { impliedGroups } from './together.ts';
import { finite, type Typed } from './typed-number.ts';
import {
  numberInWords, pInWords, reportedNumbers, resultInWords, type TypedResult, USUAL_LEVEL,
} from './typed-result.ts';

/** What is typed of a coefficient's row in a table of a regression. */
export interface TypedCoefficient {
  readonly coefficient: Typed;
  readonly standardError?: Typed;
  readonly z?: Typed;
  readonly wald?: Typed;
  /** The printed exp(b) with its limits. */
  readonly ratio?: TypedResult;
  /** Limits of the coefficient itself, with the level and the p of the row. */
  readonly row: TypedResult;
}

/** The row of a regression coefficient: what it gives as a ratio, and whether it agrees. */
export function recomputeCoefficient(typed: TypedCoefficient): Recomputation {
  const { row, coefficient, standardError, ratio } = typed;
  finite('coefficient', coefficient);
  const level = row.level ?? USUAL_LEVEL;
  if (row.lower !== undefined && ratio !== undefined) {
    throw new InputProblem('Type either the limits of the coefficient or, with --ratio, those of '
      + 'the ratio: not both.');
  }
  const numbers = numbersOf(typed);
  const scale = row.lower === undefined ? 'log' : 'difference';
  const found = scale === 'log' ? ratioAgreement(numbers, 'coefficient')
    : differenceAgreement(numbers);
  const understood = understoodAs(typed);
  const implied = impliedGroups(found, numbers, { scale, name: 'coefficient', unit: 'number' });
  return {
    form: 'coefficient',
    understood,
    outcome: isAlone(typed) ? 'not compared' : found.outcome,
    answer: isAlone(typed)
      ? ['A coefficient alone gives its ratio; add --se for the rest.']
      : agreementInWords(found, 'the row of a regression coefficient'),
    groups: [
      { label: 'as a ratio', values: asRatio(typed, level) },
      ...implied,
    ],
    working: [...workingOf(coefficient, standardError, level), ...fromLimits(row, 'difference')],
    perhaps: isAlone(typed) ? []
      : [...reconcilingInWords(found), ...(scale === 'log' ? freerInWords(found, numbers) : [])],
    reservations: [ONLY_LOG_MODELS],
    comment: commentOn(found, implied, understood, 'methods they were made'),
    sources: ['Wald’s interval and test; by hand as in Altman & Bland 2011, BMJ 343:d2304.'],
  };
}

/** Whether there is nothing to hold the coefficient against. */
function isAlone({ standardError, z, wald, ratio, row }: TypedCoefficient): boolean {
  return [standardError, z, wald, ratio, row.lower, row.p].every((other) => other === undefined);
}

const ONLY_LOG_MODELS = 'The coefficient is taken to be a log odds, log hazard or log rate, as of '
  + 'logistic, Cox and Poisson models; in linear regression exp(b) has no meaning. With few '
  + 'degrees of freedom t takes the place of z.';

function numbersOf(typed: TypedCoefficient): ReportedNumbers {
  const { coefficient, standardError, z, wald, ratio, row } = typed;
  const limits = reportedNumbers(row.lower === undefined ? ratio ?? { name: '' } : row);
  const own = row.lower === undefined ? { coefficient } : { estimate: coefficient };
  return {
    ...limits,
    ...own,
    ...(standardError === undefined ? {} : { standardError }),
    ...(z === undefined ? {} : { z }),
    ...(wald === undefined ? {} : { wald }),
    ...(row.level === undefined ? {} : { level: row.level }),
    ...pOf(row),
  };
}

function pOf(row: TypedResult): Pick<ReportedNumbers, 'p'> {
  const { p } = reportedNumbers(row);
  return p === undefined ? {} : { p };
}

function understoodAs(typed: TypedCoefficient): string {
  const { coefficient, standardError, z, wald, ratio, row } = typed;
  const limits = row.lower === undefined || row.upper === undefined ? ''
    : ` (${row.level ?? USUAL_LEVEL}% CI ${row.lower.plain} to ${row.upper.plain})`;
  return [
    `coefficient ${numberInWords(coefficient)}${limits}`,
    ...(standardError === undefined ? [] : [`SE ${standardError.plain}`]),
    ...(z === undefined ? [] : [`z ${z.plain}`]),
    ...(wald === undefined ? [] : [`Wald ${wald.plain}`]),
    ...(row.p === undefined ? [] : [pInWords(row.p)]),
    ...(ratio === undefined ? []
      : [resultInWords({ ...ratio, ...(row.level === undefined ? {} : { level: row.level }) })]),
  ].join(', ');
}

function asRatio(
  { coefficient, standardError, row }: TypedCoefficient, level: number,
): readonly Worked[] {
  const found = coefficientRow(coefficient, standardError, level);
  if (isAbsence(found)) throw new InputProblem(`This row gives no answer: ${found.because}.`);
  const { lower, upper } = limitsOf(found, row);
  return [
    number('ratio exp(b)', found.ratio),
    ...(lower === undefined || upper === undefined ? [] : [
      number('lower limit', lower, `${level}%`), number('upper limit', upper, `${level}%`),
    ]),
    ...(found.wald === undefined ? [] : [number('Wald statistic', found.wald, '(b / SE)²')]),
    ...(found.p === undefined ? []
      : [{ quantity: 'p', unit: 'probability', value: found.p, note: 'two-sided' } as const]),
  ];
}

/** The limits of the ratio: of those of the coefficient where they are typed, or by Wald. */
function limitsOf(
  found: CoefficientRow, { lower, upper }: TypedResult,
): Pick<CoefficientRow, 'lower' | 'upper'> {
  if (lower === undefined || upper === undefined) return found;
  return { lower: exponentials(unrounded(lower)), upper: exponentials(unrounded(upper)) };
}

function number(quantity: string, value: Range, note?: string): Worked {
  return { quantity, unit: 'number', value, ...(note === undefined ? {} : { note }) };
}

function workingOf(
  coefficient: Typed, standardError: Typed | undefined, level: number,
): readonly string[] {
  const b = coefficient.plain;
  const ratio = `The ratio is exp(${b}) = ${significant(Math.exp(coefficient.value), 4)}`;
  if (standardError === undefined) return [`${ratio}.`];
  const s = standardError.plain;
  const exact = estimatedFrom(coefficient.value, standardError.value, level);
  const row = coefficientRow(coefficient, standardError, level);
  if (isAbsence(exact) || isAbsence(row) || row.p === undefined) return [`${ratio}.`];
  const reach = ((exact.interval.high - exact.estimate) / exact.standardError).toFixed(3);
  const { low, high } = exact.interval;
  return [
    `${ratio}, with a ${level}% interval of exp(${b} ± ${reach} × ${s}) = `
      + `${significant(Math.exp(low), 4)} to ${significant(Math.exp(high), 4)}.`,
    `z is ${b} / ${s} = ${significant(exact.z, 3)}, its square, the Wald statistic, `
      + `${significant(exact.z ** 2, 3)}, and the two-sided p `
      + `${probabilityInWords({ low: exact.p, high: exact.p })}, or ${probabilityInWords(row.p)} `
      + `for all numbers that round to these (the ratio: ${valueInWords(row.ratio, 'number')}).`,
  ];
}
