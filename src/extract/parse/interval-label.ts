import { cover, quote } from '../../model/index.ts';
import { findPhrase } from '../phrases.ts';
import type { Token } from '../token.ts';
import { INTERVAL_NAMES } from '../vocabulary.ts';
import type { LabelItem, Recognised } from './item.ts';

/**
 * The announcement of an interval that begins at token `at`, a number (its level) or a word.
 *
 * ```
 * 95% CI   95%-CI   95% confidence interval (CI)   CI95   CI (95%)   90% confidence limits
 * ```
 */
export function readIntervalLabel(
  text: string,
  tokens: readonly Token[],
  at: number,
): Recognised<LabelItem> | undefined {
  const first = tokens[at] as Token;
  const before = first.kind === 'number' ? levelOf(first) : undefined;
  if (first.kind === 'number' && first.printed?.percent !== true && before === undefined) return undefined;
  const start = first.kind === 'number' ? afterLevel(tokens, at + 1) : at;
  if (first.printed?.percent !== true && tokens[at + 1]?.kind === 'comma' && start > at) return undefined;
  const named = readName(text, tokens, start, before !== undefined)
    ?? (before === undefined ? undefined : unnamed(tokens, at));
  if (named === undefined) return undefined;
  const trailing = readTrailingLevel(tokens, named.end);
  // 95% CI 95% 0.76 to 1.66 repeats its level; 95% CI 55%, 65.5% does not.
  const after = before === undefined || trailing?.level === before ? trailing : undefined;
  const end = skipRepetition(tokens, after?.end ?? named.end);
  const level = before ?? after?.level;
  return {
    item: {
      kind: 'label',
      span: cover(first.span, (tokens[end - 1] as Token).span),
      spaced: first.spaced,
      type: named.type,
      ...(level === undefined ? {} : { level }),
    },
    end,
  };
}

/** A level of confidence in percent: 95%, 97.5%, or 95 and 0.95 where a label follows. */
function levelOf({ printed, span }: Token): number | undefined {
  if (printed === undefined || printed.span.start !== span.start) return undefined;
  const { value, percent } = printed;
  if (value >= 50 && value < 100 && (percent || value >= 80)) return value;
  if (!percent && (value === 0.95 || value === 0.9 || value === 0.99)) return value * 100;
  return undefined;
}

const KINDS_OF_INTERVAL = new Set(['bayesian', 'profile', 'likelihood', 'bootstrap', 'bootstrapped',
  'simultaneous', 'wald', 'exact', 'asymptotic', 'robust', 'percentile', 'adjusted', 'two',
  'one', 'sided', 'posterior', 'corrected', 'bca', 'repeated', 'equal', 'tailed', 'binomial']);

function afterLevel(tokens: readonly Token[], at: number): number {
  let next = at;
  for (; next < at + 5; next++) {
    const token = tokens[next];
    const passes = token?.kind === 'dash' || (token?.kind === 'comma' && next === at);
    if (!passes && !KINDS_OF_INTERVAL.has(token?.word ?? '')) break;
  }
  return next;
}

interface Named {
  readonly type: LabelItem['type'];
  readonly end: number;
}

function readName(
  text: string,
  tokens: readonly Token[],
  at: number,
  hasLevel: boolean,
): Named | undefined {
  const token = tokens[at];
  if (token?.kind !== 'word') return undefined;
  if (token.word === 'interval' || token.word === 'intervals' || token.word === 'limits') {
    return hasLevel ? { type: 'confidence', end: at + 1 } : undefined;
  }
  const dotted = readDotted(tokens, at);
  if (dotted !== undefined) return { type: 'confidence', end: dotted };
  const found = findPhrase(INTERVAL_NAMES, tokens, at);
  if (found === undefined) return undefined;
  if (token.word === 'ic' && !hasLevel && readTrailingLevel(tokens, found.end) === undefined) {
    return undefined;
  }
  if (found.end === at + 1 && !isAbbreviation(quote(text, token.span), hasLevel)) return undefined;
  return { type: found.meaning, end: found.end };
}

// HR 1.9, 95% 1.2-3.1   RR 1.01, 95% 0.52, 1.97: the label itself was left out
//         ^^^                    ^^^
function unnamed(tokens: readonly Token[], at: number): Named | undefined {
  const { printed } = tokens[at] as Token;
  const [before, level, limit, joint, other] = tokens.slice(Math.max(0, at - 1), at + 4);
  const isUsual = printed?.percent === true && USUAL.has(printed.value);
  const follows = before?.kind === 'comma' || before?.kind === 'semicolon' || before?.kind === 'open';
  const isJoint = joint?.kind === 'dash' || joint?.kind === 'comma' || joint?.word === 'to';
  if (!isUsual || !follows || level !== tokens[at] || !isJoint) return undefined;
  if (limit?.kind !== 'number' || other?.kind !== 'number' || (limit.printed?.decimals ?? 0) < 1) {
    return undefined;
  }
  return { type: 'confidence', end: at + 1 };
}

const USUAL = new Set([90, 95, 99]);

// C.I.
function readDotted(tokens: readonly Token[], at: number): number | undefined {
  if (tokens[at]?.word !== 'c') return undefined;
  const [stop, i, end] = tokens.slice(at + 1, at + 4);
  if ( stop?.kind !== 'stop' || i?.word !== 'i' || i.spaced) return undefined;
  return end?.kind === 'stop' && !end.spaced ? at + 4 : at + 3;
}

/** "CI" in capitals; "ci", or "Cl" with a small L, only where a level stands before. */
function isAbbreviation(printed: string, hasLevel: boolean): boolean {
  if (/^(CI|CIs|IC|CI['’]s|CrI|CrIs|CRI|HPD|HDI|BCI|UI)$/.test(printed)) return true;
  return hasLevel;
}

interface Trailing {
  readonly level: number;
  readonly end: number;
}

// CI95   CI 95%   CI (95%)   confidence interval of 95%
//   ^^      ^^^      ^^^^^                       ^^^^^^
function readTrailingLevel(tokens: readonly Token[], at: number): Trailing | undefined {
  let next = at;
  const bracketed = tokens[next]?.kind === 'open';
  const passes = (token: Token | undefined) => token?.kind === 'open' || token?.kind === 'dash'
    || token?.word === 'of' || token?.word === 'at' || token?.word === '_';
  while (next < at + 2 && passes(tokens[next])) next++;
  const token = tokens[next];
  if (token?.printed === undefined || token.kind === 'word') return undefined;
  const { value, percent } = token.printed;
  if (value < 50 || value >= 100 || !(percent || token.glued)) return undefined;
  const following = tokens[next + 1];
  if (following?.kind === 'dash' || following?.word === 'to') return undefined;
  if (!bracketed) return { level: value, end: next + 1 };
  return following?.kind === 'close' ? { level: value, end: next + 2 } : undefined;
}

// 95% confidence interval (CI)   confidence interval [95% CI]
//                         ^^^^                       ^^^^^^^^
function skipRepetition(tokens: readonly Token[], at: number): number {
  if (tokens[at]?.kind !== 'open') return at;
  let next = at + 1;
  if (tokens[next]?.kind === 'number') next++;
  const found = tokens[next] === undefined ? undefined : findPhrase(INTERVAL_NAMES, tokens, next);
  return found !== undefined && tokens[found.end]?.kind === 'close' ? found.end + 1 : at;
}
