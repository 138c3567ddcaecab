import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Flag, Printed, Range } from '../src/model/index.ts';
import { DRAWN, drawingOf, TYPED } from '../src/report/drawing.ts';
import { flaggedExamination } from './made/examinations.ts';

const [FLAG] = flaggedExamination().checked.flags as [Flag];

interface Numbers {
  readonly lower: number;
  readonly upper: number;
  readonly estimate?: number;
  readonly recomputed?: Range;
}

/** The flag of the factory with other numbers in it. */
function flagWith({ lower, upper, estimate, recomputed }: Numbers): Flag {
  const { result } = FLAG;
  if (result?.kind !== 'ratio' || result.interval === undefined) throw new Error('not a ratio');
  const { estimate: _, ...rest } = result;
  const { recomputed: __, ...flag } = FLAG;
  return {
    ...flag,
    ...(recomputed === undefined ? {} : {
      recomputed: { quantity: 'estimate', range: recomputed },
    }),
    result: {
      ...rest,
      interval: {
        ...result.interval,
        lower: at(result.interval.lower, lower),
        upper: at(result.interval.upper, upper),
      },
      ...(estimate === undefined ? {} : { estimate: at(result.interval.lower, estimate) }),
    },
  };
}

function at(printed: Printed, value: number): Printed {
  return { ...printed, value };
}

describe('the drawing of a ratio', () => {
  test('puts the estimate in the middle of limits that centre on it', () => {
    const drawing = drawingOf(flagWith({ lower: 0.5, estimate: 1, upper: 2 }), 41, DRAWN);
    const [row = ''] = drawing?.printed ?? [];
    expect(row.indexOf('●') - row.indexOf('├')).toBe(row.indexOf('┤') - row.indexOf('●'));
  });

  test('labels 1 where its line stands, and round numbers where they stand', () => {
    const drawing = drawingOf(flagWith({ lower: 2, upper: 8 }), 50, DRAWN);
    const [printed = ''] = drawing?.printed ?? [];
    const [axis = '', labels = ''] = drawing?.scale ?? [];
    expect(labels.indexOf('1')).toBe(printed.indexOf('┊'));
    expect(axis[labels.indexOf('2')]).toBe('┴');
    expect(labels.indexOf('2')).toBe(printed.indexOf('├'));
    expect(labels.match(/\d+/g)).toEqual(['1', '2', '3', '5']);
  });

  test('draws nothing where a limit has no logarithm or the interval is not in question', () => {
    expect(drawingOf(flagWith({ lower: 0, upper: 2 }), 60, DRAWN)).toBeUndefined();
    expect(drawingOf(flagWith({ lower: 1, upper: Infinity }), 60, DRAWN)).toBeUndefined();
    const flag = flagWith({ lower: 0.5, upper: 2 });
    expect(drawingOf({ ...flag, marks: [] }, 60, DRAWN)).toBeUndefined();
    expect(drawingOf(flag, 60, DRAWN)).toBeDefined();
    expect(drawingOf(flag, 20, DRAWN)).toBeUndefined();
  });

  test('draws a recomputed number only where it is on the scale of the ratio', () => {
    const range = { low: 0.8, high: 0.9 };
    const flag = flagWith({ lower: 0.5, upper: 2, recomputed: range });
    expect(drawingOf(flag, 60, DRAWN)?.recomputed).toHaveLength(1);
    const p = { ...flag, recomputed: { quantity: 'p', range } };
    expect(drawingOf(p, 60, DRAWN)?.recomputed).toEqual([]);
  });

  test('fits its width, and keeps the order of the numbers, whatever they are', () => {
    const size = fc.double({ min: 1e-12, max: 1e12, noNaN: true });
    fc.assert(fc.property(size, size, size, size, size, fc.integer({ min: 24, max: 80 }),
      (a, b, estimate, c, d, width) => {
        const [lower, upper] = [Math.min(a, b), Math.max(a, b)];
        const recomputed = { low: Math.min(c, d), high: Math.max(c, d) };
        const drawing = drawingOf(flagWith({ lower, upper, estimate, recomputed }), width, TYPED);
        const rows = [drawing?.printed, drawing?.recomputed, drawing?.scale].flat() as string[];
        expect(rows).toHaveLength(4);
        expect(rows.filter((row) => row.length > width)).toEqual([]);
        expect(rows.join('')).toMatch(/^[ -~]*$/);
        const [printed = '', below = '', axis = ''] = rows;
        expect(below).toContain('#');
        expect(axis).toContain('+');
        expect(printed.indexOf('|')).toBeLessThanOrEqual(printed.lastIndexOf('|'));
        if (estimate < lower && printed.split('|').length === 3) {
          expect(printed.indexOf('o')).toBeLessThanOrEqual(printed.indexOf('|'));
        }
      }));
  });
});
