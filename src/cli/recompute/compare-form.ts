import type { Range } from '../../model/index.ts';
import type { Recomputation, Worked } from '../../report/recomputation.ts';
import { probabilityInWords, significant, valueInWords } from '../../report/worked-in-words.ts';
import { isAbsence } from '../../stats/absence.ts';
import { agreement } from '../../stats/agreement.ts';
import type { Implied } from '../../stats/implied.ts';
import {
  type Interaction, interactionOf, interactionOfRanges, type InteractionRanges, type LogRatio,
  logRatioFromLimits,
} from '../../stats/interaction.ts';
import { InputProblem } from './input-problem.ts';
import { finite } from './typed-number.ts';
import { reportedNumbers, resultInWords, type TypedResult, USUAL_LEVEL } from './typed-result.ts';

/** Two ratios of separate groups: their ratio, and whether they differ. */
export function recomputeComparison(one: TypedResult, other: TypedResult): Recomputation {
  const pair = [impliedBy(one, 'first'), impliedBy(other, 'second')] as const;
  const ranges = interactionOfRanges(...pair);
  if (isAbsence(ranges)) throw new InputProblem(`The two cannot be compared: ${ranges.because}.`);
  const level = one.level ?? USUAL_LEVEL;
  const logs = logRatiosOf(one, other);
  const found = logs === undefined ? undefined : interactionOf(...logs, level);
  const exact = found === undefined || isAbsence(found) ? undefined : found;
  return {
    form: 'compare',
    understood: `${resultInWords(one)} against ${resultInWords(other)}`,
    outcome: 'not compared',
    answer: [exact === undefined ? answerInRanges(ranges) : answerOf(exact, level)],
    groups: [{ label: 'as ranges', values: valuesOf(ranges, limitsOver(...pair, level), level) }],
    working: logs === undefined || exact === undefined ? []
      : workingOf([one, other], logs, exact, level),
    perhaps: [],
    reservations: RESERVATIONS,
    comment: '',
    sources: ['Altman & Bland 2003, BMJ 326:219.'],
  };
}

const RESERVATIONS = [
  'The two estimates must share nobody: not two arms against one control group, and no outcomes '
    + 'of the same people. The interaction term of one adjusted model differs a little.',
  'That one is significant and the other not does not show that they differ; nor do intervals '
    + 'that overlap show that they do not.',
];

function answerInRanges({ ratio, p }: InteractionRanges): string {
  return `The ratio of the two is ${valueInWords(ratio, 'number')}; p for a difference is `
    + `${probabilityInWords(p)}.`;
}

function answerOf({ ratio, interval, log }: Interaction, level: number): string {
  return `The first is ${significant(ratio, 3)} times the second (${level}% CI `
    + `${significant(interval.low, 3)} to ${significant(interval.high, 3)}); p for a difference is `
    + `${exactP(log.p)}.`;
}

function exactP(p: number): string {
  return probabilityInWords({ low: p, high: p });
}

function valuesOf(
  { ratio, z, p }: InteractionRanges, [lower, upper]: readonly Range[], level: number,
): readonly Worked[] {
  return [
    { quantity: 'ratio of the two', unit: 'number', value: ratio },
    ...limitRow('lower limit', lower, level),
    ...limitRow('upper limit', upper, level),
    { quantity: 'z', unit: 'number', value: z },
    { quantity: 'p', unit: 'probability', value: p, note: 'two-sided' },
  ];
}

function limitRow(quantity: string, value: Range | undefined, level: number): readonly Worked[] {
  return value === undefined ? [] : [{ quantity, unit: 'number', value, note: `${level}%` }];
}

/** What a result's own numbers imply, or a sentence on why it cannot be compared. */
function impliedBy(result: TypedResult, which: string): Implied {
  if (result.lower === undefined && result.p === undefined) {
    throw new InputProblem(`The ${which} estimate has no limits: type all three numbers of each, `
      + 'such as recompute compare 0.67 0.46 0.98 with 0.88 0.71 1.08.');
  }
  if (result.estimate !== undefined) finite(`${which} estimate`, result.estimate);
  const found = agreement(reportedNumbers(result));
  switch (found.outcome) {
    case 'within rounding':
    case 'within another standard method': return found.implied;
    case 'neither': throw new InputProblem(`The numbers of the ${which}, ${resultInWords(result)}, `
      + 'do not agree with each other, so they cannot be compared: look at them with tallystick '
      + 'recompute ratio.');
    case 'cannot tell': throw new InputProblem(`The ${which} cannot be compared: `
      + `${found.because}.`);
    default: return found satisfies never;
  }
}

/** Both from the numbers exactly as printed, as in the source; nothing where one is missing. */
function logRatiosOf(
  one: TypedResult, other: TypedResult,
): readonly [LogRatio, LogRatio] | undefined {
  const [first, second] = [one, other].map(({ estimate, lower, upper, level = USUAL_LEVEL }) => {
    if (estimate === undefined || lower === undefined || upper === undefined) return undefined;
    return logRatioFromLimits(estimate.value, { low: lower.value, high: upper.value }, level);
  });
  if (first === undefined || second === undefined) return undefined;
  return isAbsence(first) || isAbsence(second) ? undefined : [first, second];
}

/**
 * The ranges of the two limits. A limit rises with the difference and moves one way with the
 * standard errors, so its ends are those of the four corners.
 */
function limitsOver(first: Implied, second: Implied, level: number): readonly Range[] {
  const corners = ([['low', 'high'], ['high', 'low']] as const).flatMap(([from, less]) =>
    (['low', 'high'] as const).map((spread) => interactionOf(
      { logRatio: first.logEstimate[from], standardError: first.standardError[spread] },
      { logRatio: second.logEstimate[less], standardError: second.standardError[spread] }, level)));
  const found = corners.flatMap((corner) => (isAbsence(corner) ? [] : [corner.interval]));
  if (found.length < corners.length) return [];
  return [found.map(({ low }) => low), found.map(({ high }) => high)]
    .map((ends) => ({ low: Math.min(...ends), high: Math.max(...ends) }));
}

function workingOf(
  [one, other]: readonly [TypedResult, TypedResult],
  [first, second]: readonly [LogRatio, LogRatio],
  { ratio, interval, log, oneSidedP }: Interaction,
  level: number,
): readonly string[] {
  const [s1, s2] = [significant(first.standardError, 4), significant(second.standardError, 4)];
  const [d, s] = [significant(log.estimate, 4), significant(log.standardError, 4)];
  return [
    `The standard errors of the logs, from the limits, are ${s1} and ${s2}.`,
    `The logs differ by ln ${one.estimate?.plain} − ln ${other.estimate?.plain} = ${d}, with a `
      + `standard error of √(${s1}² + ${s2}²) = ${s}.`,
    `z is ${d} / ${s} = ${significant(log.z, 3)}, and its two-sided p ${exactP(log.p)} (one-sided, `
      + `in the direction seen, ${exactP(oneSidedP)}).`,
    `The ratio of the two is exp(${d}) = ${significant(ratio, 3)}, with a ${level}% interval of `
      + `${significant(interval.low, 3)} to ${significant(interval.high, 3)}.`,
  ];
}
