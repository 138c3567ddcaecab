import type { Range } from '../model/index.ts';
import type { Maybe } from './absence.ts';
import { refuseLevel } from './admissible.ts';
import { leastCount, mostCount, type Margins } from './margins.ts';
import { noncentralTails } from './noncentral-hypergeometric.ts';
import { positiveRoot } from './positive-root.ts';
import { halfAdded, marginsOf, refuseFlatTable } from './cells.ts';
import type { TwoByTwo } from './two-by-two.ts';

/** The conditional odds ratio with its exact and mid-P limits; limits may be 0 and ∞. */
export interface ExactOddsRatio {
  /** The conditional maximum likelihood estimate, not ad/bc: 6.41 for the tea, where that is 9. */
  readonly conditional: number;
  readonly exact: Range;
  readonly midP: Range;
}

/**
 * The odds ratio given all margins, with exact and mid-P intervals. Doll & Hill's
 * men give 14.02, exact 3.50 to 122.19, mid-P 3.89 to 87.86.
 *
 * Source: Cornfield (1956) for the exact limits, each leaving half of what the
 * level does; Lancaster (1961) for mid-P, which counts the table seen by half.
 * Accuracy: 1e-11 of each (R's fisher.test, which stops its search early, is off
 * in the third digit for wide intervals). Level in percent.
 */
export function exactOddsRatio(table: TwoByTwo, level = 95): Maybe<ExactOddsRatio> {
  const refusal = refuseFlatTable(table) ?? refuseLevel(level);
  if (refusal) return refusal;
  const seen: Seen = { count: table.exposedEvents, margins: marginsOf(table), near: start(table) };
  const outside = (100 - level) / 200;
  return {
    conditional: conditionalEstimate(seen),
    exact: limits(seen, outside, 0),
    midP: limits(seen, outside, 0.5),
  };
}

interface Seen {
  readonly count: number;
  readonly margins: Margins;
  /** An odds ratio to start the search from. */
  readonly near: number;
}

function start(table: TwoByTwo): number {
  const raised = halfAdded(table);
  return (raised.exposedEvents / raised.exposedNonEvents)
    / (raised.unexposedEvents / raised.unexposedNonEvents);
}

function conditionalEstimate({ count, margins, near }: Seen): number {
  if (count === leastCount(margins)) return 0;
  if (count === mostCount(margins)) return Infinity;
  return positiveRoot((ratio) => noncentralTails(count, margins, ratio).mean - count, near);
}

/** The odds ratios at which a tail, less a share of the count seen itself, is `outside`. */
function limits({ count, margins, near }: Seen, outside: number, share: number): Range {
  const above = (ratio: number): number => {
    const { atLeast, exactly } = noncentralTails(count, margins, ratio);
    return Math.log((atLeast - share * exactly) / outside);
  };
  const below = (ratio: number): number => {
    const { atMost, exactly } = noncentralTails(count, margins, ratio);
    return Math.log(outside / (atMost - share * exactly));
  };
  return {
    low: count === leastCount(margins) ? 0 : positiveRoot(above, near),
    high: count === mostCount(margins) ? Infinity : positiveRoot(below, near),
  };
}
