import type { Box } from '../../model/index.ts';
import type { Column } from './columns.ts';
import { rowsOf, wordsOf, type Phrase } from './phrase.ts';
import { boxOnPage, type Frame } from './run.ts';

/** A printed line of one column, with its place on the page. */
export interface TextLine {
  readonly page: number;
  readonly column: Column;
  readonly phrases: readonly Phrase[];
  readonly words: string;
  readonly left: number;
  readonly right: number;
  readonly baseline: number;
  readonly size: number;
  readonly font: string;
  readonly frame: Frame;
}

/** The lines of a column, from top to bottom. */
export function linesOf(column: Column, page: number, frame: Frame): readonly TextLine[] {
  return rowsOf(column.phrases).map((phrases) => lineOf(phrases, column, page, frame));
}

function lineOf(phrases: readonly Phrase[], column: Column, page: number, frame: Frame): TextLine {
  const main = phrases.reduce((best, phrase) => (phrase.length > best.length ? phrase : best));
  return {
    page,
    column,
    phrases,
    words: phrases.map(({ runs }) => wordsOf(runs)).join(' '),
    left: Math.min(...phrases.map(({ left }) => left)),
    right: Math.max(...phrases.map(({ right }) => right)),
    baseline: main.baseline,
    size: main.size,
    font: main.font,
    frame,
  };
}

/** The box of some phrases of a line on the upright page. */
export function boxOf({ frame, baseline, size }: TextLine, phrases: readonly Phrase[]): Box {
  const left = Math.min(...phrases.map((phrase) => phrase.left));
  const right = Math.max(...phrases.map((phrase) => phrase.right));
  return boxOnPage(frame, left, baseline - 0.8 * size, right, baseline + 0.25 * size);
}

// … for 2 years.     … in men (Table 2).     … before.12,13     … as reported.”
//              ^                      ^^            ^^^^^^                    ^^
const END = /[.!?][)\]”"’]*(?:(?<=[a-z)\]”"]\S?)\s?[\d,–-]+|\s?\[[\d,–\s-]+\])?$/;

/** Whether a line's words end a sentence, perhaps with a note's number after the stop. */
export function endsSentence(words: string): boolean {
  return END.test(words);
}
