import { describe, expect, it } from 'vitest';
import { extract } from '../src/extract/index.ts';
import { type Findings, quote, type Result } from '../src/model/index.ts';
import { readText } from '../src/read/index.ts';

const findingsIn = (text: string): Promise<Findings> => extract(readText(text, 'pasted text'));

/** A result in one line: measure, estimate, limits, level, p; "-" for what is absent. */
function inOneLine(result: Result): string {
  const { interval, p } = result;
  const measure = 'measure' in result ? result.measure : result.kind;
  const limits = interval === undefined ? '-' : `${interval.lower.plain}..${interval.upper.plain}`;
  const level = interval?.level ?? '-';
  const probability = p === undefined ? '-' : `p${p.relation}${p.printed.plain}`;
  return [measure, result.estimate?.plain ?? '-', limits, level, probability].join(' ');
}

async function resultsIn(text: string): Promise<readonly string[]> {
  return (await findingsIn(text)).results.map(inOneLine);
}

// Every notation below occurs in print; the numbers and the scenario are invented.
describe('a ratio with its interval and p-value', () => {
  it.each([
    ['The hazard ratio was 0.72 (95% CI, 0.58 to 0.90; P=.004).', 'HR 0.72 0.58..0.90 95 p=.004'],
    ['(OR = 1.35"; 95% CI.99-1.83)', 'OR 1.35 .99..1.83 95 -'],
    ['[log-rank p = 0.086; HR 2.95; 95 % CI 0.81-10.70)', 'HR 2.95 0.81..10.70 95 p=0.086'],
    ['[OR=2.3 [95% CI (1.76, 3.00), P<0.01]', 'OR 2.3 1.76..3.00 95 p<0.01'],
    ['HR 0·72, 95% CI 0·58–0·90; p=0·004', 'HR 0.72 0.58..0.90 95 p=0.004'],
    ['(HRTreatment=0.86 (0.67 to 1.13), p=0.28)', 'HR 0.86 0.67..1.13 - p=0.28'],
    ['rate ratio (RR)=0.85, 90% confidence limits 0.61 to 1.17', 'IRR 0.85 0.61..1.17 90 -'],
    ['(AOR,2.11 95 % CI: 1.21-3.68)', 'OR 2.11 1.21..3.68 95 -'],
    ['HR 0.70 (95% CI, 0.52 to 0.95; one-sided P = .011)', 'HR 0.70 0.52..0.95 95 p=.011'],
    ['odds ratio 5.4; 95% Cl, 1.8 to 16.4', 'OR 5.4 1.8..16.4 95 -'],
    ['HR = 6, 95%CI of HR = 1.2-34.2', 'HR 6 1.2..34.2 95 -'],
    ['OR 1.89, 95% CI 1.08 to 3.30; p?=?0.03', 'OR 1.89 1.08..3.30 95 p=0.03'],
    ['AOR=2.70; 95% CI 1.27, to 5.76', 'OR 2.70 1.27..5.76 95 -'],
    ['the odds ratio was 11.2, CI between 1.633 and 72.625', 'OR 11.2 1.633..72.625 - -'],
    ['aHR, 95%CI: 1.13, 0.72–1.78', 'HR 1.13 0.72..1.78 95 -'],
    ['RR: 3.4 IC95% [1.01-11.8]', 'RR 3.4 1.01..11.8 95 -'],
    ['odds ratio, OR, 1.11, 95% confidence intervals, 95% CI 0.79 to 1.56', 'OR 1.11 0.79..1.56 95 -'],
    ['(P = 0.01; CI, 1.30-6.66; risk ratio, 2.94)', 'RR 2.94 1.30..6.66 - p=0.01'],
    ['OR 1.80 per decade [95% confidence interval, 1.02-3.18]', 'OR 1.80 1.02..3.18 95 -'],
    ['OR 0.93 per 10 mm Hg increase, 95% CI 0.89-0.98, p = 0.007', 'OR 0.93 0.89..0.98 95 p=0.007'],
    ['The odds ratio of relapse or death was 0.23 (0.07 to 0.72).', 'OR 0.23 0.07..0.72 - -'],
    ['OR 2.94; 1.15, 7.50) in the hills', 'OR 2.94 1.15..7.50 - -'],
    ['a 1.7-fold increased risk (95% CI: 0.84, 3.50)', 'ratio 1.7 0.84..3.50 95 -'],
    ['HR 1.3 (95% credible interval 1.1 to 1.6)', 'HR 1.3 1.1..1.6 95 -'],
    ['OR 1.22 (p=3.2×10−6, 95% CI 1.12–1.33)', 'OR 1.22 1.12..1.33 95 p=3.2e-6'],
  ])('is read from "%s"', async (text, expected) => {
    expect(await resultsIn(text)).toEqual([expected]);
  });
});

describe('lists', () => {
  it('share measure and level', async () => {
    const text = 'Hazard ratios for relapse were 1.2 (95% CI 0.9–1.5), 1.4 (1.1–1.8) and 1.9 (1.4–2.6).';
    expect(await resultsIn(text)).toEqual([
      'HR 1.2 0.9..1.5 95 -', 'HR 1.4 1.1..1.8 95 -', 'HR 1.9 1.4..2.6 95 -',
    ]);
  });

  it('share a p-value where the words say so', async () => {
    const text = 'HR 0.27 (95% CI, 0.17 to 0.41) and HR 0.45 (95% CI, 0.34 to 0.61; P<0.001 for both).';
    expect(await resultsIn(text)).toEqual(['HR 0.27 0.17..0.41 95 p<0.001', 'HR 0.45 0.34..0.61 95 p<0.001']);
  });

  it('may be declared before their numbers', async () => {
    const text = 'Factors (OR (95% CI)) were ferry work (mild: 4.6 (1.1, 18.8); severe: 6.8 (1.98, 23.1)).';
    expect(await resultsIn(text)).toEqual(['OR 4.6 1.1..18.8 95 -', 'OR 6.8 1.98..23.1 95 -']);
  });

  it('of ratios without intervals are read number by number', async () => {
    expect(await resultsIn('with odds ratios of 1.2, 1.4 and 1.9.')).toEqual([
      'OR 1.2 - - -', 'OR 1.4 - - -', 'OR 1.9 - - -',
    ]);
  });
});

describe('what is no ratio', () => {
  it.each([
    ['Median survival was 14.6 months (95% CI 9.9-18.4).', 'median 14.6 9.9..18.4 95 -'],
    ['Response was 49% (95% CI 39-58).', 'proportion 49 39..58 95 -'],
    ['OR 2.1 (95% CI 1.1–4.0); difference -0.44, 95% CI -0.69 to -0.18',
      'difference -0.44 -0.69..-0.18 95 -'],
    ['The AUC was 0.78 (95% CI 0.71–0.84).', 'AUC 0.78 0.71..0.84 95 -'],
  ])('is told apart in "%s"', async (text, expected) => {
    expect((await resultsIn(text)).at(-1)).toBe(expected);
  });

  it.each([
    'Mean heart rate (HR) fell; HR 72 (68–76) beats per minute.',
    'Partial response (PR) was seen; PR 0.30 (0.21–0.40).',
    'Follow-up was 27.4 months (IQR 16.6–38.4).',
    'Tumours were HR-positive in 0.45 (0.40–0.50).',
    'The study ran from 1996 to 2003.',
  ])('is not taken for one in "%s"', async (text) => {
    const { results } = await findingsIn(text);
    expect(results.filter(({ kind }) => kind === 'ratio')).toEqual([]);
  });
});

describe('test statistics and coefficients', () => {
  it.each([
    ['χ²(2) = 5.6, p = 0.06', 'chi-square 5.6 df 2 p=0.06'],
    ['(χ2 = 5.6, df = 2, P=.06)', 'chi-square 5.6 df 2 p=.06'],
    ['t(45) = −2.1, p = 0.04', 't -2.1 df 45 p=0.04'],
    ['F(2, 57) = 3.2, p = 0.05', 'F 3.2 df 2,57 p=0.05'],
    ['z = 2.17; p = 0.03', 'z 2.17 df  p=0.03'],
    ['β = 0.46 (SE 0.21), p = 0.03', 'coefficient 0.46 ±0.21 p=0.03'],
  ])('are read from "%s"', async (text, expected) => {
    const [result] = (await findingsIn(text)).results;
    const p = `p${result?.p?.relation}${result?.p?.printed.plain}`;
    const shown = result?.kind === 'test'
      ? `${result.statistic} ${result.estimate.plain} df ${
        result.degreesOfFreedom.map(({ plain }) => plain).join()} ${p}`
      : result?.kind === 'coefficient'
        ? `coefficient ${result.estimate.plain} ±${result.standardError?.plain} ${p}`
        : 'nothing';
    expect(shown).toBe(expected);
  });
});

describe('counts', () => {
  it.each([
    ['35 of 203 patients (17%)', '35/203 17'],
    ['19 (29%) of 66', '19/66 29'],
    ['45/120 (37.5%)', '45/120 37.5'],
    ['90% [44/49]', '44/49 90'],
    ['Eighty-five patients (64.4%)', '85/- 64.4'],
    ['n = 54; 11%', '54/- 11'],
    ['84.6% (n=369)', '369/- 84.6'],
  ])('are read from "%s"', async (text, expected) => {
    const { counts } = await findingsIn(text);
    const lines = counts.map(({ count, total, percent }) =>
      `${count?.plain ?? '-'}/${total?.plain ?? '-'} ${percent?.plain ?? '-'}`);
    expect(lines).toEqual([expected]);
  });

  it.each(['grade 3 (25%)', 'aged ≥65 (45%)', 'in 2005 (45%)', 'the 2008/2009 season', '120/80 mm Hg'])(
    'are not taken from "%s"',
    async (text) => expect((await findingsIn(text)).counts).toEqual([]),
  );
});

describe('claims', () => {
  const claimsIn = async (text: string) => (await findingsIn(text)).claims.map((claim) => {
    switch (claim.kind) {
      case 'significance': return `${claim.asserted ? '' : 'not '}significant, ${claim.manner}`;
      case 'direction': return claim.direction;
      case 'size': return `factor ${claim.factor.toFixed(2)}`;
      case 'scale': return claim.scale;
      default: return claim.kind;
    }
  });

  it.each([
    ['Tarring was significantly associated with cough (OR 2.1, 95% CI 1.2–3.7).', ['significant, stated']],
    ['Tarring was not significantly associated with cough (OR 1.1, 95% CI 0.7–1.7).',
      ['not significant, stated']],
    ['There was no association with cough (OR 1.1, 95% CI 0.7–1.7).', ['not significant, no association']],
    ['Tarring increased the odds of cough by 59% (OR 1.59, 95% CI 1.05–2.41).',
      ['significant, implied', 'up', 'factor 1.59', 'odds']],
    ['Tarrers were twice as likely to cough (OR 2.0, 95% CI 1.2–3.3).',
      ['significant, implied', 'up', 'factor 2.00', 'risk']],
    ['Survival was longer (HR 0.70, 95% CI 0.52–0.94).', ['significant, implied', 'down']],
    ['The HR was 0.88 (95% CI 0.69–1.12) but was not statistically significant (P = .29).',
      ['not significant, stated']],
  ])('are read from "%s"', async (text, expected) => expect(await claimsIn(text)).toEqual(expected));

  it('hold for all results of a list, up to a turn of the sentence', async () => {
    const text = 'Cough was associated with tar (OR 2.1, 95% CI 1.2–3.7) and dust (OR 1.9, 95% CI 1.1–3.2), '
      + 'but was not significantly associated with salt (OR 1.1, 95% CI 0.7–1.7).';
    const { claims } = await findingsIn(text);
    const significance = claims.flatMap((claim) => (claim.kind === 'significance' ? [claim.asserted] : []));
    expect(significance).toEqual([true, true, false]);
  });
});

describe('whatever is found', () => {
  it('stands in the text as it was printed', async () => {
    const text = 'Adjusted odds ratio 1·59 (95% CI 1·05–2·41), p = 0·03, in 45 of 120 (37·5%).';
    const { results, counts } = await findingsIn(text);
    const numbers = [
      ...results.flatMap(({ estimate, interval, p }) =>
        [estimate, interval?.lower, interval?.upper, p?.printed]),
      ...counts.flatMap(({ count, total, percent }) => [count, total, percent]),
    ];
    expect(numbers).toHaveLength(7);
    for (const number of numbers) {
      if (number !== undefined) expect(quote(text, number.span)).toBe(number.text);
    }
  });

  it('is nothing in a text without results', async () => {
    const { results, claims, counts } = await findingsIn('The ferry left at noon.');
    expect([results, claims, counts]).toEqual([[], [], []]);
  });
});
