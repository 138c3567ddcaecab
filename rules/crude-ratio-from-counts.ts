import {
  agrees,
  cannotTell,
  type CrudeMatch,
  defineManuscriptRule,
  disagrees,
  fixed,
  type Judgement,
  levelOf,
  limitsInWords,
  limitsStand,
  matchesOfCounts,
  type Printed,
  ratiosWithCounts,
  type RatioWithCounts,
  spansOf,
  uncut,
  unrounded,
  type Verdict,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'crude-ratio-from-counts',
  question: 'Does a crude ratio follow from the counts that stand beside it?',
  why: `
    Four counts give one crude odds ratio or risk ratio, and its interval by one of a few
    methods. Where the other ratios of a column follow from their counts to the last digit and
    one does not, a count or the ratio is not the one that was meant.
  `,
  source: `
    Woolf B. On estimating the relation between blood group and disease. Ann Hum Genet
    1955;19:251–253. Katz D, Baptista J, Azen SP, Pike MC. Obtaining confidence intervals for the
    risk ratio in cohort studies. Biometrics 1978;34:469–474.
  `,
  innocent: [
    'The ratio is adjusted, weighted, matched or clustered, and not a crude one.',
    'Some of those counted have a missing value and are left out of the ratio.',
    'The ratio is held against another reference than the table shows.',
    'The counts are of people and the ratio is of events, visits or person-time.',
    'A digit was mistyped in one of the counts or in the ratio.',
  ],
  grade: 'discrepancy',

  judge(reading) {
    return reading.manuscript.tables.flatMap((table) =>
      ratiosWithCounts(reading, table).flatMap((row): readonly Judgement[] => {
        const verdict = judgeRow(row);
        if (verdict === undefined) return [];
        const { estimate, interval, span } = row.ratio;
        const marks = spansOf([...row.printed, estimate, interval?.lower, interval?.upper]);
        return [{ verdict, span, marks, result: row.ratio }];
      }));
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Could the authors check the counts and the ratio, or say how the
    ratio was adjusted?
  `,

  examples: [
    {
      text: 'Table 2. Cough\nTown\tCases\tControls\tOR (95% CI)\nHill\t30\t60\t1.00 (reference)\n'
        + 'Quay\t45\t50\t1.80 (1.00–3.25)\nMill\t28\t41\t1.37 (0.71–2.61)\n'
        + 'Port\t52\t47\t2.21 (1.22–4.00)\nFord\t20\t38\t1.05 (0.53–2.10)',
      outcome: 'agrees',
      note: '(45 × 60) / (50 × 30) = 1.80',
    },
    {
      text: 'Table 2. Cough\nTown\tCases\tControls\tOR (95% CI)\nHill\t30\t60\t1.00 (reference)\n'
        + 'Quay\t45\t50\t1.80 (1.00–3.25)\nMill\t28\t41\t1.37 (0.71–2.61)\n'
        + 'Port\t52\t47\t2.21 (1.22–4.00)\nFord\t20\t83\t1.05 (0.53–2.10)',
      outcome: 'disagrees',
      note: '(20 × 60) / (83 × 30) = 0.48; with 38 controls it is 1.05',
    },
    {
      text: 'Table 3. Falls\nOutcome\tSplint (n = 120)\tNo splint (n = 118)\tRR (95% CI)\n'
        + 'Any fall\t45 (37.5)\t60 (50.8)\t0.74 (0.55–0.99)',
      outcome: 'agrees',
      note: '(45 / 120) / (60 / 118) = 0.74',
    },
    {
      text: 'Table 2. Cough\nTown\tCases\tControls\tOR (95% CI)\nHill\t30\t60\t1.00 (reference)\n'
        + 'Quay\t45\t50\t1.80 (1.00–3.25)\nMill\t28\t41\t1.61 (0.82–3.16)',
      outcome: 'cannot tell',
      note: 'one ratio follows from its counts and one does not: they may be of different models',
    },
  ],
});

/** So far, in standard errors, a number may lie from the counts' own before it is asked about. */
const ROOM = 0.2;

function judgeRow(row: RatioWithCounts): Verdict | undefined {
  const { ratio, counts, measure } = row;
  const { estimate, interval } = ratio;
  if (estimate === undefined) return undefined;
  const level = interval === undefined ? 95 : levelOf(interval);
  const matches = matchesOfCounts(measure, counts, {
    estimate,
    ...(interval === undefined ? {} : { lower: interval.lower, upper: interval.upper }),
  }, level);
  const [usual] = matches;
  if (usual === undefined) return undefined;
  if (!row.fits) {
    const stands = interval === undefined || limitsStand(estimate, interval, 'binary');
    return stands ? judgeEstimate(row, estimate, usual) : undefined;
  }
  if (interval === undefined || !row.confirmed) return agrees;
  if (matches.some(({ lower, upper }) => lower && upper)) return agrees;
  if (isNear(interval.lower, interval.upper, matches)) return agrees;
  const { low, high } = usual.crude.interval;
  return cannotTell(`the counts give limits of ${fixed(low, interval.lower.decimals)} to `
    + `${fixed(high, interval.upper.decimals)}, and ${limitsInWords(interval)} may allow for `
    + 'clusters, weights or matching');
}

function judgeEstimate(
  row: RatioWithCounts,
  estimate: Printed,
  usual: CrudeMatch,
): Verdict | undefined {
  if (isHardlyOff(estimate, usual)) {
    return cannotTell('the ratio is off that of the counts by too little to ask about');
  }
  const shown = fixed(usual.crude.ratio, Math.max(2, estimate.decimals));
  if (!row.confirmed) {
    return cannotTell(`the counts give ${shown}, and ${estimate.plain} may be adjusted or of other `
      + 'people');
  }
  return disagrees(
    `the counts give a crude ratio of ${shown}, and ${estimate.plain} is printed`,
    {
      recomputed: {
        quantity: 'ratio', range: { low: usual.crude.ratio, high: usual.crude.ratio },
      },
      working: [
        ...workingOf(row, usual),
        `in this column ${row.tally} ratios follow from their counts`,
      ],
    },
  );
}

function workingOf({ counts, measure }: RatioWithCounts, { crude }: CrudeMatch): readonly string[] {
  const { exposedEvents: a, exposedNonEvents: b } = counts;
  const { unexposedEvents: c, unexposedNonEvents: d } = counts;
  const formula = measure === 'OR'
    ? `(${a} × ${d}) / (${b} × ${c})`
    : `(${a} / ${a + b}) / (${c} / ${c + d})`;
  return [`${formula} = ${fixed(crude.ratio, 3)}, with limits of ${fixed(crude.interval.low, 3)} `
    + `to ${fixed(crude.interval.high, 3)} by the usual method`];
}

/** Whether digits were cut off, or the two lie within a fraction of a standard error. */
function isHardlyOff(estimate: Printed, { crude }: CrudeMatch): boolean {
  const standardError = Math.log(crude.interval.high / crude.interval.low) / 3.92;
  const cut = uncut(estimate);
  return (crude.ratio >= cut.low && crude.ratio <= cut.high)
    || near(estimate, crude.ratio, Math.exp(ROOM * standardError));
}

/** Whether some method's limits lie within a fraction of a standard error of the printed ones. */
function isNear(lower: Printed, upper: Printed, matches: readonly CrudeMatch[]): boolean {
  return matches.some(({ crude: { interval: { low, high } } }) => {
    const room = Math.exp((ROOM * Math.log(high / low)) / 3.92);
    return near(lower, low, room) && near(upper, high, room);
  });
}

function near(printed: Printed, value: number, room: number): boolean {
  const { low, high } = unrounded(printed);
  return low <= value * room && high >= value / room;
}
