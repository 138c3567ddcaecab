/*
 * Reads the case files in fixtures/cases, which are written by people who know
 * the field and need not know the code:
 *
 *   ## One digit mistyped in the upper limit
 *   Invented. Pattern met while copying a table into an abstract.
 *
 *   > The adjusted hazard ratio for death was 0.72 (95% CI, 0.58 to 0.98).
 *
 *   - reads "0.72 (95% CI, 0.58 to 0.98)" as HR 0.72, 0.58 to 0.98 at 95%, adjusted
 *   - interval-symmetry flags "0.72 (95% CI, 0.58 to 0.98)", expecting 0.75
 *
 * fixtures/cases/README.md tells how a line after "-" is written.
 */

/** What a rule is to do about some words: the four verbs of a line on a rule. */
export type Verb = 'flags' | 'accepts' | 'cannot judge' | 'is silent on';

/** A line on a rule: what it is to do, the words, a number worked out by hand. */
export interface Expectation {
  readonly rule: string;
  readonly verb: Verb;
  readonly words: string;
  /** As written: "0.75" stands for 0.745 to 0.755. */
  readonly expecting?: string;
}

/** What is to be found in some words: the three verbs of a line on reading. */
export type Sense = 'reads' | 'counts' | 'hears';

/**
 * A line on what is read out of some words. `as` holds its parts in the order
 * written, "OR 1.59" and "p = 0.03"; none where nothing is to be found there.
 */
export interface Found {
  readonly sense: Sense;
  readonly words: string;
  readonly as: readonly string[];
}

/** A case: its heading, the text in question, and what each rule should do. */
export interface Case {
  readonly heading: string;
  readonly note: string;
  readonly text: string;
  readonly expectations: readonly Expectation[];
  readonly found: readonly Found[];
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
  const [found, rest] = [listed.flatMap(parseFound), listed.filter((line) => !isOfFinding(line))];
  return { heading, note, text, expectations: rest.map(parseExpectation), found };
}

const FOUND: readonly (readonly [Sense, RegExp])[] = [
  ['reads', /^- reads (nothing) in "(.+)"$/],
  ['reads', /^- reads "(.+?)" as (.+)$/],
  ['counts', /^- counts (nothing) in "(.+)"$/],
  ['counts', /^- counts "(.+?)" as (.+)$/],
  ['hears', /^- hears (nothing) of "(.+)"$/],
  ['hears', /^- hears of "(.+?)" that it is (.+)$/],
];

function isOfFinding(line: string): boolean {
  return /^- (?:reads|counts|hears) /.test(line);
}

function parseFound(line: string): readonly Found[] {
  if (!isOfFinding(line)) return [];
  for (const [sense, pattern] of FOUND) {
    const [, first, second] = line.match(pattern) ?? [];
    if (first === undefined || second === undefined) continue;
    if (first === 'nothing') return [{ sense, words: second, as: [] }];
    const as = second.match(/(?:[^,"]|"[^"]*")+/g)?.map((part) => part.trim()) ?? [];
    const strange = as.find((part) => !PARTS[sense].test(part));
    if (strange === undefined) return [{ sense, words: first, as }];
    throw new Error(`"${strange}" cannot be understood in this line: ${line}`);
  }
  throw new Error(`this line cannot be understood: ${line}`);
}

const NUMBER = String.raw`[-+]?(?:\d*\.?\d+(?:e-?\d+)?|∞)%?`;

/** The parts that a line may hold, each in the one way it may be written. */
const PARTS: Readonly<Record<Sense, RegExp>> = {
  reads: new RegExp(
    [
      `[A-Za-z][A-Za-z-]*(?: ${NUMBER})?`,
      `(?:credible )?${NUMBER} to ${NUMBER}(?: at [\\d.]+%)?`,
      `(?:one-sided |two-sided )?p(?: for (?:trend|interaction|heterogeneity)| of the factor)? `
        + `(?:=|<|<=|>|>=) ${NUMBER}`,
      '(?:outcome|term|comparison|unit|row|column) "[^"]+"',
      `SE ${NUMBER}|df ${NUMBER}(?: and ${NUMBER})?`,
    ]
      .map((part) => `^(?:${part})$`)
      .join('|'),
  ),
  counts: new RegExp(`^(?:${NUMBER}(?: of ${NUMBER})?)$`),
  hears: new RegExp(
    '^(?:(?:not )?significant|up|down|[\\d.]+ times' + '|in (?:odds|hazard|rate|risk|prevalence))$',
  ),
};

function parseExpectation(line: string): Expectation {
  const [, rule, verb, words, expecting] = line.match(EXPECTATION) ?? [];
  if (rule === undefined || words === undefined || !isVerb(verb)) {
    throw new Error(`this line cannot be understood: ${line}`);
  }
  return { rule, verb, words, ...(expecting === undefined ? {} : { expecting }) };
}

function isVerb(verb: string | undefined): verb is Verb {
  return (
    verb === 'flags' || verb === 'accepts' || verb === 'cannot judge' || verb === 'is silent on'
  );
}
