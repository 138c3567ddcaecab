import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { lex } from '../src/extract/lex.ts';
import { numberStyleOf } from '../src/extract/number.ts';
import type { Token } from '../src/extract/token.ts';
import { type Mark, quote } from '../src/model/index.ts';

const tokensOf = (text: string, marks: readonly Mark[] = []): readonly Token[] =>
  lex(text, { start: 0, end: text.length }, numberStyleOf(text), marks);

const numbersOf = (text: string): readonly string[] =>
  tokensOf(text).flatMap(({ printed }) =>
    printed === undefined ? [] : [`${printed.plain}${printed.percent ? '%' : ''}`],
  );

describe('numbers as they are printed', () => {
  it.each([
    ['0.72', ['0.72']],
    ['0·72 and 0∙72', ['0.72', '0.72']],
    ['.72', ['.72']],
    ['CI.99-1.83', ['.99', '1.83']],
    ['1,234 and 12,345,678', ['1234', '12345678']],
    ['1\u2009234 patients', ['1234']],
    ['151/10 080 and 12 345', ['151', '10080', '12', '345']],
    ['1.22,1.25', ['1.22', '1.25']],
    ['35.1% and 4·5 %', ['35.1%', '4.5%']],
    ['37 per cent', ['37%']],
    ['RR 1. 71', ['1.71']],
    ['0. 99', ['0.99']],
    ['1.2×10⁻⁵', ['1.2e-5']],
    ['3.39E8', ['3.39e8']],
    ['p < 10-5', ['1e-5']],
    ['IL-6', ['6']],
  ])('reads the numbers of "%s"', (text, expected) => {
    expect(numbersOf(text)).toEqual(expected);
  });

  it.each([
    ['−0.14 to 0.21', ['-0.14', '0.21']],
    ['0.58–0.90', ['0.58', '0.90']],
    ['0.58 -0.90', ['0.58', '0.90']],
    ['1.043−3.013', ['1.043', '3.013']],
    ['(−0.5 - −0.1)', ['-0.5', '-0.1']],
    ['0.2 (−0.1-0.6)', ['0.2', '-0.1', '0.6']],
    ['95%CI -162.7, 86.8%', ['95%', '-162.7', '86.8%']],
    ['1.15¡X11.25', ['1.15', '11.25']],
    ['0% -- 65.2%', ['0%', '65.2%']],
  ])('tells signs from dashes in "%s"', (text, expected) => {
    expect(numbersOf(text)).toEqual(expected);
  });

  it('counts decimals where an exponent moves them', () => {
    const decimals = tokensOf('0.70 14 1.2×10⁻⁵ 3.39E8').map(({ printed }) => printed?.decimals);
    expect(decimals).toEqual([2, 0, 6, -6]);
  });

  it('takes a comma for a decimal point only where a whole document does', () => {
    expect(numbersOf('0,72 (0,58 a 0,90)')).toEqual(['0.72', '0.58', '0.90']);
    expect(numbersOf('0.72 (1,234 of 5,678)')).toEqual(['0.72', '1234', '5678']);
  });

  it('joins no raised mark to a number', () => {
    const text = '0.0512 and more';
    const marks: readonly Mark[] = [{ kind: 'superscript', span: { start: 4, end: 6 } }];
    const [number, raised] = tokensOf(text, marks);
    expect([number?.printed?.plain, raised?.kind]).toEqual(['0.05', 'raised']);
  });
});

describe('words', () => {
  it('joins a word broken at a line end, but not a compound', () => {
    const words = tokensOf('haz-\nard ratio, odds-\nratio').map(({ word }) => word);
    expect(words).toEqual(['hazard', 'ratio', ',', 'odds', '-', 'ratio']);
  });

  it('undoes ligatures and soft hyphens when it looks a word up', () => {
    expect(tokensOf('conﬁdence inter\u00adval').map(({ word }) => word)).toEqual(['confidence', 'interval']);
  });

  it.each([
    ['p < 0.05', '<'], ['p ≤ 0.05', '<='], ['p <= 0.05', '<='], ['p < or = 0.05', '<='],
    ['p &lt; 0.05', '<'], ['p?=?0.05', '='], ['p ‹ 0.05', '<'],
  ])('reads the relation of "%s"', (text, relation) => {
    expect(tokensOf(text)[1]?.relation).toBe(relation);
  });
});

describe('whatever the text', () => {
  const fragment = fc.oneof(
    fc.constantFrom('0.72', '·5', '1,234', '−', '–', '%', ' ', '(', ')', 'CI', 'p<', '10⁻⁵', '\n', 'ﬁ',
      '×10', '\u00ad', '&lt;', '‹', '¹²', 'E-05', '--', '\ud835', '¡X', '. ', '?='),
    fc.string({ unit: 'binary', maxLength: 4 }),
  );
  const anyText = fc.array(fragment, { maxLength: 30 }).map((parts) => parts.join(''));

  it('gives back exactly what was printed when its spans are sliced', () => {
    fc.assert(fc.property(anyText, (text) => {
      for (const { printed } of tokensOf(text)) {
        if (printed !== undefined) expect(quote(text, printed.span)).toBe(printed.text);
      }
    }), { numRuns: 2000 });
  });

  it('ends, wherever raised marks begin and end', () => {
    const marked = fc.tuple(anyText, fc.array(fc.nat(60), { maxLength: 6 }));
    fc.assert(fc.property(marked, ([text, cuts]) => {
      const ends = [...new Set(cuts.filter((cut) => cut < text.length))].sort((a, b) => a - b);
      const marks = ends.slice(1).map((end, at): Mark => ({
        kind: 'superscript', span: { start: ends[at] as number, end },
      }));
      for (const { span, printed } of tokensOf(text, marks)) {
        expect(span.end).toBeGreaterThan(span.start);
        if (printed !== undefined) expect(quote(text, printed.span)).toBe(printed.text);
      }
    }), { numRuns: 2000 });
  });

  it('keeps tokens in order, apart, and within the text', () => {
    fc.assert(fc.property(anyText, (text) => {
      let end = 0;
      for (const { span } of tokensOf(text)) {
        expect(span.start).toBeGreaterThanOrEqual(end);
        expect(span.end).toBeGreaterThan(span.start);
        end = span.end;
      }
      expect(end).toBeLessThanOrEqual(text.length);
    }), { numRuns: 2000 });
  });

  it('reads a number whose plain digits say its value, never NaN', () => {
    fc.assert(fc.property(anyText, (text) => {
      for (const { printed } of tokensOf(text)) {
        if (printed === undefined) continue;
        expect(Number(printed.plain.replace('∞', 'Infinity'))).toBe(printed.value);
        expect(printed.value).not.toBeNaN();
      }
    }), { numRuns: 2000 });
  });
});
