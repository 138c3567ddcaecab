import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Maybe } from './absence.ts';
import { refuseNonPositive } from './admissible.ts';
import { commonOutcomeRiskRatio } from './hazard-to-risk.ts';

/**
 * What kind of ratio is put to the question. A rare outcome's odds or hazard ratio is
 * taken as a risk ratio; a common one's (above about 15%) is turned into one first.
 */
export type RatioForEValue =
  | 'risk ratio or rare outcome' | 'common odds ratio' | 'common hazard ratio';

/** The E-values of an estimate and of the limit nearer to 1. */
export interface EValue {
  readonly riskRatio: number;
  readonly ofEstimate: number;
  /** 1 where the interval holds 1. */
  readonly ofInterval: number;
}

/**
 * How strongly, on the risk ratio scale, an unmeasured confounder would have to go
 * with both exposure and outcome to explain a ratio away: RR + √(RR (RR − 1)). 3.9
 * (1.8 to 8.7) gives 7.26 and, for the interval, 3.00.
 *
 * Source: VanderWeele & Ding (2017); common outcomes by √OR and VanderWeele (2020).
 */
export function eValue(
  estimate: number,
  interval: Range,
  kind: RatioForEValue = 'risk ratio or rare outcome',
): Maybe<EValue> {
  const refusal = refuseNonPositive({
    estimate, 'lower limit': interval.low, 'upper limit': interval.high,
  });
  if (refusal) return refusal;
  if (interval.low > interval.high) return absence('the limits are out of order');
  const riskRatio = asRiskRatio(estimate, kind);
  const nearer = nearerToOne(interval);
  const limit = nearer === 1 ? 1 : asRiskRatio(nearer, kind);
  if (isAbsence(riskRatio)) return riskRatio;
  if (isAbsence(limit)) return limit;
  return { riskRatio, ofEstimate: eValueOf(riskRatio), ofInterval: eValueOf(limit) };
}

function asRiskRatio(ratio: number, kind: RatioForEValue): Maybe<number> {
  switch (kind) {
    case 'risk ratio or rare outcome':
      return ratio;
    case 'common odds ratio':
      return Math.sqrt(ratio);
    case 'common hazard ratio':
      return commonOutcomeRiskRatio(ratio);
    default:
      return kind satisfies never;
  }
}

function nearerToOne({ low, high }: Range): number {
  if (low > 1) return low;
  return high < 1 ? high : 1;
}

function eValueOf(riskRatio: number): number {
  const ratio = riskRatio < 1 ? 1 / riskRatio : riskRatio;
  return ratio + Math.sqrt(ratio * (ratio - 1));
}
