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
import { rules } from '../rules/index.ts';
import type { Flag, Interval, Printed, PValue } from '../src/model/index.ts';
import { unrounded } from '../src/stats/rounding.ts';
import { checkedBy, outcomeOf, readingOf } from './reading-of.ts';
import { recordsOf } from './records.ts';

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

/* Published and typed-out rows, taken through the whole path: a text or a table in, flags out. */

describe('a published ratio in a sentence', () => {
  const ASKED = [
    'limits-in-order', 'estimate-inside-interval', 'interval-symmetry', 'p-from-interval',
  ];

  /** What is expected of each verdict: the rules that raise a flag. */
  const RAISED: Readonly<Record<string, readonly string[]>> = {
    consistent: [],
    'unusual level': [],
    'asymmetric within the bound': [],
    'asymmetric beyond the bound': ['interval-symmetry'],
    'p inconsistent': ['p-from-interval'],
    'p inconsistent significance flip': ['p-from-interval'],
    'arithmetic symmetry': ['interval-symmetry'],
    'bounds swapped': ['limits-in-order'],
  };

  const records = recordsOf('printed-numbers')
    .filter(({ kind }) => kind === 'reported_ratio_decision');

  test.each(records)('$id is answered as expected', async (record) => {
    const { estimate, ci, level, p } = record.inputs as RatioInputs;
    const [lower = '', upper = ''] = ci;
    const ending = p === null ? '' : `; p = ${p}`;
    const interval = `${level * 100}% CI ${lower} to ${upper}`;
    const text = `The odds ratio was ${estimate} (${interval}${ending}).`;
    const reading = await readingOf(text);
    const { flags } = checkedBy(rules.filter(({ id }) => ASKED.includes(id)), reading);
    expect(flags.map(({ rule }) => rule)).toEqual(RAISED[String(record.expected['verdict'])]);
  });
});

describe('a published table of ratios', () => {
  const records = recordsOf('printed-numbers')
    .filter(({ kind }) => kind === 'reported_ratio_table');

  test.each(records)('$id: slips are flagged, and sound rows are not', async (record) => {
    const { rows } = record.inputs as { readonly rows: readonly RatioInputs[] };
    const expected = record.expected['rows'] as readonly { readonly judged?: string }[];
    const text = ['Table 1. Odds', 'Term\tOR (95% CI)\tP', ...rows.map(({ estimate, ci, p }, at) =>
      `Row ${at}\t${estimate} (${ci[0]}–${ci[1]})\t${p ?? ''}`)].join('\n');
    const { flags } = checkedBy(rules, await readingOf(text));
    const slips = expected.flatMap(({ judged }, at) => (judged === undefined ? [] : [`Row ${at}`]));
    const flagged = flags.flatMap(({ result }) => result?.cell?.row ?? []);
    expect([...new Set(flagged)]).toEqual(slips);
  });
});

describe('a published row of coefficient, standard error, Wald, p and ratio', () => {
  const records = recordsOf('printed-numbers').filter(({ kind }) => kind === 'b_se_wald_row');

  test.each(records)('$id is answered as expected', async (record) => {
    const { b, se, wald, p, exp_b } = record.inputs as Readonly<Record<string, string | null>>;
    const text = ['Table 2. Logistic regression', 'Term\tB\tS.E.\tWald\tdf\tSig.\tExp(B)',
      `Term\t${b ?? ''}\t${se ?? ''}\t${wald ?? ''}\t1\t${p ?? ''}\t${exp_b ?? ''}`].join('\n');
    const reading = await readingOf(text);
    const consistent = Object.entries(record.expected)
      .every(([field, value]) => !field.endsWith('consistent') || value === true);
    const rule = rules.find(({ id }) => id === 'coefficient-and-ratio');
    expect(outcomeOf(rule?.judgements(reading) ?? [])).toBe(consistent ? 'agrees' : 'disagrees');
    expect(checkedBy(rules, reading).flags).toHaveLength(consistent ? 0 : 1);
  });

  test('is flagged where any one of its numbers is another', async () => {
    // The row 0.693, 0.210, 10.890, 0.001, 2.000 with one number changed by about a tenth or more.
    const numbers = ['0.693', '0.210', '10.890', '1', '0.001', '2.000'];
    const others = [
      [0, '0.963'], [1, '0.120'], [2, '18.090'], [4, '0.100'], [5, '2.200'],
    ] as const;
    for (const [at, other] of others) {
      const row = numbers.map((number, index) => (index === at ? other : number));
      const text = 'Table 2. Relapse\nTerm\tB\tS.E.\tWald\tdf\tSig.\tExp(B)\n'
        + `Quay\t${row.join('\t')}`;
      const { flags } = checkedBy(rules, await readingOf(text));
      expect(flags.map(({ rule }) => rule), row.join(' ')).toEqual(['coefficient-and-ratio']);
    }
  });
});

describe('published counts beside their crude odds ratio', () => {
  const records = recordsOf('two-by-two').filter(({ kind }) => kind === 'counts_vs_printed_or');

  test.each(records)('$id is answered as expected', async (record) => {
    const { a, b, c, d, printed_or, printed_ci } = record.inputs as CountInputs;
    const text = ['Table 3. Crude odds', 'Level\tCases\tControls\tCrude OR (95% CI)',
      `High\t${a}\t${b}\t${printed_or} (${printed_ci[0]}–${printed_ci[1]})`,
      `Low\t${c}\t${d}\t1.00`].join('\n');
    const rule = rules.find(({ id }) => id === 'crude-ratio-from-counts');
    const reading = await readingOf(text);
    const wanted = record.expected['or_consistent'] === true ? 'agrees' : 'disagrees';
    expect(outcomeOf(rule?.judgements(reading) ?? [])).toBe(wanted);
    expect(checkedBy(rules, reading).flags).toHaveLength(wanted === 'agrees' ? 0 : 1);
  });
});

describe('published percentages of counts', () => {
  const records = recordsOf('proportions').filter(({ kind }) => kind === 'percent_of_count');

  test.each(records)('$id is answered as expected', async (record) => {
    const { count, denominator, printed_percent } = record.inputs as PercentInputs;
    const share = `${count} of ${denominator} residents (${printed_percent}%)`;
    const text = `Falls were reported by ${share}.`;
    const [flag, ...others] = await flagsOn(text);
    expect(others).toEqual([]);
    if (record.expected['consistent'] === true) expect(flag).toBeUndefined();
    else {
      expect(flag?.rule).toBe('percent-of-count');
      expect(flag?.grade).toBe(
        record.expected['explained_by_truncation'] === true ? 'discrepancy' : 'contradiction');
    }
  });
});

describe('published parts and their total', () => {
  const records = recordsOf('proportions').filter(({ kind }) => kind === 'parts_vs_total');

  const WANTED: Readonly<Record<string, string>> = {
    adds_up: 'agrees',
    off_by_rounding: 'agrees',
    excludes_missing: 'cannot tell',
  };

  test.each(records)('$id is answered as expected', async (record) => {
    const { parts, total } = record.inputs as SumInputs;
    const rows = parts.map((part, at) => `Group ${at}\t${part}`);
    const text = ['Table 4. Numbers', 'Group\tNumber', ...rows, `Total\t${total}`].join('\n');
    const rule = rules.find(({ id }) => id === 'parts-and-total');
    const outcome = outcomeOf(rule?.judgements(await readingOf(text)) ?? []);
    expect(outcome).toBe(WANTED[String(record.expected['verdict'])]);
  });
});

interface RatioInputs {
  readonly estimate: string;
  readonly ci: readonly string[];
  readonly level: number;
  readonly p: string | null;
}

interface CountInputs {
  readonly a: number;
  readonly b: number;
  readonly c: number;
  readonly d: number;
  readonly printed_or: string;
  readonly printed_ci: readonly string[];
}

interface SumInputs {
  readonly parts: readonly number[];
  readonly total: number;
}

interface PercentInputs {
  readonly count: number;
  readonly denominator: number;
  readonly printed_percent: string;
}

async function flagsOn(text: string): Promise<readonly Flag[]> {
  return checkedBy(rules, await readingOf(text)).flags;
}
