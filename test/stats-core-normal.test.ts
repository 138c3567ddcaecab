import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { isAbsence } from '../src/stats/absence.ts';
import {
  density,
  log10TwoSidedP,
  logUpperTail,
  multiplier,
  quantile,
  twoSidedP,
  upperTail,
  zOfLogUpperTail,
  zOfTwoSidedP,
  zOfUpperTail,
} from '../src/stats/normal.ts';
import { randomStream } from './reported-row.ts';

interface Point {
  readonly what: string;
  readonly x: number;
  readonly y: number;
  readonly logY: number;
}

function points(what: string): readonly Point[] {
  const place = new URL('../fixtures/reference/normal.csv', import.meta.url);
  return readFileSync(place, 'utf8')
    .trim()
    .split('\n')
    .slice(1)
    .map((line) => line.split(',') as [string, string, string, string])
    .map(([kind, x, y, logY]) => ({ what: kind, x: Number(x), y: Number(y), logY: Number(logY) }))
    .filter((point) => point.what === what);
}

describe('the normal distribution against 60-digit arithmetic (mpmath 1.3)', () => {
  test('tails to 3e-15 relative, down to 1e-307', () => {
    let judged = 0;
    for (const { x, y } of points('tail').filter((point) => point.y > 1e-307)) {
      judged++;
      expect(Math.abs(upperTail(x) / y - 1), `z = ${x}`).toBeLessThan(3e-15);
    }
    expect(judged).toBeGreaterThan(200);
  });

  test('logarithms of tails to 1e-14, without limit', () => {
    for (const { x, logY } of points('tail')) {
      expect(Math.abs(logUpperTail(x) - logY), `z = ${x}`).toBeLessThan(
        1e-14 * Math.max(1e-2, Math.abs(logY)),
      );
    }
  });

  test('quantiles to 2e-15 relative, from 1e-300 to 1 − 1e-16', () => {
    for (const { x, y } of points('quantile')) {
      expect(Math.abs(quantile(x) - y), `p = ${x}`).toBeLessThan(2e-15 * Math.abs(y));
    }
  });
});

describe('the normal distribution', () => {
  test('the usual numbers come out to the last digit', () => {
    expect(multiplier(95)).toBe(1.959963984540054);
    expect(Math.abs(zOfUpperTail(0.025) - 1.959963984540054)).toBeLessThan(5e-16);
    expect(upperTail(0)).toBe(0.5);
    expect(quantile(0.5)).toBe(0);
    expect(twoSidedP(0)).toBe(1);
    expect([upperTail(Infinity), upperTail(-Infinity), twoSidedP(-Infinity)]).toEqual([0, 1, 0]);
    expect([zOfUpperTail(0), zOfUpperTail(1), zOfTwoSidedP(0), zOfTwoSidedP(1)]).toEqual([
      Infinity,
      -Infinity,
      Infinity,
      0,
    ]);
    expect(log10TwoSidedP(40)).toBeCloseTo(-349.1359764636819, 10);
    expect(zOfLogUpperTail(-1e6)).toBeCloseTo(1414.208, 3);
    expect(density(0)).toBeCloseTo(0.3989422804014327, 15);
  });

  test('tail and quantile are inverses, and tails fall', () => {
    const random = randomStream(41);
    for (let i = 0; i < 5000; i++) {
      const z = 37 * random();
      expect(Math.abs(zOfUpperTail(upperTail(z)) - z)).toBeLessThan(1e-13 * (1 + z));
      expect(upperTail(z + 0.01)).toBeLessThan(upperTail(z));
      expect(upperTail(-z)).toBe(1 - upperTail(z));
    }
  });

  test('levels have a multiplier from 50 to below 100, and others a reason', () => {
    expect(multiplier(50)).toBeCloseTo(0.6744897501960817, 14);
    for (const level of [49.9, 100, 0.95, -95, NaN, Infinity]) {
      const answer = multiplier(level);
      expect(isAbsence(answer) && answer.because, `${level}`).toBe(
        `a level of ${level}% is not between 50% and 100%`,
      );
    }
  });

  test('NaN and impossible probabilities throw: the fault of a caller, not of a manuscript', () => {
    for (const ask of [
      upperTail,
      logUpperTail,
      twoSidedP,
      zOfUpperTail,
      zOfTwoSidedP,
      zOfLogUpperTail,
    ]) {
      expect(() => ask(NaN)).toThrow(RangeError);
    }
    expect(() => zOfUpperTail(1.1)).toThrow('a probability cannot be 1.1');
    expect(() => quantile(-0.1)).toThrow(RangeError);
  });
});
