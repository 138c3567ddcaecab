import { extract } from '../../extract/index.ts';
import type { Findings } from '../../model/index.ts';
import { readText } from '../../read/text/read-text.ts';

/** The results and counts in a sentence or two that were pasted whole. */
export async function findingsIn(text: string): Promise<Findings> {
  return extract(readText(withDecimalPoints(text), 'typed text'));
}

/**
 * "OR 1,59 (95% CI 1,05–2,41)" with points. A whole manuscript shows by its many numbers how
 * it writes fractions; of one line only this is sure, that a comma before one or two digits
 * parts no thousands, when it is met twice and no number has a point.
 */
function withDecimalPoints(text: string): string {
  const commas = text.match(/\d,\d{1,2}(?!\d)/g)?.length ?? 0;
  if (commas < 2 || /\d[.·]\d/.test(text)) return text;
  return text.replace(/(?<=\d),(?=\d)/g, '.');
}
