import {
  agrees,
  cannotTell,
  defineManuscriptRule,
  disagrees,
  type Judgement,
  numbersOf,
  type Printed,
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
  id: 'unit-of-predictor',
  question: 'Is it said per how much of a measured quantity a ratio is?',
  why: `
    A ratio of 1.03 for age may be per year, and 1.34 per ten years is the same finding. Without
    the unit the ratio of a continuous predictor cannot be read, compared or pooled.
  `,
  source: `
    von Elm E, Altman DG, Egger M, et al. The STROBE statement. Lancet 2007;370:1453–1457, with
    Vandenbroucke JP et al. Explanation and elaboration. PLoS Med 2007;4:e297 (items 11 and 16).
  `,
  innocent: [
    'The unit stands in the methods, for instance “continuous variables per unit”.',
    'The quantity was cut in two, and the row is of the upper part.',
    'Per year of age is understood in the field.',
  ],
  grade: 'caution',

  judge(reading) {
    const isToldElsewhere = UNITS_ELSEWHERE.test(reading.manuscript.text);
    const found = reading.findings.results.flatMap((result): readonly Judgement[] => {
      if (result.kind !== 'ratio' || result.estimate === undefined) return [];
      const verdict = judgeRow(result, result.estimate, reading, isToldElsewhere);
      if (verdict === undefined) return [];
      return [{ verdict, span: result.span, marks: spansOf(numbersOf(result)), result }];
    });
    return toldOnce(reading, found);
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Please state the unit, for instance per year, per 10 mmHg or per
    standard deviation.
  `,

  examples: [
    {
      text: 'Table 2. Predictors of relapse\nVariable\tOR (95% CI)\nAge\t1.03 (1.01 to 1.05)\n'
        + 'Smoking\t1.59 (1.05 to 2.41)\n',
      outcome: 'disagrees',
      note: 'per year, per five years, per decade?',
    },
    {
      text: 'Table 2. Predictors of relapse\nVariable\tOR (95% CI)\nAge (per year)\t1.03 (1.01 '
        + 'to 1.05)\n'
        + 'Smoking\t1.59 (1.05 to 2.41)\n',
      outcome: 'agrees',
      note: 'the unit stands in the row',
    },
    {
      text: 'Table 2. Predictors of relapse\nVariable\tOR (95% CI)\nBody mass index\t1.07 (1.02 '
        + 'to 1.12)\n'
        + 'Smoking\t1.59 (1.05 to 2.41)\n',
      outcome: 'disagrees',
      note: 'per kg/m², or per 5 kg/m²?',
    },
    {
      text: 'Table 2. Predictors of relapse\nVariable\tOR (95% CI)\nAge\t2.40 (1.31 to 4.40)\n'
        + 'Smoking\t1.59 (1.05 to 2.41)\n',
      outcome: 'cannot tell',
      note: 'so far from 1 that it may be a group, such as the old against the young',
    },
  ],
});

/** Measured quantities, as rows call them when they say no more. */
const MEASURED = new RegExp(
  '^(?:mean |patient |maternal |log )?(?:age|age at (?:diagnosis|surgery|admission|baseline'
    + '|entry|enrol?lment|onset)|BMI|body mass index|weight|height'
    + '|(?:systolic |diastolic )?blood pressure|SBP|DBP|heart rate|(?:serum )?(?:creatinine'
    + '|albumin|bilirubin|sodium'
    + '|potassium|uric acid|CRP|cholesterol|glucose|ferritin)|(?:total |LDL '
    + '|HDL )?cholesterol|h(?:a|e)emoglobin|HbA1c|eGFR|GFR|CRP'
    + '|C-reactive protein|LVEF|ejection fraction|platelets?(?: count)?|tumou?r size'
    + '|gestational age|birth weight'
    + '|waist circumference|length of stay|duration of (?:surgery|diabetes|disease)'
    + '|operative time)[*†‡§a-d]?$',
  'i',
);

/** Words and signs of a unit, of a group, or of what was done with the quantity. */
const UNIT = new RegExp(
  '\\bper\\b|\\beach\\b|\\bevery\\b|years?\\b|\\byrs?\\b|\\bunits?\\b|\\bSD\\b'
    + '|standard deviation|continuous|increment'
    + '|[/<>≥≤]|\\bvs\\b|versus|mmHg|kg|mg|\\bcm\\b|quartile|tertile|median|categor|dichotom'
    + '|\\bolder\\b|\\d+ ?[-–] ?\\d+',
  'i',
);

/** Ratios of a unit lie near 1; farther away the row may compare two groups. */
const NEAR = { low: 0.8, high: 1.25 } as const;

/** Words anywhere that tell of units for all. */
const UNITS_ELSEWHERE = /\bcontinuous|\bper (?:unit|year|one)|one[- ]unit/i;

function judgeRow(
  result: RatioResult,
  estimate: Printed,
  reading: Reading,
  isToldElsewhere: boolean,
): Verdict | undefined {
  const { cell, about } = result;
  if (cell === undefined) return judgeProse(result, estimate, reading, isToldElsewhere);
  if (!MEASURED.test(cell.row.trim().replace(/\s*[([].*$/, ''))) return undefined;
  if (about.unit !== undefined || UNIT.test(`${cell.row} ${cell.column}`)) return agrees;
  if (UNIT.test(aroundTable(result, reading))) return agrees;
  if (estimate.value < NEAR.low || estimate.value > NEAR.high) {
    return cannotTell(`“${cell.row}” may be a group here, and the table does not say which`);
  }
  if (isToldElsewhere) {
    return cannotTell('the text speaks of units elsewhere, which may be those of this row');
  }
  return disagrees(`the row “${cell.row}” does not say per how much its ratio ${estimate.plain} `
    + `is`);
}

/** In prose only what stands so close to 1 that it can be no comparison of groups. */
const CLOSE = { low: 0.9, high: 1.1 } as const;

// Age was associated with death (OR 1.05, 95% CI 1.02 to 1.08).
// ^^^
function judgeProse(
  result: RatioResult,
  estimate: Printed,
  reading: Reading,
  isToldElsewhere: boolean,
): Verdict | undefined {
  const term = result.about.term?.trim() ?? '';
  if (!MEASURED.test(term) || estimate.value < CLOSE.low || estimate.value > CLOSE.high) {
    return undefined;
  }
  if (result.interval === undefined || sideOfOne(result.interval) === 'around') return undefined;
  if (result.about.unit !== undefined || UNIT.test(wordsAround(reading, result.span, 200))) {
    return agrees;
  }
  if (isToldElsewhere) {
    return cannotTell('the text speaks of units elsewhere, which may be those of this ratio');
  }
  return disagrees(`it is not said per how much of “${term}” the ratio ${estimate.plain} is`);
}

/** The caption and the notes of the table of a result. */
function aroundTable({ cell, span }: RatioResult, reading: Reading): string {
  const { text } = reading.manuscript;
  if (cell === undefined) return wordsAround(reading, span);
  const { caption, notes } = cell.table;
  const parts = caption === undefined ? notes : [caption, ...notes];
  return parts.map((part) => quote(text, part)).join(' ').replace(/\d+ years? /gi, ' ');
}
