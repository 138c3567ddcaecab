import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { pInWords, percentInWords, rangeInWords } from '../src/authoring.ts';

describe('a range in words', () => {
  test.each([
    [2.3912, 2.4367, 2, '2.39 to 2.44'],
    [2.39, 2.39, 2, '2.39'],
    [0.715, 0.725, 3, '0.715 to 0.725'],
    [1, Infinity, 1, '1.0 to ∞'],
    [12.3, 14.2, 0, '12 to 15'],
    [-0.126, 0.004, 2, '-0.13 to 0.01'],
  ])('from %d to %d with %d decimals is "%s"', (low, high, decimals, words) => {
    expect(rangeInWords({ low, high }, decimals)).toBe(words);
  });

  test('never leaves out a value of the range', () => {
    const numbers = fc.double({ min: 0.001, max: 1000, noNaN: true });
    fc.assert(fc.property(numbers, numbers, fc.integer({ min: 0, max: 4 }), (a, b, decimals) => {
      const [low, high] = [Math.min(a, b), Math.max(a, b)];
      const [first, last] = rangeInWords({ low, high }, decimals).split(' to ').map(Number);
      expect(first).toBeLessThanOrEqual(low + 1e-6);
      expect(last ?? first).toBeGreaterThanOrEqual(high - 1e-6);
    }));
  });
});

describe('a range of p-values in words', () => {
  test.each([
    [0.0362, 0.0531, '0.036 to 0.054'],
    [0.2213, 0.2467, '0.22 to 0.25'],
    [1e-9, 3e-8, 'below 0.0001'],
    [0.00001, 0.00043, 'at most 0.0005'],
    [0.9981, 1, '0.99 to 1.00'],
    [0.05, 0.05, '0.050'],
    [0, 1, 'at most 1'],
  ])('from %d to %d is "%s"', (low, high, words) => {
    expect(pInWords({ low, high })).toBe(words);
  });
});

test('a share in words is a percentage with at most one decimal', () => {
  expect([0.345, 0.4, 0.1234].map(percentInWords)).toEqual(['34.5%', '40%', '12.3%']);
});
