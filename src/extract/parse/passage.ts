import { indexAt, type Span } from '../../model/index.ts';
import type { Item } from './item.ts';

/**
 * A block as the parser sees it: its items, which bracket each stands in, and
 * where its sentences are.
 */
export interface Passage {
  readonly items: readonly Item[];
  /** For each item the index of the innermost bracket that is open there, or −1. */
  readonly groups: readonly number[];
  /** For each closing bracket the index of the one it closes; −1 for all other items. */
  readonly partners: readonly number[];
  /** For each item the index of its sentence. */
  readonly sentences: readonly number[];
  readonly sentenceSpans: readonly Span[];
}

/** Lays brackets and sentences over the items of a block. */
export function passageOf(items: readonly Item[], sentenceSpans: readonly Span[]): Passage {
  const placed = sentenceSpans.map((span) => ({ span }));
  return {
    items,
    ...bracketsOf(items),
    sentences: items.map(({ span }) => indexAt(placed, span.start)),
    sentenceSpans,
  };
}

/**
 * Which bracket each item stands in. Any closing bracket closes the innermost
 * open one, since print mixes their shapes: "[OR=2.3 [95% CI (1.76, 3.00), P<0.01]".
 */
function bracketsOf(items: readonly Item[]): Pick<Passage, 'groups' | 'partners'> {
  const open: number[] = [];
  const partners: number[] = [];
  const groups = items.map(({ kind }, index) => {
    partners.push(kind === 'close' ? (open.pop() ?? -1) : -1);
    const group = open.at(-1) ?? -1;
    if (kind === 'open') open.push(index);
    return group;
  });
  return { groups, partners };
}

/** Brackets are followed outwards so far and no further. */
const DEEPEST = 12;

/** The brackets around an item, from the innermost outwards, ending with −1 for none. */
export function enclosing({ groups }: Passage, index: number): readonly number[] {
  const chain: number[] = [];
  for (let group = groups[index] ?? -1; group >= 0; group = groups[group] ?? -1) {
    chain.push(group);
    if (chain.length === DEEPEST) break;
  }
  return [...chain, -1];
}

/** A sentence is looked back over so many items and no further. */
const LONGEST_LOOK = 400;

/** Where a look back from an item ends: at the start of its sentence, or before that. */
export function lookBack({ sentences }: Passage, index: number): number {
  const sentence = sentences[index];
  let at = index;
  while (at > 0 && index - at < LONGEST_LOOK && sentences[at - 1] === sentence) at--;
  return at;
}
