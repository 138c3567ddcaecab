import type { Range } from '../model/index.ts';
import { absence, type Absence, type Maybe } from './absence.ts';
import { refuseCounts, refuseExcess, refuseNonPositive } from './admissible.ts';
import { includes } from './ranges.ts';
import { uncut, unrounded, type PrintedValue } from './rounding.ts';

/**
 * How a printed percentage stands to its count and total. `cut off` is the milder
 * case of digits dropped instead of rounded: 15 of 35 printed as 42.8%.
 */
export interface PercentOfCount {
  /** 100 × count / total, with all its digits. */
  readonly percent: number;
  readonly verdict: 'agrees' | 'cut off' | 'differs';
}

/**
 * Holds a printed percentage against the count and total it stands beside: 81 of
 * 263 is 30.798…%, so "30.8" and "31" agree and "30.7" is cut off. Both ways to
 * round a half agree. A percentage of some other total (valid answers, weights)
 * differs honestly.
 */
export function percentOfCount(
  count: number,
  total: number,
  printed: PrintedValue,
): Maybe<PercentOfCount> {
  const refusal = refuseShareOfCounts(count, total) ?? refuseNoNumber(printed);
  if (refusal) return refusal;
  const percent = (100 * count) / total;
  if (includes(unrounded(printed), percent)) return { percent, verdict: 'agrees' };
  return { percent, verdict: includes(uncut(printed), percent) ? 'cut off' : 'differs' };
}

/**
 * The counts out of `total` that a printed percentage can stand for, as a range of
 * whole numbers: "17.5" of 40 is 7 and nothing else. Absent where there is none:
 * "23.2" of 62 cannot be, since 14 and 15 are 22.6% and 24.2%.
 *
 * Source: the granularity of whole numbers (Brown & Heathers 2017, there for means).
 */
export function countsBehindPercent(printed: PrintedValue, total: number): Maybe<Range> {
  const refusal = refuseCounts({ total }) ?? refuseNonPositive({ total })
    ?? refuseNoNumber(printed);
  if (refusal) return refusal;
  const { low, high } = unrounded(printed);
  const fewest = Math.max(0, Math.ceil((low * total) / 100));
  const most = Math.min(total, Math.floor((high * total) / 100));
  if (fewest > most) return absence(`no count out of ${total} is ${printed.value}%`);
  return { low: fewest, high: most };
}

/** What share of all percentages with so many decimals no count can give. */
export interface PercentGranularity {
  readonly printable: number;
  readonly attainable: number;
  readonly shareImpossible: number;
}

/**
 * How telling a percentage without its count is: with 62 in the group only 63 of the
 * 1001 percentages with one decimal can occur, so 93.7% of slips would show.
 */
export function percentGranularity(total: number, decimals: number): Maybe<PercentGranularity> {
  const refusal = refuseCounts({ total, decimals }) ?? refuseNonPositive({ total });
  if (refusal) return refusal;
  if (decimals > 12) return absence('there are more decimals than a percentage is printed with');
  const printable = 100 * 10 ** decimals + 1;
  const attainable = Math.min(total + 1, printable);
  return { printable, attainable, shareImpossible: 1 - attainable / printable };
}

function refuseShareOfCounts(count: number, total: number): Absence | undefined {
  return refuseCounts({ count, total }) ?? refuseNonPositive({ total })
    ?? refuseExcess(count, total, 'a share');
}

function refuseNoNumber({ value, decimals }: PrintedValue): Absence | undefined {
  if (Number.isFinite(value) && Number.isInteger(decimals)) return undefined;
  return absence(`${value} with ${decimals} decimals is not a printed percentage`);
}
