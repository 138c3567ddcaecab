import type { Maybe } from './absence.ts';
import { refuseClosedShares, refuseCounts, refuseExcess, refuseShares } from './admissible.ts';
import { betaTails } from './incomplete-beta.ts';
import { logBinomialMass } from './mass.ts';
import { noMoreProbable } from './no-more-probable.ts';
import { firstWhere } from './search.ts';
import type { CountTails } from './tails.ts';

/**
 * The probabilities of a count of events among `total` when each has the
 * probability `share`: 3 of 10 at 0.5 has 0.1171875 exactly and 0.171875 at most.
 *
 * Source: the binomial tail as an incomplete beta (Abramowitz & Stegun 26.5.24).
 * Accuracy: 1e-13 of each down to 1e-300.
 */
export function binomialTails(events: number, total: number, share: number): Maybe<CountTails> {
  const refusal = refuseCounts({ events, total })
    ?? refuseExcess(events, total, 'events') ?? refuseShares({ share });
  return refusal ?? tailsOf(events, total, share);
}

/**
 * The exact two-sided p of a count under a given probability, the sum over all counts no
 * more probable: 7 of 10 at 0.5 gives 0.34375. R's binom.test gives the same.
 */
export function binomialP(events: number, total: number, share: number): Maybe<number> {
  const refusal = refuseCounts({ events, total })
    ?? refuseExcess(events, total, 'events') ?? refuseClosedShares({ share });
  return refusal ?? noMoreProbable(events, total * share, total, (k) => tailsOf(k, total, share));
}

/** The smallest count with at least the share `lower` up to it: 0.975 of 10 at 0.5 gives 8. */
export function binomialQuantile(lower: number, total: number, share: number): Maybe<number> {
  const refusal = refuseShares({ probability: lower, share }) ?? refuseCounts({ total });
  return refusal ?? firstWhere((k) => tailsOf(k, total, share).atMost >= lower, 0, total);
}

function tailsOf(events: number, total: number, share: number): CountTails {
  const rest = total - events;
  return {
    exactly: mass(events, rest, share),
    atMost: rest === 0 ? 1 : betaTails(events + 1, rest, share, 1 - share).upper,
    atLeast: events === 0 ? 1 : betaTails(events, rest + 1, share, 1 - share).lower,
  };
}

function mass(events: number, rest: number, share: number): number {
  if (events === 0) return Math.exp(rest === 0 ? 0 : rest * Math.log1p(-share));
  if (rest === 0) return share ** events;
  return Math.exp(logBinomialMass(events, rest, share, 1 - share));
}
