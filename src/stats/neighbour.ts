import { isAbsence } from './absence.ts';
import { isFeasible } from './feasible-region.ts';
import { stripsOf, usualReading, type ReportedNumbers } from './reported-numbers.ts';
import type { PrintedValue } from './rounding.ts';

/**
 * A way in which another row of the same table would account for numbers that disagree.
 *
 * - `same digits`: the other row prints exactly the same interval, or the same exact p.
 * - `would fit`: with the other row's interval, p or estimate in place of its own, the row agrees.
 */
export interface Neighbouring {
  readonly row: number;
  readonly part: 'interval' | 'p' | 'estimate';
  readonly likeness: 'same digits' | 'would fit';
}

/**
 * The rows of the same table whose interval, p or estimate may have strayed into this
 * one, same digits first; none where the row agrees by itself. Rows count from 0
 * in `neighbours`, which should not hold the row itself. With many rows something often
 * fits by chance: one in `would fit` is a hint, not more.
 */
export function neighbouring(
  numbers: ReportedNumbers,
  neighbours: readonly ReportedNumbers[],
): readonly Neighbouring[] {
  if (agrees(numbers)) return [];
  const found = neighbours.flatMap((neighbour, row) => likenesses(numbers, neighbour, row));
  return [
    ...found.filter(({ likeness }) => likeness === 'same digits'),
    ...found.filter(({ likeness }) => likeness === 'would fit'),
  ];
}

function likenesses(
  numbers: ReportedNumbers,
  neighbour: ReportedNumbers,
  row: number,
): readonly Neighbouring[] {
  const { estimate, lower, upper, p } = neighbour;
  const found: Neighbouring[] = [];
  if (lower && upper) {
    const same = sameValue(numbers.lower, lower) && sameValue(numbers.upper, upper);
    if (same) found.push({ row, part: 'interval', likeness: 'same digits' });
    else if (agrees({ ...numbers, lower, upper })) {
      found.push({ row, part: 'interval', likeness: 'would fit' });
    }
  }
  if (p && numbers.p && p.relation === '=') {
    const same = numbers.p.relation === '=' && sameValue(numbers.p, p);
    if (same) found.push({ row, part: 'p', likeness: 'same digits' });
    else if (agrees({ ...numbers, p })) found.push({ row, part: 'p', likeness: 'would fit' });
  }
  if (estimate && numbers.estimate && agrees({ ...numbers, estimate })) {
    found.push({ row, part: 'estimate', likeness: 'would fit' });
  }
  return found;
}

function sameValue(one: PrintedValue | undefined, other: PrintedValue): boolean {
  return one !== undefined && one.value === other.value && one.decimals === other.decimals;
}

function agrees(numbers: ReportedNumbers): boolean {
  const strips = stripsOf(numbers, usualReading(numbers, 'log'));
  return !isAbsence(strips) && isFeasible(strips);
}
