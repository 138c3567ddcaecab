import {
  type Agreement,
  agreementOf,
  agrees,
  cannotTell,
  type Contrast,
  contrastOf,
  defineRule,
  disagrees,
  distanceInZ,
  explanationsInWords,
  hasPOfItsRow,
  type Interval,
  impliedP,
  levelOf,
  limitsStand,
  multiplierInWords,
  limitsInWords,
  neighbourOfPInWords,
  otherIntervalNamed,
  otherTestNamed,
  pInWords,
  probabilitiesOf,
  type Printed,
  type PValue,
  type Range,
  rangeInWords,
  type RatioResult,
  type Reading,
  sideOfOne,
  unrounded,
  type Verdict,
} from '../src/authoring.ts';

export default defineRule({
  id: 'p-from-interval',
  question: 'Does the p-value follow from the estimate and its interval?',
  why: `
    The width of the interval gives the standard error, the estimate over its standard error
    gives z, and z gives p. Another standard test of the same data gives nearly the same. A p
    further off, or on the other side of 0.05 from what the interval says of 1, leaves a reader
    not knowing which of the two to believe.
  `,
  source: `
    Altman DG, Bland JM. How to obtain the P value from a confidence interval. BMJ
    2011;343:d2304. How often it happens: Gøtzsche PC. Believability of relative risks and odds
    ratios in abstracts: cross sectional study. BMJ 2006;333:231–234.
  `,
  innocent: [
    'The p-value is of another test: log-rank, likelihood ratio, score, exact or permutation.',
    'The p-value is one-sided, or tests non-inferiority and not a difference.',
    'The p-value was adjusted for multiple comparisons and the interval was not, or the reverse.',
    'The p-value is of the whole factor, of the trend or of an interaction.',
    'The interval has another level than 95%, or comes from a t distribution.',
    'A digit or a zero was lost or added, or the p-value belongs to a neighbouring result.',
  ],
  grade: 'discrepancy',
  reads: 'ratio',

  judge(result, reading) {
    const { estimate, interval, p } = result;
    if (interval === undefined || p === undefined || p.tests !== 'result') return undefined;
    const contrast = contrastOf(reading, result);
    if (!isProbability(p) || !limitsStand(estimate, interval, contrast)) return undefined;
    const withoutP = agreementOf(estimate, interval, 'unknown');
    const verdict = judgeP({ estimate, interval, p, contrast, withoutP }, reading);
    if (verdict.outcome !== 'disagrees') return verdict;
    const explanations = [...neighbourOfPInWords(reading, result), ...verdict.explanations];
    return standsBeside(p, result) || hasPOfItsRow(reading, result)
      ? { ...verdict, explanations }
      : cannotTell('the p-value stands apart from the interval and may be of something else');
  },

  comment: (words, { because }) => `
    For “${words}”: ${because} by the usual method. Could the authors check the two, and say
    which test gave the p-value?
  `,

  examples: [
    {
      text: 'The odds ratio was 1.59 (95% CI 1.05 to 2.41; p = 0.03).',
      outcome: 'agrees',
      note: 'ln 1.59 / 0.212 = 2.19, p = 0.029',
    },
    {
      text: 'The odds ratio was 1.59 (95% CI 1.05 to 2.41; p = 0.003).',
      outcome: 'disagrees',
      note: 'p = 0.029: a zero too many',
    },
    {
      text: 'The odds ratio was 0.29 (95% CI 0.09 to 0.98; p = 0.03).',
      outcome: 'agrees',
      note: 'p = 0.042 by the interval; a likelihood-ratio test of a small sample may give 0.03',
    },
    {
      text: 'The odds ratio was 1.52 (95% CI 0.98 to 2.36; p = 0.04).',
      outcome: 'disagrees',
      note: 'near, but the interval holds 1 and p is below 0.05',
    },
    {
      text: 'The hazard ratio was 0.62 (95% CI 0.38 to 1.01; log-rank p = 0.048).',
      outcome: 'cannot tell',
      note: 'p = 0.055 by the interval, and the text names another test',
    },
    {
      text: 'The hazard ratio was 0.95 (95% CI 0.78 to 1.16; non-inferiority p = 0.01).',
      outcome: 'cannot tell',
      note: 'the p-value does not test a ratio of 1',
    },
  ],
});

/** A p-value that can be compared at all; p-value-possible speaks of the others. */
function isProbability({ printed }: PValue): boolean {
  return !printed.percent && printed.value >= 0 && unrounded(printed).low <= 1;
}

/** Whether p is printed with its result, and was not taken from elsewhere in the sentence. */
function standsBeside(p: PValue, { span, inferred }: RatioResult): boolean {
  return !inferred.includes('p') && span.start <= p.span.start && p.span.end <= span.end;
}

/** What is printed of a result, with how it agrees as long as p is left out. */
interface Printing {
  readonly estimate: Printed | undefined;
  readonly interval: Interval;
  readonly p: PValue;
  readonly contrast: Contrast;
  readonly withoutP: Agreement;
}

function judgeP(printing: Printing, reading: Reading): Verdict {
  const { estimate, interval, p } = printing;
  const found = agreementOf(estimate, interval, 'binary', p);
  if (found.outcome === 'cannot tell') return cannotTell(found.because);
  if (found.outcome === 'within rounding') return agrees;
  const near = found.outcome === 'within another standard method' || isMinor(printing);
  if (near && !areOnOtherSides(interval, p)) return agrees;
  const named = otherTestNamed(reading, p.span)
    ?? otherIntervalNamed(reading, { span: interval.span, interval });
  if (named !== undefined) {
    return cannotTell(`the text speaks of “${named}” here, so that p need not follow from this `
      + 'interval');
  }
  return disagreesOn(printing);
}

/**
 * How far on the scale of z other standard tests of the same data were found to lie from
 * Wald's at most: for two groups, and for a unit of something measured, where it depends on it.
 */
const MINOR_DISTANCE: Readonly<Record<Contrast, number>> = {
  binary: 0.3,
  'per unit': 0.6,
  unknown: 0.6,
};

/**
 * Whether p is so near, or both so small, that no reader would be told anything else:
 * "p = 0.001" and "p = 0.0001" are the smallest that some programs print.
 */
function isMinor({ p, withoutP, contrast }: Printing): boolean {
  if (!('implied' in withoutP)) return false;
  const { implied } = withoutP;
  const isFloor = p.relation === '=' && (p.printed.value === 0.001 || p.printed.value === 0.0001);
  return distanceInZ(p, implied.p) < MINOR_DISTANCE[contrast]
    || (isFloor && implied.p.high < p.printed.value);
}

/**
 * Whether p and the interval say different things of no effect: one of them
 * excludes it at the interval's level, and the other does not.
 */
function areOnOtherSides(interval: Interval, p: PValue): boolean {
  if (p.oneSided === true) return false;
  const side = sideOfOne(interval);
  if (side === 'undecided') return false;
  const threshold = (100 - levelOf(interval)) / 100;
  const printed = probabilitiesOf(p);
  if (printed === undefined) return false;
  return side === 'around' ? printed.high <= threshold : printed.low >= threshold;
}

function disagreesOn(printing: Printing): Verdict {
  const { estimate, interval, p, contrast } = printing;
  const range = pWithoutP(printing);
  const implied = range === undefined ? 'another p' : `p = ${pInWords(range)}`;
  return disagrees(`${becauseOf(interval, p)}; the interval answers to ${implied}`, {
    ...(range === undefined ? {} : { recomputed: { quantity: 'p', range } }),
    working: workingOf(printing),
    explanations: explanationsInWords({ estimate, interval, p }, contrast),
  });
}

/** What stands against what, in words: the sides of 1 where they differ, else the numbers. */
function becauseOf(interval: Interval, p: PValue): string {
  const printed = `p ${p.relation} ${p.printed.plain}`;
  if (!areOnOtherSides(interval, p)) {
    return `${printed} does not follow from ${limitsInWords(interval)}`;
  }
  const holds = sideOfOne(interval) === 'around' ? 'holds 1' : 'excludes 1';
  return `the interval ${limitsInWords(interval)} ${holds}, and ${printed} is printed`;
}

/** The p-values that the estimate and the limits leave open, without the printed one. */
function pWithoutP({ interval, withoutP }: Printing): Range | undefined {
  return withoutP.outcome === 'within rounding' ? withoutP.implied.p : impliedP(interval);
}

function workingOf({ estimate, interval, withoutP }: Printing): readonly string[] {
  if (withoutP.outcome !== 'within rounding') return [];
  const { lower, upper } = interval;
  const { standardError, z, p } = withoutP.implied;
  return [
    `standard error = ln(${upper.plain} / ${lower.plain}) / `
      + `(2 × ${multiplierInWords(interval)}) = ${rangeInWords(standardError, 3)}`,
    `z = ln(${estimate?.plain ?? 'estimate'}) / standard error = ${rangeInWords(z, 2)}`,
    `p, two-sided: ${pInWords(p)}`,
  ];
}
