import { absence, type Absence, type Maybe } from './absence.ts';
import { refuseClosedShares, refuseShares } from './admissible.ts';
import { betaTails } from './incomplete-beta.ts';
import { positiveQuantile } from './positive-root.ts';
import type { Tails } from './tails.ts';

/**
 * The tails of the beta distribution at a share from 0 to 1: below 0.5 with
 * shapes 2 and 3 lies 0.6875. Accuracy: 1e-13 of the tail down to 1e-300.
 */
export function betaDistributionTails(share: number, a: number, b: number): Maybe<Tails> {
  return refuseShares({ share }) ?? refuseShapes({ a, b })
    ?? betaTails(a, b, share, 1 - share);
}

/**
 * The share with the probability `lower` below it under a beta distribution; it
 * gives the limits of Clopper & Pearson and of Jeffreys. 0.975 with shapes 1 and
 * 20 gives 0.168433, the upper limit for 0 of 20. Accuracy: 1e-14 relative, of the
 * share and of what it lacks to 1 (the root is sought on the log odds).
 */
export function betaQuantile(lower: number, a: number, b: number): Maybe<number> {
  const refusal = refuseClosedShares({ probability: lower }) ?? refuseShapes({ a, b });
  if (refusal) return refusal;
  const tailsAt = (o: number): Tails => betaTails(a, b, o / (1 + o), 1 / (1 + o));
  const odds = positiveQuantile(tailsAt, lower, a / b);
  return odds === Infinity ? 1 : odds / (1 + odds);
}

/** The shapes that counts of people lead to, with room to spare. */
function refuseShapes({ a, b }: { readonly a: number; readonly b: number }): Absence | undefined {
  if (Math.min(a, b) >= 0.005 && Math.max(a, b) <= 2e10) return undefined;
  return absence(`shapes of ${a} and ${b} are not between 0.005 and 2e10`);
}
