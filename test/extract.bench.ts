import { expect, test } from 'vitest';
import { extract } from '../src/extract/index.ts';
import { lex } from '../src/extract/lex.ts';
import { readText } from '../src/read/index.ts';
import { costOf, tableOf } from './ratios.ts';

/** Invented prose as dense with results as an abstract is. */
const PARAGRAPH = `Of 1,240 crew members, 186 (15.0%) reported cough in the winter of the second survey.
Tarring was associated with cough (adjusted odds ratio 1.59, 95% CI 1.05 to 2.41; p = 0.03), while rowing
was not (OR 1.10, 95% CI 0.72 to 1.68). The ferry towns differ in many ways, and the people who live in
them were asked about their work, their houses and their habits by interviewers who did not know which
of them had worked with tar. The hazard ratio for relapse was 0.72 (0.58–0.90) in the northern towns.

`;

const textOf = (length: number): string => PARAGRAPH.repeat(Math.ceil(length / PARAGRAPH.length)).slice(0, length);

const MEGABYTE = 1_000_000;

test('what extraction costs beside bare passes over the same text', async () => {
  const text = textOf(MEGABYTE);
  const manuscript = readText(text, 'prose');
  const numbers = await costOf(() => [...text.matchAll(/\d+(\.\d+)?/g)].length);
  const words = await costOf(() => [...text.matchAll(/\p{L}+|\d+(?:\.\d+)?|[^\s\p{L}\d]/gu)].length);
  const lexing = await costOf(() => lex(text, { start: 0, end: text.length }));
  const extracting = await costOf(() => extract(manuscript));
  console.log(tableOf('a megabyte of dense prose', [
    ['lexing over a pass for numbers', lexing / numbers],
    ['extracting over a pass for numbers', extracting / numbers],
    ['extracting over a pass for words, numbers and signs', extracting / words],
    ['extracting over lexing', extracting / lexing],
  ]));
  expect(extracting).toBeGreaterThan(0);
});

test('that the cost of a megabyte does not grow with the length', async () => {
  const perMegabyte = async (length: number): Promise<number> => {
    const manuscript = readText(textOf(length), 'prose');
    return (await costOf(() => extract(manuscript), length > MEGABYTE ? 3 : 9)) / length;
  };
  const base = await perMegabyte(MEGABYTE);
  const rows: (readonly [string, number])[] = [];
  for (const length of [10_000, 100_000, 10_000_000]) {
    rows.push([`${length / 1000} kB over 1000 kB, per megabyte`, (await perMegabyte(length)) / base]);
  }
  console.log(tableOf('linearity', rows));
  expect(rows).toHaveLength(3);
});

const HOSTILE: readonly (readonly [string, string])[] = [
  ['digits', '1'], ['opening brackets', '('], ['closing brackets', ') '], ['dashes', '1-'], ['points', '0. '],
  ['p', 'p '], ['labels', '95% CI '], ['results in one sentence', 'OR 1.2 (1.1-1.3), '], ['names', 'odds '],
  ['relations', 'p < '], ['number words', 'twenty-'], ['counts', '1/2 '],
];

test('that hostile repetitions cost no more when doubled than twice', async () => {
  const rows: (readonly [string, number])[] = [];
  for (const [name, part] of HOSTILE) {
    const cost = (length: number): Promise<number> => {
      const manuscript = readText(part.repeat(length / part.length), name);
      return costOf(() => extract(manuscript), 3);
    };
    rows.push([name, (await cost(500_000)) / (await cost(250_000)) / 2]);
  }
  console.log(tableOf('hostile repetitions: 500 kB over twice 250 kB', rows));
  expect(rows).toHaveLength(HOSTILE.length);
});
