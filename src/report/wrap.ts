import stringWidth from 'string-width';

/** Latin and Greek letters, dashes, quotation marks, mathematical and drawing signs. */
const ONE_COLUMN_EACH = new RegExp(`^[${[
  ' -~', '\\u00a1-\\u00ac', '\\u00ae-\\u02ff', '\\u0391-\\u03c9',
  '\\u2010-\\u2027', '\\u2030-\\u205e', '\\u2200-\\u22ff', '\\u2500-\\u25cf',
].join('')}]*$`);

/**
 * How many columns a terminal gives to `words`: 2 for a wide character, none
 * for a combining mark. "naïve" takes 5 however the ï is composed. What nearly
 * every manuscript is made of is known to take one column each, and only counted.
 */
export function widthOf(words: string): number {
  if (ONE_COLUMN_EACH.test(words)) return words.length;
  return stringWidth(words, { countAnsiEscapeCodes: true });
}

/** Lines of at most `width` columns; a longer word is cut between characters. */
export function wrap(words: string, width: number): readonly string[] {
  const lines: string[] = [];
  let filled = width;
  for (const word of words.split(' ').flatMap((long) => cut(long, width))) {
    const needed = widthOf(word);
    if (needed === 0) continue;
    if (filled + 1 + needed > width) {
      lines.push(word);
      filled = needed;
    } else {
      lines.push(`${lines.pop()} ${word}`);
      filled += 1 + needed;
    }
  }
  return lines;
}

/** A word in pieces of at most `width` columns; mostly the word itself. */
export function cut(word: string, width: number): readonly string[] {
  if (widthOf(word) <= width) return [word];
  const pieces: string[] = [];
  let piece = '';
  let filled = 0;
  for (const { segment } of new Intl.Segmenter().segment(word)) {
    const needed = widthOf(segment);
    if (filled + needed > width && piece !== '') {
      pieces.push(piece);
      piece = '';
      filled = 0;
    }
    piece += segment;
    filled += needed;
  }
  return [...pieces, piece];
}
