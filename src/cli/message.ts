import type { Examination } from '../model/index.ts';

/** What the worker is asked to examine. */
export interface Request {
  readonly bytes: Uint8Array;
  readonly name: string;
}

/** What the worker answers: an examination, why the file cannot be read, or a fault of our own. */
export type Reply =
  | { readonly kind: 'examined'; readonly examination: Examination }
  | { readonly kind: 'unreadable'; readonly sentence: string }
  | { readonly kind: 'fault'; readonly message: string; readonly stack: string };
