import { readFile, stat } from 'node:fs/promises';
import { ReadError } from '../read/read-error.ts';

/** A file to be read, or what is typed or piped in. */
export interface Source {
  /** How it is called in reports: the path as given, or "pasted text". */
  readonly name: string;
  readonly bytes: () => Promise<Uint8Array>;
}

/** Where the files named on the command line are read from; "-" or no name is standard input. */
export function sourcesOf(paths: readonly string[], input: Input): readonly Source[] {
  const named = paths.length === 0 ? ['-'] : paths;
  return [...new Set(named)].map((path) =>
    path === '-' ? pasted(input) : { name: path, bytes: () => bytesOf(path) });
}

/** Standard input, and where to say how to end it. */
export interface Input {
  readonly stream: NodeJS.ReadStream;
  readonly hint: (sentence: string) => void;
}

/** The most that is read, in bytes: far more than any manuscript without its films. */
const MOST_BYTES = 64 * 1024 * 1024;

function pasted({ stream, hint }: Input): Source {
  return {
    name: 'pasted text',
    bytes: async () => {
      if (stream.isTTY) hint(HOW_TO_PASTE);
      const bytes = await everythingFrom(stream);
      if (bytes.length > 0) return bytes;
      throw new ReadError('Nothing came in. Paste or pipe in some text, or name a file.');
    },
  };
}

const HOW_TO_PASTE = process.platform === 'win32'
  ? 'Paste the text, then press Ctrl-Z and Enter. For a file: tallystick check paper.pdf'
  : 'Paste the text, press Enter, then Ctrl-D. For a file: tallystick check paper.pdf';

async function everythingFrom(stream: NodeJS.ReadStream): Promise<Uint8Array> {
  const chunks: Buffer[] = [];
  let size = 0;
  for await (const chunk of stream) {
    chunks.push(Buffer.from(chunk as Buffer));
    size += (chunk as Buffer).length;
    if (size > MOST_BYTES) throw new ReadError('More than 64 MB came in. Give it in parts.');
  }
  return Buffer.concat(chunks);
}

async function bytesOf(path: string): Promise<Uint8Array> {
  try {
    const found = await stat(path);
    if (found.isDirectory()) throw new ReadError(DIRECTORY);
    if (found.size > MOST_BYTES) throw new ReadError(TOO_LARGE);
    return await readFile(path);
  } catch (problem) {
    throw problem instanceof ReadError ? problem : new ReadError(sentenceFor(problem));
  }
}

const DIRECTORY = 'This is a folder. Name the files in it, for instance with folder/*.pdf.';
const TOO_LARGE = 'The file is larger than 64 MB. Save a copy without pictures or supplements '
  + 'and read that.';

function sentenceFor(problem: unknown): string {
  const code = problem instanceof Error && 'code' in problem ? String(problem.code) : 'unknown';
  switch (code) {
    case 'ENOENT':
    case 'ENOTDIR': return 'There is no such file. Check the spelling, and the folder you are in.';
    case 'EACCES':
    case 'EPERM': return 'You may not read this file. Ask for permission, or read a copy of it.';
    case 'ENAMETOOLONG': return 'The name is too long for a file. To check text, pipe it in.';
    default: return `The file could not be opened (${code}). Copy it elsewhere and try again.`;
  }
}
