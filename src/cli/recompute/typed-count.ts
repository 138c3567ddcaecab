import { InputProblem, quoted } from './input-problem.ts';
import { countOf, oneNumber, type Typed } from './typed-number.ts';

/** Events and total of a group, and the percentage where one was typed beside them. */
export interface TypedCount {
  readonly events: number;
  readonly total: number;
  readonly percent?: Typed;
}

// 45/120   45 of 120   1,234 / 10,080 (12.2%)   45 (37.5%) of 120
const NUMBER = '\\d[\\d,.\\u00a0\\u2009\\u202f]*';
const PERCENT = '\\(?\\s*([\\d.,·]+)\\s*%\\s*\\)?';
const COUNT = new RegExp(
  `(${NUMBER})\\s*(?:${PERCENT})?\\s*(?:/|⁄|∕|out of|of)\\s*(${NUMBER})\\s*(?:${PERCENT})?`, 'giu');

/** Every count with its total in the typed words, in order; words between them are passed over. */
export function countsIn(words: readonly string[]): readonly TypedCount[] {
  const text = words.join(' ');
  return [...text.matchAll(COUNT)].map(([whole, events = '', before, total = '', after]) => {
    const percent = after ?? before;
    const count = {
      events: countOf('number of events', bare(events)), total: countOf('total', bare(total)),
      ...(percent === undefined ? {} : { percent: oneNumber('percentage', `${percent}%`) }),
    };
    if (count.total > 0 && count.events <= count.total) return count;
    throw new InputProblem(`${quoted(whole.trim())} is not possible: type the events first, then `
      + 'all people of the group, such as 45/120.');
  });
}

function bare(number: string): string {
  return number.replace(/[,.]+$/, '');
}
