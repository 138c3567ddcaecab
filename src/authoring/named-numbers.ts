import {
  contains,
  indexAt,
  type Printed,
  type Range,
  type Reading,
  type Span,
} from '../model/index.ts';
import { absence, isAbsence, type Maybe } from '../stats/absence.ts';
import { heterogeneityOfRange } from '../stats/heterogeneity.ts';
import { quotients } from '../stats/ratio-of-rounded.ts';
import { unrounded } from '../stats/rounding.ts';

/** A number that stands right behind its name: "sensitivity was 85%". */
export interface NamedNumber {
  readonly printed: Pick<Printed, 'plain' | 'value' | 'decimals' | 'percent' | 'span'>;
  /** From the name to the number. */
  readonly span: Span;
}

const DIGITS = String.raw`\d{1,3}(?:,\d{3})+(?!\d)|\d+(?:[.·]\d+)?|[.·]\d+`;
const NUMBER = `(?<number>[-−]?(?:${DIGITS}))(?<percent>\\s?[%％])?`;

/**
 * Every number of a stretch of text that stands behind a name, at most `gap` characters
 * without digits between them. `name` is a pattern's source, in which capitals count, since
 * “OR” is not “or”.
 */
export function namedNumbers(
  text: string,
  { start, end }: Span,
  name: string,
  gap = 24,
): readonly NamedNumber[] {
  const source = `(?:${name})[^\\d;.]{0,${gap}}?(?<![\\d.])${NUMBER}(?![\\d\\p{L}])`;
  const pattern = new RegExp(source, 'gu');
  return [...text.slice(start, end).matchAll(pattern)].map(({ 0: all, index, groups }) => {
    const digits = groups?.['number'] ?? '';
    const behind = groups?.['percent']?.length ?? 0;
    const at = start + index + all.length - behind - digits.length;
    return {
      printed: numberAt(digits, at, groups?.['percent'] !== undefined),
      span: { start: start + index, end: start + index + all.length },
    };
  });
}

/** A number as it is printed at an offset: "−0·11" is −0.11 with 2 decimals. */
export function numberAt(digits: string, at: number, percent: boolean): NamedNumber['printed'] {
  const plain = digits.replace(/,/g, '').replace('·', '.').replace('−', '-');
  const decimals = plain.split('.')[1]?.length ?? 0;
  const span = { start: at, end: at + digits.length };
  return { plain, value: Number(plain), decimals, percent, span };
}

/** What a printed number stands for on the scale of shares: "85%" and "0.85" for 0.845 to 0.855. */
export function shareOf({ percent, ...printed }: NamedNumber['printed']): Range {
  const { low, high } = unrounded(printed);
  return percent || printed.value > 1 ? { low: low / 100, high: high / 100 } : { low, high };
}

/**
 * The number nearest to a stretch, at most `reach` characters away from it. The numbers are
 * in the order in which they stand.
 */
export function nearest(
  numbers: readonly NamedNumber[],
  { start, end }: Span,
  reach: number,
): NamedNumber | undefined {
  const distance = ({ span }: NamedNumber): number =>
    Math.max(0, start - span.end, span.start - end);
  const at = indexAt(numbers, start);
  return numbers.slice(Math.max(0, at), at + 2)
    .filter((number) => distance(number) <= reach)
    .sort((one, other) => distance(one) - distance(other))[0];
}

/** The last of the numbers that ends before an offset. */
export function lastBefore(
  numbers: readonly NamedNumber[],
  offset: number,
): NamedNumber | undefined {
  return numbers.slice(Math.max(0, indexAt(numbers, offset) - 1), indexAt(numbers, offset) + 1)
    .findLast(({ span }) => span.end <= offset);
}

/** The first of the numbers that starts at an offset or behind it. */
export function firstBehind(
  numbers: readonly NamedNumber[],
  offset: number,
): NamedNumber | undefined {
  return numbers[indexAt(numbers, offset - 1) + 1];
}

/** The stretches of prose in which rules look for numbers that stand together. */
export function passages({ manuscript }: Reading): readonly Span[] {
  return manuscript.blocks
    .filter(({ kind, section }) => PROSE.has(kind) && section.role !== 'references')
    .map(({ span }) => span);
}

const PROSE: ReadonlySet<string> = new Set(['paragraph', 'caption', 'note', 'figure']);

/** Whether two spans stand in one block. */
export function inOneBlock({ manuscript: { blocks } }: Reading, one: Span, other: Span): boolean {
  const block = blocks[indexAt(blocks, one.start)];
  return block !== undefined && contains(block.span, other);
}

/** A range divided by another: see `quotients`. Nothing where it has no end. */
export function divided(numerator: Range, denominator: Range): Range | undefined {
  const found = quotients(numerator, denominator);
  return isAbsence(found) || found.high === Infinity ? undefined : found;
}

/** I² in percent from what Q stands for, and its degrees of freedom: see `heterogeneityOfRange`. */
export function iSquaredOf(q: Range, degreesOfFreedom: number): Maybe<Range> {
  if (degreesOfFreedom < 1) return absence('it takes two studies');
  const found = heterogeneityOfRange(q, degreesOfFreedom + 1);
  return isAbsence(found) ? found : found.iSquared;
}
