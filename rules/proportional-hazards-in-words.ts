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
  id: 'proportional-hazards-in-words',
  question: 'Does the text itself say that proportional hazards were not examined, or do not hold?',
  why: `
    A hazard ratio sums up a follow-up in one number where the hazards of the groups stay
    proportional. Where they do not, it is an average that depends on how long people were
    followed, and differences at stated times tell more.
  `,
  source: `
    Hernán MA. The hazards of hazard ratios. Epidemiology 2010;21:13–15. Kuitunen I, Ponkilainen
    VT, Uimonen MM, et al. Testing the proportional hazards assumption in Cox regression. BMC
    Musculoskelet Disord 2021;22:489.
  `,
  innocent: [
    'The hazard ratio is meant as an average over the follow-up, and is called so.',
    'Another model was used where the assumption did not hold.',
    'The follow-up is so short that a change of the ratio could not be seen.',
  ],
  grade: 'caution',

  judge(reading) {
    return judgeSayings(reading, PROPORTIONAL, judgeSaying);
  },

  comment: (words, { because }) => `
    On “${words}”: ${because}. Please examine it, for instance with scaled Schoenfeld residuals or a
    term with time, and give restricted mean survival or risks at stated times where it fails.
  `,

  examples: [
    {
      text: 'The proportional hazards assumption was not assessed.',
      outcome: 'disagrees',
      note: 'the text says so itself',
    },
    {
      text: 'Proportionality was checked with Schoenfeld residuals (p = 0.21).',
      outcome: 'agrees',
      note: 'it was examined',
    },
    {
      text: 'The proportional hazards assumption was violated for stage.',
      outcome: 'disagrees',
      note: 'one ratio does not sum up the follow-up',
    },
    {
      text: 'The proportional hazards assumption was violated for stage, so the model was '
        + 'stratified by it.',
      outcome: 'cannot tell',
      note: 'another model was used where it did not hold',
    },
  ],
});

const PROPORTIONAL = new RegExp(
  '\\b(?:proportional[- ]hazards? (?:assumption|property)'
    + '|(?:assumption of )?proportional(?:ity)?(?: of (?:the )?hazards?| hazards?(?! (?:model'
    + '|regression|analys)))|proportionality(?: assumption)?)\\b',
  'gi',
);

const NOT_EXAMINED = new RegExp(
  '\\b(?:not|never|n[’\']t)\\s+(?:been\\s+|formally\\s+|explicitly\\s+)*(?:assess|test'
    + '|check|examin|evaluat|verif|investigat|explor)\\w*',
  'i',
);
const EXAMINED = new RegExp(
  '\\b(?:assess|test|check|examin|evaluat|verif|investigat|explor|confirm|met\\b|held'
    + '|satisf)\\w*',
  'i',
);
const FAILED = /\b(?:violat\w*|did not hold|not (?:met|satisfied|fulfilled|hold|tenable|valid))\b/i;
const NOT_FAILED = new RegExp(
  '\\b(?:no|not|without|never)\\b[^.;]{0,30}\\bviolat|\\bif\\b|\\bwhether\\b|\\bwhen\\b'
    + '|\\bin case\\b',
  'i',
);
const INSTEAD = new RegExp(
  '\\b(?:stratif\\w*|time[- ]dependent|time[- ]varying|restricted mean'
    + '|accelerated failure|piecewise|interaction with time|landmark|weighted|therefore|thus'
    + '|so)\\b',
  'i',
);

function judgeSaying({ sentence }: Saying): Verdict | undefined {
  if (NOT_EXAMINED.test(sentence)) {
    return disagrees('proportional hazards were not examined, by the text itself');
  }
  if (FAILED.test(sentence) && !NOT_FAILED.test(sentence)) {
    return INSTEAD.test(sentence)
      ? cannotTell('something else seems to have been done where the assumption did not hold')
      : disagrees('proportional hazards do not hold, by the text itself, so that one ratio does '
        + 'not '
        + 'sum up the follow-up');
  }
  return EXAMINED.test(sentence) ? agrees : undefined;
}
