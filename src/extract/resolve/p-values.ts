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
  const leading = new Set<number>();
  const { items } = passage;
  let next = 0;
  for (let at = 0; at < items.length; at++) {
    const item = items[at] as Item;
    while (next < drafts.length && (drafts[next] as Draft).anchor < at) next++;
    if (item.kind !== 'p') continue;
    const [before, behind] = [drafts[next - 1], drafts[next]];
    const owner = ownerOf(passage, at, before, behind, assigned);
    if (owner !== undefined) assigned.set(owner, at);
    if (owner !== undefined && owner === behind) leading.add(at);
    if (item.shared) share(passage, at, drafts, next, assigned);
  }
  spread(passage, drafts, assigned, leading);
  return assigned;
}

/** A p-value that leads a list holds for all of it, where no other is printed there. */
function spread(
  passage: Passage,
  drafts: readonly Draft[],
  assigned: Map<Draft, number>,
  leading: ReadonlySet<number>,
): void {
  const { sentences, groups } = passage;
  for (let index = 1; index < drafts.length; index++) {
    const [before, draft] = [drafts[index - 1] as Draft, drafts[index] as Draft];
    const at = assigned.get(before);
    if (at === undefined || !leading.has(at) || assigned.has(draft)) continue;
    const isAlone = (groups[at] ?? -1) !== (groups[before.anchor] ?? -1);
    if (isAlone && sentences[draft.anchor] === sentences[at]) assigned.set(draft, at);
  }
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
  if (isFree(before) && reaches(passage, before, at)) return before;
  return isFree(behind) && leadsTo(passage, at, behind) ? behind : undefined;
}

const TURNS = new Set(['and', 'but', 'while', 'whereas', 'although', 'or', 'nor']);

/** A p-value in a bracket of its own reaches over so many items to a result behind it. */
const LEAD = 18;

/**
 * Whether a p-value in a bracket of its own speaks of the result behind it: nothing
 * turns the sentence between them, and the result has no p-value of its own.
 *
 * ```
 * was lower (p<0.05), giving a prevalence ratio of 0.68 (95% CI 0.57-0.80)
 *            ^^^^^^                                ^^^^
 * ```
 */
function leadsTo({ items }: Passage, at: number, behind: Draft): boolean {
  if (behind.anchor - at > LEAD) return false;
  for (let index = at + 1; index < behind.anchor; index++) {
    const item = items[index] as Item;
    if (item.kind === 'semicolon' || item.kind === 'p') return false;
    if (item.kind === 'number' && !item.printed.percent) return false;
    if (item.kind === 'word' && TURNS.has(item.word)) return false;
  }
  for (let index = behind.start; index < behind.end + 5; index++) {
    if (items[index]?.kind === 'p') return false;
  }
  return true;
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
