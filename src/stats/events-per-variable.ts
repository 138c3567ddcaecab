import type { Maybe } from './absence.ts';
import { refuseClosedShares, refuseCounts, refuseExcess, refuseNonPositive } from './admissible.ts';
import { zOfUpperTail } from './normal.ts';

/** How many events there are for each parameter that a model estimates. */
export interface EventsPerVariable {
  readonly eventsPerVariable: number;
  /** The events, or the non-events where these are fewer. */
  readonly limitingEvents: number;
}

/**
 * Events, or non-events if fewer, over the parameters tried (dummies, splines,
 * interactions and discarded candidates count): 700 events of 800 and 12 parameters
 * are 8.3. Below 10 is commonly called low (Peduzzi et al. 1996), 5 to 9 often does
 * for adjustment (Vittinghoff & McCulloch 2007), and the rule is weak (van Smeden et
 * al. 2016). Penalised models are exempt.
 */
export function eventsPerVariable(
  events: number,
  total: number,
  parameters: number,
): Maybe<EventsPerVariable> {
  const refusal = refuseCounts({ events, total, parameters })
    ?? refuseExcess(events, total, 'events') ?? refuseNonPositive({ parameters });
  if (refusal) return refusal;
  const limitingEvents = Math.min(events, total - events);
  return { eventsPerVariable: limitingEvents / parameters, limitingEvents };
}

/**
 * The sample size at which a model of so many parameters keeps a given shrinkage, from
 * the Cox–Snell R² expected of it: n = p/((S − 1) ln(1 − R²/S)). 20 parameters, R² 0.1
 * and shrinkage 0.9 need 1698. Source: Riley et al. (2019).
 */
export function sampleSizeForShrinkage(
  parameters: number,
  coxSnell: number,
  shrinkage = 0.9,
): Maybe<number> {
  const refusal = refuseCounts({ parameters }) ?? refuseNonPositive({ parameters })
    ?? refuseClosedShares({ shrinkage, 'Cox–Snell R² over shrinkage': coxSnell / shrinkage });
  return refusal ?? parameters / ((shrinkage - 1) * Math.log1p(-coxSnell / shrinkage));
}

/** The largest Cox–Snell R² that a share of events leaves room for: 0.05 has 0.328. */
export function largestCoxSnell(share: number): Maybe<number> {
  const refusal = refuseClosedShares({ share });
  if (refusal) return refusal;
  return -Math.expm1(2 * (share * Math.log(share) + (1 - share) * Math.log1p(-share)));
}

/**
 * How many people it takes to estimate an overall risk to within a margin at 95%:
 * (1.96/margin)² p (1 − p). 0.05 within 0.05 takes 73. Source: Riley et al. (2019).
 */
export function sampleSizeForRisk(share: number, margin = 0.05): Maybe<number> {
  const refusal = refuseClosedShares({ share, margin });
  return refusal ?? (zOfUpperTail(0.025) / margin) ** 2 * share * (1 - share);
}
