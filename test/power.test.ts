import { expect, test } from 'vitest';
import { outcomeOf } from '../src/stats/agreement.ts';
import { twoSidedP } from '../src/stats/normal.ts';
import type { ReportedNumbers } from '../src/stats/reported-numbers.ts';
import type { PrintedValue } from '../src/stats/rounding.ts';
import {
  MADE_SLIPS,
  nearest,
  printedP,
  randomStream,
  waldRow,
  withSlip,
  type Analysis,
  type MadeSlip,
} from './reported-row.ts';
import { dataSets, printsOf } from './standard-methods.ts';

/*
 * How much of what goes astray in print the printed numbers can reveal. Every kind of slip is
 * made in one of estimate, lower and upper limit (or p) of honest Wald rows of ratios;
 * printed is the share that each check raises. Run it alone to see the table:
 *
 *   npx vitest run --config test/vitest.config.ts test/power.test.ts
 *
 * `hand` is the usual check with a calculator: the estimate differs by more than 5%
 * from the geometric mean of the limits, or lies outside them.
 */

const ROWS = 500;

type Check = 'hand' | 'standard' | 'two groups' | 'any contrast';
const CHECKS: readonly Check[] = ['hand', 'standard', 'two groups', 'any contrast'];

function raises(check: Check, numbers: ReportedNumbers): boolean {
  switch (check) {
    case 'hand':
      return byHand(numbers);
    case 'standard':
      return outcomeOf(numbers, 'binary') !== 'within rounding';
    case 'two groups':
      return outcomeOf(numbers, 'binary') === 'neither';
    case 'any contrast':
      return outcomeOf(numbers, 'unknown') === 'neither';
    default:
      return check satisfies never;
  }
}

function byHand({ estimate, lower, upper }: ReportedNumbers): boolean {
  const [e, l, u] = [estimate, lower, upper].map((printed) => printed?.value ?? NaN) as [
    number,
    number,
    number,
  ];
  if (!(l <= e && e <= u)) return true;
  return Math.abs(Math.sqrt(l * u) / e - 1) > 0.05;
}

/** Ratios as clinical papers print them: standard errors of 0.08 to 0.6, mostly 95%. */
function analysis(random: () => number): Analysis {
  const normal = Math.sqrt(-2 * Math.log(random() + 1e-12)) * Math.cos(2 * Math.PI * random());
  return { theta: 0.5 * normal, standardError: 0.08 * (0.6 / 0.08) ** random(), level: 95 };
}

type Maker = (
  honest: ReportedNumbers,
  from: Analysis,
  decimals: number,
  random: () => number,
) => ReportedNumbers | undefined;

function inOne(slip: MadeSlip): Maker {
  return (honest, _from, _decimals, random) => {
    const field = (['estimate', 'lower', 'upper'] as const)[Math.floor(3 * random())] as 'estimate';
    const made = withSlip(honest[field] as PrintedValue, slip, random);
    return made && { ...honest, [field]: made };
  };
}

/** The interval of a made-up neighbouring row. */
const otherInterval: Maker = (honest, _from, decimals, random) => {
  const { lower, upper } = waldRow(analysis(random), decimals, nearest, undefined);
  return { ...honest, ...(lower && { lower }), ...(upper && { upper }) };
};

const otherUpper: Maker = (honest, _from, decimals, random) => {
  const { upper } = waldRow(analysis(random), decimals, nearest, undefined);
  return upper && { ...honest, upper };
};

const swappedLimits: Maker = ({ lower, upper, ...honest }) =>
  lower && upper && { ...honest, lower: upper, upper: lower };

const switchedEstimate: Maker = (honest, { theta }, decimals) => ({
  ...honest,
  estimate: nearest(Math.exp(-theta), decimals),
});

const calledNinetyFive: Maker = (honest, from, decimals, random) => {
  const { lower, upper } = waldRow({ ...from, level: 90 }, decimals, nearest, random());
  return { ...honest, ...(lower && { lower }), ...(upper && { upper }) };
};

const otherP: Maker = (honest, _from, _decimals, random) => {
  const other = analysis(random);
  const p = printedP(twoSidedP(other.theta / other.standardError), 0.2, nearest);
  return p && { ...honest, p };
};

const oneSidedP: Maker = (honest, { theta, standardError }) => {
  const p = printedP(twoSidedP(theta / standardError) / 2, 0.2, nearest);
  return p && { ...honest, p };
};

const KINDS: readonly (readonly [string, Maker])[] = [
  ...MADE_SLIPS.map((slip): readonly [string, Maker] => [slip, inOne(slip)]),
  ['limits swapped', swappedLimits],
  ['upper limit of another row', otherUpper],
  ['interval of another row', otherInterval],
  ['estimate of the reverse comparison', switchedEstimate],
  ['90% limits called 95%', calledNinetyFive],
  ['p of another row', otherP],
  ['one-sided p', oneSidedP],
];

function shareRaised(make: Maker, decimals: number, withP: boolean, check: Check): number {
  const random = randomStream(31 + decimals);
  let [made, raised] = [0, 0];
  for (let i = 0; i < ROWS; i++) {
    const from = analysis(random);
    const honest = waldRow(from, decimals, nearest, withP ? 0.2 : undefined);
    const slipped = make(honest, from, decimals, random);
    if (slipped === undefined) continue;
    made++;
    if (raises(check, slipped)) raised++;
  }
  return raised / made;
}

const percent = (share: number) =>
  Number.isNaN(share) ? '   –' : `${(100 * share).toFixed(0).padStart(4)}`;

/** Honest prints of other methods, raised in vain: by interval alone, and with each other p. */
function falseAlarms(): readonly string[] {
  const groups = dataSets().filter(({ design }) => ['odds ratio', 'hazard ratio'].includes(design));
  const tallies = new Map<string, number[]>();
  for (const set of groups) {
    for (const { interval, p, numbers } of printsOf(set, 2)) {
      if (p !== 'none' && interval !== 'Wald') continue;
      const label = `${set.design}: ${interval} interval${p === 'none' ? '' : `, ${p} p`}`;
      const tally = tallies.get(label) ?? [0, ...CHECKS.map(() => 0)];
      tally[0] = (tally[0] as number) + 1;
      CHECKS.forEach((check, i) => {
        if (raises(check, numbers)) tally[i + 1] = (tally[i + 1] as number) + 1;
      });
      tallies.set(label, tally);
    }
  }
  return [...tallies].map(
    ([label, [all, ...raised]]) =>
      `${label.padEnd(48)}${raised.map((n) => percent(n / (all as number)).padStart(14)).join('')}`,
  );
}

test('the power of each check for each kind of slip, and its false alarms', () => {
  const honest: Maker = (numbers) => numbers;
  const lines = [
    `share raised, in %; each three at 1, 2 and 3 decimals`,
    `${''.padEnd(36)}${CHECKS.map((check) => check.padStart(17)).join('')}`,
  ];
  const shares = new Map<string, readonly (readonly number[])[]>();
  for (const withP of [false, true]) {
    for (const [name, make] of [['none: honest Wald rows', honest] as const, ...KINDS]) {
      const pOnly = /p$|^p |90%/.test(name);
      if (!withP && pOnly) continue;
      const row = CHECKS.map((check) => [1, 2, 3].map((d) => shareRaised(make, d, withP, check)));
      const label = `${name}${withP ? ', with p' : ''}`;
      shares.set(label, row);
      lines.push(`${label.padEnd(42)}${row.map((at) => at.map(percent).join(' ')).join('  ')}`);
    }
  }
  lines.push(
    '',
    'honest prints of small and middling studies to 2 decimals, raised in vain, in %',
    `${''.padEnd(48)}${CHECKS.map((check) => check.padStart(14)).join('')}`,
    ...falseAlarms(),
  );
  console.log(lines.join('\n'));

  const [byHand, standard, groups, any] = shares.get('none: honest Wald rows') as number[][];
  expect(standard).toEqual([0, 0, 0]);
  expect(groups).toEqual([0, 0, 0]);
  expect(any).toEqual([0, 0, 0]);
  expect((byHand as number[])[0]).toBeGreaterThan(0.1);
  for (const [label, [, strict, two, wide]] of shares) {
    for (const at of [0, 1, 2]) {
      if (Number.isNaN((strict as number[])[at])) continue;
      expect((strict as number[])[at], label).toBeGreaterThanOrEqual(
        (two as number[])[at] as number,
      );
      expect((two as number[])[at], label).toBeGreaterThanOrEqual((wide as number[])[at] as number);
    }
  }
  expect(shares.get('limits swapped')?.[1]?.[2]).toBeGreaterThan(0.99);
});
