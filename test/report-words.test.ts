import fc from 'fast-check';
import stringWidth from 'string-width';
import { describe, expect, test } from 'vitest';
import {
  counted, decimalsFor, grouped, listed, pRangeInWords, rangeInWords,
} from '../src/report/numbers-in-words.ts';
import { countInWords, resultInWords } from '../src/report/result-in-words.ts';
import { widthOf, wrap } from '../src/report/wrap.ts';
import { printed, ratioIn } from './made/examinations.ts';

describe('numbers in words', () => {
  test('a range is rounded outwards, so that nothing in it is lost', () => {
    expect(rangeInWords({ low: 2.3912, high: 2.4367 }, 2)).toBe('2.39 to 2.44');
    expect(rangeInWords({ low: 2.39, high: 2.44 }, 2)).toBe('2.39 to 2.44');
    expect(rangeInWords({ low: 0.7498, high: 0.7504 }, 3)).toBe('0.749 to 0.751');
  });

  test('a range without an end says so', () => {
    expect(rangeInWords({ low: 3, high: Infinity }, 1)).toBe('at least 3.0');
    expect(rangeInWords({ low: -Infinity, high: 3 }, 1)).toBe('at most 3.0');
    expect(rangeInWords({ low: -Infinity, high: Infinity }, 1)).toBe('any number');
    expect(rangeInWords({ low: 4, high: 4 }, 0)).toBe('4');
  });

  test('three digits count, wherever the point is', () => {
    expect(decimalsFor({ low: 0.7536, high: 0.7571 }, 3)).toBe(3);
    expect(decimalsFor({ low: 12.3, high: 14 }, 3)).toBe(1);
    expect(decimalsFor({ low: 1234, high: 1300 }, 3)).toBe(0);
    expect(decimalsFor({ low: 0, high: 0 }, 3)).toBe(0);
  });

  test('p-values have two digits that count, and an end at 0.0001', () => {
    expect(pRangeInWords({ low: 0.0361, high: 0.0538 })).toBe('0.036 to 0.054');
    expect(pRangeInWords({ low: 0.221, high: 0.249 })).toBe('0.22 to 0.25');
    expect(pRangeInWords({ low: 0, high: 0.00002 })).toBe('below 0.0001');
    expect(pRangeInWords({ low: 0, high: 0.0213 })).toBe('at most 0.0213');
  });

  test('counts take their noun, and lists their "and"', () => {
    expect([counted(1, 'check'), counted(2, 'check'), grouped(1_234_567)])
      .toEqual(['1 check', '2 checks', '1,234,567']);
    expect([listed([]), listed(['a']), listed(['a', 'b']), listed(['a', 'b', 'c'])])
      .toEqual(['', 'a', 'a and b', 'a, b and c']);
  });
});

describe('results in words', () => {
  const text = '45 of 120 (37·5%), HR 0·72 (90% CrI 0·58–0·98; P<0·03)';
  const ratio = ratioIn(text, { estimate: '0·72', lower: '0·58', upper: '0·98', p: '0·03' });
  const count = { count: printed(text, '45'), total: printed(text, '120'),
    percent: printed(text, '37·5%'), span: { start: 0, end: 17 } };

  test('are written one way, however they are printed', () => {
    const { interval, p } = ratio;
    if (interval === undefined || p === undefined) throw new Error('the ratio lacks a part');
    expect(resultInWords({
      ...ratio,
      interval: { ...interval, level: 90, type: 'credible' },
      p: { ...p, relation: '<=', tests: 'trend' },
    })).toBe('HR 0.72 (90% CrI 0.58 to 0.98), p ≤ 0.03 for trend');
    const { level: _, ...unsaid } = interval;
    const { estimate: __, p: ___, ...rest } = ratio;
    expect(resultInWords({ ...rest, interval: unsaid })).toBe('HR CI 0.58 to 0.98');
  });

  test('counts stand with their total and share', () => {
    expect(countInWords(count)).toBe('45 of 120 (37.5%)');
    expect(countInWords({ percent: count.percent, total: count.total, span: count.span }))
      .toBe('37.5% of 120');
    const { estimate: _, interval: __, p: ___, measure: ____, ...bare } = ratio;
    expect(resultInWords({ ...bare, kind: 'proportion', counts: [count] }))
      .toBe('45 of 120 (37.5%)');
  });

  test('a test statistic keeps its degrees of freedom', () => {
    const { interval: _, p: __, measure: ___, ...bare } = ratio;
    expect(resultInWords({
      ...bare, kind: 'test', statistic: 'chi-square', relation: '=',
      estimate: printed(text, '0·72'), degreesOfFreedom: [printed(text, '45')],
    })).toBe('χ²(45) = 0.72');
  });
});

describe('the width of words', () => {
  test('is what the library says, also where the library is not asked', () => {
    fc.assert(fc.property(fc.string({ unit: 'grapheme' }), (words) => {
      expect(widthOf(words)).toBe(stringWidth(words, { countAnsiEscapeCodes: true }));
    }));
    const latin = fc.string({ unit: fc.integer({ min: 0x20, max: 0x25ff })
      .map((code) => String.fromCharCode(code)) });
    fc.assert(fc.property(latin, (words) => {
      expect(widthOf(words)).toBe(stringWidth(words, { countAnsiEscapeCodes: true }));
    }), { numRuns: 2000 });
  });

  test('wrapping loses no word and exceeds no width', () => {
    const unit = fc.constantFrom('a', 'é', '漢', '–');
    const words = fc.array(fc.string({ unit, minLength: 1 }), { minLength: 1 });
    fc.assert(fc.property(words, fc.integer({ min: 4, max: 40 }), (list, width) => {
      const lines = wrap(list.join(' '), width);
      expect(lines.filter((line) => stringWidth(line) > width)).toEqual([]);
      expect(lines.join('').replaceAll(' ', '')).toBe(list.join(''));
    }));
  });
});
