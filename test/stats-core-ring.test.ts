import { describe, expect, test } from 'vitest';
import { isAbsence } from '../src/stats/absence.ts';
import { agreement, outcomeOf } from '../src/stats/agreement.ts';
import { leanOf } from '../src/stats/contrast.ts';
import { isFeasible } from '../src/stats/feasible-region.ts';
import { othersImply } from '../src/stats/implied.ts';
import { evenBend, greatestLean, leastLean, longestArm, shortestArm } from '../src/stats/lean.ts';
import { leaningExtent, ofEstimate, ofLimit, ofTest } from '../src/stats/leaning-extent.ts';
import { agreesLeaning, leaningPoint, sectionAt, type Lean } from '../src/stats/leaning-region.ts';
import { stripsOf, usualReading, type ReportedNumbers } from '../src/stats/reported-numbers.ts';
import type { Strip } from '../src/stats/strip.ts';
import { nearest, randomAnalysis, randomStream, row, waldRow } from './reported-row.ts';
import { dataSets, printsOf } from './standard-methods.ts';
import { recordsOf, type CheckRecord } from './records.ts';

function strips(numbers: ReportedNumbers): readonly Strip[] {
  const found = stripsOf(numbers, usualReading(numbers, 'log'));
  if (isAbsence(found)) throw new Error(found.because);
  return found;
}

describe('the bounds of the lean', () => {
  test('both statistics are the distance itself near zero, and bracket it', () => {
    for (const x of [1e-9, 1e-4, 0.01, 0.059, 0.061, 0.5, 1, 3, 10]) {
      expect(leastLean(x, 1)).toBeLessThanOrEqual(x);
      expect(greatestLean(x, 1)).toBeGreaterThanOrEqual(x);
      if (x > 0.1) continue;
      expect(Math.abs(leastLean(x, 1) / (x - (x * x) / 6 + x ** 3 / 36) - 1)).toBeLessThan(x ** 3);
      expect(Math.abs(greatestLean(x, 1) / (x + (x * x) / 6 + x ** 3 / 36) - 1)).toBeLessThan(
        x ** 3,
      );
    }
    expect(greatestLean(Infinity, 1)).toBe(Infinity);
    expect(leastLean(-1, 1)).toBe(0);
  });

  test('the arms are their inverses', () => {
    for (let power = -5; power < 9; power += 0.25) {
      for (const reach of [0.5, 1, 4]) {
        const v = 10 ** power;
        expect(greatestLean(shortestArm(v, reach), reach) / v).toBeCloseTo(1, 12);
        expect(leastLean(longestArm(v, reach), reach) / v).toBeCloseTo(1, 12);
      }
    }
  });

  test('a table with one sparse cell reaches them: a count of 3 with 21 expected', () => {
    // Deviance of a count c at mean m: 2(c ln(c/m) − c + m); s = 1/√c.
    const deviance = 2 * (3 * Math.log(3 / 21) - 3 + 21);
    expect(greatestLean(Math.log(7), 1) * Math.sqrt(3)).toBeCloseTo(Math.sqrt(deviance), 12);
    const below = 2 * (3 * Math.log(3 / (3 / 7)) - 3 + 3 / 7);
    expect(leastLean(Math.log(7), 1) * Math.sqrt(3)).toBeCloseTo(Math.sqrt(below), 12);
  });

  test('to third order the asymmetry bound is multiplier times standard error over three', () => {
    for (const s of [0.01, 0.1, 0.3]) {
      const v = 1.96 * s;
      const logAsymmetry = Math.log(longestArm(v, 1) / shortestArm(v, 1));
      expect(logAsymmetry / (v / 3)).toBeCloseTo(1, 1);
    }
    expect(evenBend(0.1, 1)).toBeCloseTo(1.0018, 10);
  });
});

describe('the outer ring', () => {
  const both = (kind: 'binary' | 'unknown', all: readonly Strip[]): Lean => leanOf(kind, all);

  test('whatever agrees by the standard method agrees within the ring: 20,000 rows', () => {
    const random = randomStream(11);
    for (let i = 0; i < 20_000; i++) {
      const numbers = waldRow(
        randomAnalysis(random),
        1 + Math.floor(3 * random()),
        nearest,
        random(),
      );
      const all = strips(numbers);
      expect(agreesLeaning(all, both('binary', all)), JSON.stringify(numbers)).toBe(true);
    }
  });

  test('where the search finds nothing, a fine scan finds nothing either', () => {
    const random = randomStream(12);
    let empty = 0;
    for (let i = 0; i < 700; i++) {
      const numbers = waldRow(randomAnalysis(random), 2, nearest, random());
      const upper = {
        ...numbers.upper,
        value: (numbers.upper?.value ?? 1) * (1 + 0.6 * random()),
        decimals: 2,
      };
      const all = strips({ ...numbers, upper });
      const lean = both('binary', all);
      if (agreesLeaning(all, lean)) continue;
      empty++;
      const position = all.find((strip) => strip.kind === 'position') as Strip;
      for (let step = 0; step <= 200; step++) {
        const theta =
          position.range.low + (step / 200) * (position.range.high - position.range.low);
        for (const sign of [1, -1] as const) {
          if (sign * theta < 0) continue;
          const seen = sign === 1 ? all : all.map(turned);
          expect(sectionAt(seen, lean, limitMultiplier(all), Math.abs(theta))).toBeUndefined();
        }
      }
    }
    expect(empty).toBeGreaterThan(100);
  });

  test('a point found satisfies the bounds as written in the derivation', () => {
    const random = randomStream(13);
    for (let i = 0; i < 3000; i++) {
      const all = strips(waldRow(randomAnalysis(random), 2, nearest, random()));
      const lean = both('binary', all);
      const point = leaningPoint(all, lean);
      if (point === undefined) throw new Error('no point');
      const { estimate, standardError, arm } = point;
      const k = limitMultiplier(all);
      expect(arm).toBeGreaterThan(k * standardError - 1e-9);
      expect(arm).toBeLessThan(k * standardError + lean.continuity * standardError ** 2 + 1e-9);
      for (const strip of all) {
        if (strip.kind !== 'limit') continue;
        const side = Math.sign(strip.multiplier);
        const ends = [strip.range.low, strip.range.high].map((end) => side * (end - estimate));
        expect(leastLean(Math.min(...ends), 1)).toBeLessThan(arm + 1e-9);
        expect(greatestLean(Math.max(...ends), 1)).toBeGreaterThan(arm - 1e-9);
      }
    }
  });

  test('what other methods could give holds sampled points, and its ends are reached', () => {
    const random = randomStream(14);
    for (let i = 0; i < 60; i++) {
      const numbers = waldRow({ ...randomAnalysis(random), level: 95 }, 2, nearest, undefined);
      if ((numbers.lower?.value ?? 0) < 0.02) continue;
      const all = strips(numbers);
      const lean = both('binary', all);
      const p = leaningExtent(all, lean, ofTest(lean));
      const lower = leaningExtent(all, lean, ofLimit(-1, lean));
      const estimate = leaningExtent(all, lean, ofEstimate);
      if (!p || !lower || !estimate) throw new Error('the ring is not empty');
      const point = leaningPoint(all, lean);
      expect(
        point && point.estimate >= estimate.low - 1e-9 && point.estimate <= estimate.high + 1e-9,
      ).toBe(true);
      const reaches = (low: number, high: number) =>
        agreesLeaning(
          [
            ...all,
            {
              kind: 'statistic',
              of: 'p',
              range: { low, high },
              eitherSign: true,
              likelihood: true,
            },
          ],
          { ...lean, unevenTails: 0 },
        );
      expect(reaches(p.high * 0.9999 - 1e-6, Infinity)).toBe(true);
      expect(reaches(p.high * 1.001 + 1e-6, Infinity)).toBe(false);
    }
  });

  test('rows that no method could give are outside', () => {
    // Rows met in print: an upper limit of the row above, lost and exchanged digits.
    for (const numbers of [
      row('2.821', '1.541', '3.253'),
      row('1.14', '1.10', '1.27'),
      row('0.29', '0.30', '0.92'),
      row('0.21', '0.12', '0.85'),
      row('0.72', '0.596', '0.952'),
    ]) {
      expect(agreement(numbers).outcome).toBe('neither');
      expect(agreement(numbers, 'binary').outcome).toBe('neither');
    }
  });

  test('honest rows that break the standard method are inside', () => {
    const inside: readonly (readonly [ReportedNumbers, string])[] = [
      [row('0.29', '0.09', '0.98', '= 0.03'), 'a log-rank p beside a Wald interval'],
      [row('6.60', '2.11', '20.60', '= 0.0008'), 'the same'],
      [row('14.0', '3.5', '122.2'), 'the exact interval of Doll & Hill 1950'],
      [row('9.08', '3.54', '30.84'), 'a profile interval, R-help'],
      [row('0.55', '0.38', '0.83'), 'a hair off symmetry'],
      [row('1.80', '1.16', '2.75'), 'a hair off symmetry'],
      [row('4.2', '1.1', '17.7'), 'a small sample'],
    ];
    for (const [numbers, why] of inside) {
      expect(agreement(numbers, 'binary').outcome, why).toBe('within another standard method');
    }
    const oneSided = row('0.70', '0.52', '0.95', '= 0.011', { oneSided: true });
    expect(agreement(oneSided).outcome).toBe('within rounding');
  });

  test('of a published table of profile intervals only the copied row is outside', () => {
    const record = recordsOf('printed-numbers').find(({ id }) => id.startsWith('table.PMC2688355'));
    const rows = (
      (record as CheckRecord).inputs as {
        rows: readonly { estimate: string; ci: readonly [string, string] }[];
      }
    ).rows;
    const outside = rows.filter(
      ({ estimate, ci }) => agreement(row(estimate, ...ci), 'binary').outcome === 'neither',
    );
    expect(outside.map(({ estimate, ci }) => [estimate, ...ci])).toEqual([
      ['2.82', '0.57', '2.12'],
    ]);
  });
});

describe('intervals and p-values of standard methods (R 4.2.2, survival 3.5-3)', () => {
  const sets = dataSets();

  test('odds and hazard ratios of two groups: all but discrete p are inside, to 3 decimals', () => {
    const groups = sets.filter(({ design }) =>
      ['odds ratio', 'hazard ratio', 'adjusted odds ratio'].includes(design),
    );
    let [all, exactP, outside, outsideExact, strict] = [0, 0, 0, 0, 0];
    for (const set of groups) {
      for (const decimals of [2, 3]) {
        for (const { p, numbers } of printsOf(set, decimals)) {
          const outcome = outcomeOf(numbers, 'binary');
          const discrete = /Fisher|mid-p/.test(p);
          const neither = outcome === 'neither' ? 1 : 0;
          if (discrete) [exactP, outsideExact] = [exactP + 1, outsideExact + neither];
          else [all, outside] = [all + 1, outside + neither];
          if (!discrete && outcome === 'within rounding') strict++;
        }
      }
    }
    expect(all).toBeGreaterThan(10_000);
    expect(outside).toBe(0);
    expect(outsideExact / exactP).toBeLessThan(0.005);
    // So many honest prints a check for Wald's method alone would have raised.
    expect(strict / all).toBeLessThan(0.7);
  });

  test('risk ratios and ratios per unit, as unknown contrasts: below 1% outside', () => {
    let [all, outside] = [0, 0];
    for (const set of sets) {
      for (const decimals of [2, 3]) {
        for (const { numbers } of printsOf(set, decimals)) {
          const outcome = outcomeOf(numbers, 'unknown');
          all++;
          if (outcome === 'neither') outside++;
        }
      }
    }
    expect(outside / all).toBeLessThan(0.003);
  });
});

test('the others imply by another method at least what they imply by the standard one', () => {
  const random = randomStream(15);
  for (let i = 0; i < 40; i++) {
    const numbers = waldRow(randomAnalysis(random), 2, nearest, 0.9);
    const all = strips(numbers);
    if (!isFeasible(all)) continue;
    for (const { of, strict, leaning } of othersImply(
      all,
      usualReading(numbers, 'log'),
      leanOf('binary', all),
    )) {
      if (!strict || !leaning) continue;
      const room = 1e-4 * (1 + Math.abs(strict.high === Infinity ? 0 : strict.high));
      expect(leaning.low <= strict.low + room, `${of} ${JSON.stringify(numbers)}`).toBe(true);
      expect(leaning.high >= strict.high - room, `${of} ${JSON.stringify(numbers)}`).toBe(true);
    }
  }
});

function limitMultiplier(all: readonly Strip[]): number {
  const limit = all.find((strip) => strip.kind === 'limit');
  return limit?.kind === 'limit' ? Math.abs(limit.multiplier) : 1;
}

function turned(strip: Strip): Strip {
  if (strip.kind === 'spread' || strip.kind === 'statistic') return strip;
  const range = { low: -strip.range.high, high: -strip.range.low };
  return strip.kind === 'limit'
    ? { ...strip, range, multiplier: -strip.multiplier }
    : { ...strip, range };
}
