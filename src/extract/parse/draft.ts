import type { Printed, Span } from '../../model/index.ts';
import type { LabelItem } from './item.ts';

/**
 * A result as it stands in the text, before it is known what it is a value of.
 * Indexes count items of its passage.
 */
export interface Draft {
  readonly estimate?: Printed;
  readonly limits?: { readonly lower: Printed; readonly upper: Printed; readonly span: Span };
  readonly label?: LabelItem;
  /** The item of the estimate, or the first limit where no estimate is printed. */
  readonly anchor: number;
  /** The first item, and the first after the last. */
  readonly start: number;
  readonly end: number;
}
