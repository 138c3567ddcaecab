import type { Printed } from '../model/index.ts';
import { CharacterClass, classAt, superscriptDigit } from './characters.ts';

/** How a document writes its numbers, decided once for the whole of it. */
export interface NumberStyle {
  /** Whether "0,72" is a decimal fraction. */
  readonly decimalComma: boolean;
  /** Whether it is a table's cell that is read, which holds numbers and no sentences. */
  readonly cell?: boolean;
}

/** Whether a number can begin at `at`: a digit, or a decimal point with a digit after it. */
export function startsNumber(text: string, at: number): boolean {
  const kind = classAt(text, at);
  if (kind === CharacterClass.digit) return true;
  return kind === CharacterClass.point && isDigit(text, at + 1);
}

/** What tells how a number is to be read, beside its own characters. */
export interface NumberContext {
  readonly text: string;
  /** Reading stops here: at the end of the block, or where a raised mark begins. */
  readonly limit: number;
  readonly style: NumberStyle;
  /** Whether a power of ten may stand without a mantissa, as after "P <": "10⁻⁵", "10-5". */
  readonly barePower: boolean;
  /** Whether a space may have crept in behind the decimal point, as after "RR": "1. 71". A lone zero ("0. 99") needs no such leave. */
  readonly split: boolean;
  /** Whether a plain space may part thousands, as in a total: "151/10 080", "of 10 080". */
  readonly spacedThousands: boolean;
  /** Whether the number before has two decimals and asks for a partner that has too. */
  readonly stray: boolean;
}

/**
 * The number whose sign, if it has one, stands at `start` and whose digits begin
 * at `digits`.
 *
 * ```
 * 1,234   0·72   .05   1.2×10⁻⁵   3.39E8   12 345 (thin space)
 * ```
 */
export function scanNumber(context: NumberContext, start: number, digits: number): Printed {
  const { text, limit } = context;
  const whole = endOfWhole(context, digits);
  const fraction = startOfFraction(context, whole);
  const mantissaEnd = fraction === undefined ? whole : endOfDigits(text, fraction, limit);
  const ten = context.barePower && text.slice(digits, mantissaEnd) === '10';
  const power = ten ? exponentAt(text, mantissaEnd) : powerAt(text, mantissaEnd, limit);
  const end = power?.end ?? mantissaEnd;
  const exponent = power?.exponent ?? 0;
  const integer = text.slice(digits, whole).replace(/\D/g, '');
  const mantissa = ten && power !== undefined
    ? '1'
    : fraction === undefined ? integer : `${integer}.${text.slice(fraction, mantissaEnd)}`;
  const sign = start < digits ? '-' : '';
  const plain = `${sign}${mantissa}${power === undefined ? '' : `e${exponent}`}`;
  const decimals = (fraction === undefined ? 0 : mantissaEnd - fraction) - exponent;
  return {
    text: text.slice(start, end),
    plain,
    value: Number(plain),
    decimals,
    percent: false,
    span: { start, end },
  };
}

function isDigit(text: string, at: number): boolean {
  return classAt(text, at) === CharacterClass.digit;
}

function endOfDigits(text: string, at: number, limit: number): number {
  let end = at;
  while (end < limit && isDigit(text, end)) end++;
  return end;
}

/** Whether exactly three digits stand at `at`: the shape of a thousands group. */
function isGroup(text: string, at: number, limit: number): boolean {
  return endOfDigits(text, at, Math.min(limit, at + 4)) === at + 3;
}

const THIN_SPACES = '\u2009\u202f\u00a0\u2008\u2006\u2005';

function separatesThousands(context: NumberContext, at: number): boolean {
  const { text, style } = context;
  const character = text[at];
  if (character === undefined) return false;
  if (character === ',' || character === '，') return !style.decimalComma;
  return THIN_SPACES.includes(character) || (character === ' ' && context.spacedThousands);
}

// 1,234,567   but not 0,123   and not 12,1234
// ^^^^^^^^^
function endOfWhole(context: NumberContext, at: number): number {
  const { text, limit } = context;
  let end = endOfDigits(text, at, limit);
  if (end === at || end - at > 3 || text[at] === '0') return end;
  while (separatesThousands(context, end) && isGroup(text, end + 1, limit)) end += 4;
  return end;
}

// 2,43 (1.37–4.29)   (0.59, 1,51)   0,107   but not: (17,48)   1,234
// ^^^^                      ^^^^    ^^^^^
/**
 * Whether a comma is a decimal point that slipped in among points: one or two digits
 * stand behind it, and where it stands it can separate nothing.
 */
function isStrayComma({ text, limit, style, stray }: NumberContext, comma: number): boolean {
  const end = endOfDigits(text, comma + 1, Math.min(limit, comma + 6));
  const digits = end - comma - 1;
  const isZero = style.cell === true && text[comma - 1] === '0' && !isDigit(text, comma - 2);
  if (digits < 1 || digits > (isZero ? 4 : 2) || classAt(text, end) === CharacterClass.point) return false;
  if (stray) return digits === 2;
  if (style.cell !== true) return false;
  const next = classAt(text, end);
  const before = comma > 1 ? text.slice(Math.max(0, comma - 3), comma) : '';
  return next === CharacterClass.dash || next === CharacterClass.open || !/[(\[]/.test(before);
}

/** Where the digits behind the decimal point begin, if there is a fraction at all. */
function startOfFraction(context: NumberContext, point: number): number | undefined {
  const { text, limit, style } = context;
  const kind = classAt(text, point);
  if (kind === CharacterClass.comma && isStrayComma(context, point)) return point + 1;
  const isPoint = kind === CharacterClass.point
    || (style.decimalComma && kind === CharacterClass.comma);
  if (!isPoint || point + 1 >= limit) return undefined;
  if (isDigit(text, point + 1)) return point + 1;
  const isSplit = context.split || style.cell === true || (point > 0 && text[point - 1] === '0' && !isDigit(text, point - 2));
  if (!isSplit || text[point + 1] !== ' ' || !isDigit(text, point + 2)) return undefined;
  return point + 2;
}

interface Power {
  readonly exponent: number;
  readonly end: number;
}

// 1.2×10⁻⁵   1.2 x 10-5   1.2 × 10^−5   3.4E-05
//    ^^^^^      ^^^^^^^      ^^^^^^^^      ^^^^
function powerAt(text: string, at: number, limit: number): Power | undefined {
  const character = text.charCodeAt(at) | 0x20;
  if (character === 0x65 && at < limit) return scientificAt(text, at + 1);
  let next = skipSpaces(text, at, 2);
  const times = text[next] ?? '';
  if (!'×xX✕*·⋅'.includes(times) || times === '') return undefined;
  next = skipSpaces(text, next + 1, 2);
  if (text.slice(next, next + 2) !== '10') return undefined;
  return exponentAt(text, next + 2);
}

function scientificAt(text: string, at: number): Power | undefined {
  const signed = classAt(text, at) === CharacterClass.dash || text[at] === '+';
  const start = signed ? at + 1 : at;
  const end = endOfDigits(text, start, start + 4);
  if (end === start || end - start > 3) return undefined;
  if (classAt(text, end) === CharacterClass.letter) return undefined;
  const negative = signed && text[at] !== '+';
  return { exponent: (negative ? -1 : 1) * Number(text.slice(start, end)), end };
}

/** What follows a ten: `⁻⁵`, `^-5`, `−5`, or a raised `-5` that lost its place. */
function exponentAt(text: string, at: number): Power | undefined {
  let next = text[at] === '^' ? at + 1 : at;
  if (text[next] === '{') next++;
  next = skipSpaces(text, next, 1);
  const negative = classAt(text, next) === CharacterClass.dash;
  if (negative) next = skipSpaces(text, next + 1, 1);
  else if (text[at] !== '^' && superscriptDigit(text.charCodeAt(next)) < 0) return undefined;
  let exponent = 0;
  let end = next;
  for (; end - next < 4; end++) {
    const code = text.charCodeAt(end);
    const digit = isDigit(text, end) ? code - 0x30 : superscriptDigit(code);
    if (digit < 0) break;
    exponent = exponent * 10 + digit;
  }
  if (end === next || end - next > 3) return undefined;
  return { exponent: negative ? -exponent : exponent, end: text[end] === '}' ? end + 1 : end };
}

function skipSpaces(text: string, at: number, most: number): number {
  let next = at;
  while (next - at < most && classAt(text, next) === CharacterClass.space) next++;
  return next;
}

/**
 * How a document writes decimal fractions. A comma after a lone zero ("0,72") can
 * be nothing else; it must be seen twice, and more often than "0.72" is.
 */
export function numberStyleOf(text: string): NumberStyle {
  const commas = text.match(/(?<![\d.,·])0,\d/g)?.length ?? 0;
  const points = text.match(/(?<![\d.,·])0[.·]\d/g)?.length ?? 0;
  return { decimalComma: commas >= 2 && commas > points };
}
