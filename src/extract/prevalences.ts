import { type Prevalence, type Printed, quote } from '../model/index.ts';
import { nounPhrase } from './about.ts';
import type { Token } from './token.ts';

const SHARES = new Set(['prevalence', 'incidence', 'proportion', 'frequency', 'rate', 'risk']);

const HAPPENED = new Set(['developed', 'had', 'experienced', 'died', 'suffered', 'reported', 'relapsed']);

const UNEXPOSED = new Set(['control', 'controls', 'placebo', 'unexposed', 'nonsmokers', 'comparator']);

/** How far behind its name a share may stand, in tokens. */
const REACH = 14;

/**
 * How common outcomes are, as the tokens of a sentence say it.
 *
 * ```
 * the prevalence of falls was 34%      45 of 120 (37.5%) developed sepsis
 *     ^^^^^^^^^^^^^^^^^^^     ^^^                 ^^^^^  ^^^^^^^^^^^^^^^^
 * ```
 */
export function prevalencesIn(text: string, tokens: readonly Token[]): readonly Prevalence[] {
  const found: Prevalence[] = [];
  for (let at = 0; at < tokens.length; at++) {
    const named = namedShare(text, tokens, at) ?? happenedShare(text, tokens, at);
    if (named !== undefined) found.push(named);
  }
  return found;
}

// the overall prevalence of falls among residents was 34%
function namedShare(text: string, tokens: readonly Token[], at: number): Prevalence | undefined {
  const name = tokens[at] as Token;
  if (!SHARES.has(name.word) || tokens[at + 1]?.word === 'ratio') return undefined;
  if (tokens[at + 1]?.word !== 'of') return undefined;
  const outcome = nounPhrase(tokens, at + 2);
  if (outcome === undefined) return undefined;
  for (let index = at + 3; index < Math.min(tokens.length, at + REACH); index++) {
    const { printed, kind } = tokens[index] as Token;
    if (kind === 'stop' || kind === 'semicolon') return undefined;
    if (printed === undefined) continue;
    return share(tokens, index, printed, quote(text, outcome));
  }
  return undefined;
}

// 45 of 120 (37.5%) developed sepsis     34% had a relapse
function happenedShare(text: string, tokens: readonly Token[], at: number): Prevalence | undefined {
  const { printed } = tokens[at] as Token;
  if (printed?.percent !== true) return undefined;
  const verb = tokens[at + 1]?.kind === 'close' ? at + 2 : at + 1;
  const word = tokens[verb]?.word ?? '';
  if (!HAPPENED.has(word)) return undefined;
  if (word === 'died') return share(tokens, at, printed, 'death');
  if (word === 'relapsed') return share(tokens, at, printed, 'relapse');
  const outcome = nounPhrase(tokens, verb + 1);
  return outcome === undefined ? undefined : share(tokens, at, printed, quote(text, outcome));
}

function share(
  tokens: readonly Token[],
  at: number,
  printed: Printed,
  outcome: string,
): Prevalence | undefined {
  if (!printed.percent || printed.value < 0 || printed.value > 100) return undefined;
  const around = tokens.slice(Math.max(0, at - REACH), at + 8);
  const group = around.some(({ word }) => UNEXPOSED.has(word)) ? 'unexposed' : 'everyone';
  const words = outcome.replace(/\s+/g, ' ');
  return { share: printed.value / 100, printed, span: printed.span, outcome: words, group };
}
