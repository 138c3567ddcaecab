import type { Range } from '../model/index.ts';
import { isAbsence, type Maybe } from './absence.ts';
import { multiplier } from './normal.ts';
import { wilsonInterval } from './proportion-interval.ts';
import { rangeAround } from './spread.ts';
import { groupRisks, groupTotals, refuseTable } from './cells.ts';
import type { TwoByTwo } from './two-by-two.ts';

/** A difference of two risks on the scale −1 to 1, with its interval. */
export interface RiskDifference {
  readonly difference: number;
  readonly standardError: number;
  readonly interval: Range;
}

/**
 * The risk difference with Wald's interval. 56 of 70 against 48 of 80 gives 0.2
 * (0.0575 to 0.3425). Groups of 0% and 100% give a standard error of 0 and an
 * interval of one point, which is how this method fails there.
 */
export function riskDifference(table: TwoByTwo, level = 95): Maybe<RiskDifference> {
  const refusal = refuseTable(table);
  if (refusal) return refusal;
  const reach = multiplier(level);
  if (isAbsence(reach)) return reach;
  const risk = groupRisks(table);
  const total = groupTotals(table);
  const difference = risk.exposed - risk.unexposed;
  const standardError = Math.sqrt(
    (risk.exposed * (1 - risk.exposed)) / total.exposed
      + (risk.unexposed * (1 - risk.unexposed)) / total.unexposed,
  );
  return { difference, standardError, interval: rangeAround(difference, reach * standardError) };
}

/**
 * Newcombe's hybrid interval for the risk difference, from Wilson's limits of the
 * two risks: 56 of 70 against 48 of 80 gives 0.0524 to 0.3339.
 * Source: Newcombe (1998), method 10, without continuity correction.
 */
export function newcombeInterval(table: TwoByTwo, level = 95): Maybe<Range> {
  const refusal = refuseTable(table);
  if (refusal) return refusal;
  const total = groupTotals(table);
  const exposed = wilsonInterval(table.exposedEvents, total.exposed, level);
  const unexposed = wilsonInterval(table.unexposedEvents, total.unexposed, level);
  if (isAbsence(exposed)) return exposed;
  if (isAbsence(unexposed)) return unexposed;
  const risk = groupRisks(table);
  const difference = risk.exposed - risk.unexposed;
  return {
    low: difference - Math.hypot(risk.exposed - exposed.low, unexposed.high - risk.unexposed),
    high: difference + Math.hypot(exposed.high - risk.exposed, risk.unexposed - unexposed.low),
  };
}
