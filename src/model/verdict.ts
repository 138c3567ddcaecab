import type { Range } from './range.ts';

/**
 * How sure the arithmetic is, never what went wrong with the people.
 *
 * A contradiction: no rounding and no method reconciles the numbers.
 * A discrepancy: the standard method does not reproduce them; a named other might.
 * A caution: the numbers stand, but the words claim more than they carry.
 */
export type Grade = 'contradiction' | 'discrepancy' | 'caution';

/** What was worked out from the other numbers, as a range, with what it is. */
export interface Recomputed {
  /** "upper limit", "p", "estimate": a noun that follows "the other numbers imply". */
  readonly quantity: string;
  readonly range: Range;
}

/**
 * What a rule says about what it was asked.
 *
 * No outcome is called an error: a rule compares printed numbers, it does not
 * judge people. On results it does not read, a rule says nothing at all.
 */
export type Verdict =
  | { readonly outcome: 'agrees' }
  | {
      readonly outcome: 'disagrees';
      readonly recomputed?: Recomputed;
      /** The disagreement in one sentence, with the printed and the recomputed numbers. */
      readonly because: string;
      /** The steps of the arithmetic, one a line, that a reader can follow by hand. */
      readonly working: readonly string[];
      /** Explanations that fit these numbers in particular, most likely first. */
      readonly explanations: readonly string[];
      /** The grade where it differs from the rule's own. */
      readonly grade?: Grade;
    }
  | { readonly outcome: 'cannot tell'; readonly because: string };
