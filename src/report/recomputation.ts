import type { Range } from '../model/index.ts';

/** What can be recomputed from typed numbers: the kinds of answers, by the trade's own words. */
export const RECOMPUTATION_FORMS = [
  'ratio', 'difference', 'coefficient', 'counts', 'proportion', 'risk', 'compare',
  'discrimination', 'test',
] as const;

/** One of the kinds of answers. */
export type RecomputationForm = (typeof RECOMPUTATION_FORMS)[number];

/**
 * How typed numbers stand to each other. `not compared` where nothing is printed twice over,
 * as with counts alone: then there is only something to work out.
 */
export type RecomputationOutcome =
  | 'within rounding' | 'within another standard method' | 'neither' | 'cannot tell'
  | 'not compared';

/**
 * How a worked-out value is shown. A `share` is on the scale 0 to 1 and shown in percent, a
 * `percent` was typed in percent and stays so, a `probability` is a p-value, a `number` is
 * shown as it is.
 */
export type WorkedUnit = 'number' | 'share' | 'percent' | 'probability';

/**
 * Something worked out: "odds ratio, 1.76 (95% CI 1.01 to 3.06), Woolf". The value is a range
 * where rounding leaves room, and has two equal ends where it does not, as from counts.
 */
export interface Worked {
  readonly quantity: string;
  readonly unit: WorkedUnit;
  readonly value?: Range;
  /** The limits of confidence around an exact value, and their level in percent. */
  readonly interval?: { readonly limits: Range; readonly level: number };
  /** The method by its author, or the case it stands for: "Woolf", "if crude". */
  readonly method?: string;
  /** What else a reader must know of it: "1.59 is printed", "rounded up 42". */
  readonly note?: string;
}

/** Values that belong together, under a short label such as "together" or "risks". */
export interface WorkedGroup {
  readonly label: string;
  readonly values: readonly Worked[];
}

/** The answer to one result that was typed in, ready to be shown or handed to a program. */
export interface Recomputation {
  readonly form: RecomputationForm;
  /** The numbers as they were understood: "OR 1.59 (95% CI 1.05 to 2.41), p = 0.03". */
  readonly understood: string;
  readonly outcome: RecomputationOutcome;
  /** What there is to say in a sentence or two. */
  readonly answer: readonly string[];
  readonly groups: readonly WorkedGroup[];
  /** The arithmetic in sentences that can be pasted into a review. */
  readonly working: readonly string[];
  /** What would reconcile numbers that disagree, likeliest first. */
  readonly perhaps: readonly string[];
  /** What the answer assumes, and when not to rely on it. */
  readonly reservations: readonly string[];
  /** A courteous question to the authors; "" where there is nothing to ask. */
  readonly comment: string;
  /** Where the formulas are from: author, year, journal. */
  readonly sources: readonly string[];
}
