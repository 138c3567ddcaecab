import {
  agrees,
  defineRule,
  disagrees,
  explanationsInWords,
  fixed,
  impliedEstimate,
  insideLimits,
  type Interval,
  limitsInOrder,
  limitsInWords,
  neighbourInWords,
  overlap,
  type Printed,
  type PValue,
  rangeInWords,
  unrounded,
} from '../src/authoring.ts';

export default defineRule({
  id: 'estimate-inside-interval',
  question: 'Does the estimate lie between its own limits?',
  why: `
    An interval is built around its estimate, so the estimate lies inside, whatever the method
    and whatever the level. Where it does not, at least one of the three numbers is not the one
    that the analysis gave.
  `,
  source: `
    Gardner MJ, Altman DG. Confidence intervals rather than P values: estimation rather than
    hypothesis testing. BMJ 1986;292:746–750. How often it happens: Gøtzsche PC. Believability of
    relative risks and odds ratios in abstracts: cross sectional study. BMJ 2006;333:231–234.
  `,
  innocent: [
    'A digit was mistyped or lost in one of the three numbers.',
    'The interval was copied from the row or the sentence next to it.',
    'The estimate and the interval come from different models, one crude and one adjusted.',
    'The reference group was changed for the estimate but not for the limits.',
    'The estimate is a median of simulations or is corrected for bias, and the interval is not.',
  ],
  grade: 'contradiction',
  reads: 'ratio',
  marks: ({ estimate, interval }) => [estimate, interval?.lower, interval?.upper],

  judge(result, reading) {
    const { estimate, interval, p } = result;
    if (estimate === undefined || interval === undefined) return undefined;
    if (estimate.value < 0 || !limitsInOrder(interval)) return undefined;
    if (insideLimits(estimate, interval)) return agrees;
    return disagrees(
      `the estimate ${estimate.plain} lies outside its interval, ${limitsInWords(interval)}`,
      {
        recomputed: {
          quantity: 'estimate',
          range: { low: unrounded(interval.lower).low, high: unrounded(interval.upper).high },
        },
        working: [
          `${estimate.plain} is ${beyond(estimate, interval)}, as is all that it stands for: `
            + rangeInWords(unrounded(estimate), estimate.decimals + 1),
        ],
        explanations: [
          ...neighbourInWords(reading, result),
          ...explanationsOf({ estimate, interval, p }),
        ],
      },
    );
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. An estimate lies within its own interval whatever the method.
    Could the authors check the three numbers against the output of the analysis?
  `,

  examples: [
    {
      text: 'The adjusted hazard ratio was 0.72 (95% CI 0.58 to 0.90).',
      outcome: 'agrees',
      note: '0.58 ≤ 0.72 ≤ 0.90',
    },
    {
      text: 'The adjusted hazard ratio was 0.52 (95% CI 0.58 to 0.90).',
      outcome: 'disagrees',
      note: '0.52 < 0.58: a first decimal mistyped',
    },
    {
      text: 'The odds ratio for falls was 2.50 (95% CI 0.25 to 0.64).',
      outcome: 'disagrees',
      note: '1 / 2.50 = 0.40 lies inside: the reference was switched for the estimate alone',
    },
    {
      text: 'The rate ratio was 1.0 (95% CI 1.02 to 1.08).',
      outcome: 'agrees',
      note: '"1.0" may be 1.04',
    },
    {
      text: 'The odds ratio for falls was 3.10 (95% CI 1.42 to 3.1).',
      outcome: 'agrees',
      note: '"3.1" may be 3.14; whether the interval is symmetric is another rule’s question',
    },
  ],
});

/** A result with all that is compared here. */
interface Stated {
  readonly estimate: Printed;
  readonly interval: Interval;
  readonly p: PValue | undefined;
}

function beyond(estimate: Printed, { lower, upper }: Interval): string {
  return estimate.value < lower.value
    ? `below the lower limit ${lower.plain}`
    : `above the upper limit ${upper.plain}`;
}

/** What would bring the estimate in: first that it is a coefficient, exp(0.64) = 1.90. */
function explanationsOf({ estimate, interval, p }: Stated): readonly string[] {
  const others = explanationsInWords({ estimate, interval, witness: p }, 'unknown');
  const { low, high } = unrounded(estimate);
  const ratio = { low: Math.exp(low), high: Math.exp(high) };
  const middle = impliedEstimate(interval);
  if (middle === undefined || !overlap(ratio, middle)) return others;
  return [
    `The estimate may be a coefficient: exp(${estimate.plain}) = `
      + `${fixed(Math.exp(estimate.value), 2)} is the middle of the interval.`,
    ...others,
  ];
}
