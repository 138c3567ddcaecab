import type { Disagreement, Verdict } from '../model/index.ts';

/** The verdict that what was asked stands. */
export const agrees: Verdict = { outcome: 'agrees' };

/** The verdict that the numbers, or the words and the numbers, do not go together. */
export function disagrees(
  because: string,
  more: Partial<Omit<Disagreement, 'outcome' | 'because'>> = {},
): Verdict {
  return { outcome: 'disagrees', because, working: [], explanations: [], ...more };
}

/** The verdict that the printed numbers do not decide the matter, with why. */
export function cannotTell(because: string): Verdict {
  return { outcome: 'cannot tell', because };
}
