import type { Cell, Table } from './manuscript.ts';
import type { Interval, Printed, PValue, Relation } from './printed.ts';
import type { Span } from './span.ts';

/**
 * The ratio measures of the field by their usual abbreviations; `ratio` where
 * the text does not say which. SHR is a subdistribution hazard ratio, csHR a
 * cause-specific one, POR a prevalence odds ratio, DOR a diagnostic odds ratio,
 * ROR a ratio of odds ratios, GMR a ratio of geometric means, RRR a relative risk
 * ratio of a multinomial model.
 */
export type RatioMeasure =
  | 'OR' | 'HR' | 'RR' | 'IRR' | 'PR' | 'SMR' | 'SIR'
  | 'SHR' | 'csHR' | 'POR' | 'DOR' | 'ROR' | 'GMR' | 'RRR' | 'ratio';

/** Differences on the scale of the outcome: risk, mean and standardised mean. */
export type DifferenceMeasure = 'RD' | 'MD' | 'SMD' | 'difference';

/** What a result is about, in the manuscript's own words; each part may be absent. */
export interface About {
  readonly outcome?: string;
  readonly term?: string;
  readonly comparison?: string;
  readonly unit?: string;
}

/** A count as printed with its total or its percentage: "19 (29%) of 66". */
export interface Count {
  readonly count?: Printed;
  readonly total?: Printed;
  readonly percent?: Printed;
  readonly span: Span;
}

/** Where in a table a result stands: its row and column in the table's own words. */
export interface CellPlace {
  readonly table: Table;
  readonly cell: Cell;
  readonly row: string;
  readonly column: string;
}

/** Fields that were not printed with the result but inherited from elsewhere. */
export type Inheritable = 'measure' | 'level' | 'adjusted' | 'p' | 'outcome' | 'term' | 'comparison' | 'unit';

interface Reported {
  /** From the first to the last character that belongs to the result. */
  readonly span: Span;
  readonly about: About;
  /** Whether the text calls it adjusted (true) or crude (false); absent where it says neither. */
  readonly adjusted?: boolean;
  readonly inferred: readonly Inheritable[];
  readonly counts: readonly Count[];
  /** Present for results that stand in a table; the others stand in prose. */
  readonly cell?: CellPlace;
  readonly interval?: Interval;
  readonly p?: PValue;
  /** True where the sentence cites other work, so that the numbers may not be the authors' own. */
  readonly cited: boolean;
}

/** An odds ratio, hazard ratio or their kin; at least an estimate or an interval is printed. */
export interface RatioResult extends Reported {
  readonly kind: 'ratio';
  readonly measure: RatioMeasure;
  readonly estimate?: Printed;
}

/** A regression coefficient on the scale of the linear predictor (a log odds, a log hazard). */
export interface CoefficientResult extends Reported {
  readonly kind: 'coefficient';
  readonly estimate: Printed;
  readonly standardError?: Printed;
  /** The coefficient over its standard error (z, t), or the square of that (Wald), as printed. */
  readonly statistic?: { readonly of: 'z' | 't' | 'Wald'; readonly printed: Printed };
}

/** A difference of risks, of means, or of standardised means. */
export interface DifferenceResult extends Reported {
  readonly kind: 'difference';
  readonly measure: DifferenceMeasure;
  readonly estimate?: Printed;
}

/** A share of a group: "45 of 120 (37.5%)", or a percentage with its interval. */
export interface ProportionResult extends Reported {
  readonly kind: 'proportion';
  readonly estimate?: Printed;
}

/** An area under the ROC curve or a C statistic, on the scale 0 to 1 (or in percent). */
export interface DiscriminationResult extends Reported {
  readonly kind: 'discrimination';
  readonly measure: 'AUC' | 'C';
  readonly estimate: Printed;
}

/** A test statistic with its degrees of freedom, where printed. */
export interface TestResult extends Reported {
  readonly kind: 'test';
  readonly statistic: 'z' | 't' | 'chi-square' | 'F' | 'Q';
  readonly relation: Relation;
  readonly estimate: Printed;
  readonly degreesOfFreedom: readonly Printed[];
}

/** Any other estimate with an interval: a mean, a median, a rate, a correlation. */
export interface OtherResult extends Reported {
  readonly kind: 'other';
  readonly measure: 'mean' | 'median' | 'rate' | 'correlation' | 'other';
  readonly estimate?: Printed;
}

/** One reported result. */
export type Result =
  | RatioResult
  | CoefficientResult
  | DifferenceResult
  | ProportionResult
  | DiscriminationResult
  | TestResult
  | OtherResult;

/** The words by which results are told apart. */
export type ResultKind = Result['kind'];

/** The results of one kind: `ResultOf<'ratio'>`. */
export type ResultOf<Kind extends ResultKind> = Extract<Result, { readonly kind: Kind }>;
