import type { Range, Relation } from '../model/index.ts';
import { absence, type Maybe } from './absence.ts';
import { relatedValues } from './rounding.ts';

/** A number as somebody types it, with what its text says about it. */
export interface TypedNumber {
  /** In the printed unit: 35.1 for "35.1%". */
  readonly value: number;
  /** The power of ten that the last digit counts: 2 for "0.72", 6 for "1.2e-5". */
  readonly decimals: number;
  readonly percent: boolean;
  readonly relation: Relation;
}

/**
 * A plain typed number: "0.72", ".05", "0·85", "0,85", "1,234", "1 234", "−0.8", "1.2e-5",
 * "1.2 × 10⁻⁵", "1.2 x 10-5", "35.1%", "<0.001", "∞". For numbers given one at a time,
 * on a command line or in a table of checks; prose has its own lexer.
 *
 * A comma before exactly three digits groups thousands ("1,234"), unless a zero stands
 * before it; any other single comma is a decimal one.
 */
export function printedNumber(text: string): Maybe<TypedNumber> {
  const parts = PATTERN.exec(text.trim());
  if (parts === null) return absence(`"${text}" is not a number`);
  const [, relation = '', sign = '', digits = '', power = '', percent = ''] = parts;
  const plain = digits === '∞' ? digits : plainDigits(digits);
  if (plain === undefined) return absence(`"${text}" is not a number`);
  const exponent = power === '' ? 0 : Number(plainPower(power));
  const value = plain === '∞' ? Infinity : Number(`${plain}e${exponent}`);
  if (plain !== '∞' && !Number.isFinite(value)) return absence(`"${text}" is too large a number`);
  return {
    value: sign === '' || sign === '+' ? value : -value,
    decimals: decimalsOf(plain) - exponent,
    percent: percent !== '',
    relation: RELATIONS[relation.trim()] ?? '=',
  };
}

/** The values that a typed number stands for, in its printed unit: "<0.001" for up to 0.001. */
export function typedRange(typed: TypedNumber): Range {
  return relatedValues(typed.relation, typed);
}

// <  −  1 234.5  × 10⁻⁵  %
// ^  ^  ^^^^^^^  ^^^^^^  ^
const PATTERN = new RegExp(
  '^(<=|>=|[<>=≤≥‹›]?)\\s*([-+−–]?)\\s*'
    + '(∞|[\\d.,·]+(?:[ \\u00a0\\u2009\\u202f]\\d{3})*(?:[.·]\\d+)?)'
    + '(e[-+−]?\\d{1,4}|\\s*[x×·*]\\s*10\\s*\\^?\\s*[-+−⁻]?[\\d⁰¹²³⁴⁵⁶⁷⁸⁹]{1,4})?\\s*(%?)$',
  'iu',
);

const RELATIONS: Readonly<Record<string, Relation>> = {
  '': '=', '=': '=', '<': '<', '‹': '<', '>': '>', '›': '>',
  '<=': '<=', '≤': '<=', '>=': '>=', '≥': '>=',
};

const RAISED = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** Digits with an ordinary point and no grouping; nothing where the marks make no sense. */
function plainDigits(digits: string): string | undefined {
  const pointed = digits.replaceAll('·', '.').replace(/[\s\u00a0\u2009\u202f]/gu, '');
  const grouped = /^[1-9]\d{0,2}(,\d{3})+(\.\d+)?$/u.test(pointed);
  const plain = grouped ? pointed.replaceAll(',', '') : pointed.replace(',', '.');
  return /^(\d+\.?\d*|\.\d+)$/u.test(plain) ? plain : undefined;
}

/** "e-5", "× 10⁻⁵", "x 10-5" as −5. */
function plainPower(power: string): string {
  const ordinary = [...power]
    .map((mark) => (RAISED.includes(mark) ? `${RAISED.indexOf(mark)}` : mark))
    .join('')
    .replace(/[−⁻]/gu, '-');
  return ordinary.replace(/^e/iu, '').replace(/^\s*[x×·*]\s*10\s*\^?\s*/iu, '');
}

function decimalsOf(plain: string): number {
  const point = plain.indexOf('.');
  return point < 0 ? 0 : plain.length - point - 1;
}
