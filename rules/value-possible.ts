import {
  agrees,
  cannotTell,
  type Count,
  defineManuscriptRule,
  disagrees,
  type Judgement,
  type Printed,
  type Range,
  type Reading,
  type Result,
  spansOf,
  unrounded,
  type Verdict,
  wordsAround,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'value-possible',
  question: 'Can every share, area under a curve and correlation take the value that is printed?',
  why: `
    A share of people lies between 0 and 100%, an area under the ROC curve and a C statistic
    between 0 and 1, a correlation between −1 and 1, and no part is larger than its whole. A value
    beyond these belongs to another quantity, or lost its decimal point.
  `,
  source: `
    Altman DG, Machin D, Bryant TN, Gardner MJ. Statistics with Confidence, 2nd ed. London: BMJ
    Books, 2000. Hanley JA, McNeil BJ. The meaning and use of the area under a receiver operating
    characteristic (ROC) curve. Radiology 1982;143:29–36.
  `,
  innocent: [
    'A decimal point was lost or moved.',
    'The number is a percent change, a relative rate or a dose, which may pass 100%.',
    'The area is one under a concentration curve, in its own unit.',
    'The count is of events, visits or lesions, of which a person may have several.',
    'The interval was made by the simple method, which reaches beyond 0 and 100% near the ends.',
  ],
  grade: 'contradiction',

  judge(reading) {
    return [
      ...reading.findings.results.flatMap((result) => judgementsOf(result, reading)),
      ...reading.findings.counts.flatMap((count) => judgementsOfCount(count, reading)),
    ];
  },

  comment: (words, { because, grade }) => (grade === 'caution'
    ? `
      For “${words}”: ${because}. Could the authors give an interval by a method that stays within
      the bounds, such as Wilson’s?
    `
    : `
      For “${words}”: ${because}. Could the authors check this number against the analysis?
    `),

  examples: [
    {
      text: 'The score had an area under the curve of 0.81 (95% CI 0.74 to 0.88).',
      outcome: 'agrees',
      note: '0 ≤ 0.81 ≤ 1',
    },
    {
      text: 'The score had an area under the curve of 1.18 (95% CI 0.74 to 1.22).',
      outcome: 'disagrees',
      note: '1.18 > 1: 0.81 with two digits exchanged, or a digit too many',
    },
    {
      text: 'The correlation was 1.42 (95% CI 1.31 to 1.52).',
      outcome: 'disagrees',
      note: '1.42 > 1',
    },
    {
      text: 'The sensitivity was 96% (95% CI 89% to 103%).',
      outcome: 'disagrees',
      note: 'the simple interval reaches beyond 100%; Wilson’s does not',
    },
    {
      text: 'In plasma the area under the curve was 1.62 (95% CI 1.41 to 1.86).',
      outcome: 'cannot tell',
      note: 'an area under a concentration curve, in a unit of its own',
    },
  ],
});

/** What a kind of result can be at most, and how it is called. */
interface Bounds extends Range {
  readonly name: string;
}

function judgementsOf(result: Result, reading: Reading): readonly Judgement[] {
  const bounds = boundsOf(result);
  const { estimate, interval, span } = result;
  if (bounds === undefined || estimate === undefined) return [];
  const verdict = judgeValue(result, estimate, bounds, reading);
  const marks = spansOf([estimate, interval?.lower, interval?.upper]);
  return verdict === undefined ? [] : [{ verdict, span, marks, result }];
}

/** In a table the word over a column tells less surely what its numbers are. */
function boundsOf(result: Result): Bounds | undefined {
  const isPercent = result.estimate?.percent === true;
  switch (result.kind) {
    case 'discrimination':
      return { low: 0, high: isPercent ? 100 : 1, name: 'an area under the curve' };
    case 'proportion':
      return isPercent ? { low: 0, high: 100, name: 'a share' } : undefined;
    case 'other':
      return result.measure === 'correlation' && result.cell === undefined && !isPercent
        ? { low: -1, high: 1, name: 'a correlation' } : undefined;
    default:
      return undefined;
  }
}

/** So far beyond its bound a value is another quantity, such as an area in hours times dose. */
const ANOTHER_QUANTITY = 2;

/** Words near a share that make it a change or a comparison, or an area one of pharmacology. */
const OF_A_CHANGE = new RegExp(
  '\\b(?:increas\\w*|decreas\\w*|chang\\w*|rise|rose|grew|growth|higher|lower|greater|more|excess'
    + '|relative|improv\\w*|reduc\\w*|efficacy|recovery|bioavailability|concentrations?|plasma'
    + '|pharmaco\\w*|dose|predicted|baseline|expected|target|AUC0|h/mL)\\b',
  'i',
);

function judgeValue(
  { interval, span }: Result,
  estimate: Printed,
  bounds: Bounds,
  reading: Reading,
): Verdict | undefined {
  const between = `between ${bounds.low} and ${bounds.high}${estimate.percent ? '%' : ''}`
    .replace('-', '−');
  const limit = [interval?.lower, interval?.upper].find((one) =>
    one !== undefined && isBeyond(one, bounds));
  if (limit === undefined && !isBeyond(estimate, bounds)) return agrees;
  if (isBeyond(estimate, bounds) && isSaidByName(estimate, reading)) return undefined;
  if (estimate.value > ANOTHER_QUANTITY * bounds.high) return undefined;
  const other = wordsAround(reading, span, 120).match(OF_A_CHANGE)?.[0];
  if (other !== undefined) {
    return cannotTell(`the text speaks of “${other}” here, so that the number may be another than `
      + bounds.name);
  }
  if (isBeyond(estimate, bounds)) {
    return disagrees(`${bounds.name} lies ${between}, and ${estimate.plain} is printed`, {
      working: [`${estimate.plain} is not ${between}`],
    });
  }
  return disagrees(
    `${bounds.name} lies ${between}, and a limit of ${limit?.plain ?? ''} is printed`,
    { grade: 'caution' },
  );
}

/** Shares and areas that stand right behind their own name are the question of share-possible. */
const BY_NAME = new RegExp(
  '\\b(?:sensitivity|specificity|predictive values?|[PN]PV|prevalence|survival|cumulative incidence'
    + '|response rate|case fatality|mortality rate|proportion|coverage|accuracy|AUROC|AUC'
    + '|C[- ]statistic|C[- ]index)[^.;,]{0,25}$',
  'i',
);

function isSaidByName({ span }: Printed, { manuscript }: Reading): boolean {
  return BY_NAME.test(manuscript.text.slice(Math.max(0, span.start - 60), span.start));
}

function isBeyond(printed: Printed, { low, high }: Range): boolean {
  const range = unrounded(printed);
  return range.low > high || range.high < low;
}

/** A part larger than its whole, where people are counted: one may have had several events. */
function judgementsOfCount({ count, total, span }: Count, reading: Reading): readonly Judgement[] {
  if (count === undefined || total === undefined || count.value <= total.value) return [];
  if (!OF_PEOPLE.test(wordsAround(reading, span, 40))) return [];
  const verdict = disagrees(`${count.plain} of ${total.plain} is more than all`);
  return [{ verdict, span, marks: spansOf([count, total]) }];
}

/** Words by which a count is of people and not of what happened to them. */
const OF_PEOPLE = /\b(?:women|men|girls|boys|smokers|died|survived)\b/i;
