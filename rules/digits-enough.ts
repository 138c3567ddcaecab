import {
  agrees,
  defineRule,
  disagrees,
  type Interval,
  limitsInOrder,
  limitsInWords,
  mayBe,
  type Printed,
  rangeInWords,
  unrounded,
} from '../src/authoring.ts';

export default defineRule({
  id: 'digits-enough',
  question: 'Do the printed digits let a reader see the interval at all?',
  why: `
    A ratio per year, per gram or per point may lie so near 1 that rounding leaves nothing of it:
    1.00 (1.00 to 1.00) may be an effect or none. A larger unit, or another digit, shows what was
    found.
  `,
  source: `
    Cole TJ. Setting number of decimal places for reporting risk ratios: rule of four. BMJ
    2015;350:h1845.
  `,
  innocent: [
    'The journal allows no more digits.',
    'The ratio is per single unit, and its size over a usual range is told elsewhere.',
    'The sample is so large that the interval is truly this narrow.',
    'The row is the reference, and an interval was put beside it for completeness.',
  ],
  grade: 'caution',
  reads: 'ratio',
  marks: ({ estimate, interval }) => [estimate, interval?.lower, interval?.upper],

  judge({ estimate, interval }) {
    if (estimate === undefined || interval === undefined) return undefined;
    if (!limitsInOrder(interval)) return undefined;
    if (estimate.value <= 0 || !isRoundedAway(interval)) return agrees;
    const shown = `${estimate.plain} (${limitsInWords(interval)})`;
    return disagrees(
      `both limits of ${shown} are ${interval.lower.plain} as printed, so that the interval cannot `
        + `be seen${sideInWords(interval)}`,
      {
        working: [`${interval.lower.plain} stands for `
          + rangeInWords(unrounded(interval.lower), interval.lower.decimals + 1)],
      },
    );
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Could the authors give another digit, or the ratio for a larger
    unit, such as 10 years or one standard deviation?
  `,

  examples: [
    {
      text: 'The odds ratio per year of age was 1.03 (95% CI 1.01 to 1.05).',
      outcome: 'agrees',
      note: 'the limits differ as printed',
    },
    {
      text: 'The odds ratio per year of age was 1.00 (95% CI 1.00 to 1.00).',
      outcome: 'disagrees',
      note: 'anything from 0.995 to 1.005',
    },
    {
      text: 'The hazard ratio per millilitre was 1.0 (95% CI 1.0 to 1.0; p = 0.002).',
      outcome: 'disagrees',
      note: 'p is below 0.05, and the direction cannot be seen',
    },
    {
      text: 'The hazard ratio per millilitre was 1.0004 (95% CI 1.0001 to 1.0007).',
      outcome: 'agrees',
      note: 'digits enough for so small a unit',
    },
  ],
});

/** Both limits print as the same number, and with no more than two decimals. */
function isRoundedAway({ lower, upper }: Interval): boolean {
  return lower.plain === upper.plain && lower.decimals <= 2;
}

/** Where the limits print as 1, the side is lost as well. */
function sideInWords({ lower }: { readonly lower: Printed }): string {
  return mayBe(lower, 1) ? ', nor on which side of 1 it lies' : '';
}
