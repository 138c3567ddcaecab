import type { Result } from '../model/index.ts';

/*
 * The contract of the JSON that others read. Fields are added to it, never renamed.
 */

/** One file of `extract --as json`. Every field is always there; what is absent is null. */
export interface FileJson {
  readonly file: string;
  readonly format: string;
  readonly notices: readonly string[];
  readonly results: readonly ResultJson[];
}

/** One file of `check --as json`: what `extract` gives, and the flags. */
export interface CheckedFileJson extends FileJson {
  readonly flags: readonly FlagJson[];
}

/** A result for a program. Printed numbers are strings, as printed, in plain notation. */
export interface ResultJson {
  readonly kind: Result['kind'];
  /** The field's abbreviation, the statistic of a test, or null where the kind says it all. */
  readonly measure: string | null;
  readonly adjusted: boolean | null;
  readonly estimate: string | null;
  readonly lower: string | null;
  readonly upper: string | null;
  readonly level: number | null;
  readonly p: { readonly relation: string; readonly value: string } | null;
  /** The natural logarithm of a ratio's estimate. */
  readonly logEstimate: number | null;
  /**
   * From the interval, as half its width over the multiplier of its level: of the
   * logarithm for a ratio, of the estimate itself for a difference or coefficient
   * (there the printed one, where it is printed). Where no level is printed it is
   * taken to be 95%, and `inferred` names `standardError`.
   */
  readonly standardError: number | null;
  readonly outcome: string | null;
  readonly term: string | null;
  readonly comparison: string | null;
  readonly unit: string | null;
  readonly counts: readonly CountJson[];
  readonly in: 'prose' | 'table';
  readonly section: string | null;
  readonly page: number | null;
  readonly line: number | null;
  readonly table: TableJson | null;
  readonly inferred: readonly string[];
  readonly quote: string;
  readonly span: readonly [start: number, end: number];
}

/** A count with its total and its percentage, as far as they are printed. */
export interface CountJson {
  readonly count: string | null;
  readonly total: string | null;
  readonly percent: string | null;
}

/** Where in a table a result stands, in the table's own words. */
export interface TableJson {
  readonly label: string | null;
  readonly row: string | null;
  readonly column: string | null;
}

/** Where a flag points. `words` is the place as a reviewer writes it: "page 6, line 143". */
export interface PlaceJson {
  readonly words: string;
  readonly section: string | null;
  readonly page: number | null;
  readonly line: number | null;
  readonly table: TableJson | null;
}

/** A flag for a program. */
export interface FlagJson {
  readonly rule: string;
  readonly grade: string;
  readonly place: PlaceJson;
  readonly quote: string;
  /** The numbers or words in question, as printed. */
  readonly printed: readonly string[];
  /** What the other numbers imply; an end that is infinite is null. */
  readonly recomputed: {
    readonly quantity: string; readonly low: number | null; readonly high: number | null;
  } | null;
  readonly working: readonly string[];
  readonly innocent: readonly string[];
  readonly comment: string;
}
