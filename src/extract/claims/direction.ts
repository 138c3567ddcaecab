import type { Result, Span } from '../../model/index.ts';
import type { Token } from '../token.ts';

/** The way that a clause says an effect points, with the word that says it. */
export interface SaidOfDirection {
  readonly direction: 'up' | 'down';
  readonly span: Span;
}

const UP = new Set(('increased increase increases increasing higher greater elevated raised doubled '
  + 'tripled more raises elevates excess positively worsened twofold threefold fourfold').split(' '));
const DOWN = new Set(('reduced reduction reduces reduce lower decreased decrease decreases less protective '
  + 'protected fewer halved inversely lowered declined negatively lesser').split(' '));

/** Words whose way depends on what they are said of: longer survival is a lower hazard. */
const GOOD = new Set(['longer', 'improved', 'improves', 'prolonged', 'better', 'improvement', 'superior']);
const BAD = new Set(['shorter', 'worse', 'poorer', 'poor', 'inferior', 'adverse']);
const SURVIVAL = new Set(['survival', 'pfs', 'os', 'dfs', 'efs', 'prognosis']);

/** The direction that a clause asserts of a result; the word nearest its end decides. */
export function directionIn(
  tokens: readonly Token[],
  result: Result,
): SaidOfDirection | undefined {
  const isHazard = result.kind === 'ratio' && result.measure.endsWith('HR');
  for (let at = tokens.length - 1; at >= 0; at--) {
    const { word, span } = tokens[at] as Token;
    if (word === 'factor' || word === 'factors') {
      if (tokens[at - 1]?.word === 'risk') return { direction: 'up', span };
    }
    if (isHazard && (GOOD.has(word) || BAD.has(word)) && tokens.some((t) => SURVIVAL.has(t.word))) {
      return { direction: GOOD.has(word) ? 'down' : 'up', span };
    }
    if ((UP.has(word) || DOWN.has(word)) && !isComparator(tokens, at)) {
      return { direction: UP.has(word) ? 'up' : 'down', span };
    }
  }
  return undefined;
}

// more than 3 cups   less than 50 years: a size, not a direction
function isComparator(tokens: readonly Token[], at: number): boolean {
  const next = tokens[at + 1];
  return next?.word === 'than' && tokens[at + 2]?.kind === 'number';
}
