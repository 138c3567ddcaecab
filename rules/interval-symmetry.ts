import {
  agreementOf,
  agrees,
  cannotTell,
  type Contrast,
  contrastOf,
  defineRule,
  disagrees,
  explanationsInWords,
  fixed,
  impliedEstimate,
  insideLimits,
  leansLittle,
  type Interval,
  limitsInOrder,
  limitsInWords,
  neighbourInWords,
  otherIntervalNamed,
  othersInWords,
  type Printed,
  rangeInWords,
  type RatioResult,
  sharesLeanOfTable,
  standsOutOfTable,
  unrounded,
  type Verdict,
} from '../src/authoring.ts';

export default defineRule({
  id: 'interval-symmetry',
  question: 'Does the ratio sit midway between its limits on the log scale?',
  why: `
    An interval for a ratio is usually made on the log scale: the log estimate plus and minus a
    multiple of its standard error. Turned back, the estimate is the geometric mean of the
    limits, whatever the level. Profile-likelihood, score and exact intervals lean to one side,
    but only so far as the width of the interval allows. What leans further has a number in it
    that belongs elsewhere.
  `,
  source: `
    Woolf B. On estimating the relation between blood group and disease. Ann Hum Genet
    1955;19:251–253. Altman DG, Bland JM. How to obtain the confidence interval from a P value.
    BMJ 2011;343:d2090.
  `,
  innocent: [
    'A digit was mistyped, exchanged or lost in one of the three numbers.',
    'A limit was copied from the row or the sentence next to it.',
    'The interval is a bootstrap, Bayesian or penalised one, which need not be symmetric.',
    'The interval was made on the natural scale, as estimate plus and minus a multiple.',
    'The estimate and the interval come from different models, one crude and one adjusted.',
    'The estimate is a posterior median or mean, or was corrected for bias.',
  ],
  grade: 'discrepancy',
  reads: 'ratio',
  marks: ({ estimate, interval }) => [estimate, interval?.lower, interval?.upper],

  judge(result, reading) {
    const { estimate, interval } = result;
    if (estimate === undefined || interval === undefined) return undefined;
    if (!limitsInOrder(interval) || !insideLimits(estimate, interval)) return undefined;
    if (!hasTwoLimits(interval)) {
      return cannotTell('a limit may be rounded from zero, or is open, and has no logarithm');
    }
    const contrast = contrastOf(reading, result);
    const found = agreementOf(estimate, interval, contrast);
    switch (found.outcome) {
      case 'within rounding':
        return agrees;
      case 'within another standard method':
        return standsOutOfTable(reading, result) && otherIntervalNamed(reading, result) === undefined
          ? disagreesOn(result, estimate, interval, contrast, neighbourInWords(reading, result))
          : agrees;
      case 'cannot tell':
        return cannotTell(found.because);
      case 'neither': {
        if (contrast === 'binary' && leansLittle(estimate, interval)
          && !standsOutOfTable(reading, result)) return agrees;
        if (sharesLeanOfTable(reading, result)) return cannotTell(LOPSIDED_TABLE);
        const named = otherIntervalNamed(reading, result);
        return named === undefined
          ? disagreesOn(result, estimate, interval, contrast, neighbourInWords(reading, result))
          : cannotTell(`the text speaks of “${named}” here, and such an interval need not be `
            + 'symmetric');
      }
      default:
        return found satisfies never;
    }
  },

  comment: (words, { recomputed, because }) => `
    For “${words}”: ${because}${recomputed === undefined ? '' : ', and their geometric mean is '
      + rangeInWords(recomputed.range, 2)}. Could the authors check the three numbers, or say by
    which method the interval was made?
  `,

  examples: [
    {
      text: 'The hazard ratio was 0.72 (95% CI 0.58 to 0.90).',
      outcome: 'agrees',
      note: '√(0.58 × 0.90) = 0.722',
    },
    {
      text: 'The hazard ratio was 0.72 (95% CI 0.58 to 0.98).',
      outcome: 'disagrees',
      note: 'one digit slipped: √(0.58 × 0.98) = 0.754',
    },
    {
      text: 'The odds ratio was 4.2 (95% CI 1.1 to 17.7).',
      outcome: 'agrees',
      note: 'a little off the middle, as the profile-likelihood interval of a small sample may be',
    },
    {
      text: 'The odds ratio was 1.4 (95% CI 0.0 to 5.2).',
      outcome: 'cannot tell',
      note: '"0.0" stands for anything below 0.05',
    },
    {
      text: 'The odds ratio was 1.90 (95% bootstrap CI 1.10 to 2.20).',
      outcome: 'cannot tell',
      note: 'a bootstrap interval need not be symmetric on any scale',
    },
  ],
});

const LOPSIDED_TABLE = 'most intervals of this table are not symmetric on the log scale, so that they '
  + 'were probably made by another method';

/** Whether both limits have a logarithm: neither is open nor may be zero. */
function hasTwoLimits({ lower, upper }: Interval): boolean {
  return unrounded(lower).low > 0 && Number.isFinite(upper.value);
}

function disagreesOn(
  { p }: RatioResult,
  estimate: Printed,
  interval: Interval,
  contrast: Contrast,
  neighbour: readonly string[],
): Verdict {
  const { lower, upper } = interval;
  const middle = impliedEstimate(interval);
  const product = fixed(Math.sqrt(lower.value * upper.value), estimate.decimals + 2);
  return disagrees(
    `the limits ${limitsInWords(interval)} do not centre on ${estimate.plain} on the log scale`,
    {
      ...(middle === undefined ? {} : { recomputed: { quantity: 'estimate', range: middle } }),
      working: [
        `√(${lower.plain} × ${upper.plain}) = ${product}, and ${estimate.plain} is printed`,
        ...othersInWords(agreementOf(estimate, interval, contrast, p), { estimate, interval }),
      ],
      explanations: [
        ...neighbour,
        ...explanationsInWords({ estimate, interval, witness: p }, contrast),
      ],
    },
  );
}
