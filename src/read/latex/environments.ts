import { plainWords, type ToldTable } from '../told.ts';
import { ENVIRONMENT_ARGUMENTS, FLOATS, FORMULAS, PASSED_OVER, TABLES } from './commands.ts';
import { closeGroup, closeNamed, openNamed } from './groups.ts';
import { closeTable, openTable } from './in-table.ts';
import {
  currentSource, endParagraph, isReading, layOut, lineOf, type OpenFloat, type Reading, say,
} from './reading.ts';
import { moveTo, readArgument, readOption, type Source } from './scanning.ts';

/** Begins an environment by its name, whose star says nothing. */
export function beginEnvironment(reading: Reading): void {
  const source = currentSource(reading);
  const starred = (readArgument(source, 200) ?? '').trim();
  const name = starred.replace(/\*$/, '');
  if (PASSED_OVER.has(name)) {
    passOver(source, starred);
    return;
  }
  if (name === 'document') reading.begun = true;
  if (!isReading(reading)) return;
  const isFormula = FORMULAS.has(name);
  if (!isFormula && reading.table === undefined && !FLOATS.has(name)) endParagraph(reading);
  if (FLOATS.has(name)) {
    endTo(reading, '$');
    openFloat(reading, FLOATS.get(name) ?? 'Table');
  }
  if (starred === 'tabular*') readArgument(source, 2000);
  readArguments(source, TABLES.get(name) ?? ENVIRONMENT_ARGUMENTS.get(name) ?? 'o');
  openNamed(reading, { kind: isFormula ? 'math' : 'plain' }, name);
  if (TABLES.has(name)) openTable(reading);
  if (name === 'abstract') openSection(reading, 'Abstract');
  if (name === 'thebibliography') openSection(reading, 'References');
  if (name === 'tablenotes') reading.paragraphKind = 'note';
}

function passOver(source: Source, name: string): void {
  const end = source.text.indexOf(`\\end{${name}}`, source.at);
  moveTo(source, end < 0 ? source.text.length : end + name.length + 6);
}

function readArguments(source: Source, kinds: string): void {
  for (const kind of kinds) {
    if (kind === 'o') readOption(source);
    else readArgument(source, 2000);
  }
}

/** A heading that the environment itself prints. */
function openSection(reading: Reading, heading: string): void {
  const words = [{ kind: 'words', text: heading, line: lineOf(reading) }] as const;
  reading.blocks.push({ kind: 'heading', words });
}

/** What floats is set down beside the paragraph in whose middle it may stand. */
function openFloat(reading: Reading, thing: OpenFloat['thing']): void {
  if (reading.apart > 0 || reading.table !== undefined) return;
  const { words, blocks } = reading;
  const float: OpenFloat = { thing, blocks: [], around: { words, blocks }, caption: undefined };
  reading.floats.push(float);
  [reading.words, reading.blocks] = [[], float.blocks];
}

/** Ends an environment, and with it the groups in it that were not ended. */
export function endEnvironment(reading: Reading): void {
  const name = (readArgument(currentSource(reading), 200) ?? '').trim().replace(/\*$/, '');
  if (name === 'document') {
    reading.ended = true;
    return;
  }
  endTo(reading, name);
}

/** Ends the innermost environment or formula of a name with all in it; false where none is open. */
export function endTo(reading: Reading, name: string): boolean {
  return closeNamed(reading, name, endNamed);
}

/** Ends everything that is still open at the end of the source. */
export function endAll(reading: Reading): void {
  for (let group = reading.groups.at(-1); group !== undefined; group = reading.groups.at(-1)) {
    const { environment } = group;
    if (environment === undefined) closeGroup(reading);
    else endTo(reading, environment);
  }
  endParagraph(reading);
}

/** What opens a formula without a name: $, $$, \\( and \\[. */
const FORMULA_SIGN = /^[$([]/;

function endNamed(reading: Reading, name: string): void {
  if (FORMULA_SIGN.test(name)) return;
  if (TABLES.has(name)) endTable(reading);
  if (FLOATS.has(name)) closeFloat(reading);
  else if (FORMULAS.has(name)) say(reading, ' ');
  else if (reading.table === undefined) endParagraph(reading);
  else layOut(reading, 'break');
  if (name === 'tablenotes') reading.paragraphKind = 'paragraph';
}

/** Notes that were called for in a table follow it. */
function endTable(reading: Reading): void {
  const cells = closeTable(reading);
  if (cells === undefined) return;
  const table: ToldTable = { kind: 'table', cells };
  if (reading.apart > 0) {
    reading.after.push(table);
    return;
  }
  const { after } = reading;
  reading.after = [];
  endParagraph(reading);
  reading.blocks.push(table, ...after);
}

/** The caption of a float is that of the first table in it, or stands before what is in it. */
function closeFloat(reading: Reading): void {
  if (reading.apart > 0) return;
  endParagraph(reading);
  const float = reading.floats.pop();
  if (float === undefined) return;
  const blocks = captioned(float);
  [reading.words, reading.blocks] = [float.around.words, float.around.blocks];
  if (plainWords(reading.words) === '') reading.blocks.push(...blocks);
  else reading.after.push(...blocks);
}

function captioned({ blocks, caption }: OpenFloat): OpenFloat['blocks'] {
  if (caption === undefined) return blocks;
  const at = blocks.findIndex(({ kind }) => kind === 'table');
  if (at < 0) return [{ kind: 'caption', words: caption }, ...blocks];
  return blocks.map((block, i) => (i === at ? { ...(block as ToldTable), caption } : block));
}
