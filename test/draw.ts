import { readFileSync, writeFileSync } from 'node:fs';
import { basename, resolve } from 'node:path';
import type { Box } from '../src/model/index.ts';
import type { Draft } from '../src/read/pdf/draft.ts';
import { drawnPage } from '../src/read/pdf/drawn-page.ts';
import { type LaidOut, laidOut } from '../src/read/pdf/laid-out.ts';
import { nodeHost } from '../src/read/pdf/node-host.ts';
import { openPdf } from '../src/read/pdf/open-pdf.ts';
import { wordsOf } from '../src/read/pdf/phrase.ts';
import { boxOnPage, type DrawnPage } from '../src/read/pdf/run.ts';
import { withSigns } from '../src/read/pdf/symbol-fonts.ts';
import { boxOf, type TextLine } from '../src/read/pdf/text-line.ts';

/*
 * Draws what was understood of a page of a PDF, for developers: its columns, its
 * blocks with their kinds, its lines with their numbers, the grids of its tables.
 *
 *     npm run draw -- paper.pdf 6          writes paper-6.svg
 */

/** The colour that each kind of block is outlined in. */
const COLOURS: Readonly<Record<Draft['kind'], string>> = {
  title: '#7b2d8b', heading: '#7b2d8b', paragraph: '#2b6cb0', table: '#c05621', caption: '#2f855a',
  note: '#4a5568', figure: '#b83280', references: '#4a5568', furniture: '#a0aec0',
};

/** The drawing of a page as SVG, one unit a point; undefined where the PDF has no such page. */
export async function drawingOf(bytes: Uint8Array, number: number): Promise<string | undefined> {
  const { document, close } = await openPdf(bytes, nodeHost());
  try {
    const drawn: DrawnPage[] = [];
    for (let at = 1; at <= document.numPages; at++) drawn.push(await drawnPage(await document.getPage(at), at));
    const { pages } = withSigns(drawn);
    const page = pages.find((each) => each.number === number);
    return page === undefined ? undefined : svgOf(page, laidOut(pages));
  } finally {
    await close();
  }
}

function svgOf(page: DrawnPage, { drafts, numberOf }: LaidOut): string {
  const own = drafts
    .map((draft) => ({ ...draft, lines: draft.lines.filter((line) => line.page === page.number) }))
    .filter(({ lines }) => lines.length > 0);
  const lines = own.flatMap((draft) => draft.lines);
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${page.width} ${page.height}" ` +
      `width="${page.width}" height="${page.height}" font-family="sans-serif">`,
    `<rect width="${page.width}" height="${page.height}" fill="white"/>`,
    ...columns(lines),
    ...own.flatMap(cells),
    ...lines.flatMap(words),
    ...own.flatMap(block),
    ...lines.map((line, i) => lineNumber(line, numberOf(line), i + 1)),
    '</svg>',
  ].join('\n');
}

/** Each column from its first line to its last. */
function columns(lines: readonly TextLine[]): readonly string[] {
  return [...new Set(lines.map(({ column }) => column))].map((column) => {
    const own = lines.filter((line) => line.column === column);
    const [first, last] = [own[0] as TextLine, own.at(-1) as TextLine];
    const top = first.baseline - first.size;
    const box = boxOnPage(first.frame, column.left, top, column.right, last.baseline + 0.3 * last.size);
    return rectangle(box, 'fill="#ebf8ff" stroke="#90cdf4" stroke-width="0.5" stroke-dasharray="3 2"');
  });
}

/** The cells of a table, headers filled. */
function cells({ grid }: Draft): readonly string[] {
  return (grid?.rows.flat() ?? []).map(({ pieces, header, row, column, rowSpan, columnSpan }) => {
    const box = around(pieces.map(({ item }) => boxOf(item.line, [item.phrase])));
    const fill = header ? '#fbd38d' : '#fffaf0';
    const title = `row ${row}, column ${column}, ${rowSpan} by ${columnSpan}`;
    return rectangle(box, `fill="${fill}" stroke="#c05621" stroke-width="0.4"`, title);
  });
}

function words(line: TextLine): readonly string[] {
  const turn = line.frame.turns * 90;
  return line.phrases.map((phrase) => {
    const { x, y } = boxOnPage(line.frame, phrase.left, line.baseline, phrase.left, line.baseline);
    const length = (phrase.right - phrase.left).toFixed(1);
    return (
      `<text x="${x.toFixed(1)}" y="${y.toFixed(1)}" font-size="${phrase.size.toFixed(1)}" fill="#1a202c" ` +
      `textLength="${length}" lengthAdjust="spacingAndGlyphs"` +
      `${turn === 0 ? '' : ` transform="rotate(${turn} ${x} ${y})"`}>${escaped(wordsOf(phrase.runs))}</text>`
    );
  });
}

/** The outline of a block, with its kind at its top right corner. */
function block({ kind, lines }: Draft): readonly string[] {
  const byColumn = [...new Set(lines.map(({ column }) => column))];
  return byColumn.flatMap((column) => {
    const own = lines.filter((line) => line.column === column);
    const box = around(own.map((line) => boxOf(line, line.phrases)));
    const label = `<text x="${box.x + box.width}" y="${box.y - 0.5}" font-size="4.5" text-anchor="end" ` +
      `fill="${COLOURS[kind]}">${kind}</text>`;
    return [rectangle(box, `fill="none" stroke="${COLOURS[kind]}" stroke-width="0.8"`), label];
  });
}

/** A number printed in the margin is red, one that is only counted is grey. */
function lineNumber(line: TextLine, printed: number | undefined, counted: number): string {
  const { x, y, height } = boxOf(line, line.phrases);
  return `<text x="${x - 2}" y="${y + 0.75 * height}" font-size="4.5" text-anchor="end" ` +
    `fill="${printed === undefined ? '#a0aec0' : '#c53030'}">${printed ?? counted}</text>`;
}

function around(boxes: readonly Box[]): Box {
  const x = Math.min(...boxes.map((box) => box.x));
  const y = Math.min(...boxes.map((box) => box.y));
  const right = Math.max(...boxes.map((box) => box.x + box.width));
  const bottom = Math.max(...boxes.map((box) => box.y + box.height));
  return { x, y, width: right - x, height: bottom - y };
}

function rectangle({ x, y, width, height }: Box, style: string, title = ''): string {
  const [left, top, wide, high] = [x, y, width, height].map((value) => value.toFixed(1));
  return `<rect x="${left}" y="${top}" width="${wide}" height="${high}" ${style}><title>${title}</title></rect>`;
}

function escaped(text: string): string {
  return text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/[\u0000-\u001f]/g, ' ');
}

/** The command: a file and a page in, the name of the drawing out. */
export async function draw(
  [file, page]: readonly string[],
  folder: string,
): Promise<string> {
  const number = Number(page ?? '1');
  if (file === undefined || !Number.isInteger(number)) return 'Usage: npm run draw -- FILE.pdf [PAGE]';
  const svg = await drawingOf(new Uint8Array(readFileSync(resolve(folder, file))), number);
  if (svg === undefined) return `${file} has no page ${number}.`;
  const target = resolve(folder, `${basename(file).replace(/\.pdf$/i, '')}-${number}.svg`);
  writeFileSync(target, svg);
  return target;
}
