import { cover, type Printed, quote } from '../../model/index.ts';
import type { Item } from './item.ts';

const UNITS = valuesOf('zero one two three four five six seven eight nine ten eleven twelve thirteen '
  + 'fourteen fifteen sixteen seventeen eighteen nineteen', 0, 1);
const TENS = valuesOf('twenty thirty forty fifty sixty seventy eighty ninety', 20, 10);

function valuesOf(words: string, first: number, step: number): ReadonlyMap<string, number> {
  return new Map(words.split(' ').map((word, index) => [word, first + index * step]));
}

/** A count in words or digits, and the index of the first item after it. */
export interface CountNumber {
  readonly printed: Printed;
  readonly end: number;
}

/**
 * The number that words spell out at item `at`: "three", "twenty", "eighty-five".
 */
export function numberInWords(
  text: string,
  items: readonly Item[],
  at: number,
): CountNumber | undefined {
  const first = items[at];
  if (first?.kind !== 'word') return undefined;
  const unit = UNITS.get(first.word);
  if (unit !== undefined) return spelled(text, items, at, at + 1, unit);
  const ten = TENS.get(first.word);
  if (ten === undefined) return undefined;
  const rest = items[at + 2];
  const isHyphenated = items[at + 1]?.kind === 'dash' && rest?.kind === 'word';
  const digit = isHyphenated ? (UNITS.get(rest.word) ?? 0) : 0;
  const isCompound = digit > 0 && digit < 10;
  return spelled(text, items, at, isCompound ? at + 3 : at + 1, ten + (isCompound ? digit : 0));
}

function spelled(
  text: string,
  items: readonly Item[],
  at: number,
  end: number,
  value: number,
): CountNumber {
  const span = cover((items[at] as Item).span, (items[end - 1] as Item).span);
  const words = quote(text, span);
  const printed = { text: words, plain: String(value), value, decimals: 0, percent: false, span };
  return { printed, end };
}
