import type { Box, Line, Manuscript, Section, Table } from './manuscript.ts';
import { contains, indexAt, type Span } from './span.ts';

/** Where a span stands, in the terms a reviewer writes: "page 7, line 143". */
export interface Place {
  readonly page?: number;
  readonly line?: number;
  readonly numbering?: Line['numbering'];
  readonly section: Section;
  readonly table?: Table;
  /** The boxes of the lines that the span touches, where the form has pages. */
  readonly boxes: readonly Box[];
}

/** Works out where `span` stands in `manuscript`. Costs a few binary searches. */
export function placeOf(manuscript: Manuscript, span: Span): Place {
  const line = manuscript.lines[indexAt(manuscript.lines, span.start)];
  const block = manuscript.blocks[indexAt(manuscript.blocks, span.start)];
  const table = manuscript.tables.find((candidate) => contains(candidate.span, span));
  return {
    ...(line?.page === undefined ? {} : { page: line.page }),
    ...(line === undefined ? {} : { line: line.number, numbering: line.numbering }),
    section: block?.section ?? { role: 'other', heading: '' },
    ...(table === undefined ? {} : { table }),
    boxes: boxesOf(manuscript.lines, span),
  };
}

function boxesOf(lines: readonly Line[], span: Span): readonly Box[] {
  const boxes: Box[] = [];
  for (let i = Math.max(0, indexAt(lines, span.start)); i < lines.length; i++) {
    const line = lines[i] as Line;
    if (line.span.start >= span.end) break;
    if (line.box !== undefined && line.span.end > span.start) boxes.push(line.box);
  }
  return boxes;
}

/**
 * A place in words: "page 7, line 143", "Table 2", "line 12".
 * Counted lines are said to be counted, since no number stands in the margin.
 */
export function describePlace({ page, line, numbering, table }: Place): string {
  const parts = [
    ...(page === undefined ? [] : [`page ${page}`]),
    ...(table === undefined || table.label === '' ? [] : [table.label]),
    ...(line === undefined ? [] : [numbering === 'printed' ? `line ${line}` : `line ${line} (counted)`]),
  ];
  return parts.length === 0 ? 'place unknown' : parts.join(', ');
}
