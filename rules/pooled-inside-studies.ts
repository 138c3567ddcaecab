import {
  agrees,
  defineManuscriptRule,
  disagrees,
  type Judgement,
  type Printed,
  quote,
  type Range,
  type RatioResult,
  type Reading,
  spansOf,
  type Table,
  unrounded,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'pooled-inside-studies',
  question: 'Does a pooled ratio lie among the ratios of its studies?',
  why: `
    A pooled ratio is a weighted mean of its studies on the log scale. Whatever the weights, it
    cannot be smaller than the smallest of them, nor larger than the largest.
  `,
  source: `
    Deeks JJ, Higgins JPT, Altman DG. Analysing data and undertaking meta-analyses. In: Cochrane
    Handbook for Systematic Reviews of Interventions, version 6. London: Cochrane; 2019 (10.3).
  `,
  innocent: [
    'The table shows only some of the studies that were pooled.',
    'The pooled ratio is adjusted, or comes from people of all studies together.',
    'The studies’ ratios are rounded or of another outcome.',
  ],
  grade: 'discrepancy',

  judge(reading) {
    return reading.manuscript.tables
      .filter((table) => POOLING.test(wordsOf(table, reading)))
      .flatMap((table) => columnsOf(table, reading).flatMap(judgeColumn));
  },

  comment: (words, { because }) => `
    For the pooled ratio “${words}”: ${because}. Could the authors check it, or say which studies
    were pooled?
  `,

  examples: [
    {
      text: 'Table 1. Meta-analysis of tarring and cough\nStudy\tOR (95% CI)\nQuay\t1.20 (0.80 to '
        + '1.80)\nHill\t1.60 (1.10 to 2.33)\nMill\t1.45 (0.95 to 2.21)\nPooled\t1.43 (1.12 to 1.82)',
      outcome: 'agrees',
      note: 'between 1.20 and 1.60',
    },
    {
      text: 'Table 1. Meta-analysis of tarring and cough\nStudy\tOR (95% CI)\nQuay\t1.20 (0.80 to '
        + '1.80)\nHill\t1.60 (1.10 to 2.33)\nMill\t1.45 (0.95 to 2.21)\nPooled\t1.83 (1.44 to 2.33)',
      outcome: 'disagrees',
      note: 'above 1.60, the largest of the three',
    },
    {
      text: 'Table 1. Meta-analysis of rest and pain\nStudy\tRR (95% CI)\nQuay\t0.80 (0.60 to '
        + '1.07)\nHill\t0.90 (0.70 to 1.16)\nMill\t0.85 (0.70 to 1.03)\nOverall\t0.85 (0.74 to 0.98)',
      outcome: 'agrees',
      note: 'between 0.80 and 0.90',
    },
    {
      text: 'Table 1. Meta-analysis of rest and pain\nStudy\tRR (95% CI)\nQuay\t0.80 (0.60 to '
        + '1.07)\nHill\t0.90 (0.70 to 1.16)\nMill\t0.85 (0.70 to 1.03)\nOverall\t0.75 (0.65 to 0.86)',
      outcome: 'disagrees',
      note: 'below 0.80, the smallest of the three',
    },
  ],
});

/** Tables of meta-analyses say so; in others an overall row may be a model of its own. */
const POOLING = /\b(?:meta.?analy\w{1,6}|forest plot|pooled)\b/i;

const POOLED_ROW = /^(?:pooled|overall|summary|combined|total|random.effects?|fixed.effects?)\b/i;

/** Fewer studies than this may be a choice of them. */
const FEWEST = 3;

function wordsOf({ caption }: Table, { manuscript: { text } }: Reading): string {
  return caption === undefined ? '' : quote(text, caption);
}

/** A ratio of a table with its estimate. */
interface Row {
  readonly result: RatioResult;
  readonly estimate: Printed;
  readonly label: string;
}

/** The ratios of each column, in reading order. */
function columnsOf(table: Table, { findings }: Reading): readonly (readonly Row[])[] {
  const columns = new Map<string, Row[]>();
  for (const result of findings.results) {
    const { cell, kind, estimate } = result;
    if (kind !== 'ratio' || cell?.table !== table || estimate === undefined) continue;
    const rows = columns.get(cell.column) ?? [];
    rows.push({ result, estimate, label: cell.row.split(' / ').at(-1) ?? '' });
    columns.set(cell.column, rows);
  }
  return [...columns.values()];
}

/** Every pooled row with the studies between it and the pooled row before it. */
function judgeColumn(rows: readonly Row[]): readonly Judgement[] {
  const judgements: Judgement[] = [];
  let studies: Row[] = [];
  for (const row of rows) {
    if (!POOLED_ROW.test(row.label)) studies.push(row);
    else {
      if (studies.length >= FEWEST) judgements.push(judgeRow(row, studies));
      studies = [];
    }
  }
  return judgements;
}

function judgeRow({ result, estimate }: Row, studies: readonly Row[]): Judgement {
  const ranges = studies.map((study) => unrounded(study.estimate));
  const all: Range = {
    low: Math.min(...ranges.map(({ low }) => low)),
    high: Math.max(...ranges.map(({ high }) => high)),
  };
  const { low, high } = unrounded(estimate);
  const judgement = { span: result.span, marks: spansOf([estimate]), result };
  if (low <= all.high && all.low <= high) return { ...judgement, verdict: agrees };
  const sorted = studies.map((study) => study.estimate)
    .toSorted((one, other) => one.value - other.value);
  const [least, most] = [sorted[0]?.plain, sorted.at(-1)?.plain];
  const because = `${estimate.plain} lies outside its ${studies.length} studies, whose ratios run `
    + `from ${least} to ${most}`;
  return {
    ...judgement,
    verdict: disagrees(because, {
      recomputed: { quantity: 'pooled ratio', range: all },
      working: ['a weighted mean lies between the smallest and the largest of its terms'],
    }),
  };
}
