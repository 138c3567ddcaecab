import { cover, type Printed, type Span, type SpokenScale } from '../../model/index.ts';
import type { Token } from '../token.ts';

/** How large a clause says an effect is, as a factor: 1.59 for "a 59% increase". */
export interface SaidOfSize {
  readonly factor: number;
  readonly printed?: Printed;
  readonly span: Span;
}

const FACTORS: Readonly<Record<string, number>> = {
  twice: 2, doubled: 2, doubling: 2, doubles: 2, double: 2, tripled: 3, thrice: 3, halved: 0.5,
  quadrupled: 4, twofold: 2, threefold: 3, fourfold: 4, fivefold: 5, tenfold: 10, halving: 0.5,
};

const RISE = new Set(['increase', 'increased', 'higher', 'greater', 'more', 'elevated', 'rise', 'excess',
  'increases', 'elevation']);
const FALL = new Set(['reduction', 'reduced', 'lower', 'decrease', 'decreased', 'less', 'fewer', 'decline',
  'reduces', 'reductions', 'decreases', 'drop']);

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
    const token = tokens[at] as Token;
    const factor = FACTORS[token.word];
    if (factor !== undefined && Object.hasOwn(FACTORS, token.word)) return { factor, span: token.span };
    const size = token.printed === undefined ? undefined : sizeAt(tokens, at, token.printed);
    if (size !== undefined) return size;
  }
  return undefined;
}

function sizeAt(tokens: readonly Token[], at: number, printed: Printed): SaidOfSize | undefined {
  const next = tokens[at + 1]?.kind === 'dash' ? at + 2 : at + 1;
  const after = tokens[next];
  const number = tokens[at] as Token;
  if (after === undefined) return undefined;
  const span = cover(number.span, after.span);
  if (!printed.percent && (after.word === 'times' || after.word === 'fold')) {
    return printed.value > 0 ? { factor: printed.value, printed, span } : undefined;
  }
  if (!printed.percent || printed.value <= 0) return undefined;
  const change = RISE.has(after.word) ? 1 : FALL.has(after.word) ? -1 : changeBefore(tokens, at);
  if (change === 0) return undefined;
  const factor = 1 + (change * printed.value) / 100;
  return factor > 0 ? { factor, printed, span } : undefined;
}

// increased the odds by 59%   reduced by 30%
function changeBefore(tokens: readonly Token[], at: number): number {
  if (tokens[at - 1]?.word !== 'by') return 0;
  for (let index = at - 2; index >= Math.max(0, at - 8); index--) {
    const word = (tokens[index] as Token).word;
    if (RISE.has(word)) return 1;
    if (FALL.has(word)) return -1;
  }
  return 0;
}

/** The quantity that a clause speaks of, with the word that names it. */
export interface SaidOfScale {
  readonly scale: SpokenScale;
  readonly span: Span;
}

const SCALES: Readonly<Record<string, SpokenScale>> = {
  risk: 'risk', risks: 'risk', likely: 'risk', likelihood: 'risk', probability: 'risk', chance: 'risk',
  chances: 'risk', odds: 'odds', hazard: 'hazard', hazards: 'hazard', rate: 'rate', rates: 'rate',
  incidence: 'rate', prevalence: 'prevalence', likelier: 'risk',
};

const NOT_A_QUANTITY = new Set(['factor', 'factors', 'score', 'scores', 'group', 'groups', 'ratio', 'ratios',
  'stratification', 'assessment', 'model', 'models', 'reduction', 'difference', 'set', 'ratings']);

/**
 * Whether a clause speaks of odds, hazards, rates or risks; the names of measures
 * ("relative risk", "odds ratio") say nothing of that.
 */
export function scaleIn(tokens: readonly Token[]): SaidOfScale | undefined {
  for (let at = tokens.length - 1; at >= 0; at--) {
    const { word, span } = tokens[at] as Token;
    if (!Object.hasOwn(SCALES, word)) continue;
    const before = tokens[at - 1];
    const label = before?.kind === 'dash' ? tokens[at - 2]?.word : before?.word;
    if (NOT_A_QUANTITY.has(tokens[at + 1]?.word ?? '')) continue;
    if (label === 'at' || label === 'high' || label === 'low' || label === 'relative') continue;
    return { scale: SCALES[word] as SpokenScale, span };
  }
  return undefined;
}
