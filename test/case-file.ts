/*
 * Reads the case files in fixtures/cases, which are written by people who know
 * the field and need not know the code:
 *
 *   ## One digit mistyped in the upper limit
 *   Invented. Pattern met while copying a table into an abstract.
 *
 *   > The adjusted hazard ratio for death was 0.72 (95% CI, 0.58 to 0.98).
 *
 *   - interval-symmetry flags "0.72 (95% CI, 0.58 to 0.98)", expecting 0.75
 */

/** What a rule is to do about some words: the four verbs of a case file. */
export type Verb = 'flags' | 'accepts' | 'cannot judge' | 'is silent on';

/** One line after `-`: a rule, what it is to do, the words, a number worked out by hand. */
export interface Expectation {
  readonly rule: string;
  readonly verb: Verb;
  readonly words: string;
  /** As written: "0.75" stands for 0.745 to 0.755. */
  readonly expecting?: string;
}

/** A case: its heading, the text in question, and what each rule should do. */
export interface Case {
  readonly heading: string;
  readonly note: string;
  readonly text: string;
  readonly expectations: readonly Expectation[];
}

const EXPECTATION =
  /^- ([a-z0-9-]+) (flags|accepts|cannot judge|is silent on) "(.+)"(?:, expecting (-?\d*\.?\d+))?$/;

/**
 * The cases of a file, in order. What cannot be understood throws with the line:
 * a case that is skipped in silence would look like one that passes.
 */
export function parseCases(source: string): readonly Case[] {
  const parts = source.replace(/\r/g, '').split(/^## /m).slice(1);
  if (parts.length === 0) throw new Error('there is no case: a case begins with "## "');
  const cases = parts.map(parseCase);
  const headings = cases.map(({ heading }) => heading);
  const twice = headings.find((heading, index) => headings.indexOf(heading) !== index);
  if (twice !== undefined) throw new Error(`two cases are called "${twice}"`);
  return cases;
}

function parseCase(part: string): Case {
  const [heading = '', ...lines] = part.split('\n').map((line) => line.trimEnd());
  const quoted = lines.filter((line) => line.startsWith('>'));
  const listed = lines.filter((line) => line.startsWith('-'));
  const firstQuoted = lines.findIndex((line) => line.startsWith('>'));
  const note = lines.slice(0, Math.max(0, firstQuoted)).join(' ').trim();
  const stray = lines.slice(firstQuoted).find((line) => !/^$|^>|^-/.test(line));
  if (heading.trim() === '') throw new Error('a case has no heading');
  if (quoted.length === 0) throw new Error(`"${heading}" has no text after ">"`);
  if (note === '') throw new Error(`"${heading}" has no note on what it shows`);
  if (stray !== undefined) throw new Error(`"${heading}" has a line of no kind: ${stray}`);
  if (listed.length === 0) throw new Error(`"${heading}" expects nothing`);
  const text = quoted.map((line) => line.replace(/^> ?/, '')).join('\n');
  return { heading, note, text, expectations: listed.map(parseExpectation) };
}

function parseExpectation(line: string): Expectation {
  const [, rule, verb, words, expecting] = line.match(EXPECTATION) ?? [];
  if (rule === undefined || words === undefined || !isVerb(verb)) {
    throw new Error(`this line cannot be understood: ${line}`);
  }
  return { rule, verb, words, ...(expecting === undefined ? {} : { expecting }) };
}

function isVerb(verb: string | undefined): verb is Verb {
  return verb === 'flags' || verb === 'accepts' || verb === 'cannot judge'
    || verb === 'is silent on';
}
