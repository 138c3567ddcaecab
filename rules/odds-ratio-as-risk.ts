import {
  agrees,
  cannotTell,
  type Claim,
  COMMON_FROM,
  cover,
  defineManuscriptRule,
  disagrees,
  fixed,
  flowing,
  type Judgement,
  percentInWords,
  type Prevalence,
  prevalenceFor,
  type Printed,
  quote,
  type Range,
  rangeInWords,
  type RatioResult,
  type Reading,
  riskRatioAt,
  spansOf,
  unrounded,
  type Verdict,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'odds-ratio-as-risk',
  question: 'Is the odds ratio of a common outcome read as a ratio of risks?',
  why: `
    Where an outcome is rare, odds and risks are nearly the same. Where it occurs in 10% or more,
    the odds ratio lies further from 1 than the ratio of risks, and “twice as likely” says more
    than an odds ratio of 2 carries.
  `,
  source: `
    Zhang J, Yu KF. What’s the relative risk? JAMA 1998;280:1690–1691. Grant RL. Converting an
    odds ratio to a range of plausible relative risks. BMJ 2014;348:f7450. The warning for
    adjusted odds ratios: McNutt L-A, Wu C, Xue X, Hafner JP. Am J Epidemiol 2003;157:940–943.
  `,
  innocent: [
    'The share in the text is of another outcome, or of another group.',
    'In a case-control study with density sampling the odds ratio estimates a rate ratio.',
    'In a case-cohort design the odds ratio estimates a risk ratio.',
    '“Risk” is used loosely for odds, and the number itself is given as an odds ratio.',
  ],
  grade: 'caution',

  judge(reading) {
    const design = reading.manuscript.text.match(SAMPLED_BY_OUTCOME)?.[0];
    return reading.findings.claims.flatMap((claim): readonly Judgement[] => {
      if (!isOfRisk(claim) || claim.of?.kind !== 'ratio') return [];
      const { measure, estimate, span } = claim.of;
      if (!isOdds(measure) || estimate === undefined || estimate.value <= 0) return [];
      const verdict = judgeWords(claim, claim.of, estimate, reading, design);
      const marks = [claim.span, ...spansOf([estimate])];
      return [{ verdict, span: cover(claim.span, span), marks, result: claim.of }];
    });
  },

  comment: (words, { because }) => `
    In “${words}”, ${because}. Please word the result as odds, or give a risk ratio, for instance
    from a log-binomial or a modified Poisson model.
  `,

  examples: [
    {
      text: 'The prevalence of falls was 45%. Smokers were twice as likely to fall '
        + '(OR 2.0, 95% CI 1.3 to 3.1).',
      outcome: 'disagrees',
      note: 'at 45%: 2.0 / (1 − 0.45 + 0.45 × 2.0) = 1.4',
    },
    {
      text: 'The prevalence of falls was 2%. Smokers were twice as likely to fall '
        + '(OR 2.0, 95% CI 1.3 to 3.1).',
      outcome: 'agrees',
      note: 'a rare outcome: the risk ratio would be 1.96',
    },
    {
      text: 'Smokers were twice as likely to fall (OR 2.0, 95% CI 1.3 to 3.1).',
      outcome: 'cannot tell',
      note: 'the text does not say how common falls were',
    },
    {
      text: 'The prevalence of falls was 45%. Smokers had an increased risk of falls '
        + '(adjusted OR 3.2, 95% CI 2.1 to 4.9).',
      outcome: 'disagrees',
      note: 'at 45%: 3.2 / (1 − 0.45 + 0.45 × 3.2) = 1.6, and less sure since adjusted',
    },
  ],
});

/** Designs in which an odds ratio may stand for a ratio of rates or risks. */
const SAMPLED_BY_OUTCOME = /\bcase[-‐–\s](?:control|cohort)\b/i;

function isOfRisk(claim: Claim): boolean {
  return (claim.kind === 'size' || claim.kind === 'scale') && claim.scale === 'risk';
}

function isOdds(measure: RatioResult['measure']): boolean {
  return measure === 'OR' || measure === 'POR';
}

function judgeWords(
  claim: Claim,
  result: RatioResult,
  estimate: Printed,
  reading: Reading,
  design: string | undefined,
): Verdict {
  const prevalence = prevalenceFor(claim, result, reading);
  if (prevalence === undefined) {
    return cannotTell('the text does not say how common this outcome is');
  }
  if (prevalence.share < COMMON_FROM) return agrees;
  if (design !== undefined) {
    return cannotTell(`the text speaks of a ${design.toLowerCase()} design, in which the odds `
      + 'ratio may stand for a ratio of rates or risks');
  }
  const implied = riskRatioAt(prevalence.share, unrounded(estimate));
  if (implied === undefined) return cannotTell('no risk ratio follows from this odds ratio');
  if (isSmall(claim, estimate, implied)) return agrees;
  return disagreesOn(claim, result, estimate, prevalence, implied, reading);
}

/** Words without a size claim less: the log odds ratio must be so many times the log risk ratio. */
const FURTHER_FROM_ONE = 1.25;

/** Whether a reader of the odds ratio as a risk ratio would be told nearly the same. */
function isSmall(claim: Claim, estimate: Printed, implied: Range): boolean {
  if (rangeInWords(implied, estimate.decimals) === estimate.plain) return true;
  const middle = Math.sqrt(implied.low * implied.high);
  return claim.kind === 'scale'
    && Math.abs(Math.log(estimate.value)) < FURTHER_FROM_ONE * Math.abs(Math.log(middle));
}

function disagreesOn(
  claim: Claim,
  { adjusted }: RatioResult,
  estimate: Printed,
  { share, group }: Prevalence,
  implied: Range,
  { manuscript }: Reading,
): Verdict {
  const words = flowing(quote(manuscript.text, claim.span));
  const odds = estimate.plain;
  const p0 = Number(fixed(share, 4));
  return disagrees(
    `the words “${words}” speak of risk; where the outcome occurs in ${percentInWords(share)}, `
      + `the odds ratio ${odds} answers to a risk ratio of about ${shown(implied, estimate)}`,
    {
      recomputed: { quantity: 'risk ratio', range: implied },
      working: [
        `RR = OR / (1 − p₀ + p₀ × OR) = ${odds} / (1 − ${p0} + ${p0} × ${odds})`,
        ...(group === 'everyone'
          ? [`${percentInWords(share)} is the share in everyone, taken for p₀`]
          : []),
      ],
      explanations: adjusted === true
        ? ['The odds ratio is adjusted, so that the risk ratio worked out here is only a guide '
          + '(McNutt et al. 2003).']
        : [],
    },
  );
}

/** A risk ratio worked out from a share is no finer than this. */
const MOST_DECIMALS = 2;

function shown(implied: Range, { decimals }: Printed): string {
  return rangeInWords(implied, Math.min(MOST_DECIMALS, decimals + 1));
}
