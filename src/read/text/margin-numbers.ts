import { quote, type Span } from '../../model/index.ts';
import { sourceLines } from './source-lines.ts';

/** Pasted text with the line numbers of its margin taken out of the words. */
export interface Unnumbered {
  readonly text: string;
  /** The number of every line of `text`, in order. */
  readonly numbers: readonly number[];
}

interface Numbered {
  readonly number: number | undefined;
  /** How many characters of the line are its number and the gap after it. */
  readonly length: number;
  readonly blank: boolean;
}

const FEWEST = 5;

/**
 * Recognises numbers that came along from a numbered margin, and takes them out.
 * Undefined unless they rise line by line, or 5 by 5, from top to bottom (they
 * may begin again, as on a new page), so that no table or list is mistaken.
 *
 *     12 The hazard ratio for death was 0.72
 *     13 (95% CI 0.58 to 0.90).
 *     ^^ taken out, kept as the line's number
 */
export function withoutMarginNumbers(text: string): Unnumbered | undefined {
  const spans = sourceLines(text);
  const lines = spans.map((span) => numberedLine(quote(text, span)));
  const step = stepOf(lines);
  const numbers = step === undefined ? undefined : numbersOf(lines, step);
  if (numbers === undefined) return undefined;
  return { text: rejoined(text, spans, lines), numbers };
}

// "  12 The hazard ratio"     "12"
//  ^^^^^                       ^^
const NUMBER = /^\s*(\d{1,4})(?:[ \t\u00a0]{1,8}|$)(?![-–=<>%]|to\b)/;

function numberedLine(line: string): Numbered {
  const match = NUMBER.exec(line);
  const blank = line.trim() === '';
  if (match === null) return { number: undefined, length: 0, blank };
  return { number: Number(match[1]), length: match[0].length, blank };
}

/** 1 where every line has its number, 5 where every fifth has; undefined where neither. */
function stepOf(lines: readonly Numbered[]): 1 | 5 | undefined {
  const numbers = lines.flatMap(({ number }) => (number === undefined ? [] : [number]));
  const written = lines.filter(({ blank }) => !blank).length;
  if (numbers.length < FEWEST && written < FEWEST * 3) return undefined;
  if (numbers.length >= written * 0.9 && mostly(numbers, (before, after) => after === before + 1))
    return 1;
  const fives = numbers.length >= 3 && numbers.length <= written / 3;
  return fives && mostly(numbers, (before, after) => after === before + 5) ? 5 : undefined;
}

/** Whether all steps but those of beginning again are as they should be. */
function mostly(
  numbers: readonly number[],
  fits: (before: number, after: number) => boolean,
): boolean {
  const steps = numbers.slice(1).map((after, i) => [numbers[i] as number, after] as const);
  const restarts = steps.filter(([before, after]) => after <= 5 && after < before).length;
  return (
    steps.length - restarts > 0 &&
    steps.filter(([b, a]) => fits(b, a)).length + restarts === steps.length
  );
}

/** Numbers between the printed ones are counted on, over blank lines or not as the print does. */
function numbersOf(lines: readonly Numbered[], step: 1 | 5): readonly number[] | undefined {
  if (step === 1) return counted(lines, false);
  return [false, true]
    .map((blanks) => counted(lines, blanks))
    .find((numbers) => fitsAll(lines, numbers));
}

function counted(lines: readonly Numbered[], blanks: boolean): readonly number[] {
  const first = lines.findIndex(({ number }) => number !== undefined);
  const before = lines.slice(0, first).filter(({ blank }) => blanks || !blank).length;
  let next = (lines[first]?.number ?? 1) - before;
  return lines.map(({ number, blank }) => {
    if (number !== undefined && number < next) next = number;
    const own = next;
    if (number !== undefined || blanks || !blank) next = own + 1;
    return own;
  });
}

function fitsAll(lines: readonly Numbered[], numbers: readonly number[]): boolean {
  return lines.every(({ number }, i) => number === undefined || number === numbers[i]);
}

/** Unnumbered lines lose as much indentation as the numbers take, so that all stay aligned. */
function rejoined(text: string, spans: readonly Span[], lines: readonly Numbered[]): string {
  const margin = Math.max(...lines.map(({ length }) => length));
  return spans
    .map(({ start, end }, i) => {
      const next = spans[i + 1]?.start ?? text.length;
      const indented = text.slice(start, end).search(/\S|$/);
      return text.slice(start + (lines[i]?.length || Math.min(indented, margin)), next);
    })
    .join('');
}
