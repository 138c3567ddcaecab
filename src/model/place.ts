import type { Block, Box, Line, Manuscript, Section, Table } from './manuscript.ts';
import { contains, indexAt, type Span } from './span.ts';

/** Where a span stands, in the terms a reviewer writes: "page 7, line 143". */
export interface Place {
  readonly page?: number;
  readonly line?: number;
  readonly numbering?: Line['numbering'];
  /** Which paragraph of its section it stands in, from 1, in forms that have no lines. */
  readonly paragraph?: number;
  readonly section: Section;
  readonly table?: Table;
  /** The boxes of the lines that the span touches, where the form has pages. */
  readonly boxes: readonly Box[];
}

/** Works out where `span` stands in `manuscript`. Costs a few binary searches. */
export function placeOf(manuscript: Manuscript, span: Span): Place {
  const line = manuscript.lines[indexAt(manuscript.lines, span.start)];
  const at = indexAt(manuscript.blocks, span.start);
  const block = manuscript.blocks[at];
  const paragraph = line === undefined ? paragraphOf(manuscript.blocks, at) : undefined;
  const table = manuscript.tables.find((candidate) => contains(candidate.span, span));
  return {
    ...(line?.page === undefined ? {} : { page: line.page }),
    ...(line === undefined ? {} : { line: line.number, numbering: line.numbering }),
    ...(paragraph === undefined ? {} : { paragraph }),
    section: block?.section ?? { role: 'other', heading: '' },
    ...(table === undefined ? {} : { table }),
    boxes: boxesOf(manuscript.lines, span),
  };
}

/** The count of paragraphs in a block's section up to the block, if it is one. */
function paragraphOf(blocks: readonly Block[], at: number): number | undefined {
  const block = blocks[at];
  if (block?.kind !== 'paragraph') return undefined;
  let count = 1;
  for (let index = at - 1; index >= 0; index--) {
    const { kind, section } = blocks[index] as Block;
    if (section.heading !== block.section.heading || section.role !== block.section.role) break;
    if (kind === 'paragraph') count++;
  }
  return count;
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
 * A place in words: "page 7, line 143", "Table 2", "line 12", "paragraph 3".
 * Counted lines are said to be counted, since no number stands in the margin.
 */
export function describePlace({ page, line, numbering, table, paragraph }: Place): string {
  const parts = [
    ...(page === undefined ? [] : [`page ${page}`]),
    ...(table === undefined || table.label === '' ? [] : [table.label]),
    ...(line === undefined ? [] : [numbering === 'printed' ? `line ${line}` : `line ${line} (counted)`]),
    ...(paragraph === undefined || table !== undefined ? [] : [`paragraph ${paragraph}`]),
  ];
  return parts.length === 0 ? 'place unknown' : parts.join(', ');
}
