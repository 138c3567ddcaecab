/**
 * The first whole number from `low` up to but not including `end` that fits, when
 * all after it fit too; `end` where none does. Found by halving: the first k with
 * k² ≥ 50 from 0 to 100 is 8.
 */
export function firstWhere(fits: (k: number) => boolean, low: number, end: number): number {
  let [start, stop] = [low, end];
  while (start < stop) {
    const middle = Math.floor((start + stop) / 2);
    if (fits(middle)) stop = middle;
    else start = middle + 1;
  }
  return start;
}
