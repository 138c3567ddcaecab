import {
  agrees,
  cannotTell,
  defineRule,
  disagrees,
  fixed,
  type Interval,
  insideLimits,
  limitsInOrder,
  limitsInWords,
  type Printed,
  type RatioResult,
  unrounded,
  type Verdict,
} from '../src/authoring.ts';

export default defineRule({
  id: 'limits-in-order',
  question: 'Are the limits of the ratio in ascending order, and none of them below zero?',
  why: `
    An interval runs from its lower limit to its upper one, and a ratio of odds, hazards, rates
    or risks is never negative. Limits in another order, or below zero, belong to other numbers
    than those printed, and nothing can be computed from them.
  `,
  source: `
    Altman DG, Machin D, Bryant TN, Gardner MJ. Statistics with Confidence, 2nd ed. London: BMJ
    Books, 2000 (intervals for ratios are made on the log scale, so both limits are positive).
  `,
  innocent: [
    'The two limits were exchanged in typing, or are given in descending order on purpose.',
    'A digit or a decimal point was lost in one of the limits.',
    'The numbers stand on the log scale, where they may be negative, under the name of the ratio.',
    'A dash between the limits was set as a minus sign, or a minus sign as a dash.',
  ],
  grade: 'contradiction',
  reads: 'ratio',
  marks: ({ estimate, interval }) => [estimate, interval?.lower, interval?.upper],

  judge(result) {
    const { estimate, interval, measure } = result;
    const negative = [estimate, interval?.lower, interval?.upper].find(isNegative);
    if (negative === undefined) return interval && judgeOrder(result, interval);
    if (measure === 'ratio') {
      return cannotTell(`the text does not say which ratio it is, and ${negative.plain} may be a `
        + 'change in percent or a logarithm');
    }
    return disagrees(`a ratio cannot be negative, and ${negative.plain} is printed`, {
      working: [`${measure} > 0 always; exp(${negative.plain}) = ${backFromLog(negative)}`],
      explanations: [
        `The numbers may be logarithms: exp(${negative.plain}) = ${backFromLog(negative)}.`,
        'A dash before the number may have been set as a minus sign.',
      ],
    });
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Could the authors check these limits against the output of the
    analysis, and say on which scale they are given?
  `,

  examples: [
    {
      text: 'The odds ratio for relapse was 1.80 (95% CI 1.18 to 2.75).',
      outcome: 'agrees',
      note: '0 < 1.18 < 2.75',
    },
    {
      text: 'The odds ratio for relapse was 1.80 (95% CI 2.75 to 1.18).',
      outcome: 'disagrees',
      note: 'the limits are exchanged',
    },
    {
      text: 'The hazard ratio for relapse was -0.45 (95% CI -0.80 to -0.10).',
      outcome: 'disagrees',
      note: 'a log hazard ratio under the name of a hazard ratio: exp(-0.45) = 0.64',
    },
    {
      text: 'The odds ratio for relapse was 0.4 (95% CI 0.0 to 5.2).',
      outcome: 'agrees',
      note: '"0.0" stands for anything up to 0.05',
    },
    {
      text: 'The ratio of the two scores was -0.4 (95% CI -0.9 to 0.1).',
      outcome: 'cannot tell',
      note: 'a ratio of scores may be negative: the text does not say which ratio it is',
    },
  ],
});

/** Whether the number is below zero whatever its rounding: "-0.0" may be zero. */
function isNegative(printed: Printed | undefined): printed is Printed {
  return printed !== undefined && unrounded(printed).high < 0;
}

function judgeOrder({ estimate }: RatioResult, interval: Interval): Verdict {
  if (limitsInOrder(interval)) return agrees;
  const { lower, upper } = interval;
  const exchanged = { ...interval, lower: upper, upper: lower };
  const fits = estimate !== undefined && insideLimits(estimate, exchanged);
  return disagrees(`the lower limit, ${lower.plain}, is above the upper limit, ${upper.plain}`, {
    working: [`${lower.plain} > ${upper.plain}`],
    explanations: fits
      ? [`The limits may be exchanged: ${limitsInWords(exchanged)} holds ${estimate.plain}.`]
      : [],
  });
}

/** The ratio whose logarithm is printed, with two decimals: "-0.45" gives "0.64". */
function backFromLog({ value }: Printed): string {
  return fixed(Math.exp(value), 2);
}
