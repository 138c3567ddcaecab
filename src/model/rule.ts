import type { Findings } from './findings.ts';
import type { Manuscript } from './manuscript.ts';
import type { Result, ResultKind } from './result.ts';
import type { Span } from './span.ts';
import type { Grade, Verdict } from './verdict.ts';

/** A short text put to a rule, with the verdict it must give: test and documentation in one. */
export interface Example {
  readonly text: string;
  readonly outcome: Verdict['outcome'];
  /** Why, in a phrase, with the arithmetic. */
  readonly note: string;
}

/** A manuscript with what was found in it: all that a rule may look at. */
export interface Reading {
  readonly manuscript: Manuscript;
  readonly findings: Findings;
}

/** A verdict that found disagreement. */
export type Disagreement = Extract<Verdict, { readonly outcome: 'disagrees' }>;

/** A verdict, and the words it is about. */
export interface Judgement {
  readonly verdict: Verdict;
  readonly span: Span;
  /** The printed numbers or words in question, to be marked in the quotation. */
  readonly marks: readonly Span[];
  readonly result?: Result;
}

/**
 * One question that can be put to a manuscript, with its reason, its source,
 * the innocent explanations of a disagreement, and worked examples.
 */
export interface Rule {
  /** The same as the name of the file that holds it: "estimate-inside-interval". */
  readonly id: string;
  readonly question: string;
  readonly why: string;
  readonly source: string;
  readonly innocent: readonly string[];
  readonly grade: Grade;
  /** What it looks at: one kind of result, or the whole manuscript. */
  readonly reads: ResultKind | 'manuscript';
  readonly examples: readonly Example[];
  /** Every verdict the rule has on this manuscript, in reading order. */
  readonly judgements: (reading: Reading) => readonly Judgement[];
  /** What a reviewer would write to the authors about `words`, courteous and specific. */
  readonly comment: (words: string, verdict: Disagreement) => string;
}
