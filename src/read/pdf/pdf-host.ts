import type * as PdfJs from 'pdfjs-dist';

/** pdf.js, ready to be loaded, with the places of its data files. */
export interface PdfHost {
  readonly load: () => Promise<Pick<typeof PdfJs, 'getDocument'>>;
  /** Directories that end in "/": metrics of the standard fonts, character maps, decoders. */
  readonly standardFonts: string;
  readonly characterMaps: string;
  readonly decoders: string;
}
