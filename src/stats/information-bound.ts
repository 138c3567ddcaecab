import { absence, type Maybe } from './absence.ts';
import { refuseCounts, refuseExcess, refuseNonPositive } from './admissible.ts';

/** The smallest standard errors of log ratios that a number of events allows. */
export interface SmallestStandardErrors {
  /** Of a log odds ratio for a binary exposure: 2 √(1/D + 1/(N − D)). A bound. */
  readonly logOddsRatio: number;
  /** Of a log hazard ratio for a binary exposure: 2/√D. A bound. */
  readonly logHazardRatio: number;
  /** Of a log risk ratio for halves that do not differ: 2 √(1/D − 1/N). Not a bound. */
  readonly logRiskRatioIfEqual: number;
  /** Of a log odds ratio per standard deviation near 1: √(N/(D (N − D))). Not a bound. */
  readonly logOddsRatioPerDeviation: number;
}

/**
 * How narrow an interval can be with D events among N people. 20 of 200 allow a log
 * odds ratio of two groups no standard error below 0.471.
 *
 * For two groups the information is at most D(N − D)/4N in a logistic and D/4 in a Cox
 * model, and adjustment can only lower it (Robinson & Jewell 1991; Schoenfeld 1983).
 * Not for penalised, weighted, clustered or pooled analyses, nor for measured exposures.
 */
export function smallestStandardErrors(
  events: number,
  total: number,
): Maybe<SmallestStandardErrors> {
  const refusal = refuseCounts({ events, total }) ?? refuseExcess(events, total, 'events');
  if (refusal) return refusal;
  if (events === 0 || events === total) return absence('nobody or everybody has the event');
  const others = total - events;
  return {
    logOddsRatio: 2 * Math.sqrt(1 / events + 1 / others),
    logHazardRatio: 2 / Math.sqrt(events),
    logRiskRatioIfEqual: 2 * Math.sqrt(1 / events - 1 / total),
    logOddsRatioPerDeviation: Math.sqrt(total / events / others),
  };
}

/**
 * The fewest events that a standard error of a log hazard ratio of two groups needs,
 * 4/SE²: 0.164 needs 148. A printed interval that needs more than there were is too
 * narrow for a Cox model.
 */
export function fewestEvents(standardError: number): Maybe<number> {
  return refuseNonPositive({ standardError }) ?? 4 / standardError ** 2;
}
