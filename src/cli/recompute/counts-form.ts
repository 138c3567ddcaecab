import type { Range } from '../../model/index.ts';
import type { Recomputation, Worked, WorkedGroup } from '../../report/recomputation.ts';
import {
  probabilityInWords, significant, valueInWords, workedInWords,
} from '../../report/worked-in-words.ts';
import { isAbsence, type Maybe } from '../../stats/absence.ts';
import { type AssociationTests, associationTests } from '../../stats/association-tests.ts';
import { crudeRatios } from '../../stats/crude-ratio.ts';
import type { Estimated } from '../../stats/estimated.ts';
import { fisherExact } from '../../stats/fisher-exact.ts';
import { numberNeeded, numberNeededInterval } from '../../stats/number-needed-to-treat.ts';
import { oddsRatio } from '../../stats/odds-ratio.ts';
import { wilsonInterval } from '../../stats/proportion-interval.ts';
import { newcombeInterval, riskDifference } from '../../stats/risk-difference.ts';
import { scoreIntervalOfDifference } from '../../stats/score-interval.ts';
import { riskRatio } from '../../stats/risk-ratio.ts';
import { tableFromTotals, type TwoByTwo } from '../../stats/two-by-two.ts';
import {
  commentOn, countInWords, outcomeOf, percentsBeside, ratioBeside, waldName,
} from './beside-counts.ts';
import { InputProblem } from './input-problem.ts';
import type { TypedCount } from './typed-count.ts';
import { resultInWords, type TypedResult, USUAL_LEVEL } from './typed-result.ts';

/** What can be worked out from the events and totals of two groups. */
export interface TypedCounts {
  readonly groups: readonly [TypedCount, TypedCount];
  readonly level?: number;
  /** A crude ratio printed beside the counts, to be held against them. */
  readonly printed?: TypedResult;
}

/** Two groups by their events and totals: risks, crude ratios, difference, tests. */
export function recomputeCounts(typed: TypedCounts): Recomputation {
  const { groups: [one, other], level = USUAL_LEVEL } = typed;
  const table = tableFromTotals(one.events, one.total, other.events, other.total);
  if (isAbsence(table)) throw new InputProblem(`${sentence(table.because)} Check the counts.`);
  const understood = [`${countInWords(one)} against ${countInWords(other)}`,
    ...(typed.printed === undefined ? [] : [resultInWords(typed.printed)])].join('; ');
  const beside = [...percentsBeside([one, other]), ...ratioBeside(table, typed.printed, level)];
  return {
    form: 'counts',
    understood,
    outcome: outcomeOf(beside),
    answer: [summary(table, typed, level), ...beside.map(({ sentence: said }) => said)],
    groups: [
      {
        label: 'risks',
        values: [risk('first group', one, level), risk('second group', other, level)],
      },
      ratios('odds ratio', 'OR', table, level),
      ratios('risk ratio', 'RR', table, level),
      { label: 'difference', values: differences(table, level) },
      { label: 'tests', values: tests(table) },
    ].filter(({ values }) => values.length > 0),
    working: workingOf(one, other, table, level),
    perhaps: [],
    reservations: reservationsOf(table),
    comment: commentOn(understood, beside),
    sources: SOURCES,
  };
}

const SOURCES = [
  'Odds ratio: Woolf 1955; exact and mid-P: conditional likelihood. Risk ratio: Katz et al. 1978. '
    + 'Score intervals: Miettinen & Nurminen 1985.',
  'Single risks: Wilson 1927. Difference: Newcombe 1998, method 10. Number needed to treat: '
    + 'Altman 1998, BMJ 317:1309.',
  'Tests: Pearson 1900; Fisher 1935 (sum of the tables no more probable); Yates 1934.',
];

function sentence(clause: string): string {
  return `${clause.charAt(0).toUpperCase()}${clause.slice(1)}.`;
}

function summary(table: TwoByTwo, { groups: [one, other] }: TypedCounts, level: number): string {
  const exact = fisherExact(table);
  const [first, second] = [one, other].map(({ events, total }) =>
    valueInWords({ low: events / total, high: events / total }, 'share'));
  const [newcombe] = differences(table, level);
  const apart = newcombe === undefined ? '' : `, a difference of ${workedInWords(newcombe)}`;
  const p = isAbsence(exact) ? '' : `; Fisher’s exact p is ${exactP(exact.twoSided)}`;
  return `The risks are ${first} and ${second}${apart}${p}.`;
}

function exactP(p: number): string {
  return probabilityInWords({ low: p, high: p });
}

function risk(quantity: string, { events, total }: TypedCount, level: number): Worked {
  const share = events / total;
  const limits = wilsonInterval(events, total, level);
  return {
    quantity,
    unit: 'share',
    value: { low: share, high: share },
    ...(isAbsence(limits) ? {} : { interval: { limits, level } }),
    method: 'Wilson',
  };
}

/** A ratio by every usual method. */
function ratios(label: string, measure: 'OR' | 'RR', table: TwoByTwo, level: number): WorkedGroup {
  return {
    label,
    values: crudeRatios(measure, table, level).map(({ method, ratio, interval }) => ({
      quantity: method === 'Wald' ? waldName(measure) : method,
      unit: 'number',
      value: { low: ratio, high: ratio },
      interval: { limits: interval, level },
      ...(method === 'exact' || method === 'mid-P' ? { note: 'conditional' } : {}),
    })),
  };
}

function differences(table: TwoByTwo, level: number): readonly Worked[] {
  const wald = riskDifference(table, level);
  if (isAbsence(wald)) return [];
  const newcombe = newcombeInterval(table, level);
  const score = scoreIntervalOfDifference(table, level);
  const value = { low: wald.difference, high: wald.difference };
  const row = (quantity: string, limits: Maybe<Range>): readonly Worked[] =>
    (isAbsence(limits) ? [] : [{ quantity, unit: 'share', value, interval: { limits, level } }]);
  return [
    ...row('Newcombe', newcombe),
    ...row('Wald', wald.interval),
    ...row('score', score),
    ...(isAbsence(newcombe) ? [] : numberNeededRow(wald.difference, newcombe, level)),
  ];
}

/** The number needed to treat, in words, since its interval may run through infinity. */
function numberNeededRow(difference: number, limits: Range, level: number): readonly Worked[] {
  const needed = numberNeeded(-difference);
  const interval = numberNeededInterval({ low: -limits.high, high: -limits.low });
  if (isAbsence(needed) || isAbsence(interval)) return [];
  const who = needed.direction === 'benefit' ? 'fewer' : 'more';
  const say = (number: number): string => significant(number, 3);
  const ends = interval.kind === 'one stretch'
    ? `${level}% limits ${say(interval.range.low)} to ${say(interval.range.high)}`
    : `${level}% limits from ${say(interval.benefitFrom)} for one event fewer, through `
      + `infinity, to ${say(interval.harmFrom)} for one more`;
  return [{
    quantity: 'number needed', unit: 'number', value: { low: needed.number, high: needed.number },
    note: `${who} events in the first group; ${ends}`,
  }];
}

function tests(table: TwoByTwo): readonly Worked[] {
  const large = associationTests(table);
  const exact = fisherExact(table);
  const p = (quantity: string, value: number, note?: string): Worked => ({
    quantity, unit: 'probability', value: { low: value, high: value },
    ...(note === undefined ? {} : { note }),
  });
  return [
    ...(isAbsence(exact) ? [] : [p('Fisher exact', exact.twoSided), p('mid-P', exact.midP)]),
    ...(isAbsence(large) ? [] : largeTests(large).map(([name, { chiSquare, p: value }]) =>
      p(name, value, `χ² ${significant(chiSquare, 3)}`))),
    ...waldTests(table).map(([name, { p: value, z }]) => p(name, value, `z ${significant(z, 3)}`)),
  ];
}

function largeTests(
  tests: AssociationTests,
): readonly (readonly [string, AssociationTests['pearson']])[] {
  return [
    ['Pearson χ²', tests.pearson],
    ['with Yates’ correction', tests.yates],
    ['likelihood ratio', tests.likelihoodRatio],
  ];
}

/** The tests that belong to the Wald intervals of the two ratios. */
function waldTests(table: TwoByTwo): readonly (readonly [string, Estimated])[] {
  return ([['Wald, of the OR', oddsRatio(table)], ['Wald, of the RR', riskRatio(table)]] as const)
    .flatMap(([name, found]) => (isAbsence(found) ? [] : [[name, found.log] as const]));
}

function workingOf(
  one: TypedCount, other: TypedCount, table: TwoByTwo, level: number,
): readonly string[] {
  const { exposedEvents: a, exposedNonEvents: b } = table;
  const { unexposedEvents: c, unexposedNonEvents: d } = table;
  const odds = oddsRatio(table, level);
  const risks = riskRatio(table, level);
  return [
    `The first group has ${a} events and ${b} without, the second ${c} and ${d}.`,
    isAbsence(odds) ? `The odds ratio has no Wald interval: ${odds.because}.`
      : `The odds ratio is (${a} × ${d}) / (${b} × ${c}) = ${significant(odds.ratio, 4)}; the `
        + `standard error of its log is √(1/${a} + 1/${b} + 1/${c} + 1/${d}) = `
        + `${significant(odds.log.standardError, 4)} (Woolf).`,
    isAbsence(risks) ? `The risk ratio has no Wald interval: ${risks.because}.`
      : `The risk ratio is (${a}/${one.total}) / (${c}/${other.total}) = `
        + `${significant(risks.ratio, 4)}; the standard error of its log is √(1/${a} − `
        + `1/${one.total} + 1/${c} − 1/${other.total}) = `
        + `${significant(risks.log.standardError, 4)} (Katz).`,
  ];
}

function reservationsOf(table: TwoByTwo): readonly string[] {
  const large = associationTests(table);
  const sparse = !isAbsence(large) && large.smallestExpected < 5;
  return [
    'These are crude results of people counted once; adjusted, matched, clustered and weighted '
      + 'ones need not agree with them.',
    ...(sparse ? [`The smallest expected count is ${significant(large.smallestExpected, 2)}: `
      + 'below 5 the exact results are preferred (Cochran 1954).'] : []),
  ];
}

