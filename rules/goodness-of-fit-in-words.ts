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
  id: 'goodness-of-fit-in-words',
  question: 'Is the Hosmer–Lemeshow test read the right way round?',
  why: `
    A small p-value of the Hosmer–Lemeshow test speaks against the fit of a model; a large one
    finds nothing against it. Read backwards, a model that does not fit is presented as one that
    does.
  `,
  source: `
    Hosmer DW, Lemeshow S. Goodness of fit tests for the multiple logistic regression model.
    Commun Stat Theory Methods 1980;9:1043–1069. Hosmer DW, Lemeshow S, Sturdivant RX. Applied
    Logistic Regression, 3rd edition. Wiley, 2013, chapter 5.
  `,
  innocent: [
    'With a very large sample the test speaks against models that fit well enough to be of use, '
      + 'and the authors look at the size of the misfit.',
    'The word “significant” is meant of the model as a whole, and the p-value is that of another '
      + 'test.',
    'The words tell of the model before a term was added, or of another model.',
  ],
  grade: 'discrepancy',

  judge(reading) {
    return judgeSayings(reading, OF_FIT, judgeFit);
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Could the authors check the reading of the test, and show
    calibration with a plot?
  `,

  examples: [
    {
      text: 'The Hosmer-Lemeshow test (p = 0.41) showed no evidence of poor fit.',
      outcome: 'agrees',
      note: 'a large p finds nothing against the fit',
    },
    {
      text: 'The Hosmer-Lemeshow test showed a good fit of the model (p = 0.003).',
      outcome: 'disagrees',
      note: 'p = 0.003 speaks against the fit',
    },
    {
      text: 'The Hosmer-Lemeshow test was not significant (p = 0.41), so that the model fitted '
        + 'poorly.',
      outcome: 'disagrees',
      note: 'a large p finds nothing against the fit',
    },
    {
      text: 'The Hosmer-Lemeshow test gave p = 0.048, and the fit was called good in 48,000 '
        + 'residents.',
      outcome: 'cannot tell',
      note: 'close to 0.05: in a large sample small misfits show',
    },
  ],
});

const OF_FIT = /\bHosmer[ -–—]{1,3}(?:and |& )?Lem[ae]show\w*/gi;

/** The p-value of a sentence on fit. */
const P_VALUE = /\bp(?:[ -]?values?)?\s?(?:[=<>≤]|was|of|is)?\s?([<>=]?)\s?(0?[.·]\d+)/gi;

const GOOD = new RegExp(
  '\\b(?:good|well|adequate\\w*|acceptabl\\w*|satisfactor\\w*|excellent|reasonabl\\w*'
    + '|appropriate)\\b'
    + '[^.;]{0,40}\\b(?:fit\\w*|calibrat\\w*)|\\b(?:fit\\w*'
    + '|calibrat\\w*)\\b[^.;,]{0,30}\\b(?:good|well'
    + '|adequate\\w*|acceptabl\\w*|satisfactor\\w*|excellent|reasonabl\\w*)\\b',
  'i',
);
const POOR = new RegExp(
  '\\b(?:poor\\w*|inadequate\\w*|bad\\w*|lack of)\\b[^.;,]{0,20}\\b(?:fit\\w*|calibrat\\w*)'
    + '|\\bfit\\w*\\b[^.;,]{0,25}\\b(?:poor\\w*|badly|inadequate\\w*)\\b|\\bdid not fit\\b',
  'i',
);
const PROOF = new RegExp(
  '\\b(?:prov(?:e|es|ed|en|ing)|proof)\\b[^.;]{0,40}\\b(?:model|fit\\w*|calibrat\\w*'
    + '|correct)',
  'i',
);
const DENIED = new RegExp(
  '\\b(?:no|not|without|nor|against|neither)\\b[^.;]{0,30}\\b(?:poor|lack|inadequate|bad'
    + '|fit|good|adequate)',
  'i',
);

function judgeFit({ sentence }: Saying): Verdict | undefined {
  const values = [...sentence.matchAll(P_VALUE)];
  const [found, ...others] = values;
  if (found === undefined || others.length > 0) return undefined;
  if (/\bif\b|\bwould\b|consider|defined|criteri|indicat(?:es|ing) that a/i.test(sentence)) {
    return undefined;
  }
  const p = Number((found[2] ?? '').replace('·', '.'));
  if (p >= 0.05 && PROOF.test(sentence)) {
    return disagrees(`p = ${p} finds nothing against the fit of the model, and does not prove it`);
  }
  const isSmall = p < 0.05 && !found[0].includes('>');
  const isGood = GOOD.test(sentence);
  const isPoor = POOR.test(sentence);
  if (isGood === isPoor) return isPoor && !isSmall ? agrees : undefined;
  const isDenied = DENIED.test(sentence);
  if (isDenied) return isDenied && isGood ? undefined : isSmall ? undefined : agrees;
  if (isGood === !isSmall) return agrees;
  if (isSmall && p > 0.04) {
    return cannotTell(`p = ${p} is close to 0.05, and large samples show small misfits`);
  }
  return disagrees(isSmall
    ? `p = ${p} speaks against the fit of the model, and the words call it good`
    : `p = ${p} finds nothing against the fit of the model, and the words call it poor`);
}
