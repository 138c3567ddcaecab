import { unzipSync } from 'fflate';
import { decode } from '../decode.ts';
import { ReadError } from '../read-error.ts';

/** The parts of a Word file that hold text, by name: "word/document.xml". */
export type Parts = ReadonlyMap<string, string>;

/** The most that the text of a file may take up unpacked: some 300 times a long manuscript. */
const MOST_UNPACKED = 96 * 1024 * 1024;

const DAMAGED =
  'The Word file is damaged or incomplete: it cannot be unpacked. ' +
  'Save or download it again, or open it in Word and save it as PDF.';
const SWOLLEN =
  'The Word file is far too large once unpacked. Save a copy without pictures and ' +
  'embedded files, or save it as PDF, and read that.';

// Only these are unpacked, and nothing is ever written: a name that leads elsewhere leads nowhere.
const WANTED = /^(?:_rels\/\.rels|word\/(?:document\d*|styles\d*|footnotes\d*|endnotes\d*)\.xml)$/;

/** Unpacks the parts that hold text. Throws `ReadError` where the file is damaged or swollen. */
export function partsOf(bytes: Uint8Array): Parts {
  let left = MOST_UNPACKED;
  let isSwollen = false;
  const filter = ({ name, originalSize }: { name: string; originalSize: number }): boolean => {
    if (!WANTED.test(name)) return false;
    left -= originalSize;
    isSwollen ||= left < 0;
    return !isSwollen;
  };
  const files = unpacked(bytes, filter);
  if (isSwollen) throw new ReadError(SWOLLEN);
  return new Map(Object.entries(files).map(([name, file]) => [name, textOf(file)]));
}

type Filter = (file: { name: string; originalSize: number }) => boolean;

function unpacked(bytes: Uint8Array, filter: Filter): Readonly<Record<string, Uint8Array>> {
  try {
    return unzipSync(bytes, { filter });
  } catch (cause) {
    throw new ReadError(DAMAGED, { cause });
  }
}

function textOf(file: Uint8Array): string {
  try {
    return decode(file).text;
  } catch (cause) {
    throw new ReadError(DAMAGED, { cause });
  }
}

/** The name of the part that holds the manuscript itself, which the file's relations tell. */
export function mainPart(parts: Parts): string {
  const relation = /Target="\/?(word\/document\d*\.xml)"/.exec(parts.get('_rels/.rels') ?? '');
  const name = relation?.[1] ?? 'word/document.xml';
  if (parts.has(name)) return name;
  throw new ReadError(
    'The Word file holds no document. Open it in Word and save it again, or save it as PDF.',
  );
}
