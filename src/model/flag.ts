import type { Place } from './place.ts';
import type { Result } from './result.ts';
import type { Span } from './span.ts';
import type { Grade, Recomputed } from './verdict.ts';

/** A verdict that disagrees, made ready for a reader. */
export interface Flag {
  /** The id of the rule that asked. */
  readonly rule: string;
  readonly grade: Grade;
  readonly span: Span;
  readonly place: Place;
  /** The printed numbers in question, as spans, to be marked in the quotation. */
  readonly marks: readonly Span[];
  readonly because: string;
  readonly recomputed?: Recomputed;
  readonly working: readonly string[];
  /** The innocent explanations that fit, most likely first. */
  readonly innocent: readonly string[];
  /** What a reviewer would write to the authors, ready to paste. */
  readonly comment: string;
  readonly result?: Result;
}

/** Something a rule could not judge, with why: silence is not agreement. */
export interface Unjudged {
  readonly rule: string;
  readonly span: Span;
  readonly because: string;
}

/** What checking a manuscript gave. */
export interface Checked {
  readonly flags: readonly Flag[];
  readonly unjudged: readonly Unjudged[];
  /** How many verdicts agreed: what was checked and stood. */
  readonly agreed: number;
}
