import type { Section, Span } from '../../model/index.ts';
import { blankComposition, type Composition, type WrittenCell } from '../composition.ts';

/** The attributes of an element, as written. */
export type Attributes = Readonly<Record<string, string>>;

/** What is known while an article is read, element by element. */
export interface Reading {
  readonly composition: Composition;
  /** The sections that are open, the innermost last. */
  readonly sections: Section[];
  /** Where the raised and lowered marks that are open began. */
  readonly marks: number[];
  /** How many elements deep the part is that is passed over; 0 where text is read. */
  passedOver: number;
  table: OpenTable | undefined;
  /** How deep in reference lists, in captions and in a table's foot. */
  inReferences: number;
  inCaption: number;
  inFoot: number;
}

/** A table that is being read. */
export interface OpenTable {
  label: string;
  caption: Span | undefined;
  /** The index that its first grid has among the manuscript's tables. */
  readonly firstTable: number;
  readonly notes: Span[];
  cells: WrittenCell[];
  row: number;
  inHead: boolean;
  cell: OpenCell | undefined;
  labelStart: number | undefined;
}

/** A cell that is being read. */
export interface OpenCell {
  readonly start: number;
  readonly attributes: Attributes;
  readonly header: boolean;
}

/** The state before the first element. */
export function startReading(): Reading {
  return {
    composition: blankComposition(), sections: [], marks: [], passedOver: 0, table: undefined,
    inReferences: 0, inCaption: 0, inFoot: 0,
  };
}

const OUTSIDE: Section = { role: 'other', heading: '' };

/** The section that is open, or one without a name. */
export function sectionOf({ sections }: Reading): Section {
  return sections.at(-1) ?? OUTSIDE;
}
