import { readdirSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { rules } from '../rules/index.ts';
import {
  contains,
  type Flag,
  type Placed,
  quote,
  type Range,
  type Reading,
  type Rule,
  type Span,
} from '../src/model/index.ts';
import { unrounded } from '../src/stats/rounding.ts';
import { type Case, type Expectation, type Found, parseCases } from './case-file.ts';
import { failureOfFinding, foundBy, inWords, placesOf, unlisted } from './case-findings.ts';
import { draw, type Drawn, drawnJudgement } from './drawing.ts';
import { checkedBy, readingOf } from './reading-of.ts';

/*
 * Runs the cases in fixtures/cases through the whole path, text in, flags out.
 * Beside each file lies what the machine draws from it, to be read in diffs.
 */

const FOLDER = resolve(import.meta.dirname, '../fixtures/cases');
const files = readdirSync(FOLDER)
  .filter((name) => name.endsWith('.md') && name !== 'README.md')
  .sort();

test('there are cases for every rule', () => {
  const cases = files.flatMap((file) => parseCases(readFileSync(join(FOLDER, file), 'utf8')));
  const asked = new Set(cases.flatMap(({ expectations }) => expectations.map(({ rule }) => rule)));
  expect([...asked].sort()).toEqual(rules.map(({ id }) => id).sort());
});

test('every drawing belongs to a case file', () => {
  const drawings = readdirSync(FOLDER)
    .filter((name) => name.endsWith('.seen.txt'))
    .sort();
  expect(drawings).toEqual(files.map((file) => file.replace(/\.md$/, '.seen.txt')));
});

describe.each(files)('%s', (file) => {
  const cases = parseCases(readFileSync(join(FOLDER, file), 'utf8'));

  const senses = new Set(cases.flatMap(({ found }) => found.map(({ sense }) => sense)));

  test.each(cases)('$heading', async ({ text, expectations, found }) => {
    const reading = await readingOf(text);
    const { flags } = checkedBy(rules, reading);
    const failures = [
      ...expectations.flatMap((expectation) => failureOf(expectation, reading, flags)),
      ...found.flatMap((one) => failureOfFinding(one, reading)),
      ...unlisted(found, senses, reading),
      ...flags
        .filter((flag) => !expectations.some((one) => expects(one, flag, reading)))
        .map((flag) => `not listed: ${flag.rule} flags "${quote(text, flag.span)}"`),
    ];
    expect(failures).toEqual([]);
  });

  test('is drawn as it was last accepted', async () => {
    const drawings = await Promise.all(cases.map(drawingOf));
    await expect(`${drawings.join('\n\n')}\n`).toMatchFileSnapshot(
      join(FOLDER, file.replace(/\.md$/, '.seen.txt')),
    );
  });
});

describe('a case file', () => {
  const good = '## A heading\nInvented.\n\n> A text\n\n- limits-in-order accepts "text"';

  test('gives heading, note, text, and what each rule should do', () => {
    expect(parseCases(good)).toEqual([
      {
        heading: 'A heading',
        note: 'Invented.',
        text: 'A text',
        expectations: [{ rule: 'limits-in-order', verb: 'accepts', words: 'text' }],
        found: [],
      },
    ]);
  });

  test('gives what is to be read, counted and heard', () => {
    const lines = [
      '- reads "1.59 (1.05–2.41), p = 0.03" as OR 1.59, 1.05 to 2.41 at 95%, p = 0.03, adjusted',
      '- reads nothing in "text"',
      '- reads "1.59" as HR 1.59, outcome "cough, of any kind"',
      '- counts "19 (29%) of 66" as 19 of 66, 29%',
      '- hears of "1.59" that it is not significant, up, 1.59 times, in odds',
    ];
    const [{ found = [] } = {}] = parseCases(`${good}\n${lines.join('\n')}`);
    expect(found.map(({ as }) => as)).toEqual([
      ['OR 1.59', '1.05 to 2.41 at 95%', 'p = 0.03', 'adjusted'],
      [],
      ['HR 1.59', 'outcome "cough, of any kind"'],
      ['19 of 66', '29%'],
      ['not significant', 'up', '1.59 times', 'in odds'],
    ]);
  });

  test.each([
    ['without a case', 'Only prose.'],
    ['with a case without text', '## A heading\nInvented.\n\n- limits-in-order accepts "text"'],
    ['with a case that expects nothing', '## A heading\nInvented.\n\n> A text'],
    ['with a case without a note', '## A heading\n> A text\n- limits-in-order accepts "text"'],
    ['with a verb that does not exist', good.replace('accepts', 'likes')],
    ['with a number that is none', `${good}, expecting much`],
    ['with prose after the text', `${good}\nMore prose.`],
    ['with a reading that is none', `${good}\n- reads "text" as something, from 1 until 2`],
    ['with a reading of nothing at all', `${good}\n- reads "text"`],
    ['with a count that is none', `${good}\n- counts "text" as many`],
    ['with a hearing that is none', `${good}\n- hears of "text" that it is grand`],
    ['with the same heading twice', `${good}\n\n${good}`],
  ])('%s is refused', (_, source) => {
    expect(() => parseCases(source)).toThrow();
  });

  test('fails where a rule accepts but nothing was read', async () => {
    const reading = await readingOf('Nothing is reported here.');
    const expectation = { rule: 'limits-in-order', verb: 'accepts', words: 'reported' } as const;
    expect(failureOf(expectation, reading, [])).toHaveLength(1);
    expect(failureOf({ ...expectation, verb: 'is silent on' }, reading, [])).toHaveLength(1);
  });

  test('fails where something else is read than it says, or something that it does not list', async () => {
    const reading = await readingOf('The odds ratio was 1.59 (95% CI 1.05 to 2.41).');
    const line = { sense: 'reads', words: '1.59 (95% CI 1.05 to 2.41)' } as const;
    const good: Found = { ...line, as: ['OR 1.59', '1.05 to 2.41 at 95%'] };
    expect(failureOfFinding(good, reading)).toEqual([]);
    expect(
      failureOfFinding({ ...line, as: ['HR 1.59', '1.05 to 2.41 at 95%'] }, reading),
    ).toHaveLength(1);
    expect(failureOfFinding({ ...line, as: ['OR 1.59'] }, reading)).toHaveLength(1);
    expect(failureOfFinding({ ...line, as: [] }, reading)).toHaveLength(1);
    expect(
      failureOfFinding({ ...line, as: [...good.as, 'outcome "cough"'] }, reading),
    ).toHaveLength(1);
    expect(unlisted([good], new Set(['reads']), reading)).toEqual([]);
    expect(unlisted([], new Set(['reads']), reading)).toHaveLength(1);
  });

  test('fails where its words do not stand in the text, or stand there twice', async () => {
    const reading = await readingOf('One and one is two.');
    const expectation = { rule: 'limits-in-order', verb: 'flags' } as const;
    expect(failureOf({ ...expectation, words: 'three' }, reading, [])[0]).toMatch(/0 times/);
    expect(failureOf({ ...expectation, words: 'ne' }, reading, [])[0]).toMatch(/2 times/);
  });
});

/** What is amiss with one expectation: nothing, or one sentence. */
function failureOf(
  expectation: Expectation,
  reading: Reading,
  flags: readonly Flag[],
): readonly string[] {
  const { rule: id, verb, words } = expectation;
  const rule = rules.find((candidate) => candidate.id === id);
  if (rule === undefined) return [`there is no rule ${id}`];
  const places = placesOf(words, reading.manuscript.text);
  const [place] = places;
  if (place === undefined || places.length > 1) {
    return [`"${words}" stands ${places.length} times in the text`];
  }
  if (verb === 'flags') {
    return flags.some((flag) => expects(expectation, flag, reading))
      ? []
      : [
          `${id} does not flag "${words}"${wanted(expectation)}; `
            + `it says ${said(rule, reading, place)}`,
        ];
  }
  const outcome = said(rule, reading, place);
  return outcome === OUTCOMES[verb]
    ? []
    : [`${id} was to say "${OUTCOMES[verb]}" on "${words}"; ` + `it says ${outcome}`];
}

const OUTCOMES = {
  accepts: 'agrees',
  'cannot judge': 'cannot tell',
  'is silent on': 'nothing about something that was read',
} as const;

/** What a rule says of the words at `place`, with "nothing" told apart from "nothing read". */
function said(rule: Rule, reading: Reading, place: Span): string {
  const outcomes = rule
    .judgements(reading)
    .filter(isAbout(place))
    .map(({ verdict }) => verdict.outcome);
  if (outcomes.length > 0) return [...new Set(outcomes)].join(' and ');
  const read = [...reading.findings.results, ...reading.findings.counts];
  return read.some(isAbout(place)) ? OUTCOMES['is silent on'] : 'nothing was read';
}

function expects(
  { rule, verb, words, expecting }: Expectation,
  flag: Flag,
  { manuscript }: Reading,
): boolean {
  const place = placesOf(words, manuscript.text)[0];
  return (
    verb === 'flags'
    && rule === flag.rule
    && place !== undefined
    && isAbout(place)(flag)
    && (expecting === undefined || holds(flag.recomputed?.range, expecting))
  );
}

/** Whether a range holds a number that rounds to the one worked out by hand. */
function holds(range: Range | undefined, expecting: string): boolean {
  const decimals = expecting.split('.')[1]?.length ?? 0;
  const { low, high } = unrounded({ value: Number(expecting), decimals });
  return range !== undefined && range.low <= high && low <= range.high;
}

/** Whether something stands at the quoted words: within them, or around them. */
function isAbout(place: Span): (placed: Placed) => boolean {
  return ({ span }) => contains(span, place) || contains(place, span);
}

function wanted({ expecting }: Expectation): string {
  return expecting === undefined ? '' : ` with ${expecting}`;
}

/** A case with what was found for it, and what its rules or whichever raises a flag say. */
async function drawingOf({ heading, text, expectations, found }: Case): Promise<string> {
  const reading = await readingOf(text);
  const asked = new Set(expectations.map(({ rule }) => rule));
  const senses = new Set(found.map(({ sense }) => sense));
  const drawn = [
    ...[...senses].flatMap((sense) =>
      foundBy(sense, reading)
        .filter(({ parts }) => parts.length > 0)
        .map((one): Drawn => ({ span: one.span, words: `${sense} ${inWords(one)}` })),
    ),
    ...rules.flatMap((rule) =>
      rule
        .judgements(reading)
        .filter(({ verdict }) => asked.has(rule.id) || verdict.outcome === 'disagrees')
        .map((judgement) => drawnJudgement(rule, judgement)),
    ),
  ];
  return `## ${heading}\n\n${draw(reading.manuscript.text, drawn.sort(byPlace))}`;
}

function byPlace({ span: one }: Drawn, { span: other }: Drawn): number {
  return one.start - other.start;
}
