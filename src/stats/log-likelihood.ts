import { absence, isAbsence, type Maybe } from './absence.ts';
import { refuseCounts, refuseExcess, refuseInfinite, refuseNonPositive } from './admissible.ts';
import { chiSquareTest, type ChiSquareTest } from './chi-square-test.ts';

/** A fitted logistic model by its size and log likelihood. */
export interface LogisticFit {
  readonly total: number;
  readonly events: number;
  readonly logLikelihood: number;
  /** All parameters, the intercept among them. */
  readonly parameters: number;
}

/** What a log likelihood says of a logistic model. */
export interface LogisticSummary {
  readonly nullLogLikelihood: number;
  /** Against the model with the intercept alone; absent for that model itself. */
  readonly likelihoodRatio: Maybe<ChiSquareTest>;
  readonly deviance: number;
  readonly nullDeviance: number;
  readonly aic: number;
  readonly bic: number;
  readonly mcFadden: number;
  readonly coxSnell: number;
  readonly nagelkerke: number;
}

/**
 * The likelihood-ratio test, AIC, BIC and pseudo-R² of a logistic model. 43 events of
 * 100, log likelihood −53.6765 and 2 parameters give 29.31 on 1, AIC 111.35, and R² of
 * 0.214 (McFadden), 0.254 (Cox & Snell), 0.341 (Nagelkerke).
 *
 * Assumes one row a person and no weights. A likelihood above 0 or below that of the
 * intercept alone cannot be of such a model, and is refused.
 */
export function logisticSummary(fit: LogisticFit): Maybe<LogisticSummary> {
  const { total, events, logLikelihood, parameters } = fit;
  const nullLogLikelihood = logLikelihoodOfIntercept(events, total);
  if (isAbsence(nullLogLikelihood)) return nullLogLikelihood;
  const refusal = refuseCounts({ parameters }) ?? refuseNonPositive({ parameters });
  if (refusal) return refusal;
  if (!(logLikelihood <= 0)) return absence('a log likelihood of single people is at most 0');
  const gain = likelihoodGain(logLikelihood, nullLogLikelihood);
  if (isAbsence(gain)) return gain;
  const coxSnell = -Math.expm1(-gain / total);
  return {
    nullLogLikelihood,
    likelihoodRatio: testOfGain(gain, parameters - 1),
    deviance: -2 * logLikelihood,
    nullDeviance: -2 * nullLogLikelihood,
    aic: 2 * parameters - 2 * logLikelihood,
    bic: parameters * Math.log(total) - 2 * logLikelihood,
    mcFadden: gain / (-2 * nullLogLikelihood),
    coxSnell,
    nagelkerke: coxSnell / -Math.expm1((2 * nullLogLikelihood) / total),
  };
}

/**
 * The log likelihood of a logistic model with the intercept alone, D ln(D/N) + (N − D)
 * ln(1 − D/N): 43 of 100 have −68.33.
 */
export function logLikelihoodOfIntercept(events: number, total: number): Maybe<number> {
  const refusal = refuseCounts({ events, total }) ?? refuseExcess(events, total, 'events');
  if (refusal) return refusal;
  if (events === 0 || events === total) return absence('nobody or everybody has the event');
  return events * Math.log(events / total) + (total - events) * Math.log1p(-events / total);
}

/** A Cox or other model by its two log likelihoods. */
export interface NestedFit {
  readonly nullLogLikelihood: number;
  readonly logLikelihood: number;
  /** By how many parameters the model is larger than the null one. */
  readonly parameters: number;
}

/**
 * The likelihood-ratio test and AIC from two log likelihoods: −744.480 and −729.230
 * with 3 parameters give 30.50 on 3 and, the null model having none, AIC 1464.46.
 */
export function nestedSummary(
  fit: NestedFit,
): Maybe<{ readonly likelihoodRatio: ChiSquareTest; readonly aic: number }> {
  const { nullLogLikelihood, logLikelihood, parameters } = fit;
  const refusal = refuseInfinite({ nullLogLikelihood, logLikelihood })
    ?? refuseCounts({ parameters });
  if (refusal) return refusal;
  const gain = likelihoodGain(logLikelihood, nullLogLikelihood);
  if (isAbsence(gain)) return gain;
  const likelihoodRatio = testOfGain(gain, parameters);
  if (isAbsence(likelihoodRatio)) return likelihoodRatio;
  return { likelihoodRatio, aic: 2 * parameters - 2 * logLikelihood };
}

/** Twice the difference; a hair below 0 is 0, and more cannot be of nested models. */
function likelihoodGain(logLikelihood: number, nullLogLikelihood: number): Maybe<number> {
  const gain = 2 * (logLikelihood - nullLogLikelihood);
  if (gain >= 0) return gain;
  if (gain > -1e-9 * Math.abs(nullLogLikelihood)) return 0;
  return absence('the larger model has the lower log likelihood');
}

function testOfGain(gain: number, parameters: number): Maybe<ChiSquareTest> {
  return parameters < 1
    ? absence('there is nothing to test beside the intercept')
    : chiSquareTest(gain, parameters);
}
