import { absence, isAbsence, type Absence, type Maybe } from './absence.ts';
import { estimatedFrom, ratioFromLog, type Estimated, type EstimatedRatio } from './estimated.ts';
import { groupTotals, refuseTable } from './cells.ts';
import type { TwoByTwo } from './two-by-two.ts';

/**
 * The risk ratio common to several strata or studies after Mantel & Haenszel: Σ a n₀/N
 * over Σ c n₁/N, with the variance of Greenland & Robins (1985). The 13 BCG trials give
 * 0.635 (0.588 to 0.686).
 */
export function mantelHaenszelRiskRatio(
  strata: readonly TwoByTwo[],
  level = 95,
): Maybe<EstimatedRatio> {
  const refusal = refuseStrata(strata);
  if (refusal) return refusal;
  let [exposedSum, unexposedSum, spread] = [0, 0, 0];
  for (const table of strata) {
    const { exposedEvents: a, unexposedEvents: c } = table;
    const { exposed: n1, unexposed: n0 } = groupTotals(table);
    const total = n1 + n0;
    exposedSum += (a * n0) / total;
    unexposedSum += (c * n1) / total;
    spread += (((n1 * n0) / total) * (a + c) - a * c) / total;
  }
  if (exposedSum === 0 || unexposedSum === 0) return absence('one of the groups has no events');
  const variance = spread / (exposedSum * unexposedSum);
  return ratioFromLog(Math.log(exposedSum / unexposedSum), Math.sqrt(variance), level);
}

/**
 * The risk difference common to several strata, weights n₁n₀/N, with the variance of
 * Greenland & Robins (1985) that serves both sparse and large strata (Sato 1989).
 */
export function mantelHaenszelRiskDifference(
  strata: readonly TwoByTwo[],
  level = 95,
): Maybe<Estimated> {
  const refusal = refuseStrata(strata);
  if (refusal) return refusal;
  let [weights, moment, p, q] = [0, 0, 0, 0];
  for (const table of strata) {
    const { exposedEvents: a, exposedNonEvents: b } = table;
    const { unexposedEvents: c, unexposedNonEvents: d } = table;
    const { exposed: n1, unexposed: n0 } = groupTotals(table);
    const total = n1 + n0;
    weights += (n1 * n0) / total;
    moment += (a * n0 - c * n1) / total;
    p += c * (n1 / total) ** 2 - a * (n0 / total) ** 2
      + ((n1 * n0) / total) * ((n0 - n1) / 2 / total);
    q += (a * d + b * c) / (2 * total);
  }
  const difference = moment / weights;
  return estimatedFrom(difference, Math.sqrt(difference * p + q) / weights, level);
}

function refuseStrata(strata: readonly TwoByTwo[]): Absence | undefined {
  if (strata.length === 0) return absence('there are no strata');
  return strata.map(refuseTable).find(isAbsence);
}
