import {
  agrees,
  cannotTell,
  contrastOf,
  defineRule,
  disagrees,
  type Interval,
  type Printed,
  type RatioResult,
  unrounded,
  type Verdict,
  wordsAround,
} from '../src/authoring.ts';

export default defineRule({
  id: 'unbounded-estimate',
  question: 'Can the data carry the ratio, or does it run off to zero or infinity?',
  why: `
    Where a group has no events, or nothing but events, maximum likelihood has no finite answer:
    programs stop at 0.00 or at some huge number, with limits without meaning. Such a ratio tells
    of an empty cell, and not of the size of an effect.
  `,
  source: `
    Heinze G, Schemper M. A solution to the problem of separation in logistic regression. Stat Med
    2002;21:2409–2419. Greenland S, Mansournia MA, Altman DG. Sparse data bias: a problem hiding in
    plain sight. BMJ 2016;352:i1981.
  `,
  innocent: [
    'The ratio is per unit of a small quantity, so that a unit is more than anybody has.',
    'The estimate is exact, penalised or Bayesian, and says what few events can say.',
    'The interval is one-sided, and open on the other side on purpose.',
    'A decimal point or a digit was lost.',
    'The cell is empty by design, and the row is there for completeness.',
  ],
  grade: 'caution',
  reads: 'ratio',
  marks: ({ estimate, interval }) => [estimate, interval?.lower, interval?.upper],

  judge(result, reading) {
    const { estimate, interval, measure } = result;
    if (estimate === undefined || LARGE_BY_NATURE.has(measure)) return undefined;
    if (isOfDifference(result)) return undefined;
    const sign = signOf(estimate, interval);
    if (sign === undefined) return agrees;
    const method = wordsAround(reading, result.span).match(FOR_FEW_EVENTS)?.[0];
    if (method !== undefined) {
      return cannotTell(`the text speaks of “${method}” here, which is made for few events`);
    }
    if (interval !== undefined && isOneSided(interval, wordsAround(reading, result.span))) {
      return cannotTell('the interval may be one-sided, and open for that reason');
    }
    return contrastOf(reading, result) === 'binary'
      ? unbounded(result, sign, [])
      : unbounded(result, sign, ['The ratio is per unit, and another unit may make it readable.']);
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Could the authors give the number of events in each group, and
    consider an exact or penalised method, other units, or leaving the estimate out?
  `,

  examples: [
    {
      text: 'The odds ratio for relapse was 1.59 (95% CI 1.05 to 2.41).',
      outcome: 'agrees',
      note: 'finite, with an interval that can be read',
    },
    {
      text: 'The odds ratio for relapse was 0.00 (95% CI 0.00 to 999.99).',
      outcome: 'disagrees',
      note: 'no event in one of the groups',
    },
    {
      text: 'The odds ratio for relapse was 3420000 (95% CI 0.00 to ∞).',
      outcome: 'disagrees',
      note: 'a program that stopped on its way to infinity',
    },
    {
      text: 'The odds ratio for relapse was 36.8 (95% CI 1.04 to 1302).',
      outcome: 'disagrees',
      note: 'limits more than a thousandfold apart: a handful of people',
    },
    {
      text: 'By Firth’s penalised likelihood the odds ratio was 41.2 (95% CI 1.03 to 2140).',
      outcome: 'cannot tell',
      note: 'a method made for empty cells',
    },
  ],
});

/** Ratios that run into the thousands when all is well. */
const LARGE_BY_NATURE: ReadonlySet<RatioResult['measure']> = new Set([
  'DOR', 'GMR', 'ROR', 'ratio', 'SIR', 'SMR',
]);

/** Rows of means stand in columns of ratios too, and there 0 is a number like others. */
function isOfDifference({ estimate, interval, cell }: RatioResult): boolean {
  const isNegative = [estimate, interval?.lower].some((printed) => printed?.plain.startsWith('-'));
  return isNegative || /\b(?:means?|sd|medians?|difference)\b/i.test(cell?.row ?? '');
}

/** An upper limit this small shows that the ratio is small, and not that a cell is empty. */
const SMALL = 0.1;

/** From here on no ratio of odds or hazards is met but on its way to infinity. */
const HUGE = 1000;

/** Limits so many times apart say nothing of the size of the ratio. */
const APART = 1000;

/** Words for methods that give a finite answer where a cell is empty. */
const FOR_FEW_EVENTS = new RegExp(
  '\\b(?:Firth\\w*|penali[sz]ed|exact (?:logistic|method|test|odds)|Fisher\\w*|median.unbiased'
    + '|Bayes\\w*|ridge|lasso|Haldane|continuity correction|0\\.5 added)\\b',
  'i',
);

/** An interval with one limit on purpose: of a test of non-inferiority, or of a low level. */
function isOneSided({ upper, level = 95 }: Interval, nearby: string): boolean {
  return upper.value === Infinity
    && (level < 95 || /\b(?:one.sided|one.tailed|non.?inferior\w*)\b/i.test(nearby));
}

/** What shows that the ratio has no bound, in words that follow "the ratio". */
function signOf(estimate: Printed, interval: Interval | undefined): string | undefined {
  if (estimate.value === 0) {
    const upper = interval?.upper.value ?? Infinity;
    return upper > 0 && upper < SMALL
      ? undefined : `is ${estimate.plain}, to which no finite estimate comes`;
  }
  if (estimate.value >= HUGE) return `is ${estimate.plain}`;
  if (interval === undefined || !Number.isFinite(interval.lower.value)) return undefined;
  const { lower, upper } = interval;
  const least = unrounded(upper).low / Math.max(unrounded(lower).high, Number.MIN_VALUE);
  if (!(least >= APART)) return undefined;
  const times = Number.isFinite(least) && lower.value > 0
    ? `, more than ${APART}-fold apart` : '';
  return `has limits of ${lower.plain} and ${upper.plain}${times}`;
}

function unbounded(
  { interval }: RatioResult,
  sign: string,
  explanations: readonly string[],
): Verdict {
  return disagrees(`the ratio ${sign}: there may be no event in one of the groups, or hardly any`, {
    explanations,
    working: interval === undefined || interval.lower.value > 0 || interval.upper.value === 0
      ? []
      : [`${interval.lower.plain} stands for at most ${unrounded(interval.lower).high}`],
  });
}
