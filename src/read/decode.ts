import type { Notice } from '../model/index.ts';
import { ReadError } from './read-error.ts';

/** Text from bytes, with what had to be guessed on the way. */
export interface Decoded {
  readonly text: string;
  readonly notices: readonly Notice[];
}

const GUESSED =
  'The text is not valid UTF-8; it was read as Windows-1252. ' +
  'If dashes or accents look odd, save it as UTF-8.';

/**
 * Decodes a text file: UTF-8, UTF-16 where a byte order mark says so, and
 * otherwise Windows-1252 with a notice. Bytes that no text contains throw.
 */
export function decode(bytes: Uint8Array): Decoded {
  const marked = byteOrderMark(bytes);
  if (marked !== undefined) return { text: new TextDecoder(marked).decode(bytes), notices: [] };
  if (looksBinary(bytes)) {
    throw new ReadError(
      'The file is not text: it holds bytes that no text contains. ' +
        'Save the manuscript as PDF or plain text and read that.',
    );
  }
  try {
    return { text: new TextDecoder('utf-8', { fatal: true }).decode(bytes), notices: [] };
  } catch {
    return { text: windows1252(bytes), notices: [{ message: GUESSED }] };
  }
}

// What stands at 0x80 to 0x9f: some engines' own decoder leaves control characters there.
const HIGH = '€\u0081‚ƒ„…†‡ˆ‰Š‹Œ\u008dŽ\u008f\u0090‘’“”•–—˜™š›œ\u009džŸ';

function windows1252(bytes: Uint8Array): string {
  const plain = new TextDecoder('latin1').decode(bytes);
  return plain.replace(/[\x80-\x9f]/g, (char) => HIGH[char.charCodeAt(0) - 0x80] ?? char);
}

function byteOrderMark(bytes: Uint8Array): 'utf-16le' | 'utf-16be' | undefined {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return 'utf-16le';
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return 'utf-16be';
  return undefined;
}

/** NUL never stands in text, and other control bytes only as stray specks. */
function looksBinary(bytes: Uint8Array): boolean {
  let controls = 0;
  for (const byte of bytes) {
    if (byte === 0) return true;
    if (byte < 0x20 && (byte < 0x09 || (byte > 0x0d && byte !== 0x1b))) controls++;
  }
  return controls > bytes.length / 100;
}
