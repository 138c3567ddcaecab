import {
  agrees,
  cannotTell,
  defineManuscriptRule,
  disagrees,
  judgeSayings,
  type Saying,
  type Verdict,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'non-inferiority-from-p',
  question: 'Is non-inferiority or equivalence concluded from a p-value of no difference?',
  why: `
    A p-value above 0.05 does not show that two treatments are alike: a small trial gives one
    whatever the truth. Non-inferiority and equivalence need a margin set in advance, and an
    interval that stays within it.
  `,
  source: `
    Piaggio G, Elbourne DR, Pocock SJ, Evans SJW, Altman DG. Reporting of noninferiority and
    equivalence randomized trials: extension of the CONSORT 2010 statement. JAMA
    2012;308:2594–2604.
  `,
  innocent: [
    'The p-value is that of the test of non-inferiority itself, of which a small one is shown.',
    'The margin and the interval stand elsewhere in the article.',
    '“Equivalent” is meant in a loose sense, and no conclusion hangs on it.',
  ],
  grade: 'caution',

  judge(reading) {
    const margin = reading.manuscript.text.match(MARGIN)?.[0];
    return judgeSayings(reading, SHOWN, (saying) => judgeConclusion(saying, margin));
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Please give the margin, why it was chosen, and the interval that is
    held against it.
  `,

  examples: [
    {
      text: 'Non-inferiority was shown because p = 0.45.',
      outcome: 'disagrees',
      note: 'a large p is no evidence of likeness',
    },
    {
      text: 'Non-inferiority was met: upper limit of the one-sided 97.5% CI 1.18 < margin 1.25.',
      outcome: 'agrees',
      note: 'a limit is held against a margin',
    },
    {
      text: 'The two splints were equivalent (p = 0.62).',
      outcome: 'disagrees',
      note: 'a large p is no evidence of equivalence',
    },
    {
      text: 'Non-inferiority was shown (p for non-inferiority = 0.003).',
      outcome: 'agrees',
      note: 'the test of non-inferiority itself',
    },
    {
      text: 'The margin was a hazard ratio of 1.25. The new splint was non-inferior (p = 0.45).',
      outcome: 'cannot tell',
      note: 'a margin is named elsewhere in the text',
    },
  ],
});

/** Non-inferiority or equivalence as a finding. */
const SHOWN = new RegExp(
  '\\b(?:non-?\\s?inferiority|equivalence|bioequivalence)\\b(?=[^.;]{0,30}\\b(?:was|were|is'
    + '|has been|could be)?\\s*'
    + '(?:shown|demonstrated|established|met|achieved|confirmed|concluded|proven|proved|reached))'
    + '|\\b(?:was|were|is|are|be|being|proved|found) (?:\\w+ly '
    + '|therapeutically )?(?:non-?\\s?inferior|equivalent)\\b'
    + '(?! (?:to (?:about|approximately|an? )|of))'
    + '|\\b(?:show|demonstrat|establish|confirm|conclud'
    + '|prov)\\w*\\s+(?:the\\s+)?(?:non-?\\s?inferiority|equivalence)\\b',
  'gi',
);

const P_VALUE = /\bp(?:[ -]?values?)?\s?(?:(?:was|of|is)\s)?([=>])\s?(0?[.·]\d+)/i;

const OF_MARGIN = new RegExp(
  '\\bmargins?\\b|\\blimits?\\b|\\bCIs?\\b|confidence|interval|\\bTOST\\b|two one-sided'
    + '|p(?:[ -]value)? ?(?:for )?(?:non-?\\s?inferiority|equivalence)|one-sided'
    + '|non-?\\s?inferiority p'
    + '|p ?= ?0?[.·]0\\d* for (?:non-?\\s?inf|equiv)|P(?:NI|non)',
  'i',
);

const DENIED = new RegExp(
  '\\bnot (?:been )?(?:shown|demonstrated|met|non-?inferior|equivalent|established)'
    + '|\\bno(?:t|r)\\b[^.;]{0,20}(?:equivalent|inferior)',
  'i',
);

/** Where a margin is named, anywhere in the text. */
const MARGIN = new RegExp(
  'non-?\\s?inferiority margin|equivalence (?:margin|limits)|\\bmargin (?:was|of|for)\\b',
  'i',
);

function judgeConclusion({ sentence }: Saying, margin: string | undefined): Verdict | undefined {
  if (DENIED.test(sentence)) return undefined;
  if (OF_MARGIN.test(sentence)) return agrees;
  const [, relation, number = ''] = sentence.match(P_VALUE) ?? [];
  if (relation === undefined || Number(number.replace('·', '.')) < 0.05) return undefined;
  if (margin !== undefined) return cannotTell(`the text speaks of “${margin}” elsewhere`);
  return disagrees(`p ${relation} ${number} is no evidence that the two are alike, and no `
    + `margin is named`);
}
