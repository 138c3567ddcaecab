import type { Draft } from '../parse/draft.ts';
import type { Item } from '../parse/item.ts';
import { enclosing, type Passage } from '../parse/passage.ts';

/**
 * Gives each draft of a passage its p-value, where one is printed for it.
 *
 * ```
 * 1.58; 95% CI: 1.24-2.02, P<0.001     (P = .02; HR 0.33 [95% CI 0.18-0.61])
 * ^^^^                     ^^^^^^^      ^^^^^^^     ^^^^
 * ```
 *
 * A p-value belongs to the result before it in the sentence, unless it stands in
 * a bracket with a result behind it; "for both" gives it to all before it. The
 * answer holds the index of each draft's p-value among the items.
 */
export function assignPValues(
  passage: Passage,
  drafts: readonly Draft[],
): ReadonlyMap<Draft, number> {
  const assigned = new Map<Draft, number>();
  const { items } = passage;
  let next = 0;
  for (let at = 0; at < items.length; at++) {
    const item = items[at] as Item;
    while (next < drafts.length && (drafts[next] as Draft).anchor < at) next++;
    if (item.kind !== 'p') continue;
    const [before, behind] = [drafts[next - 1], drafts[next]];
    const owner = ownerOf(passage, at, before, behind, assigned);
    if (owner !== undefined) assigned.set(owner, at);
    if (item.shared) share(passage, at, drafts, next, assigned);
  }
  return assigned;
}

function ownerOf(
  passage: Passage,
  at: number,
  before: Draft | undefined,
  behind: Draft | undefined,
  assigned: ReadonlyMap<Draft, number>,
): Draft | undefined {
  const isFree = (draft: Draft | undefined): draft is Draft => draft !== undefined
    && !assigned.has(draft) && passage.sentences[draft.anchor] === passage.sentences[at];
  const inside = isFree(before) && isWithin(before, at);
  if (inside) return before;
  if (isFree(behind) && sharesBracket(passage, at, behind)) {
    const isOwn = isFree(before) && enclosing(passage, before.end - 1).includes(groupOf(passage, at));
    if (!isOwn) return behind;
  }
  return isFree(before) && reaches(passage, before, at) ? before : undefined;
}

function isWithin({ start, end }: Draft, at: number): boolean {
  return at >= start && at < end;
}

function groupOf({ groups }: Passage, at: number): number {
  return groups[at] ?? -1;
}

/** Whether a p-value and the result behind it stand in one bracket. */
function sharesBracket(passage: Passage, at: number, behind: Draft): boolean {
  const group = groupOf(passage, at);
  return group >= 0 && enclosing(passage, behind.anchor).includes(group);
}

/** Whether nothing between a result and a p-value behind it could own the p-value instead. */
function reaches(passage: Passage, draft: Draft, at: number): boolean {
  const { items, groups } = passage;
  const own = new Set(enclosing(passage, draft.anchor));
  if (own.has(groupOf(passage, at)) && groupOf(passage, at) >= 0) return true;
  for (let index = draft.end; index < at; index++) {
    const item = items[index] as Item;
    if (item.kind === 'p') return false;
    if (item.kind === 'number' && !item.attached && (groups[index] ?? -1) < 0) return false;
    if (item.kind === 'name' && item.naming.quantity.kind !== 'ratio' && item.naming.firm) return false;
  }
  return true;
}

function share(
  passage: Passage,
  at: number,
  drafts: readonly Draft[],
  next: number,
  assigned: Map<Draft, number>,
): void {
  for (let index = next - 1; index >= 0; index--) {
    const draft = drafts[index] as Draft;
    if (passage.sentences[draft.anchor] !== passage.sentences[at]) return;
    if (!assigned.has(draft)) assigned.set(draft, at);
  }
}
