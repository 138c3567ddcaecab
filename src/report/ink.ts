import { Chalk } from 'chalk';
import type { Grade } from '../model/index.ts';

/** How many colours the screen shows: none, 16, 256, or all. */
export type Colours = 0 | 1 | 2 | 3;

/** What each part of a report is written with. Without colours each gives its words back. */
export interface Ink {
  readonly strong: (words: string) => string;
  /** For labels and what may be skipped; still readable. */
  readonly faint: (words: string) => string;
  /** A number in question. */
  readonly marked: (words: string) => string;
  readonly grade: (grade: Grade, words: string) => string;
}

/** One hue, that is readable on light and on dark, for what matters most. */
function mix(level: Colours): Ink {
  const chalk = new Chalk({ level });
  const grades: Record<Grade, (words: string) => string> = {
    contradiction: chalk.bold.magenta,
    discrepancy: chalk.bold,
    caution: chalk.bold,
  };
  return {
    strong: chalk.bold,
    faint: chalk.dim,
    marked: chalk.bold,
    grade: (grade, words) => grades[grade](words),
  };
}

const INKS: Readonly<Record<Colours, Ink>> = { 0: mix(0), 1: mix(1), 2: mix(2), 3: mix(3) };

/** The inks for a screen of so many colours. Colour only repeats what the words say. */
export function inkFor(colours: Colours): Ink {
  return INKS[colours];
}
