import type { Range } from '../model/index.ts';

/** The numbers that may be printed of one estimate, by name. */
export type Quantity =
  | 'estimate'
  | 'lower'
  | 'upper'
  | 'p'
  | 'coefficient'
  | 'standard error'
  | 'z'
  | 'Wald statistic';

/**
 * What one printed number says of the two unknowns, the estimate θ and its
 * standard error s, on the scale where the interval is symmetric (the log scale
 * for a ratio).
 *
 * - `position`: θ lies in the range. An estimate, or a coefficient.
 * - `limit`: θ + multiplier·s lies in the range; the multiplier of a lower limit is negative.
 * - `spread`: s lies in the range. A printed standard error.
 * - `statistic`: θ/s lies in the range; with `eitherSign` θ/s or −θ/s. A z statistic, or a
 *   p-value turned into z. With `likelihood` the p may be one of another standard
 *   test of the same data, so that the outer ring has room for it.
 */
export type Strip =
  | { readonly kind: 'position'; readonly of: Quantity; readonly range: Range }
  | {
      readonly kind: 'limit';
      readonly of: Quantity;
      readonly range: Range;
      readonly multiplier: number;
    }
  | { readonly kind: 'spread'; readonly of: Quantity; readonly range: Range }
  | {
      readonly kind: 'statistic';
      readonly of: Quantity;
      readonly range: Range;
      readonly eitherSign: boolean;
      readonly likelihood: boolean;
    };

/** The two signs of θ under which a p-value, which knows no direction, may be read. */
export type Sign = 1 | -1;

/** The signs to try: one where every statistic is signed, or reaches both sides of zero. */
export function signsOf(strips: readonly Strip[]): readonly Sign[] {
  const unsigned = strips.some(
    (strip) => strip.kind === 'statistic' && strip.eitherSign && strip.range.low > 0,
  );
  const skewed = strips.some(
    (strip) => strip.kind === 'statistic' && strip.eitherSign && strip.range.low < 0,
  );
  return unsigned || skewed ? [1, -1] : [1];
}
