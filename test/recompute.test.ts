import { describe, expect, test } from 'vitest';
import { answerTo, rangeIn, valueIn } from './made/recomputed.ts';
import { recomputeTyped } from '../src/cli/recompute/recompute-typed.ts';

/*
 * Numbers typed in, held against examples that are published with their answers. Their sources
 * stand beside them; further digits were recomputed in R 4.2 from the same formulas.
 */

/** That the true value lies in the range, and the range is not wider than rounding makes it. */
function holds(range: { low: number; high: number }, value: number, width: number): void {
  expect(range.low).toBeLessThanOrEqual(value);
  expect(range.high).toBeGreaterThanOrEqual(value);
  expect(range.high - range.low).toBeLessThan(width);
}

describe('a ratio with its interval', () => {
  // Altman & Bland 2011, BMJ 343:d2304, the ratio (numbers from memory, p recomputed exactly)
  test('gives the p of the published example, and the steps to it', async () => {
    const answer = await answerTo('ratio 0.81 0.70 0.94');
    expect(answer.outcome).toBe('within rounding');
    holds(rangeIn(answer, 'together', 'standard error'), 0.0752, 0.008);
    holds(rangeIn(answer, 'together', 'z'), -2.802, 0.22);
    holds(rangeIn(answer, 'together', 'p'), 0.00508, 0.004);
    expect(answer.working.join(' ')).toContain('(ln 0.94 − ln 0.70) / 3.920 = 0.07521');
    expect(answer.working.join(' ')).toContain('z is ln 0.81 / 0.07521 = -2.80');
    expect(answer.sources.join(' ')).toContain('d2304');
  });

  test('says for each number what the others imply', async () => {
    const answer = await answerTo('OR 1.59 1.05 2.41', { p: '0.03' });
    expect(answer.understood).toBe('OR 1.59 (95% CI 1.05 to 2.41), p = 0.03');
    expect(answer.answer).toEqual(['The printed numbers agree within their rounding.']);
    holds(rangeIn(answer, 'from others', 'upper limit'), 2.41, 0.06);
    holds(rangeIn(answer, 'from others', 'p-value'), 0.0288, 0.006);
  });

  test('names a limit that was transposed as one slip that would explain all', async () => {
    const answer = await answerTo('HR 0.72 0.58 0.98');
    expect(answer.outcome).toBe('neither');
    holds(rangeIn(answer, 'from others', 'upper limit'), 0.894, 0.05);
    expect(answer.perhaps.join(' ')).toContain('the upper limit 0.89 (digits transposed)');
    expect(answer.comment).toMatch(/^For “HR 0\.72 \(95% CI 0\.58 to 0\.98\)”: /);
    expect(answer.comment).toContain('Could the authors check them');
  });

  test('names the one number without which the others agree', async () => {
    const answer = await answerTo('OR 1.59 1.05 2.41', { p: '0.001' });
    expect(answer.answer).toContain('Without the p-value the others agree with each other.');
  });

  test('has a third outcome for honest print of another method', async () => {
    // Doll & Hill 1950: the exact interval of 647, 622, 2, 27, rounded
    const answer = await answerTo('OR 14.0 3.5 122.2');
    expect(answer.outcome).toBe('within another standard method');
    expect(answer.comment).toBe('');
  });

  test('tells limits that are swapped, and a coefficient that stands for a ratio', async () => {
    const swapped = await answerTo('OR 1.59 2.41 1.05');
    expect(swapped.perhaps.join(' ')).toContain('the limits 1.05 to 2.41 (limits swapped)');
    const log = await answerTo('OR -0.45 -0.80 -0.10');
    expect(log.outcome).toBe('cannot tell');
    expect(log.perhaps.join(' ')).toContain('logarithms of ratios');
  });

  test('goes as far out as p-values are printed', async () => {
    const answer = await answerTo('OR 2.5 1.9 3.3', { p: '1e-300' });
    expect(answer.outcome).toBe('neither');
    holds(rangeIn(answer, 'from others', 'p-value'), 7.9e-11, 1e-8);
  });

  test('takes a p that is one-sided for what it is', async () => {
    const options = { p: '0.015', oneSided: true };
    expect((await answerTo('OR 1.59 1.05 2.41', options)).outcome).toBe('within rounding');
    const asked = await answerTo('OR 1.59 1.05 2.41', { p: '0.015' });
    expect(asked.outcome).not.toBe('within rounding');
  });
});

describe('a difference', () => {
  // Altman & Bland 2011, BMJ 343:d2090: 17 with P = 0.032 has SE 7.940 and 1.4 to 32.6 by their
  // formula; exactly SE 7.928 and 1.46 to 32.54.
  test('gives the interval of the published example from its p alone', async () => {
    const answer = await answerTo('difference 17', { p: '0.032' });
    holds(rangeIn(answer, 'together', 'lower limit'), 1.46, 2.1);
    holds(rangeIn(answer, 'together', 'upper limit'), 32.54, 3.1);
    expect(answer.working.join(' ')).toContain('= 7.928, and the 95% interval 1.46 to 32.5');
    expect(answer.sources.join(' ')).toContain('d2090');
  });

  test('stays in percent where it was typed so', async () => {
    const answer = await answerTo('RD -5.2% -9.3% -1.1%');
    expect(valueIn(answer, 'together', 'standard error').unit).toBe('percent');
    holds(rangeIn(answer, 'from others', 'estimate'), -5.2, 0.2);
  });
});

describe('a coefficient', () => {
  test('gives the other columns of its row', async () => {
    // 0.693 with 0.210: exp = 2.00, 95% 1.325 to 3.018, p = 0.00097 (R: exp, qnorm, pnorm)
    const answer = await answerTo('coefficient 0.693', { se: '0.210' });
    holds(rangeIn(answer, 'as a ratio', 'ratio exp(b)'), 1.99971, 0.01);
    holds(rangeIn(answer, 'as a ratio', 'lower limit'), 1.32497, 0.01);
    holds(rangeIn(answer, 'as a ratio', 'upper limit'), 3.01807, 0.01);
    holds(rangeIn(answer, 'as a ratio', 'p'), 0.000967, 0.0002);
  });

  test('asks a p, which knows no direction, only for the side that is printed', async () => {
    const answer = await answerTo('coefficient -0.46', { se: '0.21', p: '0.028' });
    holds(rangeIn(answer, 'from others', 'coefficient'), -0.4614, 0.05);
  });

  test('is held against the ratio that is printed beside it', async () => {
    const ratio = '1.58 (1.05–2.39)';
    expect((await answerTo('coefficient 0.46 0.21', { ratio })).outcome).toBe('within rounding');
    const other = await answerTo('coefficient 0.46 0.21', { ratio: '1.85 (1.05–2.39)' });
    expect(other.outcome).toBe('neither');
    expect(other.perhaps.join(' ')).toContain('the estimate 1.58 (digits transposed)');
  });

  test('takes limits of its own, and turns them', async () => {
    const answer = await answerTo('β 0.46 0.05 0.87');
    holds(rangeIn(answer, 'as a ratio', 'upper limit'), Math.exp(0.87), 0.05);
    expect(answer.outcome).toBe('within rounding');
  });
});

describe('counts', () => {
  // Newcombe 1998, Stat Med 17:873, example a: 56/70 against 48/80, method 10: 0.0524 to 0.3339
  test('give the difference of the published example', async () => {
    const answer = await answerTo('counts 56/70 48/80');
    const { value, interval } = valueIn(answer, 'difference', 'Newcombe');
    expect(value?.low).toBeCloseTo(0.2, 12);
    expect(interval?.limits.low).toBeCloseTo(0.0524, 4);
    expect(interval?.limits.high).toBeCloseTo(0.3339, 4);
  });

  // Newcombe 1998, Stat Med 17:857: 81/263 by score 0.2553 to 0.3662, exact 0.2527 to 0.3676
  test('of one group give its intervals', async () => {
    const answer = await answerTo('counts 81/263');
    expect(valueIn(answer, 'intervals', 'Wilson').interval?.limits.low).toBeCloseTo(0.2553, 4);
    expect(valueIn(answer, 'intervals', 'Wilson').interval?.limits.high).toBeCloseTo(0.3662, 4);
    expect(valueIn(answer, 'intervals', 'Clopper–Pearson').interval?.limits.high)
      .toBeCloseTo(0.3676, 4);
  });

  // Doll & Hill 1950, men: 647/649 of the patients smoked, 622/649 of the others; Woolf 3.33, 59.3
  test('give the odds ratio of the published table', async () => {
    const answer = await answerTo('counts 647/1269 2/29');
    expect(valueIn(answer, 'odds ratio', 'Woolf').value?.low).toBeCloseTo(14.04, 2);
    expect(valueIn(answer, 'odds ratio', 'Woolf').interval?.limits.low).toBeCloseTo(3.33, 2);
    expect(valueIn(answer, 'odds ratio', 'Woolf').interval?.limits.high).toBeCloseTo(59.3, 1);
  });

  test('say which methods give a ratio that is printed beside them', async () => {
    const woolf = await answerTo('counts 45/120 30/118', { printed: 'OR 1.76 (1.01 to 3.07)' });
    expect(woolf.outcome).toBe('within rounding');
    expect(woolf.answer.join(' ')).toContain('The printed OR follows from the counts (Woolf');
    const score = await answerTo('counts 45/120 30/118', { printed: 'OR 1.76 (1.01 to 3.06)' });
    expect(score.outcome).toBe('within another standard method');
    const other = await answerTo('counts 45/120 30/118', { printed: 'OR 2.10 (1.01 to 3.06)' });
    expect(other.outcome).toBe('neither');
    expect(other.comment).toContain('Could the authors check the counts');
  });

  test('are held against their percentage', async () => {
    expect((await answerTo('counts 45/120 (37.5%)')).outcome).toBe('within rounding');
    const answer = await answerTo('counts 45/120 (38.9%)');
    expect(answer.outcome).toBe('neither');
    expect(answer.answer.join(' ')).toContain('45 of 120 is 37.50%, and 38.9% is printed');
  });

  test('run through infinity where the difference may be none', async () => {
    const needed = valueIn(await answerTo('counts 12/41 15/100'), 'difference', 'number needed');
    expect(needed.note).toContain('through infinity');
  });
});

describe('a ratio at a baseline risk', () => {
  // Zhang & Yu 1998, JAMA 280:1690: 18% against 24% is an odds ratio of 0.695, a risk ratio of 0.75
  test('gives the risk ratio of the published example', async () => {
    const answer = await answerTo('risk 0.695', { baseline: '24%' });
    holds(rangeIn(answer, 'at 24%', 'risk ratio'), 0.75, 0.002);
    holds(rangeIn(answer, 'at 24%', 'risk of the exposed'), 0.18, 0.001);
    expect(answer.reservations.join(' ')).toContain('McNutt et al. 2003');
    expect(answer.sources.join(' ')).toContain('Zhang & Yu 1998');
  });

  test('leaves out what speaks of adjusted ratios where it is crude', async () => {
    const answer = await answerTo('risk 0.695', { baseline: '24%', crude: true });
    expect(answer.reservations.join(' ')).not.toContain('McNutt');
    expect(answer.reservations.join(' ')).toContain('Knol');
  });

  // Cochrane Handbook 15.4.4.3: RR 0.92 at 30% is 24 fewer in 1000, 42 to treat
  test('gives the number needed of the published example', async () => {
    const answer = await answerTo('risk 0.92', { measure: 'RR', baseline: '30%' });
    holds(rangeIn(answer, 'at 30%', 'number needed'), 41.67, 6);
    expect(answer.answer.join(' ')).toContain('24.0 fewer in 1000');
  });

  test('gives no risk above 100%', async () => {
    const answer = await answerTo('risk 3.1', { measure: 'RR', baseline: '40%' });
    expect(valueIn(answer, 'at 40%', 'no answer').note).toContain('no risk ratio can exceed 2.50');
  });

  test('is seen at two baselines, and over a range of them', async () => {
    const answer = await answerTo('risk 2.0', { baseline: '20–40%' });
    holds(rangeIn(answer, 'at 20%', 'risk ratio'), 1.6667, 0.07);
    holds(rangeIn(answer, 'at 40%', 'risk ratio'), 1.4286, 0.07);
    // OR 2 at 10%: 1.818, at 60%: 1.25 (Zhang & Yu's formula)
    holds(rangeIn(answer, 'by baseline', 'risk ratio at 10%'), 1.818, 0.09);
    holds(rangeIn(answer, 'by baseline', 'risk ratio at 60%'), 1.25, 0.03);
  });
});

describe('two ratios', () => {
  // Altman & Bland 2003, BMJ 326:219: 0.76 (0.49 to 1.17), z = −1.24, P = 0.2
  test.each([
    'compare 0.67 0.46 0.98 with 0.88 0.71 1.08',
    'compare 0.67 0.46 0.98 0.88 0.71 1.08',
    'compare 0.67 (0.46–0.98) vs 0.88 (0.71–1.08)',
    'compare RR 0.67 (0.46 to 0.98) and RR 0.88 (0.71 to 1.08)',
  ])('compare as in the published example: %s', async (typed) => {
    const answer = await answerTo(typed);
    expect(answer.answer.join(' ')).toContain('0.761 times the second (95% CI 0.494 to 1.17)');
    holds(rangeIn(answer, 'as ranges', 'z'), -1.2358, 0.2);
    holds(rangeIn(answer, 'as ranges', 'p'), 0.2165, 0.08);
    holds(rangeIn(answer, 'as ranges', 'lower limit'), 0.494074, 0.03);
    holds(rangeIn(answer, 'as ranges', 'upper limit'), 1.173255, 0.06);
  });

  test('are not compared where one does not agree with itself', async () => {
    await expect(answerTo('compare 0.29 0.30 0.92 with 0.88 0.71 1.08'))
      .rejects.toThrow('do not agree with each other, so they cannot be compared');
  });
});

describe('an area under the curve', () => {
  // Hanley & McNeil 1982, Radiology 143:29: 0.893 with 51 abnormal and 58 normal has 0.0325
  test('gives the standard error of the published example', async () => {
    const answer = await answerTo('discrimination 0.893', { events: '51', others: '58' });
    holds(rangeIn(answer, 'from sizes', 'standard error'), 0.0325, 0.0005);
    expect(answer.answer[0]).toContain('about 0.829 to 0.957 (standard error 0.0325)');
  });

  test('says how a printed interval stands to it', async () => {
    const answer = await answerTo('AUC 78% 70% 86%', { events: '40', others: '120' });
    expect(answer.understood).toContain('AUC 0.78 (95% CI 0.70 to 0.86)');
    expect(answer.answer.join(' '))
      .toMatch(/standard error of 0\.03\d+ to 0\.04\d+, \S+ times this/);
  });
});

describe('a result pasted whole', () => {
  test('is read as it is printed', async () => {
    const typed = await answerTo('OR 1.59 1.05 2.41', { p: '0.03', level: '95' });
    for (const text of [
      'OR 1.59 (95% CI 1.05–2.41), p = 0.03', 'OR 1,59 (95% CI 1,05–2,41), p = 0,03',
      'The adjusted odds ratio was 1·59 (95% CI 1·05 to 2·41; P=·03).',
    ]) {
      const [whole] = await recomputeTyped([text], {});
      expect(whole?.groups).toEqual(typed.groups);
      expect((await answerTo(text)).groups).toEqual(typed.groups);
    }
  });

  test('may be a test statistic', async () => {
    // R: 2*pt(-2.10, 18) = 0.0501
    const answer = await answerTo('t(18) = 2.10, p = 0.03');
    holds(rangeIn(answer, 'implied', 'p'), 0.0501, 0.002);
    expect(answer.outcome).toBe('neither');
    expect(answer.perhaps).toEqual(['All numbers agree if the p is one-sided.']);
  });

  test('may be counts with the crude ratio of them', async () => {
    const all = await recomputeTyped(
      ['45/120 (37.5%) v 30/118 (25.4%); OR 1.76, 95% CI 1.01 to 3.07'], {});
    expect(all.map(({ form }) => form)).toEqual(['ratio', 'counts']);
    expect(all[1]?.answer.join(' ')).toContain('The printed OR follows from the counts (Woolf');
  });

  test('may be several results, or a coefficient, or a difference', async () => {
    const two = await recomputeTyped(
      ['OR 0.67 (95% CI 0.46 to 0.98) in men and OR 0.88 (95% CI 0.71 to 1.08) in women'], {});
    expect(two).toHaveLength(2);
    expect((await answerTo('β = 0.46 (SE 0.21), p = 0.03')).form).toBe('coefficient');
    expect((await answerTo('mean difference 17 (95% CI 1.4 to 32.6), P=0.032')).form)
      .toBe('difference');
  });

  test('meets a baseline risk', async () => {
    const answer = await answerTo('OR 2.0 (95% CI 1.2 to 3.3)', { baseline: '30%' });
    holds(rangeIn(answer, 'at 30%', 'risk ratio'), 1.538, 0.05);
  });
});
