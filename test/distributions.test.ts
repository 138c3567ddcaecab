import fc from 'fast-check';
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { isAbsence, type Maybe } from '../src/stats/absence.ts';
import { betaDistributionTails, betaQuantile } from '../src/stats/beta-distribution.ts';
import { binomialQuantile, binomialTails } from '../src/stats/binomial.ts';
import { chiSquareP, chiSquareQuantile, chiSquareTails } from '../src/stats/chi-square.ts';
import { fP, fQuantile, fTails } from '../src/stats/f-distribution.ts';
import { hypergeometricQuantile, hypergeometricTails } from '../src/stats/hypergeometric.ts';
import { logHypergeometricMass } from '../src/stats/margins.ts';
import { twoSidedP } from '../src/stats/normal.ts';
import { poissonQuantile, poissonTails } from '../src/stats/poisson.ts';
import { secondOpinion } from '../src/stats/second-opinion.ts';
import { logGamma } from '../src/stats/stirling.ts';
import { studentP, studentQuantile, studentTails } from '../src/stats/student-t.ts';
import type { CountTails, Tails } from '../src/stats/tails.ts';
import { given } from './records.ts';

/*
 * The distributions against values of 20 digits made with mpmath, by sums of positive
 * terms (fixtures/reference/make-distributions.py). R 4.2.2 was run over the same
 * points: it agrees with them to 2e-12 (tails) and, but for its F and beta quantiles
 * at 1e-12, to 2e-14 (quantiles).
 */

/** The largest relative distance found is 2.3e-13 (tails) and 1.5e-14 (quantiles). */
const TAIL_TOLERANCE = 5e-13;
const QUANTILE_TOLERANCE = 5e-14;

/** The rows of a reference table under its header. */
function rowsOf(name: string): string[][] {
  const text = readFileSync(new URL(`../fixtures/reference/${name}`, import.meta.url), 'utf8');
  return text.trim().split('\n').slice(1).map((line) => line.split(','));
}

function atMostAtLeast(tails: Maybe<CountTails>): Tails {
  const { atMost, atLeast } = given(tails);
  return { lower: atMost, upper: atLeast };
}

const TAILS: Readonly<Record<string, (x: number, a: number, b: number) => Tails>> = {
  student: (t, df) => given(studentTails(t, df)),
  'chi-square': (x, df) => given(chiSquareTails(x, df)),
  F: (f, d1, d2) => given(fTails(f, d1, d2)),
  beta: (x, a, b) => given(betaDistributionTails(x, a, b)),
  Poisson: (k, mean) => atMostAtLeast(poissonTails(k, mean)),
  binomial: (k, n, p) => atMostAtLeast(binomialTails(k, n, p)),
};

const QUANTILES: Readonly<Record<string, (p: number, a: number, b: number) => Maybe<number>>> = {
  student: (upper, df) => studentQuantile(upper, df),
  'chi-square': chiSquareQuantile,
  F: fQuantile,
  beta: betaQuantile,
};

function expectWithin(got: number, wanted: string, tolerance: number, where: string): void {
  const distance = Math.abs(got / Number(wanted) - 1);
  expect(distance <= tolerance, `${where}: ${got} for ${wanted}, ${distance} apart`).toBe(true);
}

describe('tails', () => {
  it.each(Object.keys(TAILS))('keep twelve digits down to 1e-300: %s', (name) => {
    const rows = rowsOf('distributions-tails.csv').filter(([of]) => of === name);
    expect(rows.length).toBeGreaterThan(40);
    for (const [, given = '', lower, upper] of rows) {
      const [x = 0, a = 0, b = 0] = given.split(' ').map(Number);
      const tails = TAILS[name]!(x, a, b);
      if (lower) expectWithin(tails.lower, lower, TAIL_TOLERANCE, `${name} below ${given}`);
      if (upper) expectWithin(tails.upper, upper, TAIL_TOLERANCE, `${name} above ${given}`);
    }
  });

  it('of Student with very many degrees of freedom are those of the normal', () => {
    fc.assert(fc.property(fc.double({ min: -8, max: 8, noNaN: true }), (t) => {
      expectWithin(given(studentP(t, 1e9)), String(twoSidedP(t)), 1e-5, `t ${t}`);
    }));
  });

  it('meet where two formulas for Student hand over, at 100000 degrees of freedom', () => {
    for (const t of [0.01, 0.5, 1.96, 5, 12, 25, 37]) {
      const below = given(studentP(t, 99999.9999));
      expectWithin(given(studentP(t, 1e5)), String(below), 2e-9 * (1 + t ** 4 / 4), `t ${t}`);
    }
  });

  it('of F on 1 degree of freedom are those of t squared, and of χ² on 2 are e^(−x/2)', () => {
    fc.assert(fc.property(
      fc.double({ min: 1e-3, max: 30, noNaN: true }), fc.double({ min: 1, max: 500, noNaN: true }),
      (t, df) => {
        expectWithin(given(fP(t * t, 1, df)), String(given(studentP(t, df))), 1e-12, `${t} ${df}`);
        expectWithin(given(chiSquareP(t, 2)), String(Math.exp(-t / 2)), 1e-13, `χ² ${t}`);
      },
    ));
  });

  it('of a count share its own probability, and rise and fall with the parameter', () => {
    const counts = fc.integer({ min: 1, max: 300 });
    fc.assert(fc.property(counts, counts, fc.double({ min: 0.001, max: 0.99, noNaN: true }),
      (one, other, share) => {
        const [events, total] = [Math.min(one, other), Math.max(one, other)];
        const tails = given(binomialTails(events, total, share));
        expect(tails.atMost + tails.atLeast - tails.exactly).toBeCloseTo(1, 12);
        const more = given(binomialTails(events, total, share * 1.01));
        expect(more.atLeast).toBeGreaterThanOrEqual(tails.atLeast);
        const poisson = given(poissonTails(events, total * share));
        expect(poisson.atMost + poisson.atLeast - poisson.exactly).toBeCloseTo(1, 12);
      }));
  });

  it('of the hypergeometric come to 1 over all counts, and 16/70 for three cups of tea', () => {
    const tea = { marked: 4, unmarked: 4, drawn: 4 };
    const { exactly, atLeast } = given(hypergeometricTails(3, tea));
    expectWithin(exactly, String(16 / 70), 1e-14, 'tea');
    expectWithin(atLeast, String(17 / 70), 1e-14, 'tea');
    const size = fc.integer({ min: 1, max: 60 });
    fc.assert(fc.property(size, size, fc.double({ min: 0, max: 1, noNaN: true }),
      (marked, unmarked, share) => {
        const drawn = Math.round(share * (marked + unmarked));
        let sum = 0;
        for (let k = Math.max(0, drawn - unmarked); k <= Math.min(marked, drawn); k++) {
          sum += Math.exp(logHypergeometricMass(k, { marked, unmarked, drawn }));
        }
        expect(sum).toBeCloseTo(1, 12);
      }));
  });
});

describe('quantiles', () => {
  it.each(Object.keys(QUANTILES))('keep thirteen digits: %s', (name) => {
    const rows = rowsOf('distributions-quantiles.csv').filter(([of]) => of === name);
    expect(rows.length).toBeGreaterThan(40);
    for (const [, given_ = '', , probability, wanted = ''] of rows) {
      const [a = 0, b = 0] = given_.split(' ').map(Number);
      const found = given(QUANTILES[name]!(Number(probability), a, b));
      expectWithin(found, wanted, QUANTILE_TOLERANCE, `${name} ${given_} at ${probability}`);
    }
  });

  it('of counts are the first that reach their share, as qbinom, qpois and qhyper of R say', () => {
    expect(binomialQuantile(0.975, 10, 0.5)).toBe(8);
    expect(binomialQuantile(0.025, 400, 0.02)).toBe(3);
    expect(poissonQuantile(0.975, 2)).toBe(5);
    expect(poissonQuantile(0.025, 70)).toBe(54);
    const margins = { marked: 40, unmarked: 160, drawn: 50 };
    expect(hypergeometricQuantile(0.975, margins)).toBe(15);
    expect(hypergeometricQuantile(0.025, margins)).toBe(5);
  });

  it('undo the tails', () => {
    fc.assert(fc.property(
      fc.double({ min: 1e-12, max: 0.999, noNaN: true }),
      fc.double({ min: 0.5, max: 2000, noNaN: true }),
      (p, df) => {
        const x = given(chiSquareQuantile(p, df));
        const again = given(chiSquareTails(x, df)).lower;
        expectWithin(again, String(p), 1e-10, `χ² ${df}`);
        const t = given(studentQuantile(p, df));
        expectWithin(given(studentTails(t, df)).upper, String(p), 1e-11, `t ${df}`);
      },
    ), { numRuns: 60 });
  });
});

describe('ln Γ', () => {
  it('is that of factorials, and of a half', () => {
    let factorial = 0;
    for (let n = 1; n <= 170; n++) {
      expect(Math.abs(logGamma(n) - factorial)).toBeLessThan(3e-15 * Math.max(1, factorial));
      factorial += Math.log(n);
    }
    expect(logGamma(0.5)).toBeCloseTo(0.5 * Math.log(Math.PI), 14);
  });
});

describe('an independent library', () => {
  it('has the same opinion of tails, quantiles and masses, to a millionth', async () => {
    for (const [t, df] of [[2.5, 10], [0.3, 4], [12, 60], [40, 7]] as const) {
      const other = given(await secondOpinion({ of: 'two-sided t', t, df }));
      expectWithin(given(studentP(t, df)), String(other), 1e-6, `t ${t} on ${df}`);
    }
    for (const [f, d1, d2] of [[3.2, 2, 57], [80, 3, 20], [1, 10, 10]] as const) {
      const other = given(await secondOpinion({ of: 'F tail', f, dfs: [d1, d2] }));
      expectWithin(given(fP(f, d1, d2)), String(other), 1e-6, `F ${f}`);
    }
    for (const lower of [0.025, 0.5, 0.975]) {
      const t = await secondOpinion({ of: 't quantile', lower, df: 24 });
      expect(given(studentQuantile(1 - lower, 24))).toBeCloseTo(given(t), 6);
      const x = given(await secondOpinion({ of: 'chi-square quantile', lower, df: 9 }));
      expectWithin(given(chiSquareQuantile(lower, 9)), String(x), 1e-6, 'χ²');
      const b = given(await secondOpinion({ of: 'beta quantile', lower, shapes: [82, 182] }));
      expectWithin(given(betaQuantile(lower, 82, 182)), String(b), 1e-6, 'beta');
    }
    const margins = { marked: 11037, unmarked: 11034, drawn: 293 };
    const mass = given(await secondOpinion({ of: 'hypergeometric mass', count: 104, margins }));
    expectWithin(Math.exp(logHypergeometricMass(104, margins)), String(mass), 1e-9, 'mass');
  });
});

describe('what is no question', () => {
  it('has a reason for an answer, never NaN', () => {
    const odd = fc.double();
    fc.assert(fc.property(odd, odd, odd, (x, a, b) => {
      for (const answer of [
        studentTails(x, a), chiSquareTails(x, Math.min(a, 1e6)), fTails(x, a, b),
        studentQuantile(x, a), chiSquareQuantile(x, a), poissonTails(x, a), binomialTails(x, a, b),
      ]) {
        const values = isAbsence(answer) ? [] : typeof answer === 'number' ? [answer]
          : Object.values(answer as Tails | CountTails);
        expect(values.every((value: number) => !Number.isNaN(value))).toBe(true);
      }
    }), { numRuns: 300 });
    expect(isAbsence(studentTails(NaN, 5))).toBe(true);
    expect(isAbsence(studentTails(1, 0))).toBe(true);
    expect(isAbsence(chiSquareP(1e9, 2e9))).toBe(true);
    expect(isAbsence(fP(-1, 2, 3))).toBe(true);
    expect(isAbsence(studentQuantile(0, 5))).toBe(true);
    expect(isAbsence(binomialTails(13, 12, 0.5))).toBe(true);
  });
});
