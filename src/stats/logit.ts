import { absence, type Maybe } from './absence.ts';
import { refuseClosedShares, refuseInfinite } from './admissible.ts';

/** One term of a linear predictor: a coefficient and the value of its variable. */
export interface Term {
  readonly coefficient: number;
  readonly value: number;
}

/** The linear predictor of a logistic model, a log odds, and the probability it stands for. */
export interface Prediction {
  readonly logit: number;
  readonly probability: number;
}

/**
 * The probability that a logistic model predicts: 1/(1 + exp(−(b₀ + Σ b x))). An
 * intercept of −5.309 and 0.1109 per year of age predict 0.559 at 50. In case-control
 * data the intercept is not a baseline, and the probability means nothing.
 */
export function predictedProbability(intercept: number, terms: readonly Term[]): Maybe<Prediction> {
  const refusal = refuseInfinite({ intercept })
    ?? terms.map(({ coefficient, value }) => refuseInfinite({ coefficient, value }))
      .find((refused) => refused !== undefined);
  if (refusal) return refusal;
  const logit = terms.reduce((so, { coefficient, value }) => so + coefficient * value, intercept);
  return { logit, probability: inverseLogit(logit) };
}

/** The log odds of a probability: 0.5 has 0, 0.9 has 2.197. */
export function logitOfProbability(probability: number): Maybe<number> {
  return refuseClosedShares({ probability })
    ?? Math.log(probability) - Math.log1p(-probability);
}

/** The probability of a log odds: 0 has 0.5. No digit is lost at either end. */
export function probabilityOfLogit(logit: number): Maybe<number> {
  return refuseInfinite({ logit }) ?? inverseLogit(logit);
}

function inverseLogit(logit: number): number {
  return logit < 0 ? Math.exp(logit) / (1 + Math.exp(logit)) : 1 / (1 + Math.exp(-logit));
}

/**
 * Where a model of one variable predicts a given probability: −5.309 + 0.1109 x is
 * even at x = 47.87.
 */
export function valueAtProbability(
  intercept: number,
  coefficient: number,
  probability = 0.5,
): Maybe<number> {
  const refusal = refuseInfinite({ intercept, coefficient }) ?? refuseClosedShares({ probability });
  if (refusal) return refusal;
  if (coefficient === 0) return absence('a coefficient of 0 predicts the same everywhere');
  return (Math.log(probability) - Math.log1p(-probability) - intercept) / coefficient;
}
