import type { Token } from '../token.ts';

/** Words that deny what follows them. */
export const NEGATIONS: ReadonlySet<string> = new Set([
  'no', 'not', 'nonstatistically', 'neither', 'nor', 'without', 'never', 'lacked', 'lack',
  'cannot', 'failed', 'none', "didn't", "wasn't", "weren't", 'absence', 'loses', 'lost', 'fails',
  'null', 'didn’t', 'wasn’t', 'weren’t',
]);

/** The words that stand before, up to so many, not over a comma or a bracket's end. */
export function wordsBefore(tokens: readonly Token[], at: number, count: number): readonly Token[] {
  const words: Token[] = [];
  for (let index = at - 1; index >= 0 && words.length < count; index--) {
    const token = tokens[index] as Token;
    if (token.kind === 'comma' || token.kind === 'close' || token.kind === 'semicolon') break;
    if (token.kind === 'word') words.push(token);
  }
  return words;
}

/** Whether a word near before denies the one at `at`: "did not reduce", "no clear increase". */
export function isNegated(tokens: readonly Token[], at: number): boolean {
  return wordsBefore(tokens, at, 4).some(({ word }) => NEGATIONS.has(word));
}
