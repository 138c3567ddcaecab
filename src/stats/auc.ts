import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Absence, type Maybe } from './absence.ts';
import { refuseClosedShares, refuseCounts, refuseNonPositive, refuseShares } from './admissible.ts';
import { multiplier, twoSidedP } from './normal.ts';

/** How sure an area under the ROC curve is, as far as its size and the group sizes tell. */
export interface AucPrecision {
  /** Hanley & McNeil's (1982) standard error. */
  readonly standardError: number;
  /** Estimate plus and minus; it may pass 1, as printed ones do. */
  readonly interval: Range;
  /** That two cases outrank one control, and one case two controls, under their model. */
  readonly q1: number;
  readonly q2: number;
  /** The standard error if the area were 0.5 (Mann & Whitney). */
  readonly nullStandardError: number;
  /** (A − 0.5) over the former, and its two-sided p. */
  readonly z: number;
  readonly p: number;
  /** No standard error can exceed √(A (1 − A)/min(n₁, n₀)) (Birnbaum & Klose 1957). */
  readonly largestStandardError: number;
}

/**
 * The precision of an area under the ROC curve from the numbers of people with and
 * without the event: 0.893 with 51 and 58 has a standard error of 0.0325.
 *
 * Source: Hanley & McNeil (1982), which assumes exponential scores; DeLong's, from the
 * data, is usually within 0.6 to 1.6 times of it. The area is on the scale 0 to 1.
 */
export function aucPrecision(
  auc: number,
  cases: number,
  controls: number,
  level = 95,
): Maybe<AucPrecision> {
  const refusal = refuseAuc(auc, cases, controls);
  if (refusal) return refusal;
  const reach = multiplier(level);
  if (isAbsence(reach)) return reach;
  const q1 = auc / (2 - auc);
  const q2 = (2 * auc * auc) / (1 + auc);
  const spread = auc * (1 - auc)
    + (cases - 1) * (q1 - auc * auc) + (controls - 1) * (q2 - auc * auc);
  const standardError = Math.sqrt(Math.max(0, spread) / cases / controls);
  const nullStandardError = Math.sqrt((cases + controls + 1) / (12 * cases * controls));
  const z = (auc - 0.5) / nullStandardError;
  return {
    standardError,
    interval: { low: auc - reach * standardError, high: auc + reach * standardError },
    q1,
    q2,
    nullStandardError,
    z,
    p: twoSidedP(z),
    largestStandardError: Math.sqrt((auc * (1 - auc)) / Math.min(cases, controls)),
  };
}

/** Somers' D of an area: 2A − 1, so that 0.8 has 0.6. */
export function somersD(auc: number): Maybe<number> {
  return refuseShares({ auc }) ?? 2 * auc - 1;
}

/** How two areas differ, given how they vary together. */
export interface AucDifference {
  readonly difference: number;
  readonly z: number;
  readonly p: number;
  readonly correlation: number;
  /** The z if the covariance were left out, as of different people. */
  readonly zIfIndependent: number;
}

/**
 * The test of two areas on the same people (DeLong et al. 1988), from their variances
 * and covariance: leaving the covariance out makes paired areas look more alike. 0.731
 * and 0.824 with 0.00267, 0.00147 and 0.00120 give z = −2.21, not −1.43.
 */
export function aucDifference(
  areas: readonly [number, number],
  variances: readonly [number, number],
  covariance: number,
): Maybe<AucDifference> {
  const [first, second] = areas;
  const refusal = refuseShares({ 'first area': first, 'second area': second })
    ?? refuseNonPositive({ 'first variance': variances[0], 'second variance': variances[1] });
  if (refusal) return refusal;
  const correlation = covariance / Math.sqrt(variances[0] * variances[1]);
  if (!(Math.abs(correlation) <= 1)) return absence('the covariance exceeds the variances');
  const variance = variances[0] + variances[1] - 2 * covariance;
  if (!(variance > 0)) return absence('the difference has no variance');
  const difference = first - second;
  const z = difference / Math.sqrt(variance);
  const zIfIndependent = difference / Math.sqrt(variances[0] + variances[1]);
  return { difference, z, p: twoSidedP(z), correlation, zIfIndependent };
}

function refuseAuc(auc: number, cases: number, controls: number): Absence | undefined {
  return refuseClosedShares({ auc }) ?? refuseCounts({ cases, controls })
    ?? refuseNonPositive({ cases, controls });
}
