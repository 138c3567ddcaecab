import { firstWhere } from './search.ts';
import type { CountTails } from './tails.ts';

/** Counts as probable as the one seen, but for the last digits, are counted in, as R does. */
const AS_PROBABLE = 1 + 1e-7;

/**
 * The two-sided exact p of a count: the sum of the probabilities of all counts that are
 * no more probable than the one seen, which stands on one side of the mean. R's
 * binom.test and poisson.test give it.
 *
 * `tailsAt` gives the tails of a count from 0 to `most`; their probabilities rise to the
 * mean and fall from there.
 */
export function noMoreProbable(
  seen: number,
  mean: number,
  most: number,
  tailsAt: (count: number) => CountTails,
): number {
  if (seen === mean) return 1;
  const { exactly, atLeast, atMost } = tailsAt(seen);
  const fits = (count: number): boolean => tailsAt(count).exactly <= exactly * AS_PROBABLE;
  if (seen < mean) {
    const from = firstWhere(fits, Math.ceil(mean), most + 1);
    return Math.min(1, atMost + (from > most ? 0 : tailsAt(from).atLeast));
  }
  const upTo = firstWhere((count) => !fits(count), 0, Math.floor(mean) + 1) - 1;
  return Math.min(1, atLeast + (upTo < 0 ? 0 : tailsAt(upTo).atMost));
}
