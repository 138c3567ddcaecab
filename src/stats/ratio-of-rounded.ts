import type { Range } from '../model/index.ts';
import { absence, type Maybe } from './absence.ts';

/**
 * The quotients of two ranges of numbers of at least 0: 71 exactly over an expected
 * 69.5 to 70.5 is 1.0071 to 1.0216, so a printed ratio of 1.06 is out of reach.
 * A denominator that reaches 0 leaves the quotient without an upper end.
 */
export function quotients(numerator: Range, denominator: Range): Maybe<Range> {
  if (!(numerator.low >= 0 && numerator.low <= numerator.high)) {
    return absence('the numerator reaches below 0');
  }
  if (!(denominator.low >= 0 && denominator.low <= denominator.high && denominator.high > 0)) {
    return absence('the denominator reaches below 0, or is 0');
  }
  if (numerator.high === Infinity || denominator.high === Infinity) {
    return absence('a side of the quotient is without an end');
  }
  const high = denominator.low === 0 ? Infinity : numerator.high / denominator.low;
  return { low: numerator.low / denominator.high, high };
}
