import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Maybe } from './absence.ts';
import { quotients } from './ratio-of-rounded.ts';

/** What two risks known as ranges can say of each other. */
export interface RiskRatioRanges {
  readonly riskRatio: Range;
  readonly oddsRatio: Range;
  readonly riskDifference: Range;
}

/**
 * The crude measures of two printed percentages, as ranges that allow for their
 * rounding. 18% against 24%, which stand for 0.175 to 0.185 and 0.235 to 0.245, allow a
 * risk ratio of 0.714 to 0.787. Shares on the scale 0 to 1; the unexposed one above 0,
 * and both below 1, or the ratios have an end at ∞.
 */
export function ratiosOfRisks(exposed: Range, unexposed: Range): Maybe<RiskRatioRanges> {
  if (!isShare(exposed) || !isShare(unexposed)) {
    return absence('a risk is not a range between 0 and 1');
  }
  const riskRatio = quotients(exposed, unexposed);
  if (isAbsence(riskRatio)) return riskRatio;
  return {
    riskRatio,
    oddsRatio: {
      low: (riskRatio.low * (1 - unexposed.high)) / (1 - exposed.low),
      high: exposed.high === 1
        ? Infinity : (riskRatio.high * (1 - unexposed.low)) / (1 - exposed.high),
    },
    riskDifference: { low: exposed.low - unexposed.high, high: exposed.high - unexposed.low },
  };
}

function isShare({ low, high }: Range): boolean {
  return low >= 0 && low <= high && high <= 1 && low < 1;
}
