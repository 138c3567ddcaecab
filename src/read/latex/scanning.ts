/** A stretch of LaTeX source that is being read: the file, or what a command stands for. */
export interface Source {
  readonly text: string;
  at: number;
  /** The line of the file, from 1, that `at` stands in; that of the command for its text. */
  line: number;
  /** Whether lines are counted here: they are in the file, and not in what a command stands for. */
  readonly counts: boolean;
  /** How many braces turned out never to be closed; after some of them few are looked for. */
  unclosed: number;
}

/** A source at its beginning. */
export function sourceOf(text: string, line: number, counts: boolean): Source {
  return { text, at: 0, line, counts, unclosed: 0 };
}

/** What the source consists of, piece by piece. */
export type Token =
  /** `spaced` where blanks follow, which only end its name. */
  | { readonly kind: 'command'; readonly name: string; readonly spaced: boolean }
  | { readonly kind: 'open' | 'close' | 'align' | 'raise' | 'lower' | 'tie' | 'space' }
  | { readonly kind: 'paragraph' }
  | { readonly kind: 'end' }
  | { readonly kind: 'math'; readonly display: boolean }
  /** `line` where it stands right behind a figure: then it was perhaps to be printed. */
  | { readonly kind: 'comment'; readonly line?: number }
  | { readonly kind: 'text'; readonly text: string };

/** Moves on, counting the lines that are passed. */
export function moveTo(source: Source, end: number): string {
  const passed = source.text.slice(source.at, end);
  source.at = end;
  if (source.counts) {
    for (let at = passed.indexOf('\n'); at >= 0; at = passed.indexOf('\n', at + 1)) source.line++;
  }
  return passed;
}

const SINGLES: Readonly<Record<string, 'open' | 'close' | 'align' | 'raise' | 'lower' | 'tie'>> = {
  '{': 'open', '}': 'close', '&': 'align', '^': 'raise', _: 'lower', '~': 'tie',
};

/** Everything up to a character that means something to TeX. */
const PLAIN = /[^\\{}&^_~$%\s]+/y;
const BLANK = /\s+/y;
const COMMAND = /\\(?:[A-Za-z@]+\*?|[\s\S]|$)/y;

/** Reads the next piece; `single` where a command takes one character as what it is about. */
export function nextToken(source: Source, single: boolean): Token {
  const { text, at } = source;
  const char = text[at];
  if (char === undefined) return { kind: 'end' };
  if (char === '\\') return command(source);
  if (char === '$') return math(source);
  if (char === '%') return comment(source);
  if (/\s/.test(char)) return blank(source);
  const kind = SINGLES[char];
  if (kind !== undefined) {
    source.at++;
    return { kind };
  }
  PLAIN.lastIndex = at;
  const end = at + (single ? 1 : (PLAIN.exec(text)?.[0].length ?? 1));
  return { kind: 'text', text: moveTo(source, end) };
}

function command(source: Source): Token {
  COMMAND.lastIndex = source.at;
  const found = COMMAND.exec(source.text)?.[0] ?? '\\';
  moveTo(source, source.at + found.length);
  // the blanks behind a command of letters only end its name
  const { at } = source;
  if (/[A-Za-z@*]$/.test(found) && found.length > 1) skipSpaces(source);
  return { kind: 'command', name: found.slice(1), spaced: source.at > at };
}

function math(source: Source): Token {
  const display = source.text[source.at + 1] === '$';
  source.at += display ? 2 : 1;
  return { kind: 'math', display };
}

function comment(source: Source): Token {
  const end = source.text.indexOf('\n', source.at);
  const isBehindFigure = /\d ?$/.test(source.text.slice(Math.max(0, source.at - 2), source.at));
  const { line } = source;
  moveTo(source, end < 0 ? source.text.length : end + 1);
  skipSpaces(source);
  return { kind: 'comment', ...(isBehindFigure && source.counts ? { line } : {}) };
}

function blank(source: Source): Token {
  BLANK.lastIndex = source.at;
  const words = moveTo(source, source.at + (BLANK.exec(source.text)?.[0].length ?? 1));
  return { kind: /\n[^\S\n]*\n/.test(words) ? 'paragraph' : 'space' };
}

/** Passes blanks, but no end of a line beyond one: an empty line ends a paragraph. */
export function skipSpaces(source: Source): void {
  const found = /[^\S\n]*(?:\n[^\S\n]*(?!\s*\n))?/y;
  found.lastIndex = source.at;
  moveTo(source, source.at + (found.exec(source.text)?.[0].length ?? 0));
}

/** Longer optional arguments than this are no arguments: "[" stands for itself. */
const LONGEST_OPTION = 2000;

/** Reads "[…]" if it stands right here: its words, or undefined. */
export function readOption(source: Source): string | undefined {
  if (source.text[source.at] !== '[') return undefined;
  let depth = 0;
  const last = Math.min(source.text.length, source.at + LONGEST_OPTION);
  for (let at = source.at + 1; at < last; at++) {
    const char = source.text[at];
    if (char === '\\') at++;
    else if (char === '{') depth++;
    else if (char === '}') depth--;
    else if (char === ']' && depth <= 0) return moveTo(source, at + 1).slice(1, -1);
    if (depth < 0) return undefined;
  }
  return undefined;
}

/** Longer arguments than this are braces that were never closed. */
const LONGEST_ARGUMENT = 20_000;

/** Reads the argument that stands next: what is in braces, a command, or one character. */
export function readArgument(source: Source, longest = LONGEST_ARGUMENT): string | undefined {
  skipSpaces(source);
  const { text, at } = source;
  const char = text[at];
  if (char === undefined || /[\s}&]/.test(char)) return undefined;
  if (char === '\\') {
    COMMAND.lastIndex = at;
    return moveTo(source, at + (COMMAND.exec(text)?.[0].length ?? 1));
  }
  if (char !== '{') return moveTo(source, at + 1);
  const end = closingBrace(text, at, source.unclosed > MANY_UNCLOSED ? 200 : longest);
  if (end !== undefined) return moveTo(source, end + 1).slice(1, -1);
  source.unclosed++;
  return undefined;
}

const MANY_UNCLOSED = 20;

function closingBrace(text: string, open: number, longest: number): number | undefined {
  let depth = 0;
  const last = Math.min(text.length, open + longest);
  for (let at = open; at < last; at++) {
    const char = text[at];
    if (char === '\\') at++;
    else if (char === '{') depth++;
    else if (char === '}' && --depth === 0) return at;
  }
  return undefined;
}
