import type { BlockKind } from '../../model/index.ts';
import type { GridCell } from '../grid.ts';
import type { Phrase } from './phrase.ts';
import type { TextLine } from './text-line.ts';

/** A phrase with the line it stands in. */
export interface Placed {
  readonly line: TextLine;
  readonly phrase: Phrase;
}

/** A recovered grid, its cells made of phrases, row by row. */
export interface DraftGrid {
  readonly rows: readonly (readonly GridCell<Placed>[])[];
  readonly columnCount: number;
}

/** A block of a page before it has offsets in the text. */
export interface Draft {
  readonly kind: BlockKind;
  readonly lines: readonly TextLine[];
  /** The length of a label run into the block's first line: 8 for "RESULTS: We found". */
  readonly label?: number;
  readonly grid?: DraftGrid;
}
