import { describe, expect, test } from 'vitest';
import type { Examination, Result } from '../src/model/index.ts';
import { checkJson, extractJson } from '../src/report/index.ts';
import {
  examinationOf, flaggedExamination, flagOn, manuscriptOf, printed, ratioIn,
} from './made/examinations.ts';
import { breachesOf } from './made/json-contract.ts';

const NORMAL = new Map([[90, 1.6448536], [95, 1.9599640], [99, 2.5758293]]);
const multiplier = (level: number): number | undefined => NORMAL.get(level);

function firstResult(text: string, result: Result): Record<string, unknown> {
  const examination = examinationOf(manuscriptOf(text), [result], []);
  const files = JSON.parse(extractJson([examination], multiplier));
  return files[0].results[0];
}

const TEXT = 'adjusted OR 1·59 (95% CI 1·05–2·41), p = 0·03';
const WORDS = { estimate: '1·59', lower: '1·05', upper: '2·41', p: '0·03' };

describe('the JSON of extract', () => {
  test('keeps the contract, whatever is absent', () => {
    const bare: Result = { kind: 'other', measure: 'other', span: { start: 0, end: 2 }, about: {},
      inferred: [], counts: [], cited: false };
    const all = [flaggedExamination(), examinationOf(manuscriptOf(TEXT), [bare], [])];
    expect(breachesOf(JSON.parse(extractJson(all, multiplier)), 'extract')).toEqual([]);
    expect(breachesOf(JSON.parse(checkJson(all, multiplier)), 'check')).toEqual([]);
  });

  test('the contract notices a missing field, a number for a string, and a field too many', () => {
    const [file] = JSON.parse(extractJson([flaggedExamination()], multiplier));
    const [result] = file.results;
    const { unit: _, ...less } = result;
    expect(breachesOf([{ ...file, results: [less] }], 'extract')).toEqual(['[0].results[0].unit']);
    expect(breachesOf([{ ...file, results: [{ ...result, lower: 1.05 }] }], 'extract'))
      .toEqual(['[0].results[0].lower']);
    expect(breachesOf([{ ...file, results: [{ ...result, more: 1 }] }], 'extract'))
      .toEqual(['[0].results[0].more']);
  });

  test('writes printed numbers as strings with an ordinary point', () => {
    const result = ratioIn(TEXT, WORDS, { measure: 'OR', adjusted: true, inferred: ['level'] });
    expect(firstResult(TEXT, result)).toMatchObject({
      kind: 'ratio', measure: 'OR', adjusted: true, estimate: '1.59', lower: '1.05', upper: '2.41',
      level: 95, p: { relation: '=', value: '0.03' }, in: 'prose', section: 'Results', page: 4,
      line: 140, table: null, inferred: ['level'], quote: '1·59 (95% CI 1·05–2·41), p = 0·03',
      span: [12, TEXT.length],
    });
  });

  // By hand: ln 1.59 = 0.46373, (ln 2.41 − ln 1.05) / (2 × 1.95996) = 0.21195.
  test('gives the log estimate and the standard error of a ratio', () => {
    const { logEstimate, standardError } = firstResult(TEXT, ratioIn(TEXT, WORDS));
    expect([logEstimate, standardError]).toEqual([0.4637, 0.212]);
  });

  test('takes another level as it is, and an absent one as 95 with a word on it', () => {
    const result = ratioIn(TEXT, WORDS);
    const interval = result.interval as NonNullable<typeof result.interval>;
    const at90 = { ...result, interval: { ...interval, level: 90 } };
    expect(firstResult(TEXT, at90)['standardError']).toBe(0.2526);
    const { level: _, ...unsaid } = interval;
    expect(firstResult(TEXT, { ...result, interval: unsaid })).toMatchObject({
      level: null, standardError: 0.212, inferred: ['standardError'],
    });
  });

  test('gives null where a limit has no logarithm, and where a level has no multiplier', () => {
    const text = 'OR 1.59 (95% CI 0.0 to 2.41)';
    const none = ratioIn(text, { estimate: '1.59', lower: '0.0', upper: '2.41' });
    expect(firstResult(text, none)).toMatchObject({ logEstimate: 0.4637, standardError: null });
    const result = ratioIn(TEXT, WORDS);
    const odd = { ...result, interval: { ...result.interval, level: 12 } } as Result;
    expect(firstResult(TEXT, odd)['standardError']).toBeNull();
  });

  test('keeps the scale of differences and coefficients, and a standard error as printed', () => {
    const text = 'difference 2.0 (0.0 to 4.0), coefficient 0.50 with SE 0.11';
    const { measure: _, ...rest } = ratioIn(text, { estimate: '2.0', lower: '0.0', upper: '4.0' });
    expect(firstResult(text, { ...rest, kind: 'difference', measure: 'MD' })).toMatchObject({
      logEstimate: null, standardError: 1.0204,
    });
    const { interval: __, ...lone } = rest;
    expect(firstResult(text, {
      ...lone, kind: 'coefficient', estimate: printed(text, '0.50'),
      standardError: printed(text, '0.11'),
    })).toMatchObject({ measure: null, logEstimate: null, standardError: 0.11 });
  });

  test('tells the table, row and column of a result', () => {
    const result = ratioIn(TEXT, WORDS, {
      cell: {
        table: { span: { start: 0, end: 9 }, label: 'Table 2', notes: [], cells: [], rowCount: 1,
          columnCount: 1 },
        cell: { span: { start: 0, end: 9 }, row: 0, column: 0, rowSpan: 1, columnSpan: 1,
          header: false },
        row: 'Obese', column: '',
      },
    });
    expect(firstResult(TEXT, result)).toMatchObject({
      in: 'table', table: { label: 'Table 2', row: 'Obese', column: null },
    });
  });
});

describe('the JSON of check', () => {
  test('adds the flags', () => {
    const [file] = JSON.parse(checkJson([flaggedExamination()], multiplier));
    expect(file.flags).toEqual([{
      rule: 'estimate-inside-interval',
      grade: 'contradiction',
      place: { words: 'page 4, line 140', section: 'Results', page: 4, line: 140, table: null },
      quote: '0.72 (95% CI 0.75 to 0.98), p = 0.03',
      printed: ['0.72', '0.75', '0.98'],
      recomputed: { quantity: 'estimate', low: 0.8523, high: 0.8631 },
      working: ['√(0.75 × 0.98) = 0.857', 'with rounding 0.852 to 0.863'],
      innocent: ['A limit may have been copied from another row.', 'Two analyses may be mixed.'],
      comment: 'For “0.72 (95% CI 0.75 to 0.98)” the estimate lies outside its own interval. '
        + 'Could the authors please check these numbers?',
    }]);
  });

  test('has null for an end without a number', () => {
    const manuscript = manuscriptOf(TEXT);
    const flag = flagOn(manuscript, ratioIn(TEXT, WORDS), {
      recomputed: { quantity: 'upper limit', range: { low: 3, high: Infinity } },
    });
    const [file] = JSON.parse(checkJson([examinationOf(manuscript, [], [flag])], multiplier));
    expect(file.flags[0].recomputed).toEqual({ quantity: 'upper limit', low: 3, high: null });
  });

  test('is harmless on a terminal, and reads back to the same words', () => {
    const text = 'a \x1b[2J \u009b \u202e \ud800 \u{e0041} \u2028 b';
    const examination: Examination = examinationOf(manuscriptOf(text, { name: text }), [], []);
    const json = checkJson([examination], multiplier);
    expect(json).not.toMatch(/(?!\n)[\p{Cc}\p{Cs}\p{Cf}\u2028]/u);
    expect(JSON.parse(json)[0].file).toBe(text);
  });
});
