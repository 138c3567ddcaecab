import {
  agrees,
  defineManuscriptRule,
  disagrees,
  type DividedWhole,
  dividedWholes,
  type Judgement,
  type Verdict,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'groups-of-whole',
  question: 'Do the groups add up to the number that was divided into them?',
  why: `
    Where a sentence tells how many people were randomised and how many came into each group,
    the groups add up to the whole. Where they do not, one of the numbers is of another
    moment of the study, or was copied amiss.
  `,
  source: `
    Schulz KF, Altman DG, Moher D. CONSORT 2010 statement: updated guidelines for reporting
    parallel group randomised trials. BMJ 2010;340:c332 (item 13, the flow of participants).
  `,
  innocent: [
    'Some were assigned to a group that the sentence does not count.',
    'The groups count those who were treated or analysed, and the whole those who were assigned.',
    'Some left the study between assignment and the count of the groups.',
  ],
  grade: 'discrepancy',

  judge(reading) {
    return dividedWholes(reading).flatMap((divided): readonly Judgement[] => {
      const verdict = judgeSum(divided);
      if (verdict === undefined) return [];
      const marks = [divided.total, ...divided.groups].map(({ span }) => span);
      return [{ verdict, span: divided.span, marks }];
    });
  },

  comment: (words, { because }) => `
    In “${words}”, ${because}. Could the authors check the numbers, or say where the difference
    went?
  `,

  examples: [
    {
      text: 'In all, 512 women were randomly assigned to brevane (n = 259) or placebo (n = 253).',
      outcome: 'agrees',
      note: '259 + 253 = 512',
    },
    {
      text: 'In all, 512 women were randomly assigned to brevane (n = 259) or placebo (n = 235).',
      outcome: 'disagrees',
      note: '259 + 235 = 494',
    },
    {
      text: 'Of 301 patients assessed, 120 were randomised: 61 to brevane and 59 to placebo.',
      outcome: 'agrees',
      note: '61 + 59 = 120, and 301 is not the number that was divided',
    },
    {
      text: 'In all, 130 women were allocated to walking (64 women) or to rowing (68 women).',
      outcome: 'disagrees',
      note: '64 + 68 = 132',
    },
  ],
});

/** Groups that fall shorter than this leave others uncounted; larger ones count other things. */
const NEAR = { least: 0.7, most: 1.5 } as const;

function judgeSum({ total, groups, others }: DividedWhole): Verdict | undefined {
  const sums = groups.map((_, at) => sumOf(groups.slice(0, at + 1).map(({ value }) => value)));
  const sum = sums.at(-1) ?? 0;
  if (sums.slice(1).some((partial) => others.includes(partial))) return agrees;
  if (sum < NEAR.least * total.value || sum > NEAR.most * total.value) return undefined;
  const terms = groups.map(({ plain }) => plain).join(' + ');
  return disagrees(`the groups add up to ${sum}, and ${total.plain} is printed for the whole`, {
    recomputed: { quantity: 'whole', range: { low: sum, high: sum } },
    working: [`${terms} = ${sum}`, `${sum} − ${total.plain} = ${sum - total.value}`],
  });
}

function sumOf(values: readonly number[]): number {
  return values.reduce((so, value) => so + value, 0);
}
