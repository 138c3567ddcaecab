import type { Printed, Relation, Span } from '../model/index.ts';

/** What the lexer tells apart. Spaces are not tokens; `spaced` remembers them. */
export type TokenKind =
  | 'number'
  | 'word'
  | 'open'
  | 'close'
  | 'dash'
  | 'comma'
  | 'semicolon'
  | 'colon'
  | 'relation'
  | 'percent'
  | 'slash'
  | 'plus-minus'
  | 'times'
  | 'stop'
  | 'star'
  | 'raised'
  | 'other';

/**
 * One token. All tokens have all fields, so that a million of them stay cheap:
 * `printed` is set for numbers only, `relation` for relations only, and `word`
 * is the word in lower case, or the punctuation itself.
 */
export interface Token {
  readonly kind: TokenKind;
  readonly span: Span;
  readonly word: string;
  /** Whether white space (or a line end) stands before it. */
  readonly spaced: boolean;
  /** Whether a letter stands directly before a number or directly after it: "IL6", "10mg". */
  readonly glued: boolean;
  readonly printed: Printed | undefined;
  readonly relation: Relation | undefined;
}
