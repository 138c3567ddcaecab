import {
  agrees,
  cannotTell,
  defineManuscriptRule,
  disagrees,
  fixed,
  type Judgement,
  type Reading,
  type Saying,
  sayings,
  toldOnce,
  type Verdict,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'spread-of-mean',
  question: 'Is the number beside a mean named, and can it be what it is called?',
  why: `
    A standard deviation tells how people differ, a standard error how sure the mean is. “±” can
    be either. A standard error as large as a standard deviation, or a standard deviation of more
    than half the mean of something that cannot be below zero, asks for a second look.
  `,
  source: `
    Altman DG, Bland JM. Standard deviations and standard errors. BMJ 2005;331:903. Altman DG,
    Bland JM. Detecting skewness from summary information. BMJ 1996;313:1200. Lang TA, Altman DG.
    SAMPL guidelines, 2015 (mean (SD), not ±).
  `,
  innocent: [
    'What “±” stands for is said in the methods or under a table.',
    'The variable can be below zero, or was logged.',
    'A mean is wanted in spite of skewness, as of costs.',
    'The number of people is that of another group, or of the whole study.',
  ],
  grade: 'caution',

  judge(reading) {
    const named = sayings(reading, NAMED);
    const onBare = judgeBare(reading);
    const kinds = [
      named.filter(isOfError).map((saying) => judgementOf(saying, judgeNamed(saying))),
      named.filter((saying) => !isOfError(saying))
        .map((saying) => judgementOf(saying, judgeNamed(saying))),
      sayings(reading, PLUS_MINUS).map((saying) => judgementOf(saying, onBare)),
    ];
    return kinds.flatMap((kind) => toldOnce(reading, kind.flat()));
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Could the authors check, and give the mean with its standard
    deviation, or the median with the quartiles where the values are skewed?
  `,

  examples: [
    {
      text: 'The mean age was 54.3 (SE 12.1) years, n = 120.',
      outcome: 'disagrees',
      note: '12.1 × √120 = 132.5: no ages differ so much',
    },
    {
      text: 'The mean age was 54.3 (SD 12.1) years, n = 120.',
      outcome: 'agrees',
      note: 'a usual standard deviation of age',
    },
    {
      text: 'The mean age was 54.3 ± 12.1 years.',
      outcome: 'disagrees',
      note: 'standard deviation or standard error?',
    },
    {
      text: 'Values are means ± SD. The mean age was 54.3 ± 12.1 years.',
      outcome: 'agrees',
      note: '“±” is named',
    },
    {
      text: 'The mean length of stay was 6.2 (SD 9.8) days.',
      outcome: 'disagrees',
      note: '9.8 is more than half of 6.2, and a stay is never below zero',
    },
    {
      text: 'The mean age was 54.3 (SE 12.1) years.',
      outcome: 'cannot tell',
      note: 'without the number of people no standard deviation follows',
    },
  ],
});

// mean age 54.3 (SE 12.1) years, n=120     mean length of stay was 6.2 days (SD 9.8)
const NAMED = new RegExp(
  '\\bmean\\s+((?:[\\p{L}-]+\\s+){1,6}?)(?:(?:of|was|were|is|:'
    + '|=)\\s*)?(\\d+(?:[.·]\\d+)?)\\s*(?:[\\p{L}/]{1,8}\\s*)?'
    + '[([,]\\s*(?:±\\s*)?(SEM?|SD|s\\.d\\.|standard (?:deviation'
    + '|error))\\s*[=:,]?\\s*(?:of\\s)?(\\d+(?:[.·]\\d+)?)',
  'giu',
);

const PLUS_MINUS = new RegExp(
  '\\b(?:mean|average|aged?|BMI|weight|duration'
    + '|stay)[\\s,:]+(?:[\\p{L}-]+\\s+){0,6}?(?:(?:of|was|were|is|:'
    + '|=)\\s*)?\\d+(?:[.·]\\d+)?\\s*'
    + '(?:±|\\+\\s?\\/?\\s?[-−–])\\s*\\d+(?:[.·]\\d+)?',
  'giu',
);

/** Where a text says what "±" stands for, anywhere. */
const IS_NAMED = new RegExp(
  '(?:±|\\+\\s?/?\\s?[-−–])\\s*\\(?(?:1\\s?)?(?:SEM?|SD|S\\.D\\.|S\\.E\\.'
    + '|standard (?:deviation|error))|(?:SEM?|SD|standard (?:deviations?'
    + '|errors?))\\b[^.;]{0,40}(?:±|\\+/-)|\\(±?\\s?(?:SD|SEM?)\\)|[mM]ean(?:s'
    + '| values?)? \\(?(?:and|with|±|\\() ?(?:SD|SEM?|standard (?:deviation|error))',
  '',
);

function judgementOf({ span }: Saying, verdict: Verdict | undefined): readonly Judgement[] {
  return verdict === undefined ? [] : [{ verdict, span, marks: [span] }];
}

function isOfError({ parts }: Saying): boolean {
  return /^SE|error/i.test(parts[2] ?? '');
}

/** What cannot be below zero and is therefore skewed where its spread is wide. */
const NEVER_BELOW_ZERO = new RegExp(
  '\\b(?:length of (?:hospital |ICU )?stay|stay|duration|time|delay|interval|costs?|price'
    + '|income|age|weight|height|BMI'
    + '|number|count|concentration|levels?|dose|consumption|intake|hours?|days?|distance'
    + '|pressure|follow-?up)\\b',
  'i',
);

const NOT_BOUNDED = new RegExp(
  '\\b(?:change|difference|score|z|reduction|increase|decrease|improvement|deviation'
    + '|log)\\b',
  'i',
);

function judgeNamed({ parts, sentence }: Saying): Verdict | undefined {
  const [what = '', meanText = '', name = '', spreadText = ''] = parts;
  const [mean, spread] = [numberOf(meanText), numberOf(spreadText)];
  if (!(mean > 0) || !(spread > 0) || NOT_BOUNDED.test(what) || !NEVER_BELOW_ZERO.test(what)) {
    return undefined;
  }
  if (/^SE|error/i.test(name)) return judgeStandardError(mean, spread, sentence);
  return spread > mean / 2 && !/\bage\b/i.test(what)
    ? disagrees(`a standard deviation of ${spreadText} beside a mean of ${meanText} says that `
      + `the values are skewed`,
      { working: [`${spreadText} > ${meanText} / 2`] })
    : agrees;
}

function judgeStandardError(mean: number, error: number, sentence: string): Verdict {
  const people = Number(sentence.match(/\bn\s?=\s?(\d[\d,]*)/i)?.[1]?.replace(',', '') ?? NaN);
  if (!(people > 1)) {
    return cannotTell('without the number of people no standard deviation follows from it');
  }
  const deviation = error * Math.sqrt(people);
  return deviation > mean
    ? disagrees(`a standard error of ${error} among ${people} answers to a standard deviation of `
      + `${fixed(deviation, 1)}, more than the mean itself`, {
      working: [`${error} × √${people} = ${fixed(deviation, 1)}`],
      explanations: ['The standard deviation may be printed under the name of the standard error.'],
    })
    : agrees;
}

function judgeBare({ manuscript }: Reading): Verdict {
  return IS_NAMED.test(manuscript.text)
    ? agrees
    : disagrees('what stands behind “±” is not named: it may be a standard deviation or a '
      + 'standard error');
}

function numberOf(text: string): number {
  return Number(text.replace('·', '.'));
}
