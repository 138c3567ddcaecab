import {
  agrees,
  cannotTell,
  cellsOf,
  cover,
  defineManuscriptRule,
  disagrees,
  isAbsence,
  type Judgement,
  partsAndTotal,
  type Printed,
  range,
  spansOf,
  type TableCells,
  type Verdict,
  type Whole,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'parts-and-total',
  question: 'Do the parts of a table add up to the total that is printed for them?',
  why: `
    The groups of a table make up its total, row by row and column by column. Where nearly all
    of a table’s sums come out and one does not, one of the numbers in that sum is not the one
    that was counted.
  `,
  source: `
    von Elm E, Altman DG, Egger M, et al. The Strengthening the Reporting of Observational
    Studies in Epidemiology (STROBE) statement. PLoS Med 2007;4:e296 (items 13 and 14: numbers at
    each stage, and those with missing data).
  `,
  innocent: [
    'Some people belong to none of the parts, or have no value, and still count in the total.',
    'Some people belong to several parts, and count once in the total.',
    'The parts are rounded, weighted or estimated, and so is their total.',
    'The total is of another set: all randomised, all screened, or another time.',
    'A digit was mistyped in one of the parts or in the total.',
  ],
  grade: 'discrepancy',

  judge(reading) {
    return reading.manuscript.tables.flatMap((table) => {
      const cells = cellsOf(reading, table);
      return [...acrossRows(cells), ...downColumns(cells)].map(judgementOf);
    });
  },

  comment: (words, { because }) => `
    For the total “${words}”: ${because}. Could the authors check the numbers of this sum, or say
    who is left out or counted twice?
  `,

  examples: [
    {
      text: 'Table 1. Visits by town\nTown\tMen\tWomen\tTotal\nQuay\t31\t40\t71\nHill\t22\t35\t57\n'
        + 'Mill\t18\t25\t43\nPort\t44\t51\t95\nFord\t12\t19\t31',
      outcome: 'agrees',
      note: '31 + 40 = 71, and so in every row',
    },
    {
      text: 'Table 1. Visits by town\nTown\tMen\tWomen\tTotal\nQuay\t31\t40\t71\nHill\t22\t35\t57\n'
        + 'Mill\t18\t25\t34\nPort\t44\t51\t95\nFord\t12\t19\t31',
      outcome: 'disagrees',
      note: '18 + 25 = 43, and 34 is printed: two digits exchanged',
    },
    {
      text: 'Table 1. Deaths\nTown\tObserved\tExpected\nQuay\t107\t94\nHill\t69\t89\n'
        + 'Mill\t100\t83\nTotal\t276\t266',
      outcome: 'agrees',
      note: '107 + 69 + 100 = 276; 94 + 89 + 83 = 266',
    },
    {
      text: 'Table 1. Answers\nAnswer\tNumber\nOften\t141\nSometimes\t420\nNever\t928\nTotal\t1522',
      outcome: 'cannot tell',
      note: 'the answers add up to 1489: 33 may have given none',
    },
  ],
});

/** A sum as a table prints it: its parts, its total, and whether the table bears it out. */
interface Sum {
  readonly parts: readonly Whole[];
  readonly total: Whole;
  /** Whether other sums of the same table come out with the same parts. */
  readonly confirmed: boolean;
  /** How many of them do, of how many. */
  readonly tally: string;
}

/** So many sums of a table must come out, and so large a share, before one that does not counts. */
const FEWEST_ROWS = 4;
const MOST_ROWS = 0.8;
const FEWEST_COLUMNS = 2;

/** A table has no more parts to a total than this, side by side. */
const MOST_PARTS = 8;

const TOTAL = /^(?:grand )?(?:total|all|overall|sum|both|whole)\b(?! (?:cause|other|cholesterol))/i;

/** Rows whose whole numbers are no counts: "Age, mean (SD)" gives "54 (13)". */
const OF_NO_COUNT =
  /\b(?:means?|averages?|medians?|sd|iqr|range|score|rate|years \(|kg|cm|mm)\b|±/i;

/** Rows of which one column is the total of those right beside it. */
function acrossRows(cells: TableCells): readonly Sum[] {
  const { table, firstRow } = cells;
  const columns = range(1, table.columnCount);
  const totals = columns.filter((column) =>
    levelsOf(cells, column).some((part) => TOTAL.test(part)));
  const rows = range(firstRow, table.rowCount)
    .filter((row) => !OF_NO_COUNT.test(cells.margin(row)));
  return totals.flatMap((total) => {
    const candidates = sides(total, table.columnCount, totals).map((parts) =>
      rows.flatMap((row) => sumOf(
        parts.map((column) => cells.whole(row, column)),
        cells.whole(row, total),
      )));
    return bestOf(candidates, FEWEST_ROWS, MOST_ROWS);
  });
}

/** A heading's levels, of which any may say "Total". */
function levelsOf({ words, firstRow }: TableCells, column: number): readonly string[] {
  return range(0, firstRow).map((row) => words(row, column));
}

/** The sets of neighbouring columns that a total may be of: to its left, to its right. */
function sides(total: number, columnCount: number, totals: readonly number[]): readonly number[][] {
  const left = runFrom(total - 1, -1, 1, totals);
  const right = runFrom(total + 1, 1, columnCount - 1, totals);
  return [left, right].flatMap((run) =>
    range(2, Math.min(run.length, MOST_PARTS) + 1)
      .map((size) => run.slice(0, size).sort(ascending)));
}

function ascending(one: number, other: number): number {
  return one - other;
}

function runFrom(from: number, step: number, last: number, stops: readonly number[]): number[] {
  const run: number[] = [];
  for (let at = from; step < 0 ? at >= last : at <= last; at += step) {
    if (stops.includes(at)) break;
    run.push(at);
  }
  return run;
}

/** Columns of which one row is the total of those right above or below it. */
function downColumns(cells: TableCells): readonly Sum[] {
  const { table, firstRow, words } = cells;
  const columns = range(1, table.columnCount);
  const isTotal = (row: number): boolean => TOTAL.test(words(row, 0));
  const hasNumbers = (row: number): boolean =>
    columns.some((column) => cells.whole(row, column) !== undefined);
  const isPart = (row: number): boolean =>
    row >= firstRow && row < table.rowCount && !isTotal(row) && hasNumbers(row)
    && !OF_NO_COUNT.test(cells.margin(row));
  return range(firstRow, table.rowCount).filter(isTotal).flatMap((total) => {
    const candidates = [-1, 1].map((step) => {
      const parts: number[] = [];
      for (let row = total + step; isPart(row); row += step) parts.push(row);
      parts.sort(ascending);
      return columns.flatMap((column) => sumOf(
        parts.map((row) => cells.whole(row, column)),
        cells.whole(total, column),
      ));
    });
    return bestOf(candidates, FEWEST_COLUMNS, 0.5);
  });
}

type Bare = Pick<Sum, 'parts' | 'total'>;

/** A sum whose numbers are all there; an empty part may stand for none or for not known. */
function sumOf(parts: readonly (Whole | undefined)[], total: Whole | undefined): readonly Bare[] {
  const known = parts.filter((part) => part !== undefined);
  if (total === undefined || known.length < 2 || known.length < parts.length) return [];
  return total.count.value === 0 ? [] : [{ parts: known, total }];
}

/** The parts by which most sums come out, with whether enough do; none where no sum does. */
function bestOf(
  candidates: readonly (readonly Bare[])[],
  fewest: number,
  most: number,
): readonly Sum[] {
  const [best] = candidates.filter((sums) => sums.length > 0)
    .map((sums) => ({ sums, fitting: sums.filter(addsUp).length }))
    .toSorted((one, other) => other.fitting - one.fitting);
  if (best === undefined) return [];
  const { sums, fitting } = best;
  const confirmed = fitting >= fewest && fitting >= most * sums.length;
  if (!confirmed && sums.length > 1 && fitting < sums.length) return [];
  return sums.map((sum) => ({ ...sum, confirmed, tally: `${fitting} of ${sums.length}` }));
}

function addsUp({ parts, total }: Bare): boolean {
  return parts.reduce((sum, { count }) => sum + count.value, 0) === total.count.value;
}

function judgementOf(sum: Sum): Judgement {
  const numbers: readonly Printed[] = [...sum.parts.map(({ count }) => count), sum.total.count];
  const { total } = sum;
  return {
    verdict: judgeSum(sum),
    span: cover(total.count.span, ...(total.total === undefined ? [] : [total.total.span])),
    marks: spansOf(numbers),
  };
}

function judgeSum({ parts, total, confirmed, tally }: Sum): Verdict {
  const found = partsAndTotal(parts.map(({ count }) => count), total.count);
  if (isAbsence(found)) return cannotTell(found.because);
  const addition = `${parts.map(({ count }) => count.plain).join(' + ')} = ${found.sum}`;
  const ofPeople = [...parts, total].some(({ share }) => share !== undefined);
  if (found.verdict === 'adds up') return agrees;
  if (found.verdict === 'off by rounding' && !ofPeople) return agrees;
  if (!confirmed) {
    return cannotTell(`${addition} beside a total of ${total.count.plain}: the parts may leave out `
      + 'a category or those without a value, or overlap');
  }
  return disagrees(`${addition}, and the total ${total.count.plain} is printed`, {
    recomputed: { quantity: 'total', range: { low: found.sum, high: found.sum } },
    working: [addition, `in this table ${tally} such sums come out`],
    explanations: found.difference < 0
      ? [`${-found.difference} may be in none of the parts, for instance without a value.`]
      : [],
  });
}
