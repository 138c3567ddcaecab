import type { Span, SpokenScale } from '../../model/index.ts';
import type { Token } from '../token.ts';

/** The quantity that a clause speaks of, with the word that names it. */
export interface SaidOfScale {
  readonly scale: SpokenScale;
  readonly span: Span;
}

const SCALES: Readonly<Record<string, SpokenScale>> = {
  risk: 'risk',
  risks: 'risk',
  likely: 'risk',
  likelihood: 'risk',
  probability: 'risk',
  chance: 'risk',
  chances: 'risk',
  odds: 'odds',
  hazard: 'hazard',
  hazards: 'hazard',
  rate: 'rate',
  rates: 'rate',
  incidence: 'rate',
  prevalence: 'prevalence',
  likelier: 'risk',
};

const NOT_A_QUANTITY = new Set([
  'factor', 'factors', 'score', 'scores', 'group', 'groups', 'ratio', 'ratios', 'stratification',
  'assessment', 'model', 'models', 'reduction', 'difference', 'set', 'ratings',
]);

/** Whether a word names a quantity that an effect may be of: "odds", "likely". */
export function namesScale(word: string): boolean {
  return Object.hasOwn(SCALES, word);
}

/** Before "risk" or "rate" these make a group, a measure or a reading of the body. */
const NOT_OF_OUTCOMES = new Set([
  'at', 'high', 'low', 'relative', 'heart', 'respiratory', 'filtration', 'pulse', 'metabolic',
  'sedimentation', 'flow', 'exchange', 'intermediate',
]);

/**
 * Whether a clause speaks of odds, hazards, rates or risks; the names of measures
 * ("relative risk", "odds ratio") say nothing of that.
 */
export function scaleIn(tokens: readonly Token[]): SaidOfScale | undefined {
  for (let at = tokens.length - 1; at >= 0; at--) {
    const { word, span } = tokens[at] as Token;
    if (!namesScale(word)) continue;
    const before = tokens[at - 1];
    const label = before?.kind === 'dash' ? tokens[at - 2]?.word : before?.word;
    if (NOT_A_QUANTITY.has(tokens[at + 1]?.word ?? '')) continue;
    if (NOT_OF_OUTCOMES.has(label ?? '')) continue;
    return { scale: SCALES[word] as SpokenScale, span };
  }
  return undefined;
}
