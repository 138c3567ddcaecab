import type { Prevalence, Printed, Span } from '../model/index.ts';
import { nounPhrase, wordsAt } from './about.ts';
import type { Token } from './token.ts';

const SHARES = new Set(['prevalence', 'incidence', 'proportion', 'frequency', 'rate', 'risk']);

const HAPPENED = new Set(['developed', 'had', 'experienced', 'died', 'suffered', 'reported', 'relapsed']);

const UNEXPOSED = new Set(['control', 'controls', 'placebo', 'unexposed', 'nonsmokers', 'comparator']);

/** How far behind its name a share may stand, in tokens. */
const REACH = 22;

/** How far from a percentage its group may be named, in tokens. */
const NEAR = 7;

/**
 * How common outcomes are, as the tokens of a block say it.
 *
 * ```
 * the prevalence of falls was 34%      45 of 120 (37.5%) developed sepsis
 *     ^^^^^^^^^^^^^^^^^^^     ^^^                 ^^^^^  ^^^^^^^^^^^^^^^^
 * falls were reported by 45 of 120 residents (37.5%)
 * ^^^^^                                       ^^^^^
 * ```
 */
export function prevalencesIn(text: string, tokens: readonly Token[]): readonly Prevalence[] {
  const found: Prevalence[] = [];
  for (let at = 0; at < tokens.length; at++) {
    found.push(...namedShares(text, tokens, at), ...happenedShares(text, tokens, at));
    found.push(...eventShares(text, tokens, at));
  }
  return found;
}

// the overall prevalence of falls among residents was 34%
function namedShares(text: string, tokens: readonly Token[], at: number): readonly Prevalence[] {
  const name = tokens[at] as Token;
  if (!SHARES.has(name.word) || tokens[at + 1]?.word !== 'of') return [];
  const outcome = nounPhrase(tokens, at + 2);
  return outcome === undefined ? [] : sharesBehind(tokens, at + 3, wordsAt(text, outcome)).slice(0, 1);
}

// 45 of 120 (37.5%) developed sepsis     34% had a relapse
function happenedShares(text: string, tokens: readonly Token[], at: number): readonly Prevalence[] {
  const { printed } = tokens[at] as Token;
  if (printed?.percent !== true) return [];
  const verb = tokens[at + 1]?.kind === 'close' ? at + 2 : at + 1;
  const word = tokens[verb]?.word ?? '';
  if (!HAPPENED.has(word)) return [];
  if (word === 'died') return share(tokens, at, printed, 'death');
  if (word === 'relapsed') return share(tokens, at, printed, 'relapse');
  const outcome = nounPhrase(tokens, verb + 1);
  return outcome === undefined ? [] : share(tokens, at, printed, wordsAt(text, outcome));
}

const OCCURRING = new Set(['occurred', 'reported', 'seen', 'observed', 'recorded', 'noted', 'diagnosed',
  'present', 'common', 'detected', 'identified', 'found']);

const AUXILIARIES = new Set(['was', 'were', 'is', 'are', 'been', 'had', 'has', 'have', 'also']);

// falls were reported by 45 of 120 (37.5%)     a response was common: 161 of 309 (52.1%) with …
function eventShares(text: string, tokens: readonly Token[], at: number): readonly Prevalence[] {
  if (!OCCURRING.has((tokens[at] as Token).word)) return [];
  let end = at;
  while (end > 0 && AUXILIARIES.has(tokens[end - 1]?.word ?? '')) end--;
  if (end === at && tokens[at]?.word !== 'occurred') return [];
  const subject = subjectBefore(tokens, beforeTime(tokens, end));
  return subject === undefined ? [] : sharesBehind(tokens, at + 1, wordsAt(text, subject));
}

const TIME_AND_PLACE = new Set(['at', 'by', 'within', 'after', 'during', 'in', 'over']);

// response at 12 weeks was common
//          ^
function beforeTime(tokens: readonly Token[], end: number): number {
  for (let at = end - 1; at > 0 && end - at < 5; at--) {
    const { kind, word } = tokens[at] as Token;
    if (TIME_AND_PLACE.has(word)) return at;
    if (kind !== 'word' && kind !== 'number') break;
  }
  return end;
}

/** The words right before a verb, back to where the clause begins. */
function subjectBefore(tokens: readonly Token[], end: number): Span | undefined {
  let start = end;
  while (start > 0 && end - start < 6 && tokens[start - 1]?.kind === 'word') start--;
  const span = nounPhrase(tokens, start);
  return span?.end === tokens[end - 1]?.span.end ? span : undefined;
}

/** The percentages that follow within the clause, each a share of its own group. */
function sharesBehind(tokens: readonly Token[], from: number, outcome: string): readonly Prevalence[] {
  const found: Prevalence[] = [];
  for (let at = from; at < Math.min(tokens.length, from + REACH); at++) {
    const { printed, kind } = tokens[at] as Token;
    if (kind === 'stop' || kind === 'semicolon') break;
    if (printed?.percent === true) found.push(...share(tokens, at, printed, outcome));
  }
  return found;
}

function share(
  tokens: readonly Token[],
  at: number,
  printed: Printed,
  outcome: string,
): readonly Prevalence[] {
  if (printed.value < 0 || printed.value > 100 || isLevel(tokens, at)) return [];
  const group = isUnexposed(tokens, at) ? 'unexposed' : 'everyone';
  return [{ share: printed.value / 100, printed, span: printed.span, outcome, group }];
}

const LEVEL_OF = new Set(['ci', 'cis', 'cl', 'confidence', 'credible', 'cri', 'uncertainty', 'power']);

/** "95% CI" is a level and no share of anyone. */
function isLevel(tokens: readonly Token[], at: number): boolean {
  const next = tokens[at + 1]?.kind === 'dash' ? at + 2 : at + 1;
  return LEVEL_OF.has(tokens[next]?.word ?? '');
}

/** Whether the words around a percentage, up to the next number, name a group without exposure. */
function isUnexposed(tokens: readonly Token[], at: number): boolean {
  for (const step of [1, -1]) {
    for (let next = at + step; Math.abs(next - at) <= NEAR; next += step) {
      const { kind, word } = tokens[next] ?? { kind: 'stop', word: '' };
      if (UNEXPOSED.has(word)) return true;
      if (kind === 'stop' || (kind === 'number' && step === 1)) break;
    }
  }
  return false;
}
