import { describe, expect, test } from 'vitest';
import {
  areasInText,
  disagrees,
  interactionOfPrinted,
  prevalenceFor,
  resultsWithin,
  sayings,
  toldOnce,
} from '../src/authoring.ts';
import { type Judgement, quote, type RatioResult } from '../src/model/index.ts';
import { readingOf } from './reading-of.ts';

/* What rules on wording stand on: words in the prose, their sentence, and what they go with. */

describe('sayings', () => {
  test('come with the sentence they stand in, and not with its neighbours', async () => {
    const text = 'Falls were few. The wards were equivalent (p = 0.62 vs. 0.05). Nothing else was seen.';
    const reading = await readingOf(text);
    const [saying, ...others] = sayings(reading, /equivalent/g);
    expect(others).toEqual([]);
    expect(saying?.sentence).toBe('The wards were equivalent (p = 0.62 vs. 0.05).');
    expect(quote(text, saying?.span ?? { start: 0, end: 0 })).toBe('equivalent');
  });

  test('are not looked for among references', async () => {
    const reading = await readingOf(
      'Discussion\n\nPost hoc power was 22%.\n\nReferences\n\n1. Anon. Post hoc power. 2001.\n',
    );
    expect(sayings(reading, /Post hoc power/g)).toHaveLength(1);
  });

  test('give what the groups of the pattern caught', async () => {
    const [saying] = sayings(await readingOf('A sensitivity of 103% was seen.'), /of (\d+)%/g);
    expect(saying?.parts).toEqual(['103']);
  });
});

describe('judgements told once', () => {
  const at = (start: number): Judgement => ({
    verdict: disagrees('it is so'),
    span: { start, end: start + 5 },
    marks: [],
  });

  test('are one, which says how many more there are and quotes them', async () => {
    const reading = await readingOf('alpha bravo delta');
    const [first, ...others] = toldOnce(reading, [at(0), at(6), at(12)]);
    expect(others).toEqual([]);
    expect(first?.verdict).toMatchObject({ because: 'it is so; the same holds in 2 places more' });
    expect(first?.verdict).toMatchObject({ working: ['also: “bravo”; “delta”'] });
  });

  test('stay as they are where one disagrees, or none', async () => {
    const reading = await readingOf('alpha bravo delta');
    const agreeing: Judgement = { verdict: { outcome: 'agrees' }, span: at(6).span, marks: [] };
    expect(toldOnce(reading, [at(0), agreeing])).toEqual([at(0), agreeing]);
    expect(toldOnce(reading, [agreeing])).toEqual([agreeing]);
  });
});

describe('results within a span', () => {
  test('are those that begin and end in it', async () => {
    const text = 'In old mills OR 1.59 (1.05–2.41). In new mills OR 1.20 (0.95–1.52).';
    const reading = await readingOf(text);
    const second = { start: text.indexOf('In new'), end: text.length };
    const within = resultsWithin(reading, second).map(({ estimate }) => estimate?.plain);
    expect(within).toEqual(['1.20']);
    expect(resultsWithin(reading, { start: 0, end: text.length })).toHaveLength(2);
  });
});

describe('areas under the curve in prose', () => {
  test.each([
    ['Discrimination was excellent (AUC 0.71).', '0.71', undefined],
    ['The C statistic was 72.3% in the old mill.', '72.3', undefined],
    ['The area under the ROC curve was 0.54 (95% CI 0.47 to 0.61).', '0.54', '0.47'],
    ['The AUROC of 0·86 was high.', '0.86', undefined],
  ])('are read from "%s"', async (text, value, lower) => {
    const [area, ...others] = areasInText(await readingOf(text));
    expect(others).toEqual([]);
    expect(area?.value.plain).toBe(value);
    expect(quote(text, area?.value.span ?? { start: 0, end: 0 })).toBe(area?.value.text);
    expect(area?.interval?.lower.plain).toBe(lower);
  });

  test('are not those of a drug over time', async () => {
    expect(areasInText(await readingOf('The AUC over 24 h was 412 mg·h/L.'))).toEqual([]);
  });
});

describe('the comparison of two printed ratios', () => {
  // Altman & Bland (2003): ratio of ratios 0.76 (0.49 to 1.17), z = 1.24, p = 0.2.
  test('gives the published ratio of ratios and its p', async () => {
    const { findings } = await readingOf(
      'RR 0.67 (95% CI 0.46 to 0.98) in one and RR 0.88 (95% CI 0.71 to 1.08) in the other group.',
    );
    const [one, other] = findings.results as readonly RatioResult[];
    if (one === undefined || other === undefined) throw new Error('two ratios were to be read');
    const found = interactionOfPrinted(one, other);
    expect(found?.ratio.low).toBeLessThan(0.761364);
    expect(found?.ratio.high).toBeGreaterThan(0.761364);
    expect(found?.p.low).toBeLessThan(0.216549);
    expect(found?.p.high).toBeGreaterThan(0.216549);
  });
});

test('the level of an interval is no share of people with the outcome', async () => {
  const { findings, manuscript } = await readingOf(
    'The risk of death (CI95% 1.2 to 3.4) was read. Smokers were twice as likely to die (OR 2.0).',
  );
  const [claim] = findings.claims;
  if (claim?.of?.kind !== 'ratio') throw new Error('a claim on a ratio was to be heard');
  expect(prevalenceFor(claim, claim.of, { findings, manuscript })).toBeUndefined();
});
