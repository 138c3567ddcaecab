import { absence, type Absence, type Maybe } from './absence.ts';
import { refuseCounts, refuseShares } from './admissible.ts';
import { leastCount, mostCount, tailsWithin, type Margins } from './margins.ts';
import { firstWhere } from './search.ts';
import type { CountTails } from './tails.ts';

/**
 * The probabilities of a count of marked individuals among those drawn, when the
 * margins are fixed and nothing links mark and draw. 3 of 4 marked among 4 drawn from 8
 * has 16/70 exactly and 17/70 at least.
 *
 * Source: Fisher (1935); sums outwards from Loader's (2000) saddle-point masses.
 * Accuracy: 1e-12 of each down to 1e-300.
 */
export function hypergeometricTails(count: number, margins: Margins): Maybe<CountTails> {
  const refusal = refuseCounts({ count }) ?? refuseMargins(margins);
  if (refusal) return refusal;
  if (count < leastCount(margins) || count > mostCount(margins)) {
    return absence(`a count of ${count} does not fit the margins`);
  }
  return tailsWithin(count, margins);
}

/** The smallest count with at least the share `lower` up to it: the usual quantile. */
export function hypergeometricQuantile(lower: number, margins: Margins): Maybe<number> {
  const refusal = refuseShares({ probability: lower }) ?? refuseMargins(margins);
  if (refusal) return refusal;
  const reaches = (count: number): boolean => tailsWithin(count, margins).atMost >= lower;
  return firstWhere(reaches, leastCount(margins), mostCount(margins));
}

function refuseMargins(margins: Margins): Absence | undefined {
  const refusal = refuseCounts({ ...margins });
  if (refusal) return refusal;
  const total = margins.marked + margins.unmarked;
  if (total === 0) return absence('there is nobody to draw');
  return margins.drawn > total ? absence('more are drawn than there are') : undefined;
}
