import { absence, isAbsence, type Maybe } from './absence.ts';
import { ratioFromLog, type EstimatedRatio } from './estimated.ts';
import { groupTotals, halfAdded, refuseTable } from './cells.ts';
import type { TwoByTwo } from './two-by-two.ts';

/**
 * The crude risk ratio with Katz's interval: log risk ratio ± multiplier × √(1/a −
 * 1/n₁ + 1/c − 1/n₀). 104 of 11037 against 189 of 11034 gives 0.550 (0.434 to
 * 0.698).
 *
 * Source: Katz, Baptista, Azen & Pike (1978); also what modified Poisson regression
 * (Zou 2004) gives on the exposure alone. A group without events is refused, and so
 * is a table where everybody has the event, whose standard error is 0.
 */
export function riskRatio(table: TwoByTwo, level = 95): Maybe<EstimatedRatio> {
  const refusal = refuseTable(table);
  if (refusal) return refusal;
  if (table.exposedEvents === 0 || table.unexposedEvents === 0) {
    return absence('a group has no events');
  }
  const { exposed, unexposed } = groupTotals(table);
  return katz(table.exposedEvents, exposed, table.unexposedEvents, unexposed, level);
}

/**
 * The risk ratio with one half added to all four cells, so that each group grows
 * by one; it exists for any table. 10 of 10 against 0 of 10 gives 21 (1.40 to 316).
 */
export function riskRatioHalfAdded(table: TwoByTwo, level = 95): Maybe<EstimatedRatio> {
  const refusal = refuseTable(table);
  if (refusal) return refusal;
  const raised = halfAdded(table);
  const { exposed, unexposed } = groupTotals(raised);
  return katz(raised.exposedEvents, exposed, raised.unexposedEvents, unexposed, level);
}

function katz(
  exposedEvents: number,
  exposed: number,
  unexposedEvents: number,
  unexposed: number,
  level: number,
): Maybe<EstimatedRatio> {
  const ratio = (exposedEvents / exposed) / (unexposedEvents / unexposed);
  const variance = (1 / exposedEvents - 1 / exposed) + (1 / unexposedEvents - 1 / unexposed);
  const estimated = ratioFromLog(Math.log(ratio), Math.sqrt(variance), level);
  return isAbsence(estimated) ? estimated : { ...estimated, ratio };
}
