import { type Count, type Manuscript, placeOf, quote, type Result } from '../model/index.ts';
import type { CountJson, ResultJson, TableJson } from './json-contract.ts';
import { levelIsAssumed, logEstimateOf, type Multiplier, standardErrorOf } from './ratio-scale.ts';
import { sectionName } from './section-name.ts';

/** A result as the contract has it. */
export function resultJson(
  manuscript: Manuscript, result: Result, multiplier: Multiplier,
): ResultJson {
  const { span, about, interval, p } = result;
  const place = placeOf(manuscript, span);
  return {
    kind: result.kind,
    measure: measureOf(result),
    adjusted: result.adjusted ?? null,
    estimate: result.estimate?.plain ?? null,
    lower: interval?.lower.plain ?? null,
    upper: interval?.upper.plain ?? null,
    level: interval?.level ?? null,
    p: p === undefined ? null : { relation: p.relation, value: p.printed.plain },
    logEstimate: rounded(logEstimateOf(result)),
    standardError: rounded(standardErrorOf(result, multiplier)),
    outcome: about.outcome ?? null,
    term: about.term ?? null,
    comparison: about.comparison ?? null,
    unit: about.unit ?? null,
    counts: result.counts.map(countJson),
    in: result.cell === undefined ? 'prose' : 'table',
    section: sectionName(place.section),
    page: place.page ?? null,
    line: place.line ?? null,
    table: tableJson(result),
    inferred: inferredIn(result, multiplier),
    quote: quote(manuscript.text, span),
    span: [span.start, span.end],
  };
}

function measureOf(result: Result): string | null {
  switch (result.kind) {
    case 'test': return result.statistic;
    case 'coefficient':
    case 'proportion': return null;
    default: return result.measure;
  }
}

function countJson({ count, total, percent }: Count): CountJson {
  return {
    count: count?.plain ?? null, total: total?.plain ?? null, percent: percent?.plain ?? null,
  };
}

/** Where in its table a result stands; null for one that stands in prose. */
export function tableJson({ cell }: Result): TableJson | null {
  if (cell === undefined) return null;
  return { label: wordsOrNull(cell.table.label), row: wordsOrNull(cell.row),
    column: wordsOrNull(cell.column) };
}

function wordsOrNull(words: string): string | null {
  return words === '' ? null : words;
}

function inferredIn(result: Result, multiplier: Multiplier): readonly string[] {
  const assumed = levelIsAssumed(result) && standardErrorOf(result, multiplier) !== undefined;
  return assumed ? [...result.inferred, 'standardError'] : result.inferred;
}

/** Four decimals are more than any printed interval determines. */
function rounded(value: number | undefined): number | null {
  return value === undefined ? null : Math.round(value * 1e4) / 1e4;
}
