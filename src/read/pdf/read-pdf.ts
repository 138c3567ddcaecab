import type { PDFDocumentProxy } from 'pdfjs-dist';
import type { Line, Manuscript, Notice, Page } from '../../model/index.ts';
import { ReadError } from '../read-error.ts';
import type { ReadOptions } from '../read-manuscript.ts';
import { withSections } from '../sections.ts';
import { tablesAmong } from '../table-surroundings.ts';
import { compose, type Composed } from './compose.ts';
import { drawnPage } from './drawn-page.ts';
import { laidOut } from './laid-out.ts';
import { openPdf } from './open-pdf.ts';
import type { DrawnPage } from './run.ts';
import { withoutBreaks } from './run-on.ts';
import { restore } from './substitutions.ts';
import { withSigns } from './symbol-fonts.ts';

const MAX_PAGES = 1000;

/** What was drawn on the pages that could be read, and what to say of the others. */
interface Drawn {
  readonly pages: readonly DrawnPage[];
  readonly notices: readonly Notice[];
}

/** Reads a PDF as a person does: columns in order, margins and running heads apart. */
export async function readPdf(
  bytes: Uint8Array,
  name: string,
  options: ReadOptions,
): Promise<Manuscript> {
  const host = options.pdfHost ?? (await import('./node-host.ts')).nodeHost();
  const { document, close } = await openPdf(bytes, host);
  try {
    const drawn = await drawnPages(document, options);
    return manuscriptOf(name, drawn);
  } finally {
    await close();
  }
}

async function drawnPages(document: PDFDocumentProxy, options: ReadOptions): Promise<Drawn> {
  const { maxPages = MAX_PAGES, onPage } = options;
  if (document.numPages === 0) {
    throw new ReadError('The PDF has no pages. Export it again from the program that wrote it.');
  }
  const pages: DrawnPage[] = [];
  const notices: Notice[] = [];
  const last = Math.min(document.numPages, maxPages);
  for (let number = 1; number <= last; number++) {
    try {
      const page = await document.getPage(number);
      pages.push(await drawnPage(page, number));
      page.cleanup();
    } catch {
      notices.push({
        message: 'This page could not be read; its results are missing.',
        page: number,
      });
    }
    onPage?.(number, document.numPages);
  }
  if (last < document.numPages) notices.push(unreadNotice(last, document.numPages));
  return { pages, notices };
}

function unreadNotice(last: number, pages: number): Notice {
  return { message: `Only the first ${last} of ${pages} pages were read.` };
}

function manuscriptOf(name: string, { pages: drawn, notices }: Drawn): Manuscript {
  requireText(drawn, notices);
  const { pages, notices: signs } = withSigns(drawn);
  const { drafts, numberOf } = laidOut(pages);
  const composed = compose(withoutBreaks(drafts), numberOf);
  const { text, notices: restored } = restore(composed.text);
  return {
    name,
    format: 'pdf',
    text,
    blocks: withSections(text, composed.blocks),
    tables: tablesAmong(text, composed.blocks),
    lines: composed.lines,
    pages: pagesOf(pages, composed),
    marks: composed.marks,
    notices: [...notices, ...sparse(pages), ...wordless(pages), ...signs, ...restored],
  };
}

function letters({ sides }: DrawnPage): number {
  return sides.reduce(
    (sum, { runs }) => sum + runs.reduce((all, { text }) => all + text.length, 0),
    0,
  );
}

function requireText(pages: readonly DrawnPage[], notices: readonly Notice[]): void {
  if (pages.some((page) => letters(page) > 0)) return;
  if (pages.length === 0 && notices.length > 0) {
    throw new ReadError(
      'No page of the PDF could be read. Open it in a viewer, print it to a new PDF and read that.',
    );
  }
  throw new ReadError(
    'The PDF holds no text: its pages are pictures (a scan) or empty. ' +
      'Run text recognition (OCR) on it, or ask for the original file.',
  );
}

/** Fewer characters on a page than this are a stamp or a number on a scan, no text. */
const SPARSE = 60;

function sparse(pages: readonly DrawnPage[]): readonly Notice[] {
  const all = pages.reduce((sum, page) => sum + letters(page), 0);
  if (all >= SPARSE * pages.length) return [];
  return [
    {
      message:
        'The pages hold hardly any text. ' +
        'If they are pictures (a scan), run text recognition (OCR) on them first.',
    },
  ];
}

const WORDLESS = 'This page holds no text, perhaps a picture; nothing was read from it.';

function wordless(pages: readonly DrawnPage[]): readonly Notice[] {
  return pages
    .filter((page) => letters(page) === 0)
    .map(({ number }) => ({ message: WORDLESS, page: number }));
}

/**
 * A page's text goes from its first line to the next page's. It is empty where
 * all of the page is read later: a table in the middle of a longer paragraph.
 */
function pagesOf(pages: readonly DrawnPage[], { text, lines }: Composed): readonly Page[] {
  const starts = firstLines(lines);
  let end = text.length;
  return [...pages]
    .reverse()
    .map(({ number, width, height }) => {
      const span = { start: Math.min(starts.get(number) ?? end, end), end };
      end = span.start;
      return { number, span, width, height };
    })
    .reverse();
}

function firstLines(lines: readonly Line[]): ReadonlyMap<number, number> {
  const starts = new Map<number, number>();
  for (const { page = 0, span } of lines) if (!starts.has(page)) starts.set(page, span.start);
  return starts;
}
