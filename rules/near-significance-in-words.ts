import {
  agrees,
  defineManuscriptRule,
  disagrees,
  flowing,
  judgeSayings,
  quote,
  type Reading,
  type Saying,
  toldOnce,
  type Verdict,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'near-significance-in-words',
  question: 'Is a result called nearly significant, or a trend towards significance?',
  why: `
    A p-value of 0.06 does not move towards anything: with more data it may fall or rise.
    “Approached significance” and “trend towards” lend weight to one side that the interval
    does not give, and are used only where the authors hoped for an effect.
  `,
  source: `
    Wood J, Freemantle N, King M, Nazareth I. Trap of trends to statistical significance:
    likelihood of near significant P value becoming more significant with extra data. BMJ
    2014;348:g2215.
  `,
  innocent: [
    'The words are meant to say that the result is uncertain, and the interval stands beside them.',
    'A trend over ordered categories is meant, which is a test of its own.',
    'A threshold other than 5% was set beforehand.',
  ],
  grade: 'caution',

  judge(reading) {
    const found = judgeSayings(reading, NEARLY, (saying) => judgeWords(saying, reading));
    return toldOnce(reading, found);
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Please give the estimate with its interval and let it speak, without
    words of nearness to a threshold.
  `,

  examples: [
    {
      text: 'The result approached significance (p = 0.051).',
      outcome: 'disagrees',
      note: 'p-values do not move',
    },
    {
      text: 'There was a trend towards lower mortality with the splint (p = 0.09).',
      outcome: 'disagrees',
      note: 'p = 0.09 points nowhere',
    },
    {
      text: 'There was a significant trend towards lower mortality with longer walks (p = 0.01).',
      outcome: 'agrees',
      note: 'a trend over an ordered exposure that is significant',
    },
    {
      text: 'The difference was marginally significant (OR 1.40, 95% CI 0.98 to 2.00).',
      outcome: 'disagrees',
      note: 'the interval holds 1',
    },
  ],
});

const NEARLY = new RegExp(
  '\\b(?:approach(?:ed|es|ing)?|near(?:ed|s|ing)|close(?:ly)? to|(?:just|almost'
    + '|nearly) reach(?:ed|ing)'
    + '|verge[sd]? on|on the (?:verge|brink|edge) of|bordered on'
    + '|bordering on) (?:conventional |statistical )?significan\\w+'
    + '|\\b(?:marginal(?:ly)?|borderline|nearly|almost|near'
    + '|quasi)[- ](?:statistical(?:ly)? )?significan(?:t|ce)\\b'
    + '|\\bmarginal (?:statistical )?significance\\b'
    + '|\\b(?:trend(?:ed|s|ing)?|tend(?:ed|ency)) (?:to|towards?|for)(?: being'
    + '| a)? (?:statistical |reaching )?significan\\w+'
    + '|\\b(?:just |narrowly )(?:failed|missed|fell short)[^.;,]{0,20}significan\\w+'
    + '|\\b(?:(?:strong|clear|definite|slight|non-?significant|positive'
    + '|favou?rable) )?trends? (?:towards?|to|for|in favou?r of)\\b'
    + '|\\btended towards?\\b',
  'gi',
);

const OF_SIGNIFICANCE = /significan/i;

/** Words that tell of a test over ordered categories, of time, or of honest denial. */
const ANOTHER_TREND = new RegExp(
  '\\b(?:tests? for|p[- ]?(?:value)? ?for|linear|secular|temporal|time|dose|quadratic'
    + '|over time|annual|years?) ?-?trends?\\b|trend test',
  'i',
);

/** Right before the words: there is none. */
const NONE = /\b(?:no|without|any) (?:clear |significant )?$/i;

function judgeWords(saying: Saying, reading: Reading): Verdict | undefined {
  const words = flowing(quote(reading.manuscript.text, saying.span));
  if (ANOTHER_TREND.test(saying.sentence)) return undefined;
  if (saying.role === 'methods' || NONE.test(beforeOf(saying, reading))) return undefined;
  if (OF_SIGNIFICANCE.test(words) && !/^non-?significant/i.test(words)) {
    return disagrees(`the words “${words}” call a result nearly significant`);
  }
  const values = [...saying.sentence.matchAll(/\bp\s?[=<>]\s?(0?[.·]\d+)/gi)]
    .map(([, p = '']) => Number(p.replace('·', '.')));
  const [p, ...others] = values;
  if (p === undefined || others.length > 0 || /but (?:no|not)\b/.test(saying.sentence)) {
    return undefined;
  }
  if (p < 0.05) return agrees;
  return disagrees(`the words “${words}” speak of a trend, and p is ${p}`);
}

function beforeOf({ span }: Saying, { manuscript }: Reading): string {
  return manuscript.text.slice(Math.max(0, span.start - 24), span.start);
}
