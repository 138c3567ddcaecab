import {
  agrees,
  cannotTell,
  cover,
  defineManuscriptRule,
  disagrees,
  divided,
  type Judgement,
  lastBefore,
  type NamedNumber,
  namedNumbers,
  overlap,
  passages,
  type Range,
  rangeInWords,
  shareOf,
  type Span,
  type Verdict,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'number-needed-to-treat',
  question: 'Is a number needed to treat what the risk difference beside it gives?',
  why: `
    The number needed to treat is 1 over the difference of two risks, rounded up by custom: a
    difference of 11 percentage points is 10 to treat. It says as much as that difference and
    no more.
  `,
  source: `
    Altman DG. Confidence intervals for the number needed to treat. BMJ 1998;317:1309–1312. Mendes
    D et al. BMJ Open 2017;7:e015112, found other methods in 29% of articles.
  `,
  innocent: [
    'It was worked out from a pooled ratio at another baseline risk.',
    'It was worked out from survival at a time other than that of the risks.',
    'It was worked out from a difference with more digits than are printed.',
  ],
  grade: 'discrepancy',

  judge(reading) {
    const { text } = reading.manuscript;
    return passages(reading).flatMap((span): readonly Judgement[] => {
      const needed = namedNumbers(text, span, NEEDED, 16);
      if (needed.length === 0) return [];
      const differences = namedNumbers(text, span, DIFFERENCE, 16);
      return needed.flatMap((number) => judgementOn(text, number, differences));
    });
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Could the authors check it, and give the baseline risk and the time
    if it was worked out from a ratio?
  `,

  examples: [
    {
      text: 'The absolute risk reduction was 11% (number needed to treat 10).',
      outcome: 'agrees',
      note: '1 / 0.11 = 9.1, rounded up',
    },
    {
      text: 'The absolute risk reduction was 11% (number needed to treat 19).',
      outcome: 'disagrees',
      note: '1 / 0.11 = 9.1',
    },
    {
      text: 'Fewer women fell (risk difference −0.024, NNT 42).',
      outcome: 'agrees',
      note: '1 / 0.024 = 41.7, rounded up',
    },
    {
      text: 'Fewer women fell (risk difference 0.0, NNT 42).',
      outcome: 'cannot tell',
      note: '“0.0” may stand for nothing at all',
    },
  ],
});

const NEEDED = String.raw`\bNNT[BH]?\b|\b[Nn]umbers?[-\s]needed[-\s]to[-\s]`
  + String.raw`(?:treat|harm|screen|vaccinate)(?:\s*\(NNT[BH]?\))?`;
const DIFFERENCE = String.raw`\b[Aa]bsolute risk (?:reduction|difference|increase)(?:\s*\(ARR\))?`
  + String.raw`|\b[Rr]isk difference(?:\s*\(RD\))?|\bARR\b|\bRD\b`;

/** The difference stands before the number, in its own sentence. */
const REACH = 70;

function judgementOn(
  text: string,
  number: NamedNumber,
  differences: readonly NamedNumber[],
): readonly Judgement[] {
  const difference = lastBefore(differences, number.span.start);
  if (difference === undefined || number.printed.value < 1) return [];
  const between = text.slice(difference.span.end, number.span.start);
  if (between.length > REACH || OTHER_RESULT.test(between)) return [];
  const verdict = judgePair(number, difference, isPoints(text, difference.span));
  const marks = [difference.printed.span, number.printed.span];
  return [{ verdict, span: cover(difference.span, number.span), marks }];
}

const OTHER_RESULT = /\.\s+\p{Lu}|\b(?:versus|vs|OR|RR|HR|ratio)\b|\bper\b/u;

function isPoints(text: string, { end }: Span): boolean {
  return /^\s*(?:%|per\s?cent|percentage points|points)/i.test(text.slice(end));
}

function judgePair(number: NamedNumber, difference: NamedNumber, points: boolean): Verdict {
  const size = sizeOf(difference, points);
  const implied = size.low <= 0 ? undefined : divided({ low: 1, high: 1 }, size);
  if (implied === undefined) {
    return cannotTell('the difference may be rounded from nothing, which no number answers to');
  }
  const { plain, value, decimals } = number.printed;
  const sign = difference.printed.percent ? '%' : '';
  const rounded = { low: value - 1 / 10 ** decimals, high: value + 0.5 / 10 ** decimals };
  if (overlap(rounded, implied)) return agrees;
  return disagrees(
    `a risk difference of ${difference.printed.plain}${sign} gives `
      + `${rangeInWords(implied, 1)} to treat, and ${plain} is printed`,
    {
      recomputed: { quantity: 'number needed to treat', range: implied },
      working: [`1 / ${rangeInWords(size, 4)} = ${rangeInWords(implied, 1)}`],
    },
  );
}

/** The size of the difference on the scale of shares, whichever way it points. */
function sizeOf({ printed }: NamedNumber, points: boolean): Range {
  const value = Math.abs(printed.value);
  return shareOf({ ...printed, value, percent: printed.percent || points });
}
