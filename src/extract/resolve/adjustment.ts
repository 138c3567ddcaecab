import { findPhrase, type Worded } from '../phrases.ts';
import type { Draft } from '../parse/draft.ts';
import type { Item, NameItem } from '../parse/item.ts';
import { lookBack, type Passage } from '../parse/passage.ts';
import { ADJUSTMENT } from '../vocabulary.ts';

/**
 * Whether the words call a result adjusted or crude: its own abbreviation first
 * ("aOR"), then the nearest word before it in the sentence, then one behind it.
 */
export function adjustmentOf(
  passage: Passage,
  draft: Draft,
  name: NameItem | undefined,
): boolean | undefined {
  if (name?.adjusted !== undefined) return name.adjusted;
  const first = lookBack(passage, draft.anchor);
  for (let at = draft.anchor - 1; at >= first; at--) {
    const said = adjustmentAt(passage, at);
    if (said !== undefined) return said;
  }
  return undefined;
}

function adjustmentAt({ items }: Passage, at: number): boolean | undefined {
  const item = items[at] as Item;
  if (item.kind === 'name') return item.adjusted;
  if (item.kind !== 'word') return undefined;
  return findPhrase(ADJUSTMENT, items as readonly Worded[], at)?.meaning;
}
