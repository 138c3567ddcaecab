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
  id: 'overlapping-intervals',
  question: 'Is the overlap of two intervals taken to show that there is no difference?',
  why: `
    Two 95% intervals can overlap and the two estimates differ clearly: where equal intervals
    just touch, the p-value of the difference is about 0.006. Only the converse holds, that
    intervals apart mean a difference.
  `,
  source: `
    Schenker N, Gentleman JF. On judging the significance of differences by examining the overlap
    between confidence intervals. Am Stat 2001;55:182–186.
  `,
  innocent: [
    'The overlap is mentioned as a description, and a test of the difference stands beside it.',
    'The overlap is so wide that any test would agree.',
    'The groups are the same people, so that neither the intervals nor their overlap decide.',
  ],
  grade: 'caution',

  judge(reading) {
    return judgeSayings(reading, OVERLAP, judgeOverlap);
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Please give the difference or the ratio of the two with its own
    interval.
  `,

  examples: [
    {
      text: 'The confidence intervals overlapped, so that there was no significant difference '
        + 'between '
        + 'the wards.',
      outcome: 'disagrees',
      note: 'intervals may overlap and the estimates differ',
    },
    {
      text: 'The wards did not differ, as their 95% CIs overlap.',
      outcome: 'disagrees',
      note: 'intervals may overlap and the estimates differ',
    },
    {
      text: 'The confidence intervals did not overlap, so that the wards differed.',
      outcome: 'agrees',
      note: 'intervals apart mean a difference',
    },
    {
      text: 'The 95% confidence intervals of the two wards overlapped.',
      outcome: 'cannot tell',
      note: 'nothing is concluded from it here',
    },
  ],
});

const OVERLAP = new RegExp(
  '\\b(?:confidence intervals?|confidence limits|CIs?|intervals)\\b[^.;]{0,40}?\\boverlap\\w*'
    + '|\\boverlap\\w*\\s+(?:of (?:the )?|between (?:the )?'
    + '|in (?:the )?)?(?:95% )?(?:confidence (?:intervals?|limits)|CIs?)\\b',
  'gi',
);

const NO_DIFFERENCE = new RegExp(
  '\\b(?:no|not|nor|neither)\\b[^.;]{0,40}\\b(?:differ\\w*|significan\\w*|distinguish\\w*'
    + '|heterogene\\w*|interaction)'
    + '|\\b(?:similar|comparable|equal(?:ly)?|equivalent|the same|indistinguishable'
    + '|nonsignificant)\\b',
  'i',
);

const APART = new RegExp(
  '\\b(?:non-?overlap\\w*|(?:do|did|does|were|was|are|is) not overlap\\w*|no overlap'
    + '|without overlap\\w*|minimal overlap)',
  'i',
);

function judgeOverlap({ sentence }: Saying): Verdict | undefined {
  if (APART.test(sentence) || /\bnot overlap/i.test(sentence)) return agrees;
  if (/overlap\w*\s+(?:with )?(?:1|one|unity|zero|0|the null|null)\b/i.test(sentence)) {
    return undefined;
  }
  return NO_DIFFERENCE.test(sentence)
    ? disagrees('overlap of two intervals is taken for no difference, and intervals may overlap '
      + 'where the two estimates differ with p below 0.01')
    : cannotTell('an overlap is mentioned, and nothing is concluded from it here');
}
