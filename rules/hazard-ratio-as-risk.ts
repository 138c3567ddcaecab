import {
  agrees,
  type Claim,
  COMMON_FROM,
  cover,
  defineManuscriptRule,
  disagrees,
  type Judgement,
  prevalenceFor,
  type Printed,
  type RatioResult,
  type Reading,
  spansOf,
  toldOnce,
  type Verdict,
  wordsOfClaim,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'hazard-ratio-as-risk',
  question: 'Is the size of a hazard ratio told as a size of risk?',
  why: `
    A hazard ratio compares how fast events happen among those still without one. Where the
    outcome is common, the risk over the whole time differs by less than the hazard does: a
    hazard ratio of 0.70 is not a risk that is lower by 30%.
  `,
  source: `
    Sashegyi A, Ferry D. On the interpretation of the hazard ratio and communication of survival
    benefit. Oncologist 2017;22:484–486. Sutradhar R, Austin PC. Relative rates not relative
    risks: addressing a widespread misinterpretation of hazard ratios. Ann Epidemiol
    2018;28:54–57.
  `,
  innocent: [
    'The outcome is rare, so that hazards and risks differ by nearly the same factor.',
    '“Risk” is used loosely for hazard, as is common, and the hazard ratio stands beside it.',
    '“Risk” is meant as the risk at each moment, which is the hazard.',
  ],
  grade: 'caution',

  judge(reading) {
    const found = reading.findings.claims.flatMap((claim): readonly Judgement[] => {
      const result = claim.of;
      if (claim.kind !== 'size' || claim.scale === undefined || result?.kind !== 'ratio') return [];
      if (!HAZARDS.has(result.measure) || result.estimate === undefined) return [];
      if (!isSizeOf(claim, result.estimate)) return [];
      const verdict = judgeWords(claim, result, reading);
      const marks = [claim.span, ...spansOf([result.estimate])];
      return [{ verdict, span: cover(claim.span, result.span), marks, result }];
    });
    return toldOnce(reading, found);
  },

  comment: (words, { because }) => `
    In “${words}”, ${because}. Please word it as hazard or as rate of events, and give the risks at
    a stated time beside it, which readers understand best.
  `,

  examples: [
    {
      text: 'Treatment reduced the risk of death by 30% (HR 0.70, 95% CI 0.55 to 0.89).',
      outcome: 'disagrees',
      note: '30% is 1 − 0.70, a change of the hazard',
    },
    {
      text: 'Treatment reduced the hazard of death by 30% (HR 0.70, 95% CI 0.55 to 0.89).',
      outcome: 'agrees',
      note: 'it is the hazard that is lower by 30%',
    },
    {
      text: 'The incidence of stroke was 2%. Treatment reduced the risk of stroke by 30% '
        + '(HR 0.70, 95% CI 0.55 to 0.89).',
      outcome: 'agrees',
      note: 'a rare outcome: at 2% the risk ratio is 0.70 too',
    },
    {
      text: 'Smokers were twice as likely to relapse (HR 2.0, 95% CI 1.3 to 3.1).',
      outcome: 'disagrees',
      note: 'twice the hazard, and less than twice the risk where relapse is common',
    },
  ],
});

const HAZARDS: ReadonlySet<RatioResult['measure']> = new Set(['HR', 'csHR', 'SHR']);

type SizeClaim = Extract<Claim, { readonly kind: 'size' }>;

/** Words tell the size of a ratio if they come near it: "a 30% reduction" to 0.70. */
function isSizeOf({ factor }: SizeClaim, { value }: Printed): boolean {
  return value > 0 && Math.abs(Math.log(factor / value)) < 0.2;
}

function judgeWords(claim: SizeClaim, result: RatioResult, reading: Reading): Verdict {
  if (claim.scale !== 'risk') return agrees;
  const prevalence = prevalenceFor(claim, result, reading);
  if (prevalence !== undefined && prevalence.share < COMMON_FROM) return agrees;
  const words = wordsOfClaim(reading, claim.span);
  return disagrees(`the words “${words}” speak of risk or likelihood, and the number beside them `
    + 'is a hazard ratio');
}
