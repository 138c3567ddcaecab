import { check } from '../src/check/index.ts';
import { extract } from '../src/extract/index.ts';
import type { Checked, Judgement, Reading, Rule } from '../src/model/index.ts';
import { readText } from '../src/read/index.ts';

/** A text taken through the whole path up to, not including, the rules. */
export async function readingOf(text: string): Promise<Reading> {
  const manuscript = readText(text, 'pasted text');
  return { manuscript, findings: await extract(manuscript) };
}

/** What the rules say of a reading, as a user would be told. */
export function checkedBy(rules: readonly Rule[], reading: Reading): Checked {
  return check(reading.manuscript, reading.findings, rules);
}

/** The outcome of a rule on a whole text: what it says most loudly, or "nothing". */
export function outcomeOf(judgements: readonly Judgement[]): string {
  const outcomes = judgements.map(({ verdict }) => verdict.outcome);
  return (['disagrees', 'cannot tell', 'agrees'] as const)
    .find((outcome) => outcomes.includes(outcome)) ?? 'nothing';
}
