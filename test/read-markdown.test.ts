import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { describePlace, type Manuscript, placeOf, quote } from '../src/model/index.ts';
import { ReadError, readManuscript } from '../src/read/index.ts';
import { cellsOf, marksOf, outline } from './made/outline.ts';
import { expectWellFormed } from './read-invariants.ts';

async function read(source: string): Promise<Manuscript> {
  const manuscript = await readManuscript(new TextEncoder().encode(source), 'paper.md');
  expectWellFormed(manuscript);
  return manuscript;
}

describe('Markdown', () => {
  test('becomes blocks with their sections', async () => {
    const manuscript = await read(`---
title: "Tar and cough in ferry towns"
output: html_document
---

## Abstract
**Results:** OR 1.59
(95% CI 1.05–2.41).

Methods
-------
We asked.[^1]
> Of the town,
> all of it.

- One
- Two

\`\`\`{r}
fit <- glm(cough ~ tar)
\`\`\`
<!-- a remark
of two lines -->

# Results
### Winter {#sec-winter}
It was *so*.

***
# References
1. Noss A. Tar.
2. Brann B. Rope.

[^1]: By post.
[site]: https://example.org "x"
`);
    expect(manuscript.format).toBe('markdown');
    expect(outline(manuscript)).toEqual([
      'title | title | Tar and cough in ferry towns',
      'heading | abstract | Abstract', 'heading | abstract | Results:',
      'paragraph | abstract | OR 1.59 (95% CI 1.05–2.41).',
      'heading | methods | Methods', 'paragraph | methods | We asked.1 Of the town, all of it.',
      'paragraph | methods | One', 'paragraph | methods | Two',
      'heading | results | Results', 'heading | results | Winter', 'paragraph | results | It was so.',
      'heading | references | References',
      'references | references | 1. Noss A. Tar.', 'references | references | 2. Brann B. Rope.',
      'note | other | 1 By post.',
    ]);
  });

  test.each([
    ['stars that emphasise nothing', '1.59* and 0.80* of 2 * 3', '1.59* and 0.80* of 2 * 3'],
    ['emphasis', '*P* = **0.03**, __bold__ and _odd_', 'P = 0.03, bold and odd'],
    ['signs that were escaped', '1.59\\* \\<10 a\\_b', '1.59* <10 a_b'],
    ['characters by their names', 'age &ge;65&nbsp;years &#8212; &amp;', 'age ≥65\u00a0years — &'],
    ['formulas', 'at $p < 0.05$ and $\\beta_1 * x_2 = -0.3$, for $5 and $6', 'at p < 0.05 and β1 * x2 = −0.3, for $5 and $6'],
    ['links and code', 'see [the site](http://x.y) or `OR 1.59`', 'see the site or OR 1.59'],
    ['text that was struck out', 'OR ~~1.95~~1.59', 'OR 1.59'],
    ['line breaks', 'one  \ntwo<br>three', 'one\ntwo\nthree'],
    ['a number at a line’s start', 'The crew of\n12. It was cold.', 'The crew of 12. It was cold.'],
  ])('prints %s', async (_, source, printed) => {
    expect((await read(source)).text).toBe(printed);
  });

  test('keeps raised marks off the numbers', async () => {
    const manuscript = await read('0.05^12^ 0.06<sup>a</sup> CO~2~ known [@b; @a] and [@a] noted[^n].');
    expect(manuscript.text).toBe('0.0512 0.06a CO2 known [1,2] and [2] noted1.');
    expect(marksOf(manuscript)).toEqual([
      '0.05^12', '512 0.06^a', '0.06a CO_2', '2 known ^[1,2]', ',2] and ^[2]', '2] noted^1',
    ]);
  });

  test('says in which line words stand', async () => {
    const manuscript = await read('# Results\n\nOne.\n\nTwo\n*odd\nwords*.');
    const start = manuscript.text.indexOf('words');
    expect(describePlace(placeOf(manuscript, { start, end: start + 5 }))).toBe('line 7 (counted)');
  });
});

describe('a table in Markdown', () => {
  const expected = ['h 0,0: Town', 'h 0,1: OR (95% CI)', '1,0: Noss', '1,1: 1.2 (0.8–1.9)', '2,0: A|B'];

  test.each([
    ['with pipes', '| Town | **OR** (95% CI) |\n|:-----|-----:|\n| Noss | 1.2 (0.8–1.9) |\n| A\\|B | |'],
    ['with pipes inside only', 'Town | OR (95% CI)\n--- | ---\nNoss | 1.2 (0.8–1.9)\nA\\|B |'],
    ['as a grid', '+---+---+\n| Town | OR (95% CI) |\n+===+===+\n| Noss | 1.2 (0.8–1.9) |\n+---+---+\n| A\\|B | |\n+---+---+'],
    ['with rules', ' Town   OR (95% CI)\n------  -------------\n Noss   1.2 (0.8–1.9)\n A|B'],
    ['in HTML', '<table><tr><th>Town</th><th>OR (95% CI)</th></tr>\n<tr><td>Noss</td><td>1.2 (0.8–1.9)</td></tr>\n<tr><td>A|B</td></tr></table>'],
  ])('%s becomes a grid', async (_, source) => {
    const manuscript = await read(`Table 2. Odds of cough\n\n${source}\n\n* By age.\n\nText.`);
    const [table] = manuscript.tables;
    expect(cellsOf(manuscript, table)).toEqual(expected);
    expect(table?.label).toBe('Table 2');
    expect(outline(manuscript).at(-1)).toBe('paragraph | other | Text.');
  });

  test('keeps its notes', async () => {
    const { text, tables } = await read('| a | b |\n|---|---|\n| 1 | 2 |\n\n\\* By age.');
    expect(tables[0]?.notes.map((note) => quote(text, note))).toEqual(['* By age.']);
  });

  test.each([
    ['before', 'Table: Odds of cough {#tbl-odds}\n\n| a | b |\n|---|---|\n| x | 2 |'],
    ['behind', '| a | b |\n|---|---|\n| x | 2 |\n\n: Odds of cough'],
  ])('has the caption that is marked as such %s it', async (_, source) => {
    const { text, tables } = await read(source);
    expect(tables[0]?.label).toBe('Table 1');
    expect(quote(text, tables[0]?.caption ?? { start: 0, end: 0 })).toBe('Table 1. Odds of cough');
  });
});

test('a file of blanks is refused with a sentence', async () => {
  await expect(read('<!-- nothing -->\n')).rejects.toBeInstanceOf(ReadError);
});

describe('damaged or hostile Markdown', () => {
  const MANY = 100_000;
  test.each([
    ['quotes in quotes', '> '.repeat(MANY)],
    ['lists in lists', Array.from({ length: 1500 }, (_, i) => `${' '.repeat(2 * i)}- a`).join('\n')],
    ['emphasis half closed', '_a__'.repeat(MANY / 4)],
    ['brackets', '['.repeat(MANY)],
    ['emphasis in emphasis', `${'**a '.repeat(MANY / 4)}${'**'.repeat(MANY / 4)}`],
    ['backquotes', '`a``'.repeat(MANY / 4)],
    ['dollars', '$a '.repeat(MANY / 4)],
    ['pipes', `${'|'.repeat(MANY)}\n|-|\n`],
    ['rules', '-- -- --\n'.repeat(MANY / 10)],
    ['tags', '<sup>'.repeat(MANY / 5)],
    ['fences without end', '```\n'.repeat(MANY / 4)],
    ['comments without end', '<!--\n'.repeat(MANY / 5)],
    ['tables without end', '<table>\n'.repeat(MANY / 8)],
    ['one long word', 'a'.repeat(MANY)],
  ])('of %s is read as far as it goes', async (_, source) => {
    expect((await read(`OR 1.59\n\n${source}`)).text).toContain('OR 1.59');
  });

  test('gives a well-formed manuscript, whatever it is', async () => {
    const pieces = fc.constantFrom(
      '#', '*', '**', '_', '`', '|', '---', '\n', '\n\n', '> ', '- ', '1. ', '[', ']', '(', ')', '[^1]', '[^1]:',
      '$', '<sup>', '</sup>', '<br>', '\\', '^a^', '~', '    ', 'Table 1.', 'Table:', 'OR 1.59', '<table>', '</table>', '\ue000',
    );
    await fc.assert(
      fc.asyncProperty(fc.array(pieces, { maxLength: 40 }), async (parts) => {
        await read(`Begins.\n\n${parts.join('')}`);
      }),
    );
  });
});
