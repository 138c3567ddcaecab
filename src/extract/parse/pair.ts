import { cover, type Printed, type Span } from '../../model/index.ts';
import type { Item } from './item.ts';

/** Two numbers that may be the limits of an interval, by what stands between them. */
export interface Pair {
  readonly lower: Printed;
  readonly upper: Printed;
  /** A dash or "to" makes a range wherever it stands; a comma only within a bracket. */
  readonly joint: 'range' | 'list';
  /** The index of the first item of the pair, and of the first after it. */
  readonly start: number;
  readonly end: number;
  readonly span: Span;
}

const RANGE_WORDS = new Set(['to', 'through', 'until', 'up']);

/**
 * The pair of numbers that begins at item `at`.
 *
 * ```
 * 0.58–0.90   0.58 to 0.90   1.27, to 5.76   0% -- 65.2%   0.58, 0.90   1.6 and 72.6
 * ```
 */
export function pairAt(items: readonly Item[], at: number): Pair | undefined {
  const first = items[at];
  if (first?.kind !== 'number') return undefined;
  const joint = jointAt(items, at + 1);
  const second = joint === undefined ? undefined : items[joint.end];
  if (joint === undefined || second?.kind !== 'number') return undefined;
  return {
    lower: first.printed,
    upper: second.printed,
    joint: joint.kind,
    start: at,
    end: joint.end + 1,
    span: cover(first.printed.span, second.printed.span),
  };
}

interface Joint {
  readonly kind: Pair['joint'];
  readonly end: number;
}

function jointAt(items: readonly Item[], at: number): Joint | undefined {
  let next = at;
  let kind: Pair['joint'] | undefined;
  for (; next < at + 3; next++) {
    const item = items[next];
    if (item?.kind === 'dash' || isWord(item, RANGE_WORDS)) kind = 'range';
    else if (item?.kind === 'comma' || item?.kind === 'semicolon' || isWord(item, AND)) {
      kind ??= 'list';
    } else break;
  }
  return kind === undefined ? undefined : { kind, end: next };
}

const AND = new Set(['and']);

function isWord(item: Item | undefined, words: ReadonlySet<string>): boolean {
  return item?.kind === 'word' && words.has(item.word);
}
