import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Maybe } from './absence.ts';
import { refuseClosedShares, refuseInfinite, refuseNonPositive } from './admissible.ts';

/**
 * A number needed to treat: one person more is spared (benefit) or struck (harm)
 * for so many treated. `rounded` is rounded up, as is customary.
 */
export interface NumberNeeded {
  readonly number: number;
  readonly rounded: number;
  readonly direction: 'benefit' | 'harm';
}

/**
 * 1 over an absolute risk reduction, control less treated, on the scale −1 to 1:
 * 0.024 gives 41.67, rounded up to 42. A reduction of 0 has none. It says nothing
 * without the time over which the risks were counted. Source: Laupacis, Sackett &
 * Roberts (1988); Altman (1998).
 */
export function numberNeeded(riskReduction: number): Maybe<NumberNeeded> {
  if (!(Math.abs(riskReduction) <= 1)) return absence('a risk reduction is between −1 and 1');
  if (riskReduction === 0) return absence('the risks do not differ');
  const number = 1 / Math.abs(riskReduction);
  // 1/0.05 must not become 21 because 0.2 − 0.15 is a hair below 0.05 in binary.
  const rounded = Math.ceil(number * (1 - 1e-12));
  return { number, rounded, direction: riskReduction > 0 ? 'benefit' : 'harm' };
}

/**
 * The interval of a number needed to treat, from that of the absolute risk
 * reduction. Where that holds 0 the numbers run from the benefit through infinity to
 * the harm, and are two stretches: −0.01 to 0.11 is at least 9.1 for benefit and at
 * least 100 for harm, never "−100 to 9.1". Source: Altman (1998).
 */
export type NumberNeededInterval =
  | { readonly kind: 'one stretch'; readonly direction: 'benefit' | 'harm'; readonly range: Range }
  | {
      readonly kind: 'through infinity';
      readonly benefitFrom: number;
      readonly harmFrom: number;
    };

/** The interval of the number needed to treat; ends are ∞ where the reduction ends at 0. */
export function numberNeededInterval(reduction: Range): Maybe<NumberNeededInterval> {
  const { low, high } = reduction;
  if (!(low >= -1 && high <= 1 && low <= high)) {
    return absence('the limits of a risk reduction are not in order between −1 and 1');
  }
  if (low === 0 && high === 0) return absence('the risks do not differ');
  if (low >= 0) {
    return { kind: 'one stretch', direction: 'benefit', range: { low: 1 / high, high: 1 / low } };
  }
  if (high <= 0) {
    return { kind: 'one stretch', direction: 'harm', range: { low: -1 / low, high: 1 / -high } };
  }
  return { kind: 'through infinity', benefitFrom: 1 / high, harmFrom: -1 / low };
}

/** What a relative measure comes to at a baseline risk. */
export interface AbsoluteEffect {
  readonly treatedRisk: number;
  /** Baseline less treated risk: positive where treatment lowers the risk. */
  readonly riskReduction: number;
  readonly numberNeeded: Maybe<NumberNeeded>;
}

/**
 * A risk ratio at a baseline risk: 0.92 at 0.3 is 24 fewer in 1000, 42 to treat.
 * A ratio that would lift the risk above 1 cannot apply at that baseline.
 */
export function effectOfRiskRatio(riskRatio: number, baselineRisk: number): Maybe<AbsoluteEffect> {
  const refusal = refuseNonPositive({ riskRatio }) ?? refuseClosedShares({ baselineRisk });
  if (refusal) return refusal;
  const treatedRisk = riskRatio * baselineRisk;
  if (treatedRisk > 1) return absence(`a risk of ${treatedRisk} is above 1`);
  return effect(treatedRisk, baselineRisk * (1 - riskRatio));
}

/** An odds ratio at a baseline risk: 0.73 at 0.3 is 62 fewer in 1000, 17 to treat. */
export function effectOfOddsRatio(oddsRatio: number, baselineRisk: number): Maybe<AbsoluteEffect> {
  const refusal = refuseNonPositive({ oddsRatio }) ?? refuseClosedShares({ baselineRisk });
  if (refusal) return refusal;
  const denominator = 1 - baselineRisk + baselineRisk * oddsRatio;
  const reduction = (baselineRisk * (1 - baselineRisk) * (1 - oddsRatio)) / denominator;
  return effect((baselineRisk * oddsRatio) / denominator, reduction);
}

/**
 * The number needed to treat from survival shares at one time (Altman & Andersen
 * 1999): control survival 0.7 and hazard ratio 0.6 give 0.8073 treated, 10 to treat.
 * Assumes proportional hazards.
 */
export function effectOfHazardRatio(
  hazardRatio: number,
  baselineRisk: number,
): Maybe<AbsoluteEffect> {
  const refusal = refuseNonPositive({ hazardRatio }) ?? refuseClosedShares({ baselineRisk });
  if (refusal) return refusal;
  const logSurvival = Math.log1p(-baselineRisk);
  const treatedRisk = -Math.expm1(hazardRatio * logSurvival);
  const gain = (1 - baselineRisk) * Math.expm1((hazardRatio - 1) * logSurvival);
  return effect(treatedRisk, gain);
}

function effect(treatedRisk: number, riskReduction: number): Maybe<AbsoluteEffect> {
  const refusal = refuseInfinite({ treatedRisk, riskReduction });
  if (isAbsence(refusal)) return refusal;
  return { treatedRisk, riskReduction, numberNeeded: numberNeeded(riskReduction) };
}
