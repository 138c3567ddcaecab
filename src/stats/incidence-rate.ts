import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Maybe } from './absence.ts';
import { refuseCounts, refuseNonPositive } from './admissible.ts';
import { binomialP } from './binomial.ts';
import { estimatedFrom, ratioFromLog, type Estimated, type EstimatedRatio } from './estimated.ts';
import { exactCountInterval } from './poisson-count.ts';
import { clopperPearsonInterval } from './proportion-interval.ts';
import { dividedBy } from './spread.ts';

/** Events over person-time, with an exact and, where there are events, a log interval. */
export interface IncidenceRate {
  readonly rate: number;
  readonly exact: Range;
  /** rate × exp(± multiplier/√events). */
  readonly onLogScale: Maybe<Range>;
}

/**
 * A rate per `per` units of person-time: 54 events in 1234 person-years are 43.8 per
 * 1000 (exact 32.9 to 57.1). Assumes independent events (Poisson). Level in percent.
 */
export function incidenceRate(
  events: number,
  personTime: number,
  per = 1,
  level = 95,
): Maybe<IncidenceRate> {
  const refusal = refuseCounts({ events }) ?? refuseNonPositive({ personTime, per });
  if (refusal) return refusal;
  const exact = exactCountInterval(events, level);
  if (isAbsence(exact)) return exact;
  const units = personTime / per;
  const onLogScale = events === 0
    ? absence('there are no events')
    : ratioFromLog(Math.log(events / units), 1 / Math.sqrt(events), level);
  return {
    rate: events / units,
    exact: dividedBy(exact, units),
    onLogScale: isAbsence(onLogScale) ? onLogScale : onLogScale.interval,
  };
}

/** The events and person-time of two groups. */
export interface TwoRates {
  readonly exposedEvents: number;
  readonly exposedTime: number;
  readonly unexposedEvents: number;
  readonly unexposedTime: number;
}

/**
 * The crude incidence rate ratio with the interval of its log, whose standard error
 * is √(1/x₁ + 1/x₀). British doctors: 630 in 142247 against 101 in 39220 person-years
 * give 1.720 (1.394 to 2.122). Assumes Poisson counts. Refused without events in a group.
 */
export function incidenceRateRatio(rates: TwoRates, level = 95): Maybe<EstimatedRatio> {
  const refusal = refuseRates(rates);
  if (refusal) return refusal;
  const { exposedEvents, exposedTime, unexposedEvents, unexposedTime } = rates;
  if (exposedEvents === 0 || unexposedEvents === 0) return absence('a group has no events');
  const ratio = (exposedEvents / exposedTime) / (unexposedEvents / unexposedTime);
  const standardError = Math.sqrt(1 / exposedEvents + 1 / unexposedEvents);
  return ratioFromLog(Math.log(ratio), standardError, level);
}

/**
 * The exact interval and p of a rate ratio, given the number of events in both groups
 * together: those among the exposed are then binomial. The same doctors: 1.392 to
 * 2.144, p = 1.0e-7 (the sum over all outcomes no more probable, as R's poisson.test).
 */
export function exactRateRatio(
  rates: TwoRates,
  level = 95,
): Maybe<{ readonly interval: Range; readonly p: number }> {
  const refusal = refuseRates(rates);
  if (refusal) return refusal;
  const { exposedEvents, exposedTime, unexposedEvents, unexposedTime } = rates;
  const total = exposedEvents + unexposedEvents;
  if (total === 0) return absence('there are no events');
  const share = clopperPearsonInterval(exposedEvents, total, level);
  if (isAbsence(share)) return share;
  const odds = (s: number): number => (s / (1 - s)) * (unexposedTime / exposedTime);
  const p = binomialP(exposedEvents, total, exposedTime / (exposedTime + unexposedTime));
  if (isAbsence(p)) return p;
  return { interval: { low: odds(share.low), high: odds(share.high) }, p };
}

/**
 * The difference of two rates, per `per` units of person-time, with Wald's interval:
 * the same doctors per 1000 person-years differ by 1.854 (1.244 to 2.463).
 */
export function rateDifference(rates: TwoRates, per = 1, level = 95): Maybe<Estimated> {
  const refusal = refuseRates(rates) ?? refuseNonPositive({ per });
  if (refusal) return refusal;
  const { exposedEvents, exposedTime, unexposedEvents, unexposedTime } = rates;
  const difference = exposedEvents / exposedTime - unexposedEvents / unexposedTime;
  const variance = exposedEvents / exposedTime ** 2 + unexposedEvents / unexposedTime ** 2;
  return estimatedFrom(difference * per, Math.sqrt(variance) * per, level);
}

function refuseRates(rates: TwoRates): ReturnType<typeof refuseCounts> {
  const { exposedEvents, exposedTime, unexposedEvents, unexposedTime } = rates;
  return refuseCounts({ exposedEvents, unexposedEvents })
    ?? refuseNonPositive({ exposedTime, unexposedTime });
}
