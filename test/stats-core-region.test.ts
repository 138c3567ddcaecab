import { describe, expect, test } from 'vitest';
import { isAbsence } from '../src/stats/absence.ts';
import { agreement, differenceAgreement } from '../src/stats/agreement.ts';
import { conflicts } from '../src/stats/conflict.ts';
import { feasibleRegion, isFeasible } from '../src/stats/feasible-region.ts';
import { strictlyImplied } from '../src/stats/implied.ts';
import { includes } from '../src/stats/ranges.ts';
import { stripsOf, usualReading, type ReportedNumbers } from '../src/stats/reported-numbers.ts';
import { undoneSlips } from '../src/stats/slip.ts';
import type { Strip } from '../src/stats/strip.ts';
import {
  halfEven,
  halfUp,
  nearest,
  randomAnalysis,
  randomStream,
  row,
  waldRow,
  type Printer,
} from './reported-row.ts';

const PRINTERS: readonly Printer[] = [nearest, halfUp, halfEven];

function strips(numbers: ReportedNumbers): readonly Strip[] {
  const found = stripsOf(numbers, usualReading(numbers, 'log'));
  if (isAbsence(found)) throw new Error(found.because);
  return found;
}

function randomRow(random: () => number): ReportedNumbers {
  const decimals = 1 + Math.floor(random() * 3);
  const print = PRINTERS[Math.floor(random() * 3)] as Printer;
  return waldRow(randomAnalysis(random), decimals, print, random() < 0.3 ? undefined : random());
}

/** One slip in a random number of the row, or nothing where the slip leaves no ratio. */
function slipped(numbers: ReportedNumbers, random: () => number): ReportedNumbers | undefined {
  const fields = (['estimate', 'lower', 'upper', 'p'] as const).filter((name) => numbers[name]);
  const field = fields[Math.floor(random() * fields.length)] as (typeof fields)[number];
  const printed = numbers[field];
  const slips = printed === undefined ? [] : undoneSlips(printed);
  const slip = slips[Math.floor(random() * slips.length)];
  if (slip === undefined || !(slip.value.value > 0) || (field === 'p' && slip.value.value > 1)) {
    return undefined;
  }
  return { ...numbers, [field]: { ...printed, ...slip.value } };
}

/**
 * The greatest room for θ over all s, by another way than clipping: for a given s and sign
 * every strip is an interval of θ, the room between the highest lower and the lowest upper
 * end is concave in s, and golden section finds its top. Empty where it is negative.
 */
function greatestRoom(all: readonly Strip[], sign: 1 | -1): number {
  let [low, high] = [0, 400];
  for (const strip of all) {
    if (strip.kind === 'spread')
      [low, high] = [Math.max(low, strip.range.low), Math.min(high, strip.range.high)];
  }
  if (low > high) return low - high;
  let best = -Infinity;
  for (let step = 0; step < 200; step++) {
    const [left, right] = [low + 0.382 * (high - low), low + 0.618 * (high - low)];
    const [a, b] = [roomAt(all, sign, left), roomAt(all, sign, right)];
    best = Math.max(best, a, b);
    if (a >= b) high = right;
    else low = left;
  }
  return best;
}

function roomAt(all: readonly Strip[], sign: 1 | -1, s: number): number {
  let [low, high] = [-Infinity, Infinity];
  for (const strip of all) {
    const { range } = strip;
    if (strip.kind === 'position')
      [low, high] = [Math.max(low, range.low), Math.min(high, range.high)];
    if (strip.kind === 'limit') {
      low = Math.max(low, range.low - strip.multiplier * s);
      high = Math.min(high, range.high - strip.multiplier * s);
    }
    if (strip.kind === 'statistic') {
      const least = range.low === 0 ? -range.high : range.low;
      const ends = sign === 1 ? [least * s, range.high * s] : [-range.high * s, -least * s];
      low = Math.max(low, Number.isNaN(ends[0]) ? -Infinity : (ends[0] as number));
      high = Math.min(high, Number.isNaN(ends[1]) ? Infinity : (ends[1] as number));
    }
  }
  return high - low;
}

describe('the feasible region', () => {
  test('a true Wald analysis, however rounded, never disagrees: 100,000 random rows', () => {
    const random = randomStream(1);
    const alarms: ReportedNumbers[] = [];
    for (let i = 0; i < 100_000; i++) {
      const numbers = randomRow(random);
      if (agreement(numbers).outcome !== 'within rounding') alarms.push(numbers);
    }
    expect(alarms).toEqual([]);
  });

  test('the true estimate, standard error and p lie in what is implied', () => {
    const random = randomStream(2);
    for (let i = 0; i < 5000; i++) {
      const analysis = randomAnalysis(random);
      const found = agreement(waldRow(analysis, 2, nearest, random()));
      if (found.outcome !== 'within rounding') throw new Error(found.outcome);
      const { implied } = found;
      const room = 1e-9;
      const within = (range: { low: number; high: number }, value: number) =>
        includes({ low: range.low - room, high: range.high + room }, value);
      expect(within(implied.logEstimate, analysis.theta)).toBe(true);
      expect(within(implied.standardError, analysis.standardError)).toBe(true);
      expect(within(implied.z, analysis.theta / analysis.standardError)).toBe(true);
    }
  });

  test('rows with a slip disagree exactly where another algorithm finds no room: 30,000', () => {
    const random = randomStream(3);
    let [empty, judged] = [0, 0];
    for (let i = 0; i < 30_000; i++) {
      const numbers = slipped(randomRow(random), random);
      if (numbers === undefined) continue;
      const all = strips(numbers);
      const room = Math.max(greatestRoom(all, 1), greatestRoom(all, -1));
      if (Math.abs(room) < 1e-9) continue;
      judged++;
      if (room < 0) empty++;
      expect(isFeasible(all), JSON.stringify(numbers)).toBe(room > 0);
    }
    expect(judged).toBeGreaterThan(25_000);
    expect(empty).toBeGreaterThan(10_000);
  });

  test('every corner satisfies every printed number', () => {
    const random = randomStream(4);
    for (let i = 0; i < 3000; i++) {
      const all = strips(randomRow(random));
      for (const { corners } of feasibleRegion(all)) {
        for (const { estimate, standardError } of corners) {
          for (const strip of all.filter((one) => one.kind === 'limit')) {
            const value = estimate + strip.multiplier * standardError;
            expect(value).toBeGreaterThan(strip.range.low - 1e-9);
            expect(value).toBeLessThan(strip.range.high + 1e-9);
          }
        }
      }
    }
  });

  test('a conflict disagrees, and no part of it does', () => {
    const random = randomStream(5);
    let seen = 0;
    for (let i = 0; i < 4000; i++) {
      const numbers = slipped(randomRow(random), random);
      if (numbers === undefined) continue;
      const all = strips(numbers);
      const found = conflicts(all);
      expect(found.length > 0).toBe(!isFeasible(all));
      for (const conflict of found) {
        seen++;
        const part = all.filter((strip) => conflict.includes(strip.of));
        expect(isFeasible(part)).toBe(false);
        for (const strip of part) {
          expect(isFeasible(part.filter((other) => other !== strip))).toBe(true);
        }
      }
    }
    expect(seen).toBeGreaterThan(1000);
  });

  test('what the others imply for a number agrees with them, and nothing outside does', () => {
    const random = randomStream(6);
    for (let i = 0; i < 2000; i++) {
      const numbers = randomRow(random);
      const reading = usualReading(numbers, 'log');
      const all = strips(numbers);
      const implied = strictlyImplied('upper', all, reading);
      if (!implied || !(implied.high < Infinity)) continue;
      // With a free sign the others may imply two ranges apart, of which this is the hull.
      if (feasibleRegion(all.filter((strip) => strip.of !== 'upper')).length > 1) continue;
      const upper = all.find((strip) => strip.of === 'upper') as Strip;
      const others = all.filter((strip) => strip !== upper);
      const at = (ratio: number) => {
        const range = { low: Math.log(ratio), high: Math.log(ratio) };
        return isFeasible([...others, { ...upper, range }]);
      };
      const width = Math.log(implied.high / implied.low);
      expect(at(Math.exp(Math.log(implied.low) + 0.5 * width))).toBe(true);
      expect(at(implied.high * (1 + 1e-6))).toBe(false);
      expect(at(implied.low * (1 - 1e-6))).toBe(false);
    }
  });

  test('an interval that excludes 1 allows no p above its level, however coarse the print', () => {
    const found = agreement(row('0.28', '0.08', '0.95'));
    if (found.outcome !== 'within rounding') throw new Error(found.outcome);
    expect(found.implied.p.high).toBeLessThan(0.05);
    expect(found.implied.p.low).toBeGreaterThan(0.035);
  });

  test('a limit rounded to zero or to infinity leaves the region open, and nothing is NaN', () => {
    for (const numbers of [
      row('0.4', '0.0', '5.2'),
      row('3.39', '0.00', '∞'),
      row('1.4', undefined, '5.2'),
    ]) {
      const found = agreement(numbers);
      if (found.outcome !== 'within rounding') throw new Error(found.outcome);

      for (const { low, high } of Object.values(found.implied)) expect(low <= high).toBe(true);
    }
    expect(agreement(row('12.3', '0.0', '5.2')).outcome).toBe('neither');
  });

  test('what is printed beside each other from other columns joins the same region', () => {
    const plain = { value: 0.693, decimals: 3 };
    const error = { value: 0.21, decimals: 3 };
    const whole = row('2.00', '1.32', '3.02', '= 0.001', {
      coefficient: plain,
      standardError: error,
    });
    expect(agreement(whole).outcome).toBe('within rounding');
    const wald = { value: 10.89, decimals: 2 };
    expect(agreement({ ...whole, wald }).outcome).toBe('within rounding');
    expect(agreement({ ...whole, wald: { value: 12.89, decimals: 2 } }).outcome).toBe('neither');
    const shifted = agreement(
      row('1.100', '1.018', '1.187', undefined, {
        coefficient: { value: 0.102, decimals: 3 },
      }),
    );
    // A coefficient copied from the next row (Thorax 2002, table 3 of the records).
    expect(shifted.outcome).toBe('neither');
    if (shifted.outcome === 'neither')
      expect(shifted.conflicts[0]).toEqual(['estimate', 'coefficient']);
  });

  test('z and Wald statistic are both held against the rest', () => {
    const fits = row('2.00', '1.32', '3.02', undefined, {
      z: { value: 3.3, decimals: 1 }, wald: { value: 10.9, decimals: 1 },
    });
    expect(agreement(fits).outcome).toBe('within rounding');
    const turned = agreement({ ...fits, z: { value: -3.3, decimals: 1 } });
    expect(turned.outcome === 'neither' && turned.conflicts[0]).toEqual(['estimate', 'z']);
    const apart = agreement({ ...fits, wald: { value: 3.3, decimals: 1 } });
    expect(apart.outcome === 'neither' && apart.conflicts).toContainEqual(['z', 'Wald statistic']);
  });

  test('without a far limit z comes down to 0 and the standard error has no upper end', () => {
    const found = agreement(row('1.4', '0.0'));
    if (found.outcome !== 'within rounding') throw new Error(found.outcome);
    expect(found.implied.z.low).toBe(0);
    expect(found.implied.standardError.high).toBe(Infinity);
    expect(found.implied.p.high).toBe(1);
    expect(found.spare).toBe(0);
  });

  test('turning the comparison round turns the region round', () => {
    const random = randomStream(8);
    for (let i = 0; i < 2000; i++) {
      const numbers = randomRow(random);
      const all = strips(numbers);
      const turned = all.map((strip): Strip => {
        if (strip.kind === 'spread' || strip.kind === 'statistic') return strip;
        const range = { low: -strip.range.high, high: -strip.range.low };
        return strip.kind === 'limit'
          ? { ...strip, range, multiplier: -strip.multiplier }
          : { ...strip, range };
      });
      expect(isFeasible(turned)).toBe(isFeasible(all));
    }
  });

  test('differences are judged on their own scale', () => {
    // Altman & Bland 2011: zinc, 17 percentage points (1.4 to 32.6), P = 0.032.
    expect(differenceAgreement(row('17', '1.4', '32.6', '= 0.032')).outcome).toBe(
      'within rounding',
    );
    expect(differenceAgreement(row('-0.6', '-1.1', '-0.1', '= 0.20')).outcome).toBe('neither');
    expect(differenceAgreement(row('17', '1.4', '23.6')).outcome).toBe('neither');
  });
});

describe('what cannot be judged says so', () => {
  const because = (numbers: ReportedNumbers) => {
    const found = agreement(numbers);
    return found.outcome === 'cannot tell' ? found.because : found.outcome;
  };

  test('levels outside 50 to 100, NaN, negative ratios and lone numbers have a reason', () => {
    expect(because(row('2', '1', '4', undefined, { level: 30 }))).toContain(
      'not between 50% and 100%',
    );
    expect(because(row('2', '1', '4', undefined, { level: 100 }))).toContain(
      'not between 50% and 100%',
    );
    expect(because(row('2', '1', '4', undefined, { level: NaN }))).toContain(
      'not between 50% and 100%',
    );
    expect(
      because({ estimate: { value: NaN, decimals: 2 }, lower: { value: 1, decimals: 2 } }),
    ).toBe('the estimate is not a number');
    expect(
      because({ estimate: { value: 1, decimals: NaN }, lower: { value: 1, decimals: 2 } }),
    ).toBe('the estimate is not a number');
    expect(because(row('0.2', '-0.3', '0.7'))).toBe('the lower -0.3 has no logarithm');
    expect(because(row('2.1'))).toContain('one number alone');
    expect(because({})).toContain('one number alone');
    expect(because(row('2.1', '1.2', '3.7', '= 1.3'))).toBe('1.3 is not a probability');
    expect(
      because({ ...row('2.1', '1.2', '3.7'), p: { relation: '=', value: NaN, decimals: 2 } }),
    ).toBe('the p-value is not a number');
    expect(
      because(row('2.1', '1.2', '3.7', undefined, { standardError: { value: -1, decimals: 2 } })),
    ).toContain('cannot be negative');
    expect(
      because(row('2.1', '1.2', '3.7', undefined, { wald: { value: -1, decimals: 2 } })),
    ).toContain('cannot be negative');
  });

  test('limits out of order disagree, and are named', () => {
    const found = agreement(row('0.72', '0.90', '0.58'));
    if (found.outcome !== 'neither') throw new Error(found.outcome);
    expect(found.conflicts).toContainEqual(['lower', 'upper']);
    expect(found.repairs.map(({ slip }) => slip)).toEqual(['limits swapped']);
  });
});
