import { describe, expect, test } from 'vitest';
import { agreement, outcomeOf } from '../src/stats/agreement.ts';
import { explanationSentence } from '../src/stats/explanation-sentence.ts';
import { explanations, type Explanation } from '../src/stats/explanation.ts';
import { neighbouring } from '../src/stats/neighbour.ts';
import { multiplier } from '../src/stats/normal.ts';
import { repairs } from '../src/stats/repair.ts';
import { usualReading, type ReportedNumbers } from '../src/stats/reported-numbers.ts';
import { digitsOf, plainNumber, undoneSlips } from '../src/stats/slip.ts';
import { studentMultiplier, studentP } from '../src/stats/student-t.ts';
import { given, recordsOf, type CheckRecord } from './records.ts';
import type { PrintedValue } from '../src/stats/rounding.ts';
import {
  MADE_SLIPS,
  nearest,
  printedP,
  randomAnalysis,
  randomStream,
  row,
  waldRow,
  withSlip,
  type MadeSlip,
} from './reported-row.ts';

const repairsOf = (numbers: ReportedNumbers) => repairs(numbers, usualReading(numbers, 'log'));
const kindsOf = (numbers: ReportedNumbers) => explanations(numbers).map(({ kind }) => kind);

describe('single slips', () => {
  test('of a number gives each other number once, as people write it', () => {
    const undone = undoneSlips({ value: 2.57, decimals: 2 });
    const texts = undone.map(({ text }) => text);
    expect(new Set(texts).size).toBe(texts.length);
    expect(undone.find(({ text }) => text === '2.75')?.slip).toBe('digits transposed');
    expect(undone.find(({ text }) => text === '2.54')?.slip).toBe('digit changed');
    expect(undone.find(({ text }) => text === '25.7')?.slip).toBe('point moved');
    expect(undone.find(({ text }) => text === '23.57')?.slip).toBe('digit lost');
    expect(undone.find(({ text }) => text === '-2.57')?.slip).toBe('sign lost');
    expect(undoneSlips({ value: 1.88, decimals: 2 }).find(({ text }) => text === '1.8')?.slip).toBe(
      'digit doubled',
    );
    expect(texts.every((text) => digitsOf(plainNumber(text)) === text)).toBe(true);
    expect(texts.length).toBeLessThan(120);
  });

  test('numbers without plain digits have none', () => {
    expect(undoneSlips({ value: Infinity, decimals: 0 })).toEqual([]);
    expect(undoneSlips({ value: 3.39e8, decimals: -6 })).toEqual([]);
    expect(undoneSlips({ value: NaN, decimals: 2 })).toEqual([]);
  });
});

describe('repairs', () => {
  test('every repair restores agreement, and the slip made is among them: 700 rows', () => {
    const random = randomStream(21);
    let [offered, found, disagreeing] = [0, 0, 0];
    for (let i = 0; i < 700; i++) {
      const honest = waldRow(
        { ...randomAnalysis(random), level: 95 },
        2,
        nearest,
        random() < 0.5 ? undefined : 0.9,
      );
      if (i % 10 === 0) expect(repairsOf(honest)).toEqual([]);
      const field = (['estimate', 'lower', 'upper'] as const)[i % 3] as
        | 'estimate'
        | 'lower'
        | 'upper';
      const kind = MADE_SLIPS[i % MADE_SLIPS.length] as MadeSlip;
      const slip = withSlip(honest[field] as PrintedValue, kind, random);
      if (slip === undefined || (honest[field]?.value ?? 0) === 0) continue;
      const slipped = { ...honest, [field]: slip };
      if (outcomeOf(slipped) !== 'neither') continue;
      disagreeing++;
      const all = repairsOf(slipped);
      for (const repair of all) {
        offered++;
        expect(outcomeOf(repair.numbers), JSON.stringify(repair)).toBe('within rounding');
      }
      const printed = digitsOf(honest[field] ?? { value: NaN, decimals: 0 });
      if (all.some(({ of, instead }) => of === field && instead === printed)) found++;
    }
    expect(disagreeing).toBeGreaterThan(250);
    expect(offered).toBeGreaterThan(500);
    expect(found).toBe(disagreeing);
  });

  test('published slips are among the candidates', () => {
    // Records table.PMC6990025_t3, table.PMC4946355_t6.
    const candidates = (numbers: ReportedNumbers) =>
      repairsOf(numbers).map(({ of, instead }) => `${of} ${instead}`);
    expect(candidates(row('1.72', '1.10', '2.89', '= 0.019'))).toContain('estimate 1.78');
    expect(candidates(row('0.62', '1.4', '2.69'))).toEqual(['lower 0.14']);
    expect(candidates(row('1.80', '0.118', '2.75'))[0]).toBe('lower 1.18');
    expect(candidates(row('1.80', '1.81', '2.75'))[0]).toBe('lower 1.18');
    expect(candidates(row('1.80', '1.18', '2.57'))[0]).toBe('upper 2.75');
    expect(repairsOf(row('0.72', '0.90', '0.58'))).toMatchObject([
      { slip: 'limits swapped', printed: '0.90 to 0.58', instead: '0.58 to 0.90' },
    ]);
  });

  test('a row that cannot be read has none', () => {
    expect(repairsOf(row('2', '1', '4', undefined, { level: 20 }))).toEqual([]);
  });
});

describe('explanations', () => {
  const printedRow = (
    theta: number,
    s: number,
    k: number,
    p: number,
    more: Partial<ReportedNumbers> = {},
  ) => ({
    estimate: nearest(Math.exp(theta), 3),
    lower: nearest(Math.exp(theta - k * s), 3),
    upper: nearest(Math.exp(theta + k * s), 3),
    p: printedP(p, 0.9, nearest) as NonNullable<ReportedNumbers['p']>,
    ...more,
  });
  const wald = (theta: number, s: number) => studentP(theta / s, 1e9) as number;

  test('another level is found, by its own and by the multiplier of one standard error', () => {
    for (const level of [90, 99, 97.5, 80, 98.33]) {
      const found = explanations(printedRow(0.6, 0.25, given(multiplier(level)), wald(0.6, 0.25)));
      expect(found[0]).toEqual({ kind: 'other level', stated: 95, levels: [level] });
    }
    const single = explanations(printedRow(0.6, 0.25, 1, wald(0.6, 0.25)));
    expect(single[0]).toEqual({ kind: 'other level', stated: 95, levels: [68.27] });
    const twice = explanations(printedRow(0.15, 0.05, 2, wald(0.15, 0.05)));
    expect(twice[0]).toMatchObject({ kind: 'other level', levels: [95.45] });
    const called90 = {
      ...printedRow(0.6, 0.25, given(multiplier(95)), wald(0.6, 0.25)),
      level: 90,
    };
    expect(explanations(called90)[0]).toEqual({ kind: 'other level', stated: 90, levels: [95] });
  });

  test('a one-sided p is found, and a two-sided one called one-sided', () => {
    const half = printedRow(0.3, 0.16, given(multiplier(95)), wald(0.3, 0.16) / 2);
    expect(kindsOf(half)).toContain('one-sided p');
    const called = printedRow(0.3, 0.16, given(multiplier(95)), wald(0.3, 0.16));
    expect(kindsOf({ ...called, p: { ...called.p, oneSided: true } })).toContain('two-sided p');
  });

  test('t is found with degrees of freedom around the true ones', () => {
    for (const degrees of [8, 12, 25]) {
      const k = studentMultiplier(95, degrees) as number;
      const rows = printedRow(0.6, 0.25, k, studentP(0.6 / 0.25, degrees) as number);
      const found = explanations(rows).find((one) => one.kind === 't distribution');
      if (found?.kind !== 't distribution') throw new Error(`none on ${degrees}`);
      expect(found.of).toBe('interval and p');
      expect(found.least).toBeLessThanOrEqual(degrees);
      expect(found.most).toBeGreaterThanOrEqual(degrees);
    }
  });

  test('a p multiplied for several tests is found with their number', () => {
    const rows = printedRow(0.6, 0.25, given(multiplier(95)), 3 * wald(0.6, 0.25));
    expect(explanations(rows)).toContainEqual({ kind: 'adjusted p', tests: [3] });
  });

  test('another test and an asymmetric interval are found', () => {
    expect(kindsOf(row('6.60', '2.11', '20.60', '= 0.0008'))[0]).toBe('other test');
    expect(explanations(row('14.0', '3.5', '122.2'))).toContainEqual({
      kind: 'asymmetric interval',
      type: 'likelihood',
    });
  });

  test('numbers on the log scale and intervals on the natural scale are found', () => {
    const cannot = agreement(row('0.588', '-0.196', '1.372', '= 0.142'));
    if (cannot.outcome !== 'cannot tell') throw new Error(cannot.outcome);
    expect(cannot.explanations).toEqual([{ kind: 'log scale' }]);
    expect(kindsOf(row('0.59', '0.20', '0.98'))).toEqual(['log scale', 'natural scale']);
    expect(kindsOf(row('2.50', '1.20', '3.80', '= 0.02'))).toEqual(['natural scale']);
  });

  test('a switched reference is found, of the estimate and of the coefficient', () => {
    expect(explanations(row('0.50', '1.32', '3.02'))).toContainEqual({
      kind: 'reference switched',
      of: 'estimate',
    });
    const turned = row('0.50', '0.33', '0.76', undefined, {
      coefficient: { value: 0.693, decimals: 3 },
    });
    expect(explanations(turned)).toContainEqual({ kind: 'reference switched', of: 'coefficient' });
  });

  test('numbers cut off are found', () => {
    // θ = ln 1.8089, s = 0.21: 1.1985 to 2.7302, cut off to two decimals.
    expect(kindsOf(row('1.808', '1.198', '2.739'))).not.toContain('other rounding');
    const cut = row('1.80', '1.19', '2.73', undefined, {
      coefficient: { value: 0.5929, decimals: 4 },
    });
    expect(kindsOf(cut)).toContain('other rounding');
  });

  test('rows that agree have none', () => {
    expect(explanations(row('0.72', '0.58', '0.90', '= 0.004'))).toEqual([]);
  });

  test('every explanation has a sentence, which accuses nobody', () => {
    const all: readonly Explanation[] = [
      { kind: 'other level', stated: 95, levels: [90, 97.5] },
      { kind: 'other level', stated: 95, levels: [68.27] },
      { kind: 'other level', stated: 95, levels: [95.45] },
      { kind: 'one-sided p' },
      { kind: 'two-sided p' },
      { kind: 't distribution', of: 'interval and p', least: 8, most: 12 },
      { kind: 't distribution', of: 'p', least: 8, most: 8 },
      { kind: 'other test', contrast: 'binary' },
      { kind: 'adjusted p', tests: [3, 4, 5] },
      { kind: 'asymmetric interval', type: 'likelihood' },
      { kind: 'asymmetric interval', type: 'bootstrap' },
      { kind: 'log scale' },
      { kind: 'natural scale' },
      { kind: 'reference switched', of: 'lower' },
      { kind: 'other rounding', rounding: 'twice' },
      { kind: 'other rounding', rounding: 'cut off' },
    ];
    const sentences = all.map(explanationSentence);
    expect(new Set(sentences).size).toBe(all.length);
    for (const sentence of sentences) {
      expect(sentence).toMatch(/^[A-Z].*\.$/);
      expect(sentence).not.toMatch(/(?<!standard )\berror|wrong|suspicious|misconduct|mistake/i);
    }
    expect(sentences[0]).toBe(
      'The limits would agree with the rest as those of a 90% or 97.5% interval '
        + 'instead of a 95% one.',
    );
    expect(sentences[8]).toContain('3, 4 or 5 tests');
  });
});

describe('rows of one table', () => {
  const tableRows = (id: string) => {
    const record = recordsOf('printed-numbers').find((one) => one.id === id);
    const { rows } = (record as CheckRecord).inputs as {
      rows: readonly { estimate: string; ci: readonly [string, string]; p: string | null }[];
    };
    return rows.map(({ estimate, ci, p }) => row(estimate, ...ci, p ?? undefined));
  };

  test('an interval copied from another row is found by its digits', () => {
    const rows = tableRows('table.PMC2688355_t4_(profile)');
    const copied = rows.findIndex(({ estimate }) => estimate?.value === 2.82);
    const others = rows.filter((_, i) => i !== copied);
    const found = neighbouring(rows[copied] as ReportedNumbers, others);
    expect(found[0]).toMatchObject({ part: 'interval', likeness: 'same digits' });
    expect(others[found[0]?.row ?? -1]).toMatchObject({
      lower: { value: 0.57 },
      upper: { value: 2.12 },
    });
  });

  test('a row that agrees has no neighbour to thank', () => {
    expect(neighbouring(row('0.72', '0.58', '0.90'), [row('0.75', '0.58', '0.90')])).toEqual([]);
  });

  test('a p or an estimate that fits from another row is a hint', () => {
    const strayed = row('1.40', '0.92', '2.13', '= 0.01');
    const neighbours = [
      row('2.00', '1.32', '3.02', '= 0.001'),
      row('1.40', '0.92', '2.13', '= 0.12'),
    ];
    expect(neighbouring(strayed, neighbours)).toEqual([
      { row: 1, part: 'interval', likeness: 'same digits' },
      { row: 1, part: 'p', likeness: 'would fit' },
    ]);
  });
});
