import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { pInWords, percentInWords, rangeInWords } from '../src/authoring.ts';
import { rules } from '../rules/index.ts';
import type { Checked } from '../src/model/index.ts';
import { checkedBy, readingOf } from './reading-of.ts';
import { type CheckRecord, recordsOf } from './records.ts';

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

/** The rules by which each kind of wording is met. */
const MET_BY: Readonly<Record<string, readonly string[]>> = {
  or_as_risk: ['odds-ratio-as-risk'],
  hr_as_risk: ['hazard-ratio-as-risk'],
  significant_but_ci_includes_null: ['interval-and-significance'],
  difference_in_significance: ['difference-in-significance'],
  p_zero: ['p-value-possible'],
  p_not_exact: ['p-value-exact'],
  auc_not_above_chance: ['discrimination-in-words'],
  auc_label_overstated: ['discrimination-in-words'],
  percent_change_wrong: ['size-in-words'],
  percent_reduction_over_100: ['size-in-words'],
  direction_conflict: ['direction-in-words'],
  se_sd_mislabel: ['spread-of-mean'],
  plus_minus_undefined: ['spread-of-mean'],
  skewed_summary: ['spread-of-mean'],
  percent_mismatch: ['percent-of-count'],
  trend_wording: ['near-significance-in-words'],
  out_of_range: ['share-possible'],
  negative_ratio: ['limits-in-order'],
  bounds_swapped: ['limits-in-order'],
  estimate_outside_ci: ['estimate-inside-interval'],
  separation: ['unbounded-estimate'],
  p_misinterpreted: ['p-value-meaning'],
  noninferiority_from_nonsignificance: ['non-inferiority-from-p'],
  posthoc_power: ['post-hoc-power'],
  ph_not_assessed: ['proportional-hazards-in-words'],
};

/** What a record tells beside its sentence, as a manuscript would print it. */
interface Wording {
  readonly text: string;
  readonly context: { readonly outcome_risk?: number };
}

function asPrinted({ text, context }: Wording): string {
  const { outcome_risk: share } = context;
  return share === undefined ? text : `The prevalence of relapse was ${100 * share}%. ${text}`;
}

const idsOf = (said: Checked['flags'] | Checked['unjudged']): readonly string[] =>
  said.map(({ rule }) => rule);

/** Flags where one is due; for information only what cannot be judged; else silence. */
function answersAsExpected({ expected }: CheckRecord, { flags, unjudged }: Checked): void {
  const flag = String(expected['flag']);
  if (flag === 'none') return expect(idsOf(flags)).toEqual([]);
  if (flag !== 'info') return expect(idsOf(flags)).toEqual(MET_BY[flag]);
  expect(flags.filter(({ grade }) => grade !== 'caution')).toEqual([]);
  expect([...idsOf(flags), ...idsOf(unjudged)].length).toBeGreaterThan(0);
}

describe('the check values on wording, text in, flags out', () => {
  test.each(recordsOf('wording').map((record) => ({ ...record, record })))('$id', async ({ record }) => {
    const reading = await readingOf(asPrinted(record.inputs as Wording));
    answersAsExpected(record, checkedBy(rules, reading));
  });
});
