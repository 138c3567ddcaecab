import { describe, expect, test } from 'vitest';
import {
  distanceInZ,
  impliedP,
  insideLimits,
  leansLittle,
  leastAsymmetry,
  limitsInOrder,
  riskRatioAt,
  sideOfOne,
} from '../src/authoring.ts';
import type { Interval, Printed, PValue } from '../src/model/index.ts';
import { unrounded } from '../src/stats/rounding.ts';

/* What rules ask of printed numbers. Values marked R were made in R 4.2.2 as shown. */

describe('limits', () => {
  test.each([
    ['0.58', '0.90', true],
    ['0.90', '0.58', false],
    ['0.0', '5.2', true],
    ['-0.80', '-0.10', false],
    ['1.0', '1.0', true],
  ])('%s to %s are in order: %s', (lower, upper, inOrder) => {
    expect(limitsInOrder(interval(lower, upper))).toBe(inOrder);
  });

  test.each([
    ['0.72', '0.58', '0.90', true],
    ['0.52', '0.58', '0.90', false],
    ['1.0', '1.02', '1.08', true],
    ['1.09', '1.02', '1.05', false],
  ])('of %s, %s to %s lie around it: %s', (estimate, lower, upper, inside) => {
    expect(insideLimits(printed(estimate), interval(lower, upper))).toBe(inside);
  });

  test.each([
    ['1.05', '2.41', 'above'],
    ['0.58', '0.90', 'below'],
    ['0.95', '1.52', 'around'],
    ['1.00', '1.72', 'undecided'],
    ['0.70', '1.0', 'undecided'],
    ['1.01', '1.72', 'above'],
  ])('of %s to %s lie %s with regard to 1', (lower, upper, side) => {
    expect(sideOfOne(interval(lower, upper))).toBe(side);
  });
});

describe('the p that limits imply', () => {
  // R: f <- function(l, u, level) 2 * pnorm(-abs(log(l * u) / 2) /
  //      (log(u / l) / (2 * qnorm(0.5 + level / 200)))); f(1.05, 2.41, 95)
  test.each([
    ['1.05', '2.41', 95, 0.028562],
    ['0.95', '1.52', 95, 0.125702],
    ['1.03', '1.67', 90, 0.064735],
    ['0.92', '2.75', 99, 0.029000],
  ])('%s to %s at %d%% holds %d', (lower, upper, level, p) => {
    const range = impliedP(interval(lower, upper, level));
    expect(range?.low).toBeLessThan(p);
    expect(range?.high).toBeGreaterThan(p);
    expect((range?.high ?? 1) - (range?.low ?? 0)).toBeLessThan(0.4 * p);
  });
});

describe('the asymmetry of an interval', () => {
  test('is the least that rounding allows', () => {
    // ln(ln(0.975 / 0.725) / ln(0.725 / 0.575)) = 0.2455
    expect(leastAsymmetry(printed('0.72'), interval('0.58', '0.98'))).toBeCloseTo(0.2455, 3);
  });

  test('is the same for a ratio and its reciprocal, as far as rounding is', () => {
    const one = leastAsymmetry(printed('0.5000'), interval('0.4000', '0.8000'));
    const other = leastAsymmetry(printed('2.0000'), interval('1.2500', '2.5000'));
    expect(one).toBeCloseTo(other, 2);
  });

  test('is nothing where the arms may be equal', () => {
    expect(leastAsymmetry(printed('0.72'), interval('0.58', '0.90'))).toBe(0);
    expect(leastAsymmetry(printed('1.0'), interval('1.0', '1.0'))).toBe(0);
  });

  test('is little in 1.39 (1.07 to 1.89), and not in 0.72 (0.58 to 0.98)', () => {
    expect(leansLittle(printed('1.39'), interval('1.07', '1.89'))).toBe(true);
    expect(leansLittle(printed('0.72'), interval('0.58', '0.98'))).toBe(false);
  });
});

describe('the distance of a p from an implied range on the scale of z', () => {
  const implied = { low: 0.0268, high: 0.0303 };

  test.each([
    ['=', '0.03', undefined, 0],
    // R: qnorm(1 - c(0.0035, 0.0268, 0.0303, 0.095, 0.001, 0.05) / 2) gives
    //    2.9200 2.2144 2.1662 1.6696 3.2905 1.9600
    ['=', '0.003', undefined, 2.920 - 2.2144],
    ['=', '0.10', undefined, 2.1662 - 1.6696],
    ['<', '0.05', undefined, 0],
    ['<', '0.001', undefined, 3.2905 - 2.2144],
    ['>', '0.05', undefined, 2.1662 - 1.9600],
    ['=', '0.015', true, 0],
  ] as const)('p %s %s, one-sided %s, is %d away', (relation, text, oneSided, distance) => {
    const p: PValue = {
      relation,
      printed: printed(text),
      tests: 'result',
      span: { start: 0, end: 1 },
      ...(oneSided === undefined ? {} : { oneSided }),
    };
    expect(distanceInZ(p, implied)).toBeCloseTo(distance, 2);
  });
});

describe('the risk ratio behind an odds ratio', () => {
  // Zhang & Yu 1998: OR / (1 - p0 + p0 * OR). OR 2 at 1, 5, 10, 20, 40, 60%.
  test.each([
    [0.01, 1.980], [0.05, 1.905], [0.1, 1.818], [0.2, 1.667], [0.4, 1.429], [0.6, 1.25],
  ])('2 at a share of %d is %d', (share, riskRatio) => {
    expect(riskRatioAt(share, { low: 2, high: 2 })?.low).toBeCloseTo(riskRatio, 3);
  });

  test('has a range where the odds ratio has one, and is absent for a share of nothing', () => {
    const range = riskRatioAt(0.45, unrounded(printed('2.0')));
    expect(range?.low).toBeLessThan(1.379);
    expect(range?.high).toBeGreaterThan(1.379);
    expect(riskRatioAt(0, { low: 2, high: 2 })).toBeUndefined();
  });
});

function interval(lower: string, upper: string, level = 95): Interval {
  return {
    lower: printed(lower),
    upper: printed(upper),
    level,
    type: 'confidence',
    span: { start: 0, end: 1 },
  };
}

function printed(text: string): Printed {
  return {
    text,
    plain: text,
    value: Number(text),
    decimals: text.split('.')[1]?.length ?? 0,
    percent: false,
    span: { start: 0, end: text.length },
  };
}
