import { cover, type Printed, type Span } from '../../model/index.ts';
import type { Token } from '../token.ts';
import { namesScale } from './scale.ts';

/** How large a clause says an effect is, as a factor: 1.59 for "a 59% increase". */
export interface SaidOfSize {
  readonly factor: number;
  readonly printed?: Printed;
  readonly span: Span;
}

/** Words that tell a factor by themselves. */
const FACTORS: Readonly<Record<string, number>> = {
  doubled: 2,
  doubling: 2,
  doubles: 2,
  tripled: 3,
  tripling: 3,
  trebled: 3,
  halved: 0.5,
  halving: 0.5,
  halves: 0.5,
  quadrupled: 4,
  twofold: 2,
  threefold: 3,
  fourfold: 4,
  fivefold: 5,
  sixfold: 6,
  tenfold: 10,
};

/** Words that tell a factor only before a quantity: "twice the odds", but not "twice daily". */
const MULTIPLES: Readonly<Record<string, number>> = {
  twice: 2,
  thrice: 3,
  double: 2,
  triple: 3,
  half: 0.5,
};

const NUMBERS: Readonly<Record<string, number>> = {
  two: 2,
  three: 3,
  four: 4,
  five: 5,
  six: 6,
  seven: 7,
  eight: 8,
  nine: 9,
  ten: 10,
};

const RISE = new Set([
  'increase', 'increased', 'higher', 'greater', 'more', 'elevated', 'rise', 'excess', 'increases',
  'elevation', 'increasing', 'raised', 'raising', 'rose', 'raises',
]);
const FALL = new Set([
  'reduction', 'reduced', 'lower', 'decrease', 'decreased', 'less', 'fewer', 'decline', 'reduces',
  'reductions', 'decreases', 'drop', 'reducing', 'reduce', 'lowered', 'lowering', 'decreasing',
  'fell', 'declined', 'lowers',
]);

/** Words that may stand between a percentage and the change it is of. */
const BETWEEN = new Set([
  'relative', 'significant', 'risk', 'odds', 'hazard', 'rate', 'statistically', 'significantly',
  'adjusted', 'independent',
]);

/**
 * The size that a clause speaks of, the nearest to its end.
 *
 * ```
 * a 59% increase in the odds   30% lower risk   1.6 times as likely   2.3-fold   twice as likely
 *   ^^^^^^^^^^^^               ^^^^^^^^^        ^^^^^^^^^             ^^^^^^^^   ^^^^^
 * ```
 */
export function sizeIn(tokens: readonly Token[]): SaidOfSize | undefined {
  for (let at = tokens.length - 1; at >= 0; at--) {
    const { word, span, printed } = tokens[at] as Token;
    if (Object.hasOwn(FACTORS, word)) return { factor: FACTORS[word] as number, span };
    if (Object.hasOwn(MULTIPLES, word) && multiplies(tokens, at)) {
      return { factor: MULTIPLES[word] as number, span };
    }
    const size = printed === undefined ? inWords(tokens, at) : sizeAt(tokens, at, printed);
    if (size !== undefined) return size;
  }
  return undefined;
}

// twice as likely   double the odds   half the risk   but not: twice daily   half of the women
function multiplies(tokens: readonly Token[], at: number): boolean {
  const [next, quantity] = [tokens[at + 1]?.word ?? '', tokens[at + 2]?.word ?? ''];
  if (next === 'as' || namesScale(next)) return true;
  return (
    (next === 'the' || next === 'their')
    && tokens.slice(at + 2, at + 5).some(({ word }) => namesScale(word))
    && quantity !== 'patients'
  );
}

// three times as likely   two-fold
function inWords(tokens: readonly Token[], at: number): SaidOfSize | undefined {
  const { word, span } = tokens[at] as Token;
  if (!Object.hasOwn(NUMBERS, word)) return undefined;
  const after = tokens[afterDash(tokens, at)];
  return after !== undefined && isTimes(tokens, afterDash(tokens, at))
    ? { factor: NUMBERS[word] as number, span: cover(span, after.span) }
    : undefined;
}

function afterDash(tokens: readonly Token[], at: number): number {
  return tokens[at + 1]?.kind === 'dash' ? at + 2 : at + 1;
}

// 1.6 times as likely   1.6 times the odds   1.6-fold   but not: three times a week
function isTimes(tokens: readonly Token[], at: number): boolean {
  const word = tokens[at]?.word;
  const next = tokens[at + 1]?.word ?? '';
  if (word === 'fold') return true;
  return (
    word === 'times' && next !== 'a' && next !== 'per' && next !== 'daily' && next !== 'weekly'
  );
}

function sizeAt(tokens: readonly Token[], at: number, printed: Printed): SaidOfSize | undefined {
  const next = afterDash(tokens, at);
  const [number, after] = [tokens[at] as Token, tokens[next]];
  if (after !== undefined && !printed.percent && isTimes(tokens, next)) {
    const span = cover(number.span, after.span);
    return printed.value > 0 ? { factor: printed.value, printed, span } : undefined;
  }
  if (!printed.percent || printed.value <= 0 || isStep(tokens, at)) return undefined;
  const change = changeBehind(tokens, next) ?? changeBefore(tokens, at);
  if (change === undefined) return undefined;
  const factor = 1 + (change.sign * printed.value) / 100;
  const span = cover(number.span, (tokens[change.at] as Token).span);
  return factor > 0 ? { factor, printed, span } : undefined;
}

// per 10% increase   for each 5% rise
function isStep(tokens: readonly Token[], at: number): boolean {
  return tokens
    .slice(Math.max(0, at - 6), at)
    .some(({ word }) => word === 'per' || word === 'each' || word === 'every');
}

interface Change {
  readonly sign: 1 | -1;
  readonly at: number;
}

function changeAt(tokens: readonly Token[], at: number): Change | undefined {
  const word = tokens[at]?.word ?? '';
  if (RISE.has(word)) return { sign: 1, at };
  return FALL.has(word) ? { sign: -1, at } : undefined;
}

// 30% lower   59% relative increase   30% risk reduction
function changeBehind(tokens: readonly Token[], from: number): Change | undefined {
  let at = from;
  while (at < from + 3 && BETWEEN.has(tokens[at]?.word ?? '')) at++;
  return changeAt(tokens, at);
}

// increased the odds by 59%   reduced by about 30%   a reduction of 30%
function changeBefore(tokens: readonly Token[], at: number): Change | undefined {
  const link =
    tokens[at - 1]?.kind === 'word' && ABOUT.has(tokens[at - 1]?.word ?? '') ? at - 2 : at - 1;
  const word = tokens[link]?.word;
  if (word === 'of') return changeAt(tokens, link - 1);
  if (word !== 'by') return undefined;
  for (let index = link - 1; index >= Math.max(0, link - 14); index--) {
    const change = changeAt(tokens, index);
    if (change !== undefined) return change;
  }
  return undefined;
}

const ABOUT = new Set(['about', 'around', 'approximately', 'some', 'nearly', 'almost']);
