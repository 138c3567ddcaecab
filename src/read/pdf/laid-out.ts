import { blocksOfColumn } from './page-blocks.ts';
import { bodyTypeOf, type BodyType } from './body-type.ts';
import { columnsOf, pageGutter, type Column, type Gutter } from './columns.ts';
import type { NumberOf } from './compose.ts';
import type { Draft } from './draft.ts';
import { withFigures } from './figure-text.ts';
import { furnitureOf } from './furniture.ts';
import { phrasesOf, type Phrase } from './phrase.ts';
import { numberAt, withoutPrintedNumbers, type NumberFile } from './printed-numbers.ts';
import { withMarks } from './raised-marks.ts';
import type { DrawnPage, Frame, Run, Side } from './run.ts';
import { linesOf, type TextLine } from './text-line.ts';

/** The blocks of all pages in reading order, and what number is printed beside a line. */
export interface LaidOut {
  readonly drafts: readonly Draft[];
  readonly numberOf: NumberOf;
}

/** A page divided into columns, with what is set apart. */
interface DividedPage {
  readonly page: DrawnPage;
  readonly columns: readonly (readonly TextLine[])[];
  readonly apart: readonly TextLine[];
  readonly files: readonly NumberFile[];
}

const UPRIGHT: Side = { frame: { turns: 0 }, runs: [] };

/** Understands the layout of a whole document: what is alike on its pages tells what is what. */
export function laidOut(pages: readonly DrawnPage[]): LaidOut {
  const divided = dividedPages(pages);
  const body = bodyTypeOf(divided.flatMap(({ columns }) => columns.flat()));
  const drafts = withTitle(
    divided.flatMap((page) => withFigures(draftsOf(page, body))),
    body,
  );
  const files = new Map(divided.map(({ page, files }) => [page.number, files]));
  return { drafts, numberOf: (line) => numberBeside(line, files.get(line.page) ?? []) };
}

function dividedPages(pages: readonly DrawnPage[]): readonly DividedPage[] {
  const mains = pages.map(({ sides }) => sides[0] ?? UPRIGHT);
  const numbered = withoutPrintedNumbers(mains.map(({ runs }) => runs));
  const phrases = numbered.map(({ runs }) => phrasesOf(withMarks(runs)));
  const furniture = furnitureOf(
    pages.map(({ height }, i) => ({ phrases: phrases[i] ?? [], height })),
  );
  const bodies = phrases.map((own) => own.filter((phrase) => !furniture.has(phrase)));
  const gutters = bodies.flatMap((body) => pageGutter(body) ?? []);
  return pages.map((page, i) => {
    const { frame } = mains[i] ?? UPRIGHT;
    const own = phrases[i] ?? [];
    const body = bodies[i] ?? [];
    const heads = own.filter((phrase) => furniture.has(phrase));
    const others = page.sides.slice(1).map((side) => otherSide(side, page.number));
    return {
      page,
      columns: [
        ...columnLines(body, gutters, page.number, frame),
        ...others.flatMap(({ columns }) => columns),
      ],
      apart: [...linesApart(heads, page.number, frame), ...others.flatMap(({ apart }) => apart)],
      files: numbered[i]?.files ?? [],
    };
  });
}

function columnLines(
  phrases: readonly Phrase[],
  gutters: readonly Gutter[],
  page: number,
  frame: Frame,
): readonly (readonly TextLine[])[] {
  return columnsOf(phrases, gutters).map((column) => linesOf(column, page, frame));
}

function linesApart(phrases: readonly Phrase[], page: number, frame: Frame): readonly TextLine[] {
  if (phrases.length === 0) return [];
  const column: Column = { phrases, left: 0, right: 0 };
  return linesOf(column, page, frame);
}

/** Fewer lines than this set across the page are a stamp or an axis, not a turned table. */
const FEWEST_TURNED = 4;

function otherSide({ frame, runs }: Side, page: number): Pick<DividedPage, 'columns' | 'apart'> {
  const phrases = phrasesOf(withMarks(runs as readonly Run[]));
  const lines = columnLines(phrases, [], page, frame);
  if (lines.flat().length >= FEWEST_TURNED) return { columns: lines, apart: [] };
  return { columns: [], apart: linesApart(phrases, page, frame) };
}

function draftsOf({ columns, apart }: DividedPage, body: BodyType): readonly Draft[] {
  const drafts = columns.flatMap((lines) => blocksOfColumn(lines, body));
  return [...drafts, ...apart.map((line): Draft => ({ kind: 'furniture', lines: [line] }))];
}

/** The title stands in the largest type on the first page, if that is larger than the body. */
function withTitle(drafts: readonly Draft[], body: BodyType): readonly Draft[] {
  const first = drafts[0]?.lines[0]?.page;
  const title = drafts
    .filter(
      ({ kind, lines }) => lines[0]?.page === first && (kind === 'heading' || kind === 'paragraph'),
    )
    .filter(({ lines }) => isTitle(lines, body))
    .reduce<Draft | undefined>(
      (best, draft) => (best === undefined || sizeOf(draft) > sizeOf(best) ? draft : best),
      undefined,
    );
  return title === undefined
    ? drafts
    : drafts.map((draft) => (draft === title ? { kind: 'title', lines: draft.lines } : draft));
}

function isTitle(lines: readonly TextLine[], body: BodyType): boolean {
  const words = lines.map((line) => line.words).join(' ');
  return (
    (lines[0]?.size ?? 0) > 1.12 * body.size && words.length >= 20 && words.split(' ').length >= 4
  );
}

function sizeOf({ lines }: Draft): number {
  return Math.max(...lines.map(({ size }) => size));
}

/** A line takes its number from the nearest margin that has numbers. */
function numberBeside(line: TextLine, files: readonly NumberFile[]): number | undefined {
  const [first] = [...files].sort((a, b) => distance(line, a) - distance(line, b));
  return first === undefined ? undefined : numberAt(first, line.baseline, line.size);
}

function distance({ column }: TextLine, file: NumberFile): number {
  return file.right <= column.left
    ? column.left - file.right
    : Math.max(0, file.left - column.right);
}
