import { lex } from './lex.ts';
import { findPhrase } from './phrases.ts';
import type { Token } from './token.ts';
import { ABBREVIATIONS, type Abbreviation, type Naming, NAMES } from './vocabulary.ts';

/**
 * What the manuscript's own abbreviations mean. Where it defines one as something
 * else ("heart rate (HR)"), the abbreviation names no quantity of ours: `undefined`.
 */
export type Definitions = ReadonlyMap<string, Abbreviation | undefined>;

/** What an abbreviation means in this manuscript, by how it is printed. */
export function abbreviated(definitions: Definitions, printed: string): Abbreviation | undefined {
  return definitions.has(printed) ? definitions.get(printed) : ABBREVIATIONS.get(printed);
}

/**
 * Finds where abbreviations are defined.
 *
 * ```
 * prevalence ratio (PR)   rate ratio [RR]   adjusted odds ratio (aOR)   heart rate (HR)
 *                   ^^                ^^                         ^^^                ^^
 * ```
 */
export function findDefinitions(text: string): Definitions {
  const definitions = new Map<string, Abbreviation | undefined>();
  for (const found of text.matchAll(BRACKETED)) {
    const printed = found[1] as string;
    const start = Math.max(0, found.index - LONGEST_NAME);
    if (!ABBREVIATIONS.has(printed) && !RATIO_WORDS.test(text.slice(start, found.index))) continue;
    define(definitions, printed, lex(text, { start, end: found.index }));
  }
  return definitions;
}

// odds ratio (OR)   heart rate [HR]   rate ratio (RR; 95% CI …)
//            ^^^               ^^^               ^^^
const BRACKETED = /[([]([A-Za-z]{0,5}[A-Z][A-Za-z]{0,5})(?=[)\],;])/g;

const RATIO_WORDS = /ratio|odds|hazard|relative|difference|area|index/i;

/** No name of a quantity is longer, in characters. */
const LONGEST_NAME = 90;

/** Takes note of what the words right before an abbreviation in brackets make it mean. */
function define(
  definitions: Map<string, Abbreviation | undefined>,
  printed: string,
  before: readonly Token[],
): void {
  if (printed.length < 2) return;
  const naming = nameBefore(before, before.length);
  if (naming !== undefined) {
    const known = ABBREVIATIONS.get(printed)?.adjusted;
    definitions.set(printed, known === undefined ? { naming } : { naming, adjusted: known });
  } else if (ABBREVIATIONS.has(printed) && !definitions.has(printed)) {
    if (spellsOut(before, before.length, printed)) definitions.set(printed, undefined);
  }
}

/** The firm name of a quantity whose last word stands right before token `end`. */
function nameBefore(tokens: readonly Token[], end: number): Naming | undefined {
  for (let start = Math.max(0, end - 6); start < end; start++) {
    if (tokens[start]?.kind !== 'word') continue;
    const found = findPhrase(NAMES, tokens, start);
    if (found?.end === end && found.meaning.firm) return found.meaning;
  }
  return undefined;
}

/** Words of a measure's name: a name with one of them is a measure, even if misspelt. */
const OF_RATIOS = new Set(['odds', 'hazard', 'hazards', 'ratio', 'ratios', 'ration', 'relative']);

/** Whether the words before spell the letters out: "partial response (PR)". */
function spellsOut(tokens: readonly Token[], end: number, printed: string): boolean {
  const letters = printed.replace(/s$/, '').toLowerCase();
  let at = end - 1;
  for (let index = letters.length - 1; index >= 0; index--) {
    while (tokens[at]?.kind === 'dash') at--;
    const { kind, word } = tokens[at] ?? { kind: 'other', word: '' };
    if (kind !== 'word' || word[0] !== letters[index] || OF_RATIOS.has(word)) return false;
    at--;
  }
  return true;
}
