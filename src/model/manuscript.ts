import type { Span } from './span.ts';

/** The forms in which a manuscript may arrive. */
export type Format = 'text' | 'pdf' | 'jats' | 'docx' | 'html' | 'latex' | 'markdown';

/** What a block is on the page. `furniture` is set apart: running heads, page numbers. */
export type BlockKind =
  | 'title'
  | 'heading'
  | 'paragraph'
  | 'table'
  | 'caption'
  | 'note'
  | 'figure'
  | 'references'
  | 'furniture';

/** The part of an article in which a block stands; `other` where no heading tells. */
export type SectionRole =
  | 'title'
  | 'abstract'
  | 'introduction'
  | 'methods'
  | 'results'
  | 'discussion'
  | 'references'
  | 'supplement'
  | 'other';

/** A part of the article: its role, and its heading as printed ("" before the first). */
export interface Section {
  readonly role: SectionRole;
  readonly heading: string;
}

/** A stretch of text that a reader takes in as one thing. Blocks stand in reading order. */
export interface Block {
  readonly kind: BlockKind;
  readonly span: Span;
  readonly section: Section;
}

/**
 * A rectangle on a page, in points from its top left corner, the page upright
 * as it is shown: x grows to the right, y downwards.
 */
export interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/**
 * A line as the reader sees it. `number` is the one printed in the margin where
 * the manuscript has them; otherwise the line's count on its page, or in the
 * whole text where there are no pages.
 */
export interface Line {
  readonly span: Span;
  readonly number: number;
  readonly numbering: 'printed' | 'counted';
  /** The page, from 1; absent in forms that have no pages. */
  readonly page?: number;
  readonly box?: Box;
}

/** One page of a paginated manuscript. Sizes are in points, the page upright. */
export interface Page {
  readonly number: number;
  readonly span: Span;
  readonly width: number;
  readonly height: number;
}

/** Raised or lowered marks, whose digits never belong to the number beside them. */
export interface Mark {
  readonly kind: 'superscript' | 'subscript';
  readonly span: Span;
}

/** One cell of a table. Rows and columns count from 0. */
export interface Cell {
  readonly span: Span;
  readonly row: number;
  readonly column: number;
  readonly rowSpan: number;
  readonly columnSpan: number;
  readonly header: boolean;
}

/** A grid of cells with its label, caption and notes. Cells stand in reading order. */
export interface Table {
  readonly span: Span;
  /** "Table 2", or "" where none is printed. */
  readonly label: string;
  readonly caption?: Span;
  readonly notes: readonly Span[];
  readonly cells: readonly Cell[];
  readonly rowCount: number;
  readonly columnCount: number;
}

/** Something lost or guessed in reading; always shown with the report. */
export interface Notice {
  readonly message: string;
  readonly page?: number;
}

/**
 * A document as read. The text is what the author printed, in reading order,
 * and is never rewritten; everything else points into it by spans.
 */
export interface Manuscript {
  readonly name: string;
  readonly format: Format;
  readonly text: string;
  readonly blocks: readonly Block[];
  readonly tables: readonly Table[];
  readonly lines: readonly Line[];
  readonly pages: readonly Page[];
  readonly marks: readonly Mark[];
  readonly notices: readonly Notice[];
}
