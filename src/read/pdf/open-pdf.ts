import type * as PdfJs from 'pdfjs-dist';
import { ReadError } from '../read-error.ts';
import type { PdfHost } from './pdf-host.ts';

/** An opened PDF, to be closed after reading. */
export interface OpenPdf {
  readonly document: PdfJs.PDFDocumentProxy;
  readonly close: () => Promise<void>;
}

const PASSWORD =
  'The PDF is protected by a password. ' +
  'Open it with the password, save or print a copy without one, and read that.';
const DAMAGED =
  'The PDF is damaged or incomplete. Download or export it again; ' +
  'if that does not help, open it in a viewer and print it to a new PDF.';

/** Opens a PDF with everything off that text does not need. Throws `ReadError`. */
export async function openPdf(bytes: Uint8Array, host: PdfHost): Promise<OpenPdf> {
  const pdfjs = (await host.load()) as Pick<typeof PdfJs, 'getDocument'>;
  const task = pdfjs.getDocument({
    data: new Uint8Array(bytes), // a copy and no Buffer: pdf.js takes it away from its owner
    verbosity: 0,
    isEvalSupported: false,
    enableXfa: false,
    useSystemFonts: false,
    disableFontFace: true,
    stopAtErrors: false,
    standardFontDataUrl: host.standardFonts,
    cMapUrl: host.characterMaps,
    cMapPacked: true,
    wasmUrl: host.decoders,
  });
  try {
    return { document: await task.promise, close: () => task.destroy() };
  } catch (cause) {
    await task.destroy();
    throw new ReadError(isNamed(cause, 'PasswordException') ? PASSWORD : DAMAGED, { cause });
  }
}

function isNamed(cause: unknown, name: string): boolean {
  return cause instanceof Error && cause.name === name;
}
