/**
 * A stretch of the manuscript's text: from `start` up to, not including, `end`.
 *
 * Offsets count UTF-16 code units, as `slice` does, and the text is never
 * rewritten after reading. So `text.slice(span.start, span.end)` is exactly
 * what the author printed, en dashes and all.
 */
export interface Span {
  readonly start: number;
  readonly end: number;
}

/** The words that a span covers: `quote(text, span)` is what stands on the page. */
export function quote(text: string, { start, end }: Span): string {
  return text.slice(start, end);
}

/** Whether `inner` lies wholly within `outer`; a span contains itself. */
export function contains(outer: Span, inner: Span): boolean {
  return outer.start <= inner.start && inner.end <= outer.end;
}

/** The shortest span that covers all of the given ones. */
export function cover(first: Span, ...others: readonly Span[]): Span {
  return others.reduce(
    (whole, next) => ({
      start: Math.min(whole.start, next.start),
      end: Math.max(whole.end, next.end),
    }),
    first,
  );
}

/** Something that stands somewhere in the text. */
export interface Placed {
  readonly span: Span;
}

/**
 * The index of the last item that starts at or before `offset`, or −1.
 * `sorted` is in ascending order of where its items start, as lines and blocks are.
 */
export function indexAt(sorted: readonly Placed[], offset: number): number {
  let low = 0;
  let high = sorted.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((sorted[middle] as Placed).span.start <= offset) low = middle + 1;
    else high = middle;
  }
  return low - 1;
}
