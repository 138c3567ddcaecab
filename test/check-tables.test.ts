import { describe, expect, it } from 'vitest';
import { examineText } from '../src/index.ts';

/** An invented table, pasted with tabs. */
const table = (rows: readonly (readonly [string, string])[]): string =>
  ['Table 2. Odds of cough', 'Town\tOR (95% CI)', ...rows.map((row) => row.join('\t'))].join('\n');

const flagsOf = async (text: string): Promise<readonly string[]> =>
  (await examineText(text)).checked.flags.map(({ rule, because }) => `${rule}: ${because}`);

describe('what one rule says all over a table', () => {
  it('is said once, with the rows that it holds of', async () => {
    const flags = await flagsOf(table([
      ['Ferry', '1.59 (2.41–1.05)'], ['Port', '1.32 (1.70–1.02)'], ['Mill', '0.72 (0.90–0.58)'],
      ['Quay', '1.88 (2.47–1.44)'], ['Lock', '2.18 (3.05–1.56)'],
    ]));
    expect(flags).toEqual([
      'limits-in-order: the lower limit, 2.41, is above the upper limit, 1.05; '
        + 'the same holds of 4 more in Table 2',
    ]);
  });

  it('is said row by row where it holds of a few', async () => {
    const flags = await flagsOf(table([
      ['Ferry', '1.59 (1.05–2.41)'], ['Port', '1.32 (1.70–1.02)'], ['Mill', '0.72 (0.90–0.58)'],
      ['Quay', '1.88 (1.44–2.47)'], ['Lock', '2.18 (1.56–3.05)'],
    ]));
    expect(flags).toHaveLength(2);
  });
});

describe('a table whose intervals lean', () => {
  // Limits made lopsided on purpose: each upper arm 1.6 times the lower on the log scale.
  const lopsided: readonly (readonly [string, string])[] = [
    ['Ferry', '1.50 (1.20–2.14)'], ['Port', '2.00 (1.60–2.86)'], ['Mill', '0.80 (0.64–1.14)'],
    ['Quay', '1.20 (0.96–1.71)'], ['Lock', '3.00 (2.40–4.29)'],
  ];

  it('was made by another method, which is no finding about a row', async () => {
    expect(await flagsOf(table(lopsided))).toEqual([]);
  });

  it('is asked about where one row leans in a symmetric table', async () => {
    const flags = await flagsOf(table([
      ['Ferry', '1.59 (1.05–2.41)'], ['Port', '1.32 (1.02–1.70)'], ['Mill', '0.72 (0.58–0.98)'],
      ['Quay', '1.88 (1.44–2.47)'], ['Lock', '2.18 (1.56–3.05)'],
    ]));
    expect(flags.map((flag) => flag.split(':')[0])).toEqual(['interval-symmetry']);
  });
});
