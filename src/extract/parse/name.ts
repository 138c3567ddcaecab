import { cover, quote } from '../../model/index.ts';
import { abbreviated, type Definitions } from '../definitions.ts';
import { findPhrase } from '../phrases.ts';
import type { Token } from '../token.ts';
import { type Abbreviation, type Naming, NAMES } from '../vocabulary.ts';
import type { NameItem, Recognised } from './item.ts';

/**
 * The name of a quantity that begins at token `at`.
 *
 * ```
 * odds ratio   Odds-ratio   aHR   ORs   HRTreatment   mean difference   AUC   hazard ratio (HR)
 * ```
 */
export function readName(
  text: string,
  tokens: readonly Token[],
  at: number,
  definitions: Definitions,
): Recognised<NameItem> | undefined {
  const token = tokens[at] as Token;
  const logged = loggedRatio(text, tokens, at, definitions);
  if (logged !== undefined) return logged;
  if (isGreekLetter(token.word) && !isCoefficient(tokens, at)) return undefined;
  const phrase = findPhrase(NAMES, tokens, at);
  if (phrase !== undefined && isRatioWord(tokens[phrase.end])) return namedRatio(tokens, at, phrase.end);
  if (phrase !== undefined && (phrase.end > at + 1 || phrase.meaning.quantity.kind !== 'ratio')) {
    const { end, adjusted } = skipAbbreviation(text, tokens, phrase.end, definitions);
    return named({ naming: phrase.meaning, ...adjusted }, tokens, at, end);
  }
  const short = readAbbreviation(text, tokens, at, definitions);
  if (short !== undefined) return named(short, tokens, at, at + 1);
  if (phrase === undefined || token.word.length < 3) return undefined;
  return named({ naming: phrase.meaning }, tokens, at, phrase.end);
}

const LOGARITHMS = new Set(['log', 'ln', 'loge', 'logarithm']);

const COEFFICIENT: Naming = { quantity: { kind: 'coefficient' }, firm: true };

// log OR   ln(HR)   log odds ratio: values on the log scale, which are no ratios
function loggedRatio(
  text: string,
  tokens: readonly Token[],
  at: number,
  definitions: Definitions,
): Recognised<NameItem> | undefined {
  if (!LOGARITHMS.has((tokens[at] as Token).word)) return undefined;
  const next = tokens[at + 1]?.kind === 'open' || tokens[at + 1]?.kind === 'dash' ? at + 2 : at + 1;
  if (tokens[next]?.kind !== 'word') return undefined;
  const name = readName(text, tokens, next, definitions);
  if (name?.item.naming.quantity.kind !== 'ratio') return undefined;
  const end = tokens[at + 1]?.kind === 'open' && tokens[name.end]?.kind === 'close' ? name.end + 1 : name.end;
  return named({ naming: COEFFICIENT }, tokens, at, end);
}

function isGreekLetter(word: string): boolean {
  return word === 'beta' || word === 'β';
}

// β = 0.46   beta coefficient   but not: beta-blockers   TGF-beta   beta (1) receptor
function isCoefficient(tokens: readonly Token[], at: number): boolean {
  const [before, next] = [tokens[at - 1], tokens[at + 1]];
  if (before?.kind === 'dash' && !before.spaced) return false;
  return next?.kind === 'relation' || next?.word === 'coefficient' || next?.word === 'coefficients';
}

function isRatioWord(token: Token | undefined): boolean {
  return token?.word === 'ratio' || token?.word === 'ratios';
}

// response rate ratio   recurrence rate ratios   incidence ratio
//          ^^^^ ^^^^^
function namedRatio(tokens: readonly Token[], at: number, end: number): Recognised<NameItem> {
  const measure = (tokens[end - 1] as Token).word.startsWith('rate') ? 'IRR' : 'ratio';
  return named({ naming: { quantity: { kind: 'ratio', measure }, firm: true } }, tokens, at, end + 1);
}

function named(
  { naming, adjusted }: Abbreviation,
  tokens: readonly Token[],
  at: number,
  end: number,
): Recognised<NameItem> {
  const first = tokens[at] as Token;
  const span = cover(first.span, (tokens[end - 1] as Token).span);
  const said = adjusted === undefined ? {} : { adjusted };
  return { item: { kind: 'name', span, spaced: first.spaced, naming, ...said }, end };
}

// odds ratio (OR)   hazard ratio [HR]   adjusted odds ratio (aOR)
//            ^^^^                ^^^^                      ^^^^^
function skipAbbreviation(
  text: string,
  tokens: readonly Token[],
  at: number,
  definitions: Definitions,
): { readonly end: number; readonly adjusted: { readonly adjusted?: boolean } } {
  const none = { end: at, adjusted: {} };
  if (tokens[at]?.kind !== 'open' || tokens[at + 2]?.kind !== 'close') return none;
  const token = tokens[at + 1] as Token;
  if (token.kind !== 'word') return none;
  const short = abbreviated(definitions, quote(text, token.span));
  if (short === undefined) return none;
  const said = short.adjusted === undefined ? {} : { adjusted: short.adjusted };
  return { end: at + 3, adjusted: said };
}

function readAbbreviation(
  text: string,
  tokens: readonly Token[],
  at: number,
  definitions: Definitions,
): Abbreviation | undefined {
  const token = tokens[at] as Token;
  if (!hasCapitals(text, token)) return lowerCase(tokens, at);
  const printed = quote(text, token.span);
  const short = abbreviated(definitions, printed) ?? withSubscript(definitions, printed);
  if (short === undefined) return lowerCase(tokens, at);
  if (isReceptor(tokens, at) || tokens[at - 1]?.kind === 'slash') return undefined;
  if (printed === 'OR' && standsAmongCapitals(text, tokens, at)) return undefined;
  return short;
}

/** Whether a capital stands behind the first letter, as in all abbreviations of measures. */
function hasCapitals(text: string, { span }: Token): boolean {
  for (let at = span.start + 1; at < span.end && at < span.start + 5; at++) {
    const code = text.charCodeAt(at);
    if (code >= 0x41 && code <= 0x5a) return true;
  }
  return false;
}

// HRTreatment   ORMH   HRadj
// ^^            ^^     ^^
function withSubscript(definitions: Definitions, printed: string): Abbreviation | undefined {
  const letters = /^(a?(?:OR|HR|RR|IRR|PR))(?:[A-Z][a-z]{2,}|MH|M-H|mv|uv|int)$/.exec(printed);
  return letters === null ? undefined : abbreviated(definitions, letters[1] as string);
}

const LOWER_CASE: Readonly<Record<string, string>> = { or: 'OR', hr: 'HR', rr: 'RR', aor: 'aOR' };

/** "or=2.3" in small letters, told by the sign that follows. */
function lowerCase(tokens: readonly Token[], at: number): Abbreviation | undefined {
  if (tokens[at + 1]?.relation !== '=') return undefined;
  const letters = LOWER_CASE[(tokens[at] as Token).word];
  if (letters === undefined) return undefined;
  if (tokens[at + 2]?.kind !== 'number') return undefined;
  return abbreviated(new Map(), letters);
}

/** "HR-positive", "PR+", "HR status": a receptor, not a ratio. */
function isReceptor(tokens: readonly Token[], at: number): boolean {
  const next = tokens[at + 1];
  const word = next?.kind === 'dash' ? tokens[at + 2]?.word : next?.word;
  return word === 'positive' || word === 'negative' || word === 'status' || next?.word === '+';
}

function standsAmongCapitals(text: string, tokens: readonly Token[], at: number): boolean {
  const isCapital = (token: Token | undefined) => token?.kind === 'word'
    && /^\p{Lu}{3,}$/u.test(quote(text, token.span));
  return isCapital(tokens[at - 1]) && isCapital(tokens[at + 1]);
}
