export { ReadError } from './read-error.ts';
export { readManuscript, type ReadOptions } from './read-manuscript.ts';
export { readText } from './text/read-text.ts';
export type { PdfHost } from './pdf/pdf-host.ts';
