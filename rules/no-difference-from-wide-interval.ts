import {
  agrees,
  cannotTell,
  type Claim,
  contrastOf,
  cover,
  defineManuscriptRule,
  disagrees,
  flowing,
  type Interval,
  type Judgement,
  limitsInWords,
  limitsStand,
  quote,
  type RatioResult,
  type Reading,
  sideOfOne,
  spansOf,
  toldOnce,
  type Verdict,
  wordsAround,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'no-difference-from-wide-interval',
  question: 'Is “no difference” said of an interval that leaves a large one open?',
  why: `
    An interval that holds 1 does not show that there is no effect. Where it also holds a halving
    or a doubling, the study was too small to tell, and “no difference” closes a question that
    the numbers leave open.
  `,
  source: `
    Altman DG, Bland JM. Absence of evidence is not evidence of absence. BMJ 1995;311:485.
    Halving and doubling as what nobody would call no difference: common practice.
  `,
  innocent: [
    '“No difference” was meant as no significant difference, and the limits are printed beside it.',
    'A halving or a doubling does not matter for this outcome, or was ruled out beforehand.',
    'The ratio is per large unit, or compares the ends of a long scale.',
    'The conclusion rests on other results as well, of which this is the least precise.',
  ],
  grade: 'caution',

  judge(reading) {
    const found = reading.findings.claims.flatMap((claim): readonly Judgement[] => {
      const result = claim.of;
      if (claim.kind !== 'significance' || claim.asserted) return [];
      if (claim.manner !== 'no association' || result?.kind !== 'ratio') return [];
      if (result.interval === undefined || result.cited) return [];
      const verdict = judgeDenial(claim, result, result.interval, reading);
      if (verdict === undefined) return [];
      const { lower, upper } = result.interval;
      const marks = [claim.span, ...spansOf([lower, upper])];
      return [{ verdict, span: cover(claim.span, result.span), marks, result }];
    });
    return toldOnce(reading, found);
  },

  comment: (words, { because }) => `
    In “${words}”, ${because}. Please say that the study could not tell, and which differences the
    interval leaves open, rather than that there was none.
  `,

  examples: [
    {
      text: 'There was no difference in mortality between the groups (OR 1.10, 95% CI 0.45 to '
        + '2.70).',
      outcome: 'disagrees',
      note: 'the interval holds a halving and a doubling',
    },
    {
      text: 'There was no difference in mortality between the groups (RR 1.01, 95% CI 0.97 to '
        + '1.05).',
      outcome: 'agrees',
      note: 'a narrow interval: at most 5% more, at most 3% less',
    },
    {
      text: 'Relapse was not associated with the new splint (HR 1.45, 95% CI 0.92 to 2.29).',
      outcome: 'disagrees',
      note: 'a doubling is left open',
    },
    {
      text: 'In this non-inferiority trial there was no difference in relapse (HR 1.10, 95% CI '
        + '0.48 '
        + 'to 2.52).',
      outcome: 'cannot tell',
      note: 'a margin set in advance decides what counts as no difference',
    },
  ],
});

type SignificanceClaim = Extract<Claim, { readonly kind: 'significance' }>;

/** What nobody would call no difference. */
const HALVING = 0.5;
const DOUBLING = 2;

/** Words that say how much is known, and so claim no more than the numbers do. */
const OF_KNOWLEDGE = new RegExp(
  '\\b(?:evidence|significan\\w*|clear|conclusive|statistical\\w*|detect\\w*|could not|underpowered'
    + '|imprecise|insufficient|uncertain|low.quality|very low)\\b',
  'i',
);

const MARGIN = /\b(?:non.?inferior\w*|equivalen\w*|pre.?specified margin|margin of)\b/i;

function judgeDenial(
  claim: SignificanceClaim,
  result: RatioResult,
  interval: Interval,
  reading: Reading,
): Verdict | undefined {
  const { text } = reading.manuscript;
  if (!limitsStand(result.estimate, interval, contrastOf(reading, result))) return undefined;
  if (sideOfOne(interval) !== 'around') return undefined;
  const words = flowing(quote(text, claim.span));
  const from = Math.max(claim.sentence.start, claim.span.start - 60);
  const near = text.slice(from, claim.span.end + 40);
  if (OF_KNOWLEDGE.test(near)) return undefined;
  const open = openIn(interval);
  if (open === undefined) return agrees;
  const margin = wordsAround(reading, result.span).match(MARGIN)?.[0];
  if (margin !== undefined) {
    return cannotTell(`the text speaks of “${margin}” here: a margin decides what is no `
      + `difference`);
  }
  return disagrees(`the words say “${words}”, and the interval ${limitsInWords(interval)} leaves `
    + `${open} open`);
}

/** The large effects that an interval holds, in words; nothing where it holds none. */
function openIn({ lower, upper }: Interval): string | undefined {
  const [halving, doubling] = [lower.value <= HALVING, upper.value >= DOUBLING];
  if (halving && doubling) return 'both a halving and a doubling';
  if (halving) return 'a halving';
  return doubling ? 'a doubling' : undefined;
}
