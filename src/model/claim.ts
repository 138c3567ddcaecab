import type { Result } from './result.ts';
import type { Printed } from './printed.ts';
import type { Span } from './span.ts';

/** The quantity that a sentence speaks of when it tells the size of an effect. */
export type SpokenScale = 'odds' | 'hazard' | 'rate' | 'risk' | 'prevalence';

/** What all claims have: the words, the sentence, and the result they speak of, if it is sure. */
interface Said {
  readonly span: Span;
  readonly sentence: Span;
  /** The result the words speak of; absent where that cannot be told. Never guessed. */
  readonly of?: Result;
}

/** "was significantly associated with", "did not differ". */
export interface SignificanceClaim extends Said {
  readonly kind: 'significance';
  readonly asserted: boolean;
  /**
   * How it was said: outright ("significant"), by denying an association
   * ("no association"), or only by implication ("was associated with").
   */
  readonly manner: 'stated' | 'no association' | 'implied';
}

/** "higher risk" is up, "protective" is down. */
export interface DirectionClaim extends Said {
  readonly kind: 'direction';
  readonly direction: 'up' | 'down';
}

/**
 * "a 59% increase" is the factor 1.59, "twice as likely" 2, "halved" 0.5.
 * `scale` is the quantity that the words name, absent where they name none.
 */
export interface SizeClaim extends Said {
  readonly kind: 'size';
  readonly factor: number;
  readonly printed?: Printed;
  readonly scale?: SpokenScale;
}

/**
 * The words speak of a quantity without a size: "an increased risk of death".
 */
export interface ScaleClaim extends Said {
  readonly kind: 'scale';
  readonly scale: SpokenScale;
}

/** "the effect was stronger in women than in men". */
export interface ComparisonClaim extends Said {
  readonly kind: 'comparison';
  readonly with?: Result;
}

/** "the score predicted death well". */
export interface PredictionClaim extends Said {
  readonly kind: 'prediction';
}

/** What a sentence says of a result. */
export type Claim =
  | SignificanceClaim
  | DirectionClaim
  | SizeClaim
  | ScaleClaim
  | ComparisonClaim
  | PredictionClaim;

/**
 * How common the outcome is, as the text prints it: "the prevalence of falls
 * was 34%" has the share 0.34. A baseline risk is one of an unexposed group.
 */
export interface Prevalence {
  readonly share: number;
  readonly printed: Printed;
  readonly span: Span;
  /** The outcome in the text's own words, absent where it names none. */
  readonly outcome?: string;
  readonly group: 'everyone' | 'unexposed';
}
