import { describe, expect, it } from 'vitest';
import { linesOf, ratiosOf, resultsInJats, resultsInText, row } from './jats-table.ts';

/*
 * Layouts of tables that mislead. All of them occur in print; the towns, the trades
 * and the numbers are invented.
 */

const HEAD = row('th', 'Trade | Adjusted OR (95% CI) | P');

describe('where an interval stands', () => {
  it('in the cell of its estimate, with the p-value beside', async () => {
    const results = await resultsInJats({
      head: HEAD,
      body: row('Weavers | 1.45 (1.15–1.83) | 0.002') + row('Ferrymen | 1.12 (0.94–1.34) | 0.21'),
    });
    expect(ratiosOf(results)).toEqual([
      'Weavers: OR 1.45, 1.15 to 1.83 at 95%, p = 0.002, adjusted',
      'Ferrymen: OR 1.12, 0.94 to 1.34 at 95%, p = 0.21, adjusted',
    ]);
    expect(results[0]?.cell).toMatchObject({
      column: 'Adjusted OR (95% CI)',
      table: { label: 'Table 1' },
    });
  });

  it('in a column of its own, with stars behind it', async () => {
    const results = await resultsInJats({
      head: row('th', 'Trade | HR | 95% CI'),
      body: row('Weavers | 1.90 | (1.28,2.81) ***') + row('Ferrymen | 0.72 | (0.58,0.89) ***'),
    });
    expect(ratiosOf(results)).toEqual([
      'Weavers: HR 1.90, 1.28 to 2.81 at 95%',
      'Ferrymen: HR 0.72, 0.58 to 0.89 at 95%',
    ]);
  });

  it('in the row below', async () => {
    const results = await resultsInJats({
      head: row('th', 'Quantity | Month 6 | Month 12'),
      body: row('HR | 0.62 | 0.72') + row('90% RCI | 0.50, 0.77 | 0.60, 0.86'),
    });
    expect(ratiosOf(results)).toEqual([
      'HR: HR 0.62, 0.50 to 0.77 at 90%',
      'HR: HR 0.72, 0.60 to 0.86 at 90%',
    ]);
  });

  it('in two columns of single limits', async () => {
    const results = await resultsInText(
      'Odds ratios for cough',
      'Trade | OR | Lower 95% CI | Upper 95% CI',
      'Weavers | 1.45 | 1.15 | 1.83',
    );
    expect(ratiosOf(results)).toEqual(['Weavers: OR 1.45, 1.15 to 1.83 at 95%']);
  });

  it('beside a percentage, to which it belongs', async () => {
    const results = await resultsInJats({
      head: row('th', 'Trade | n (%) | 95% CI'),
      body: row('Weavers | 17 (28.3) | 17.5–41.4') + row('Ferrymen | 12 (20.0) | 10.8–32.3'),
    });
    expect(ratiosOf(results)).toEqual([]);
  });

  it('with an end that is none, or was not reached', async () => {
    const results = await resultsInJats({
      head: row('th', 'Trade | OR (95% CI)'),
      body: row('Weavers | 2.71E8 (0.00-∞)') + row('Ferrymen | 11.4 (7.9–NE)'),
    });
    expect(ratiosOf(results)).toEqual(['Weavers: OR 2.71e8, 0.00 to ∞ at 95%']);
  });

  it('without its closing bracket, or with leading dots', async () => {
    const results = await resultsInJats({
      head: row('th', 'Trade | RR (95% CI)'),
      body: row('Weavers | 1.45 (1.15–1.83') + row('Ferrymen | .72 (.58–.89)'),
    });
    expect(ratiosOf(results)).toEqual([
      'Weavers: RR 1.45, 1.15 to 1.83 at 95%',
      'Ferrymen: RR .72, .58 to .89 at 95%',
    ]);
  });

  it('with stars or a letter behind it', async () => {
    const results = await resultsInJats({
      head: row('th', 'Trade | OR (95% CI)'),
      body:
        row('Weavers | 4.20 (3.41–5.17) ***')
        + row('Ferrymen | 0.41 (0.24–0.71)a')
        + '<tr><td>Clerks</td><td>0.72<sup>a</sup> (0.58–0.89)</td></tr>',
    });
    expect(ratiosOf(results)).toEqual([
      'Weavers: OR 4.20, 3.41 to 5.17 at 95%',
      'Ferrymen: OR 0.41, 0.24 to 0.71 at 95%',
      'Clerks: OR 0.72, 0.58 to 0.89 at 95%',
    ]);
  });

  it('with a hyphen for separator beside a minus', async () => {
    const results = await resultsInJats({
      head: row('th', 'Flock | Mean difference (95% CI)'),
      body: row('Hill | −0.1 (−0.5; 0.3)') + row('Valley | 0.2 (−0.1-0.5)'),
    });
    expect(linesOf(results)).toEqual([
      'Hill: MD -0.1, -0.5 to 0.3 at 95%',
      'Valley: MD 0.2, -0.1 to 0.5 at 95%',
    ]);
  });

  it('with limits in descending order, which are read as they stand', async () => {
    const results = await resultsInJats({
      head: row('th', 'Trade | OR (95% CI)'),
      body: row('Weavers | 1.45 (1.83–1.15)') + row('Ferrymen | 1.12 (0.94–1.34)'),
    });
    expect(ratiosOf(results)[0]).toBe('Weavers: OR 1.45, 1.83 to 1.15 at 95%');
  });
});

describe('where the measure is named', () => {
  it('in the caption alone', async () => {
    const results = await resultsInJats({
      caption: 'Hazard ratios for relapse',
      head: row('th', 'Dose | Estimate (95% CI)'),
      body: row('Low | 0.93 (0.80–1.09)') + row('High | 0.62 (0.48–0.80)'),
    });
    expect(ratiosOf(results)).toEqual([
      'Low: HR 0.93, 0.80 to 1.09 at 95%',
      'High: HR 0.62, 0.48 to 0.80 at 95%',
    ]);
    expect(results[0]?.inferred).toContain('measure');
  });

  it('in a heading inside the body, which changes those above it', async () => {
    const results = await resultsInJats({
      head: row('th', 'Factor | OR (95% CI)'),
      body:
        row('Tar | 1.90 (1.28–2.81)')
        + row('Factor | HR (95% CI)')
        + row('Salt | 0.72 (0.58–0.89)'),
    });
    expect(ratiosOf(results)).toEqual([
      'Tar: OR 1.90, 1.28 to 2.81 at 95%',
      'Salt: HR 0.72, 0.58 to 0.89 at 95%',
    ]);
  });

  it('over two levels of headings, with two measures side by side', async () => {
    const results = await resultsInJats({
      head:
        '<tr><th rowspan="2">Factor</th><th colspan="2">Crude</th><th colspan="2">Adjusted</th></tr>'
        + row('th', 'OR | 95% CI | OR | 95% CI'),
      body: row('Tar | 2.20 | 1.52–3.19 | 1.66 | 1.19–2.32'),
    });
    expect(ratiosOf(results)).toEqual([
      'Tar: OR 2.20, 1.52 to 3.19 at 95%, crude',
      'Tar: OR 1.66, 1.19 to 2.32 at 95%, adjusted',
    ]);
    expect(results.map(({ cell }) => cell?.column)).toEqual(['Crude OR', 'Adjusted OR']);
  });

  it('by the row, where the rows are quantities', async () => {
    const results = await resultsInJats({
      head: row('th', 'Outcome | Relapse | Death'),
      body:
        row('Hazard ratio (95% CI) | 0.72 (0.58–0.89) | 0.62 (0.48–0.80)')
        + row('Median months (IQR) | 27.4 (16.6–38.4) | 30.1 (19.0–41.2)'),
    });
    expect(ratiosOf(results)).toEqual([
      'Hazard ratio (95% CI): HR 0.72, 0.58 to 0.89 at 95%',
      'Hazard ratio (95% CI): HR 0.62, 0.48 to 0.80 at 95%',
    ]);
  });

  it('nowhere with a level, which then stays unsaid', async () => {
    const [result] = await resultsInJats({
      head: row('th', 'Trade | Odds ratio'),
      body: row('Weavers | 1.45 (1.15–1.83)'),
    });
    expect(result?.interval).not.toHaveProperty('level');
  });

  it('with a level from the notes, said to be inherited', async () => {
    const [result] = await resultsInJats({
      head: row('th', 'Trade | Odds ratio (CI)'),
      body: row('Weavers | 1.59 (0.93–2.73)'),
      notes: 'CI: 99% confidence interval.',
    });
    expect(result?.interval?.level).toBe(99);
    expect(result?.inferred).toContain('level');
  });
});

describe('p-values', () => {
  it('have marks behind them, decimal commas, or the sign twice', async () => {
    const results = await resultsInJats({
      head: HEAD,
      body:
        row('Weavers | 2.30 (1.75–3.03) | &lt;0.001a')
        + row('Ferrymen | 1.12 (0.94–1.34) | 0,208')
        + row('Clerks | 0.34 (0.21–0.54) | p=‹0·0001'),
    });
    expect(results.map(({ p }) => `${p?.relation} ${p?.printed.plain}`)).toEqual([
      '< 0.001',
      '= 0.208',
      '< 0.0001',
    ]);
  });

  it('that span the levels of a factor test the factor', async () => {
    const results = await resultsInJats({
      head: HEAD,
      body:
        '<tr><td>Low</td><td>1.12 (0.94–1.34)</td><td rowspan="2">0.01</td></tr>'
        + '<tr><td>High</td><td>1.45 (1.15–1.83)</td></tr>',
    });
    expect(results.map(({ p }) => p?.tests)).toEqual(['factor', 'factor']);
  });

  it('for trend are not those of the results', async () => {
    const results = await resultsInJats({
      head: row('th', 'Dose | OR (95% CI) | P for trend'),
      body: row('Low | 1.12 (0.94–1.34) | 0.01') + row('High | 1.45 (1.15–1.83) | '),
    });
    expect(results.map(({ p }) => p)).toEqual([undefined, undefined]);
  });

  it('on the reference row or on the group row are not those of one level', async () => {
    const results = await resultsInJats({
      head: HEAD,
      body:
        row('Rent |  | 0.01')
        + row('Low | 1.00 | ')
        + row('High | 1.45 (1.15–1.83) | ')
        + row('Deck | 1.00 | 0.21')
        + row('Hold | 1.12 (0.94–1.34) | '),
    });
    expect(results.map(({ p }) => p?.tests === 'result')).toEqual([false, false]);
  });

  it('stand in a row below, where that row is theirs', async () => {
    const results = await resultsInJats({
      head: row('th', 'Quantity | Month 6 | Month 12'),
      body:
        row('Hazard ratio (95% CI) | 0.62 (0.48–0.80) | 0.72 (0.58–0.89)')
        + row('P value | &lt;0.001 | 0.003'),
    });
    expect(ratiosOf(results)).toEqual([
      'Hazard ratio (95% CI): HR 0.62, 0.48 to 0.80 at 95%, p < 0.001',
      'Hazard ratio (95% CI): HR 0.72, 0.58 to 0.89 at 95%, p = 0.003',
    ]);
  });

  it('of which two stand in one cell are left alone where only one is asked for', async () => {
    const [result] = await resultsInJats({
      head: HEAD,
      body: row('Weavers | 1.45 (1.15–1.83) | 0·15; 0·0062†'),
    });
    expect(result?.p).toBeUndefined();
  });

  it('stand in the cell of their estimate, with a letter between', async () => {
    const results = await resultsInJats({
      head: row('th', 'Trade | HR (95% CI)'),
      body: row('Weavers | 0·81 (0·30–2·19) P m = 0·68†'),
    });
    expect(ratiosOf(results)).toEqual(['Weavers: HR 0.81, 0.30 to 2.19 at 95%, p = 0.68']);
  });

  it('stand in the cell of their estimate', async () => {
    const [result] = await resultsInJats({
      head: row('th', 'Trade | HR (95% CI), p'),
      body: row('Weavers | 0·81 (0·30–2·19) P = 0·68'),
    });
    expect(linesOf(result === undefined ? [] : [result])).toEqual([
      'Weavers: HR 0.81, 0.30 to 2.19 at 95%, p = 0.68',
    ]);
  });
});

describe('several results', () => {
  it('in one cell are told apart by the names in its heading', async () => {
    const results = await resultsInJats({
      head: row('th', 'Trade | Risk ratio (95% CI); NNT (95% CI)'),
      body: row('Weavers | 0.8 (0.6–1.0); 31 (15–190)'),
    });
    expect(linesOf(results)).toEqual([
      'Weavers: RR 0.8, 0.6 to 1.0 at 95%',
      'Weavers: amount 31, 15 to 190 at 95%',
    ]);
  });

  it('in one cell follow each other, the reference first', async () => {
    const results = await resultsInJats({
      caption: 'Odds ratios (95% CI) by third of rent, lowest to highest',
      head: row('th', 'Outcome | Thirds'),
      body: row('Cough | 1 0.88 (0.60–1.29) 0.95 (0.61–1.48)'),
    });
    expect(ratiosOf(results)).toEqual([
      'Cough: OR 0.88, 0.60 to 1.29 at 95%',
      'Cough: OR 0.95, 0.61 to 1.48 at 95%',
    ]);
  });

  it('in one row stand under their own columns', async () => {
    const results = await resultsInJats({
      caption: 'Odds ratios (95% CI) by fifth of rent',
      head: row('th', 'Outcome | Lowest | Second | Third'),
      body: row('Cough | 1 | 0.88 (0.60–1.29) | 0.95 (0.61–1.48)'),
    });
    expect(ratiosOf(results)).toEqual([
      'Cough: OR 0.88, 0.60 to 1.29 at 95%',
      'Cough: OR 0.95, 0.61 to 1.48 at 95%',
    ]);
    expect(results.map(({ cell }) => cell?.column)).toEqual(['Second', 'Third']);
  });
});

describe('rows', () => {
  it('stand in the group whose label has a row to itself', async () => {
    const results = await resultsInJats({
      head: row('th', 'Factor | OR (95% CI)'),
      body:
        row('Living status | ')
        + row('With parents | 1.12 (0.94–1.34)')
        + row('Alone | 1.45 (1.15–1.83)'),
    });
    expect(results.map(({ cell }) => cell?.row)).toEqual([
      'Living status / With parents',
      'Living status / Alone',
    ]);
  });

  it('keep their labels where one spans several of them', async () => {
    const results = await resultsInJats({
      head: row('th', 'Factor | Level | OR (95% CI)'),
      body:
        '<tr><td rowspan="2">Rent</td><td>Middling</td><td>1.12 (0.94–1.34)</td></tr>'
        + '<tr><td>High</td><td>1.45 (1.15–1.83)</td></tr>',
    });
    expect(results.map(({ cell }) => cell?.row)).toEqual(['Rent / Middling', 'Rent / High']);
  });
});

describe('what is no ratio', () => {
  it.each([
    ['a reference category', row('Clerks | 1.00 | ')],
    ['a reference category with an empty interval', row('Clerks | 1.00 (—) | ')],
    ['a reference category by its word', row('Clerks | Ref | ')],
    ['a blank cell', row('Clerks |  | ')],
    ['a dash for what is not in the model', row('Clerks | – | 0.04')],
    ['the intercept of the model', row('Constant | 0.03 (0.01–0.09) | 0.001')],
    ['the fit of the model', row('Nagelkerke R2 | 0.21 | ')],
    ['the test of its fit', row('Hosmer–Lemeshow χ2 | 7.12 | 0.52')],
  ])('is %s', async (_, body) => {
    const results = await resultsInJats({
      head: HEAD,
      body: row('Weavers | 1.45 (1.15–1.83) | 0.002') + body,
    });
    expect(ratiosOf(results)).toEqual([
      'Weavers: OR 1.45, 1.15 to 1.83 at 95%, p = 0.002, adjusted',
    ]);
  });

  it.each([
    ['medians with their quartiles', 'Median age (IQR)', '35.2 (28.1–44.0)'],
    ['medians with their range', 'Median months (range)', '14.2 (1.0–60.3)'],
    ['means with their spread', 'Mean (SD)', '16.0 (6.6)'],
    ['counts with percentages', 'n (%)', '45 (37.5)'],
    ['counts of totals', 'n/N', '45/120'],
    ['events per person-years', 'Deaths/person-years', '241/48120.35'],
    ['geometric means with intervals', 'GMT (95% CI)', '35.2 (28.1–44.0)'],
  ])('is a column of %s beside ratios', async (_, heading, cell) => {
    const results = await resultsInJats({
      head: row('th', `Trade | ${heading} | OR (95% CI)`),
      body: row(`Weavers | ${cell} | 1.45 (1.15–1.83)`) + row(`Clerks | ${cell} | 1`),
    });
    expect(ratiosOf(results)).toEqual(['Weavers: OR 1.45, 1.15 to 1.83 at 95%']);
  });

  it('is a spread, and no interval of any kind is made of it', async () => {
    const results = await resultsInText(
      'Time to relapse',
      'Group | Median months (IQR) | HR (95% CI)',
      'Brevane | 27.4 (16.6–38.4) | 0.72 (0.58–0.89)',
      'Placebo | 19.2 (11.0–27.9) | 1',
    );
    expect(linesOf(results)).toEqual(['Brevane: HR 0.72, 0.58 to 0.89 at 95%']);
  });

  it('is an age group in the column of labels', async () => {
    const results = await resultsInText(
      'Falls',
      'Age | OR (95% CI)',
      '[8–14] | 1.00',
      '30 (25–44) | 1.12 (0.94–1.34)',
    );
    expect(ratiosOf(results)).toEqual(['30 (25–44): OR 1.12, 0.94 to 1.34 at 95%']);
  });

  it('is a mean difference that a note tells of, under the heading of a ratio', async () => {
    const results = await resultsInJats({
      head: row('th', 'Outcome | Odds ratio (95% CI)'),
      body:
        row('Cough | 1.45 (1.15 to 1.83)')
        + '<tr><td>Weight</td><td>0.22 (0.09 to 0.35)<sup>b</sup></td></tr>',
      notes: '<sup>b</sup>Mean difference.',
    });
    expect(ratiosOf(results)).toEqual(['Cough: OR 1.45, 1.15 to 1.83 at 95%']);
  });
});

describe('an estimate of 1', () => {
  it('is one where it has an interval', async () => {
    const results = await resultsInJats({
      head: row('th', 'Trade | OR (95% CI)'),
      body: row('Weavers | 1.00 (0.84–1.19)') + row('Clerks | 1.00'),
    });
    expect(ratiosOf(results)).toEqual(['Weavers: OR 1.00, 0.84 to 1.19 at 95%']);
  });
});
