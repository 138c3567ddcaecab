import type { Format } from '../model/index.ts';

/** What a file turns out to be: a form of manuscript, or something that is none. */
export type Recognised =
  | { readonly kind: 'manuscript'; readonly format: Format }
  | { readonly kind: 'other'; readonly what: string };

/** Enough bytes for every signature below; PDF allows junk before its own. */
const HEAD = 1024;

const SIGNATURES: readonly (readonly [what: string, bytes: readonly (number | undefined)[]])[] = [
  ['a PNG picture', [0x89, 0x50, 0x4e, 0x47]],
  ['a JPEG picture', [0xff, 0xd8, 0xff]],
  ['a GIF picture', [0x47, 0x49, 0x46, 0x38]],
  ['a TIFF picture', [0x49, 0x49, 0x2a, 0x00]],
  ['a TIFF picture', [0x4d, 0x4d, 0x00, 0x2a]],
  ['a WebP picture', [0x52, 0x49, 0x46, 0x46, undefined, undefined, undefined, undefined, 0x57]],
  ['an old Word document (.doc), or one locked with a password', [0xd0, 0xcf, 0x11, 0xe0]],
  ['a rich text document (.rtf)', [0x7b, 0x5c, 0x72, 0x74, 0x66]],
  ['a compressed file (gzip)', [0x1f, 0x8b]],
];

/**
 * Tells the form of a file by its content, and by its name only where the
 * content does not say: "notes.md" is Markdown, since any text may be.
 */
export function recognise(bytes: Uint8Array, name: string): Recognised {
  const head = bytes.subarray(0, HEAD);
  const ascii = Array.from(head, (byte) => String.fromCharCode(byte)).join('');
  const signature = SIGNATURES.find(([, pattern]) => startsWith(head, pattern));
  if (signature !== undefined) return { kind: 'other', what: signature[0] };
  if (ascii.includes('%PDF-')) return manuscript('pdf');
  if (ascii.startsWith('PK\x03\x04')) return recogniseArchive(bytes, name);
  if (/<office:document\b/.test(ascii)) {
    return { kind: 'other', what: 'an OpenDocument text (.fodt)' };
  }
  return manuscript(markupIn(ascii) ?? markupNamed(name) ?? 'text');
}

function manuscript(format: Format): Recognised {
  return { kind: 'manuscript', format };
}

function startsWith(head: Uint8Array, pattern: readonly (number | undefined)[]): boolean {
  return pattern.every((byte, i) => byte === undefined || head[i] === byte);
}

function recogniseArchive(bytes: Uint8Array, name: string): Recognised {
  const entries = new TextDecoder('latin1').decode(
    bytes.subarray(Math.max(0, bytes.length - 65_536)),
  );
  if (/word\/document\d*\.xml/.test(entries)) return manuscript('docx');
  if (/\.docx$/i.test(name)) return manuscript('docx');
  if (/\.odt$/i.test(name)) return { kind: 'other', what: 'an OpenDocument text (.odt)' };
  return { kind: 'other', what: 'a zip archive' };
}

function markupIn(ascii: string): Format | undefined {
  const start = ascii.replace(/^[^<\\%A-Za-z]+/, '');
  if (/<!DOCTYPE html|<html[\s>]/i.test(start)) return 'html';
  const isXml = /^<(\?xml|!DOCTYPE article|article\b|!--)/.test(start);
  if (isXml && /<(!DOCTYPE )?(pmc-articleset|article)\b|JATS/.test(start)) return 'jats';
  if (/\\documentclass\b|\\begin\{document\}/.test(ascii)) return 'latex';
  return undefined;
}

function markupNamed(name: string): Format | undefined {
  const ending = /\.([a-z]+)$/i.exec(name)?.[1]?.toLowerCase();
  switch (ending) {
    case 'md':
    case 'markdown':
    case 'rmd':
    case 'qmd':
      return 'markdown';
    case 'tex':
    case 'ltx':
    case 'latex':
      return 'latex';
    case 'htm':
    case 'xhtml':
    case 'html':
      return 'html';
    case 'xml':
    case 'nxml':
      return 'jats';
    default:
      return undefined;
  }
}
