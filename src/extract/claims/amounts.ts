import type { Token } from '../token.ts';

const COMPARED = new Set([
  'likely', 'frequent', 'frequently', 'often', 'common', 'commonly', 'prone', 'probable',
  'prevalent', 'susceptible',
]);

/** Before these, a word that compares tells how strong an effect is, not which way it points. */
const EFFECTS = new Set([
  'effect', 'effects', 'benefit', 'benefits', 'efficacy', 'reduction', 'reductions', 'decrease',
  'increase', 'protection', 'improvement',
]);

const STEPS = new Set(['per', 'each', 'every', 'unit', 'sd', 'decile', 'quartile', 'quintile']);

/**
 * Whether a word that compares tells of an amount, or of who is compared, and not
 * of an effect.
 *
 * ```
 * more than 3 cups   40 years or older   two or more   per unit increase   decreased from 1.48 to
 * ^^^^                        ^^         ^^^^^^^^^^^            ^^^^^^^^   ^^^^^^^^^
 * ```
 */
export function isOfAmount(tokens: readonly Token[], at: number): boolean {
  const { word } = tokens[at] as Token;
  const [before, next] = [tokens[at - 1], tokens[at + 1]];
  if (word === 'more' || word === 'less') return !COMPARED.has(next?.word ?? '');
  if (next?.word === 'from' || before?.word === 'or') return true;
  if (next?.word === 'than' && tokens[at + 2]?.kind === 'number') return true;
  if (next?.kind === 'dash' && !next.spaced) return true;
  const isAdjective = !EFFECTS.has(word);
  if (isAdjective && tokens.slice(at + 1, at + 4).some((other) => EFFECTS.has(other.word)))
    return true;
  return word.startsWith('increase') || word.startsWith('decrease') || word === 'higher'
    ? isStep(tokens, at)
    : false;
}

// per unit increase   each 10-year increase   a 1-year increase   but not: a 59% increase
function isStep(tokens: readonly Token[], at: number): boolean {
  const before = tokens.slice(Math.max(0, at - 5), at);
  if (before.some(({ word }) => STEPS.has(word))) return true;
  const [number, dash, unit] = tokens.slice(Math.max(0, at - 3), at);
  return number?.kind === 'number' && dash?.kind === 'dash' && unit?.word !== 'fold';
}
