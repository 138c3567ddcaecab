import { absence, type Maybe } from './absence.ts';
import { refuseCounts } from './admissible.ts';
import type { PrintedValue } from './rounding.ts';

/** What the parts add up to, beside the total that is printed for them. */
export interface PartsAndTotal {
  readonly sum: number;
  /** Sum less total. */
  readonly difference: number;
  /** The most that rounding of parts and total can account for: half a unit of each. */
  readonly slack: number;
  readonly verdict: 'adds up' | 'off by rounding' | 'falls short' | 'exceeds';
}

/**
 * Adds printed parts and holds them against their printed total. 256203 + 269879 +
 * 99134 + 39047 is 664263 beside 664264: off by rounding, if these are rounded
 * person-years. Counts of people are not rounded, so that `off by rounding` means
 * something for them too: look at `difference`. Parts that fall short may leave out
 * a category or the missing; parts that exceed may overlap.
 */
export function partsAndTotal(
  parts: readonly PrintedValue[],
  total: PrintedValue,
): Maybe<PartsAndTotal> {
  if (parts.length === 0) return absence('there are no parts');
  const numbers = [...parts, total];
  if (!numbers.every(isFinitePrint)) {
    return absence('a part or the total is not a number up to 1e15');
  }
  const finest = Math.min(15, Math.max(0, ...numbers.map(({ decimals }) => decimals)));
  const scale = 10 ** finest;
  const whole = (x: number): number => Math.round(x * scale);
  const sum = parts.reduce((so, { value }) => so + whole(value), 0);
  const difference = (sum - whole(total.value)) / scale;
  const slack = numbers.reduce((so, { decimals }) => so + 0.5 * 10 ** -decimals, 0);
  return { sum: sum / scale, difference, slack, verdict: verdictOn(difference, slack) };
}

function isFinitePrint({ value, decimals }: PrintedValue): boolean {
  return Math.abs(value) <= 1e15 && Number.isInteger(decimals) && Math.abs(decimals) <= 15;
}

function verdictOn(difference: number, slack: number): PartsAndTotal['verdict'] {
  if (difference === 0) return 'adds up';
  if (Math.abs(difference) <= slack * (1 + 1e-12)) return 'off by rounding';
  return difference < 0 ? 'falls short' : 'exceeds';
}

/** How the sum of rounded percentages of several categories behaves. */
export interface RoundedSum {
  /** That the printed percentages add to exactly 100. */
  readonly exactlyHundred: number;
  /** √(6/(πk)), which the former approaches. */
  readonly approximately: number;
  /** The farthest from 100 in units of the last place, where no half was rounded. */
  readonly farthest: number;
}

/**
 * How often k rounded percentages add to exactly 100, and how far they may miss it:
 * three categories do in 75% of cases and miss by one unit at most; a tie (62.5 and
 * 37.5 printed 63 and 38) adds another unit.
 *
 * Source: Mosteller, Youtz & Zahn (1967); Diaconis & Freedman (1979). The chance is
 * the middle of a cardinal B-spline of order k, whose recursion adds only positive
 * terms: 1e-14 relative. Assumes remainders spread evenly, and at least 2 categories.
 */
export function roundedPercentSum(categories: number): Maybe<RoundedSum> {
  const refusal = refuseCounts({ categories });
  if (refusal) return refusal;
  if (categories < 2 || categories > 1000) return absence('it takes 2 to 1000 categories');
  return {
    exactlyHundred: splineAtMiddle(categories),
    approximately: Math.sqrt(6 / (Math.PI * categories)),
    farthest: Math.ceil(categories / 2) - 1,
  };
}

/** The cardinal B-spline of the given order at half its width, from lower orders at once. */
function splineAtMiddle(order: number): number {
  const middle = order / 2;
  const shift = middle - Math.floor(middle);
  let values: number[] = Array.from({ length: order + 1 }, (_, i) => (i === 0 ? 1 : 0));
  for (let k = 2; k <= order; k++) {
    values = values.map((value, i) => {
      const x = i + shift;
      return (x * value + (k - x) * (values[i - 1] ?? 0)) / (k - 1);
    });
  }
  return values[Math.floor(middle)] ?? 0;
}
