import type { Span } from './span.ts';

/** How a printed number stands to the quantity: `P < 0.001` has the relation `<`. */
export type Relation = '=' | '<' | '<=' | '>' | '>=';

/**
 * A number as it stands on the page.
 *
 * `decimals` matters as much as `value`: "0.70" claims more than "0.7". It says
 * which power of ten the last digit counts: 2 for "0.70", 0 for "14", 6 for
 * "1.2×10⁻⁵" and −6 for "3.39E8".
 */
export interface Printed {
  /** Exactly what is printed, so that slicing the manuscript by `span` gives it back. */
  readonly text: string;
  /** The same digits in plain notation: "0.72" for "0·72", "-1.5" for "−1.5", ".72" stays. */
  readonly plain: string;
  /** The value in the printed unit: 35.1 for "35.1%". Infinite for "∞", never NaN. */
  readonly value: number;
  readonly decimals: number;
  readonly percent: boolean;
  readonly span: Span;
}

/** A p-value as printed, with what was said of it. */
export interface PValue {
  readonly relation: Relation;
  readonly printed: Printed;
  /**
   * What the p-value tests, where the text says so; a plain p tests the result itself,
   * one that spans all categories of a factor tests the factor as a whole.
   */
  readonly tests: 'result' | 'factor' | 'trend' | 'interaction' | 'heterogeneity';
  /** True for "one-sided p", false for "two-sided p", absent where nothing is said. */
  readonly oneSided?: boolean;
  readonly span: Span;
}

/** An interval as printed around an estimate. */
export interface Interval {
  readonly lower: Printed;
  readonly upper: Printed;
  /** The level in percent (95, 99, 97.5), absent where the text never states one. */
  readonly level?: number;
  readonly type: 'confidence' | 'credible';
  readonly span: Span;
}
