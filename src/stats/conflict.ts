import { isFeasible } from './feasible-region.ts';
import type { Quantity, Strip } from './strip.ts';

/** Printed numbers that cannot stand together, while any fewer of them can. */
export type Conflict = readonly Quantity[];

/**
 * The smallest sets of printed numbers that disagree, smallest first: every set
 * given disagrees, and no part of it does. In the plane three convex strips show any conflict
 * (Helly 1923); with a two-sided p, which is two cones, four may be needed.
 * Estimate 0.29 with limits 0.30 and 0.92 gives [estimate, lower] alone.
 */
export function conflicts(strips: readonly Strip[]): readonly Conflict[] {
  const found: (readonly Strip[])[] = [];
  for (let size = 1; size <= strips.length; size++) {
    for (const set of subsets(strips, size)) {
      const known = found.some((conflict) => conflict.every((strip) => set.includes(strip)));
      if (!known && !isFeasible(set)) found.push(set);
    }
  }
  return found.map((set) => set.map((strip) => strip.of));
}

/** All sets of the given size, in the order of the items. */
function subsets<Item>(items: readonly Item[], size: number): readonly (readonly Item[])[] {
  if (size === 0) return [[]];
  return items.flatMap((item, i) =>
    subsets(items.slice(i + 1), size - 1).map((rest) => [item, ...rest]));
}
