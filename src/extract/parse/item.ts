import type { Printed, PValue, Span } from '../../model/index.ts';
import type { Token, TokenKind } from '../token.ts';
import type { Naming } from '../vocabulary.ts';

interface Standing {
  readonly span: Span;
  readonly spaced: boolean;
}

/** A number that nothing has claimed yet. */
export interface NumberItem extends Standing {
  readonly kind: 'number';
  readonly printed: Printed;
  /** Whether letters or a hyphenated word cling to it, as in "IL6" or "5-year". */
  readonly attached: boolean;
}

/** The name of a quantity: "odds ratio", "aHR", "median". */
export interface NameItem extends Standing {
  readonly kind: 'name';
  readonly naming: Naming;
  readonly adjusted?: boolean;
}

/** What announces an interval: "95% CI", "90% confidence limits", "credible interval". */
export interface LabelItem extends Standing {
  readonly kind: 'label';
  readonly level?: number;
  readonly type: 'confidence' | 'credible';
}

/** A p-value: "P < 0.001", "p for trend = 0.02". */
export interface PValueItem extends Standing {
  readonly kind: 'p';
  readonly value: PValue;
  /** Whether the words say it holds for several results: "P<0.05 for both". */
  readonly shared: boolean;
}

/** A word or a punctuation mark: the token itself. */
export type OtherItem = Token & { readonly kind: Exclude<TokenKind, 'number'> };

/** What a stretch of text is made of, once numbers have been told from what names them. */
export type Item = NumberItem | NameItem | LabelItem | PValueItem | OtherItem;

/** Something recognised in tokens, and the index of the first token after it. */
export interface Recognised<Kind extends Item = Item> {
  readonly item: Kind;
  readonly end: number;
}
