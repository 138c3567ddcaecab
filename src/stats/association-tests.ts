import type { Maybe } from './absence.ts';
import { chiSquareTest, type ChiSquareTest } from './chi-square-test.ts';
import { groupTotals, marginsOf, refuseFlatTable } from './cells.ts';
import type { TwoByTwo } from './two-by-two.ts';

/** What the usual tests of no association in a 2×2 table give. */
export interface AssociationTests {
  readonly pearson: ChiSquareTest;
  /** With Yates' (1934) continuity correction, never beyond zero. */
  readonly yates: ChiSquareTest;
  /** Pearson's times (N − 1)/N (Campbell 2007). */
  readonly nMinusOne: ChiSquareTest;
  /** The likelihood-ratio statistic G². */
  readonly likelihoodRatio: ChiSquareTest;
  /** The pooled z of two proportions; its square is Pearson's χ². */
  readonly pooledZ: number;
  /** The smallest expected count; below 5 the exact test is preferred (Cochran 1954). */
  readonly smallestExpected: number;
}

/**
 * The large-sample tests of a 2×2 table. 12 of 41 against 15 of 100 has Pearson's
 * p = 0.0505. A table in which nobody or everybody has the event is refused.
 * Accuracy: 1e-13 of each p.
 */
export function associationTests(table: TwoByTwo): Maybe<AssociationTests> {
  const refusal = refuseFlatTable(table);
  if (refusal) return refusal;
  const { marked, unmarked, drawn } = marginsOf(table);
  const total = marked + unmarked;
  const cross = crossDifference(table);
  const scale = total / marked / unmarked / drawn / (total - drawn);
  const pearson = cross * cross * scale;
  const corrected = Math.max(0, Math.abs(cross) - total / 2);
  return {
    pearson: chiSquareTest(pearson, 1),
    yates: chiSquareTest(corrected * corrected * scale, 1),
    nMinusOne: chiSquareTest((pearson * (total - 1)) / total, 1),
    likelihoodRatio: chiSquareTest(likelihoodRatio(table), 1),
    pooledZ: Math.sign(cross) * Math.sqrt(pearson),
    smallestExpected: (Math.min(marked, unmarked) * Math.min(drawn, total - drawn)) / total,
  };
}

/** ad − bc. */
function crossDifference(table: TwoByTwo): number {
  return table.exposedEvents * table.unexposedNonEvents
    - table.exposedNonEvents * table.unexposedEvents;
}

function likelihoodRatio(table: TwoByTwo): number {
  const { exposed, unexposed } = groupTotals(table);
  const total = exposed + unexposed;
  const events = table.exposedEvents + table.unexposedEvents;
  const others = total - events;
  const terms = [
    [table.exposedEvents, (exposed * events) / total],
    [table.exposedNonEvents, (exposed * others) / total],
    [table.unexposedEvents, (unexposed * events) / total],
    [table.unexposedNonEvents, (unexposed * others) / total],
  ] as const;
  const sum = terms.reduce((so, [seen, due]) => so + (seen && seen * Math.log(seen / due)), 0);
  return Math.max(0, 2 * sum);
}
