import { logBinomialMass } from './mass.ts';
import type { CountTails } from './tails.ts';

/**
 * A 2×2 table seen through its margins: `marked` and `unmarked` individuals, of
 * whom `drawn` are drawn; the count in question is of marked ones among them.
 * Marked are the exposed, drawn are those with the event.
 */
export interface Margins {
  readonly marked: number;
  readonly unmarked: number;
  readonly drawn: number;
}

/** The smallest count that the margins allow: 8 of 10 drawn from 4 unmarked hold at least 4. */
export function leastCount({ unmarked, drawn }: Margins): number {
  return Math.max(0, drawn - unmarked);
}

/** The largest count that the margins allow. */
export function mostCount({ marked, drawn }: Margins): number {
  return Math.min(marked, drawn);
}

/**
 * How many times as probable the next higher count is, when the odds ratio is
 * `oddsRatio`: Fisher's noncentral hypergeometric, central at 1.
 */
export function stepUp(count: number, margins: Margins, oddsRatio: number): number {
  const { marked, unmarked, drawn } = margins;
  return (((marked - count) / (count + 1)) * ((drawn - count) / (unmarked - drawn + count + 1)))
    * oddsRatio;
}

/**
 * ln of the central probability of a count, from three binomial masses (Loader
 * 2000), so that large factorials do not cancel. About 1e-14 absolute.
 */
export function logHypergeometricMass(count: number, margins: Margins): number {
  const { marked, unmarked, drawn } = margins;
  const total = marked + unmarked;
  const p = drawn / total;
  const q = (total - drawn) / total;
  return logMass(count, marked - count, p, q)
    + logMass(drawn - count, unmarked - drawn + count, p, q)
    - logMass(drawn, total - drawn, p, q);
}

/**
 * The central probabilities of a count that the margins allow. 3 of 4 marked
 * among 4 drawn from 8 has 16/70 exactly and 17/70 at least.
 *
 * Accuracy: 1e-12 of each down to 1e-300. The tail away from the middle is summed
 * outwards, so that its digits are its own; the other is taken from 1.
 */
export function tailsWithin(count: number, margins: Margins): CountTails {
  const { marked, unmarked, drawn } = margins;
  const exactly = Math.exp(logHypergeometricMass(count, margins));
  if (count >= (drawn / (marked + unmarked)) * marked) {
    const above = exactly * sumUpwards(count, margins);
    return { exactly, atMost: 1 - above, atLeast: exactly + above };
  }
  const below = exactly * sumDownwards(count, margins);
  return { exactly, atMost: exactly + below, atLeast: 1 - below };
}

/** The probability of all counts up to and including `count`, which is below the middle. */
export function lowTail(count: number, margins: Margins): number {
  return Math.exp(logHypergeometricMass(count, margins)) * (1 + sumDownwards(count, margins));
}

/** The probability of `count` and all higher ones, when it is above the middle. */
export function highTail(count: number, margins: Margins): number {
  return Math.exp(logHypergeometricMass(count, margins)) * (1 + sumUpwards(count, margins));
}

/** What lies above `count`, in units of its own probability; the terms fall from there. */
function sumUpwards(count: number, margins: Margins): number {
  const most = mostCount(margins);
  let term = 1;
  let sum = 0;
  for (let k = count; k < most && term > sum * 1e-18; k++) {
    term *= stepUp(k, margins, 1);
    sum += term;
  }
  return sum;
}

/** What lies below `count`, in units of its own probability; the terms fall from there. */
function sumDownwards(count: number, margins: Margins): number {
  const least = leastCount(margins);
  let term = 1;
  let sum = 0;
  for (let k = count - 1; k >= least && term > sum * 1e-18; k--) {
    term /= stepUp(k, margins, 1);
    sum += term;
  }
  return sum;
}

function logMass(k: number, rest: number, p: number, q: number): number {
  if (k === 0) return rest === 0 ? 0 : rest * Math.log(q);
  if (rest === 0) return k * Math.log(p);
  return logBinomialMass(k, rest, p, q);
}
