import {
  type Cell, type CoefficientResult, cover, type Printed, type PValue, type Result,
} from '../../model/index.ts';
import type { Item } from '../parse/item.ts';
import type { Sheet } from './sheet.ts';

/** What a column of a model's output holds, as its heading says. */
type Role = 'coefficient' | 'coefficient with error' | 'error' | 'z' | 't' | 'Wald' | 'p' | 'ratio';

/** The columns that belong to one column of coefficients, by their numbers. */
interface Columns {
  readonly coefficient: number;
  readonly withError: boolean;
  readonly error?: number;
  readonly statistic?: { readonly of: 'z' | 't' | 'Wald'; readonly column: number };
  readonly p?: number;
}

const ERROR = String.raw`(?:s\.?\s?e\.?(?:\s?\(?[bβ]\)?)?|std\.?\s?err(?:or|\.)?|standard error)`;
const COEFFICIENT = String.raw`(?:b|β|beta|(?:regression |logistic )?coef(?:f|ficients?|s)?\.?`
  + String.raw`|β coefficients?|b coefficients?|(?:ln|log)\s?\(?(?:or|hr|odds ratio)\)?)`;

/** Headings by what they promise, as they stand: "S.E.", "Std. Err.", "Wald χ²", "Exp(B)". */
const HEADINGS: readonly (readonly [Role, RegExp])[] = [
  ['coefficient', new RegExp(`^${COEFFICIENT}$`, 'i')],
  ['coefficient with error', new RegExp(`^${COEFFICIENT}\\s?[([,±]\\s?${ERROR}[)\\]]?$`, 'i')],
  ['error', new RegExp(`^${ERROR}$`, 'i')],
  ['z', /^z(?:[- ](?:value|statistic|score))?$/i],
  ['t', /^t(?:[- ](?:value|statistic))?$/i],
  ['Wald', /^wald(?:\s?(?:χ2|χ²|x2|chi[- ]squared?|statistics?|test))?$/i],
  ['p', /^(?:p|sig\.?|p[- ]?values?|pr?\s?\(?>\s?\|[zt]\|\)?)$/i],
  ['ratio', new RegExp('^(?:exp\\s?\\(?[bβ]\\)?|[ac]?(?:or|hr|rr|irr)'
    + '|(?:odds|hazards?|risk|rate) ratio)(?![a-z])', 'i')],
];

/**
 * A table's results with the coefficients of its rows, which join their standard
 * error, statistic and p from the columns beside them.
 *
 * ```
 * Age | 0.693 | 0.210 | 10.89 | 1 | 0.001 | 2.000    under  B | S.E. | Wald | df | Sig. | Exp(B)
 * ```
 *
 * A column is one of coefficients where a standard error, a statistic or a ratio stands beside
 * it. One that was read already, with its interval, is completed.
 */
export function withCoefficients(sheet: Sheet, results: readonly Result[]): readonly Result[] {
  const models = modelsOf(sheet);
  if (models.length === 0) return results;
  const { headingRows } = sheet.labels;
  const known = new Map(results.flatMap((result) =>
    (result.kind === 'coefficient' ? [[result.estimate.span.start, result] as const] : [])));
  const rows = Array.from({ length: sheet.grid.table.rowCount - headingRows }, (_, at) =>
    at + headingRows);
  const found = rows.flatMap((row) => models.flatMap((columns) => {
    const result = coefficientAt(sheet, row, columns);
    return result === undefined ? [] : [result];
  }));
  const completed = new Map(found.flatMap((result) => {
    const other = known.get(result.estimate.span.start);
    return other === undefined ? [] : [[other, { ...result, ...other }] as const];
  }));
  const added = found.filter(({ estimate }) => !known.has(estimate.span.start));
  const whole = results.map((result) => completed.get(result as CoefficientResult) ?? result);
  return [...whole, ...added];
}

/** The columns of each model, from one column of coefficients up to the next. */
function modelsOf({ grid, labels }: Sheet): readonly Columns[] {
  const roles = Array.from({ length: grid.table.columnCount }, (_, column) =>
    roleOf(lowestHeading(grid.words, labels.headingRows, column)));
  const starts = roles.flatMap((role, at) =>
    (role === 'coefficient' || role === 'coefficient with error' ? [at] : []));
  return starts.flatMap((start, at): readonly Columns[] => {
    const end = starts[at + 1] ?? roles.length;
    const find = (wanted: Role): number | undefined => {
      const found = roles.indexOf(wanted, start + 1);
      return found >= 0 && found < end ? found : undefined;
    };
    const withError = roles[start] === 'coefficient with error';
    const error = find('error');
    const statistic = (['Wald', 'z', 't'] as const).flatMap((of) => {
      const column = find(of);
      return column === undefined ? [] : [{ of, column }];
    })[0];
    if (!withError && error === undefined && !statistic && find('ratio') === undefined) return [];
    const p = find('p');
    return [{
      coefficient: start,
      withError,
      ...(error === undefined ? {} : { error }),
      ...(statistic === undefined ? {} : { statistic }),
      ...(p === undefined ? {} : { p }),
    }];
  });
}

function lowestHeading(
  words: (row: number, column: number) => string,
  headingRows: number,
  column: number,
): string {
  for (let row = headingRows - 1; row >= 0; row--) {
    const found = words(row, column);
    if (found !== '') return found;
  }
  return '';
}

/** A footnote's mark does not change what a heading says: "Exp(B)a", "B*". */
function roleOf(heading: string): Role | undefined {
  const plain = heading.replace(/[*†‡§]+$/, '').trim();
  return HEADINGS.find(([, pattern]) => pattern.test(plain))?.[0];
}

/** The numbers of a row that belong together, as printed. */
interface Row {
  readonly cell: Cell;
  readonly estimate: Printed;
  readonly standardError: Printed | undefined;
  readonly statistic: CoefficientResult['statistic'];
  readonly p: PValue | undefined;
}

function coefficientAt(
  sheet: Sheet,
  row: number,
  columns: Columns,
): CoefficientResult | undefined {
  const found = rowAt(sheet, row, columns);
  if (found === undefined || found.estimate.percent) return undefined;
  const { cell, estimate, standardError, statistic, p } = found;
  const { grid: { table }, labels } = sheet;
  const parts = [standardError, statistic?.printed, p].flatMap((part) => part?.span ?? []);
  return {
    kind: 'coefficient',
    estimate,
    ...(standardError === undefined ? {} : { standardError }),
    ...(statistic === undefined ? {} : { statistic }),
    ...(p === undefined ? {} : { p }),
    span: cover(estimate.span, ...parts),
    about: { term: labels.row(row) },
    inferred: [],
    counts: [],
    cited: false,
    cell: { table, cell, row: labels.row(row), column: labels.column(columns.coefficient) },
  };
}

function rowAt({ grid, itemsOf }: Sheet, row: number, columns: Columns): Row | undefined {
  const cellAt = (column: number | undefined): Cell | undefined => {
    const cell = column === undefined ? undefined : grid.at(row, column);
    return cell?.row === row && cell.columnSpan === 1 ? cell : undefined;
  };
  const numberAt = (column: number | undefined): Printed | undefined => {
    const cell = cellAt(column);
    return cell === undefined ? undefined : soleNumber(itemsOf(cell));
  };
  const cell = cellAt(columns.coefficient);
  if (cell === undefined) return undefined;
  const pair = columns.withError ? numberWithError(itemsOf(cell)) : undefined;
  const estimate = columns.withError ? pair?.estimate : soleNumber(itemsOf(cell));
  if (estimate === undefined) return undefined;
  const printed = numberAt(columns.statistic?.column);
  const beside = cellAt(columns.p);
  return {
    cell,
    estimate,
    standardError: pair?.error ?? numberAt(columns.error),
    statistic: columns.statistic && printed && { of: columns.statistic.of, printed },
    p: beside === undefined ? undefined : pIn(itemsOf(beside)),
  };
}

const MARKS: ReadonlySet<Item['kind']> = new Set(['star', 'raised', 'other']);

// 0.693   −0.081*   .102ᵃ
function soleNumber(items: readonly Item[]): Printed | undefined {
  const [first, ...others] = items;
  if (first?.kind !== 'number' || first.attached) return undefined;
  return others.every(({ kind }) => MARKS.has(kind)) ? first.printed : undefined;
}

// 0.693 (0.210)   −0.08 ± 0.03
function numberWithError(
  items: readonly Item[],
): { readonly estimate: Printed; readonly error: Printed } | undefined {
  const [first, separator, second, ...others] = items;
  if (first?.kind !== 'number' || second?.kind !== 'number') return undefined;
  if (separator?.kind !== 'open' && separator?.kind !== 'plus-minus') return undefined;
  const isAlone = others.every(({ kind }) => kind === 'close' || MARKS.has(kind));
  return isAlone ? { estimate: first.printed, error: second.printed } : undefined;
}

// 0.001   <0.001   p = 0.03
function pIn(items: readonly Item[]): PValue | undefined {
  const said = items.find((item) => item.kind === 'p');
  if (said !== undefined) return said.value;
  const [first, second] = items;
  const relation = first?.kind === 'relation' ? first.relation : '=';
  const number = first?.kind === 'relation' ? second : first;
  if (number?.kind !== 'number' || number.printed.value > 1) return undefined;
  const span = cover((first ?? number).span, number.printed.span);
  return { relation: relation ?? '=', printed: number.printed, tests: 'result', span };
}
