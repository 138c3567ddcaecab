import {
  agrees,
  cannotTell,
  defineManuscriptRule,
  disagrees,
  type Judgement,
  type PValue,
  type Reading,
  type Span,
  unrounded,
  type Verdict,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'p-value-possible',
  question: 'Is every p-value a probability that can occur: above 0, and at most 1?',
  why: `
    A p-value is a probability. It is never above 1, and never exactly zero: a program that
    shows 0.000 has run out of decimals, and what can be said is that p is below 0.001.
  `,
  source: `
    Lang TA, Altman DG. Basic statistical reporting for articles published in biomedical
    journals: the SAMPL guidelines. Int J Nurs Stud 2015;52:5–9 (the smallest p to be given is
    P < 0.001).
  `,
  innocent: [
    'A program shows 0.000 for every p below 0.0005, and the output was copied as it stood.',
    'The power of ten was lost in typesetting: 1.2 may stand for 1.2 × 10⁻⁵.',
    'A decimal point or a leading zero was lost.',
    'The letter p stands for something else than a p-value.',
  ],
  grade: 'contradiction',

  judge(reading) {
    const known = reading.findings.results.flatMap((result) =>
      result.p === undefined ? [] : [{ result, p: result.p }]);
    const ofResults = known.map(({ result, p }): Judgement => ({
      verdict: judgeP(p, textAfter(reading, p.printed.span)),
      span: result.span,
      marks: [p.printed.span],
      result,
    }));
    const spans = known.map(({ p }) => p.printed.span);
    return [...ofResults, ...loneZeros(reading, spans), ...loneAboveOne(reading, spans)];
  },

  comment: (words, { grade }) => (grade === 'contradiction' || grade === undefined
    ? `
      For “${words}”: a p-value lies between 0 and 1. Could the authors check the number that is
      printed here? A power of ten or a decimal point may have been lost.
    `
    : `
      For “${words}”: a p-value is never exactly zero. Please give it as P < 0.001, or with the
      digits that the program can show.
    `),

  examples: [
    {
      text: 'The hazard ratio was 0.72 (95% CI 0.58 to 0.90; p = 0.004).',
      outcome: 'agrees',
      note: '0 < 0.004 ≤ 1',
    },
    {
      text: 'The hazard ratio was 1.01 (95% CI 0.80 to 1.28; p = 1.00).',
      outcome: 'agrees',
      note: 'exactly 1 can occur, and 1.00 may be 0.996',
    },
    {
      text: 'The hazard ratio was 0.42 (95% CI 0.30 to 0.59; p = 0.000).',
      outcome: 'disagrees',
      note: 'never exactly zero: P < 0.001',
    },
    {
      text: 'Recovery was quicker with the new splint (p < 0.000).',
      outcome: 'disagrees',
      note: 'no probability lies below zero',
    },
    {
      text: 'The hazard ratio was 0.98 (95% CI 0.79 to 1.22; p = 8.6).',
      outcome: 'disagrees',
      note: '8.6 > 1: the decimal point may have moved from 0.86',
    },
    {
      text: 'The odds ratio per allele was 1.42 (95% CI 1.21 to 1.67; p = 1.8?10?5).',
      outcome: 'cannot tell',
      note: 'a power of ten that lost its signs on the way',
    },
  ],
});

/** What is left of "× 10⁻⁵" where characters were lost: "?10?5", "x105". */
const POWER_OF_TEN = /^\S{0,5}\s?(?:10|[eE][-+\d])/;

function textAfter({ manuscript }: Reading, { end }: Span): string {
  return manuscript.text.slice(end, end + 10);
}

/** A verdict on a p-value by itself. "0.0000" is no more possible than "0.00". */
function judgeP({ printed, relation }: PValue, after: string): Verdict {
  const scale = printed.percent ? 100 : 1;
  const { low, high } = unrounded(printed);
  if (low > scale && POWER_OF_TEN.test(after)) {
    return cannotTell(`a power of ten seems to follow ${printed.plain}`);
  }
  if (low > scale && relation !== '<' && relation !== '<=') {
    return disagrees(`p cannot be above 1, and ${printed.plain} is printed`, {
      working: [`${printed.plain} > 1`],
    });
  }
  if (high < 0) {
    return disagrees(`p cannot be below 0, and ${printed.plain} is printed`, {
      working: [`${printed.plain} < 0`],
    });
  }
  if (printed.value > 0 || relation === '>' || relation === '>=') return agrees;
  return zero(printed.plain, relation.startsWith('<'));
}

function zero(plain: string, below: boolean): Verdict {
  return below
    ? disagrees(`no p-value lies below ${plain}`, { grade: 'discrepancy' })
    : disagrees(`p is never exactly zero, and ${plain} is printed`, { grade: 'caution' });
}

/**
 * A p-value of zero that belongs to no result that was read. The number ends
 * there: no further digit, power of ten or percent sign follows.
 */
// (p = 0.000)   P<.0001   p-value < 0·00
//      ^^^^^
const LONE_ZERO = new RegExp(
  '(?<![\\p{L}\\d])[Pp](?:[ -]?values?)?\\s?([=<≤]|was|of)\\s?(0?[.·]0+|0)'
    + '(?![\\d.,·]*\\d|\\s*[×x*^%])',
  'gu',
);

function loneZeros({ manuscript }: Reading, known: readonly Span[]): readonly Judgement[] {
  return [...manuscript.text.matchAll(LONE_ZERO)].flatMap((match) => {
    const [whole, relation = '', number = ''] = match;
    const end = match.index + whole.length;
    if (known.some((span) => span.start < end && match.index < span.end)) return [];
    const verdict = zero(number.replace('·', '.'), /[<≤]/.test(relation));
    return [{
      verdict,
      span: { start: match.index, end },
      marks: [{ start: end - number.length, end }],
    }];
  });
}

/** A p-value above 1 that belongs to no result that was read, and ends a bracket or the text. */
// (p = 1.2)
//      ^^^
const LONE_ABOVE = /(?<![\p{L}\d])[Pp](?:[ -]?values?)?\s?=\s?([1-9]\d?[.·]\d{1,3})(?=\s*(?:[);]|\.?\s*$))/gmu;

function loneAboveOne({ manuscript }: Reading, known: readonly Span[]): readonly Judgement[] {
  return [...manuscript.text.matchAll(LONE_ABOVE)].flatMap((match) => {
    const [whole, number = ''] = match;
    const end = match.index + whole.length;
    const plain = number.replace('·', '.');
    if (Number(plain) <= 1 || known.some((span) => span.start < end && match.index < span.end)) return [];
    return [{
      verdict: disagrees(`p cannot be above 1, and ${plain} is printed`, { working: [`${plain} > 1`] }),
      span: { start: match.index, end },
      marks: [{ start: end - number.length, end }],
    }];
  });
}
