import { captionLabel } from '../captions.ts';
import { type Inline, plainWords } from '../told.ts';
import type { Role } from './commands.ts';
import {
  currentSource, endParagraph, type Group, isReading, lineOf, type Reading, say,
} from './reading.ts';
import { readOption } from './scanning.ts';

/** Begins a group; `role` says what becomes of its words. */
export function openGroup(reading: Reading, role: Role, environment?: string): void {
  const { mark, look, inMath } = reading;
  const isApart = isReadApart(role) && (isReading(reading) || isTitleBefore(reading, role));
  const apart = isApart ? { words: reading.words, table: reading.table } : undefined;
  const then = environment === undefined ? reading.pending : [];
  const named = environment === undefined ? {} : { environment };
  const around = { mark, look, inMath, ...(apart === undefined ? {} : { apart }) };
  reading.groups.push({ role, ...named, ...around, then });
  reading.pending = [];
  if (apart !== undefined) {
    [reading.words, reading.table] = [[], undefined];
    reading.apart++;
  }
  begin(reading, role);
}

function isReadApart({ kind }: Role): boolean {
  return kind === 'heading' || kind === 'title' || kind === 'caption' || kind === 'footnote';
}

/** The title is set before the text begins, and is printed in it. */
function isTitleBefore({ passedOver }: Reading, { kind }: Role): boolean {
  return passedOver === 0 && kind === 'title';
}

function begin(reading: Reading, role: Role): void {
  if (role.kind === 'skip') reading.passedOver++;
  else if (role.kind === 'title') reading.titles++;
  else if (role.kind === 'mark') reading.mark = role.mark;
  else if (role.kind === 'look') reading.look = role.look;
  else if (role.kind === 'math') reading.inMath = true;
  else if (role.kind === 'upright') reading.inMath = false;
}

/** Begins a group that its name ends: an environment, a formula. */
export function openNamed(reading: Reading, role: Role, name: string): void {
  openGroup(reading, role, name);
  reading.environments.set(name, (reading.environments.get(name) ?? 0) + 1);
}

/**
 * Ends the group of a name, and with it the groups in it that were not ended.
 * False where none of that name is open. `onEnd` does what the end of each name asks for.
 */
export function closeNamed(
  reading: Reading,
  name: string,
  onEnd: (reading: Reading, name: string) => void,
): boolean {
  if ((reading.environments.get(name) ?? 0) === 0) return false;
  for (let ended: string | undefined; ended !== name && reading.groups.length > 0;) {
    ended = reading.groups.at(-1)?.environment;
    if (ended !== undefined) {
      reading.environments.set(ended, (reading.environments.get(ended) ?? 1) - 1);
      onEnd(reading, ended);
    }
    closeGroup(reading);
  }
  return true;
}

/** Ends the innermost group. A brace that closes none is passed over. */
export function closeGroup(reading: Reading): void {
  const group = reading.groups.pop();
  if (group === undefined) return;
  if (group.role.kind === 'skip') reading.passedOver--;
  if (group.role.kind === 'title') reading.titles--;
  if (group.apart !== undefined) endApart(reading, group, group.apart);
  [reading.mark, reading.look, reading.inMath] = [group.mark, group.look, group.inMath];
  reading.pending = group.then;
  sayPending(reading);
}

/** Prints what stands between two arguments: the stroke of a fraction. */
export function sayPending(reading: Reading): void {
  for (let [next] = reading.pending; typeof next === 'string'; [next] = reading.pending) {
    say(reading, next);
    reading.pending = reading.pending.slice(1);
  }
}

function endApart(reading: Reading, { role }: Group, apart: NonNullable<Group['apart']>): void {
  const { words } = reading;
  [reading.words, reading.table] = [apart.words, apart.table];
  reading.apart--;
  if (role.kind === 'heading' || role.kind === 'title') {
    if (role.kind === 'heading') endParagraph(reading);
    reading.blocks.push({ kind: role.kind, words });
  } else if (role.kind === 'caption') closeCaption(reading, words);
  else reading.after.push({ kind: 'note', words });
}

/** A caption gets the label that TeX prints, unless its words bring one along. */
function closeCaption(reading: Reading, words: readonly Inline[]): void {
  const float = reading.floats.at(-1);
  const labelled = captionLabel(plainWords(words)) === '' ? [...label(reading), ...words] : words;
  if (float === undefined) reading.after.push({ kind: 'caption', words: labelled });
  else if (float.caption === undefined) float.caption = labelled;
  else float.blocks.push({ kind: 'caption', words: labelled });
}

function label(reading: Reading): readonly Inline[] {
  const thing = reading.floats.at(-1)?.thing;
  if (thing === undefined) return [];
  const number = ++reading.counts[thing];
  return [{ kind: 'words', text: `${thing} ${number}. `, line: lineOf(reading) }];
}

/** Prepares for the arguments of a command; its options and its star say nothing. */
export function expectArguments(reading: Reading, shape: Reading['pending']): void {
  readOption(currentSource(reading));
  reading.pending = shape;
  sayPending(reading);
}
