import type { Flag, Printed, Result } from '../model/index.ts';
import { decimalsFor, pRangeInWords, rangeInWords } from './numbers-in-words.ts';
import { resultInWords } from './result-in-words.ts';

/** What is printed beside what the other printed numbers imply, in words. */
export interface Beside {
  /** "upper limit 2.14", or the whole result or the marked words where that says more. */
  readonly printed: string;
  /** "upper limit 2.39 to 2.44"; "" where nothing was recomputed. */
  readonly recomputed: string;
}

/** What a flag's numbers are as printed, and as recomputed. */
export function besideOf(flag: Flag, text: string): Beside {
  const { result, recomputed } = flag;
  const whole = result === undefined ? markedWords(text, flag) : resultInWords(result);
  if (recomputed === undefined) return { printed: whole, recomputed: '' };
  const { quantity, range } = recomputed;
  const printed = result === undefined ? undefined : printedAs(quantity, result);
  const words = isP(quantity) ? pRangeInWords(range)
    : rangeInWords(range, printed?.decimals ?? decimalsFor(range, 3));
  return {
    printed: printed === undefined ? whole : `${quantity} ${asPrinted(printed)}`,
    recomputed: `${quantity} ${words}`,
  };
}

function asPrinted({ plain, percent }: Printed): string {
  return percent ? `${plain}%` : plain;
}

/**
 * The number that the result prints for a quantity that is named "upper limit" or
 * the like. A p-value is better shown with the estimate and interval beside it.
 */
function printedAs(quantity: string, result: Result): Printed | undefined {
  if (/\bupper\b/i.test(quantity)) return result.interval?.upper;
  if (/\blower\b/i.test(quantity)) return result.interval?.lower;
  return /\b(estimate|percent|percentage|share)\b/i.test(quantity) ? result.estimate : undefined;
}

function isP(quantity: string): boolean {
  return /^(two-sided |one-sided )?p\b/i.test(quantity);
}

/** The words in question, as printed, each once: "0.72, 0.75, 0.98". */
export function markedWords(text: string, { marks }: Flag): string {
  return [...new Set(marks.map(({ start, end }) => text.slice(start, end)))].join(', ');
}
