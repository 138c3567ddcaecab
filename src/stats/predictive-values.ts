import { absence, type Maybe } from './absence.ts';
import { refuseShares } from './admissible.ts';

/** What a test says at a prevalence. All but the ratios are shares. */
export interface PredictiveValues {
  readonly positive: Maybe<number>;
  readonly negative: Maybe<number>;
  readonly accuracy: number;
  /** Sensitivity + specificity − 1. */
  readonly youden: number;
  readonly positiveLikelihoodRatio: Maybe<number>;
  readonly negativeLikelihoodRatio: Maybe<number>;
  readonly diagnosticOddsRatio: Maybe<number>;
}

/**
 * Predictive values by Bayes' theorem: sensitivity and specificity of 0.9 at a
 * prevalence of 0.01 give a positive predictive value of 0.083. Source: Altman & Bland
 * (1994). Values of a case-control study are at no real prevalence.
 */
export function predictiveValues(
  sensitivity: number,
  specificity: number,
  prevalence: number,
): Maybe<PredictiveValues> {
  const refusal = refuseShares({ sensitivity, specificity, prevalence });
  if (refusal) return refusal;
  const truePositive = sensitivity * prevalence;
  const falsePositive = (1 - specificity) * (1 - prevalence);
  const trueNegative = specificity * (1 - prevalence);
  const falseNegative = (1 - sensitivity) * prevalence;
  return {
    positive: quotient(truePositive, truePositive + falsePositive, 'nobody tests positive'),
    negative: quotient(trueNegative, trueNegative + falseNegative, 'nobody tests negative'),
    accuracy: truePositive + trueNegative,
    youden: sensitivity + specificity - 1,
    positiveLikelihoodRatio: quotient(sensitivity, 1 - specificity, 'the specificity is 1'),
    negativeLikelihoodRatio: quotient(1 - sensitivity, specificity, 'the specificity is 0'),
    diagnosticOddsRatio: quotient(sensitivity * specificity,
      (1 - sensitivity) * (1 - specificity), 'the sensitivity or the specificity is 1'),
  };
}

function quotient(numerator: number, denominator: number, whyNot: string): Maybe<number> {
  return denominator === 0 ? absence(whyNot) : numerator / denominator;
}
