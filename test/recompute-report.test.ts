import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { EXAMPLES } from './made/recomputed.ts';
import { recomputeTyped } from '../src/cli/recompute/recompute-typed.ts';
import type { Recomputation } from '../src/report/recomputation.ts';
import { recomputationsJson } from '../src/report/recomputation-json.ts';
import { recomputationList } from '../src/report/recomputation-list.ts';
import {
  probabilityInWords, significant, valueInWords, workedInWords,
} from '../src/report/worked-in-words.ts';
import { widthOf } from '../src/report/wrap.ts';

const SCREEN = { columns: 80, colours: 0, unicode: true, drawings: true } as const;

async function all(): Promise<readonly Recomputation[]> {
  const found = EXAMPLES.map(([words, options]) => recomputeTyped(words, options));
  return (await Promise.all(found)).flat();
}

describe('values in words', () => {
  test.each([
    [{ low: 0.20817, high: 0.21583 }, 'number', '0.2081 to 0.2159'],
    [{ low: 2.135, high: 2.241 }, 'number', '2.13 to 2.25'],
    [{ low: 0.5, high: 0.5 }, 'number', '0.500'],
    [{ low: 0, high: Infinity }, 'number', 'at least 0'],
    [{ low: 0.1474, high: 0.1494 }, 'share', '14.74% to 14.94%'],
    [{ low: 0.375, high: 0.375 }, 'share', '37.5%'],
    [{ low: -9.35, high: -9.25 }, 'percent', '-9.35% to -9.25%'],
    [{ low: 0.0254, high: 0.0327 }, 'probability', '0.025 to 0.033'],
  ] as const)('%j as a %s', (range, unit, words) => {
    expect(valueInWords(range, unit)).toBe(words);
  });

  test('are rounded outwards, so that nothing is lost', () => {
    for (const low of [0.012345, 0.2, 1.9999, 17.77]) {
      for (const width of [1e-5, 0.003, 0.7, 20]) {
        const words = valueInWords({ low, high: low + width }, 'number');
        const [from, to] = words.split(' to ').map(Number);
        expect(from).toBeLessThanOrEqual(low + 1e-9);
        expect(to).toBeGreaterThanOrEqual(low + width - 1e-9);
      }
    }
  });

  test('tell small p-values by their power of ten', () => {
    expect(probabilityInWords({ low: 3.12e-8, high: 3.97e-8 })).toBe('3.1e-8 to 4e-8');
    expect(probabilityInWords({ low: 0, high: 3e-8 })).toBe('at most 3e-8');
    expect(probabilityInWords({ low: 0, high: 0 })).toBe('below 1e-300');
    expect(probabilityInWords({ low: 0.99997, high: 0.99997 })).toBe('1.0000');
  });

  test('show on which side of 1 a limit lies', () => {
    const interval = { limits: { low: 1.003, high: 2.171 }, level: 95 };
    const value = { low: 1.475, high: 1.475 };
    expect(workedInWords({ quantity: 'RR', unit: 'number', value, interval })).toBe(
      '1.475 (95% CI 1.003 to 2.171)');
  });

  test('keep so many digits', () => {
    const shown = [[0.21196, 4], [2183.4, 3], [1.23e-5, 2], [0, 3], [-Infinity, 3]] as const;
    expect(shown.map(([value, digits]) => significant(value, digits)))
      .toEqual(['0.2120', '2183', '1.2e-5', '0', '-∞']);
  });
});

describe('the answer on a screen', () => {
  test.each([20, 40, 60, 63, 64, 80, 120])('is never wider than %i columns', async (columns) => {
    for (const drawings of [true, false]) {
      const lines = recomputationList(await all(), { ...SCREEN, columns, drawings }).split('\n');
      const widest = lines.reduce((one, other) => (widthOf(other) > widthOf(one) ? other : one));
      expect(widthOf(widest), widest).toBeLessThanOrEqual(columns);
    }
  });

  test('has every value on it, whatever the width', async () => {
    const answers = await all();
    for (const columns of [40, 60, 80]) {
      const shown = recomputationList(answers, { ...SCREEN, columns }).replace(/\s+/g, ' ');
      const values = answers.flatMap(({ groups }) => groups.flatMap((group) => group.values));
      expect(values.filter(({ quantity }) => !shown.includes(quantity))).toEqual([]);
      expect(values.filter((value) => !shown.includes(workedInWords(value)))).toEqual([]);
    }
  });

  test('says its labels aloud where nothing is drawn', async () => {
    const answers = await recomputeTyped(['OR', '1.59', '1.05', '2.41'], { p: '0.03' });
    const shown = recomputationList(answers, { ...SCREEN, drawings: false });
    expect(shown).toContain('   Together: log of the OR: 0.4607 to 0.4669\n');
    expect(shown).toContain('   From others: estimate: ');
    expect(shown).toContain('   Working: The standard error of the log OR');
  });

  test('stands in two columns at 80', async () => {
    const answers = await recomputeTyped(['OR', '1.59', '1.05', '2.41'], { p: '0.03' });
    const shown = recomputationList(answers, SCREEN);
    expect(shown).toContain([
      '   together     log of the OR   0.4607 to 0.4669',
      '                standard error  0.2102 to 0.2137, of the log',
    ].join('\n'));
  });
});

describe('the README', () => {
  const readme = readFileSync(resolve(import.meta.dirname, '..', 'README.md'), 'utf8');

  test('shows an answer that is still given', async () => {
    const line = /^\$ tallystick recompute (.*)$/m.exec(readme)?.[1] ?? '';
    const shown = recomputationList(await recomputeTyped(line.split(' '), {}), SCREEN);
    expect(line).not.toBe('');
    expect(readme).toContain(`$ tallystick recompute ${line}\n\n${shown}\`\`\``);
  });

  test('names every field of the JSON', () => {
    const section = readme.slice(readme.indexOf('`recompute --as json`'));
    const named = new Set(section.match(/\w+/g));
    expect([...FIELDS, ...VALUE_FIELDS].filter((field) => !named.has(field))).toEqual([]);
  });
});

const FIELDS = [
  'form', 'understood', 'outcome', 'answer', 'values', 'working', 'perhaps', 'reservations',
  'comment', 'sources',
];

const VALUE_FIELDS = [
  'group', 'quantity', 'method', 'unit', 'low', 'high', 'lower', 'upper', 'level', 'note',
];

describe('the JSON', () => {
  test('has every field of its contract, always, and no other', async () => {
    const answers = JSON.parse(recomputationsJson(await all())) as Record<string, unknown>[];
    for (const answer of answers) {
      expect(Object.keys(answer)).toEqual(FIELDS);
      expect(['within rounding', 'within another standard method', 'neither', 'cannot tell',
        'not compared']).toContain(answer['outcome']);
      for (const value of answer['values'] as Record<string, unknown>[]) {
        expect(Object.keys(value)).toEqual(VALUE_FIELDS);
        expect(['number', 'share', 'percent', 'probability']).toContain(value['unit']);
        for (const end of ['low', 'high', 'lower', 'upper', 'level']) {
          expect(value[end] === null || Number.isFinite(value[end])).toBe(true);
        }
      }
    }
  });

  test('holds the numbers in full', async () => {
    const answers = await recomputeTyped(['counts', '56/70', '48/80'], {});
    const [{ values }] = JSON.parse(recomputationsJson(answers));
    const newcombe = values.find(({ quantity }: { quantity: string }) => quantity === 'Newcombe');
    // Newcombe 1998, example a
    expect(newcombe).toMatchObject({ group: 'difference', unit: 'share', level: 95 });
    expect(newcombe.lower).toBeCloseTo(0.0524314724, 9);
    expect(newcombe.upper).toBeCloseTo(0.3338726540, 9);
  });
});
