import type { Cell, Line, Mark, Span } from '../../model/index.ts';
import type { GridCell } from '../grid.ts';
import type { WrittenBlock } from '../table-surroundings.ts';
import type { Draft, DraftGrid, Placed } from './draft.ts';
import { isSpaced, type Phrase } from './phrase.ts';
import { isInCells } from './table-region.ts';
import { boxOf, type TextLine } from './text-line.ts';

/** The whole text with everything that points into it. */
export interface Composed {
  readonly text: string;
  readonly blocks: readonly WrittenBlock[];
  readonly lines: readonly Line[];
  readonly marks: readonly Mark[];
}

/** The number printed beside a line, or undefined where there is none. */
export type NumberOf = (line: TextLine) => number | undefined;

/**
 * Writes the blocks out as one text: lines end in "\n", blocks in "\n\n", cells
 * in a tab. Words broken at a line's end stay broken, as they are printed.
 */
export function compose(drafts: readonly Draft[], numberOf: NumberOf): Composed {
  const page = blankPage();
  const blocks = drafts.flatMap((draft) => {
    if (page.length > 0) write(page, '\n\n');
    return draft.grid === undefined
      ? writeLines(page, draft)
      : [writeGrid(page, draft, draft.grid)];
  });
  return {
    text: page.parts.join(''),
    blocks,
    lines: numbered(page.lines, numberOf),
    marks: page.marks,
  };
}

interface WrittenLine {
  readonly line: TextLine;
  readonly phrases: Phrase[];
  readonly start: number;
  end: number;
}

/** The text while it is being written: grows at its end only. */
interface Sheet {
  readonly parts: string[];
  length: number;
  readonly lines: WrittenLine[];
  readonly marks: Mark[];
}

function blankPage(): Sheet {
  return { parts: [], length: 0, lines: [], marks: [] };
}

function write(sheet: Sheet, words: string): void {
  sheet.parts.push(words);
  sheet.length += words.length;
}

function writePhrase(sheet: Sheet, line: TextLine, phrase: Phrase): void {
  const last = sheet.lines.at(-1);
  const start = sheet.length;
  for (const [i, run] of phrase.runs.entries()) {
    const before = phrase.runs[i - 1];
    if (before !== undefined && isSpaced(before, run)) write(sheet, ' ');
    if (run.mark !== undefined) {
      sheet.marks.push({
        kind: run.mark,
        span: { start: sheet.length, end: sheet.length + run.text.length },
      });
    }
    write(sheet, run.text);
  }
  if (last?.line === line) {
    last.phrases.push(phrase);
    last.end = sheet.length;
  } else sheet.lines.push({ line, phrases: [phrase], start, end: sheet.length });
}

function writeLines(sheet: Sheet, { kind, lines, label }: Draft): readonly WrittenBlock[] {
  const start = sheet.length;
  for (const [i, line] of lines.entries()) {
    if (i > 0) write(sheet, '\n');
    const gap = isInCells(line) ? '\t' : ' ';
    for (const [j, phrase] of line.phrases.entries()) {
      if (j > 0) write(sheet, gap);
      writePhrase(sheet, line, phrase);
    }
  }
  const span = { start, end: sheet.length };
  return label === undefined ? [{ kind, span }] : withLabel(span, label);
}

/** A label and the paragraph it is run into; a label alone on its line is the whole heading. */
function withLabel({ start, end }: Span, label: number): readonly WrittenBlock[] {
  const split = Math.min(end, start + label);
  const heading: WrittenBlock = { kind: 'heading', span: { start, end: split }, runIn: true };
  return split + 1 >= end
    ? [heading]
    : [heading, { kind: 'paragraph', span: { start: split + 1, end } }];
}

function writeGrid(sheet: Sheet, { kind }: Draft, { rows, columnCount }: DraftGrid): WrittenBlock {
  const start = sheet.length;
  const cells: Cell[] = [];
  for (const [i, row] of rows.entries()) {
    if (i > 0) write(sheet, '\n');
    for (const [j, cell] of row.entries()) {
      if (j > 0) write(sheet, '\t');
      cells.push(writeCell(sheet, cell));
    }
  }
  return {
    kind,
    span: { start, end: sheet.length },
    grid: { cells, rowCount: rows.length, columnCount },
  };
}

function writeCell(
  sheet: Sheet,
  { pieces, row, column, rowSpan, columnSpan, header }: GridCell<Placed>,
): Cell {
  const start = sheet.length;
  for (const [i, { item }] of pieces.entries()) {
    const before = pieces[i - 1]?.item.line;
    if (before !== undefined) write(sheet, before === item.line ? '\t' : '\n');
    writePhrase(sheet, item.line, item.phrase);
  }
  return { span: { start, end: sheet.length }, row, column, rowSpan, columnSpan, header };
}

/** Gives each written line its printed number, or else its count on its page. */
function numbered(lines: readonly WrittenLine[], numberOf: NumberOf): readonly Line[] {
  const counts = new Map<number, number>();
  const known = new Map<TextLine, number>();
  return lines.map(({ line, phrases, start, end }) => {
    const count = known.get(line) ?? (counts.get(line.page) ?? 0) + 1;
    if (!known.has(line)) counts.set(line.page, count);
    known.set(line, count);
    const printed = numberOf(line);
    return {
      span: { start, end },
      number: printed ?? count,
      numbering: printed === undefined ? 'counted' : 'printed',
      page: line.page,
      box: boxOf(line, phrases),
    };
  });
}
