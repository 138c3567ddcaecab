import { type About, cover, quote, type Span } from '../model/index.ts';
import type { Reach } from './claims/reach.ts';
import type { Token } from './token.ts';

const QUANTITIES = new Set([
  'risk', 'risks', 'odds', 'hazard', 'hazards', 'ratio', 'ratios', 'or', 'hr', 'rr', 'irr',
  'pr', 'ors', 'hrs', 'rrs', 'aor', 'ahr', 'likelihood', 'probability', 'chance', 'rate',
  'rates', 'prevalence', 'incidence', 'proportion', 'frequency', 'predictor', 'predictors',
  'predicted',
]);

const ENDS = new Set([
  'among', 'in', 'compared', 'than', 'was', 'were', 'is', 'by', 'with', 'at', 'after', 'during',
  'within', 'between', 'when', 'who', 'and', 'but', 'versus', 'vs', 'had', 'across', 'from',
  'for', 'per', 'relative', 'comparing', 'according', 'to', 'over', 'are', 'being', 'as', 'on',
]);

const ARTICLES = new Set([
  'the', 'a', 'an', 'any', 'subsequent', 'developing', 'having', 'having', 'increased',
  'higher', 'lower', 'reduced', 'greater', 'being', 'decreased', 'elevated', 'significantly',
]);

/** The longest name of an outcome, in words. */
const LONGEST = 8;

/**
 * What a result is about, as far as its own sentence says: outcome, exposure,
 * comparison and unit, each in the manuscript's words, each only where they are plain.
 */
export function aboutOf(text: string, reach: Reach): About {
  const { before, inside, behind } = reach;
  const outcome = outcomeIn(text, before);
  const term = termIn(text, reach, outcome);
  const comparison = comparisonIn(text, before) ?? comparisonIn(text, behind.slice(0, NEAR));
  const unit = unitIn(text, inside) ?? unitIn(text, before.slice(-NEAR)) ?? unitIn(text, behind.slice(0, NEAR));
  return {
    ...(outcome === undefined ? {} : { outcome }),
    ...(term === undefined ? {} : { term }),
    ...(comparison === undefined ? {} : { comparison }),
    ...(unit === undefined ? {} : { unit }),
  };
}

/** Words so near to a result may give its unit or its comparison. */
const NEAR = 8;

/**
 * The outcome that a clause names, in its own words: what stands behind "risk of",
 * "odds ratio for" or "associated with".
 *
 * ```
 * the adjusted odds ratio for hospital readmission was      associated with depression
 *                             ^^^^^^^^^^^^^^^^^^^^                          ^^^^^^^^^^
 * ```
 */
function outcomeIn(text: string, tokens: readonly Token[]): string | undefined {
  for (let at = tokens.length - 2; at >= 0; at--) {
    const start = outcomeStart(tokens, at);
    const span = start === undefined ? undefined : nounPhrase(tokens, start);
    if (span !== undefined) return wordsAt(text, span);
  }
  return undefined;
}

function outcomeStart(tokens: readonly Token[], at: number): number | undefined {
  const [word, next] = [tokens[at]?.word ?? '', tokens[at + 1]?.word];
  if (QUANTITIES.has(word) && (next === 'of' || next === 'for')) return at + 2;
  const isAssociation = word === 'associated' || word === 'association' || word === 'associations';
  return isAssociation && next === 'with' ? at + 2 : undefined;
}

/** The words from `start` up to the first that cannot belong to a name. */
export function nounPhrase(tokens: readonly Token[], start: number): Span | undefined {
  let from = start;
  while (ARTICLES.has(tokens[from]?.word ?? '')) from++;
  let end = from;
  while (end < from + LONGEST && continuesName(tokens[end], end === from)) end++;
  const [first, last] = [tokens[from], tokens[end - 1]];
  return first === undefined || last === undefined || end === from
    ? undefined
    : cover(first.span, last.span);
}

function continuesName(token: Token | undefined, isFirst: boolean): boolean {
  if (token === undefined) return false;
  if (token.kind === 'dash') return !isFirst;
  return token.kind === 'word' && !ENDS.has(token.word) && !QUANTITIES.has(token.word);
}

/** The words of a span in one line. */
export function wordsAt(text: string, span: Span): string {
  return quote(text, span).replace(/\s+/g, ' ');
}

const INTRODUCES = new Set([
  'and', 'or', 'with', 'included', 'include', 'including', 'were', 'was', 'are', 'by', 'of',
  'than', 'that', 'had', 'between', 'among', 'for', 'in', 'while', 'but', 'whereas', 'as',
  'from', 'on',
]);

const VERBS = new Set([
  'was', 'were', 'is', 'are', 'had', 'has', 'have', 'increased', 'reduced', 'increases',
  'reduces', 'showed', 'resulted', 'predicted', 'remained', 'lowered', 'raised', 'doubled',
  'did', 'improved',
]);

/**
 * The exposure: the words before a result's bracket in a list, or else the subject of
 * its sentence, where the sentence names an outcome besides.
 *
 * ```
 * low education (AOR=3.80 …), parity above three (AOR=2.09 …)     Tarring was associated with
 * ^^^^^^^^^^^^^               ^^^^^^^^^^^^^^^^^^                  ^^^^^^^
 * ```
 */
function termIn(text: string, reach: Reach, outcome: string | undefined): string | undefined {
  const { before, follows } = reach;
  const open = openingBracket(before);
  const listed = open === undefined ? undefined : phraseBefore(reach, open);
  if (listed !== undefined && (outcome === undefined || !sameWords(wordsAt(text, listed), outcome))) {
    return wordsAt(text, listed);
  }
  if (follows || outcome === undefined) return undefined;
  const subject = subjectOf(before);
  return subject === undefined ? undefined : wordsAt(text, subject);
}

// After adjustment, night work significantly increased the odds
//                   ^^^^^^^^^^
function subjectOf(before: readonly Token[]): Span | undefined {
  const verb = before.findIndex(({ word }) => VERBS.has(word));
  if (verb < 1) return undefined;
  const start = before.findLastIndex(({ kind }, at) => kind === 'comma' && at < verb) + 1;
  let end = verb;
  while (end > start && isAdverb(before[end - 1])) end--;
  const words = before.slice(start, end);
  if (QUANTITIES.has(words[0]?.word ?? '') || !isName(words)) return undefined;
  const subject = nounPhrase(words, 0);
  return subject?.end === before[end - 1]?.span.end ? subject : undefined;
}

function isAdverb(token: Token | undefined): boolean {
  return token !== undefined && (token.word.endsWith('ly') || token.word === 'also');
}

/** Words that no name holds: what has one of them is a clause, or points elsewhere. */
const NOT_IN_NAMES = new Set([
  'not', 'no', 'significant', 'nonsignificant', 'well', 'before', 'after', 'this', 'these',
  'which', 'who', 'that', 'there', 'it', 'we', 'they', 'both', 'neither', 'either',
  'respectively', 'result', 'results', 'here', 'analysis', 'model', 'more', 'less', 'most',
]);

/** Whether words can name an exposure: "helped" and "mattered" inside would make them a clause. */
function isName(tokens: readonly Token[]): boolean {
  return tokens.length > 0 && !isAdverb(tokens.at(-1)) && tokens.every(({ word }, at) =>
    !NOT_IN_NAMES.has(word) && !VERBS.has(word) && (at === 0 || !word.endsWith('ed')));
}

/** The bracket that a result stands in, right behind what it is about. */
function openingBracket(before: readonly Token[]): number | undefined {
  for (let at = before.length - 1; at >= Math.max(0, before.length - 8); at--) {
    const { kind } = before[at] as Token;
    if (kind === 'open' && before[at - 1]?.kind === 'word') return at;
    if (kind === 'close' || kind === 'stop' || kind === 'number') return undefined;
  }
  return undefined;
}

/** The words right before token `end`, back to where the list or the clause began. */
function phraseBefore({ before: tokens, behind, follows }: Reach, end: number): Span | undefined {
  let start = end;
  while (start > 0 && end - start < LONGEST) {
    const { kind, word } = tokens[start - 1] as Token;
    if ((kind !== 'word' && kind !== 'dash') || INTRODUCES.has(word)) break;
    start--;
  }
  const isSubject = start === 0 && leadsToVerb(behind);
  if (!isSubject && !beginsName(tokens, start - 1, follows)) return undefined;
  while (ARTICLES.has(tokens[start]?.word ?? '')) start++;
  const [first, last] = [tokens[start], tokens[end - 1]];
  if (first === undefined || last === undefined) return undefined;
  return isName(tokens.slice(start, end)) ? cover(first.span, last.span) : undefined;
}

const LISTING = new Set(['included', 'include', 'including', 'by']);

const LISTED = new Set([
  'predictors', 'predictor', 'factors', 'factor', 'determinants', 'determinant', 'variables',
  'correlates', 'causes', 'characteristics',
]);

// predictors were damp rooms (OR …), tar (OR …) and rank (OR …)   but not: in the hills (OR …)
//            ^^^^                  ^            ^^^
function beginsName(tokens: readonly Token[], at: number, follows: boolean): boolean {
  const { kind, word } = tokens[at] ?? { kind: undefined, word: '' };
  if (word === 'were' || word === 'was' || word === 'are') {
    return tokens.some((token) => LISTED.has(token.word));
  }
  return kind === 'colon' || kind === 'semicolon' || LISTING.has(word)
    || (follows && (kind === 'comma' || word === 'and' || word === 'or'));
}

// Schooling (OR 0.55 …) was associated with
//                       ^^^
function leadsToVerb(behind: readonly Token[]): boolean {
  const closed = behind.findIndex(({ kind }) => kind === 'close');
  return VERBS.has(behind[closed + 1]?.word ?? '');
}

function sameWords(one: string, other: string): boolean {
  return one.toLowerCase() === other.toLowerCase();
}

/**
 * What a result is compared with.
 *
 * ```
 * compared with people who had no tar     tarvolane versus placebo     than in women
 *               ^^^^^^^^^^^^^^^^^^^^^^                      ^^^^^^^
 * ```
 */
function comparisonIn(text: string, tokens: readonly Token[]): string | undefined {
  for (let at = 0; at + 1 < tokens.length; at++) {
    const [word, next] = [tokens[at]?.word ?? '', tokens[at + 1]?.word];
    const isVersus = word === 'versus' || word === 'vs';
    const isCompared = (word === 'compared' && (next === 'with' || next === 'to'))
      || (word === 'relative' && next === 'to');
    if (!isVersus && !isCompared) continue;
    const start = isCompared ? at + 2 : tokens[at + 1]?.kind === 'stop' ? at + 2 : at + 1;
    const span = nounPhrase(tokens, start);
    if (span !== undefined) return wordsAt(text, span);
  }
  return undefined;
}

/**
 * The unit that a ratio is per.
 *
 * ```
 * per year     per 10 mm Hg increase     per SD     for each additional drink     1-SD increase
 * ^^^^^^^^     ^^^^^^^^^^^^^^^^^^^^^     ^^^^^^     ^^^^^^^^^^^^^^^^^^^^^
 * ```
 */
function unitIn(text: string, tokens: readonly Token[]): string | undefined {
  for (let at = 0; at < tokens.length; at++) {
    const { word } = tokens[at] as Token;
    if (word !== 'per' && word !== 'each' && word !== 'every') continue;
    let end = at + 1;
    while (end < at + 7 && isUnitPart(tokens[end])) end++;
    if (end > at + 1) return wordsAt(text, cover((tokens[at] as Token).span, (tokens[end - 1] as Token).span));
  }
  return undefined;
}

function isUnitPart(token: Token | undefined): boolean {
  if (token?.kind === 'number') return true;
  if (token?.kind === 'slash' || token?.kind === 'dash') return true;
  return token?.kind === 'word' && !ENDS.has(token.word);
}
