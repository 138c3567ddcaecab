import {
  agrees,
  cannotTell,
  type CoefficientResult,
  type CoefficientRow,
  coefficientRow,
  coefficientsWithRatios,
  cover,
  defineManuscriptRule,
  disagrees,
  distanceInZ,
  fixed,
  isAbsence,
  type Judgement,
  levelOf,
  limitsInOrder,
  limitsInWords,
  limitsStand,
  overlap,
  pInWords,
  pOfWald,
  type Printed,
  type Range,
  rangeInWords,
  type RatioResult,
  ratioOfCoefficient,
  spansOf,
  unrounded,
  type Verdict,
  type WithRatio,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'coefficient-and-ratio',
  question: 'Do a coefficient, its standard error, its statistic, its p and its ratio agree?',
  why: `
    One row of a model’s output holds the same two numbers several times over: the ratio is the
    exponential of the coefficient, z is the coefficient over its standard error, Wald’s
    statistic is its square, p follows from it, and the limits of the ratio are those of the
    coefficient. Where they part, a number has come from another row, model or predictor.
  `,
  source: `
    Hosmer DW, Lemeshow S, Sturdivant RX. Applied Logistic Regression, 3rd ed. Hoboken: Wiley,
    2013, chapters 1 to 3.
  `,
  innocent: [
    'The coefficient is standardised, and the ratio is per unit, or the reverse.',
    'The ratio is given for several units (per 10 years), the coefficient for one.',
    'The ratio compares the groups the other way round than the coefficient does.',
    'The p-value is of a likelihood-ratio or score test, or comes from a t distribution.',
    'A number was copied from the row next to it, or a digit or a minus sign was lost.',
    'The limits are of another kind: profile likelihood, bootstrap or robust.',
  ],
  grade: 'discrepancy',

  judge(reading) {
    const rows = coefficientsWithRatios(reading);
    const unlike = tablesUnlike(rows);
    return rows.flatMap((row): readonly Judgement[] => {
      const verdict = judgeRow(row);
      if (verdict === undefined) return [];
      const { coefficient, ratio } = row;
      const isUnlike = coefficient.cell !== undefined && unlike.has(coefficient.cell.table);
      const { estimate, standardError, statistic, p } = coefficient;
      return [{
        verdict: isUnlike && verdict.outcome === 'disagrees' ? cannotTell(UNLIKE) : verdict,
        span: ratio === undefined ? coefficient.span : cover(coefficient.span, ratio.span),
        marks: spansOf([
          estimate, standardError, statistic?.printed, p?.printed,
          ratio?.estimate, ratio?.interval?.lower, ratio?.interval?.upper,
        ]),
        result: coefficient,
      }];
    });
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Could the authors check this row against the output of the model,
    and say so if the coefficient is standardised or the ratio is per another unit?
  `,

  examples: [
    {
      text: 'Age was a predictor of relapse (β = 0.46, SE 0.21; OR 1.58, 95% CI 1.05 to 2.39).',
      outcome: 'agrees',
      note: 'exp(0.46) = 1.584; exp(0.46 ± 1.96 × 0.21) = 1.050 and 2.391',
    },
    {
      text: 'Table 2. Relapse\nTerm\tB\tS.E.\tWald\tSig.\tExp(B)\n'
        + 'Quay\t0.693\t0.210\t10.89\t0.001\t1.500',
      outcome: 'disagrees',
      note: 'exp(0.693) = 2.000',
    },
    {
      text: 'Table 2. Relapse\nTerm\tB\tS.E.\tWald\tSig.\tExp(B)\n'
        + 'Quay\t0.693\t0.210\t3.30\t0.001\t2.000',
      outcome: 'disagrees',
      note: '(0.693 / 0.210)² = 10.89; 3.30 is z itself',
    },
    {
      text: 'Age was a predictor of relapse (β = 0.46, SE 0.21; OR 1.85, 95% CI 1.22 to 2.80).',
      outcome: 'disagrees',
      note: 'exp(0.46) = 1.58: two digits exchanged',
    },
    {
      text: 'Table 2. Relapse\nTerm\tB\tS.E.\tExp(B)\nAge\t0.046\t0.021\t1.584',
      outcome: 'cannot tell',
      note: 'exp(10 × 0.046) = 1.584: the ratio may be per 10 units',
    },
  ],
});

const UNLIKE = 'most coefficients of this table are not the logarithms of the ratios beside them, '
  + 'so that they may be standardised';

/** A table is unlike where more than half of at least three rows part from their ratios. */
const FEWEST_ROWS = 3;

/** The tables whose coefficients and ratios are of different kinds all over. */
function tablesUnlike(rows: readonly WithRatio[]): ReadonlySet<object> {
  const tally = new Map<object, { all: number; apart: number }>();
  for (const { coefficient, ratio } of rows) {
    if (coefficient.cell === undefined || ratio?.estimate === undefined) continue;
    const { table } = coefficient.cell;
    const { all, apart } = tally.get(table) ?? { all: 0, apart: 0 };
    const isApart = ratioOfCoefficient(coefficient.estimate, ratio.estimate) !== 'same';
    tally.set(table, { all: all + 1, apart: apart + (isApart ? 1 : 0) });
  }
  return new Set([...tally].flatMap(([table, { all, apart }]) =>
    (all >= FEWEST_ROWS && apart > all / 2 ? [table] : [])));
}

/** The first disagreement of a row, from the plainest to the finest. */
function judgeRow({ coefficient, ratio }: WithRatio): Verdict | undefined {
  const level = ratio?.interval === undefined ? 95 : levelOf(ratio.interval);
  const row = coefficientRow(coefficient.estimate, coefficient.standardError, level);
  if (isAbsence(row)) return undefined;
  const verdicts = [
    ratio === undefined || !standsByItself(ratio) ? undefined : judgeRatio(coefficient, ratio, row),
    judgeStatistic(coefficient, row),
    ratio?.interval !== undefined && ratio.p !== undefined ? undefined : judgeP(coefficient, row),
    ratio === undefined ? undefined : judgeLimits(coefficient, ratio, row),
  ].filter((verdict) => verdict !== undefined);
  return verdicts.find(({ outcome }) => outcome === 'disagrees')
    ?? verdicts.find(({ outcome }) => outcome === 'cannot tell')
    ?? verdicts[0];
}

/** Whether a ratio agrees with its own limits; where not, interval-symmetry has said so. */
function standsByItself({ estimate, interval }: RatioResult): boolean {
  return interval === undefined || limitsStand(estimate, interval, 'unknown');
}

/** Several units for which ratios are often given. */
const UNITS = [2, 5, 10, 20, 50, 100, 1000] as const;

function judgeRatio(
  { estimate: b, standardError, cell }: CoefficientResult,
  { estimate, cell: ratioCell }: RatioResult,
  row: CoefficientRow,
): Verdict | undefined {
  if (estimate === undefined || estimate.value <= 0) return undefined;
  const likeness = ratioOfCoefficient(b, estimate);
  if (isAbsence(likeness)) return undefined;
  if (likeness === 'same') return agrees;
  const units = UNITS.find((count) => overlap(unrounded(estimate), powers(row.ratio, count)));
  if (units !== undefined && b.value !== 0) {
    return cannotTell(`the ratio ${estimate.plain} may be per ${units} units, and the coefficient `
      + `${b.plain} per one`);
  }
  if (overlap(row.ratio, withinOneDigit(estimate))) {
    return cannotTell(`the ratio ${estimate.plain} is off exp(${b.plain}) by its last digit only`);
  }
  if (cell === undefined && standardError === undefined) {
    return cannotTell(`the coefficient ${b.plain} may be standardised, and the ratio `
      + `${estimate.plain} not`);
  }
  return apart(b, estimate, row, {
    isReciprocal: likeness === 'reciprocal',
    isExponential: /exp/i.test(ratioCell?.column ?? ''),
  });
}

/** What is said of a ratio that is not the exponential of its coefficient. */
function apart(
  b: Printed,
  estimate: Printed,
  row: CoefficientRow,
  { isReciprocal, isExponential }: Readonly<Record<'isReciprocal' | 'isExponential', boolean>>,
): Verdict {
  return disagrees(
    `exp(${b.plain}) is ${rangeInWords(row.ratio, decimalsFor(estimate))}, and the ratio `
      + `${estimate.plain} is printed`,
    {
      recomputed: { quantity: 'ratio', range: row.ratio },
      working: [`exp(${b.plain}) = ${fixed(Math.exp(b.value), decimalsFor(estimate))}, and `
        + `ln(${estimate.plain}) = ${fixed(Math.log(estimate.value), b.decimals + 1)}`],
      explanations: isReciprocal
        ? [`1 / ${estimate.plain} would agree: one of the two may compare the groups the other `
          + 'way round, or a minus sign was lost.']
        : [],
      ...(isExponential ? { grade: 'contradiction' as const } : {}),
    },
  );
}

/** The values that a ratio would stand for if its last digit were one more or less. */
function withinOneDigit(printed: Printed): Range {
  const { low, high } = unrounded(printed);
  return { low: low - 10 ** -printed.decimals, high: high + 10 ** -printed.decimals };
}

function decimalsFor({ decimals }: Printed): number {
  return decimals + 1;
}

function powers({ low, high }: Range, count: number): Range {
  return { low: low ** count, high: high ** count };
}

function judgeStatistic(
  { estimate: b, standardError, statistic }: CoefficientResult,
  { wald }: CoefficientRow,
): Verdict | undefined {
  if (statistic === undefined || wald === undefined) return undefined;
  if (standardError === undefined || standardError.value <= 0) return undefined;
  const { of, printed } = statistic;
  const magnitude = { low: Math.sqrt(wald.low), high: Math.sqrt(wald.high) };
  const wanted = of === 'Wald' ? wald : magnitude;
  const given = unrounded({ value: Math.abs(printed.value), decimals: printed.decimals });
  if (overlap(wanted, given)) return agrees;
  const square = of === 'Wald' ? '²' : '';
  const other = of === 'Wald' ? magnitude : wald;
  const named = of === 'Wald' ? 'Wald’s statistic' : of;
  return disagrees(
    `(${b.plain} / ${standardError.plain})${square} is `
      + `${rangeInWords(wanted, printed.decimals)}, and ${named} ${printed.plain} is printed`,
    {
      recomputed: { quantity: named, range: wanted },
      working: [`${b.plain} / ${standardError.plain} = `
        + `${fixed(b.value / standardError.value, 3)}, its square `
        + fixed((b.value / standardError.value) ** 2, 3)],
      explanations: overlap(other, given)
        ? [of === 'Wald'
          ? `${printed.plain} agrees with the coefficient over its standard error, not squared.`
          : `${printed.plain} agrees with the square, which is Wald’s chi-squared.`]
        : [],
    },
  );
}

/** So far on the scale of z a likelihood-ratio, score or t test may lead from Wald’s. */
const OTHER_TEST = 0.35;

function judgeP(
  { estimate: b, statistic, standardError, p }: CoefficientResult,
  row: CoefficientRow,
): Verdict | undefined {
  if (p === undefined || p.tests !== 'result' || p.printed.percent) return undefined;
  if (p.printed.value < 0 || p.printed.value > 1 || statistic?.of === 't') return undefined;
  const byWald = statistic?.of === 'Wald' ? pOfWald(statistic.printed) : row.p;
  if (byWald === undefined || isAbsence(byWald)) return undefined;
  const isFloor = p.printed.value === 0 || (p.printed.value <= 0.001 && byWald.high < 0.001);
  if (isFloor || distanceInZ(p, byWald) <= OTHER_TEST) return agrees;
  const basis = statistic?.of === 'Wald'
    ? `Wald’s statistic ${statistic.printed.plain}`
    : `${b.plain} over ${standardError?.plain ?? 'its standard error'}`;
  const printed = `p ${p.relation} ${p.printed.plain}`;
  return disagrees(`${basis} answers to a p of ${pInWords(byWald)}, and ${printed} is printed`, {
    recomputed: { quantity: 'p', range: byWald },
    working: [`p, two-sided, from ${basis}: ${pInWords(byWald)}`],
  });
}

/** So far, in standard errors, a limit may lie from Wald’s where another method made it. */
const OTHER_INTERVAL = 0.25;

/** The limits of the ratio beside those of its coefficient, where the ratio itself agrees. */
function judgeLimits(
  { estimate: b, standardError }: CoefficientResult,
  ratio: RatioResult,
  { lower, upper }: CoefficientRow,
): Verdict | undefined {
  const { interval } = ratio;
  if (!standsByItself(ratio)) return undefined;
  if (standardError === undefined || interval === undefined || !lower || !upper) return undefined;
  if (!limitsInOrder(interval) || interval.lower.value <= 0) return undefined;
  if (standardError.value <= 0) return undefined;
  const room = Math.exp(OTHER_INTERVAL * unrounded(standardError).high);
  const meets = (printed: Printed, { low, high }: Range): boolean =>
    overlap(unrounded(printed), { low: low / room, high: high * room });
  if (meets(interval.lower, lower) && meets(interval.upper, upper)) return agrees;
  const decimals = Math.max(interval.lower.decimals, interval.upper.decimals);
  return disagrees(
    `${b.plain} and its standard error ${standardError.plain} give limits of `
      + `${rangeInWords(lower, decimals)} and ${rangeInWords(upper, decimals)}, and `
      + `${limitsInWords(interval)} is printed`,
    {
      working: [`exp(${b.plain} ± z × ${standardError.plain}) at ${levelOf(interval)}%: `
        + `${fixed((lower.low + lower.high) / 2, decimals)} and `
        + fixed((upper.low + upper.high) / 2, decimals)],
    },
  );
}
