import type { Draft } from './draft.ts';
import { namedBefore } from './intervals.ts';
import type { Item, NameItem, NumberItem } from './item.ts';
import { pairAt } from './pair.ts';
import type { Passage } from './passage.ts';

/**
 * Ratios printed without an interval: a number right behind the name of a ratio,
 * and those listed after it.
 *
 * ```
 * RR 2.79     the odds ratio for relapse was 2.8     HRs of 1.2, 1.4 and 1.9
 *    ^^^^                                    ^^^            ^^^  ^^^     ^^^
 * ```
 */
export function findBareRatios(passage: Passage, taken: readonly Draft[]): readonly Draft[] {
  const drafts: Draft[] = [];
  const isTaken = takenItems(passage.items.length, taken);
  for (let at = 0; at < passage.items.length; at++) {
    if (isTaken[at] || !isRatioNumber(passage.items, at)) continue;
    const listed = drafts.at(-1) !== undefined && listsOn(passage.items, at, drafts.at(-1) as Draft);
    if (!listed && !isNamedRatio(passage, at)) continue;
    const { printed } = passage.items[at] as NumberItem;
    drafts.push({ estimate: printed, anchor: at, start: at, end: at + 1 });
  }
  return drafts;
}

function takenItems(length: number, drafts: readonly Draft[]): Uint8Array {
  const taken = new Uint8Array(length);
  for (const { anchor, start, end } of drafts) {
    taken.fill(1, start, end);
    taken[anchor] = 1;
  }
  return taken;
}

function isRatioNumber(items: readonly Item[], at: number): boolean {
  const item = items[at];
  if (item?.kind !== 'number' || item.printed.percent) return false;
  if (item.attached && items[at - 1]?.kind !== 'name') return false;
  const { value, decimals } = item.printed;
  if (value < 0 || (decimals === 0 && !isLinkedWhole(items, at))) return false;
  if (decimals === 0 && isCutShort(items, at)) return false;
  if (isSpread(items, at + 1) || isBound(items[at - 1])) return false;
  return pairAt(items, at)?.joint !== 'range' && pairAt(items, at - 2)?.joint !== 'range';
}

// an odds ratio of 3   OR = 3   but not: OR 3 (an enumeration, a reference)
function isLinkedWhole(items: readonly Item[], at: number): boolean {
  const [link, number] = [items[at - 1], items[at] as NumberItem];
  const isLink = link?.kind === 'relation' || (link?.kind === 'word' && VERBS.has(link.word));
  return isLink && number.printed.value < 100;
}

// 16.0 ± 6.6   16.0 +/- 6.6
//      ^            ^^^
function isSpread(items: readonly Item[], at: number): boolean {
  const item = items[at];
  return item?.kind === 'plus-minus' || (item?.kind === 'other' && item.word === '+');
}

// 0Æ72: a decimal point that a font lost leaves a whole number, which is none
function isCutShort(items: readonly Item[], at: number): boolean {
  const next = items[at + 1];
  return next?.kind === 'word' && !next.spaced;
}

/** "HR < 1.176" states a margin, not a result. */
function isBound(item: Item | undefined): boolean {
  return item?.kind === 'relation' && item.relation !== '=';
}

function isNamedRatio(passage: Passage, at: number): boolean {
  const name = namedBefore(passage.items, at) ? nameBehind(passage.items, at) : nameOver(passage, at);
  return name?.naming.firm === true && name.naming.quantity.kind === 'ratio';
}

function nameBehind(items: readonly Item[], at: number): NameItem | undefined {
  for (let index = at - 1; index >= Math.max(0, at - 4); index--) {
    const item = items[index] as Item;
    if (item.kind === 'name') return item;
  }
  return undefined;
}

const VERBS = new Set(['was', 'were', 'is', 'of', 'being', 'to']);

// the hazard ratio for death among smokers was 1.64
//     ^^^^^^^^^^^^                         ^^^ ^^^^
function nameOver({ items, sentences }: Passage, at: number): NameItem | undefined {
  const link = items[at - 1];
  const isLink = link?.kind === 'relation' || (link?.kind === 'word' && VERBS.has(link.word));
  if (!isLink) return undefined;
  for (let index = at - 2; index >= Math.max(0, at - 16); index--) {
    const item = items[index] as Item;
    if (sentences[index] !== sentences[at]) return undefined;
    if (item.kind === 'name') return item;
    if (item.kind === 'number' || item.kind === 'p' || item.kind === 'label') return undefined;
  }
  return undefined;
}

/** Whether only a comma or "and" stands between a number and the one before in the list. */
function listsOn(items: readonly Item[], at: number, previous: Draft): boolean {
  if (at - previous.end > 2 || at === previous.end) return false;
  for (let index = previous.end; index < at; index++) {
    const item = items[index] as Item;
    const joins = item.kind === 'comma' || (item.kind === 'word' && item.word === 'and');
    if (!joins) return false;
  }
  return true;
}
