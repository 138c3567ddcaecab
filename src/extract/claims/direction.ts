import type { Result, Span } from '../../model/index.ts';
import type { Token } from '../token.ts';
import { isOfAmount } from './amounts.ts';
import { hasVerb, isVerb } from './clauses.ts';
import { isNegated } from './negation.ts';
import { sizeIn } from './size.ts';

/** The way that a clause says an effect points, with the word that says it. */
export interface SaidOfDirection {
  readonly direction: 'up' | 'down';
  readonly span: Span;
}

const UP = new Set((
  'increased increase increases increasing higher greater elevated raised doubled tripled '
  + 'more raises raising elevates excess worsened twofold threefold fourfold'
).split(' '));
const DOWN = new Set((
  'reduced reduction reductions reduce reduces reducing lower decreased decrease decreases '
  + 'decreasing less protective protected preventive fewer halved inversely inverse lowered '
  + 'lowering declined lesser'
).split(' '));

/** These tell a direction only of an association: "positively associated with". */
const SIGNS: Readonly<Record<string, 'up' | 'down'>> = { positively: 'up', negatively: 'down' };
const RELATED = new Set(['associated', 'correlated', 'related', 'linked', 'with']);

/** "Preventive factors" lower a risk; "preventive measures" are taken. */
const FACTOR = new Set(['factor', 'factors', 'effect', 'effects', 'of', 'against']);

/** Words whose way depends on what they are said of: longer survival is a lower hazard. */
const GOOD = new Set([
  'longer', 'improved', 'improves', 'prolonged', 'prolongs', 'better', 'improvement', 'superior',
  'advantage', 'favorable', 'favourable', 'favorably', 'positively',
]);
const BAD = new Set([
  'shorter', 'worse', 'poorer', 'poor', 'inferior', 'adverse', 'adversely', 'shortened',
  'unfavorable', 'unfavourable', 'negatively',
]);
const SURVIVAL = new Set([
  'survival', 'pfs', 'os', 'dfs', 'efs', 'rfs', 'ttp', 'css', 'dmfs', 'mfs', 'lfs', 'ffs', 'ttf',
  'fftf', 'prognosis', 'duration', 'remission',
]);

const QUANTITIES = new Set([
  'risk', 'risks', 'odds', 'hazard', 'hazards', 'likelihood', 'probability', 'chance', 'rate',
  'rates', 'incidence', 'prevalence', 'mortality',
]);

/**
 * The direction that a clause asserts of a result: what is said of the risk or the
 * odds themselves, else the word nearest to the clause's end, else a size.
 *
 * ```
 * a lower risk with a higher dose     more likely to have a lower income     twice as likely
 *   ^^^^^                             ^^^^                                   ^^^^^
 * ```
 */
export function directionIn(tokens: readonly Token[], result: Result): SaidOfDirection | undefined {
  const isHazard = result.kind === 'ratio' && result.measure.endsWith('HR');
  const isOfSurvival = tokens.some(({ word }) => SURVIVAL.has(word));
  let nearest: number | undefined;
  for (let at = tokens.length - 1; at >= 0; at--) {
    const way = wayAt(tokens, at, isHazard && isOfSurvival);
    if (way === undefined || isOutcome(tokens, at)) continue;
    if (STEPWISE.has(tokens[at]?.word ?? '') && !isOfQuantity(tokens, at)) continue;
    if (isOfQuantity(tokens, at) || !isAdjective(tokens, at)) {
      nearest = nearest !== undefined && !isOfQuantity(tokens, at) ? nearest : at;
      break;
    }
    nearest ??= at;
  }
  if (nearest === undefined) return bySize(tokens);
  if (isNegated(tokens, nearest)) return undefined;
  const direction = wayAt(tokens, nearest, isHazard && isOfSurvival);
  const { span } = tokens[nearest] as Token;
  return direction === undefined ? undefined : { direction, span };
}

function wayAt(
  tokens: readonly Token[],
  at: number,
  isOfSurvival: boolean,
): SaidOfDirection['direction'] | undefined {
  const { word } = tokens[at] as Token;
  if (word === 'factor' || word === 'factors') return isRiskFactor(tokens, at) ? 'up' : undefined;
  if (isOfSurvival && GOOD.has(word)) return 'down';
  if (isOfSurvival && BAD.has(word)) return 'up';
  if (Object.hasOwn(SIGNS, word)) {
    return RELATED.has(tokens[at + 1]?.word ?? '') ? SIGNS[word] : undefined;
  }
  if (word === 'preventive') return FACTOR.has(tokens[at + 1]?.word ?? '') ? 'down' : undefined;
  const isUp = UP.has(word);
  if ((!isUp && !DOWN.has(word)) || isOfAmount(tokens, at)) return undefined;
  if (!speaksOfSurvival(tokens, at)) return isUp ? 'up' : 'down';
  return isOfSurvival ? (isUp ? 'down' : 'up') : undefined;
}

const SAYING = new Set([
  'was', 'were', 'is', 'are', 'as', 'be', 'independent', 'significant', 'strong',
]);

// a risk factor for relapse   was a risk factor   but not: patients with several risk factors
function isRiskFactor(tokens: readonly Token[], at: number): boolean {
  if (tokens[at - 1]?.word !== 'risk') return false;
  const next = tokens[at + 1]?.word;
  return (
    next === 'for'
    || next === 'of'
    || tokens.slice(Math.max(0, at - 5), at).some(({ word }) => SAYING.has(word))
  );
}

const OF_DEATH = new Set(['risk', 'hazard', 'mortality', 'death', 'relapse', 'recurrence']);

function upToStop(tokens: readonly Token[]): readonly Token[] {
  const stop = tokens.findIndex(
    ({ kind }) => kind === 'comma' || kind === 'close' || kind === 'open',
  );
  return stop < 0 ? tokens : tokens.slice(0, stop);
}

// higher overall survival   survival was higher
function speaksOfSurvival(tokens: readonly Token[], at: number): boolean {
  const next = upToStop(tokens.slice(at + 1, at + 9));
  if (next.some(({ word }) => SURVIVAL.has(word))) {
    return !next.some(({ word }) => OF_DEATH.has(word));
  }
  return tokens.slice(Math.max(0, at - 3), at).some(({ word }) => SURVIVAL.has(word));
}

/** How far the name of an outcome may stretch, in tokens. */
const LONG_NAME = 6;

const RATIOS = new Set([
  'ratio', 'ratios', 'rr', 'or', 'hr', 'ors', 'hrs', 'rrs', 'risk', 'risks', 'odds',
]);

/**
 * Whether a word belongs to the name of the outcome.
 *
 * ```
 * more likely to have a lower income   the risk of reduced growth   the RR for a 50% reduction was
 *                       ^^^^^                      ^^^^^^^                         ^^^^^^^^^
 * ```
 */
function isOutcome(tokens: readonly Token[], at: number): boolean {
  if (tokens[at + 1]?.word === 'likely') return false;
  for (let index = at - 1; index > 0; index--) {
    const { word } = tokens[index] as Token;
    if (isVerb(tokens, index)) return false;
    if (word === 'to' && tokens[index - 1]?.word === 'likely') return true;
    const before = tokens[index - 1]?.word ?? '';
    if (word === 'as' && before === 'defined') return true;
    if (word === 'by' && before === 'predicted') return true;
    if (at - index > LONG_NAME) continue;
    if (word === 'of' && QUANTITIES.has(before)) return true;
    if (word === 'for' && RATIOS.has(before)) return true;
  }
  return false;
}

// a significantly lower adjusted risk   the risk of relapse was lower
function isOfQuantity(tokens: readonly Token[], at: number): boolean {
  const isNamed = ({ word }: Token) => QUANTITIES.has(word) || word === 'likely';
  if (upToStop(tokens.slice(at + 1, at + 5)).some(isNamed)) return true;
  return (
    tokens.slice(Math.max(0, at - 8), at).some(isNamed)
    && hasVerb(tokens.slice(Math.max(0, at - 3), at))
  );
}

const STEPWISE = new Set(['increasing', 'decreasing']);

const ADJECTIVES = new Set([
  'higher', 'lower', 'greater', 'increased', 'decreased', 'reduced', 'elevated', 'fewer', 'lesser',
]);

function isAdjective(tokens: readonly Token[], at: number): boolean {
  return ADJECTIVES.has((tokens[at] as Token).word);
}

// twice as likely   1.6 times the odds   halved
function bySize(tokens: readonly Token[]): SaidOfDirection | undefined {
  const size = sizeIn(tokens);
  if (size === undefined || size.factor === 1) return undefined;
  return { direction: size.factor > 1 ? 'up' : 'down', span: size.span };
}
