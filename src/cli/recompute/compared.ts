import type { Result } from '../../model/index.ts';
import { InputProblem, quoted } from './input-problem.ts';
import { numbersIn, type Typed } from './typed-number.ts';
import { ofResult, type Said, type TypedResult } from './typed-result.ts';

/** The words that stand between two results that are compared. */
const BETWEEN = /\s+(?:with|vs?\.?|versus|against|and)\s+/i;

/**
 * The two results to be compared: six numbers in a row, two groups of three ("0.67 (0.46–0.98)
 * with 0.88 (0.71–1.08)"), or prose that holds two ratios.
 */
export async function comparedIn(
  words: readonly string[], said: Said,
): Promise<readonly [TypedResult, TypedResult]> {
  const [one, other] = pairOfNumbers(words) ?? await pairInProse(words.join(' '));
  return [withSaid(one, said), withSaid(other, said)];
}

function withSaid(result: TypedResult, { level, measure }: Said): TypedResult {
  return {
    ...result, ...(level === undefined ? {} : { level }), name: measure ?? result.name,
  };
}

function pairOfNumbers(words: readonly string[]): readonly [TypedResult, TypedResult] | undefined {
  const parts = words.join(' ').split(BETWEEN);
  const groups = (parts.length === 2 ? parts : words.length === 2 ? words : [])
    .map((part) => numbersIn([part]));
  const [one, other] = groups;
  if (one?.length === 3 && other?.length === 3) return [ofThree(one), ofThree(other)];
  const all = numbersIn(words);
  if (all === undefined) return undefined;
  if (all.length === 6 && parts.length === 1) {
    return [ofThree(all.slice(0, 3)), ofThree(all.slice(3))];
  }
  throw new InputProblem(`${all.length} numbers are typed: type an estimate and its two limits for `
    + 'each, such as 0.67 0.46 0.98 with 0.88 0.71 1.08.');
}

function ofThree([estimate, lower, upper]: readonly Typed[]): TypedResult {
  return {
    name: 'ratio', estimate: estimate as Typed, lower: lower as Typed, upper: upper as Typed,
  };
}

async function pairInProse(text: string): Promise<readonly [TypedResult, TypedResult]> {
  const { findingsIn } = await import('./typed-prose.ts');
  const ratios = (all: readonly Result[]): readonly Result[] =>
    all.filter(({ kind }) => kind === 'ratio');
  const together = ratios((await findingsIn(text)).results);
  const apart = together.length === 2 ? together
    : ratios((await Promise.all(text.split(BETWEEN).map(findingsIn)))
      .flatMap(({ results }) => results));
  const [one, other] = apart;
  if (one !== undefined && other !== undefined && apart.length === 2) {
    return [ofResult(one, 'ratio'), ofResult(other, 'ratio')];
  }
  throw new InputProblem(`${quoted(text)} does not hold two ratios with their limits: type the `
    + 'numbers alone, such as 0.67 0.46 0.98 with 0.88 0.71 1.08.');
}
