import type { Printed, Relation } from '../../model/index.ts';
import { isAbsence } from '../../stats/absence.ts';
import { multiplier } from '../../stats/normal.ts';
import { printedNumber, type TypedNumber } from '../../stats/printed-text.ts';
import { probabilitiesBehind } from '../../stats/rounding.ts';
import { digitsOf } from '../../stats/slip.ts';
import { InputProblem, quoted } from './input-problem.ts';

/** A number that somebody typed as it is printed: what `Printed` holds, without a place. */
export type Typed = Pick<Printed, 'plain' | 'value' | 'decimals' | 'percent'>;

/** A p-value as typed: "0.03", "<0.001", "P = .03". */
export interface TypedP {
  readonly relation: Relation;
  readonly printed: Typed;
  readonly oneSided: boolean;
}

/** Strokes that stand between two numbers, or before a negative one. */
const DASH = '[-‐‑‒–—−~～]';

/** What may stand between typed numbers and says nothing by itself. */
const BETWEEN = new RegExp(`^(?:to|and|${DASH}|[,;:/])$`, 'i');

/** Letters other than the one in "1.2e-5" or "1.2x10-5". */
const HAS_WORDS = /(?<![\d.])\p{L}|\p{L}{2}/u;

/** "1.2 × 10⁻⁵" is one number, whatever the spaces in it. */
const SPACED_POWER = /\s*[x×]\s*10\s*\^?\s*(?=[-+−⁻\d⁰¹²³⁴⁵⁶⁷⁸⁹])/gi;

/**
 * All numbers of some typed words, as printed ones are set: "1.59 (1.05–2.41)", "0·72",
 * "-0.9--0.1", "1,05 – 2,41". Nothing where they hold something else than numbers.
 */
export function numbersIn(words: readonly string[]): readonly Typed[] | undefined {
  const pieces = words.join(' ').replace(SPACED_POWER, '×10').split(/[\s;:()[\]{}"“”]+/)
    .map((piece) => piece.replace(/^,+|,+$/g, ''))
    .filter((piece) => piece !== '' && !BETWEEN.test(piece));
  if (pieces.some((piece) => HAS_WORDS.test(piece))) return undefined;
  const numbers = pieces.map(numbersInPiece);
  return numbers.some((found) => found === undefined)
    ? undefined : (numbers as readonly (readonly Typed[])[]).flat();
}

function numbersInPiece(piece: string): readonly Typed[] | undefined {
  const whole = numberOf(piece);
  if (whole !== undefined) return [whole];
  const numbers = piece.split(BETWEEN_DIGITS).flatMap(partedByCommas).map(numberOf);
  return numbers.includes(undefined) ? undefined : numbers as readonly Typed[];
}

/** A stroke behind a digit parts two numbers: "1.05–2.41", "-0.9--0.1", not "1.2e-5". */
const BETWEEN_DIGITS = new RegExp(`(?<=[\\d%])${DASH}(?=[-–−+]?[\\d.·,∞])`);

/** Among numbers with points a comma parts: "1.05,2.41". */
function partedByCommas(part: string): readonly string[] {
  return /\d[.·]\d/.test(part) ? part.split(',') : [part];
}

function numberOf(text: string): Typed | undefined {
  const found = printedNumber(text);
  if (isAbsence(found)) return undefined;
  if (found.relation !== '=') {
    throw new InputProblem(`${quoted(text)} says < or >, which only a p-value may: give it as `
      + `--p "${text}".`);
  }
  if (/^[-+−–]?[1-9]\d{0,2},\d{3}%?$/.test(text)) {
    throw new InputProblem(`${quoted(text)} may be ${text.replace(',', '.')} or `
      + `${text.replace(',', '')}: type it with a point, or without the comma.`);
  }
  return typed(found);
}

function typed(number: TypedNumber): Typed {
  const { value, decimals, percent } = number;
  const plain = digitsOf(number) ?? `${value}`.replace('Infinity', '∞');
  return { value, decimals, percent, plain };
}

/** One number, called by `name` where it is none. */
export function oneNumber(name: string, text: string): Typed {
  const numbers = numbersIn([text]) ?? [];
  const [number] = numbers;
  if (number !== undefined && numbers.length === 1) return finite(name, number);
  throw new InputProblem(`The ${name} ${quoted(text)} is not a number: type it as printed, `
    + 'such as 0.46.');
}

/** The number, unless it is infinite: only a limit may be. */
export function finite(name: string, number: Typed): Typed {
  if (Number.isFinite(number.value)) return number;
  throw new InputProblem(`The ${name} cannot be infinite; only a limit may be. Type the ${name} as `
    + 'printed.');
}

/** A p-value as printed: "0.03", "<0.001", "P = ·03", "p≤0,05". */
export function pValueOf(text: string, oneSided: boolean): TypedP {
  const bare = text.trim().replace(/^p(?:\s*-?\s*values?)?\s*(?==|[<>≤≥‹›.\d·,])\s*/i, '');
  const found = printedNumber(bare);
  if (isAbsence(found)) {
    throw new InputProblem(`The p-value ${quoted(text)} is not a number: type it as printed, such `
      + 'as --p 0.03 or --p "<0.001" (with quotation marks).');
  }
  const { relation } = found;
  const printed = found.percent
    ? { ...found, value: found.value / 100, decimals: found.decimals + 2, percent: false } : found;
  if (isAbsence(probabilitiesBehind(relation, printed))) {
    throw new InputProblem(`A p-value lies between 0 and 1, and ${quoted(text)} does not.`);
  }
  return { relation, printed: typed(printed), oneSided };
}

/** A level of confidence in percent: "95", "99%", "97.5". */
export function levelOf(text: string): number {
  const found = printedNumber(text);
  const level = isAbsence(found) || found.relation !== '=' ? Number.NaN : found.value;
  if (!isAbsence(multiplier(level))) return level;
  throw new InputProblem(`The level ${quoted(text)} is not one from 50 to below 100: type it in `
    + 'percent, such as --level 95.');
}

/** A whole number of people: "120", "1,234", "10 080". */
export function countOf(name: string, text: string): number {
  const found = printedNumber(text);
  const count = isAbsence(found) || found.relation !== '=' || found.percent
    ? Number.NaN : found.value;
  if (Number.isInteger(count) && count >= 0 && count <= 1e10) return count;
  throw new InputProblem(`The ${name} ${quoted(text)} is no count: type a whole number, such as `
    + '120.');
}
