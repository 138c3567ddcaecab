import { absence, type Maybe } from './absence.ts';
import { refuseClosedShares, refuseShares } from './admissible.ts';
import { numberNeeded } from './number-needed-to-treat.ts';

/** All that two risks say of each other. */
export interface RiskMeasures {
  readonly riskRatio: number;
  readonly oddsRatio: number;
  readonly riskDifference: number;
  /** 100 (1 − risk ratio): negative where the exposed have the higher risk. */
  readonly relativeReductionPercent: number;
  /** The ratio of the risks of *not* having the event; it is not 1 over the risk ratio. */
  readonly riskRatioOfNonEvent: number;
  /** 1 over the absolute risk difference, whichever way it goes. */
  readonly numberNeeded: Maybe<number>;
}

/**
 * The measures of an exposed and an unexposed risk, both strictly between 0 and 1:
 * 0.18 and 0.24 give a risk ratio of 0.75, an odds ratio of 0.695 and 16.7 to treat.
 */
export function riskMeasures(exposedRisk: number, unexposedRisk: number): Maybe<RiskMeasures> {
  const refusal = refuseClosedShares({ exposedRisk, unexposedRisk });
  if (refusal) return refusal;
  const riskRatio = exposedRisk / unexposedRisk;
  const riskRatioOfNonEvent = (1 - exposedRisk) / (1 - unexposedRisk);
  const needed = numberNeeded(unexposedRisk - exposedRisk);
  return {
    riskRatio,
    oddsRatio: riskRatio / riskRatioOfNonEvent,
    riskDifference: exposedRisk - unexposedRisk,
    relativeReductionPercent: 100 * (1 - riskRatio),
    riskRatioOfNonEvent,
    numberNeeded: 'number' in needed ? needed.number : needed,
  };
}

/**
 * The largest risk ratio that a baseline risk leaves room for, 1/p₀: at 0.4 no risk
 * ratio can exceed 2.5.
 */
export function largestRiskRatio(baselineRisk: number): Maybe<number> {
  const refusal = refuseShares({ baselineRisk });
  if (refusal) return refusal;
  return baselineRisk === 0 ? absence('a baseline risk of 0 bounds no ratio') : 1 / baselineRisk;
}
