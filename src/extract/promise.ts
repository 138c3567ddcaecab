import type { Span } from '../model/index.ts';

/**
 * What a block may hold, told by a glance: most paragraphs of an article hold no
 * result, and reading them word by word would cost far more than finding that out.
 */
export type Promised = 'results' | 'counts' | 'nothing';

const DIGIT = /\d/;

/** Words without which no result is told, in any case of letters. */
const WORDS = /ratio|odds|hazard|relative|interval|confid|credib|limits|coefficient|fold|times/i;

/** Abbreviations and signs without which no result is told, in these letters. */
const SIGNS = /C[Il]|IC|OR|HR|RR|PR|MR|IR|AUC|MD|RD|(?:^|[^A-Za-z])[pP](?![a-z])|[χβ=]|95\s?%/;

/** What makes a number a count: a percentage, or a total. */
const COUNTS = /[%％]|per\s?cent|\d\s?\/\s?\d|\sof\s/i;

/**
 * The sentences of a block that must be read word by word: those with a number, or with the
 * name of a measure that results elsewhere inherit. Neighbours are joined, since a splitter
 * may cut where nothing ends, as in "RR 1. 71".
 */
export function mattering(text: string, sentences: readonly Span[]): readonly Span[] {
  const parts: Span[] = [];
  for (const sentence of sentences) {
    const words = text.slice(sentence.start, sentence.end);
    if (!(DIGIT.test(words) || WORDS.test(words) || NUMBER_WORDS.test(words))) continue;
    const last = parts.at(-1);
    if (last?.end === sentence.start) parts[parts.length - 1] = { start: last.start, end: sentence.end };
    else parts.push(sentence);
  }
  return parts;
}

/** Counts in words: "three (4.5%)" has digits, "twice as likely" has none. */
const NUMBER_WORDS = /twice|double|halv|per\s?cent/i;

/** What a stretch of text may hold; never less than it does hold. */
export function promiseOf(text: string, { start, end }: Span): Promised {
  const words = text.slice(start, end);
  const hasDigit = DIGIT.test(words);
  if (hasDigit && (SIGNS.test(words) || WORDS.test(words))) return 'results';
  return COUNTS.test(words) && (hasDigit || /per\s?cent|%/.test(words)) ? 'counts' : 'nothing';
}
