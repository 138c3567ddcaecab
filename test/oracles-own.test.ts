import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { binomialP } from '../src/stats/binomial.ts';
import { exactOddsRatio, type ExactOddsRatio } from '../src/stats/exact-odds-ratio.ts';
import { fisherExact } from '../src/stats/fisher-exact.ts';
import { breslowDay, cochranMantelHaenszel, mantelHaenszel } from '../src/stats/mantel-haenszel.ts';
import { exactMatchedInterval, matchedOddsRatio, mcNemar } from '../src/stats/matched-pairs.ts';
import { midPCountInterval } from '../src/stats/poisson-count.ts';
import { poissonP } from '../src/stats/poisson.ts';
import {
  clopperPearsonInterval, wilsonCorrectedInterval, wilsonInterval,
} from '../src/stats/proportion-interval.ts';
import {
  scoreIntervalOfDifference, scoreIntervalOfOddsRatio, scoreIntervalOfRiskRatio,
} from '../src/stats/score-interval.ts';
import type { TwoByTwo } from '../src/stats/two-by-two.ts';
import { given, recordsOf } from './records.ts';

/*
 * Check values of our own, for what the records leave out: exact ones from whole numbers
 * and 40 digits (make-counts.py, counts-exact.csv), ones from R (make-counts.R,
 * counts-r.csv), and published ones.
 */

/** The rows of a reference table under its header. */
function rowsOf(name: string): string[][] {
  const text = readFileSync(new URL(`../fixtures/reference/${name}`, import.meta.url), 'utf8');
  return text.trim().split('\n').slice(1).map((line) => line.split(','));
}

function tableOf([a = 0, b = 0, c = 0, d = 0]: readonly number[]): TwoByTwo {
  return { exposedEvents: a, exposedNonEvents: b, unexposedEvents: c, unexposedNonEvents: d };
}

function expectWithin(
  got: number | undefined,
  wanted: string,
  tolerance: number,
  where: string,
): void {
  const goal = Number(wanted);
  const size = Math.max(Math.abs(goal), 1e-300);
  const distance = got === goal ? 0 : Math.abs((got ?? NaN) - goal) / size;
  expect(distance <= tolerance, `${where}: ${got} for ${wanted}, ${distance} apart`).toBe(true);
}

/** Answers by quantity, for the counts of a row. */
type Answers = (counts: readonly number[]) => Readonly<Record<string, number>>;

function conditional(found: ExactOddsRatio): Record<string, number> {
  return {
    estimate: found.conditional,
    'exact low': found.exact.low,
    'exact high': found.exact.high,
    'mid-P low': found.midP.low,
    'mid-P high': found.midP.high,
  };
}

function scores(counts: readonly number[]): Record<string, number> {
  const difference = given(scoreIntervalOfDifference(tableOf(counts)));
  const risks = given(scoreIntervalOfRiskRatio(tableOf(counts)));
  const odds = given(scoreIntervalOfOddsRatio(tableOf(counts)));
  return {
    'difference low': difference.low,
    'difference high': difference.high,
    'risk ratio low': risks.low,
    'risk ratio high': risks.high,
    'odds ratio low': odds.low,
    'odds ratio high': odds.high,
  };
}

const EXACT: Readonly<Record<string, { readonly answers: Answers; readonly tolerance: number }>> = {
  Fisher: {
    answers: (counts) => {
      const { twoSided, greater, less, midP } = given(fisherExact(tableOf(counts)));
      return { 'two-sided': twoSided, greater, less, 'mid-P': midP };
    },
    tolerance: 1e-12,
  },
  'conditional 95': {
    answers: (counts) => conditional(given(exactOddsRatio(tableOf(counts)))),
    tolerance: 1e-11,
  },
  'conditional 99': {
    answers: (counts) => conditional(given(exactOddsRatio(tableOf(counts), 99))),
    tolerance: 1e-11,
  },
  'score 95': { answers: scores, tolerance: 1e-10 },
  'Poisson mid-P 95': {
    answers: ([events = 0]) => {
      const { low, high } = given(midPCountInterval(events));
      return { low, high };
    },
    tolerance: 1e-12,
  },
};

describe('exact values', () => {
  it.each(Object.entries(EXACT))('are met: %s', (method, { answers, tolerance }) => {
    const rows = rowsOf('counts-exact.csv').filter(([of]) => of === method);
    expect(rows.length).toBeGreaterThan(8);
    for (const [, counts = '', quantity = '', value = ''] of rows) {
      const found = answers(counts.split(' ').map(Number))[quantity];
      expectWithin(found, value, tolerance, `${method} ${counts} ${quantity}`);
    }
  });
});

function answerByR(tool: string, numbers: readonly number[]): Record<string, number> {
  const [one = 0, two = 0, three = 0] = numbers;
  if (tool === 'poisson.test') return { p: given(poissonP(one, two)) };
  if (tool === 'binom.test' && three > 0 && three < 1) {
    return { p: given(binomialP(one, two, three)) };
  }
  if (numbers.length === 2) return answerPairs(one, two);
  const wilson = given(wilsonInterval(one, two, three));
  const corrected = given(wilsonCorrectedInterval(one, two, three));
  const exact = given(clopperPearsonInterval(one, two, three));
  return {
    'Wilson low': wilson.low, 'Wilson high': wilson.high,
    'corrected low': corrected.low, 'corrected high': corrected.high,
    'Clopper-Pearson low': exact.low, 'Clopper-Pearson high': exact.high,
  };
}

function answerPairs(caseOnly: number, controlOnly: number): Record<string, number> {
  const tests = given(mcNemar({ caseOnly, controlOnly }));
  const exact = given(exactMatchedInterval({ caseOnly, controlOnly }));
  return {
    'chi-square': tests.uncorrected.chiSquare,
    p: tests.uncorrected.p,
    'corrected p': tests.corrected.p,
    'exact p': tests.exactP,
    'mid-P': tests.midP,
    'exact low': exact.low,
    'exact high': exact.high,
  };
}

function answerStrata(): Record<string, number> {
  const bcg = recordsOf('synthesis').find(({ id }) => id === 'meta.bcg.OR');
  const { ai, bi, ci, di } = bcg?.inputs as Record<'ai' | 'bi' | 'ci' | 'di', number[]>;
  const strata = ai.map((a, i) => tableOf([a, bi[i] ?? 0, ci[i] ?? 0, di[i] ?? 0]));
  const ratio = given(mantelHaenszel(strata));
  const { plain, tarone } = given(breslowDay(strata));
  return {
    'odds ratio': ratio.ratio,
    'log standard error': ratio.log.standardError,
    'Breslow-Day': plain.chiSquare,
    Tarone: tarone.chiSquare,
    'CMH corrected': given(cochranMantelHaenszel(strata)).corrected.chiSquare,
  };
}

describe('R', () => {
  it('gives the same for matched pairs, counts, rates, proportions and strata', () => {
    const rows = rowsOf('counts-r.csv');
    expect(rows.length).toBe(74);
    for (const [tool = '', counts = '', quantity = '', value = ''] of rows) {
      const numbers = counts.split(' ').map(Number);
      const found = tool === 'rma.mh' ? answerStrata() : answerByR(tool, numbers);
      // R finds the limits of prop.test and binom.test to its own 1e-9 or so.
      const tolerance = quantity.endsWith('low') || quantity.endsWith('high') ? 1e-8 : 1e-11;
      expectWithin(found[quantity], value, tolerance, `${tool} ${counts} ${quantity}`);
    }
  });
});

describe('published values', () => {
  // Newcombe (1998), Statistics in Medicine 17:873, table II, method 3; from memory.
  it.each([
    [[56, 14, 48, 32], 0.0528, 0.3382],
    [[9, 1, 3, 7], 0.17, 0.8406],
    [[10, 0, 0, 10], 0.6636, 1],
  ])('of Miettinen & Nurminen’s interval are met to four decimals: %j', (counts, low, high) => {
    const found = given(scoreIntervalOfDifference(tableOf(counts)));
    expect(found.low).toBeCloseTo(low, 4);
    expect(found.high).toBeCloseTo(high, 4);
  });

  it('of matched pairs are met: 150 and 86 of R’s example have 17.36, ratio 1.74', () => {
    const tests = given(mcNemar({ caseOnly: 150, controlOnly: 86 }));
    expect(tests.uncorrected.chiSquare).toBeCloseTo(17.36, 2);
    expect(given(matchedOddsRatio({ caseOnly: 150, controlOnly: 86 })).ratio).toBeCloseTo(1.744, 3);
  });
});

describe('the score interval', () => {
  it('turns its sign when the groups are turned round, as the records’ do not', () => {
    for (const { kind, inputs } of recordsOf('two-by-two').filter((r) => r.kind === 'two_by_two')) {
      expect(kind).toBe('two_by_two');
      const { a, b, c, d } = inputs as Record<'a' | 'b' | 'c' | 'd', number>;
      const one = given(scoreIntervalOfDifference(tableOf([a, b, c, d])));
      const other = given(scoreIntervalOfDifference(tableOf([c, d, a, b])));
      expect(one.low).toBeCloseTo(-other.high, 11);
      expect(one.high).toBeCloseTo(-other.low, 11);
    }
  });
});
