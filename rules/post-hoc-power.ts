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
  id: 'post-hoc-power',
  question: 'Is power worked out afterwards from the effect that was seen?',
  why: `
    Power at the observed effect is only the p-value in other words: p = 0.05 always goes with a
    power of about 50%. It cannot explain a negative result. What the study leaves open is what
    its interval says.
  `,
  source: `
    Hoenig JM, Heisey DM. The abuse of power: the pervasive fallacy of power calculations for data
    analysis. Am Stat 2001;55:19–24. Goodman SN, Berlin JA. The use of predicted confidence
    intervals when planning experiments. Ann Intern Med 1994;121:200–206.
  `,
  innocent: [
    'Power was worked out after the data were collected, but for an effect chosen for its '
      + 'importance and not for the one that was seen.',
    'A reviewer or an editor asked for it.',
    'The calculation was made with the sample that was reached, before the outcome was looked at.',
  ],
  grade: 'caution',

  judge(reading) {
    return judgeSayings(reading, AFTERWARDS, judgePower);
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Please let the interval tell what the study leaves open, in place
    of power after the fact.
  `,

  examples: [
    {
      text: 'Post hoc power was 22%, which explains the negative result.',
      outcome: 'disagrees',
      note: 'power at the observed effect is the p-value in other words',
    },
    {
      text: 'The observed power for the comparison of wards was 0.31.',
      outcome: 'disagrees',
      note: 'the observed power follows from p alone',
    },
    {
      text: 'A post hoc power calculation showed 90% power to detect an odds ratio of 2.0.',
      outcome: 'cannot tell',
      note: 'for an effect that was chosen, perhaps for its importance',
    },
    {
      text: 'We did no post hoc power calculation, since the intervals tell what is left open.',
      outcome: 'agrees',
      note: 'it is declined',
    },
  ],
});

const AFTERWARDS = new RegExp(
  '\\b(?:post[- ]?hoc|retrospective(?:ly)?|observed|achieved|a posteriori'
    + '|after[- ]the[- ]fact) (?:statistical )?power\\b(?! (?:spectr|output|density|doppler'
    + '|law|station))',
  'gi',
);

/** Words that decline it or warn of it. */
const DECLINED = new RegExp(
  '\\b(?:no|not|avoid\\w*|discourag\\w*|without|uninformative|misleading|flaw\\w*|inappropriate)'
    + '\\b[^.;]{0,60}\\bpower\\b',
  'i',
);

const FOR_AN_EFFECT =
  /\bpower(?:ed)?\b[^.;]{0,40}\b(?:to detect|for detecting|to find|to identify|to show)\b/i;

function judgePower({ sentence }: Saying): Verdict | undefined {
  if (DECLINED.test(sentence) && !/not (?:significant|differ)/i.test(sentence)) return agrees;
  if (FOR_AN_EFFECT.test(sentence)) {
    return cannotTell('power for an effect that was chosen: the text does not say whether it is '
      + 'the one seen');
  }
  return /\d|explain|negative|not significant|insufficient|low\b/i.test(sentence)
    ? disagrees('power worked out after the fact from what was seen says no more than the p-value')
    : cannotTell('power after the fact is mentioned, and no number is given');
}
