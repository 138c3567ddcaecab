import { leastCount, mostCount, stepUp, type Margins } from './margins.ts';
import { firstWhere } from './search.ts';
import type { CountTails } from './tails.ts';

/** The tails of a count and its mean, when the margins and the odds ratio are given. */
export interface NoncentralTails extends CountTails {
  readonly mean: number;
}

/**
 * Fisher's noncentral hypergeometric distribution: how the count of exposed with
 * the event would vary with all margins fixed and a true odds ratio. For the
 * margins 4, 4, 4 and the odds ratio 6.408 the mean is 3.
 *
 * Weights are summed from the most probable count outwards until they no longer
 * matter, about 18 standard deviations, so no factorial is needed. Accuracy:
 * 1e-13 of a tail above 1e-12, which is all that limits of confidence ask for.
 */
export function noncentralTails(
  count: number,
  margins: Margins,
  oddsRatio: number,
): NoncentralTails {
  const mode = likeliestCount(margins, oddsRatio);
  const sums = { total: 0, exactly: 0, below: 0, above: 0, moment: 0 };
  const add = (k: number, weight: number): void => {
    sums.total += weight;
    sums.moment += weight * (k - mode);
    if (k < count) sums.below += weight;
    else if (k > count) sums.above += weight;
    else sums.exactly += weight;
  };
  walk(mode, margins, oddsRatio, add);
  const { total, exactly, below, above, moment } = sums;
  return {
    exactly: exactly / total,
    atMost: (below + exactly) / total,
    atLeast: (above + exactly) / total,
    mean: mode + moment / total,
  };
}

function walk(
  mode: number,
  margins: Margins,
  oddsRatio: number,
  add: (k: number, weight: number) => void,
): void {
  add(mode, 1);
  const most = mostCount(margins);
  let weight = 1;
  for (let k = mode; k < most && weight > 1e-40; k++) {
    weight *= stepUp(k, margins, oddsRatio);
    add(k + 1, weight);
  }
  const least = leastCount(margins);
  weight = 1;
  for (let k = mode - 1; k >= least && weight > 1e-40; k--) {
    weight /= stepUp(k, margins, oddsRatio);
    add(k, weight);
  }
}

/** The most probable count: the first whose step up is no gain. */
export function likeliestCount(margins: Margins, oddsRatio: number): number {
  const isNoGain = (k: number): boolean => stepUp(k, margins, oddsRatio) <= 1;
  return firstWhere(isNoGain, leastCount(margins), mostCount(margins));
}
