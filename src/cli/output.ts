import { randomBytes } from 'node:crypto';
import { realpath, rename, rm, stat, writeFile } from 'node:fs/promises';
import { dirname } from 'node:path';

/** The report cannot be put where it should go. The message says what to do next. */
export class WriteError extends Error {
  override readonly name = 'WriteError';
}

/** Where a report goes. */
export interface Output {
  readonly write: (text: string) => void;
  /** Called once, when all has been written. */
  readonly finish: () => Promise<void>;
}

/** Writes as it comes. */
export function outputTo(stream: NodeJS.WriteStream): Output {
  return {
    write: (text) => {
      stream.write(text);
    },
    finish: async () => {},
  };
}

/** Keeps all until the end, so that the file is either the old one or the whole new one. */
export function outputToFile(path: string): Output {
  const parts: string[] = [];
  return {
    write: (text) => {
      parts.push(text);
    },
    finish: async () => {
      await replace(path, parts.join('')).catch((problem: NodeJS.ErrnoException) => {
        throw new WriteError(`${path} could not be written (${problem.code ?? problem.message}). `
          + 'Name a file in a folder where you may write.');
      });
    },
  };
}

/** Writes beside the file and renames; a device or a pipe is written to as it is. */
async function replace(path: string, text: string): Promise<void> {
  const target = await realpath(path).catch(() => path);
  const known = await stat(target).catch(() => undefined);
  if (known !== undefined && !known.isFile()) return writeFile(target, text);
  const beside = `${target}.${randomBytes(4).toString('hex')}.part`;
  try {
    await writeFile(beside, text, known === undefined ? {} : { mode: known.mode });
    await rename(beside, target);
  } catch (problem) {
    await rm(beside, { force: true });
    throw problem;
  }
}

/**
 * Throws a `WriteError` where a report on `paths` cannot be put at `out`: this is
 * told before the work is done rather than after.
 */
export async function refuseObstacle(out: string, paths: readonly string[]): Promise<void> {
  const folder = await stat(dirname(out)).catch(() => undefined);
  if (folder?.isDirectory() !== true) {
    throw new WriteError(`There is no folder ${dirname(out)} to put the report in. `
      + 'Make it, or name another.');
  }
  const known = await stat(out).catch(() => undefined);
  if (known?.isDirectory() === true) {
    throw new WriteError(`${out} is a folder. Name a file for the report.`);
  }
  const target = await realpath(out).catch(() => undefined);
  const read = await Promise.all(paths.map((path) => realpath(path).catch(() => undefined)));
  if (target !== undefined && read.includes(target)) {
    throw new WriteError(`${out} is one of the files to be read. Name another file.`);
  }
}
