import type { BlockKind, Mark } from '../model/index.ts';

/*
 * What a form tells of itself: its blocks in reading order, before they have
 * offsets, sections or captions. Each room that reads such a form gives a list
 * of these; `composeTold` makes the manuscript of it.
 */

/** How words are set, where that may make a heading of them. */
export type Look = 'strong' | 'emphasis';

/** Words in one look, and raised or lowered where they are a mark. */
export interface Words {
  readonly kind: 'words';
  readonly text: string;
  readonly mark?: Mark['kind'];
  readonly look?: Look;
  /** The line of the source they stand in, from 1, in forms that are written in lines. */
  readonly line?: number;
}

/** What stands in a line: words, the end of a printed line, the gap of a tab. */
export type Inline = Words | { readonly kind: 'break' } | { readonly kind: 'tab' };

/** A cell as told: row by row, its column left to be found. */
export interface ToldCell {
  readonly words: readonly Inline[];
  /** From 0. */
  readonly row: number;
  readonly rowSpan: number;
  readonly columnSpan: number;
  readonly header: boolean;
}

/** A table as told. `caption` is one that the form itself ties to the table. */
export interface ToldTable {
  readonly kind: 'table';
  readonly caption?: readonly Inline[];
  readonly cells: readonly ToldCell[];
}

/** A block of words as told. A paragraph may yet turn out a caption, a note or a heading. */
export interface ToldWords {
  readonly kind: Exclude<BlockKind, 'table'>;
  readonly words: readonly Inline[];
}

/** A block as told. */
export type ToldBlock = ToldWords | ToldTable;

/** The words of a line without their looks and marks: "Table 2. Odds ratios". */
export function plainWords(inlines: readonly Inline[]): string {
  return inlines
    .map((inline) => (inline.kind === 'words' ? inline.text : ' '))
    .join('')
    .replace(/\s+/g, ' ')
    .trim();
}
