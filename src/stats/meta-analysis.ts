import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Absence, type Maybe } from './absence.ts';
import { refuseLevel, refuseNegative, refuseUnsquarable } from './admissible.ts';
import { estimatedFrom, type Estimated } from './estimated.ts';
import { heterogeneityOfQ, type Heterogeneity } from './heterogeneity.ts';
import { multiplier } from './normal.ts';
import { positiveRoot } from './positive-root.ts';
import { rangeAround } from './spread.ts';
import { studentMultiplier, studentP } from './student-t.ts';

/** A study's estimate and variance, on the scale on which studies are pooled: logs for ratios. */
export interface Study {
  readonly estimate: number;
  readonly variance: number;
}

/** The pooled estimate under one true effect, and how much the studies differ from it. */
export interface FixedEffect extends Estimated {
  /** Cochran's Q. */
  readonly q: number;
  readonly heterogeneity: Maybe<Heterogeneity>;
}

/**
 * Studies pooled with weights 1/variance. The 13 BCG trials' log risk ratios give −0.430
 * with standard error 0.0405 and Q = 152.2. Level in percent.
 */
export function fixedEffect(studies: readonly Study[], level = 95): Maybe<FixedEffect> {
  const refusal = refuseStudies(studies, 1);
  if (refusal) return refusal;
  const { centre, total } = weighted(studies, 0);
  const pooled = estimatedFrom(centre, 1 / Math.sqrt(total), level);
  if (isAbsence(pooled)) return pooled;
  const q = spreadAround(studies, centre, 0);
  return { ...pooled, q, heterogeneity: heterogeneityOfQ(q, studies.length) };
}

/**
 * How the variance between studies, τ², is estimated: DerSimonian & Laird (1986) by
 * moments, Paule & Mandel (1982) by making Q equal its degrees of freedom, and REML by
 * restricted maximum likelihood. Reports that use different ones differ honestly.
 */
export type TauMethod = 'DerSimonian–Laird' | 'Paule–Mandel' | 'REML';

/**
 * The variance of true effects between studies, never below 0: BCG log risk ratios have
 * 0.309 (DerSimonian–Laird), 0.318 (Paule–Mandel), 0.313 (REML).
 */
export function betweenStudyVariance(
  studies: readonly Study[],
  method: TauMethod = 'DerSimonian–Laird',
): Maybe<number> {
  const refusal = refuseStudies(studies, 2);
  if (refusal) return refusal;
  switch (method) {
    case 'DerSimonian–Laird':
      return derSimonianLaird(studies);
    case 'Paule–Mandel':
      return pauleMandel(studies);
    case 'REML':
      return restrictedLikelihood(studies);
    default:
      return method satisfies never;
  }
}

/** The mean of true effects that differ, with what follows from it. */
export interface RandomEffects extends Estimated {
  readonly tauSquared: number;
  /** Where the effect of one more study is expected, by the normal; Higgins et al. (2009). */
  readonly predictionNormal: Range;
  /** The same by t on k − 2 degrees of freedom; absent for 2 studies. */
  readonly predictionStudent: Maybe<Range>;
  /** Hartung & Knapp's (2001) interval and p, by t on k − 1 degrees of freedom. */
  readonly hartungKnapp: { readonly interval: Range; readonly p: number };
  /** τ² over itself and a typical variance within studies (Higgins & Thompson 2002), in percent. */
  readonly iSquared: number;
}

/** Studies pooled with weights 1/(variance + τ²): BCG by DerSimonian–Laird give −0.714 (0.179). */
export function randomEffects(
  studies: readonly Study[],
  tauSquared: number,
  level = 95,
): Maybe<RandomEffects> {
  const refusal = refuseStudies(studies, 2) ?? refuseNegative({ 'τ²': tauSquared })
    ?? refuseUnsquarable({ 'τ²': tauSquared })
    ?? refuseLevel(level);
  if (refusal) return refusal;
  const { centre, total } = weighted(studies, tauSquared);
  const pooled = estimatedFrom(centre, 1 / Math.sqrt(total), level);
  if (isAbsence(pooled)) return pooled;
  const reach = multiplier(level);
  const hartungKnapp = hartungKnappOf(studies, tauSquared, level);
  if (isAbsence(reach)) return reach;
  if (isAbsence(hartungKnapp)) return hartungKnapp;
  const spread = Math.sqrt(tauSquared + 1 / total);
  const studentReach = studies.length < 3
    ? absence('two studies leave no degrees of freedom')
    : studentMultiplier(level, studies.length - 2);
  return {
    ...pooled,
    tauSquared,
    predictionNormal: rangeAround(centre, reach * spread),
    predictionStudent: isAbsence(studentReach)
      ? studentReach : rangeAround(centre, studentReach * spread),
    hartungKnapp,
    iSquared: (100 * tauSquared) / (tauSquared + typicalVariance(studies)),
  };
}

function hartungKnappOf(
  studies: readonly Study[],
  tauSquared: number,
  level: number,
): Maybe<RandomEffects['hartungKnapp']> {
  const df = studies.length - 1;
  const { centre, total } = weighted(studies, tauSquared);
  const error = Math.sqrt(spreadAround(studies, centre, tauSquared) / df / total);
  if (error === 0) return absence('the studies all have the same estimate');
  const reach = studentMultiplier(level, df);
  const p = studentP(centre / error, df);
  if (isAbsence(reach)) return reach;
  if (isAbsence(p)) return p;
  return { interval: rangeAround(centre, reach * error), p };
}

function derSimonianLaird(studies: readonly Study[]): number {
  const { centre, total, squares } = weighted(studies, 0);
  const excess = spreadAround(studies, centre, 0) - (studies.length - 1);
  return Math.max(0, excess / (total - squares / total));
}

function pauleMandel(studies: readonly Study[]): number {
  const df = studies.length - 1;
  const excess = (tauSquared: number): number =>
    spreadAround(studies, weighted(studies, tauSquared).centre, tauSquared) - df;
  if (excess(0) <= 0) return 0;
  return positiveRoot((tauSquared) => -excess(tauSquared), smallestVariance(studies));
}

/** Where the slope of the restricted log likelihood in τ² falls through zero. */
function restrictedLikelihood(studies: readonly Study[]): number {
  const slope = (tauSquared: number): number => {
    const { centre, total, squares } = weighted(studies, tauSquared);
    const pull = studies.reduce((so, { estimate, variance }) =>
      so + ((estimate - centre) / (variance + tauSquared)) ** 2, 0);
    return pull - total + squares / total;
  };
  if (slope(0) <= 0) return 0;
  return positiveRoot((tauSquared) => -slope(tauSquared), smallestVariance(studies));
}

/** The weighted mean, the sum of the weights and the sum of their squares. */
function weighted(
  studies: readonly Study[],
  tauSquared: number,
): { readonly centre: number; readonly total: number; readonly squares: number } {
  let [total, squares, moment] = [0, 0, 0];
  for (const { estimate, variance } of studies) {
    const weight = 1 / (variance + tauSquared);
    total += weight;
    squares += weight * weight;
    moment += weight * estimate;
  }
  return { centre: moment / total, total, squares };
}

function spreadAround(studies: readonly Study[], centre: number, tauSquared: number): number {
  return studies.reduce((so, { estimate, variance }) =>
    so + (estimate - centre) ** 2 / (variance + tauSquared), 0);
}

function typicalVariance(studies: readonly Study[]): number {
  const { total, squares } = weighted(studies, 0);
  return ((studies.length - 1) * total) / (total * total - squares);
}

function smallestVariance(studies: readonly Study[]): number {
  return Math.min(...studies.map(({ variance }) => variance));
}

function refuseStudies(studies: readonly Study[], fewest: number): Absence | undefined {
  if (studies.length < fewest) return absence(`it takes at least ${fewest} studies`);
  return studies
    .map(({ estimate, variance }) => refuseUnsquarable({ estimate }) ?? refuseVariance(variance))
    .find((refusal) => refusal !== undefined);
}

/** A variance whose inverse, squared, still has a place among the doubles. */
function refuseVariance(variance: number): Absence | undefined {
  if (variance >= 1e-100 && variance <= 1e100) return undefined;
  return absence(`a variance of ${variance} is not between 1e-100 and 1e100`);
}
