import { cover, type Printed, type Span, type TestResult } from '../../model/index.ts';
import type { Item, NumberItem, PValueItem } from './item.ts';

/** A test statistic or a coefficient as it stands in the text, by item indexes. */
export interface StatisticDraft {
  readonly kind: 'test' | 'coefficient';
  readonly statistic?: TestResult['statistic'];
  readonly estimate: Printed;
  readonly degreesOfFreedom: readonly Printed[];
  readonly standardError?: Printed;
  readonly p?: PValueItem;
  readonly span: Span;
  readonly start: number;
  readonly end: number;
}

/**
 * Finds test statistics with their degrees of freedom, and coefficients with their
 * standard errors, each with the p-value behind it.
 *
 * ```
 * χ²(2) = 5.6, p = 0.06     t(45) = 2.1     F(2, 57) = 3.2     β = 0.46 (SE 0.21), p = 0.03
 * ```
 */
export function findStatistics(items: readonly Item[]): readonly StatisticDraft[] {
  const drafts: StatisticDraft[] = [];
  for (let at = 0; at < items.length; at++) {
    const draft = testAt(items, at) ?? coefficientAt(items, at);
    if (draft === undefined) continue;
    drafts.push(draft);
    at = draft.end - 1;
  }
  return drafts;
}

interface Symbol {
  readonly statistic: TestResult['statistic'];
  readonly end: number;
}

const GREEK_CHI = new Set(['χ', 'chi', 'x']);

// χ² χ2 chi-square chi-squared t F z Q
function symbolAt(items: readonly Item[], at: number): Symbol | undefined {
  const item = items[at];
  if (item?.kind !== 'word') return undefined;
  if (item.word === 'z' || item.word === 't' || item.word === 'f' || item.word === 'q') {
    const statistic = { z: 'z', t: 't', f: 'F', q: 'Q' } as const;
    return { statistic: statistic[item.word], end: at + 1 };
  }
  if (!GREEK_CHI.has(item.word)) return undefined;
  const next = items[at + 1]?.kind === 'dash' ? at + 2 : at + 1;
  const power = items[next];
  const isSquare = (power?.kind === 'raised' && power.word === '²')
    || (power?.kind === 'number' && power.printed.plain === '2' && !power.spaced)
    || (power?.kind === 'word' && (power.word === 'square' || power.word === 'squared'));
  return isSquare ? { statistic: 'chi-square', end: next + 1 } : undefined;
}

function testAt(items: readonly Item[], at: number): StatisticDraft | undefined {
  const symbol = symbolAt(items, at);
  if (symbol === undefined) return undefined;
  const before = degreesInBracket(items, symbol.end);
  const relation = items[before.end];
  if (relation?.kind !== 'relation' || relation.relation !== '=') return undefined;
  const value = items[before.end + 1];
  if (value?.kind !== 'number' || value.printed.percent) return undefined;
  const behind = degreesBehind(items, before.end + 2);
  const degreesOfFreedom = before.values.length > 0 ? before.values : behind.values;
  const p = pBehind(items, behind.end);
  if (degreesOfFreedom.length === 0 && p === undefined) return undefined;
  return {
    kind: 'test',
    statistic: symbol.statistic,
    estimate: value.printed,
    degreesOfFreedom,
    ...draftEnd(items, at, behind.end, p),
  };
}

interface Degrees {
  readonly values: readonly Printed[];
  readonly end: number;
}

// χ²(2) = …   F(2, 57) = …   χ²(2, N = 90) = …   t[45] = …
function degreesInBracket(items: readonly Item[], at: number): Degrees {
  const none = { values: [], end: at };
  if (items[at]?.kind !== 'open') return none;
  const values: Printed[] = [];
  for (let next = at + 1; next < at + 9; next++) {
    const item = items[next];
    if (item?.kind === 'close') return { values: values.slice(0, 2), end: next + 1 };
    const before = items[next - 1];
    const isSize = before?.kind === 'relation' && isWord(items[next - 2], 'n');
    if (item?.kind === 'number' && !isSize) values.push(item.printed);
  }
  return none;
}

// χ² = 5.6, df = 2   χ² = 5.6 (2 df)   Q = 15.2; df 12
function degreesBehind(items: readonly Item[], at: number): Degrees {
  const none = { values: [], end: at };
  const start = isSeparator(items[at]) ? at + 1 : at;
  for (const next of [start, start + 1, start + 2]) {
    const number = items[next];
    if (number?.kind !== 'number') continue;
    const isNamed = isWord(items[next - 1], 'df') || isWord(items[next - 2], 'df');
    if (isNamed || isWord(items[next + 1], 'df')) {
      const end = isNamed ? next + 1 : next + 2;
      return { values: [number.printed], end: items[end]?.kind === 'close' ? end + 1 : end };
    }
  }
  return none;
}

function isSeparator(item: Item | undefined): boolean {
  return item?.kind === 'comma' || item?.kind === 'semicolon' || item?.kind === 'open';
}

function isWord(item: Item | undefined, word: string): boolean {
  return item?.kind === 'word' && item.word === word;
}

/** The p-value right behind, over a comma, a semicolon or a bracket. */
function pBehind(items: readonly Item[], at: number): PValueItem | undefined {
  for (let next = at; next < at + 3; next++) {
    const item = items[next];
    if (item?.kind === 'p') return item;
    if (!isSeparator(item) && item?.kind !== 'close') return undefined;
  }
  return undefined;
}

// β = 0.46 (SE 0.21)   coefficient −0.77, standard error = 0.40
function coefficientAt(items: readonly Item[], at: number): StatisticDraft | undefined {
  const name = items[at];
  if (name?.kind !== 'name' || name.naming.quantity.kind !== 'coefficient') return undefined;
  const link = items[at + 1];
  const isLink = link?.kind === 'relation' || link?.kind === 'comma' || link?.kind === 'colon'
    || (link?.kind === 'word' && (link.word === 'of' || link.word === 'was'));
  const place = isLink ? at + 2 : at + 1;
  const value = items[place];
  if (value?.kind !== 'number' || value.attached) return undefined;
  const error = standardErrorBehind(items, place + 1);
  const p = pBehind(items, error?.end ?? place + 1);
  if (error === undefined && p === undefined) return undefined;
  return {
    kind: 'coefficient',
    estimate: value.printed,
    degreesOfFreedom: [],
    ...(error === undefined ? {} : { standardError: error.printed }),
    ...draftEnd(items, at, error?.end ?? place + 1, p),
  };
}

function standardErrorBehind(
  items: readonly Item[],
  at: number,
): { readonly printed: Printed; readonly end: number } | undefined {
  let next = isSeparator(items[at]) ? at + 1 : at;
  if (isWord(items[next], 'se')) next++;
  else if (isWord(items[next], 'standard') && isWord(items[next + 1], 'error')) next += 2;
  else return undefined;
  if (isSeparator(items[next]) || items[next]?.kind === 'relation') next++;
  const number = items[next] as NumberItem | undefined;
  if (number?.kind !== 'number') return undefined;
  const end = items[next + 1]?.kind === 'close' ? next + 2 : next + 1;
  return { printed: number.printed, end };
}

function draftEnd(items: readonly Item[], start: number, last: number, p: PValueItem | undefined) {
  const end = p === undefined ? last : items.indexOf(p, last) + 1;
  const span = cover((items[start] as Item).span, (items[end - 1] as Item).span);
  return { ...(p === undefined ? {} : { p }), span, start, end };
}
