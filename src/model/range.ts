/**
 * All values from `low` to `high`, both ends included. Either end may be
 * infinite; neither is ever NaN, and `low` never exceeds `high`.
 */
export interface Range {
  readonly low: number;
  readonly high: number;
}
