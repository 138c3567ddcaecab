import {
  agrees,
  type AreaInText,
  areasInText,
  cannotTell,
  defineManuscriptRule,
  disagrees,
  type Judgement,
  limitsInWords,
  spansOf,
  type Verdict,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'discrimination-in-words',
  question: 'Do the words on discrimination fit the area under the curve?',
  why: `
    An area of 0.5 is that of tossing a coin. Where the interval holds 0.5, the numbers do not
    show that a marker predicts; and an area in the low 0.7s, often called excellent, leaves more
    than one pair in four ranked the other way round.
  `,
  source: `
    Hosmer DW, Lemeshow S, Sturdivant RX. Applied Logistic Regression, 3rd edition. Wiley, 2013
    (0.7 to 0.8 acceptable, 0.8 to 0.9 excellent, above outstanding). White N et al. Evidence of
    questionable research practices in clinical prediction models. BMC Med 2023;21:339.
  `,
  innocent: [
    'Labels differ between textbooks, and none has a law behind it.',
    'The word is said of another model, or of calibration.',
    'The area is a difference in a field where 0.7 is the best that there is.',
    'The direction is reversed: an area below 0.5 predicts with the sign turned.',
  ],
  grade: 'caution',

  judge(reading) {
    return areasInText(reading).flatMap((area): readonly Judgement[] => {
      const verdict = judgeArea(area);
      if (verdict === undefined) return [];
      const { value, interval } = area;
      return [{
        verdict,
        span: area.span,
        marks: spansOf([value, interval?.lower, interval?.upper]),
        ...(area.result === undefined ? {} : { result: area.result }),
      }];
    });
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Please let the wording follow the estimate and its interval, and
    show calibration beside discrimination.
  `,

  examples: [
    {
      text: 'The AUC of 0.54 (95% CI 0.47 to 0.61) shows that the marker predicts mortality.',
      outcome: 'disagrees',
      note: 'the interval holds 0.5',
    },
    {
      text: 'The model had excellent discrimination (AUC 0.71).',
      outcome: 'disagrees',
      note: '0.7 to 0.8 is called acceptable',
    },
    {
      text: 'The model had excellent discrimination (AUC 0.86, 95% CI 0.81 to 0.91).',
      outcome: 'agrees',
      note: '0.8 to 0.9 is called excellent',
    },
    {
      text: 'The marker did not predict mortality (AUC 0.54, 95% CI 0.47 to 0.61).',
      outcome: 'agrees',
      note: 'no claim goes beyond the numbers',
    },
    {
      text: 'The model had good discrimination (AUC 0.71, 95% CI 0.49 to 0.93).',
      outcome: 'disagrees',
      note: 'the interval holds 0.5',
    },
    {
      text: 'The AUC was 0.71.',
      outcome: 'cannot tell',
      note: 'no words on how well it discriminates, and no interval',
    },
  ],
});

/** A label, and the least area that it is given to; half a step of grace below it. */
const LABELS: readonly (readonly [RegExp, number])[] = [
  [/\b(?:outstanding|near(?:ly)?[ -]perfect|perfect)\b/i, 0.9],
  [/\b(?:excellent|very good|strong|high(?:ly)?(?: accura\w+| predictive)?)\b/i, 0.8],
  [/\bgood\b/i, 0.7],
  [/\b(?:acceptable|adequate|reasonable|fair|satisfactory)\b/i, 0.6],
];

/** How far below its usual place a label is let pass. */
const GRACE = 0.03;

const DISCRIMINATION = new RegExp(
  '\\b(?:discriminat\\w*|predict\\w*|accura\\w*|performance|diagnostic|ability|power'
    + '|model|AUC|area)\\b',
  'i',
);

const PREDICTS = new RegExp(
  '\\b(?:predict(?:s|ed|ive|or)?\\b(?! (?:value|model))|useful|able to (?:predict'
    + '|discriminat|identif)\\w*|discriminated?\\b(?! poor))',
  'i',
);

/** Words that take the claim back, or that never made one. */
const DENIED = new RegExp(
  '\\b(?:not|no|poor\\w*|weak\\w*|fail\\w*|limited|low|lack\\w*|insufficient|neither|nor|modest'
    + '|moderate\\w*|better than chance|cannot|unable|without|only)\\b|n[’\']t\\b',
  'i',
);

function judgeArea(area: AreaInText): Verdict | undefined {
  const { value, interval, words } = area;
  const scale = value.percent || value.value > 1 ? 100 : 1;
  const share = value.value / scale;
  if (share < 0 || share > 1) return undefined;
  const label = LABELS.find(([pattern]) => pattern.test(words));
  const speaks = label !== undefined || PREDICTS.test(words);
  if (DENIED.test(words)) return agrees;
  if (!speaks) {
    return interval === undefined ? cannotTell('no words tell how well it discriminates') : agrees;
  }
  const half = 0.5 * scale;
  if (interval !== undefined && interval.lower.value <= half && interval.upper.value >= half) {
    return disagrees(`the interval ${limitsInWords(interval)} holds ${half}, which is the area `
      + `of a coin`);
  }
  if (interval === undefined && share < 0.55 && share > 0.45) {
    return disagrees(`an area of ${value.plain} is close to ${half}, which is that of a coin`);
  }
  return label === undefined || !DISCRIMINATION.test(words)
    ? agrees
    : judgeLabel(area, label, share);
}

function judgeLabel(
  { value, words }: AreaInText,
  [pattern, least]: readonly [RegExp, number],
  share: number,
): Verdict {
  if (share >= least - GRACE) return agrees;
  const label = words.match(pattern)?.[0] ?? '';
  return disagrees(`“${label}” is said of an area of ${value.plain}; the word is usually kept for `
    + `${least} and above`);
}
