import {
  type Claim, type Prevalence, quote, type RatioResult, type Reading, type Span,
} from '../model/index.ts';

/** The share from which an outcome is called common: the 10% of Zhang and Yu (1998). */
export const COMMON_FROM = 0.1;

/**
 * The share that tells how common the outcome of this result is: one whose
 * outcome shares a word with the claim's sentence, or the only one there is that
 * names no outcome. Of an unexposed group rather than of everyone.
 */
export function prevalenceFor(
  { sentence }: Pick<Claim, 'sentence'>,
  { about }: RatioResult,
  { manuscript, findings }: Reading,
): Prevalence | undefined {
  const said = `${quote(manuscript.text, sentence)} ${about.outcome ?? ''}`.toLowerCase();
  const shares = findings.prevalences.filter(({ span }) => !isLevel(manuscript.text, span));
  const fitting = shares.filter(({ outcome }) =>
    outcome === undefined ? shares.length === 1 : sharesAWord(outcome, said));
  return fitting.find(({ group }) => group === 'unexposed') ?? fitting[0];
}

/** "CI95%", "95% confidence interval": the level of an interval is no share of people. */
function isLevel(text: string, { start, end }: Span): boolean {
  return /^\s?%?\s*(?:CI|conf|cred)/i.test(text.slice(end, end + 12))
    || /\b(?:CI|interval)\W{0,2}$/.test(text.slice(Math.max(0, start - 12), start));
}

/** Whether a word of the outcome, by its first letters, begins a word of the sentence. */
function sharesAWord(outcome: string, sentence: string): boolean {
  const spoken = sentence.match(/\p{L}{4,}/gu) ?? [];
  return (outcome.toLowerCase().match(/\p{L}{4,}/gu) ?? [])
    .filter((word) => !EMPTY_WORDS.has(word))
    .some((word) => spoken.some((other) => other.startsWith(stemOf(word))));
}

/** The first letters of a word without a plural: "falls" and "falling" begin with "fall". */
function stemOf(word: string): string {
  return word.replace(/s$/, '').slice(0, 5);
}

/** Words that outcomes share without being the same outcome. */
const EMPTY_WORDS = new Set([
  'among', 'with', 'history', 'level', 'levels', 'increased', 'higher', 'report', 'reported',
  'prevalence', 'overall', 'total', 'risk', 'rate', 'incidence', 'patients',
  'women', 'children', 'adults', 'their', 'from', 'during', 'after', 'before', 'between',
]);
