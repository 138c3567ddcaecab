import type { Format, Manuscript } from '../model/index.ts';
import { decode, type Decoded } from './decode.ts';
import type { PdfHost } from './pdf/pdf-host.ts';
import { ReadError } from './read-error.ts';
import { recognise } from './recognise.ts';
import { readText } from './text/read-text.ts';

/** Limits on what is read, and what to tell while reading. */
export interface ReadOptions {
  /** The largest file that is read, in bytes; 64 MiB where not given. */
  readonly maxBytes?: number;
  /** The most pages that are read of a PDF; 1,000 where not given. The rest becomes a notice. */
  readonly maxPages?: number;
  /** Told after each page of a PDF: the page just read, and how many there are. */
  readonly onPage?: (page: number, pages: number) => void;
  /** Where pdf.js and its data files are; found by itself in Node, given by a browser. */
  readonly pdfHost?: PdfHost;
}

const MAX_BYTES = 64 * 1024 * 1024;

/**
 * Reads a manuscript from a file's bytes. The form is told by the content, then
 * by the name. Throws `ReadError` where the file cannot be read at all; what is
 * lost or guessed in part becomes a notice. `bytes` is left as it was.
 */
export async function readManuscript(
  bytes: Uint8Array,
  name: string,
  options: ReadOptions = {},
): Promise<Manuscript> {
  const { maxBytes = MAX_BYTES } = options;
  if (bytes.length === 0) {
    throw new ReadError('The file is empty. Check that it was saved or downloaded completely.');
  }
  if (bytes.length > maxBytes) throw new ReadError(tooLarge(bytes.length, maxBytes));
  const recognised = recognise(bytes, name);
  if (recognised.kind === 'other') throw new ReadError(notAManuscript(recognised.what, name));
  return readAs(recognised.format, bytes, name, options);
}

async function readAs(
  format: Format,
  bytes: Uint8Array,
  name: string,
  options: ReadOptions,
): Promise<Manuscript> {
  switch (format) {
    case 'pdf': {
      const { readPdf } = await import('./pdf/read-pdf.ts');
      return readPdf(bytes, name, options);
    }
    case 'text':
      return readTextFile(bytes, name);
    case 'jats': {
      const { readJats } = await import('./jats/read-jats.ts');
      return withNotices(decode(bytes), (text) => readJats(text, name));
    }
    case 'docx': {
      const { readDocx } = await import('./docx/read-docx.ts');
      return readDocx(bytes, name);
    }
    case 'html': {
      const { readHtml } = await import('./html/read-html.ts');
      return withNotices(decode(bytes), (text) => readHtml(text, name));
    }
    case 'latex': {
      const { readLatex } = await import('./latex/read-latex.ts');
      return withNotices(decode(bytes), (text) => readLatex(text, name));
    }
    case 'markdown': {
      const { readMarkdown } = await import('./markdown/read-markdown.ts');
      return withNotices(decode(bytes), (text) => readMarkdown(text, name));
    }
    default:
      return format satisfies never;
  }
}

/** What had to be guessed of the characters is told before what was found in reading. */
function withNotices(
  { text, notices }: Decoded,
  read: (text: string) => Manuscript,
): Manuscript {
  const manuscript = read(text);
  return { ...manuscript, notices: [...notices, ...manuscript.notices] };
}

function readTextFile(bytes: Uint8Array, name: string): Manuscript {
  const decoded = decode(bytes);
  const { text } = decoded;
  if (/\.pdf$/i.test(name)) {
    throw new ReadError(
      'The file is named .pdf but is plain text. ' +
        'Rename it to end in .txt, or save the manuscript as PDF again.',
    );
  }
  if (text.trim() === '') {
    throw new ReadError('The file holds no text but blanks. Check that it was saved completely.');
  }
  return withNotices(decoded, () => readText(text, name));
}

function tooLarge(size: number, limit: number): string {
  const sizes = `${megabytes(size)}, where at most ${megabytes(limit)} are read`;
  return `The file is too large: ${sizes}. Save a copy without pictures and read that.`;
}

function megabytes(bytes: number): string {
  return `${(bytes / 1024 / 1024).toFixed(1)} MB`;
}

function notAManuscript(what: string, name: string): string {
  const named = /\.pdf$/i.test(name) ? 'The file is named .pdf but is' : 'The file is';
  const next =
    'Save the manuscript as .docx or PDF from the program that wrote it, or paste its text.';
  return `${named} ${what}, which cannot be read as a manuscript. ${next}`;
}
