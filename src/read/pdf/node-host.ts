import type { PdfHost } from './pdf-host.ts';

/**
 * pdf.js in Node, found as an installed package. The only part of reading that
 * knows of Node; a browser gives a host of its own.
 */
export function nodeHost(): PdfHost {
  const directory = packageDirectory();
  return {
    load: async () => {
      prepareGlobals();
      return import('pdfjs-dist/legacy/build/pdf.mjs');
    },
    standardFonts: `${directory}standard_fonts/`,
    characterMaps: `${directory}cmaps/`,
    decoders: `${directory}wasm/`,
  };
}

function packageDirectory(): string {
  const { createRequire } = process.getBuiltinModule('node:module');
  const manifest = createRequire(import.meta.url).resolve('pdfjs-dist/package.json');
  return manifest.slice(0, -'package.json'.length);
}

/**
 * pdf.js asks for drawing classes when it loads, though text needs none. Stand-ins
 * keep it from failing where its optional canvas is not installed; the variable
 * keeps that canvas, where it is, from searching the system for fonts.
 */
function prepareGlobals(): void {
  process.env['DISABLE_SYSTEM_FONTS_LOAD'] = '1';
  const globals = globalThis as Record<string, unknown>;
  for (const name of ['DOMMatrix', 'ImageData', 'Path2D']) globals[name] ??= class {};
}
