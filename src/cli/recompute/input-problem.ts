/** What was typed cannot be worked with. The message says in a sentence what to do. */
export class InputProblem extends Error {
  override readonly name = 'InputProblem';
}

/** Typed words as they may be shown in a sentence: short, and in quotation marks. */
export function quoted(words: string): string {
  const short = words.length > 60 ? `${words.slice(0, 57)}...` : words;
  return `“${short}”`;
}
