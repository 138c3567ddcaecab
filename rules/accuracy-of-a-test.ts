import {
  agrees,
  cannotTell,
  cover,
  defineManuscriptRule,
  disagrees,
  divided,
  type Judgement,
  type NamedNumber,
  namedNumbers,
  overlap,
  passages,
  type Range,
  rangeInWords,
  shareOf,
  type Span,
  unrounded,
  type Verdict,
  wordsAround,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'accuracy-of-a-test',
  question: 'Do a test’s ratios follow from its sensitivity and specificity?',
  why: `
    The positive likelihood ratio is sensitivity over 1 − specificity, the negative one
    1 − sensitivity over specificity, and the diagnostic odds ratio the one over the other.
    Where they do not follow, a number belongs to another threshold, or the two were exchanged.
  `,
  source: `
    Deeks JJ, Altman DG. Diagnostic tests 4: likelihood ratios. BMJ 2004;329:168–169. Glas AS et al.
    The diagnostic odds ratio. J Clin Epidemiol 2003;56:1129–1135.
  `,
  innocent: [
    'They are pooled over studies, each by its own model.',
    'They belong to different thresholds, or to lesions where the others are of people.',
    'They were worked out with half a person added to empty cells.',
  ],
  grade: 'discrepancy',

  judge(reading) {
    const { text } = reading.manuscript;
    return passages(reading).flatMap((span): readonly Judgement[] => {
      const pair = pairIn(text, span);
      if (pair === undefined) return [];
      return DERIVED.flatMap((derived) => {
        const [number] = namedNumbers(text, span, derived.name, 16)
          .filter(({ printed }) => !printed.percent && printed.value > 0);
        if (number === undefined || isFar(pair.span, number.span)) return [];
        const verdict = judgeOne(pair, number, derived, wordsAround(reading, number.span));
        return [{
          verdict,
          span: cover(pair.span, number.span),
          marks: [pair.sensitivity, pair.specificity, number].map(({ printed }) => printed.span),
        }];
      });
    });
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Could the authors check the numbers, and say at which threshold
    each was found?
  `,

  examples: [
    {
      text: 'Sensitivity was 85% and specificity 90% (positive likelihood ratio 8.5).',
      outcome: 'agrees',
      note: '0.85 / 0.10 = 8.5',
    },
    {
      text: 'Sensitivity was 85% and specificity 90% (positive likelihood ratio 5.8).',
      outcome: 'disagrees',
      note: '0.85 / 0.10 = 8.5',
    },
    {
      text: 'Sensitivity was 85% and specificity 90% (diagnostic odds ratio 51).',
      outcome: 'agrees',
      note: '8.5 / (0.15 / 0.90) = 51',
    },
    {
      text: 'Pooled sensitivity was 85% and specificity 90% (positive likelihood ratio 6.1).',
      outcome: 'cannot tell',
      note: 'each may be pooled by its own model',
    },
  ],
});

/** Sensitivity and specificity as one sentence prints them. */
interface Pair {
  readonly sensitivity: NamedNumber;
  readonly specificity: NamedNumber;
  readonly span: Span;
}

/** What follows from the two, in words and as a range. */
interface Derived {
  readonly name: string;
  readonly called: string;
  readonly formula: string;
  readonly of: (sensitivity: Range, specificity: Range) => Range | undefined;
}

const DERIVED: readonly Derived[] = [
  {
    name: String.raw`\b[Pp]ositive likelihood ratio(?:\s*\([^()\d]{1,6}\))?|\bLR\+|\bPLR\b`,
    called: 'positive likelihood ratio',
    formula: 'sensitivity / (1 − specificity)',
    of: (sensitivity, specificity) => divided(sensitivity, rest(specificity)),
  },
  {
    name: String.raw`\b[Nn]egative likelihood ratio(?:\s*\([^()\d]{1,6}\))?|\bLR[-−–]|\bNLR\b`,
    called: 'negative likelihood ratio',
    formula: '(1 − sensitivity) / specificity',
    of: (sensitivity, specificity) => divided(rest(sensitivity), specificity),
  },
  {
    name: String.raw`\b[Dd]iagnostic odds ratio(?:\s*\([^()\d]{1,6}\))?|\bDOR\b`,
    called: 'diagnostic odds ratio',
    formula: 'sensitivity × specificity / ((1 − sensitivity) × (1 − specificity))',
    of: (sensitivity, specificity) =>
      divided(times(sensitivity, specificity), times(rest(sensitivity), rest(specificity))),
  },
];

/** The numbers stand in one sentence or the next, with an interval or so between them. */
const REACH = 160;

function isFar(one: Span, other: Span): boolean {
  return other.start - one.end > REACH || one.start - other.end > REACH;
}

/** One pair in a passage: with more, which belongs to which cannot be told. */
function pairIn(text: string, span: Span): Pair | undefined {
  const isShare = ({ printed }: NamedNumber): boolean => printed.percent
    ? printed.value <= 100
    : printed.value <= 1 && printed.decimals >= 2;
  const [sensitivity, second] = namedNumbers(text, span, '\\b[Ss]ensitivity', 20).filter(isShare);
  const [specificity, third] = namedNumbers(text, span, '\\b[Ss]pecificity', 20).filter(isShare);
  if (sensitivity === undefined || specificity === undefined) return undefined;
  if (second !== undefined || third !== undefined || isFar(sensitivity.span, specificity.span)) {
    return undefined;
  }
  return { sensitivity, specificity, span: cover(sensitivity.span, specificity.span) };
}

const POOLED = /\b(?:pooled|summary|meta.?analy\w*|bivariate|HSROC|average[ds]?|mean|median)\b/i;

function judgeOne(
  { sensitivity, specificity }: Pair,
  number: NamedNumber,
  derived: Derived,
  nearby: string,
): Verdict {
  const implied = derived.of(shareOf(sensitivity.printed), shareOf(specificity.printed));
  if (implied === undefined) return cannotTell('a share may be rounded from 0% or 100%');
  const { printed } = number;
  if (overlap(implied, unrounded(printed))) return agrees;
  const pooled = nearby.match(POOLED)?.[0];
  if (pooled !== undefined) {
    return cannotTell(`the text speaks of “${pooled}” values, and each may have its own model`);
  }
  const shown = rangeInWords(implied, printed.decimals + 1);
  return disagrees(
    `the sensitivity and specificity printed give a ${derived.called} of ${shown}, and `
      + `${printed.plain} is printed`,
    {
      recomputed: { quantity: derived.called, range: implied },
      working: [`${derived.formula} = ${shown}`],
    },
  );
}

function rest({ low, high }: Range): Range {
  return { low: Math.max(0, 1 - high), high: 1 - low };
}

function times(one: Range, other: Range): Range {
  return { low: one.low * other.low, high: one.high * other.high };
}
