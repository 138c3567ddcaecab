import { absence, isAbsence, type Absence, type Maybe } from './absence.ts';
import { chiSquareTest, type ChiSquareTest } from './chi-square-test.ts';
import { ratioFromLog, type EstimatedRatio } from './estimated.ts';
import { groupTotals, refuseTable, tableTotal } from './cells.ts';
import type { TwoByTwo } from './two-by-two.ts';

/**
 * The odds ratio common to several strata after Mantel & Haenszel (1959), with the
 * variance of Robins, Breslow & Greenland (1986). Admissions to Berkeley by
 * department give 0.905 (0.772 to 1.060) where the crude ratio is 1.841: strata may
 * turn a ratio round, and that is confounding.
 */
export function mantelHaenszel(strata: readonly TwoByTwo[], level = 95): Maybe<EstimatedRatio> {
  const refusal = refuseStrata(strata);
  if (refusal) return refusal;
  const sums = strata.map(weighed).reduce(added);
  const { r, s, pr, psqr, qs } = sums;
  if (r === 0 || s === 0) return absence('no stratum has both kinds of discordant cells');
  const variance = pr / (2 * r * r) + psqr / (2 * r * s) + qs / (2 * s * s);
  return ratioFromLog(Math.log(r / s), Math.sqrt(variance), level);
}

/** The Cochran–Mantel–Haenszel test, without and with the correction of one half. */
export interface StratifiedTests {
  readonly uncorrected: ChiSquareTest;
  readonly corrected: ChiSquareTest;
}

/**
 * Tests that the common odds ratio is 1: (Σ(a − E a))²/ΣVar a, with hypergeometric
 * variances, on one degree of freedom. Berkeley: χ² = 1.52, with correction 1.43.
 */
export function cochranMantelHaenszel(strata: readonly TwoByTwo[]): Maybe<StratifiedTests> {
  const refusal = refuseStrata(strata);
  if (refusal) return refusal;
  let gap = 0;
  let variance = 0;
  for (const table of strata) {
    const { exposed, unexposed } = groupTotals(table);
    const total = exposed + unexposed;
    const events = table.exposedEvents + table.unexposedEvents;
    gap += table.exposedEvents - (exposed * events) / total;
    variance += total < 2 ? 0 : (((exposed * unexposed) / total) * (events * (total - events)))
      / (total * (total - 1));
  }
  if (variance === 0) return absence('no stratum has both events and non-events');
  const corrected = Math.max(0, Math.abs(gap) - 0.5);
  return {
    uncorrected: chiSquareTest((gap * gap) / variance, 1),
    corrected: chiSquareTest((corrected * corrected) / variance, 1),
  };
}

/**
 * Breslow & Day's (1980) test that the odds ratio is the same in all strata, on
 * one degree of freedom fewer than there are strata, and with Tarone's (1985)
 * correction. Berkeley: 18.83 on 5, p = 0.002.
 */
export function breslowDay(
  strata: readonly TwoByTwo[],
): Maybe<{ readonly plain: ChiSquareTest; readonly tarone: ChiSquareTest }> {
  const common = mantelHaenszel(strata);
  if (isAbsence(common)) return common;
  const telling = strata.filter((table) =>
    cellVariance(table, expectedCell(table, common.ratio)) > 0);
  if (telling.length < 2) return absence('fewer than two strata have something to compare');
  let [sum, gap, variance] = [0, 0, 0];
  for (const table of telling) {
    const expected = expectedCell(table, common.ratio);
    const ofCell = cellVariance(table, expected);
    sum += (table.exposedEvents - expected) ** 2 / ofCell;
    gap += table.exposedEvents - expected;
    variance += ofCell;
  }
  const df = telling.length - 1;
  const tarone = Math.max(0, sum - (gap * gap) / variance);
  return { plain: chiSquareTest(sum, df), tarone: chiSquareTest(tarone, df) };
}

/** The sums of Robins, Breslow & Greenland for one stratum. */
function weighed(table: TwoByTwo): Record<'r' | 's' | 'pr' | 'psqr' | 'qs', number> {
  const total = tableTotal(table);
  const r = (table.exposedEvents * table.unexposedNonEvents) / total;
  const s = (table.exposedNonEvents * table.unexposedEvents) / total;
  const p = (table.exposedEvents + table.unexposedNonEvents) / total;
  const q = (table.exposedNonEvents + table.unexposedEvents) / total;
  return { r, s, pr: p * r, psqr: p * s + q * r, qs: q * s };
}

function added(so: ReturnType<typeof weighed>, next: ReturnType<typeof weighed>): typeof so {
  return {
    r: so.r + next.r, s: so.s + next.s,
    pr: so.pr + next.pr, psqr: so.psqr + next.psqr, qs: so.qs + next.qs,
  };
}

/** The count of exposed events at which a table with these margins has this odds ratio. */
function expectedCell(table: TwoByTwo, ratio: number): number {
  const { exposed, unexposed } = groupTotals(table);
  const events = table.exposedEvents + table.unexposedEvents;
  const linear = unexposed - events + ratio * (exposed + events);
  const product = 4 * (ratio - 1) * ratio * exposed * events;
  return (2 * ratio * exposed * events) / (linear + Math.sqrt(linear * linear - product));
}

function cellVariance(table: TwoByTwo, expected: number): number {
  const { exposed, unexposed } = groupTotals(table);
  const events = table.exposedEvents + table.unexposedEvents;
  return 1 / (1 / expected + 1 / (exposed - expected) + 1 / (events - expected)
    + 1 / (unexposed - events + expected));
}

function refuseStrata(strata: readonly TwoByTwo[]): Absence | undefined {
  if (strata.length === 0) return absence('there are no strata');
  return strata.map(refuseTable).find((refusal) => refusal !== undefined);
}
