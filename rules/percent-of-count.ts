import {
  agrees,
  cannotTell,
  contains,
  type Count,
  countsBehindPercent,
  defineManuscriptRule,
  disagrees,
  fixed,
  isAbsence,
  type Judgement,
  overlap,
  type PercentOfCount,
  percentOfCount,
  type Printed,
  type Range,
  rangeInWords,
  type Reading,
  spansOf,
  unrounded,
  unroundedTwice,
  type Verdict,
  wordsAround,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'percent-of-count',
  question: 'Is a percentage that of its own count and total?',
  why: `
    A count divided by its total gives one percentage and no other. Where another is printed
    beside the two, the count, the total or the percentage is not the one that was meant.
  `,
  source: `
    Lang TA, Altman DG. Basic statistical reporting for articles published in biomedical
    journals: the SAMPL guidelines. Int J Nurs Stud 2015;52:5–9. What whole numbers allow: Brown
    NJL, Heathers JAJ. Soc Psychol Personal Sci 2017;8:363–369.
  `,
  innocent: [
    'The percentage is of those with a known value, and the total counts everyone.',
    'The percentage is weighted, standardised or estimated by a model.',
    'The total printed beside the count is that of another group, or of the other margin.',
    'The percentage counts people, and the count counts events, lesions or visits.',
    'The digits were cut off where they are usually rounded.',
  ],
  grade: 'contradiction',

  judge(reading) {
    return reading.findings.counts.flatMap((counted): readonly Judgement[] => {
      const { count, total, percent, span } = counted;
      if (count === undefined || total === undefined || percent === undefined) return [];
      const verdict = judgeShare({ count, total, percent }, around(reading, counted));
      const isOwn = contains(span, total.span);
      return [{
        verdict: isOwn ? verdict : asOfColumn(verdict, total),
        span,
        marks: spansOf(isOwn ? [count, total, percent] : [count, percent]),
      }];
    });
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Could the authors check the three numbers, and say so if the
    percentage has another denominator, for instance those without missing values?
  `,

  examples: [
    {
      text: 'Falls were reported by 45 of 120 residents (37.5%).',
      outcome: 'agrees',
      note: '45 / 120 = 37.5%',
    },
    {
      text: 'Falls were reported by 45 of 120 residents (38.9%).',
      outcome: 'disagrees',
      note: '45 / 120 = 37.5%',
    },
    {
      text: 'Falls were reported by 62 of 80 residents (77%).',
      outcome: 'agrees',
      note: '62 / 80 = 77.5% exactly: some programs round halves to the even digit',
    },
    {
      text: 'Falls were reported by 17 of 45 residents (37.7%).',
      outcome: 'disagrees',
      note: '17 / 45 = 37.78%: cut off and not rounded, the milder reading',
    },
    {
      text: 'The weighted prevalence of falls was 31.2% (45 of 120 residents).',
      outcome: 'cannot tell',
      note: 'a weighted percentage is not the count over the total',
    },
  ],
});

/** The three numbers of a share, all printed. */
interface Share {
  readonly count: Printed;
  readonly total: Printed;
  readonly percent: Printed;
}

/** A total that heads a column counts everyone; the percentage may leave some of them out. */
function asOfColumn(verdict: Verdict, total: Printed): Verdict {
  if (verdict.outcome !== 'disagrees') return verdict;
  return {
    ...verdict,
    grade: 'discrepancy',
    working: [...verdict.working, `${total.plain} is the size that the column’s heading gives`],
  };
}

function judgeShare({ count, total, percent }: Share, nearby: string): Verdict {
  const found = percentOfCount(count.value, total.value, percent);
  if (isAbsence(found)) return cannotTell(found.because);
  if (found.verdict === 'agrees') return agrees;
  const other = nearby.match(OTHER_SHARE)?.[0];
  if (other !== undefined) {
    return cannotTell(`the text speaks of “${other}” here, so that the percentage `
      + 'need not be the count over the total');
  }
  return disagreesOn({ count, total, percent }, found);
}

/** Words after which a percentage need not be the count over the total. */
const OTHER_SHARE = new RegExp(
  '\\b(?:weighted|standardi[sz]ed|adjusted (?:prevalence|rate|percentage|proportion)|imputed'
    + '|Kaplan.Meier|cumulative incidence|actuarial|age.adjusted)\\b',
  'i',
);

function disagreesOn({ count, total, percent }: Share, found: PercentOfCount): Verdict {
  const share = found.percent;
  const milder = milderReading(percent, found);
  const shown = fixed(share, percent.decimals);
  return disagrees(
    `${count.plain} of ${total.plain} is ${shown}%, and ${percent.plain}% is printed`,
    {
      recomputed: { quantity: 'percentage', range: { low: share, high: share } },
      working: [
        `100 × ${count.plain} / ${total.plain} = ${fixed(share, percent.decimals + 2)}%`,
      ],
      explanations: milder === undefined ? reachable({ count, total, percent }) : [milder],
      ...(milder === undefined ? {} : { grade: 'discrepancy' }),
    },
  );
}

/** The habit of a program or a hand that would print this percentage for this share, if any. */
function milderReading(percent: Printed, found: PercentOfCount): string | undefined {
  const exact = fixed(found.percent, percent.decimals + 2);
  if (found.verdict === 'cut off') {
    return `The digits may be cut off and not rounded: ${exact} gives ${percent.plain}.`;
  }
  const twice = unroundedTwice(percent);
  return overlap(twice, { low: found.percent, high: found.percent })
    ? `The percentage may be rounded twice: ${exact}, then one digit less, then ${percent.plain}.`
    : undefined;
}

/** Which other count, or which smaller total, would give the printed percentage. */
function reachable({ count, total, percent }: Share): readonly string[] {
  const counts = countsBehindPercent(percent, total.value);
  const totals = smallerTotals(count, total, percent);
  return [
    ...(totals === undefined ? [] : [
      `A total of ${inWords(totals)} would give ${percent.plain}%: some of the ${total.plain} may `
        + 'be left out, for instance those with missing values.',
    ]),
    ...(isAbsence(counts) ? [] : [
      `A count of ${inWords(counts)} would give ${percent.plain}% of ${total.plain}.`,
    ]),
  ];
}

/** The totals, down to four fifths of the printed one, of which the count is the percentage. */
function smallerTotals(count: Printed, total: Printed, percent: Printed): Range | undefined {
  const { low, high } = unrounded(percent);
  if (low <= 0) return undefined;
  const fewest = Math.ceil(Math.max((100 * count.value) / high, 0.8 * total.value));
  const most = Math.floor(Math.min((100 * count.value) / low, total.value - 1));
  return fewest <= most ? { low: fewest, high: most } : undefined;
}

function inWords(wholeNumbers: Range): string {
  return rangeInWords(wholeNumbers, 0);
}

/** The sentence or so in which a rule listens for what kind of percentage it is. */
function around(reading: Reading, { span }: Count): string {
  return wordsAround(reading, span, 80);
}
