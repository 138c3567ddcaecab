import type { Manuscript, Notice } from '../../model/index.ts';
import { composeTold } from '../compose-told.ts';
import { ReadError } from '../read-error.ts';
import type { Inline } from '../told.ts';
import { printedMath, printedText } from './characters.ts';
import { FLOATS } from './commands.ts';
import { endAll, endTo } from './environments.ts';
import { closeGroup, openGroup, openNamed } from './groups.ts';
import { nextCell } from './in-table.ts';
import { obey } from './in-text.ts';
import { numberingOf } from './numbering.ts';
import { currentSource, endParagraph, type Reading, say, startReading } from './reading.ts';
import { nextToken, type Token } from './scanning.ts';

/**
 * Reads LaTeX source as TeX would print it: sections, tables with their captions
 * and notes, formulas, footnotes. Commands that the source defines stand for
 * what they say, a bounded number of times. Lines are those of the source.
 */
export function readLatex(source: string, name: string): Manuscript {
  const reading = startReading(source, numberingOf(source, FLOATS));
  readAll(reading);
  return finished(reading, name);
}

/** The words of a formula in LaTeX, as other forms hold them between dollar signs. */
export function formulaWords(formula: string): readonly Inline[] {
  const reading = startReading(formula, numberingOf('', FLOATS));
  reading.inMath = true;
  readAll(reading);
  return reading.words;
}

function readAll(reading: Reading): void {
  while (!reading.ended) {
    const token = nextToken(currentSource(reading), reading.pending.length > 0);
    if (token.kind !== 'end') take(reading, token);
    else if (reading.sources.length > 1) reading.sources.pop();
    else reading.ended = true;
  }
}

function take(reading: Reading, token: Exclude<Token, { kind: 'end' }>): void {
  const [role] = reading.pending;
  if (role === undefined || typeof role === 'string') takePlain(reading, token);
  else if (token.kind === 'space' || token.kind === 'comment') passComment(reading, token);
  else if (token.kind === 'open' || isArgument(token)) {
    reading.pending = reading.pending.slice(1);
    openGroup(reading, role);
    if (token.kind === 'open') return;
    const depth = reading.groups.length;
    takePlain(reading, token);
    if (reading.groups.length >= depth) closeGroup(reading); // the token may have ended it
  } else {
    reading.pending = [];
    takePlain(reading, token);
  }
}

/** What may stand as an argument without braces: `x^2`, `\frac12`. */
function isArgument(token: Token): boolean {
  if (token.kind === 'command') return !/^(?:begin|end|par|item|[\\)\]])$/.test(token.name);
  return token.kind === 'text';
}

function takePlain(reading: Reading, token: Exclude<Token, { kind: 'end' }>): void {
  switch (token.kind) {
    case 'text':
      say(reading, reading.inMath ? printedMath(token.text) : printedText(token.text));
      break;
    case 'space':
      say(reading, ' ');
      break;
    case 'tie':
      say(reading, '\u00a0');
      break;
    case 'paragraph':
      breakParagraph(reading);
      break;
    case 'comment':
      passComment(reading, token);
      break;
    case 'command':
      obey(reading, token);
      break;
    case 'open':
      openGroup(reading, { kind: 'plain' });
      break;
    case 'close':
      if (reading.groups.at(-1)?.environment === undefined) closeGroup(reading);
      break;
    case 'align':
      if (reading.passedOver === 0) nextCell(reading);
      break;
    case 'math':
      toggleMath(reading, token.display ? '$$' : '$');
      break;
    case 'raise':
    case 'lower':
      shift(reading, token.kind);
      break;
    default:
      token satisfies never;
  }
}

function toggleMath(reading: Reading, sign: string): void {
  if (endTo(reading, sign)) {
    if (sign === '$$') say(reading, ' ');
  } else openNamed(reading, { kind: 'math' }, sign);
}

/** A formula in a line ends with its paragraph, whether or not it was closed. */
function breakParagraph(reading: Reading): void {
  endTo(reading, '$');
  if (reading.passedOver === 0) endParagraph(reading);
}

/** Raised and lowered marks are those of formulas; in text the signs stand for themselves. */
function shift(reading: Reading, kind: 'raise' | 'lower'): void {
  if (reading.inMath) {
    const mark = kind === 'raise' ? 'superscript' : 'subscript';
    reading.pending = [{ kind: 'mark', mark }, ...reading.pending];
  } else say(reading, kind === 'raise' ? '^' : '_');
}

/** A percent sign behind a figure was meant to be printed, more often than not. */
function passComment(reading: Reading, token: Token): void {
  if (token.kind === 'comment' && token.line !== undefined && reading.begun) {
    reading.hidden.push(token.line);
  }
}

function finished(reading: Reading, name: string): Manuscript {
  endAll(reading);
  const notices = [...hiddenNotice(reading.hidden), ...reading.notices];
  const manuscript = composeTold(reading.blocks, name, 'latex', notices);
  if (manuscript.blocks.length > 0) return manuscript;
  throw new ReadError(
    'The LaTeX source prints no text. If it only brings in other files, read those, ' +
      'or read the PDF that it makes.',
  );
}

function hiddenNotice(lines: readonly number[]): readonly Notice[] {
  if (lines.length === 0) return [];
  const named = lines.slice(0, 5).join(', ') + (lines.length > 5 ? ', …' : '');
  return [
    {
      message:
        'A percent sign without a backslash hides the rest of its line, as it does in print: ' +
        `line ${named}. ` +
        'If it was to be printed, write \\%.',
    },
  ];
}
