import type { PrintedValue } from './rounding.ts';

/** The slips of hand and eye that turn one number into another. */
export type Slip =
  | 'limits swapped'
  | 'digits transposed'
  | 'digit changed'
  | 'point moved'
  | 'digit doubled'
  | 'digit lost'
  | 'sign lost';

/** What a number may have been before one slip. */
export interface Undone {
  readonly slip: Slip;
  readonly text: string;
  readonly value: PrintedValue;
}

const DIGITS = [...'0123456789'];

/** The digits of a printed number in plain notation: value 0.7, decimals 2 is "0.70". */
export function digitsOf({ value, decimals }: PrintedValue): string | undefined {
  if (!Number.isFinite(value) || decimals < 0 || decimals > 20) return undefined;
  const text = value.toFixed(decimals);
  return text.includes('e') ? undefined : text;
}

/** A number in plain notation as value and decimals: "0.70" is 0.7 with 2. */
export function plainNumber(text: string): PrintedValue {
  const point = text.indexOf('.');
  return { value: Number(text), decimals: point < 0 ? 0 : text.length - point - 1 };
}

/**
 * Every number that one slip turns into the printed one, each once, under the
 * likeliest slip that does it: "2.57" may have been "2.75" (digits transposed), "2.54"
 * (digit changed), "25.7" (point moved), "23.57" (digit lost), … At most about 30 a digit.
 */
export function undoneSlips(printed: PrintedValue): readonly Undone[] {
  const text = digitsOf(printed);
  if (text === undefined) return [];
  const seen = new Set([text]);
  const undone: Undone[] = [];
  for (const [slip, undo] of SLIPS) {
    for (const candidate of undo(text)) {
      if (seen.has(candidate) || !isWritten(candidate)) continue;
      seen.add(candidate);
      undone.push({ slip, text: candidate, value: plainNumber(candidate) });
    }
  }
  return undone;
}

/** As numbers are written: no leading zero before digits, a digit on both sides of a point. */
function isWritten(text: string): boolean {
  return /^-?(0|[1-9]\d*)(\.\d+)?$/.test(text);
}

const SLIPS: readonly (readonly [Slip, (text: string) => readonly string[]])[] = [
  ['digits transposed', transposed],
  ['digit changed', changed],
  ['digit doubled', undoubled],
  ['point moved', pointMoved],
  ['digit lost', restored],
  ['sign lost', (text) => [text.startsWith('-') ? text.slice(1) : `-${text}`]],
];

/** Neighbouring digits exchanged, also across the point. */
function transposed(text: string): readonly string[] {
  const places = digitPlaces(text);
  return places.slice(1).map((place, i) => {
    const before = places[i] as number;
    const characters = [...text];
    [characters[before], characters[place]] = [text.charAt(place), text.charAt(before)];
    return characters.join('');
  });
}

function changed(text: string): readonly string[] {
  return digitPlaces(text).flatMap((place) =>
    DIGITS.map((digit) => text.slice(0, place) + digit + text.slice(place + 1)));
}

/** One of two equal neighbouring digits taken away. */
function undoubled(text: string): readonly string[] {
  return digitPlaces(text)
    .filter((place) => text[place] === text[place + 1])
    .map((place) => text.slice(0, place) + text.slice(place + 1));
}

/** The point one or two places to the left or right, all digits kept. */
function pointMoved(text: string): readonly string[] {
  const { value, decimals } = plainNumber(text);
  return [1, -1, 2, -2]
    .filter((places) => decimals + places >= 0 && decimals + places <= 20)
    .map((places) => Number(`${value}e${-places}`).toFixed(decimals + places));
}

/** A digit put back anywhere. */
function restored(text: string): readonly string[] {
  const start = text.startsWith('-') ? 1 : 0;
  const gaps = Array.from({ length: text.length + 1 - start }, (_, i) => i + start);
  return gaps.flatMap((gap) => DIGITS.map((digit) => text.slice(0, gap) + digit + text.slice(gap)));
}

function digitPlaces(text: string): readonly number[] {
  return [...text].flatMap((character, place) => (DIGITS.includes(character) ? [place] : []));
}
