import {
  agreementOf,
  agrees,
  cannotTell,
  defineRule,
  disagrees,
  type Interval,
  limitsInWords,
  limitsStand,
  othersWithSameInterval,
  type Printed,
  type RatioResult,
  type Verdict,
} from '../src/authoring.ts';

export default defineRule({
  id: 'numbers-of-another-row',
  question: 'Has a row of a table numbers of its own, and not those of another row?',
  why: `
    Two terms of a model seldom have the same estimate and the same limits to the last digit,
    and hardly ever the same interval around different estimates. Where they do, a line was
    copied and not overwritten.
  `,
  source: `
    García-Berthou E, Alcaraz C. Incongruence between test statistics and P values in medical
    papers. BMC Med Res Methodol 2004;4:13 (slips of transcription in print). That intervals
    repeat where rows were copied: own reading of 22 published tables.
  `,
  innocent: [
    'The two rows are the same people under two names, or each is the complement of the other.',
    'The rows are of two models, and the second changed nothing for this term.',
    'The numbers have so few digits that two terms can well share them.',
    'The row was copied while the table was made, and its numbers were not overwritten.',
  ],
  grade: 'caution',
  reads: 'ratio',
  marks: ({ estimate, interval }) => [estimate, interval?.lower, interval?.upper],

  judge(result, reading) {
    const { estimate, interval, cell } = result;
    if (cell === undefined || estimate === undefined || interval === undefined) return undefined;
    if (!isTelling(estimate, interval)) return undefined;
    const others = othersWithSameInterval(reading, result)
      .filter((other) => other.cell?.row !== cell.row);
    const [other] = others;
    if (other === undefined) return agrees;
    const alike = others.filter((one) => one.estimate?.plain === estimate.plain);
    const [first] = alike.filter(({ span }) => span.start < result.span.start);
    if (first !== undefined) return judgeRepeated(result, interval, first);
    return alike.length > 0 ? agrees : judgeShared(estimate, interval, other);
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Could the authors check this row against the output of the model?
  `,

  examples: [
    {
      text: 'Table 2. Cough\nTown\tOR (95% CI)\nQuay\t1.59 (1.05–2.41)\nHill\t0.72 (0.58–0.90)',
      outcome: 'agrees',
      note: 'each row has its own numbers',
    },
    {
      text: 'Table 2. Cough\nTown\tOR (95% CI)\nQuay\t1.59 (1.05–2.41)\nHill\t1.59 (1.05–2.41)',
      outcome: 'disagrees',
      note: 'the same three numbers twice',
    },
    {
      text: 'Table 2. Cough\nTown\tOR (95% CI)\nQuay\t1.59 (1.05–2.41)\nHill\t1.63 (1.05–2.41)',
      outcome: 'disagrees',
      note: '√(1.05 × 2.41) = 1.59, the estimate of the other row',
    },
    {
      text: 'Table 2. Cough\nTown\tOR (95% CI)\tP\nMen\t1.59 (1.05–2.41)\t0.03\n'
        + 'Boys\t1.59 (1.05–2.41)\t0.02',
      outcome: 'cannot tell',
      note: 'the p-values differ, and by chance two rows may share the rest',
    },
  ],
});

/** Numbers that two rows share by chance are no finding: two decimals, and some width. */
function isTelling({ decimals }: Printed, { lower, upper }: Interval): boolean {
  const digits = Math.min(decimals, lower.decimals, upper.decimals);
  return digits >= 2 && (upper.value - lower.value) * 10 ** digits >= 30;
}

/** All three numbers stand in an earlier row as well. */
function judgeRepeated(
  { estimate, p, about }: RatioResult,
  interval: Interval,
  first: RatioResult,
): Verdict {
  if (about.comparison !== undefined && about.comparison === first.about.comparison) return agrees;
  if (p?.printed.plain !== first.p?.printed.plain) {
    return cannotTell(`the row “${first.cell?.row ?? ''}” has the same ratio and interval and `
      + 'another p-value');
  }
  return disagrees(
    `${estimate?.plain ?? ''} (${limitsInWords(interval)}) stands in the row `
      + `“${first.cell?.row ?? ''}” as well, digit for digit`,
  );
}

/**
 * The interval stands in another row as well, around an estimate that it fits better. Where
 * it cannot be this row's at all, the rules on the three numbers have said so.
 */
function judgeShared(
  estimate: Printed,
  interval: Interval,
  other: RatioResult,
): Verdict | undefined {
  if (agreementOf(estimate, interval, 'unknown').outcome === 'within rounding') return agrees;
  if (!limitsStand(estimate, interval, 'binary') || other.estimate === undefined) return undefined;
  const its = agreementOf(other.estimate, interval, 'unknown');
  if (its.outcome !== 'within rounding') return undefined;
  return disagrees(
    `the row “${other.cell?.row ?? ''}” has the same interval, ${limitsInWords(interval)}, which `
      + `centres on its ${other.estimate.plain} and not on ${estimate.plain}`,
    { grade: 'discrepancy' },
  );
}
