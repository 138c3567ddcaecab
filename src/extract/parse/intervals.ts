import type { Draft } from './draft.ts';
import type { Item, LabelItem, NameItem, NumberItem } from './item.ts';
import { type Pair, pairAt } from './pair.ts';
import { isUnitWord } from './unit.ts';
import { lookBack, type Passage } from './passage.ts';

/**
 * Finds every interval of a passage with the estimate it belongs to.
 *
 * An interval is announced by a label, or it is a pair right behind an estimate
 * whose measure is named, or one more of a list that has begun:
 *
 * ```
 * 0.71, 95% CI 0.64-0.79     RR 2.95 (1.13-7.68)     … and 1.4 (1.1 to 1.8)
 * ^^^^  ^^^^^^ ^^^^^^^^^     ^^ ^^^^  ^^^^^^^^^          ^^^  ^^^^^^^^^^
 * ```
 */
export function findIntervals(passage: Passage): readonly Draft[] {
  const drafts: Draft[] = [];
  let free = 0;
  let announced: number | undefined;
  for (let at = 0; at < passage.items.length; at++) {
    const kind = passage.items[at]?.kind;
    if (kind === 'label') announced = at;
    if (at < free || kind !== 'number') continue;
    const draft = readInterval(passage, at, free, announced ?? drafts.at(-1)?.anchor);
    if (draft === undefined) continue;
    drafts.push(draft);
    free = draft.end;
  }
  return drafts;
}

function readInterval(
  passage: Passage,
  at: number,
  free: number,
  announced: number | undefined,
): Draft | undefined {
  const { items } = passage;
  const label = labelBefore(items, at, free);
  if (label !== undefined) {
    const behind = estimateBehindLabel(passage, at, label);
    if (behind !== undefined) return behind;
    const pair = pairAt(items, at);
    return pair === undefined ? undefined : labelled(passage, pair, label, free);
  }
  return unlabelled(passage, at, announced);
}

interface LabelPlace {
  readonly index: number;
  readonly label: LabelItem;
}

const FILLERS = new Set(['of', 'from', 'between', 'was', 'were', 'is', 'are', 'ranging', 'ranged',
  'range', 'for', 'the', 'being', 'values', 'lies', 'at', 'or', 'ratio', 'limits', 'as', 'with']);

// 95% CI: [0.77, 1.55]   95%CI of HR = 1.2-34.2   CI between 1.633 and 72.625
//       ^^^                    ^^^^^^^               ^^^^^^^
function labelBefore(items: readonly Item[], at: number, free: number): LabelPlace | undefined {
  for (let index = at - 1; index >= Math.max(free, at - 8); index--) {
    const item = items[index] as Item;
    if (item.kind === 'label') return { index, label: item };
    const passes = item.kind === 'open' || item.kind === 'colon' || item.kind === 'comma'
      || item.kind === 'relation' || item.kind === 'name' || item.kind === 'semicolon'
      || item.kind === 'dash' || item.kind === 'other' || item.kind === 'raised'
      || (item.kind === 'close' && index === at - 1)
      || (item.kind === 'word' && FILLERS.has(item.word));
    if (!passes) return undefined;
  }
  return undefined;
}

/**
 * Labels first, then the numbers in the same order.
 *
 * ```
 * aHR, 95%CI: 1.13, 0.72–1.78     OR (95% CI) 2.3 (1.2–3.4)
 *             ^^^^  ^^^^^^^^^                 ^^^  ^^^^^^^
 * ```
 */
function estimateBehindLabel(
  { items }: Passage,
  at: number,
  { index, label }: LabelPlace,
): Draft | undefined {
  const pair = pairBehind(items, at);
  if (pair === undefined) return undefined;
  const own = pairAt(items, at);
  if (own?.joint === 'range') return undefined;
  const clear = pair.joint === 'range' || items[pair.start - 1]?.kind === 'open';
  if (!clear && !followsName(items, index)) return undefined;
  return draftOf(items, at, pair, label);
}

function followsName(items: readonly Item[], label: number): boolean {
  const before = items[label - 1]?.kind === 'name' ? label - 1 : label - 2;
  return items[before]?.kind === 'name';
}

/**
 * The pair that stands right behind the number at `at`: in a bracket, even over a
 * unit ("9·6 months [8·6–11·2]"), or after a comma.
 */
function pairBehind(items: readonly Item[], at: number): Pair | undefined {
  const isUnit = isUnitWord(items[at + 1]) && items[at + 2]?.kind === 'open';
  const next = items[at + (isUnit ? 2 : 1)];
  if (next?.kind === 'open') {
    const pair = pairAt(items, at + (isUnit ? 3 : 2));
    if (pair === undefined) return undefined;
    return pair.joint === 'range' || closesAt(items, pair.end) ? pair : undefined;
  }
  if (next?.kind === 'comma' || next?.kind === 'semicolon' || next?.kind === 'colon') {
    return pairAt(items, items[at + 2]?.kind === 'open' ? at + 3 : at + 2);
  }
  return undefined;
}

function closesAt(items: readonly Item[], at: number): boolean {
  const kind = items[at]?.kind;
  return kind === 'close' || kind === 'p' || kind === 'semicolon' || kind === 'comma';
}

function labelled(
  passage: Passage,
  pair: Pair,
  { index, label }: LabelPlace,
  free: number,
): Draft {
  const behind = estimateBehindInterval(passage, index, pair);
  const estimate = behind ?? estimateBefore(passage, index, free);
  const draft = draftOf(passage.items, estimate, pair, label, index);
  return behind === undefined ? draft : { ...draft, start: index, end: behind + 1 };
}

/**
 * The estimate that follows its interval in one bracket, where none stands before.
 *
 * ```
 * (P = 0.01; CI, 1.30-6.66; risk ratio, 2.94)
 *                ^^^^^^^^^              ^^^^
 * ```
 */
function estimateBehindInterval(
  { items, groups }: Passage,
  label: number,
  { end }: Pair,
): number | undefined {
  const group = groups[label] ?? -1;
  if (group < 0 || items[end]?.kind !== 'semicolon' || items[end + 1]?.kind !== 'name') return undefined;
  for (let at = group + 1; at < label; at++) {
    const kind = items[at]?.kind;
    if (kind === 'number' || kind === 'name') return undefined;
  }
  const at = items[end + 2]?.kind === 'number' ? end + 2 : end + 3;
  if (items[at]?.kind !== 'number' || pairAt(items, at) !== undefined) return undefined;
  return hasOwnInterval(items, at) ? undefined : at;
}

// (95% CI 40 to 75; RR 0.39, 95% CI 0.25 to 0.60)
//                      ^^^^
function hasOwnInterval(items: readonly Item[], at: number): boolean {
  const isAnnounced = items.slice(at + 1, at + 3).some(({ kind }) => kind === 'label');
  return isAnnounced || pairBehind(items, at) !== undefined;
}

function draftOf(
  items: readonly Item[],
  estimate: number | undefined,
  pair: Pair,
  label?: LabelItem,
  labelIndex?: number,
): Draft {
  const number = estimate === undefined ? undefined : (items[estimate] as NumberItem);
  return {
    ...(number === undefined ? {} : { estimate: number.printed }),
    limits: { lower: pair.lower, upper: pair.upper, span: pair.span },
    ...(label === undefined ? {} : { label }),
    anchor: estimate ?? pair.start,
    start: Math.min(estimate ?? pair.start, labelIndex ?? pair.start),
    end: pair.end,
  };
}

/** How far back of its label an estimate may stand, in words. */
const REACH = 16;

/**
 * The estimate that a labelled interval belongs to: the nearest number before
 * the label, over a unit, a p-value or a few words.
 *
 * ```
 * 0.93 per 10 mm Hg increase in pulse pressure, 95% CI 0.89-0.98
 * ^^^^     ^^ a unit
 * ```
 */
function estimateBefore(passage: Passage, label: number, free: number): number | undefined {
  const { items, sentences } = passage;
  let words = 0;
  let measuring: number | undefined;
  let isNamed = false;
  for (let at = label - 1; at >= free && words <= REACH; at--) {
    const item = items[at] as Item;
    const isOutside = sentences[at] !== sentences[label] || item.kind === 'stop';
    if (isOutside && words > 0) break;
    if (item.kind === 'word') words++;
    isNamed ||= item.kind === 'name';
    if (item.kind === 'close') at = Math.max(free, passage.partners[at] ?? at);
    if (item.kind !== 'number' || (item.attached && items[at - 1]?.kind !== 'name')) continue;
    if (items[at - 1]?.kind === 'slash') continue;
    if ((words === 0 && !isNamed) || !isMeasuring(items, at)) return at;
    if (words <= 3 && !isNamed) measuring ??= at;
  }
  return measuring;
}

/** Words that make the number behind them a unit, an age, a time or a size. */
const MEASURING = new Set(['per', 'each', 'every', 'by', 'at', 'aged', 'age', 'over', 'within',
  'than', 'least', 'after', 'n', 'grade', 'stage', 'phase', 'type', 'day', 'week', 'month', 'year',
  'table', 'figure', 'model', 'group', 'quartile', 'quintile', 'tertile', 'score', 'in', 'during',
  'until', 'since', 'before', 'level', 'class', 'ref', 'version', 'top', 'first', 'last', 'fig']);

/** Whether a number counts years, doses or ages, so that an estimate stands further back. */
function isMeasuring(items: readonly Item[], at: number): boolean {
  const before = items[at - 1];
  if (before?.kind === 'word' && MEASURING.has(before.word)) return true;
  if (before?.kind === 'relation' && items[at - 2]?.kind !== 'name') return true;
  return isYear(items[at] as NumberItem);
}

function isYear({ printed }: NumberItem): boolean {
  return printed.decimals === 0 && printed.value >= 1900 && printed.value < 2100;
}

// RR 2.95 (1.13-7.68)   RR=0.71, 0.48 to 1.05   1.4 (1.1–1.8), one more of a list
function unlabelled(
  passage: Passage,
  at: number,
  announced: number | undefined,
): Draft | undefined {
  const { items } = passage;
  const item = items[at] as NumberItem;
  const pair = pairBehind(items, at);
  if (pair === undefined || (item.attached && items[at - 1]?.kind !== 'name')) return undefined;
  if (!looksLikeLimits(item, pair)) return undefined;
  const bracketed = items[pair.start - 1]?.kind === 'open';
  if (bracketed && !endsBracket(items, pair.end)) return undefined;
  const isInside = item.printed.value >= pair.lower.value && item.printed.value <= pair.upper.value;
  if (!bracketed && pair.joint !== 'range' && !(isInside && isMixedList(items, at, pair))) {
    return undefined;
  }
  const isNamed = namedBefore(items, at) || (isInside && isNamedFromAfar(passage, at));
  const isListed = announced !== undefined && continuesList(passage, at, announced);
  if (!(isNamed || (isListed && (bracketed || isInside)))) return undefined;
  return draftOf(items, at, pair);
}

// OR 2.94; 1.15, 7.50   but not a list of values: RR = 0.93, 0.84, 0.98, 0.90
//        ^     ^
function isMixedList(items: readonly Item[], at: number, { end }: Pair): boolean {
  return items[at + 1]?.kind !== 'comma' && closesAt(items, end) && items[end + 1]?.kind !== 'number';
}

// the relative risk of relapse or death was 0.23 (0.07 to 0.72)
//     ^^^^^^^^^^^^^                             ^^^^  ^^^^^^^^^^^^
/** Whether the firm name of a ratio stands before in the sentence, with no number between. */
function isNamedFromAfar(passage: Passage, at: number): boolean {
  const { items, groups, partners } = passage;
  const first = Math.max(lookBack(passage, at), at - REACH);
  for (let index = at - 1; index >= first; index--) {
    const item = items[index] as Item;
    if (item.kind === 'close') index = Math.max(first, partners[index] ?? index);
    else if (item.kind === 'number' && !item.attached) return false;
    else if (item.kind === 'name' && item.naming.firm && (groups[index] ?? -1) <= (groups[at] ?? -1)) {
      return item.naming.quantity.kind === 'ratio';
    }
  }
  return false;
}

/** Limits have decimals, or share a percent sign or the estimate's lack of decimals. */
function looksLikeLimits({ printed }: NumberItem, { lower, upper }: Pair): boolean {
  if (isYearPair(lower.value, upper.value)) return false;
  const fraction = lower.decimals > 0 || upper.decimals > 0;
  return fraction || printed.percent || upper.percent || printed.decimals === 0;
}

function isYearPair(first: number, second: number): boolean {
  return first >= 1900 && first < 2100 && second >= 1900 && second < 2100;
}

// (1.13-7.68)   (9.6-33.0; HR 0.68 [0.42-1.09])   (1.13-7.68, p=0.02)
//           ^           ^                                   ^
function endsBracket(items: readonly Item[], at: number): boolean {
  const item = items[at];
  return item === undefined || closesAt(items, at) || item.kind === 'star' || item.kind === 'raised';
}

const LINKS = new Set(['of', 'was', 'were', 'is', 'are', 'be', 'to', 'being', 'estimate', 'approximately',
  'about', 'as', 'at']);

// OR 2.95   OR=2.95   odds ratio of 2.95   HR was 0.71   OR: 1.2
/** Whether the firm name of a quantity stands right before the number. */
export function namedBefore(items: readonly Item[], at: number): boolean {
  return nameRightBefore(items, at)?.naming.firm === true;
}

/** The name of a quantity right before a number; a loose one only in the same bracket. */
export function nameRightBefore(items: readonly Item[], at: number): NameItem | undefined {
  let isBracketed = false;
  for (let index = at - 1; index >= Math.max(0, at - 4); index--) {
    const item = items[index] as Item;
    if (item.kind === 'name') return item.naming.firm || !isBracketed ? item : undefined;
    isBracketed ||= item.kind === 'open';
    const passes = item.kind === 'relation' || item.kind === 'colon' || item.kind === 'comma'
      || item.kind === 'open' || item.kind === 'dash' || item.kind === 'other'
      || (item.kind === 'word' && LINKS.has(item.word));
    if (!passes) return undefined;
  }
  return undefined;
}

/** Whether intervals were announced not long before: in this sentence or the two before it. */
function continuesList({ sentences }: Passage, at: number, announced: number): boolean {
  return (sentences[at] ?? 0) - (sentences[announced] ?? 0) <= 2;
}
