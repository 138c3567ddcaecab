import type { Screen } from '../report/screen.ts';

/** What the shell's environment and the options say about where the report is shown. */
export interface Surroundings {
  /** Columns of the terminal; undefined where the output is no terminal. */
  readonly columns: number | undefined;
  readonly isTerminal: boolean;
  /** How many colours the terminal has, in bits, as Node tells. */
  readonly colourDepth: number;
  readonly environment: Readonly<Record<string, string | undefined>>;
  readonly platform: string;
}

const USUAL_COLUMNS = 80;

/**
 * The screen to write for. Colours only on a terminal, and never with
 * `--no-color` or NO_COLOR; COLUMNS is believed where there is no terminal.
 */
export function screenOf(
  { columns, isTerminal, colourDepth, environment, platform }: Surroundings,
  { color, plain }: { readonly color: boolean; readonly plain: boolean },
): Screen {
  const named = Number(environment['COLUMNS']);
  const coloured = color && isTerminal && (environment['NO_COLOR'] ?? '') === '';
  return {
    columns: columns ?? (Number.isInteger(named) && named > 0 ? named : USUAL_COLUMNS),
    colours: coloured ? coloursOf(colourDepth) : 0,
    unicode: showsUnicode(environment, platform),
    drawings: !plain,
  };
}

/** A file takes the usual width, no colours, and every character. */
export function screenOfFile({ plain }: { readonly plain: boolean }): Screen {
  return { columns: USUAL_COLUMNS, colours: 0, unicode: true, drawings: !plain };
}

function coloursOf(depth: number): Screen['colours'] {
  if (depth >= 24) return 3;
  if (depth >= 8) return 2;
  return depth >= 4 ? 1 : 0;
}

function showsUnicode(
  environment: Readonly<Record<string, string | undefined>>, platform: string,
): boolean {
  if (platform === 'win32') return 'WT_SESSION' in environment || 'TERM_PROGRAM' in environment;
  const locale = environment['LC_ALL'] || environment['LC_CTYPE'] || environment['LANG'] || '';
  return /utf-?8/i.test(locale) && environment['TERM'] !== 'linux';
}
