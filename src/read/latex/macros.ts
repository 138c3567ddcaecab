import { moveTo, readArgument, readOption, skipSpaces, type Source } from './scanning.ts';

/** A command that the source defines: `\newcommand{\pv}[1]{$p = #1$}`. */
export interface Macro {
  readonly body: string;
  readonly arguments: number;
  /** What stands for the first argument where it is not given. */
  readonly preset?: string;
}

/** Reads a definition behind `\newcommand` or one of its kin. */
export function readDefinition(source: Source): readonly [name: string, macro: Macro] | undefined {
  const name = readArgument(source, 200)?.trim().replace(/^\\/, '');
  if (name === undefined) return undefined;
  const count = Number.parseInt(readOption(source) ?? '0', 10);
  const preset = readOption(source);
  const body = readArgument(source);
  if (body === undefined || !(count >= 0 && count <= 9)) return undefined;
  return [name, { body, arguments: count, ...(preset === undefined ? {} : { preset }) }];
}

/** Reads a definition behind TeX's own `\def`: `\def\pv#1{…}`. */
export function readPlainDefinition(source: Source): readonly [string, Macro] | undefined {
  skipSpaces(source);
  const head = /\\([A-Za-z@]+)\s*((?:#\d)*)\s*(?=\{)/y;
  head.lastIndex = source.at;
  const found = head.exec(source.text);
  if (found === null) return undefined;
  moveTo(source, source.at + found[0].length);
  const body = readArgument(source);
  if (body === undefined) return undefined;
  return [found[1] as string, { body, arguments: (found[2] as string).length / 2 }];
}

/** What a command stands for with the arguments that follow it. */
export function expansion({ body, arguments: count, preset }: Macro, source: Source): string {
  const given: string[] = [];
  if (preset !== undefined) given.push(readOption(source) ?? preset);
  while (given.length < count) given.push(readArgument(source) ?? '');
  return count === 0 ? body : body.replace(/#(\d)/g, (_, digit) => given[Number(digit) - 1] ?? '');
}
