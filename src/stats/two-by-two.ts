import type { Maybe } from './absence.ts';
import { refuseCounts, refuseExcess } from './admissible.ts';

/**
 * Four counts of individuals by exposure and event, the table behind a crude
 * odds ratio. In Doll & Hill's (1950) men, 647 of 649 with lung cancer smoked, and
 * 622 of 649 without: { exposedEvents: 647, exposedNonEvents: 622,
 * unexposedEvents: 2, unexposedNonEvents: 27 }.
 */
export interface TwoByTwo {
  readonly exposedEvents: number;
  readonly exposedNonEvents: number;
  readonly unexposedEvents: number;
  readonly unexposedNonEvents: number;
}

/** The table of "12 of 43 against 13 of 96": events and totals of the two groups. */
export function tableFromTotals(
  exposedEvents: number,
  exposedTotal: number,
  unexposedEvents: number,
  unexposedTotal: number,
): Maybe<TwoByTwo> {
  const refusal = refuseCounts({ exposedEvents, exposedTotal, unexposedEvents, unexposedTotal })
    ?? refuseExcess(exposedEvents, exposedTotal, 'the exposed')
    ?? refuseExcess(unexposedEvents, unexposedTotal, 'the unexposed');
  return refusal ?? {
    exposedEvents,
    exposedNonEvents: exposedTotal - exposedEvents,
    unexposedEvents,
    unexposedNonEvents: unexposedTotal - unexposedEvents,
  };
}
