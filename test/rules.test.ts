import { readdirSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { rules } from '../rules/index.ts';
import type { Flag, Rule } from '../src/model/index.ts';
import { checkedBy, outcomeOf, readingOf } from './reading-of.ts';
import { cardsInMarkdown } from './rule-cards.ts';

/* Holds the rules to their cards: the examples are the tests, and the documentation. */

const FOLDER = resolve(import.meta.dirname, '../rules');

/** Words that speak of a fault, or of people, where a rule may only speak of numbers. */
const ACCUSING = new RegExp(
  '\\b(misconduct|suspicious|suspect\\w*|fraud\\w*|fabricat\\w*|falsif\\w*|manipulat\\w*'
    + '|wrong\\w*|incorrect\\w*|mistake\\w*|(?<!standard )errors?|erroneous|careless\\w*'
    + '|sloppy|blunder\\w*|dishonest\\w*|fault\\w*|to blame|invalid|impossible)\\b',
  'i',
);

test('the list holds every rule in the folder, and each is called as its file', () => {
  const files = readdirSync(FOLDER)
    .filter((name) => name.endsWith('.ts') && name !== 'index.ts')
    .map((name) => name.replace(/\.ts$/, ''));
  expect(rules.map(({ id }) => id).sort()).toEqual(files.sort());
});

test('the page of all cards is the one that was last accepted', async () => {
  await expect(cardsInMarkdown(rules)).toMatchFileSnapshot(resolve(FOLDER, 'README.md'));
});

describe.each(rules.map((rule) => ({ id: rule.id, rule })))('$id', ({ rule }) => {
  test('has a whole card', () => {
    expect(rule.question).toMatch(/^[A-Z].*\?$/);
    expect(rule.why.length).toBeGreaterThan(80);
    expect(rule.source).toMatch(/\b(19|20)\d\d\b/);
    expect(rule.innocent.length).toBeGreaterThanOrEqual(3);
    expect(rule.examples.length).toBeGreaterThanOrEqual(4);
    const outcomes = new Set(rule.examples.map(({ outcome }) => outcome));
    expect(outcomes).toContain('agrees');
    expect(outcomes).toContain('disagrees');
  });

  test.each(rule.examples)('says "$outcome" of: $text', async ({ text, outcome }) => {
    const reading = await readingOf(text);
    expect(outcomeOf(rule.judgements(reading))).toBe(outcome);
    expect(checkedBy([rule], reading).flags).toHaveLength(outcome === 'disagrees' ? 1 : 0);
  });

  test('speaks of numbers, and accuses nobody', async () => {
    for (const text of [rule.question, rule.why, ...rule.innocent, ...await spokenBy(rule)]) {
      expect(text).not.toMatch(ACCUSING);
    }
  });

  test('writes comments to the authors that quote the words and are whole sentences', async () => {
    for (const { comment } of await flagsOfExamples(rule)) {
      expect(comment).toMatch(/“.+”/);
      expect(comment).toMatch(/[.?]$/);
      expect(comment).not.toMatch(/undefined|NaN|\s{2}|null/);
    }
  });
});

async function flagsOfExamples(rule: Rule): Promise<readonly Flag[]> {
  const readings = await Promise.all(rule.examples.map(({ text }) => readingOf(text)));
  const flags = readings.flatMap((reading) => checkedBy([rule], reading).flags);
  expect(flags.length).toBeGreaterThan(0);
  return flags;
}

/** Everything that a rule says to a reader on its examples. */
async function spokenBy(rule: Rule): Promise<readonly string[]> {
  const readings = await Promise.all(rule.examples.map(({ text }) => readingOf(text)));
  const checked = readings.map((reading) => checkedBy([rule], reading));
  return checked.flatMap(({ flags, unjudged }) => [
    ...unjudged.map(({ because }) => because),
    ...flags.flatMap(({ because, working, innocent, comment }) =>
      [because, ...working, ...innocent, comment]),
  ]);
}
