import { absence, type Absence, type Maybe } from './absence.ts';
import {
  LARGEST_COUNT, refuseClosedShares, refuseCounts, refuseNonPositive,
} from './admissible.ts';
import { gammaTails } from './incomplete-gamma.ts';
import { logPoissonMass } from './mass.ts';
import { noMoreProbable } from './no-more-probable.ts';
import { firstWhere } from './search.ts';
import type { CountTails } from './tails.ts';

/**
 * The probabilities of a count of independent events when `mean` are expected: 3
 * at a mean of 2 has 0.180447 exactly and 0.323324 at least.
 *
 * Source: the Poisson tail as an incomplete gamma (Abramowitz & Stegun 26.4.21).
 * Accuracy: 1e-13 of each down to 1e-300.
 */
export function poissonTails(events: number, mean: number): Maybe<CountTails> {
  const refusal = refuseCounts({ events }) ?? refuseMean(mean);
  return refusal ?? tailsOf(events, mean);
}

/**
 * The exact two-sided p of a count when `mean` are expected, the sum over all counts no
 * more probable: 107 against 94 gives 0.1797. R's poisson.test gives the same.
 */
export function poissonP(events: number, mean: number): Maybe<number> {
  const refusal = refuseCounts({ events }) ?? refuseNonPositive({ mean }) ?? refuseMean(mean);
  if (refusal) return refusal;
  // From e times the mean on, every count is less probable than none at all.
  const most = Math.ceil(3 * mean) + events + 10;
  return noMoreProbable(events, mean, most, (count) => tailsOf(count, mean));
}

/** The smallest count with at least the share `lower` up to it: 0.975 at a mean of 2 gives 5. */
export function poissonQuantile(lower: number, mean: number): Maybe<number> {
  const refusal = refuseClosedShares({ probability: lower }) ?? refuseMean(mean);
  if (refusal) return refusal;
  // Beyond 40 deviations and 1500 events less is left than a double can tell from nothing.
  const most = Math.ceil(mean + 40 * Math.sqrt(mean)) + 1500;
  return firstWhere((k) => tailsOf(k, mean).atMost >= lower, 0, most);
}

function tailsOf(events: number, mean: number): CountTails {
  return {
    exactly: mass(events, mean),
    atMost: gammaTails(events + 1, mean).upper,
    atLeast: events === 0 ? 1 : gammaTails(events, mean).lower,
  };
}

function refuseMean(mean: number): Absence | undefined {
  if (mean >= 0 && mean <= LARGEST_COUNT) return undefined;
  return absence(`a mean of ${mean} is not between 0 and 1e10`);
}

function mass(events: number, mean: number): number {
  if (events === 0) return Math.exp(-mean);
  return mean === 0 ? 0 : Math.exp(logPoissonMass(events, mean));
}
