import {
  agrees,
  cannotTell,
  cover,
  defineRule,
  disagrees,
  divided,
  indexAt,
  inOneBlock,
  type NamedNumber,
  namedNumbers,
  numberAt,
  overlap,
  type Range,
  rangeInWords,
  type RatioResult,
  type Reading,
  type Span,
  unrounded,
} from '../src/authoring.ts';

export default defineRule({
  id: 'observed-and-expected',
  question: 'Is a standardised ratio the observed over the expected?',
  why: `
    A standardised mortality or incidence ratio is the number observed over the number expected.
    Observed numbers are whole, and the rounding of the expected one leaves a narrow range.
  `,
  source: `
    Breslow NE, Day NE. Statistical Methods in Cancer Research. Volume II: The Design and Analysis
    of Cohort Studies. Lyon: IARC; 1987 (chapter 2).
  `,
  innocent: [
    'The expected number was rounded twice, or cut off.',
    'The ratio is per 100, or relative to another ratio.',
    'The observed number is of another group or period.',
  ],
  grade: 'discrepancy',
  reads: 'ratio',

  judge(result, reading) {
    const { estimate, measure } = result;
    if (estimate === undefined || (measure !== 'SMR' && measure !== 'SIR')) return undefined;
    const counts = countsNear(result, reading);
    if (counts === undefined) return undefined;
    const { observed, expected } = counts;
    const implied = divided({ low: observed.value, high: observed.value }, unrounded(expected));
    if (implied === undefined) return cannotTell('the expected number may be rounded from nothing');
    const scales = [1, 100].map((scale) => scaled(implied, scale));
    if (scales.some((range) => overlap(range, unrounded(estimate)))) return agrees;
    const shown = rangeInWords(implied, estimate.decimals + 1);
    return disagrees(
      `${observed.plain} observed and ${expected.plain} expected give ${shown}, and `
        + `${estimate.plain} is printed`,
      {
        recomputed: { quantity: 'ratio', range: implied },
        working: [`${observed.plain} / ${expected.plain} = ${shown}`],
      },
    );
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Could the authors check the three numbers, or print the expected
    number with more digits?
  `,

  examples: [
    {
      text: 'Deaths were as many as expected (71 observed, 70 expected; SMR 1.01, 95% CI 0.79 to '
        + '1.28).',
      outcome: 'agrees',
      note: '71 / 69.5 to 70.5 = 1.007 to 1.022',
    },
    {
      text: 'Deaths were as many as expected (71 observed, 70 expected; SMR 1.10, 95% CI 0.86 to '
        + '1.39).',
      outcome: 'disagrees',
      note: '71 / 70 is at most 1.022',
    },
    {
      text: 'Twelve of the crew died (observed 12, expected 4.8; SMR 2.5, 95% CI 1.3 to 4.4).',
      outcome: 'agrees',
      note: '12 / 4.75 to 4.85 = 2.47 to 2.53',
    },
    {
      text: 'Few deaths were expected (observed 2, expected 0; SMR 8.1, 95% CI 1.0 to 29.3).',
      outcome: 'cannot tell',
      note: '“0” stands for anything below 0.5',
    },
  ],
});

/** How far from the ratio its counts may stand. */
const REACH = 90;

const BEFORE_NAME = new RegExp(
  String.raw`(?<observed>\d[\d,]*)\s+(?:were\s+)?observed[^\d.;]{1,30}?`
    + String.raw`(?<expected>\d[\d,]*(?:[.·]\d+)?)\s+(?:were\s+)?expected`,
  'i',
);

interface Counts {
  readonly observed: NamedNumber['printed'];
  readonly expected: NamedNumber['printed'];
}

function countsNear(result: RatioResult, reading: Reading): Counts | undefined {
  if (result.cell !== undefined) return undefined;
  const { text } = reading.manuscript;
  const from = Math.max(0, result.span.start - REACH);
  const near: Span = { start: from, end: Math.min(text.length, result.span.end + REACH) };
  const counts = named(text, near) ?? beforeNames(text, near);
  const span = counts === undefined ? undefined : cover(counts.observed.span, counts.expected.span);
  return span !== undefined && inOneBlock(reading, result.span, span)
    && isAlone(result, span, reading) ? counts : undefined;
}

/** No other ratio stands between the counts and this one. */
function isAlone(result: RatioResult, span: Span, { findings }: Reading): boolean {
  const whole = cover(result.span, span);
  const first = Math.max(0, indexAt(findings.results, whole.start));
  const last = indexAt(findings.results, whole.end - 1);
  return findings.results.slice(first, last + 1).every((other) => other === result
    || other.kind !== 'ratio' || other.span.end <= whole.start);
}

function named(text: string, near: Span): Counts | undefined {
  const [observed] = namedNumbers(text, near, '\\b[Oo]bserved|\\b[Oo]bs\\.?|\\bO\\s?=', 10);
  const [expected] = namedNumbers(text, near, '\\b[Ee]xpected|\\b[Ee]xp\\.?|\\bE\\s?=', 10);
  if (observed === undefined || expected === undefined) return undefined;
  const isWhole = observed.printed.decimals === 0 && !observed.printed.percent;
  return isWhole && observed.span.end <= expected.span.start
    ? { observed: observed.printed, expected: expected.printed }
    : undefined;
}

function beforeNames(text: string, { start, end }: Span): Counts | undefined {
  const found = text.slice(start, end).match(BEFORE_NAME);
  const { observed, expected } = found?.groups ?? {};
  if (found?.index === undefined || observed === undefined || expected === undefined) {
    return undefined;
  }
  const at = start + found.index;
  return {
    observed: numberAt(observed, at, false),
    expected: numberAt(expected, at + found[0].lastIndexOf(expected), false),
  };
}

function scaled({ low, high }: Range, scale: number): Range {
  return { low: low * scale, high: high * scale };
}
