import { cover, type SignificanceClaim, type Span } from '../../model/index.ts';
import type { Token } from '../token.ts';
import { isOfAmount } from './amounts.ts';
import { hasVerb, isVerb } from './clauses.ts';
import { isNegated, NEGATIONS, wordsBefore } from './negation.ts';
import { sizeIn } from './size.ts';

/** What a clause says of significance, with the words that say it. */
export interface SaidOfSignificance {
  readonly asserted: boolean;
  readonly manner: SignificanceClaim['manner'];
  readonly span: Span;
}

const SIGNIFICANT = new Set(['significant', 'significantly', 'significance']);

/** Words that weaken a claim of significance until it is none. */
const WEAKENING = new Set([
  'borderline', 'marginally', 'marginal', 'near', 'nearly', 'almost', 'approached', 'approaching',
  'clinically', 'clinical', 'towards', 'toward', 'trend', 'suggested', 'tended', 'practical',
  'public', 'if', 'whether',
]);

const INSIGNIFICANT = new Set([
  'insignificant', 'insignificantly', 'nonsignificant', 'nonsignificantly', 'ns',
]);

const ASSOCIATION = new Set((
  'association associations associated relationship relation related difference differences '
  + 'differ differed effect effects impact influence influenced correlation correlated evidence '
  + 'increase increased increases change changed benefit improve improved reduce reduced '
  + 'reduces predict predicted predictive predictor predictors affect affected linked link '
  + 'trend'
).split(' '));

/** Verbs behind a subject that says what was found: "no effect of tar on cough was observed". */
const OBSERVED = new Set(['observed', 'seen', 'found', 'detected', 'noted', 'evident']);

const SAMENESS = new Set(['unrelated', 'unaffected', 'unchanged', 'similar', 'comparable']);

const IMPLYING = new Set((
  'associated association associations predict predicted predicts predictor predictors '
  + 'predictive increased increase increases increasing decreased decrease decreases reduced '
  + 'reduction reduces reduce higher lower greater improved improves improvement longer shorter '
  + 'protective elevated related correlated worse better likelier favored favoured favoring '
  + 'favouring superior prolonged likely doubled halved protected raised determinants '
  + 'determinant linked independent independently factors more less reductions effective '
  + 'advantage durable favorable favourable inverse inversely positively negatively adversely '
  + 'reducing factor twofold threefold doubling preventive'
).split(' '));

/**
 * What the words of a clause say of significance, the nearest to the end first.
 * Stated significance outweighs a denied association, and that an implied one.
 *
 * ```
 * was not significantly associated with      no association was found      increased the risk
 *     ^^^^^^^^^^^^^^^^^                      ^^^^^^^^^^^^^^                ^^^^^^^^^
 * ```
 */
export function significanceIn(tokens: readonly Token[]): SaidOfSignificance | undefined {
  return stated(tokens) ?? denied(tokens) ?? implied(tokens) ?? bySize(tokens);
}

function stated(tokens: readonly Token[]): SaidOfSignificance | undefined {
  for (let at = tokens.length - 1; at >= 0; at--) {
    const token = tokens[at] as Token;
    if (INSIGNIFICANT.has(token.word)) return said(false, 'stated', token.span);
    if (!SIGNIFICANT.has(token.word)) continue;
    if (wordsBefore(tokens, at, 3).some(({ word }) => WEAKENING.has(word))) return undefined;
    const negation = negationBefore(tokens, at);
    if (negation !== undefined) return said(false, 'stated', cover(negation.span, token.span));
    if (token.word === 'significance' || NOT_OF_EFFECTS.has(tokens[at + 1]?.word ?? '')) continue;
    return said(true, 'stated', token.span);
  }
  return undefined;
}

/** Behind "significant", these speak of amounts and not of a test. */
const NOT_OF_EFFECTS = new Set([
  'level', 'levels', 'number', 'numbers', 'proportion', 'amount', 'role', 'part', 'burden',
  'portion', 'other', 'others', 'factor', 'limitation', 'challenge', 'problem', 'cause',
]);

const FINDING = new Set([
  'find', 'show', 'observe', 'detect', 'demonstrate', 'reveal', 'identify', 'found', 'shown',
  'observed', 'detected', 'demonstrated', 'revealed', 'reach', 'achieve', 'attain',
]);

// not statistically significant   non-significant   did not find that the ferry had a significant
// ^^^                             ^^^                   ^^^ ^^^^
function negationBefore(tokens: readonly Token[], at: number): Token | undefined {
  const words = wordsBefore(tokens, at, 12);
  const near = words.slice(0, 5).find(({ word }) => NEGATIONS.has(word));
  if (near !== undefined) return near;
  const [first, second] = words;
  if (first?.word === 'non') return first;
  if (second?.word === 'non' && first?.word === 'statistically') return second;
  const neither = tokens.slice(0, at).find(({ word }) => word === 'neither');
  if (neither !== undefined) return neither;
  const finding = words.findIndex(({ word }) => FINDING.has(word));
  const before = finding < 0 ? undefined : words[finding + 1];
  return before !== undefined && NEGATIONS.has(before.word) ? before : undefined;
}

// no evidence that tarring either reduced the odds of cough
// ^^^^^^^^^^^^^^^^
function withoutEvidence(tokens: readonly Token[]): SaidOfSignificance | undefined {
  const at = tokens.findLastIndex(
    ({ word }, index) => word === 'that' && tokens[index - 1]?.word === 'evidence',
  );
  const negation =
    at < 0 ? undefined : wordsBefore(tokens, at, 4).find(({ word }) => NEGATIONS.has(word));
  const { span } = tokens[at - 1] ?? { span: undefined };
  if (negation === undefined || span === undefined) return undefined;
  return said(false, 'no association', cover(negation.span, span));
}

function denied(tokens: readonly Token[]): SaidOfSignificance | undefined {
  const absent = withoutEvidence(tokens);
  if (absent !== undefined) return absent;
  for (let at = tokens.length - 1; at >= 0; at--) {
    const token = tokens[at] as Token;
    if (isSame(tokens, at)) return said(false, 'no association', token.span);
    if (!ASSOCIATION.has(token.word) && !OBSERVED.has(token.word)) continue;
    const negation = wordsBefore(tokens, at, 4).find(({ word }) => NEGATIONS.has(word));
    if (negation !== undefined && !isOfOther(tokens, at) && !isOfOutcome(tokens, at)) {
      return said(false, 'no association', cover(negation.span, token.span));
    }
    if (!OBSERVED.has(token.word)) return undefined;
  }
  return undefined;
}

/** Of these, "similar" compares one with another and denies neither. */
const EFFECTS = new Set([
  'improvement', 'improvements', 'reduction', 'reductions', 'ratio', 'ratios', 'increase',
  'effect', 'effects', 'benefit', 'benefits', 'association', 'associations', 'results',
  'findings', 'estimates', 'pattern', 'patterns', 'or', 'ors', 'hr', 'hrs', 'rr', 'rrs',
]);

// was unrelated   were similar   but not: similar results, similar to that of
function isSame(tokens: readonly Token[], at: number): boolean {
  const [word, before, next] = [tokens[at]?.word ?? '', tokens[at - 1]?.word, tokens[at + 1]?.word];
  if (!SAMENESS.has(word)) return false;
  if (word.startsWith('un')) return true;
  if (wordsBefore(tokens, at, 8).some((other) => EFFECTS.has(other.word))) return false;
  return (before === 'was' || before === 'were') && next !== 'to';
}

/** "No evidence of heterogeneity" denies no association. */
function isOfOther(tokens: readonly Token[], at: number): boolean {
  return tokens
    .slice(at + 1, at + 4)
    .some(({ word }) => word === 'heterogeneity' || word === 'bias' || word === 'interaction');
}

const CHANGING = new Set([
  'change', 'alter', 'modify', 'attenuate', 'explain', 'materially', 'whose', 'who',
]);

// RR no improvement   did not change the association   those whose work was not related
// ^^^^^                       ^^^^^^                        ^^^^^
function isOfOutcome(tokens: readonly Token[], at: number): boolean {
  const words = wordsBefore(tokens, at, 8);
  const negation = words.findIndex(({ word }) => NEGATIONS.has(word));
  return (
    MEASURES.has(words[negation + 1]?.word ?? '') || words.some(({ word }) => CHANGING.has(word))
  );
}

function implied(tokens: readonly Token[]): SaidOfSignificance | undefined {
  for (let at = tokens.length - 1; at >= 0; at--) {
    const token = tokens[at] as Token;
    if (!IMPLYING.has(token.word) || isOfAmount(tokens, at) || isOfMeasure(tokens, at)) continue;
    const isWeak = wordsBefore(tokens, at, 4).some(({ word }) => WEAKENING.has(word));
    return isWeak || isNegated(tokens, at) ? undefined : said(true, 'implied', token.span);
  }
  return undefined;
}

// twice the odds   1.6 times as likely
function bySize(tokens: readonly Token[]): SaidOfSignificance | undefined {
  const size = sizeIn(tokens);
  return size === undefined || size.factor === 1 ? undefined : said(true, 'implied', size.span);
}

const MEASURES = new Set([
  'ratio', 'ratios', 'rr', 'or', 'hr', 'ors', 'hrs', 'rrs', 'irr', 'risk', 'rate',
]);

// the risk ratio associated with brevane was   age-related   two risk factors
function isOfMeasure(tokens: readonly Token[], at: number): boolean {
  const { word } = tokens[at] as Token;
  const before = tokens[at - 1];
  if (word === 'factor' || word === 'factors')
    return before?.word !== 'risk' && before?.word !== 'protective';
  if (word === 'related') return before?.kind === 'dash' && !before.spaced;
  return word === 'associated' && MEASURES.has(before?.word ?? '');
}

/**
 * A clause that only denies, of its own result, what was said of another.
 *
 * ```
 * was associated with cough (OR 2.5 …), but not with fever (OR 0.9 …), while tar was not (OR 1.0 …)
 *                                           ^^^                                   ^^^
 * ```
 */
export function elliptic(
  tokens: readonly Token[],
  turned: boolean,
): SaidOfSignificance | undefined {
  const [first] = tokens;
  if (!turned || first === undefined) return undefined;
  const denies = first.word === 'not' || first.word === 'neither';
  if (denies && !hasVerb(tokens)) return said(false, 'implied', first.span);
  const end = tokens.findIndex(({ kind }) => kind === 'open');
  const last = tokens[end - 1];
  return last?.word === 'not' && isVerb(tokens, end - 2)
    ? said(false, 'implied', last.span)
    : undefined;
}

function said(
  asserted: boolean,
  manner: SignificanceClaim['manner'],
  span: Span,
): SaidOfSignificance {
  return { asserted, manner, span };
}
