import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { isAbsence } from '../src/stats/absence.ts';
import { altmanBlandP, altmanBlandZ } from '../src/stats/altman-bland.ts';
import { asymmetryIndex, asymmetryRange, expectedAsymmetry } from '../src/stats/asymmetry.ts';
import { coefficientRow, pOfWald, ratioOfCoefficient } from '../src/stats/coefficient-row.ts';
import { intervalFromP, workedOut, workedOutRanges } from '../src/stats/interval-arithmetic.ts';
import { levelSignature, multiplicity, multiplierSignature } from '../src/stats/level-signature.ts';
import {
  byRuleOfFour,
  roundedHalfUp,
  ruleOfFourDecimals,
  styledP,
} from '../src/stats/number-style.ts';
import { printedNumber, typedRange } from '../src/stats/printed-text.ts';
import { exponentials, includes, logarithms, magnitudes, shared } from '../src/stats/ranges.ts';
import { rescaled, rescaledRange } from '../src/stats/rescale.ts';
import {
  isPrintedValue,
  probabilitiesBehind,
  refuseUnprinted,
  relatedValues,
  uncut,
  unrounded,
  unroundedTwice,
} from '../src/stats/rounding.ts';
import { isSymmetric, tableIntervals } from '../src/stats/table-intervals.ts';
import { row } from './reported-row.ts';
import { given } from './records.ts';

const printed = (value: number, decimals: number) => ({ value, decimals });

describe('printed numbers as ranges', () => {
  test('any value lies in the range of what it is rounded to', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e6, max: 1e6, noNaN: true }),
        fc.integer({ min: 0, max: 9 }),
        (value, decimals) =>
          includes(unrounded(printed(Number(value.toFixed(decimals)), decimals)), value),
      ),
    );
  });

  test('cutting off goes towards zero', () => {
    expect(uncut(printed(0.72, 2)).low).toBeCloseTo(0.72, 12);
    expect(uncut(printed(0.72, 2)).high).toBeCloseTo(0.73, 12);
    expect(uncut(printed(-0.72, 2)).low).toBeCloseTo(-0.73, 12);
    expect(uncut(printed(-0.72, 2)).high).toBeCloseTo(-0.72, 12);
  });

  test('rounding twice reaches a twentieth of a place further', () => {
    const twice = unroundedTwice(printed(0.72, 2));
    expect([twice.low, twice.high]).toEqual([
      expect.closeTo(0.7145, 12),
      expect.closeTo(0.7255, 12),
    ]);
  });

  test('a relation makes a range', () => {
    expect(relatedValues('<', printed(2, 0))).toEqual({ low: -Infinity, high: 2 });
    expect(relatedValues('>=', printed(2, 0))).toEqual({ low: 2, high: Infinity });
    expect(probabilitiesBehind('<', printed(0.001, 3))).toEqual({ low: 0, high: 0.001 });
    expect(probabilitiesBehind('>', printed(0.05, 2))).toEqual({ low: 0.05, high: 1 });
    expect(given(probabilitiesBehind('=', printed(0, 3))).high).toBeCloseTo(0.0005, 12);
    expect(given(probabilitiesBehind('=', printed(1, 2))).low).toBeCloseTo(0.995, 12);
    expect(given(probabilitiesBehind('=', printed(1, 2))).high).toBe(1);
  });

  test('what is no probability, and no number, says so', () => {
    for (const p of [printed(1.2, 1), printed(-0.5, 1)]) {
      const answer = probabilitiesBehind('=', p);
      expect(isAbsence(answer) && answer.because).toBe(`${p.value} is not a probability`);
    }
    expect(isAbsence(probabilitiesBehind('=', printed(NaN, 2)))).toBe(true);
    expect(isPrintedValue(printed(1, 0.5))).toBe(false);
    expect(refuseUnprinted({ estimate: printed(1, 2) })).toBeUndefined();
    expect(refuseUnprinted({ estimate: printed(NaN, 2) })?.because).toBe(
      'the estimate is not a number',
    );
    expect(() => unrounded(printed(NaN, 2))).toThrow(RangeError);
    expect(unrounded(printed(Infinity, 0))).toEqual({ low: Infinity, high: Infinity });
  });

  test('ranges are taken over to the log scale as far as it goes', () => {
    expect(logarithms({ low: -0.005, high: 0.005 })?.low).toBe(-Infinity);
    expect(logarithms({ low: -2, high: -1 })).toBeUndefined();
    expect(exponentials({ low: 0, high: 0 })).toEqual({ low: 1, high: 1 });
    expect(magnitudes({ low: -3, high: 2 })).toEqual({ low: 0, high: 3 });
    expect(shared({ low: 0, high: 1 }, { low: 1, high: 2 })).toEqual({ low: 1, high: 1 });
    expect(shared({ low: 0, high: 1 }, { low: 1.1, high: 2 })).toBeUndefined();
  });
});

describe('a typed number', () => {
  const read = (text: string) => {
    const { value, decimals, percent, relation } = given(printedNumber(text));
    return [value, decimals, percent, relation];
  };

  test('is read in all its usual spellings', () => {
    expect(read('0.72')).toEqual([0.72, 2, false, '=']);
    expect(read('.72')).toEqual([0.72, 2, false, '=']);
    expect(read('0·72')).toEqual([0.72, 2, false, '=']);
    expect(read('14')).toEqual([14, 0, false, '=']);
    expect(read('35.1%')).toEqual([35.1, 1, true, '=']);
    expect(read('1.2e-5')).toEqual([1.2e-5, 6, false, '=']);
    expect(read('1.2 × 10⁻⁵')).toEqual([1.2e-5, 6, false, '=']);
    expect(read('3.39E8')).toEqual([3.39e8, -6, false, '=']);
    expect(read('1,234.5')).toEqual([1234.5, 1, false, '=']);
    expect(read('0,850')).toEqual([0.85, 3, false, '=']);
    expect(read('−0.50')).toEqual([-0.5, 2, false, '=']);
    expect(read('≤ 0.001')).toEqual([0.001, 3, false, '<=']);
    expect(read('∞')).toEqual([Infinity, 0, false, '=']);
    expect(typedRange(given(printedNumber('<0.5'))).high).toBe(0.5);
  });

  test('is refused with a reason where it is none', () => {
    for (const text of [
      '',
      'NS',
      '1.2.3',
      '1..2',
      '--1',
      '1,23,4',
      '0.5-0.7',
      '1e99999',
      '.',
      '1 2',
    ]) {
      const answer = printedNumber(text);
      expect(isAbsence(answer), text).toBe(true);
    }
  });

  test('comes back as it was printed', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -1e9, max: 1e9 }),
        fc.integer({ min: 0, max: 8 }),
        (digits, decimals) => {
          const text = Number(`${digits}e${-decimals}`).toFixed(decimals);
          const number = given(printedNumber(text));
          return (
            number.value.toFixed(number.decimals) === text.replace(/^-(0(\.0*)?)$/, '$1') ||
            number.value.toFixed(number.decimals) === text
          );
        },
      ),
    );
  });
});

describe('bad input to every function has a reason for its answer', () => {
  const refused: readonly (readonly [string, () => unknown])[] = [
    ['limits out of order', () => workedOut('log', 2, { low: 3, high: 1 }, 95)],
    ['a zero limit', () => workedOut('log', 2, { low: 0, high: 3 }, 95)],
    ['a negative ratio', () => workedOut('log', -2, { low: 1, high: 3 }, 95)],
    ['NaN', () => workedOut('difference', NaN, { low: 1, high: 3 }, 95)],
    ['an infinite limit', () => workedOut('log', 2, { low: 1, high: Infinity }, 95)],
    ['a level of 40', () => workedOut('log', 2, { low: 1, high: 3 }, 40)],
    [
      'a limit rounded from zero',
      () => workedOutRanges('log', printed(2, 1), printed(0, 1), printed(5, 1), 95),
    ],
    [
      'printed limits out of order',
      () => workedOutRanges('log', printed(2, 1), printed(5, 1), printed(1, 1), 95),
    ],
    [
      'printed NaN',
      () => workedOutRanges('log', printed(NaN, 1), printed(1, 1), printed(5, 1), 95),
    ],
    ['p of 0', () => intervalFromP('log', 2, 0, 95)],
    ['no effect', () => intervalFromP('log', 1, 0.5, 95)],
    ['a level of 101', () => intervalFromP('log', 2, 0.5, 101)],
    ['a ratio of 0', () => intervalFromP('log', 0, 0.5, 95)],
    ['negative z', () => altmanBlandP(-1)],
    ['NaN z', () => altmanBlandP(NaN)],
    ['p of 0 by formula', () => altmanBlandZ(0)],
    ['p of 2', () => altmanBlandZ(2)],
    ['an estimate outside', () => asymmetryIndex(5, { low: 1, high: 3 })],
    ['a lower limit of 0', () => asymmetryIndex(2, { low: 0, high: 3 })],
    [
      'a printed estimate outside',
      () => asymmetryRange(printed(5, 1), printed(1, 1), printed(3, 1)),
    ],
    ['a printed NaN', () => asymmetryRange(printed(NaN, 1), printed(1, 1), printed(3, 1))],
    ['a zero cell', () => expectedAsymmetry(0, 1, 2, 3, 95)],
    ['a level of 10', () => expectedAsymmetry(1, 1, 2, 3, 10)],
    ['a coefficient of NaN', () => coefficientRow(printed(NaN, 2), undefined)],
    ['a standard error of NaN', () => coefficientRow(printed(1, 2), printed(NaN, 2))],
    ['a level of 99 as a share', () => coefficientRow(printed(1, 2), printed(1, 2), 0.99)],
    ['a Wald statistic of NaN', () => pOfWald(printed(NaN, 2))],
    ['a ratio of NaN', () => ratioOfCoefficient(printed(1, 2), printed(NaN, 2))],
    ['an actual level of 20', () => levelSignature(20, 95)],
    ['a stated level of 20', () => levelSignature(95, 20)],
    ['a multiplier of 0', () => multiplierSignature(0, 95)],
    ['half a test', () => multiplicity(0.05, 0.5)],
    ['a p of 7', () => multiplicity(7, 2)],
    ['units of 0', () => rescaled(2, { low: 1, high: 3 }, 0, 95)],
    ['units of NaN', () => rescaled(2, { low: 1, high: 3 }, NaN, 95)],
    ['a ratio of −1', () => rescaled(-1, { low: 1, high: 3 }, 2, 95)],
    ['a range from 0', () => rescaledRange({ low: 0, high: 2 }, 2)],
    ['a rule of four for 0', () => byRuleOfFour(0)],
    ['a rule of four for NaN', () => byRuleOfFour(NaN)],
    ['decimals for ∞', () => ruleOfFourDecimals(Infinity)],
    ['a p-value of −0.1', () => styledP(-0.1, 'AMA')],
    ['a p-value of NaN', () => styledP(NaN, 'NEJM')],
  ];

  for (const [name, ask] of refused) {
    test(name, () => {
      const answer = ask();
      expect(isAbsence(answer)).toBe(true);
      if (isAbsence(answer)) expect(answer.because.length).toBeGreaterThan(10);
    });
  }

  test('tables without a row that can be judged, and rows without limits, have no answer', () => {
    expect(tableIntervals([])).toBeUndefined();
    expect(tableIntervals([row('2.0')])).toBeUndefined();
    expect(isSymmetric(row('2.0', '1.0'))).toBeUndefined();
    expect(isSymmetric(row('-2.0', '1.0', '3.0'))).toBeUndefined();
  });
});

describe('styles', () => {
  test('halves are rounded up by their written digits', () => {
    expect(roundedHalfUp(1.005, 2)).toBe('1.01');
    expect(roundedHalfUp(2.5, 0)).toBe('3');
    expect(roundedHalfUp(1234, -2)).toBe('1200');
    expect(roundedHalfUp(1e-7, 3)).toBe('0.000');
  });

  test('the rule of four keeps two or three digits', () => {
    expect([22.68, 7.51, 73.67, 0.0437, 1234].map((x) => given(byRuleOfFour(x)))).toEqual([
      '22.7',
      '7.5',
      '74',
      '0.044',
      '1230',
    ]);
    expect([0.88, 22.7, 74, 1.234].map((x) => given(ruleOfFourDecimals(x)))).toEqual([2, 1, 0, 2]);
  });

  test('rescaling turns limits for a negative number of units', () => {
    const turned = given(rescaled(0.98, { low: 0.97, high: 0.99 }, -10, 95));
    expect(turned.interval.low).toBeLessThan(turned.ratio);
    expect(turned.ratio).toBeLessThan(turned.interval.high);
    expect(given(rescaledRange({ low: 0.97, high: 0.99 }, -10)).low).toBeCloseTo(0.99 ** -10, 12);
  });

  test('a Wald row with no effect has p up to 1 and no NaN', () => {
    const none = given(coefficientRow(printed(0, 3), printed(0.21, 3)));
    expect(none.p?.high).toBe(1);
    const exact = given(coefficientRow(printed(0, 3), printed(0, 3)));
    expect(Object.values(exact).every(({ low, high }) => low <= high)).toBe(true);
  });
});
