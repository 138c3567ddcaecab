import type { Printed } from '../../model/index.ts';
import type { Draft } from '../parse/draft.ts';
import { nameRightBefore } from '../parse/intervals.ts';
import type { Item, NameItem } from '../parse/item.ts';
import { enclosing, lookBack, type Passage } from '../parse/passage.ts';
import { isUnitWord } from '../parse/unit.ts';
import type { Naming } from '../vocabulary.ts';

/** What a draft is a value of, and how that was found out. */
export interface Resolved {
  readonly naming: Naming;
  readonly name?: NameItem;
  /** Whether the name stands in the result's own clause, or was inherited. */
  readonly inherited: boolean;
}

/** What earlier results of the same passage were values of, the nearest last. */
export interface Before {
  readonly draft: Draft;
  readonly resolved: Resolved;
}

/**
 * What the numbers of a draft are values of.
 *
 * The nearest name decides, looked for in the draft's own bracket first, then in
 * those around it, then among the results listed before it; names inside other
 * brackets come last. A percent sign or a unit behind the estimate outweighs a
 * name further off.
 */
export function resolveNaming(
  passage: Passage,
  draft: Draft,
  before: Before | undefined,
  common: Naming | undefined,
): Resolved | undefined {
  const attached = attachedName(passage, draft);
  if (attached !== undefined) return own(attached, before, common);
  const measured = measuredNaming(passage, draft);
  if (measured !== undefined) return { naming: measured, inherited: false };
  const near = nearestName(passage, draft);
  if (near?.naming.firm && fitsNumbers(near.naming, draft)) return own(near);
  if (near !== undefined && isLinked(passage, draft) && fitsNumbers(near.naming, draft)) {
    return own(near, before, common);
  }
  if (before !== undefined && continues(passage, before, draft)) {
    return { ...before.resolved, inherited: true };
  }
  const named = nameInBrackets(passage, draft);
  if (named !== undefined && fitsNumbers(named.naming, draft)) return own(named);
  const inherited = common === undefined || !fitsNumbers(common, draft)
    ? undefined
    : { naming: common, inherited: true };
  return isRatioLike(passage, draft) ? (inherited ?? SOME_RATIO) : near === undefined ? inherited : own(near);
}

/** A name of its own; a bare "ratio" means the ratio that was spoken of before. */
function own(name: NameItem, before?: Before, common?: Naming): Resolved {
  const { quantity, firm } = name.naming;
  if (quantity.kind !== 'ratio' || firm || quantity.measure !== 'ratio') {
    return { naming: name.naming, name, inherited: false };
  }
  const earlier = before?.resolved.naming.quantity.kind === 'ratio' ? before.resolved.naming : common;
  return { naming: earlier ?? name.naming, name, inherited: earlier !== undefined };
}

/** A ratio of which the text does not say which it is. */
export const A_RATIO: Naming = { quantity: { kind: 'ratio', measure: 'ratio' }, firm: true };

const SOME_RATIO: Resolved = { naming: A_RATIO, inherited: true };

/** Whether the numbers can be values of it: no ratio is negative, no share is above 1. */
export function fitsNumbers(
  { quantity, firm }: Naming,
  { estimate, limits }: Pick<Draft, 'estimate' | 'limits'>,
): boolean {
  if (quantity.kind === 'proportion' && !firm) {
    return estimate?.percent === true || (limits?.upper.value ?? Infinity) <= 1;
  }
  if (quantity.kind !== 'ratio') return true;
  return !(isNegative(estimate) || isNegative(limits?.lower));
}

/** "−0.0" counts: it stands for a number below zero. */
function isNegative(printed: Printed | undefined): boolean {
  return printed !== undefined && (printed.value < 0 || Object.is(printed.value, -0));
}

// the differences in density between the groups were 1.33 (95% CI 0.37-2.30)
//                                               ^^^^ ^^^^
function isLinked({ items }: Passage, { anchor }: Draft): boolean {
  const link = items[anchor - 1];
  return link?.kind === 'relation' || (link?.kind === 'word' && LINKING.has(link.word));
}

const LINKING = new Set(['was', 'were', 'is', 'are', 'of', 'by']);

/** No estimate at all, or one followed by "times" or "fold". */
function isRatioLike({ items }: Passage, draft: Draft): boolean {
  if (draft.estimate === undefined) return fitsNumbers(A_RATIO, draft);
  return [1, 2].flatMap((step) => [draft.anchor + step, draft.end + step - 1]).some((at) => {
    const item = items[at];
    return item?.kind === 'word' && (item.word === 'times' || item.word === 'fold');
  });
}

// HR 0.72   odds ratio was 1.6   1.27 (SMR
function attachedName({ items }: Passage, { anchor, end }: Draft): NameItem | undefined {
  const name = nameRightBefore(items, anchor);
  if (name !== undefined) return name;
  const behind = items[end];
  return behind?.kind === 'open' && items[end + 1]?.kind === 'name' && items[end + 2]?.kind === 'close'
    ? (items[end + 1] as NameItem)
    : undefined;
}

const PERCENTAGE: Naming = { quantity: { kind: 'proportion' }, firm: true };
/** An estimate with an interval of which no more is known than that it is no ratio. */
export const AN_AMOUNT: Naming = { quantity: { kind: 'other', measure: 'other' }, firm: true };

/** What a percent sign or a unit right behind the estimate tells. */
function measuredNaming(passage: Passage, draft: Draft): Naming | undefined {
  const { items } = passage;
  const { estimate, limits, anchor } = draft;
  const percent = estimate?.percent === true || limits?.upper.percent === true;
  const isUnit = estimate !== undefined && hasUnit(items, draft);
  const name = nearestName(passage, draft);
  const isNamedRatio = name?.naming.firm === true && name.naming.quantity.kind === 'ratio';
  const isBare = !isNamedRatio && (isWhole(draft) || isChange(items, anchor));
  if (!percent && !isUnit && !isBare && !isCount(items, draft)) return undefined;
  const isOther = name !== undefined && name.naming.quantity.kind !== 'ratio';
  if (isOther && fitsNumbers(name.naming, draft)) return name.naming;
  return percent ? PERCENTAGE : AN_AMOUNT;
}

// 14.6 months (95% CI   0.3/100 pyrs (95% CI   33.2 [29.5-38.0] months   33.2 [95% CI 29.5-38.0] vs 29.5 [22.4-33.1] months
//      ^^^^^^           ^^^^^^^^                      ^^^^^^                                               ^^^^^^
function hasUnit(items: readonly Item[], { anchor, end, label }: Draft): boolean {
  if (isUnitWord(items[anchor + 1]) || isUnitWord(afterBracket(items, end))) return true;
  if (items[anchor + 1]?.kind === 'slash') return true;
  if (label !== undefined && isLoneWord(items, anchor + 1)) return true;
  const versus = items[end]?.kind === 'close' ? items[end + 1] : undefined;
  if (versus?.kind !== 'word' || (versus.word !== 'vs' && versus.word !== 'versus')) return false;
  const next = items.slice(end + 2, end + 14);
  return isUnitWord(next[next.findIndex(({ kind }) => kind === 'close') + 1]);
}

function afterBracket(items: readonly Item[], at: number): Item | undefined {
  return items[at]?.kind === 'close' ? items[at + 1] : items[at];
}

const NOT_A_UNIT = new Set(['times', 'fold', 'and', 'with', 'respectively', 'overall', 'for', 'in', 'to']);

// 1.19 tablets; 95% CI 1.06 to 1.32
//      ^^^^^^^
function isLoneWord(items: readonly Item[], at: number): boolean {
  const [word, separator, label] = [items[at], items[at + 1], items[at + 2]];
  const isSeparated = separator?.kind === 'semicolon' || separator?.kind === 'comma';
  return word?.kind === 'word' && isSeparated && label?.kind === 'label' && !NOT_A_UNIT.has(word.word);
}

const COUNTING = new Set(['more', 'fewer', 'less', 'additional', 'extra']);

const NUMBER_WORDS = new Set(('one two three four five six seven eight nine ten eleven twelve '
  + 'thirteen fourteen fifteen sixteen seventeen eighteen nineteen twenty thirty forty fifty').split(' '));

// 20 more deaths (95% CI 0-30)   twelve (95% CI 8, 32)
function isCount(items: readonly Item[], { estimate, anchor, start }: Draft): boolean {
  const next = items[anchor + 1];
  if (next?.kind === 'word' && COUNTING.has(next.word)) return true;
  if (estimate !== undefined) return false;
  const before = items[start - 1]?.kind === 'open' ? items[start - 2] : items[start - 1];
  return before?.kind === 'word' && NUMBER_WORDS.has(before.word);
}

/** Estimate and limits without a decimal between them: "21 (12-79)". */
function isWhole({ estimate, limits }: Draft): boolean {
  return [estimate, limits?.lower, limits?.upper].every((number) => number?.decimals === 0);
}

// rose from 0.40 (0.34-0.47) to 0.74 (0.69-0.80)
//      ^^^^                  ^^
function isChange(items: readonly Item[], anchor: number): boolean {
  const before = items[anchor - 1];
  if (before?.kind !== 'word' || (before.word !== 'from' && before.word !== 'to')) return false;
  return before.word === 'from' || items[anchor - 2]?.kind === 'close';
}

/**
 * The nearest name before the draft in its own sentence, outside brackets that
 * close before it. A firm name outweighs a nearer loose one.
 */
function nearestName(passage: Passage, { anchor }: Draft): NameItem | undefined {
  const { items, groups } = passage;
  const first = lookBack(passage, anchor);
  const around = new Set(enclosing(passage, anchor));
  let loose: NameItem | undefined;
  for (let at = anchor - 1; at >= first; at--) {
    const item = items[at] as Item;
    if (item.kind !== 'name' || !around.has(groups[at] ?? -1)) continue;
    if (item.naming.firm) return item;
    loose ??= item;
  }
  return loose;
}

/** The nearest firm name in this sentence, in whatever bracket it stands. */
function nameInBrackets(passage: Passage, { anchor }: Draft): NameItem | undefined {
  const first = lookBack(passage, anchor);
  for (let at = anchor - 1; at >= first; at--) {
    const item = passage.items[at] as Item;
    if (item.kind === 'name' && item.naming.firm) return item;
  }
  return undefined;
}

/** Whether a draft is one more of the list that an earlier one began. */
function continues({ sentences }: Passage, { draft, resolved }: Before, next: Draft): boolean {
  const gap = (sentences[next.anchor] ?? 0) - (sentences[draft.anchor] ?? 0);
  const alike = draft.estimate?.percent === next.estimate?.percent;
  return alike && gap <= 2 && fitsNumbers(resolved.naming, next);
}
