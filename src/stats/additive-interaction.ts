import { absence, type Maybe } from './absence.ts';
import { refuseNonPositive } from './admissible.ts';

/**
 * Ratios against those exposed to neither of two factors: to the first alone, to the
 * second alone, and to both. Alcohol and smoking in oral cancer: 3.33, 2.96 and 9.04.
 */
export interface JointRatios {
  readonly firstOnly: number;
  readonly secondOnly: number;
  readonly both: number;
}

/** Departure from additivity and from multiplicativity. */
export interface AdditiveInteraction {
  /** Relative excess risk due to interaction: both − first − second + 1. Additive at 0. */
  readonly excessRisk: number;
  /** The share of the joint ratio that is due to interaction. */
  readonly attributableProportion: number;
  /** (both − 1)/((first − 1) + (second − 1)). Additive at 1. */
  readonly synergy: Maybe<number>;
  /** both/(first × second). Multiplicative at 1, as any model without a product term has it. */
  readonly multiplicative: number;
}

/**
 * RERI, AP, S and the ratio of ratios: 3.33, 2.96 and 9.04 give 3.75, 0.415, 1.87 and
 * 0.917. Source: Rothman (1986); Hosmer & Lemeshow (1992). Odds ratios stand in for risk
 * ratios only where the outcome is rare.
 */
export function additiveInteraction(ratios: JointRatios): Maybe<AdditiveInteraction> {
  const refusal = refuseNonPositive({ ...ratios });
  if (refusal) return refusal;
  const { firstOnly, secondOnly, both } = ratios;
  const excessRisk = both - firstOnly - secondOnly + 1;
  const alone = firstOnly - 1 + (secondOnly - 1);
  return {
    excessRisk,
    attributableProportion: excessRisk / both,
    synergy: alone === 0 ? absence('the factors alone raise no risk') : (both - 1) / alone,
    multiplicative: both / (firstOnly * secondOnly),
  };
}
