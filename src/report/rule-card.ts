import type { Example, Rule } from '../model/index.ts';
import { harmless } from './harmless.ts';
import { inkFor } from './ink.ts';
import { indented, labelledWords, type Screen } from './screen.ts';

/** A rule as `explain` shows it: what it asks, why, on whose word, and when not to believe it. */
export function ruleCard(rule: Rule, screen: Screen): string {
  const { strong } = inkFor(screen.colours);
  const part = (label: string, paragraphs: readonly string[]): readonly string[] =>
    ['', ...labelledWords(screen, label, paragraphs.map(tidy))];
  return written([
    ...indented(screen, rule.question, { indent: 0, ink: strong }),
    ...indented(screen, `${rule.id}, ${kindOf(rule)}`),
    ...part('why', [rule.why]),
    ...part('source', [rule.source]),
    ...part('innocent', rule.innocent),
    '',
    ...indented(screen, 'Examples', { indent: 0, ink: strong }),
    ...rule.examples.flatMap((example) => ['', ...exampleLines(example, screen)]),
  ]);
}

/** The rules, each by its name and its question. */
export function ruleList(rules: readonly Rule[], screen: Screen): string {
  const { strong } = inkFor(screen.colours);
  return written([
    ...rules.flatMap((rule) => [
      ...indented(screen, rule.id, { indent: 0, ink: strong }),
      ...indented(screen, tidy(rule.question)),
    ]),
    '',
    ...indented(screen, 'For one of them: tallystick explain RULE', { indent: 0 }),
  ]);
}

function kindOf({ grade, reads }: Rule): string {
  const about = reads === 'manuscript' ? 'looks at the whole manuscript' : `looks at each ${reads}`;
  return `${about}, flags a ${grade}`;
}

function exampleLines({ text, outcome, note }: Example, screen: Screen): readonly string[] {
  const quotes = screen.unicode ? ['“', '”'] : ['"', '"'];
  return [
    ...indented(screen, `${quotes[0]}${tidy(text)}${quotes[1]}`),
    ...indented(screen, `${outcome}: ${tidy(note)}`, { indent: 6 }),
  ];
}

/** The words of a card are written over several lines of source: they are shown as one. */
function tidy(words: string): string {
  return harmless(words).trim();
}

function written(lines: readonly string[]): string {
  return lines.map((line) => `${line}\n`).join('');
}
