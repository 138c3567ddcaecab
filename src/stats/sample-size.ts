import { absence, type Maybe } from './absence.ts';
import { refuseClosedShares, refuseInfinite, refuseNonPositive } from './admissible.ts';
import { zOfUpperTail } from './normal.ts';

/** What a sample size is worked out for. */
export interface Design {
  /** The chance to find what is there: 0.8. */
  readonly power: number;
  /** Two-sided: 0.05. */
  readonly significance: number;
}

/**
 * The people per group that tell two proportions apart, before rounding up, with the
 * pooled variance under no difference and without pooling: 0.2 and 0.1 at 80% power and
 * 5% take 199.0 or 196.2. Source: Fleiss; the former is R's power.prop.test.
 */
export function sampleSizeForProportions(
  first: number,
  second: number,
  { power, significance }: Design,
): Maybe<{ readonly pooled: number; readonly unpooled: number }> {
  const refusal = refuseClosedShares({ first, second, power, significance });
  if (refusal) return refusal;
  if (first === second) return absence('the proportions do not differ');
  const alpha = zOfUpperTail(significance / 2);
  const beta = zOfUpperTail(1 - power);
  const unsound = refuseInfinite({ 'z of the significance': alpha, 'z of the power': beta });
  if (unsound) return unsound;
  const middle = (first + second) / 2;
  const apart = first * (1 - first) + second * (1 - second);
  const together = 2 * middle * (1 - middle);
  const square = (first - second) ** 2;
  return {
    pooled: (alpha * Math.sqrt(together) + beta * Math.sqrt(apart)) ** 2 / square,
    unpooled: ((alpha + beta) ** 2 * apart) / square,
  };
}

/**
 * The events that a log-rank test of a hazard ratio takes, before rounding up: (z_α/2 +
 * z_β)²/(π (1 − π) ln² HR), π being the share in one arm. 0.75 at 80% power, 5% and equal
 * arms takes 379.4. Source: Schoenfeld (1983).
 */
export function eventsForHazardRatio(
  hazardRatio: number,
  { power, significance }: Design,
  allocation = 0.5,
): Maybe<number> {
  const refusal = refuseNonPositive({ hazardRatio })
    ?? refuseClosedShares({ power, significance, allocation });
  if (refusal) return refusal;
  if (hazardRatio === 1) return absence('a hazard ratio of 1 is no difference');
  const reach = zOfUpperTail(significance / 2) + zOfUpperTail(1 - power);
  const unsound = refuseInfinite({ 'sum of the two z': reach });
  return unsound ?? (reach / Math.log(hazardRatio)) ** 2 / (allocation * (1 - allocation));
}
