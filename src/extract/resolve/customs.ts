import type { Item } from '../parse/item.ts';
import type { Passage } from '../parse/passage.ts';
import type { Naming } from '../vocabulary.ts';
import type { Customs } from './results.ts';

/**
 * What a manuscript does throughout: the level it states for its intervals, and
 * the ratio it reports, each only where it is the same everywhere.
 */
export function customsOf(passages: readonly Passage[]): Customs {
  const levels = new Set<number>();
  const namings = new Map<string, Naming>();
  for (const { items } of passages) {
    for (const item of items) note(item, levels, namings);
  }
  const [level, ...otherLevels] = levels;
  const [naming, ...otherNamings] = namings.values();
  return {
    ...(level !== undefined && otherLevels.length === 0 ? { level } : {}),
    ...(naming !== undefined && otherNamings.length === 0 ? { naming } : {}),
  };
}

function note(item: Item, levels: Set<number>, namings: Map<string, Naming>): void {
  if (item.kind === 'label' && item.level !== undefined) levels.add(item.level);
  if (item.kind !== 'name' || !item.naming.firm) return;
  const { quantity } = item.naming;
  if (quantity.kind === 'ratio') namings.set(quantity.measure, item.naming);
}
