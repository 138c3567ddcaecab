import type { Printed, Result } from '../../model/index.ts';
import type { ReportedNumbers } from '../../stats/reported-numbers.ts';
import { InputProblem, quoted } from './input-problem.ts';
import { numbersIn, type Typed, type TypedP } from './typed-number.ts';

/** The numbers typed of one result, with the name they go by: "OR", "MD", "ratio". */
export interface TypedResult {
  readonly name: string;
  readonly estimate?: Typed;
  readonly lower?: Typed;
  readonly upper?: Typed;
  readonly level?: number;
  readonly p?: TypedP;
}

/** What was said with options of the same result; it outdoes what the words say. */
export interface Said {
  readonly level?: number;
  readonly p?: TypedP;
  readonly measure?: string;
}

/**
 * An estimate with its limits from typed words: three numbers, or two limits written as one
 * ("1.05–2.41"), or an estimate alone. Words that hold more than numbers are read as prose.
 */
export async function typedResult(
  words: readonly string[], name: string, kind: Result['kind'], said: Said,
): Promise<TypedResult> {
  const numbers = numbersIn(words);
  const found = numbers === undefined
    ? await resultInProse(words.join(' '), name, kind) : resultOfNumbers(numbers, name);
  const { measure = found.name, ...rest } = said;
  return { ...found, ...rest, name: measure };
}

function resultOfNumbers(numbers: readonly Typed[], name: string): TypedResult {
  const [first, second, third] = numbers;
  switch (numbers.length) {
    case 1: return { name, estimate: first as Typed };
    case 2: return { name, lower: first as Typed, upper: second as Typed };
    case 3: return {
      name, estimate: first as Typed, lower: second as Typed, upper: third as Typed,
    };
    default: throw new InputProblem(`${numbers.length} numbers are typed where an estimate and `
      + 'its two limits are looked for: type them in this order, such as 1.59 1.05 2.41.');
  }
}

async function resultInProse(
  text: string, name: string, kind: Result['kind'],
): Promise<TypedResult> {
  const { findingsIn } = await import('./typed-prose.ts');
  const named = await findingsIn(text);
  const all = named.results.some((result) => result.kind === kind)
    ? named : await findingsIn(`${name} ${text}`);
  const results = all.results.filter((result) => result.kind === kind);
  const [result] = results;
  if (result === undefined || results.length > 1) {
    throw new InputProblem(`${results.length === 0 ? 'No' : 'More than one'} ${kind} was `
      + `recognised in ${quoted(text)}: type its numbers alone, such as 1.59 1.05 2.41.`);
  }
  return ofResult(result, name);
}

/** A result found in prose, as if its numbers had been typed one by one. */
export function ofResult(result: Result, name = nameOf(result)): TypedResult {
  const { interval, p } = result;
  const { level, lower, upper } = interval ?? {};
  return {
    name: nameOf(result) === '' ? name : nameOf(result),
    ...(result.estimate === undefined ? {} : { estimate: result.estimate }),
    ...(lower === undefined || upper === undefined ? {} : { lower, upper }),
    ...(level === undefined ? {} : { level }),
    ...(p === undefined ? {} : { p: typedP(p.relation, p.printed, p.oneSided) }),
  };
}

function typedP(relation: TypedP['relation'], printed: Printed, oneSided = false): TypedP {
  return { relation, printed, oneSided };
}

function nameOf(result: Result): string {
  return 'measure' in result ? result.measure : '';
}

/** The numbers in the form in which the arithmetic takes them. */
export function reportedNumbers(result: TypedResult): ReportedNumbers {
  const { estimate, lower, upper, level, p } = result;
  return {
    ...(estimate === undefined ? {} : { estimate }),
    ...(lower === undefined ? {} : { lower }),
    ...(upper === undefined ? {} : { upper }),
    ...(level === undefined ? {} : { level }),
    ...(p === undefined ? {} : { p: { ...p.printed, relation: p.relation, oneSided: p.oneSided } }),
  };
}

/** A typed number as it is read: "35.1%" for "35·1 %". */
export function numberInWords({ plain, percent }: Typed): string {
  return percent ? `${plain}%` : plain;
}

const SIGN = { '=': '=', '<': '<', '<=': '≤', '>': '>', '>=': '≥' } as const;

/** "p = 0.03", "one-sided p < 0.001". */
export function pInWords({ relation, printed, oneSided }: TypedP): string {
  return `${oneSided ? 'one-sided ' : ''}p ${SIGN[relation]} ${numberInWords(printed)}`;
}

/** The level that an interval is taken to have where none is typed, in percent. */
export const USUAL_LEVEL = 95;

/** "OR 1.59 (95% CI 1.05 to 2.41), p = 0.03". */
export function resultInWords(result: TypedResult): string {
  const { name, estimate, lower, upper, level = USUAL_LEVEL, p } = result;
  const limits = lower === undefined || upper === undefined ? ''
    : `${level}% CI ${numberInWords(lower)} to ${numberInWords(upper)}`;
  const head = [name, ...(estimate === undefined ? [limits]
    : [numberInWords(estimate), limits === '' ? '' : `(${limits})`])];
  return [head.filter((part) => part !== '').join(' '), ...(p === undefined ? [] : [pInWords(p)])]
    .join(', ');
}
