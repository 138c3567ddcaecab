/** pdf.js, ready to be loaded, with the places of its data files. */
export interface PdfHost {
  /** The module of pdf.js; not typed here, so that a caller's compiler need not know pdf.js. */
  readonly load: () => Promise<unknown>;
  /** Directories that end in "/": metrics of the standard fonts, character maps, decoders. */
  readonly standardFonts: string;
  readonly characterMaps: string;
  readonly decoders: string;
}
