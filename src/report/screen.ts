import { type Colours, inkFor } from './ink.ts';
import { wrap } from './wrap.ts';

/** What a report is shown on, as the shell found it. */
export interface Screen {
  /** How many columns there are; no line is ever longer. */
  readonly columns: number;
  readonly colours: Colours;
  /** Whether typographic quotation marks and drawing characters can be shown. */
  readonly unicode: boolean;
  /** False leaves out all that is drawn, for ears and for plain text files. */
  readonly drawings: boolean;
}

/** Lines longer than this are tiring to read, however wide the screen. */
const LONGEST_LINE = 96;
const NARROWEST = 20;

/** How wide a report is written on this screen. */
export function lineWidth({ columns }: Screen): number {
  return Math.min(LONGEST_LINE, Math.max(NARROWEST, columns));
}

const INDENT = 3;
const LABEL = 13;

/** In a list of sentences this tells where the next begins. */
const HANG = 2;

/** Below this width a label stands above its words and no longer beside them. */
const ROOM_FOR_LABELS = 64;

/** Where the words beside a label begin, in columns from the left. */
export function bodyIndent(screen: Screen): number {
  return lineWidth(screen) < ROOM_FOR_LABELS ? INDENT + 1 : INDENT + LABEL;
}

/** Paragraphs, indented and wrapped. */
export function indented(
  screen: Screen, words: string, { indent = INDENT, hang = 0, ink = same }: Setting = {},
): readonly string[] {
  return wrap(words, lineWidth(screen) - indent - hang).map((line, index) =>
    ' '.repeat(index === 0 ? indent : indent + hang) + ink(line));
}

interface Setting {
  readonly indent?: number;
  /** How much further than the first line the others are indented. */
  readonly hang?: number;
  readonly ink?: (words: string) => string;
}

function same(words: string): string {
  return words;
}

/**
 * Sentences with a label to their left, or above them on a narrow screen:
 *
 *     printed      upper limit 2.14
 *     recomputed   upper limit 2.39 to 2.44
 *
 * Where nothing is drawn the label is the first word: "Printed: upper limit 2.14".
 */
export function labelledWords(
  screen: Screen, label: string, sentences: readonly string[],
): readonly string[] {
  if (sentences.length === 0) return [];
  if (!screen.drawings) return saidAloud(screen, label, sentences);
  const indent = bodyIndent(screen);
  const hang = sentences.length > 1 ? HANG : 0;
  const lines = sentences.flatMap((sentence) => indented(screen, sentence, { indent, hang }));
  const head = ' '.repeat(INDENT) + inkFor(screen.colours).faint(label);
  if (lineWidth(screen) < ROOM_FOR_LABELS) return [head, ...lines];
  const [first = '', ...rest] = lines;
  return [head + first.slice(INDENT + label.length), ...rest];
}

function saidAloud(
  screen: Screen, label: string, [first = '', ...rest]: readonly string[],
): readonly string[] {
  const name = label.charAt(0).toUpperCase() + label.slice(1);
  return [`${name}: ${first}`, ...rest].flatMap((sentence) => indented(screen, sentence));
}
