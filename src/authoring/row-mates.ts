import {
  type CoefficientResult, quote, type RatioResult, type Reading, type Result, type Table,
} from '../model/index.ts';

/** A coefficient with the ratio that is its exponential, where one is printed for it. */
export interface WithRatio {
  readonly coefficient: CoefficientResult;
  readonly ratio: RatioResult | undefined;
}

/**
 * Every coefficient with its ratio: in a table the first ratio of its row to the right, before
 * the next coefficient; in prose the one that follows right behind it.
 */
export function coefficientsWithRatios(reading: Reading): readonly WithRatio[] {
  const { results } = reading.findings;
  const rows = resultsByRow(results);
  return results.flatMap((result, at): readonly WithRatio[] => {
    if (result.kind !== 'coefficient') return [];
    const ratio = result.cell === undefined
      ? ratioBehind(reading, result, results[at + 1])
      : ratioInRow(result, rows.get(result.cell.table)?.get(result.cell.cell.row) ?? []);
    return [{ coefficient: result, ratio }];
  });
}

type Rows = ReadonlyMap<number, readonly Result[]>;

function resultsByRow(results: readonly Result[]): ReadonlyMap<Table, Rows> {
  const tables = new Map<Table, Map<number, Result[]>>();
  for (const result of results) {
    if (result.cell === undefined) continue;
    const { table, cell } = result.cell;
    const rows = tables.get(table) ?? new Map<number, Result[]>();
    const row = rows.get(cell.row);
    if (row === undefined) rows.set(cell.row, [result]);
    else row.push(result);
    tables.set(table, rows);
  }
  return tables;
}

function ratioInRow(
  coefficient: CoefficientResult,
  row: readonly Result[],
): RatioResult | undefined {
  const columnOf = ({ cell }: Result): number => cell?.cell.column ?? 0;
  const behind = row.filter((other) => columnOf(other) > columnOf(coefficient))
    .toSorted((one, other) => columnOf(one) - columnOf(other));
  const next = behind.find(({ kind }) => kind === 'ratio' || kind === 'coefficient');
  return next?.kind === 'ratio' ? next : undefined;
}

/** So far behind a coefficient may its ratio stand, over brackets, its name and its label. */
const REACH = 40;

// β = 0.46 (SE 0.21), p = 0.03; OR 1.58 (95% CI 1.05 to 2.39)
//                             ^^^^^
function ratioBehind(
  { manuscript }: Reading,
  { span }: CoefficientResult,
  next: Result | undefined,
): RatioResult | undefined {
  if (next?.kind !== 'ratio' || next.cell !== undefined) return undefined;
  if (next.span.start - span.end > REACH || next.span.start < span.end) return undefined;
  const between = quote(manuscript.text, { start: span.end, end: next.span.start });
  return /^[^\d.]*$/.test(between) && !/\b(?:and|but|while|whereas|for|in)\b/i.test(between)
    ? next : undefined;
}
