import type { Span } from '../../model/index.ts';

const ENDING = /\r\n|[\n\r\u2028\u2029]/g;

/** The spans of a text's lines, without their endings; blank lines are lines too. */
export function sourceLines(text: string): readonly Span[] {
  const spans: Span[] = [];
  let start = 0;
  for (const ending of text.matchAll(ENDING)) {
    spans.push({ start, end: ending.index });
    start = ending.index + ending[0].length;
  }
  if (start < text.length) spans.push({ start, end: text.length });
  return spans;
}
