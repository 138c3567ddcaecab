import fc from 'fast-check';
import { describe, expect, test, vi } from 'vitest';
import { EXAMPLES, answerTo } from './made/recomputed.ts';
import { InputProblem } from '../src/cli/recompute/input-problem.ts';
import { recomputeTyped } from '../src/cli/recompute/recompute-typed.ts';
import { numbersIn, pValueOf } from '../src/cli/recompute/typed-number.ts';
import type { TypedOptions } from '../src/cli/recompute/typed-options.ts';
import { recomputationsJson } from '../src/report/recomputation-json.ts';
import { recomputationList } from '../src/report/recomputation-list.ts';

const SCREEN = { columns: 80, colours: 0, unicode: true, drawings: true } as const;

describe('typed numbers', () => {
  test.each([
    ['1.59 1.05 2.41', ['1.59', '1.05', '2.41']],
    ['1.59 (1.05–2.41)', ['1.59', '1.05', '2.41']],
    ['1,59 [1,05 - 2,41]', ['1.59', '1.05', '2.41']],
    ['·72 0·58 to 0·90', ['0.72', '0.58', '0.90']],
    ['0.67:0.46:0.98', ['0.67', '0.46', '0.98']],
    ['1.59;1.05;2.41', ['1.59', '1.05', '2.41']],
    ['1.59,1.05-2.41', ['1.59', '1.05', '2.41']],
    ['-0.9--0.1', ['-0.9', '-0.1']],
    ['−0·46 − 0·02', ['-0.46', '0.02']],
    ['35%–40%', ['35', '40']],
    ['1.2 × 10⁻⁵', ['0.000012']],
    ['1.2e-5-3.4e-5', ['0.000012', '0.000034']],
    ['1.05 ∞', ['1.05', '∞']],
  ])('%s', (typed, plain) => {
    expect(numbersIn(typed.split(' '))?.map((number) => number.plain)).toEqual(plain);
    expect(numbersIn([typed])?.map((number) => number.plain)).toEqual(plain);
  });

  test.each(['OR 1.59', '1.59 (95% CI 1.05 to 2.41)', '1.2.3', 'p<0.05', '1..5', '--', 'x'])(
    'nothing but numbers is taken for numbers: %s', (typed) => {
      expect(numbersIn([typed]) ?? []).toEqual([]);
    });

  test.each([
    ['0.03', '=', 0.03], ['p = .03', '=', 0.03], ['P<0·001', '<', 0.001], ['≤0,05', '<=', 0.05],
    ['p-value: 0.03'.replace(':', ' ='), '=', 0.03], ['3.1e-8', '=', 3.1e-8], ['3%', '=', 0.03],
  ])('a p-value: %s', (typed, relation, value) => {
    const p = pValueOf(typed, false);
    expect(p.relation).toBe(relation);
    expect(p.printed.value).toBeCloseTo(value, 12);
  });
});

describe('what makes no sense', () => {
  const cases: readonly (readonly [string, TypedOptions, string])[] = [
    ['', {}, 'No numbers are typed'],
    ['ratio', {}, 'No numbers are typed'],
    ['ratio 1.59', {}, 'One number of a ratio can be compared with nothing'],
    ['ratio 1 2 3 4', {}, '4 numbers are typed'],
    ['ratio 1,234 1,012 1,505', {}, '“1,234” may be 1.234 or 1234'],
    ['ratio one two three', {}, 'No ratio was recognised'],
    ['ratio 1.59 <1.05 2.41', {}, 'only a p-value may'],
    ['OR 1.59 1.05 2.41', { level: '0.95' }, 'The level “0.95” is not one from 50'],
    ['OR 1.59 1.05 2.41', { level: '100' }, '--level 95'],
    ['OR 1.59 1.05 2.41', { p: '1.2' }, 'A p-value lies between 0 and 1'],
    ['OR 1.59 1.05 2.41', { p: 'ns' }, 'The p-value “ns” is not a number'],
    ['OR 1.59 1.05 2.41', { oneSided: true }, '--one-sided speaks of a p-value'],
    ['OR 1.59 1.05 2.41', { se: '0.2' }, '--se does not belong to recompute ratio but to recompute '
      + 'coefficient'],
    ['ratio 1.59 1.05 2.41', { measure: 'RD' }, '--measure RD is none of a ratio'],
    ['coefficient 0.46', { se: 'small' }, 'The standard error “small” is not a number'],
    ['coefficient 0.46 -0.21', {}, 'a standard error cannot be negative'],
    ['coefficient ∞', { se: '0.2' }, 'The coefficient cannot be infinite'],
    ['coefficient 0.46 0.1 0.2 0.3', {}, '4 numbers are typed'],
    ['counts 45 120', {}, 'No counts were recognised'],
    ['counts 120/45 30/118', {}, '“120/45” is not possible'],
    ['counts 4.5/12 3/11', {}, 'is no count'],
    ['counts 0/0', {}, 'is not possible'],
    ['counts 1/2 1/2 1/2', {}, 'More than two counts'],
    ['counts 45/120 30/118', { printed: '1.76' }, 'with its measure'],
    ['risk 2.0', {}, 'The risk of the unexposed is missing'],
    ['risk 2.0', { baseline: '30' }, 'type it as 30% or 0.30'],
    ['risk -2.0', { baseline: '30%' }, 'cannot be turned into risks'],
    ['risk 1.5', { baseline: '30%', measure: 'SMR' }, 'is not turned into risks'],
    ['compare 0.67 0.88', {}, '2 numbers are typed'],
    ['compare a b', {}, 'does not hold two ratios'],
    ['AUC 0.78', {}, '--events 40 --others 120'],
    ['AUC 1.78', { events: '40', others: '120' }, 'is not between 0 and 1'],
    ['AUC 0.78', { events: '0', others: '120' }, 'no standard error for an area of 0.78 with 0'],
    ['OR 59% 5% 141%', {}, '“59%” is no ratio'],
    ['1.59 (1.05–2.41)', {}, 'say what its numbers are'],
    ['constructor', {}, 'No result was recognised'],
    ['ratio --basline 3', {}, 'There is no option “--basline”'],
    [`OR ${'9'.repeat(5000)}`, {}, 'longer text than a result'],
  ];

  test.each(cases)('%j with %j is answered with a sentence', async (typed, options, words) => {
    const problem: unknown = await recomputeTyped(typed.split(' '), options).catch((it) => it);
    expect(problem).toBeInstanceOf(InputProblem);
    const { message } = problem as InputProblem;
    expect(message).toContain(words);
    expect(message).toMatch(/^[^\n]*[.]$/);
    expect(message.replaceAll('standard error', ''))
      .not.toMatch(/\b(error|wrong|undefined|NaN)\b/i);
  });

  test('whatever is typed, there is an answer without holes or such a sentence', async () => {
    const form = fc.constantFrom('ratio', 'RR', 'MD', 'coefficient', 'counts', 'risk', 'compare',
      'AUC', 'OR');
    const number = fc.constantFrom('0', '0.00', '1', '1.0', '-1', '0.5', '2.5', '1.05', '30%',
      '-0.02', '1e9', '1e-9', '∞', '45/120', '0/20', '5/5', '3/7');
    const piece = fc.constantFrom('with', '-', '–', '0',
      '0.00', '1', '1.0', '-1', '1e9', '1e-9', '1e400', '∞', '0.5', '2.5', '45/120', '0/20', '5/5',
      '(', '95%', 'CI', 'p', '=', '<', '0,85', '\u001b[2J', '\u202e', '½',
      '10000000000/10000000000',
    );
    const option = fc.constantFrom('0', '1', '0.5', '30%', '<0.001', '99', 'x', '1e-300');
    const none = fc.constant({});
    const size = fc.constantFrom('1', '40', '1e9');
    const options: fc.Arbitrary<TypedOptions> = fc.oneof(none, fc.record({ p: option }),
      fc.record({ se: option }), fc.record({ baseline: option }), fc.record({ level: option }),
      fc.record({ events: size, others: size }));
    const typed = fc.oneof(
      fc.array(piece, { maxLength: 7 }),
      fc.tuple(form, fc.array(number, { minLength: 1, maxLength: 3 }))
        .map(([first, rest]) => [first, ...rest]),
      fc.array(number, { minLength: 6, maxLength: 6 }).map((rest) => ['compare', ...rest]),
    );
    let answered = 0;
    await fc.assert(fc.asyncProperty(typed, options, async (words, given) => {
      const answers = await recomputeTyped(words, given).catch((problem: unknown) => {
        if (problem instanceof InputProblem) return [];
        throw problem;
      });
      answered += answers.length;
      const shown = recomputationList(answers, SCREEN) + recomputationsJson(answers);
      expect(shown).not.toMatch(/NaN|undefined|\[object|\u001b|\u202e/);
    }), { numRuns: 3000, seed: 20 });
    expect(answered).toBeGreaterThan(200);
  });
});

describe('the command line', () => {
  interface Run { readonly out: string; readonly err: string; readonly status: unknown }

  async function run(...args: readonly string[]): Promise<Run> {
    vi.stubGlobal('__TALLYSTICK_VERSION__', '0.0.0');
    const { programFor } = await import('../src/cli/program.ts');
    const [out, err]: [string[], string[]] = [[], []];
    const stream = (to: string[]): object => ({ write: (text: string) => to.push(text) });
    const process = {
      stdout: { ...stream(out), isTTY: false, columns: 80 }, stderr: stream(err),
      env: { LANG: 'C.UTF-8' }, platform: 'linux',
    } as unknown as NodeJS.Process;
    let status: unknown;
    const shell = { process, workerAddress: new URL('file:///nowhere') };
    await programFor(shell, (ended) => { status = ended; })
      .parseAsync(['node', 'tallystick', 'recompute', ...args]);
    return { out: out.join(''), err: err.join(''), status };
  }

  test('takes negative numbers for numbers, in every dress', async () => {
    for (const b of ['-0.46', '−0.46', '-.46', '-0,46', '-0·46']) {
      const { out, status } = await run('coefficient', b, '--se', '0.21');
      expect([out.split('\n')[0], status]).toEqual(['coefficient -0.46, SE 0.21', 0]);
    }
    expect((await run('RD', '-5%', '-9%--1%')).out).toContain('RD -5% (95% CI -9% to -1%)');
    expect((await run('MD', '--p', '0.03', '-5', '-9', '-1')).out)
      .toContain('MD -5 (95% CI -9 to -1)');
  });

  test('ends with 2 and one sentence where it was not understood', async () => {
    const { out, err, status } = await run('ratio', '1.59');
    expect([out, status]).toEqual(['', 2]);
    expect(err).toMatch(/^One number of a ratio [^\n]+\.\n$/);
    expect((await run('ratio', '1', '--basline', '3')).err).toContain('no option “--basline”');
  });

  test('writes JSON', async () => {
    const { out, status } = await run('OR', '1.59', '1.05', '2.41', '--as', 'json');
    expect(status).toBe(0);
    expect(JSON.parse(out)[0]).toMatchObject({ form: 'ratio', outcome: 'within rounding' });
  });

  test('keeps every example of its help answerable', async () => {
    const { RECOMPUTE_HELP } = await import('../src/cli/help-text.ts');
    const examples = [...RECOMPUTE_HELP.matchAll(/^ {6}tallystick recompute (.*?)(?: {3,}.*)?$/gm)]
      .map(([, line = '']) => [...line.matchAll(/"([^"]*)"|(\S+)/g)]
        .map(([, within, word]) => within ?? word ?? ''));
    expect(examples.length).toBeGreaterThan(12);
    for (const example of examples) {
      expect([example, (await run(...example)).err]).toEqual([example, '']);
    }
  });
});

describe('every example', () => {
  test.each(EXAMPLES)('%j %j has an answer', async (words, options) => {
    const answers = await recomputeTyped(words, options);
    expect(answers.length).toBe(1);
    expect(answers[0]?.answer.join('')).not.toBe('');
  });

  test('speaks of numbers, never of people', async () => {
    for (const [words, options] of EXAMPLES) {
      const shown = recomputationList(await recomputeTyped(words, options), SCREEN)
        .replaceAll(/standard\s+error/g, '');
      expect(shown).not.toMatch(/\b(errors?|wrong|suspicious|misconduct|fraud|mistakes?)\b/i);
    }
  });

  test('shows the same numbers twice', async () => {
    const [one, other] = [await answerTo('OR 1.59 1.05 2.41'), await answerTo('OR 1.59 1.05 2.41')];
    expect(one).toEqual(other);
  });
});
