import { nameRightBefore } from '../parse/intervals.ts';
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
  const named = new Map<string, Naming>();
  const used = new Map<string, Naming>();
  for (const { items } of passages) {
    items.forEach((item, at) => {
      if (item.kind === 'label' && item.level !== undefined) levels.add(item.level);
      const ratio = ratioNamed(item);
      if (ratio !== undefined) named.set(ratio.measure, ratio.naming);
      const behind = item.kind === 'number' ? nameRightBefore(items, at) : undefined;
      const value = behind === undefined ? undefined : ratioNamed(behind);
      if (value !== undefined) used.set(value.measure, value.naming);
    });
  }
  const level = onlyOne(levels);
  const naming = onlyOne(used.values()) ?? onlyOne(named.values());
  return {
    ...(level === undefined ? {} : { level }),
    ...(naming === undefined ? {} : { naming }),
  };
}

function onlyOne<Value>(values: Iterable<Value>): Value | undefined {
  const [first, ...others] = values;
  return others.length === 0 ? first : undefined;
}

function ratioNamed(item: Item): { readonly measure: string; readonly naming: Naming } | undefined {
  if (item.kind !== 'name' || !item.naming.firm) return undefined;
  const { quantity } = item.naming;
  return quantity.kind === 'ratio'
    ? { measure: quantity.measure, naming: item.naming }
    : undefined;
}
