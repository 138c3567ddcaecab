import type { Range } from '../model/index.ts';
import { isAbsence, type Maybe } from './absence.ts';
import { multiplier } from './normal.ts';
import { positiveRoot } from './positive-root.ts';
import { rootBetween } from './root.ts';
import { groupRisks, groupTotals, refuseFlatTable, tableTotal } from './cells.ts';
import type { TwoByTwo } from './two-by-two.ts';

/*
 * Score intervals for two independent proportions, after Miettinen & Nurminen
 * (1985): all values of the measure that a score test, with the risks fitted under
 * that value and the variance times N/(N − 1), would not reject. They exist for
 * tables with empty cells. Accuracy: 1e-9 of the limits. Levels in percent. A table
 * in which nobody or everybody has the event is refused.
 */

/** For the risk difference: the aspirin trial's −0.0077 has −0.01078 to −0.00472. */
export function scoreIntervalOfDifference(table: TwoByTwo, level = 95): Maybe<Range> {
  const z = refuseFlatTable(table) ?? multiplier(level);
  if (isAbsence(z)) return z;
  const score = (difference: number): number => differenceScore(table, difference);
  const end = 1 - 2 ** -40;
  const risk = groupRisks(table);
  const seen = risk.exposed - risk.unexposed;
  return {
    low: score(-end) < z ? -1 : rootBetween((d) => score(d) - z, -end, Math.max(-end, seen)),
    high: score(end) > -z ? 1 : rootBetween((d) => score(d) + z, Math.min(end, seen), end),
  };
}

/** For the risk ratio: the aspirin trial's 0.5501 has 0.4339 to 0.6974. */
export function scoreIntervalOfRiskRatio(table: TwoByTwo, level = 95): Maybe<Range> {
  const z = refuseFlatTable(table) ?? multiplier(level);
  if (isAbsence(z)) return z;
  const score = (ratio: number): number => riskRatioScore(table, ratio);
  return {
    low: table.exposedEvents === 0 ? 0 : positiveRoot((ratio) => z - score(ratio), 1),
    high: table.unexposedEvents === 0 ? Infinity : positiveRoot((ratio) => -z - score(ratio), 1),
  };
}

/** For the odds ratio: the aspirin trial's 0.5458 has 0.4293 to 0.6940. */
export function scoreIntervalOfOddsRatio(table: TwoByTwo, level = 95): Maybe<Range> {
  const z = refuseFlatTable(table) ?? multiplier(level);
  if (isAbsence(z)) return z;
  const score = (ratio: number): number => oddsRatioScore(table, ratio);
  const { exposedEvents: a, exposedNonEvents: b } = table;
  const { unexposedEvents: c, unexposedNonEvents: d } = table;
  return {
    low: a === 0 || d === 0 ? 0 : positiveRoot((ratio) => z - score(ratio), 1),
    high: b === 0 || c === 0 ? Infinity : positiveRoot((ratio) => -z - score(ratio), 1),
  };
}

function differenceScore(table: TwoByTwo, difference: number): number {
  const unexposed = unexposedRiskGiven(table, difference);
  const exposed = Math.min(1, Math.max(0, unexposed + difference));
  const variance = varianceOf(table, exposed, unexposed, 1);
  const risk = groupRisks(table);
  return (risk.exposed - risk.unexposed - difference) / Math.sqrt(variance);
}

/** The likeliest risk among the unexposed when the difference of risks is given. */
function unexposedRiskGiven(table: TwoByTwo, difference: number): number {
  const { exposedEvents: a, exposedNonEvents: b } = table;
  const { unexposedEvents: c, unexposedNonEvents: d } = table;
  // At an end of the risks a share is 0 but for rounding, and may come out a hair below.
  const part = (count: number, share: number): number => count && count / Math.max(0, share);
  const slope = (p: number): number => part(a, p + difference) - part(b, 1 - p - difference)
    + part(c, p) - part(d, 1 - p);
  const low = Math.max(0, -difference);
  const high = Math.min(1, 1 - difference);
  if (slope(low) <= 0) return low;
  return slope(high) >= 0 ? high : rootBetween(slope, low, high);
}

function riskRatioScore(table: TwoByTwo, ratio: number): number {
  const { exposed: n1, unexposed: n0 } = groupTotals(table);
  const { exposedEvents: a, unexposedEvents: c } = table;
  const half = (n1 * ratio + a + n0 + c * ratio) / 2;
  const product = (n1 + n0) * ratio * (a + c);
  // The smaller root of Nφp² − 2hp + (a + c), written so that nothing cancels.
  const unexposed = (a + c) / (half + Math.sqrt(Math.max(0, half * half - product)));
  const variance = varianceOf(table, Math.min(1, ratio * unexposed), unexposed, ratio);
  return (a / n1 - (ratio * c) / n0) / Math.sqrt(variance);
}

function oddsRatioScore(table: TwoByTwo, ratio: number): number {
  const { exposed: n1, unexposed: n0 } = groupTotals(table);
  const events = table.exposedEvents + table.unexposedEvents;
  const linear = n1 * ratio + n0 - events * (ratio - 1);
  const root = Math.sqrt(linear * linear + 4 * n0 * (ratio - 1) * events);
  const unexposed = (2 * events) / (linear + root);
  const exposed = (unexposed * ratio) / (1 + unexposed * (ratio - 1));
  const total = n1 + n0;
  const information = 1 / (n1 * exposed * (1 - exposed)) + 1 / (n0 * unexposed * (1 - unexposed));
  return (table.exposedEvents - n1 * exposed) * Math.sqrt((information * (total - 1)) / total);
}

function varianceOf(table: TwoByTwo, exposed: number, unexposed: number, weight: number): number {
  const { exposed: n1, unexposed: n0 } = groupTotals(table);
  const total = tableTotal(table);
  const sum = (exposed * (1 - exposed)) / n1
    + (weight * weight * unexposed * (1 - unexposed)) / n0;
  return (sum * total) / (total - 1);
}
