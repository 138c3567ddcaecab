import type { Draft } from '../parse/draft.ts';
import { namedBefore } from '../parse/intervals.ts';
import type { Item, NameItem } from '../parse/item.ts';
import { enclosing, lookBack, type Passage } from '../parse/passage.ts';
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
  if (attached !== undefined) return { naming: attached.naming, name: attached, inherited: false };
  const measured = measuredNaming(passage, draft);
  if (measured !== undefined) return { naming: measured, inherited: false };
  const near = nearestName(passage, draft);
  if (near?.naming.firm) return { naming: near.naming, name: near, inherited: false };
  if (before !== undefined && continues(passage, before, draft)) {
    return { ...before.resolved, inherited: true };
  }
  const anywhere = near ?? nameInBrackets(passage, draft);
  if (anywhere !== undefined) return { naming: anywhere.naming, name: anywhere, inherited: false };
  return common === undefined ? undefined : { naming: common, inherited: true };
}

// HR 0.72   odds ratio was 1.6   1.27 (SMR
function attachedName({ items }: Passage, { anchor, end }: Draft): NameItem | undefined {
  for (let at = anchor - 1; at >= Math.max(0, anchor - 5); at--) {
    const item = items[at] as Item;
    if (item.kind === 'name') return namedBefore(items, anchor) ? item : undefined;
    if (item.kind === 'number' || item.kind === 'close' || item.kind === 'stop') break;
  }
  const behind = items[end];
  return behind?.kind === 'open' && items[end + 1]?.kind === 'name' && items[end + 2]?.kind === 'close'
    ? (items[end + 1] as NameItem)
    : undefined;
}

const UNITS = new Set(['months', 'month', 'years', 'year', 'yrs', 'weeks', 'week', 'days', 'day',
  'hours', 'h', 'minutes', 'min', 'mg', 'kg', 'g', 'µg', 'μg', 'ml', 'l', 'mm', 'cm', 'm', 'mmol',
  'mmhg', 'pmol', 'nmol', 'points', 'point', 'beats', 'units', 'dl', 'bpm', 'pg', 'ng', 'kcal',
  'events', 'cases', 'deaths', 'persons', 'patients', 'participants', 'subjects', 'mo', 'yr', 'wk',
  'micromol', 'meq', 'iu', 'kj', 'kpa', 'hz', 'ms', 's', 'sec', 'seconds', 'db', 'copies', 'cells',
  'visits', 'admissions', 'episodes', 'infections', 'women', 'men', 'children', 'people', 'per']);

const PERCENTAGE: Naming = { quantity: { kind: 'proportion' }, firm: true };
const AMOUNT: Naming = { quantity: { kind: 'other', measure: 'other' }, firm: true };

/** What a percent sign or a unit right behind the estimate tells. */
function measuredNaming(passage: Passage, draft: Draft): Naming | undefined {
  const { items } = passage;
  const { estimate, limits, anchor } = draft;
  const percent = estimate?.percent === true || limits?.upper.percent === true;
  const unit = items[anchor + 1];
  const isUnit = estimate !== undefined && unit?.kind === 'word' && UNITS.has(unit.word)
    && unit.word !== 'per';
  if (!percent && !isUnit) return undefined;
  const name = nearestName(passage, draft);
  if (name !== undefined && name.naming.quantity.kind !== 'ratio') return name.naming;
  return percent ? PERCENTAGE : AMOUNT;
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
function continues({ sentences }: Passage, { draft }: Before, next: Draft): boolean {
  const gap = (sentences[next.anchor] ?? 0) - (sentences[draft.anchor] ?? 0);
  const alike = draft.estimate?.percent === next.estimate?.percent;
  return alike && gap <= 2;
}
