import {
  agrees,
  cannotTell,
  cover,
  defineManuscriptRule,
  disagrees,
  isAbsence,
  iSquaredOf,
  type Judgement,
  type NamedNumber,
  namedNumbers,
  nearest,
  overlap,
  passages,
  rangeInWords,
  unrounded,
  type Verdict,
  wordsAround,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'i-squared-from-q',
  question: 'Does I² follow from Q and its degrees of freedom?',
  why: `
    I² is the share of Q that is more than its degrees of freedom: (Q − df) / Q, and 0 where Q is
    smaller. Where all three are printed, two give the third.
  `,
  source: `
    Higgins JPT, Thompson SG. Quantifying heterogeneity in a meta-analysis. Stat Med
    2002;21:1539–1558.
  `,
  innocent: [
    'I² was worked out from an estimate of τ² (restricted maximum likelihood, for instance).',
    'Q and I² belong to two analyses, or Q was weighted otherwise.',
    'The degrees of freedom are those of another test.',
  ],
  grade: 'discrepancy',

  judge(reading) {
    const { text } = reading.manuscript;
    return passages(reading).flatMap((span): readonly Judgement[] => {
      const shares = namedNumbers(text, span, I_SQUARED, 12)
        .filter(({ printed }) => printed.percent);
      if (shares.length === 0) return [];
      const [qs, dfs] = [namedNumbers(text, span, Q, 4), namedNumbers(text, span, DF, 3)];
      return shares.flatMap((share): readonly Judgement[] => {
        const [q, df] = [nearest(qs, share.span, REACH), nearest(dfs, share.span, REACH)];
        if (q === undefined || df === undefined) return [];
        const verdict = judgeThree(share, q, df, wordsAround(reading, share.span));
        const marks = [q, df, share].map(({ printed }) => printed.span);
        return [{ verdict, span: cover(share.span, q.span, df.span), marks }];
      });
    });
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Could the authors check the three numbers, and name the method if
    I² comes from an estimate of the variance between studies?
  `,

  examples: [
    {
      text: 'Heterogeneity was substantial (Q = 12.30, df = 5, I² = 59%).',
      outcome: 'agrees',
      note: '(12.30 − 5) / 12.30 = 59.3%',
    },
    {
      text: 'Heterogeneity was substantial (Q = 12.30, df = 5, I² = 95%).',
      outcome: 'disagrees',
      note: '(12.30 − 5) / 12.30 = 59.3%',
    },
    {
      text: 'Studies were alike (χ² = 3.10, df = 5, I² = 0%).',
      outcome: 'agrees',
      note: 'Q below its degrees of freedom gives 0',
    },
    {
      text: 'By restricted maximum likelihood (REML), Q = 12.30, df = 5 and I² = 66%.',
      outcome: 'cannot tell',
      note: 'another formula for I²',
    },
  ],
});

/** I², I2, I-squared; Cochran’s Q, or the chi-square of a forest plot, which is the same. */
const I_SQUARED = String.raw`\bI\s?(?:2|²|\^2|[-\s]?squared)(?:\s+statistic)?`;
const Q = String.raw`\bQ(?:\s+statistic)?|[Cc]hi\s?(?:2|²|\^2)|χ\s?(?:2|²)`;
const DF = String.raw`\b[dD]\.?[fF]\.?|[Dd]egrees of freedom`;

/** The three stand in one bracket or sentence. */
const REACH = 80;

const OTHER_FORMULA =
  /\b(?:REML|restricted maximum|maximum likelihood|Paule|Sidik|multi.?level|three.level)\b/i;

function judgeThree(share: NamedNumber, q: NamedNumber, df: NamedNumber, nearby: string): Verdict {
  const implied = iSquaredOf(unrounded(q.printed), df.printed.value);
  if (isAbsence(implied)) return cannotTell(implied.because);
  if (overlap(implied, unrounded(share.printed))) return agrees;
  const other = nearby.match(OTHER_FORMULA)?.[0];
  if (other !== undefined) return cannotTell(`the text speaks of “${other}”, whose I² differs`);
  const { decimals, plain } = share.printed;
  return disagrees(
    `Q of ${q.printed.plain} with ${df.printed.plain} degrees of freedom gives an I² of `
      + `${rangeInWords(implied, decimals + 1)}%, and ${plain}% is printed`,
    {
      recomputed: { quantity: 'I²', range: implied },
      working: [`I² = 100 × (Q − df) / Q = 100 × (${q.printed.plain} − ${df.printed.plain}) / `
        + q.printed.plain],
    },
  );
}
