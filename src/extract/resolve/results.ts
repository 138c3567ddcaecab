import {
  type About, type CellPlace, cover, type Inheritable, type Interval, type Printed, type PValue, type Result,
  type Span,
} from '../../model/index.ts';
import type { Draft } from '../parse/draft.ts';
import type { Item, PValueItem } from '../parse/item.ts';
import type { Passage } from '../parse/passage.ts';
import type { StatisticDraft } from '../parse/statistics.ts';
import type { Naming } from '../vocabulary.ts';
import { adjustmentOf } from './adjustment.ts';
import { AN_AMOUNT, type Before, type Resolved, resolveNaming } from './naming.ts';
import { assignPValues } from './p-values.ts';

/** What a result may inherit from outside its own block. */
export interface Customs {
  /** The level that the manuscript states for its intervals, where it states just one. */
  readonly level?: number;
  /** The ratio measure that the manuscript uses, where it uses just one. */
  readonly naming?: Naming;
}

/** Turns the drafts of a passage into results: what they are values of, level, p, adjustment. */
export function resolveResults(
  passage: Passage,
  drafts: readonly Draft[],
  customs: Customs,
): readonly Result[] {
  const pValues = assignPValues(passage, drafts);
  const results: Result[] = [];
  let before: Before | undefined;
  let level: number | undefined;
  for (const draft of drafts) {
    level = draft.label?.level ?? level;
    const common = draft.estimate?.percent === true ? undefined : customs.naming;
    const resolved = resolveNaming(passage, draft, before, common);
    if (resolved !== undefined) before = { draft, resolved };
    const p = pValues.get(draft);
    results.push(makeResult(passage, draft, resolved, p, level ?? customs.level));
  }
  return results;
}

function makeResult(
  passage: Passage,
  draft: Draft,
  resolved: Resolved | undefined,
  pAt: number | undefined,
  level: number | undefined,
): Result {
  const p = pAt === undefined ? undefined : (passage.items[pAt] as PValueItem);
  const adjusted = adjustmentOf(passage, draft, resolved?.name);
  const inferred: Inheritable[] = [];
  if (resolved?.inherited) inferred.push('measure');
  if (draft.limits !== undefined && level !== undefined && draft.label?.level === undefined) {
    inferred.push('level');
  }
  return resultOf(resolved?.naming ?? AN_AMOUNT, {
    ...(draft.estimate === undefined ? {} : { estimate: draft.estimate }),
    ...(draft.limits === undefined ? {} : { limits: draft.limits }),
    ...(level === undefined ? {} : { level }),
    ...(p === undefined ? {} : { p: p.value }),
    ...(adjusted === undefined ? {} : { adjusted }),
    type: draft.label?.type ?? 'confidence',
    span: spanOf(passage, draft, pAt),
    intervalSpan: draft.label === undefined ? draft.limits?.span : cover(draft.label.span, draft.limits?.span ?? draft.label.span),
    inferred,
    about: {},
  });
}

/** All that is known of a result beside what it is a value of. */
export interface Known {
  readonly estimate?: Printed;
  readonly limits?: { readonly lower: Printed; readonly upper: Printed; readonly span: Span };
  /** Where the interval stands with its label; its limits alone where there is none. */
  readonly intervalSpan?: Span | undefined;
  readonly level?: number;
  readonly type: Interval['type'];
  readonly p?: PValue;
  readonly adjusted?: boolean;
  readonly inferred: readonly Inheritable[];
  readonly about: About;
  readonly cell?: CellPlace;
  readonly span: Span;
}

/** A result, as the kind that its quantity asks for. */
export function resultOf({ quantity }: Naming, known: Known): Result {
  const { span, about, inferred, estimate } = known;
  const interval = intervalOf(known);
  const common = {
    span,
    about,
    inferred,
    counts: [],
    cited: false,
    ...(known.adjusted === undefined ? {} : { adjusted: known.adjusted }),
    ...(interval === undefined ? {} : { interval }),
    ...(known.p === undefined ? {} : { p: known.p }),
    ...(known.cell === undefined ? {} : { cell: known.cell }),
  };
  const printed = estimate === undefined ? {} : { estimate };
  switch (quantity.kind) {
    case 'ratio':
      return { ...common, ...printed, kind: 'ratio', measure: quantity.measure };
    case 'difference':
      return { ...common, ...printed, kind: 'difference', measure: quantity.measure };
    case 'other':
      return { ...common, ...printed, kind: 'other', measure: quantity.measure };
    case 'proportion':
      return { ...common, ...printed, kind: 'proportion' };
    case 'coefficient':
    case 'discrimination':
      if (estimate === undefined) return { ...common, kind: 'other', measure: 'other' };
      return { ...common, ...quantity, estimate };
    default:
      return quantity satisfies never;
  }
}

function intervalOf({ limits, level, type, intervalSpan }: Known): Interval | undefined {
  if (limits === undefined) return undefined;
  return {
    lower: limits.lower,
    upper: limits.upper,
    ...(level === undefined ? {} : { level }),
    type,
    span: intervalSpan ?? limits.span,
  };
}

/** Turns the test statistics and coefficients of a passage into results. */
export function resolveStatistics(drafts: readonly StatisticDraft[]): readonly Result[] {
  return drafts.map((draft): Result => {
    const common = {
      span: draft.span,
      about: {},
      inferred: [],
      counts: [],
      cited: false,
      estimate: draft.estimate,
      ...(draft.p === undefined ? {} : { p: draft.p.value }),
    };
    if (draft.statistic === undefined) {
      const { standardError } = draft;
      return { ...common, kind: 'coefficient', ...(standardError === undefined ? {} : { standardError }) };
    }
    const { statistic, degreesOfFreedom } = draft;
    return { ...common, kind: 'test', statistic, relation: '=', degreesOfFreedom };
  });
}

/** From the first to the last printed number of the result; a p-value further off stays out. */
function spanOf(passage: Passage, draft: Draft, pAt: number | undefined): Span {
  const { items } = passage;
  const parts: Span[] = [(items[draft.anchor] as Item).span];
  if (draft.limits !== undefined) parts.push(draft.limits.span);
  const isClose = pAt !== undefined && Math.abs(pAt - draft.end) <= 8;
  if (isClose) parts.push((items[pAt] as Item).span);
  const whole = cover(parts[0] as Span, ...parts.slice(1));
  return { ...whole, end: endWithBrackets(passage, draft, isClose ? Math.max(pAt + 1, draft.end) : draft.end) ?? whole.end };
}

/** Where the brackets close that opened within a result: "1.59 (1.05–2.41)". */
function endWithBrackets({ items, partners }: Passage, draft: Draft, end: number): number | undefined {
  let last: number | undefined;
  for (let at = end; items[at]?.kind === 'close'; at++) {
    if ((partners[at] ?? -1) < draft.anchor) break;
    last = (items[at] as Item).span.end;
  }
  return last;
}
