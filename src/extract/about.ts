import { cover, quote, type Span } from '../model/index.ts';
import type { Token } from './token.ts';

const QUANTITIES = new Set(['risk', 'risks', 'odds', 'hazard', 'hazards', 'ratio', 'ratios', 'or', 'hr', 'rr',
  'irr', 'pr', 'ors', 'hrs', 'rrs', 'aor', 'ahr', 'likelihood', 'probability', 'chance', 'rate', 'rates',
  'prevalence', 'incidence', 'proportion', 'frequency', 'predictor', 'predictors', 'predicted']);

const ENDS = new Set(['among', 'in', 'compared', 'than', 'was', 'were', 'is', 'by', 'with', 'at', 'after',
  'during', 'within', 'between', 'when', 'who', 'and', 'but', 'versus', 'vs', 'had', 'across', 'from',
  'for', 'per', 'relative', 'comparing', 'according', 'to', 'over', 'are', 'being', 'as', 'on']);

const ARTICLES = new Set(['the', 'a', 'an', 'any', 'subsequent', 'developing', 'having', 'having', 'increased',
  'higher', 'lower', 'reduced', 'greater', 'being', 'decreased', 'elevated', 'significantly']);

/** The longest name of an outcome, in words. */
const LONGEST = 8;

/**
 * The outcome that a clause names, in its own words: what stands behind "risk of",
 * "odds ratio for" or "associated with".
 *
 * ```
 * the adjusted odds ratio for hospital readmission was      associated with depression
 *                             ^^^^^^^^^^^^^^^^^^^^                          ^^^^^^^^^^
 * ```
 */
export function outcomeIn(text: string, tokens: readonly Token[]): string | undefined {
  for (let at = tokens.length - 2; at >= 0; at--) {
    const start = outcomeStart(tokens, at);
    const span = start === undefined ? undefined : nounPhrase(tokens, start);
    if (span !== undefined) return quote(text, span).replace(/\s+/g, ' ');
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
