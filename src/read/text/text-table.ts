import { cover, quote, type Cell, type Span, type Table } from '../../model/index.ts';
import { captionLabel, labelsTable } from '../captions.ts';
import { gridOf, withGroupLabels, type GridCell } from '../grid.ts';
import type { TextBlock } from './text-blocks.ts';
import { piecesOf } from './typed-tables.ts';

/** The tables of typed text, each with the caption beside it and the notes under it. */
export function tablesOf(text: string, blocks: readonly TextBlock[]): readonly Table[] {
  return blocks.flatMap((block, i) => {
    const { kind, span, rows, layout } = block;
    if (kind !== 'table' || rows === undefined || layout === undefined) return [];
    const { cells, rowCount, columnCount } = gridOf(
      rows.map((row) => piecesOf(text, row, layout)),
      layout === 'spaces' ? 3 : 0,
    );
    const placed = withGroupLabels(cells, rowCount).map(cellOf);
    const around = { ...captionBeside(text, blocks, i), notes: notesAfter(blocks, i) };
    return [{ span, ...around, cells: placed, rowCount, columnCount }];
  });
}

function cellOf({ pieces, ...cell }: GridCell<Span>): Cell {
  const [first = { start: 0, end: 0 }, ...others] = pieces.map(({ item }) => item);
  return { ...cell, span: cover(first, ...others) };
}

function captionBeside(
  text: string,
  blocks: readonly TextBlock[],
  i: number,
): { readonly label: string; readonly caption?: Span } {
  for (const beside of [blocks[i - 1], blocks[i + 1]]) {
    if (beside?.kind !== 'caption') continue;
    const label = captionLabel(quote(text, beside.span));
    if (labelsTable(label)) return { label, caption: beside.span };
  }
  return { label: '' };
}

function notesAfter(blocks: readonly TextBlock[], i: number): readonly Span[] {
  const notes: Span[] = [];
  for (let j = i + 1; blocks[j]?.kind === 'note'; j++) notes.push((blocks[j] as TextBlock).span);
  return notes;
}
