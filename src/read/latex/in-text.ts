import { ACCENTS, CHARACTERS } from './characters.ts';
import { COMMANDS, LOOKS } from './commands.ts';
import { beginEnvironment, endEnvironment, endTo } from './environments.ts';
import { expectArguments, openNamed } from './groups.ts';
import { endRepeated, nextRow, ruleIn, spanCell } from './in-table.ts';
import { expansion, type Macro, readDefinition, readPlainDefinition } from './macros.ts';
import { citation } from './numbering.ts';
import {
  currentSource, endParagraph, isReading, layOut, lineOf, type Reading, say,
} from './reading.ts';
import { moveTo, readArgument, readOption, skipSpaces, sourceOf, type Token } from './scanning.ts';

type Command = Extract<Token, { readonly kind: 'command' }>;

/** Does what a command says. Commands that are not known leave their arguments as text. */
export function obey(reading: Reading, command: Command): void {
  const name = command.name.length > 1 ? command.name.replace(/\*$/, '') : command.name;
  const special = Object.hasOwn(SPECIAL, name) ? SPECIAL[name] : undefined;
  const macro = reading.macros.get(name);
  const character = CHARACTERS.get(name);
  const shape = COMMANDS.get(name);
  if (special !== undefined) special(reading, name);
  else if (macro !== undefined) expand(reading, macro);
  else if (character !== undefined) sayCharacter(reading, character, command);
  else if (ACCENTS.has(name)) accent(reading, name);
  else if (LOOKS.has(name)) reading.look = LOOKS.get(name);
  else if (shape !== undefined) startCommand(reading, name, shape);
  else if (CITES.test(name)) cite(reading);
  else if (REFERS.test(name)) refer(reading, name);
  else if (!command.spaced) readOption(currentSource(reading));
}

/** In text the blanks behind a name only end it; formulas are written with them for the eye. */
function sayCharacter(reading: Reading, character: string, { spaced }: Command): void {
  say(reading, character);
  if (spaced && reading.inMath) say(reading, ' ');
}

type Obeying = (reading: Reading, name: string) => void;

const SPECIAL: Readonly<Record<string, Obeying>> = {
  begin: beginEnvironment,
  end: endEnvironment,
  par: endParagraph,
  '\\': (reading) => {
    readOption(currentSource(reading));
    nextRow(reading);
  },
  tabularnewline: nextRow,
  cr: nextRow,
  newline: (reading) => layOut(reading, 'break'),
  linebreak: (reading) => layOut(reading, 'break'),
  hline: ruleIn,
  midrule: ruleIn,
  Xhline: ruleIn,
  endfirsthead: endRepeated,
  endhead: endRepeated,
  endfoot: endRepeated,
  endlastfoot: endRepeated,
  multicolumn: (reading) => spanCell(reading, 'multicolumn'),
  multirow: (reading) => spanCell(reading, 'multirow'),
  item: startItem,
  bibitem: startReference,
  newcommand: define,
  providecommand: define,
  renewcommand: define,
  DeclareRobustCommand: define,
  DeclareMathOperator: define,
  def: (reading) => keep(reading, readPlainDefinition(currentSource(reading))),
  gdef: (reading) => keep(reading, readPlainDefinition(currentSource(reading))),
  input: bringIn,
  include: bringIn,
  iffalse: (reading) => passTo(reading, '\\fi'),
  verb: sayVerbatim,
  lstinline: sayVerbatim,
  cmidrule: (reading) => passRule(reading),
  left: (reading) => passDelimiter(reading),
  right: (reading) => passDelimiter(reading),
  '(': (reading) => openNamed(reading, { kind: 'math' }, '('),
  '[': (reading) => openNamed(reading, { kind: 'math' }, '['),
  ')': (reading) => void endTo(reading, '('),
  ']': (reading) => void endTo(reading, '['),
  twocolumn: readAcross,
};

function startCommand(
  reading: Reading,
  name: string,
  shape: Parameters<typeof expectArguments>[1],
): void {
  if (name === 'footnote' && isReading(reading)) {
    say(reading, String(++reading.counts.footnote), 'superscript');
  }
  expectArguments(reading, shape);
}

// \'e   \'{e}   \"\i
function accent(reading: Reading, name: string): void {
  const letter = (readArgument(currentSource(reading), 200) ?? '').replace(/^\\([ij])$/, '$1');
  const sign = /^\\([A-Za-z]+)$/.exec(letter);
  const base = sign === null ? letter : (CHARACTERS.get(sign[1] as string) ?? '');
  say(reading, `${base.slice(0, 1)}${ACCENTS.get(name) ?? ''}`.normalize('NFC') + base.slice(1));
}

function startItem(reading: Reading): void {
  const label = readOption(currentSource(reading));
  endParagraph(reading);
  if (label === undefined) return;
  const isNote = reading.paragraphKind === 'note';
  say(reading, label.replace(/[\\${}]/g, ''), isNote ? 'superscript' : undefined);
  say(reading, ' ');
}

function startReference(reading: Reading): void {
  readOption(currentSource(reading));
  readArgument(currentSource(reading), 2000);
  endParagraph(reading);
  say(reading, `${++reading.counts.reference}. `);
}

function define(reading: Reading, name: string): void {
  const definition = readDefinition(currentSource(reading));
  const isKnown = definition !== undefined && isBuiltIn(definition[0]);
  if (name !== 'newcommand' && isKnown) return;
  keep(reading, definition);
}

function isBuiltIn(name: string): boolean {
  return COMMANDS.has(name) || CHARACTERS.has(name) || ACCENTS.has(name) || LOOKS.has(name);
}

function keep({ macros }: Reading, definition: readonly [string, Macro] | undefined): void {
  if (definition !== undefined && definition[0] !== '') macros.set(...definition);
}

/** Deeper than this, a command stands for itself. */
const DEEPEST = 20;

/** Reads what a command stands for, where that comes to an end. */
function expand(reading: Reading, macro: Macro): void {
  const body = expansion(macro, currentSource(reading));
  reading.budget -= body.length + 1;
  if (reading.sources.length <= DEEPEST && reading.budget > 0) {
    reading.sources.push(sourceOf(body, lineOf(reading), false));
  } else if (!reading.notices.some(({ message }) => message === ENDLESS)) {
    reading.notices.push({ message: ENDLESS });
  }
}

const ENDLESS =
  'Commands that the source defines by themselves, or that stand for very much, were left out.';

const CITES = /^[A-Za-z]*[cC]ite[a-z]*$/;
const REFERS = /^[A-Za-z]*ref$/;

function cite(reading: Reading): void {
  const source = currentSource(reading);
  readOption(source);
  readOption(source);
  const keys = readArgument(source, 2000);
  if (keys === undefined || !isReading(reading)) return;
  say(reading, citation(keys, reading.numbering.references), 'superscript');
}

function refer(reading: Reading, name: string): void {
  const label = readArgument(currentSource(reading), 500);
  const found = reading.numbering.labels.get(label ?? '');
  if (found === undefined) return;
  const named = /^(?:auto|[cC])ref$/.test(name) ? `${found.thing} ` : '';
  say(reading, `${named}${found.number}`);
}

function bringIn(reading: Reading, command: string): void {
  const file = readArgument(currentSource(reading), 500)?.trim() ?? '';
  if (!reading.begun || file === '') return;
  const message =
    `The source brings in another file with \\${command}, “${file}”, which was not read.`;
  if (reading.notices.length < 20) reading.notices.push({ message });
}

function passTo(reading: Reading, words: string): void {
  const source = currentSource(reading);
  const end = source.text.indexOf(words, source.at);
  moveTo(source, end < 0 ? source.text.length : end + words.length);
  skipSpaces(source);
}

function sayVerbatim(reading: Reading): void {
  const source = currentSource(reading);
  const sign = source.text[source.at];
  const end = sign === undefined ? -1 : source.text.indexOf(sign, source.at + 1);
  if (end > source.at && end < source.at + 500) say(reading, moveTo(source, end + 1).slice(1, -1));
}

// \cmidrule(lr){2-3}
function passRule(reading: Reading): void {
  const source = currentSource(reading);
  readOption(source);
  const trim = /\([a-z{}.\d\s]*\)/y;
  trim.lastIndex = source.at;
  moveTo(source, source.at + (trim.exec(source.text)?.[0].length ?? 0));
  readArgument(source, 200);
}

/** \left( prints its bracket; \left. prints none. */
function passDelimiter(reading: Reading): void {
  const source = currentSource(reading);
  skipSpaces(source);
  if (source.text[source.at] === '.') source.at++;
}

// \twocolumn[…]: what stands in brackets is set across both columns
function readAcross(reading: Reading): void {
  const line = lineOf(reading);
  const words = readOption(currentSource(reading));
  if (words !== undefined) reading.sources.push(sourceOf(words, line, false));
}
