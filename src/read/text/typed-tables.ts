import type { Piece } from '../grid.ts';
import type { Span } from '../../model/index.ts';

/** How a line of typed text is laid out in columns, if it is. */
export type Layout = 'tabs' | 'spaces' | 'none';

// Age group    12 (10.1)    1.40 (0.90–2.18)
//          ^^^^         ^^^^ but not the two spaces after a full stop
const GAP = / {3,}|(?<![.!?:;,]) {2}(?=\S)/;

/** Whether a line has tabs between its words, or runs of spaces that stand for columns. */
export function layoutOf(line: string): Layout {
  const words = line.trim();
  if (words.includes('\t')) return 'tabs';
  return GAP.test(words) ? 'spaces' : 'none';
}

/** The pieces of one line of a typed table; empty cells between tabs have no piece. */
export function piecesOf(text: string, line: Span, layout: Layout): readonly Piece<Span>[] {
  return layout === 'tabs' ? tabbed(text, line) : spaced(text, line);
}

function tabbed(text: string, { start, end }: Span): readonly Piece<Span>[] {
  let offset = start;
  return text
    .slice(start, end)
    .split('\t')
    .flatMap((cell, column) => {
      const span = trimmed(text, { start: offset, end: offset + cell.length });
      offset += cell.length + 1;
      if (span === undefined) return [];
      return [
        { item: span, words: text.slice(span.start, span.end), left: column, right: column + 0.5 },
      ];
    });
}

function spaced(text: string, { start, end }: Span): readonly Piece<Span>[] {
  const pieces: Piece<Span>[] = [];
  const line = text.slice(start, end);
  let offset = 0;
  for (const words of line.split(new RegExp(`(${GAP.source})`))) {
    const left = offset + words.search(/\S|$/);
    const right = offset + words.trimEnd().length;
    if (right > left) {
      pieces.push({
        item: { start: start + left, end: start + right },
        words: words.trim(),
        left,
        right,
      });
    }
    offset += words.length;
  }
  return pieces;
}

/** A span without the blanks at its ends; undefined where nothing is left. */
export function trimmed(text: string, { start, end }: Span): Span | undefined {
  const words = text.slice(start, end);
  const left = words.search(/\S/);
  if (left < 0) return undefined;
  return { start: start + left, end: start + words.trimEnd().length };
}
