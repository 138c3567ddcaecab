import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Maybe } from './absence.ts';
import { refuseCounts } from './admissible.ts';
import type { EstimatedRatio } from './estimated.ts';
import { oddsRatio } from './odds-ratio.ts';
import { clopperPearsonInterval, wilsonInterval } from './proportion-interval.ts';
import { riskRatio } from './risk-ratio.ts';

/** People by what a test said and whether they had the condition. */
export interface DiagnosticTable {
  readonly truePositives: number;
  readonly falsePositives: number;
  readonly falseNegatives: number;
  readonly trueNegatives: number;
}

/** A share with its two usual intervals. */
export interface ShareWithIntervals {
  readonly share: number;
  readonly wilson: Range;
  readonly clopperPearson: Range;
}

/** What a table of test against condition gives. Ratios are absent where a cell is empty. */
export interface DiagnosticAccuracy {
  readonly sensitivity: ShareWithIntervals;
  readonly specificity: ShareWithIntervals;
  readonly positivePredictiveValue: Maybe<ShareWithIntervals>;
  readonly negativePredictiveValue: Maybe<ShareWithIntervals>;
  readonly prevalence: number;
  readonly accuracy: number;
  readonly youden: number;
  readonly positiveLikelihoodRatio: Maybe<EstimatedRatio>;
  readonly negativeLikelihoodRatio: Maybe<EstimatedRatio>;
  readonly diagnosticOddsRatio: Maybe<EstimatedRatio>;
  /** The harmonic mean of sensitivity and positive predictive value. */
  readonly f1: number;
  /** Cohen's κ of test and condition. */
  readonly kappa: number;
}

/**
 * Accuracy of a test from counts. A liver scan with 231 true and 32 false positives, 27
 * false and 54 true negatives: sensitivity 0.895, specificity 0.628, likelihood ratios
 * 2.41 (1.82 to 3.18) and 0.167 (0.113 to 0.247), diagnostic odds ratio 14.4.
 *
 * Source: Altman & Bland (1994); likelihood ratio intervals of Simel, Samsa & Matchar
 * (1991), which are Katz's. Level in percent.
 */
export function diagnosticAccuracy(table: DiagnosticTable, level = 95): Maybe<DiagnosticAccuracy> {
  const { truePositives, falsePositives, falseNegatives, trueNegatives } = table;
  const refusal = refuseCounts({ ...table });
  if (refusal) return refusal;
  const diseased = truePositives + falseNegatives;
  const healthy = falsePositives + trueNegatives;
  if (diseased === 0) return absence('there is nobody with the condition');
  if (healthy === 0) return absence('there is nobody without the condition');
  const sensitivity = shareOf(truePositives, diseased, level);
  const specificity = shareOf(trueNegatives, healthy, level);
  if (isAbsence(sensitivity)) return sensitivity;
  if (isAbsence(specificity)) return specificity;
  const total = diseased + healthy;
  return {
    sensitivity,
    specificity,
    positivePredictiveValue: shareOf(truePositives, truePositives + falsePositives, level),
    negativePredictiveValue: shareOf(trueNegatives, trueNegatives + falseNegatives, level),
    prevalence: diseased / total,
    accuracy: (truePositives + trueNegatives) / total,
    youden: sensitivity.share + specificity.share - 1,
    ...ratiosOf(table, level),
    f1: (2 * truePositives) / (2 * truePositives + falsePositives + falseNegatives) || 0,
    kappa: kappaOf(table),
  };
}

/** A likelihood ratio is a risk ratio of testing so; the diagnostic odds ratio is an odds ratio. */
function ratiosOf(
  { truePositives, falsePositives, falseNegatives, trueNegatives }: DiagnosticTable,
  level: number,
): Pick<DiagnosticAccuracy,
  'positiveLikelihoodRatio' | 'negativeLikelihoodRatio' | 'diagnosticOddsRatio'> {
  const positive = {
    exposedEvents: truePositives, exposedNonEvents: falseNegatives,
    unexposedEvents: falsePositives, unexposedNonEvents: trueNegatives,
  };
  const negative = {
    exposedEvents: falseNegatives, exposedNonEvents: truePositives,
    unexposedEvents: trueNegatives, unexposedNonEvents: falsePositives,
  };
  return {
    positiveLikelihoodRatio: riskRatio(positive, level),
    negativeLikelihoodRatio: riskRatio(negative, level),
    diagnosticOddsRatio: oddsRatio(positive, level),
  };
}

function shareOf(count: number, total: number, level: number): Maybe<ShareWithIntervals> {
  const wilson = wilsonInterval(count, total, level);
  const clopperPearson = clopperPearsonInterval(count, total, level);
  if (isAbsence(wilson)) return wilson;
  if (isAbsence(clopperPearson)) return clopperPearson;
  return { share: count / total, wilson, clopperPearson };
}

function kappaOf(table: DiagnosticTable): number {
  const { truePositives: a, falsePositives: b, falseNegatives: c, trueNegatives: d } = table;
  const crossed = (a + b) * (b + d) + (a + c) * (c + d);
  return (2 * (a * d - b * c)) / crossed;
}
