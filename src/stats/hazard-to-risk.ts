import type { Maybe } from './absence.ts';
import { refuseClosedShares, refuseNonPositive } from './admissible.ts';

/** What a hazard ratio comes to in risks at one time. */
export interface RiskFromHazard {
  readonly exposedRisk: number;
  readonly riskRatio: number;
  readonly oddsRatio: number;
  /** In which order the three ratios stand. */
  readonly order: '1<RR<HR<OR' | 'OR<HR<RR<1' | 'all 1';
}

/**
 * The risks behind a hazard ratio when the unexposed have a given risk by the end of
 * the same follow-up: 1 − (1 − p₀)^HR. 0.7 at 0.5 gives a risk of 0.384, a risk ratio
 * of 0.769 and an odds ratio of 0.625. So 1 − HR is not the reduction in risk.
 *
 * Assumes proportional hazards and no competing risks. Source: Symons & Moore (2002).
 */
export function riskFromHazard(hazardRatio: number, baselineRisk: number): Maybe<RiskFromHazard> {
  const refusal = refuseNonPositive({ hazardRatio }) ?? refuseClosedShares({ baselineRisk });
  if (refusal) return refusal;
  const logSurvival = Math.log1p(-baselineRisk);
  const exposedRisk = -Math.expm1(hazardRatio * logSurvival);
  // The odds as 1/survival − 1, which keeps its digits where the risk is all but 1.
  const oddsRatio = Math.expm1(-hazardRatio * logSurvival) / Math.expm1(-logSurvival);
  const order = hazardRatio > 1 ? '1<RR<HR<OR' : hazardRatio < 1 ? 'OR<HR<RR<1' : 'all 1';
  return { exposedRisk, riskRatio: exposedRisk / baselineRisk, oddsRatio, order };
}

/**
 * A rough risk ratio of a hazard ratio when the outcome is common and no risk is
 * known: (1 − 0.5^√HR)/(1 − 0.5^√(1/HR)). 2 gives 1.613. Source: VanderWeele (2020).
 */
export function commonOutcomeRiskRatio(hazardRatio: number): Maybe<number> {
  const refusal = refuseNonPositive({ hazardRatio });
  if (refusal) return refusal;
  const part = (ratio: number): number => -Math.expm1(-Math.LN2 * Math.sqrt(ratio));
  return part(hazardRatio) / part(1 / hazardRatio);
}
