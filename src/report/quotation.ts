import type { Manuscript, Span } from '../model/index.ts';
import { harmless } from './harmless.ts';
import type { Ink } from './ink.ts';
import type { Passage } from './passage.ts';
import { cut, widthOf } from './wrap.ts';

/** How a quotation is set: its width, its signs, and what it is drawn with. */
export interface QuotationStyle {
  readonly width: number;
  readonly quotes: readonly [string, string];
  readonly ellipsis: string;
  /** What stands below each column of a marked number; "" for no line below. */
  readonly underline: string;
  readonly ink: Ink;
}

/** Characters that stand together, and whether they are in question. */
interface Fragment {
  readonly text: string;
  readonly marked: boolean;
}

/** What stands between two spaces; a mark may begin or end within it. */
type Word = readonly Fragment[];

/**
 * A passage in quotation marks, wrapped, with a line under each number in
 * question:
 *
 *     “The hazard ratio was 0.72 (95% CI 0.75 to 0.98).”
 *                           ‾‾‾‾         ‾‾‾‾
 */
export function quotation(
  { text }: Manuscript, passage: Passage, style: QuotationStyle,
): readonly string[] {
  const words = wordsOf(fragmentsOf(text, passage, style));
  return linesOf(words, style.width).flatMap((line) => [
    line.map((word) => inkOf(word, style.ink)).join(' '),
    ...underlineOf(line, style.underline),
  ]);
}

function fragmentsOf(text: string, passage: Passage, style: QuotationStyle): readonly Fragment[] {
  const [open, close] = style.quotes;
  const plain = (words: string): Fragment => ({ text: words, marked: false });
  const pieces: Fragment[] = [plain(open + (passage.cutBefore ? `${style.ellipsis} ` : ''))];
  let from = passage.span.start;
  for (const { start, end } of apart(passage.marks)) {
    pieces.push(plain(text.slice(from, start)), { text: text.slice(start, end), marked: true });
    from = end;
  }
  pieces.push(plain(text.slice(from, passage.span.end).trimEnd()));
  pieces.push(plain((passage.cutAfter ? ` ${style.ellipsis}` : '') + close));
  return pieces.map((piece) => ({ ...piece, text: harmless(piece.text) }));
}

/** The marks in reading order, those that touch or overlap made one. */
function apart(marks: readonly Span[]): readonly Span[] {
  const joined: Span[] = [];
  for (const mark of [...marks].sort((one, other) => one.start - other.start)) {
    const last = joined.at(-1);
    if (last === undefined || last.end < mark.start) joined.push(mark);
    else joined[joined.length - 1] = { start: last.start, end: Math.max(last.end, mark.end) };
  }
  return joined;
}

function wordsOf(fragments: readonly Fragment[]): readonly Word[] {
  const words: Fragment[][] = [[]];
  for (const { text, marked } of fragments) {
    text.split(' ').forEach((part, index) => {
      if (index > 0) words.push([]);
      if (part !== '') words.at(-1)?.push({ text: part, marked });
    });
  }
  return words.filter((word) => word.length > 0);
}

function linesOf(words: readonly Word[], width: number): readonly (readonly Word[])[] {
  const lines: Word[][] = [];
  let left = 0;
  for (const word of words.flatMap((long) => cutWord(long, width))) {
    const needed = widthOfWord(word);
    if (lines.length === 0 || needed + 1 > left) {
      lines.push([word]);
      left = width - needed;
    } else {
      lines.at(-1)?.push(word);
      left -= needed + 1;
    }
  }
  return lines;
}

function widthOfWord(word: Word): number {
  return word.reduce((sum, { text }) => sum + widthOf(text), 0);
}

/** A word that is longer than the line loses its unity: each part of it may begin a line. */
function cutWord(word: Word, width: number): readonly Word[] {
  if (widthOfWord(word) <= width) return [word];
  return word.flatMap(({ text, marked }) =>
    cut(text, width).map((part): Word => [{ text: part, marked }]));
}

function inkOf(word: Word, ink: Ink): string {
  return word.map(({ text, marked }) => (marked ? ink.marked(text) : text)).join('');
}

function underlineOf(line: readonly Word[], sign: string): readonly string[] {
  if (sign === '' || !line.some((word) => word.some(({ marked }) => marked))) return [];
  const below = line.map((word) => word
    .map(({ text, marked }) => (marked ? sign : ' ').repeat(widthOf(text)))
    .join(''));
  return [below.join(' ').trimEnd()];
}
