import { cover, type Printed, type Span } from '../../model/index.ts';
import type { Item, NumberItem, PValueItem } from '../parse/item.ts';
import { type Pair, pairAt } from '../parse/pair.ts';

/** One value of a cell: an estimate, an interval, or both, with what stands by it. */
export interface CellValue {
  readonly estimate?: Printed;
  readonly limits?: { readonly lower: Printed; readonly upper: Printed; readonly span: Span };
  readonly p?: PValueItem;
  readonly span: Span;
}

/**
 * The values of a cell, in order.
 *
 * ```
 * 1.59 (1.05–2.41)     0·76 (0·27–2·13) p = 0·60     0.95–1.00     2.26     0.7 (0.5–1.0); 24 (12–251)
 * ```
 */
export function valuesIn(items: readonly Item[]): readonly CellValue[] {
  const values: CellValue[] = [];
  for (let at = 0; at < items.length; at++) {
    const item = items[at] as Item;
    if (item.kind === 'p') attach(values, item);
    if (item.kind !== 'number' || isBound(items[at - 1])) continue;
    const found = valueAt(items, at, item);
    values.push(found.value);
    at = found.end - 1;
  }
  return values;
}

/** "<0.001" bounds a p-value; it is no estimate. */
function isBound(item: Item | undefined): boolean {
  return item?.kind === 'relation' && item.relation !== '=';
}

function attach(values: CellValue[], p: PValueItem): void {
  const last = values.at(-1);
  if (last !== undefined && last.p === undefined) values[values.length - 1] = { ...last, p };
}

interface Found {
  readonly value: CellValue;
  readonly end: number;
}

function valueAt(items: readonly Item[], at: number, number: NumberItem): Found {
  const behind = pairBehind(items, at);
  if (behind !== undefined) {
    const { lower, upper, span } = behind;
    return {
      value: {
        estimate: number.printed,
        limits: { lower, upper, span },
        span: cover(number.printed.span, span),
      },
      end: behind.end,
    };
  }
  const pair = pairAt(items, at);
  if (pair !== undefined && isInterval(items, pair)) {
    const { lower, upper, span } = pair;
    return { value: { limits: { lower, upper, span }, span }, end: pair.end };
  }
  return { value: { estimate: number.printed, span: number.printed.span }, end: at + 1 };
}

/** A pair in a bracket, behind a comma, or a range that simply follows. */
function pairBehind(items: readonly Item[], at: number): Pair | undefined {
  let next = at + 1;
  while (isMark(items[next])) next++;
  const separator = items[next]?.kind;
  if (separator === 'open') {
    while (items[next]?.kind === 'open') next++;
    if (items[next]?.kind === 'label') next++;
    while (items[next]?.kind === 'comma' || items[next]?.kind === 'colon') next++;
    const pair = pairAt(items, next);
    return pair !== undefined && (pair.joint === 'range' || closes(items, pair.end)) ? pair : undefined;
  }
  if (separator === 'comma' || separator === 'semicolon') {
    const pair = pairAt(items, next + 1);
    return pair?.joint === 'range' ? pair : undefined;
  }
  const pair = pairAt(items, next);
  return next > at && pair?.joint === 'range' && items[next]?.kind === 'number' ? pair : undefined;
}

// 0.72* (0.58–0.89)   0.72ᵃ (0.58–0.89)
//     ^                   ^
function isMark(item: Item | undefined): boolean {
  const isLetter = item?.kind === 'word' && item.word.length === 1 && !item.spaced;
  return isLetter || item?.kind === 'star' || item?.kind === 'raised';
}

function closes(items: readonly Item[], at: number): boolean {
  const kind = items[at]?.kind;
  return kind === undefined || kind === 'close' || kind === 'p' || kind === 'semicolon' || isMark(items[at]);
}

// 0.95–1.00   (1.56,2.25)   1.02; 3.08
function isInterval(items: readonly Item[], { joint, start, end, lower, upper }: Pair): boolean {
  if (joint === 'range') return true;
  const before = items[start - 1];
  // "87,6" alone in a cell is a decimal comma in a table that has points elsewhere.
  const isFraction = lower.decimals > 0 || upper.decimals > 0;
  return (before?.kind === 'open' || (before === undefined && isFraction)) && closes(items, end);
}
