import type { Range } from '../model/index.ts';
import { absence, type Maybe } from './absence.ts';
import { refuseInfinite, refuseNonPositive, refuseShares } from './admissible.ts';

/** The share of events that a risk ratio puts down to the exposure, on the scale 0 to 1. */
export interface AttributableFractions {
  /** Among the exposed: (RR − 1)/RR. */
  readonly amongExposed: number;
  /** Among all, from the prevalence of exposure in all (Levin 1953); crude ratios only. */
  readonly levin: number;
  /** The prevalence of exposure among those with the event that a crude ratio implies. */
  readonly prevalenceAmongCases: number;
}

/**
 * Attributable fractions of a crude risk ratio: 30% exposed and a ratio of 2 give 0.5
 * among the exposed and 0.231 among all. Levin's formula does not hold for an adjusted
 * ratio (Rockhill, Newman & Weinberg 1998); `populationFraction` does.
 */
export function attributableFractions(
  riskRatio: number,
  prevalence: number,
): Maybe<AttributableFractions> {
  const refusal = refuseNonPositive({ riskRatio }) ?? refuseShares({ prevalence });
  if (refusal) return refusal;
  const excess = prevalence * (riskRatio - 1);
  return {
    amongExposed: 1 - 1 / riskRatio,
    levin: excess / (1 + excess),
    prevalenceAmongCases: (prevalence * riskRatio) / (1 + excess),
  };
}

/**
 * The fraction among all from the prevalence of exposure among those with the event,
 * which also holds for an adjusted ratio: 0.4615 and 2 give 0.231. Source: Miettinen (1974).
 */
export function populationFraction(riskRatio: number, prevalenceAmongCases: number): Maybe<number> {
  const refusal = refuseNonPositive({ riskRatio }) ?? refuseShares({ prevalenceAmongCases });
  return refusal ?? prevalenceAmongCases * (1 - 1 / riskRatio);
}

/** An efficacy in percent with its limits, which are the ratio's the other way round. */
export interface Efficacy {
  readonly percent: number;
  readonly interval: Range;
}

/**
 * Vaccine efficacy or relative risk reduction, 100 (1 − RR): 0.05 (0.024 to 0.098) is 95%
 * (90.2 to 97.6). An upper limit of ∞ leaves the lower efficacy at −∞.
 */
export function efficacyOfRatio(ratio: number, limits: Range): Maybe<Efficacy> {
  const refusal = refuseNonPositive({ ratio });
  if (refusal) return refusal;
  if (!(limits.low >= 0 && limits.low <= limits.high)) {
    return absence('the limits are out of order');
  }
  return {
    percent: 100 * (1 - ratio),
    interval: { low: 100 * (1 - limits.high), high: 100 * (1 - limits.low) },
  };
}

/** By how many percent a ratio is above or below 1: 1.35 is +35, 0.65 is −35, 3 is +200. */
export function percentChange(ratio: number): Maybe<number> {
  return refuseNonPositive({ ratio }) ?? 100 * (ratio - 1);
}

/** The ratio of a change in percent: +35 is 1.35. A fall of 100% or more leaves no ratio. */
export function ratioOfPercentChange(percent: number): Maybe<number> {
  const refusal = refuseInfinite({ percent });
  if (refusal) return refusal;
  return percent > -100 ? 1 + percent / 100 : absence(`a change of ${percent}% leaves no ratio`);
}
