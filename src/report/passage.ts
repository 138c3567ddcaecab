import {
  contains, cover, type Flag, indexAt, type Manuscript, type Span,
} from '../model/index.ts';

/** A stretch of text to quote, with the numbers in question in it. */
export interface Passage {
  readonly span: Span;
  readonly marks: readonly Span[];
  /** Whether the quotation begins or ends within a sentence. */
  readonly cutBefore: boolean;
  readonly cutAfter: boolean;
}

/** What is in question at most, in characters, before a passage is split at its marks. */
const LONGEST_ANCHOR = 400;
const BEFORE = 160;
const AFTER = 110;
const MOST_PASSAGES = 4;

/**
 * What to quote of the manuscript for a flag: the words it is about with the
 * rest of their sentence, then each further place that it marks (the abstract's
 * number, where the table's is in question).
 */
export function passagesOf(manuscript: Manuscript, flag: Flag): readonly Passage[] {
  const anchors = anchorsOf(flag);
  const passages: Passage[] = [];
  for (const anchor of anchors) {
    if (passages.length === MOST_PASSAGES) break;
    if (passages.some(({ span }) => contains(span, anchor))) continue;
    passages.push(passageAround(manuscript, anchor, flag.marks));
  }
  return passages;
}

function anchorsOf({ span, marks }: Flag): readonly Span[] {
  const [first] = marks;
  const whole = span.end - span.start <= LONGEST_ANCHOR || first === undefined ? span : first;
  return [{ start: whole.start, end: Math.min(whole.end, whole.start + LONGEST_ANCHOR) }, ...marks];
}

function passageAround(
  { text, blocks }: Manuscript, anchor: Span, marks: readonly Span[],
): Passage {
  const block = blocks[indexAt(blocks, anchor.start)];
  // A table's cells are no sentence: there only the words themselves are quoted.
  const whole = block === undefined || block.kind === 'table' ? anchor : cover(anchor, block.span);
  const start = sentenceStart(text, whole.start, anchor.start);
  const end = sentenceEnd(text, anchor.end, Math.min(whole.end, text.length));
  const span = { start: start.offset, end: end.offset };
  return {
    span,
    marks: marks.filter((mark) => contains(span, mark)),
    cutBefore: start.cut,
    cutAfter: end.cut,
  };
}

interface Edge {
  readonly offset: number;
  /** Whether the sentence goes on beyond this edge. */
  readonly cut: boolean;
}

// … was seen. The odds ratio was 1.59
//             ^ the sentence that the words stand in starts here
function sentenceStart(text: string, blockStart: number, anchor: number): Edge {
  const from = Math.max(blockStart, anchor - BEFORE);
  const before = text.slice(from, anchor);
  const ends = [...before.matchAll(/[.!?]["'”’)\]]*\s+(?=[\p{Lu}"“(])/gu)].at(-1);
  if (ends !== undefined) return { offset: from + ends.index + ends[0].length, cut: false };
  if (from === blockStart) return { offset: from, cut: false };
  const space = before.search(/\s/);
  return { offset: space < 0 ? anchor : from + space + 1, cut: true };
}

// 1.59 (95% CI 1.05 to 2.41). Among women
//                           ^ and ends here
function sentenceEnd(text: string, anchor: number, blockEnd: number): Edge {
  const to = Math.min(blockEnd, anchor + AFTER);
  const after = text.slice(anchor, to);
  const end = /[.!?]["'”’)\]]*(?=\s+[\p{Lu}"“(])/u.exec(after);
  if (end !== null) return { offset: anchor + end.index + end[0].length, cut: false };
  if (to === blockEnd) return { offset: to, cut: false };
  const space = after.search(/\s\S*$/);
  return { offset: space < 0 ? anchor : anchor + space, cut: true };
}
