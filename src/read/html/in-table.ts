import { TALLEST, WIDEST } from '../spanning-cells.ts';
import {
  type Attributes, nextBlock, type OpenTable, type ReadCell, type Reading,
} from './reading.ts';

const PARTS: ReadonlySet<string> = new Set([
  'caption', 'thead', 'tbody', 'tfoot', 'tr', 'td', 'th', 'col', 'colgroup',
]);

/** Begins what only tables have; false where the element means the same as elsewhere. */
export function openInTable(reading: Reading, tag: string, attributes: Attributes): boolean {
  if (tag === 'table') {
    openTable(reading);
    return true;
  }
  const table = reading.tables.at(-1);
  if (!PARTS.has(tag)) return false;
  if (table === undefined || table.isLayout) nextBlock(reading);
  else openPart(reading, table, tag, attributes);
  return true;
}

function openPart(reading: Reading, table: OpenTable, tag: string, attributes: Attributes): void {
  if (tag !== 'caption') closeCaption(reading, table);
  switch (tag) {
    case 'caption':
      reading.caption = { of: 'table', words: [] };
      break;
    case 'thead':
      table.part = 'head';
      break;
    case 'tfoot':
      table.part = 'foot';
      break;
    case 'tr':
      table.row++;
      if (table.part === 'foot') table.footRows.add(table.row);
      break;
    case 'td':
    case 'th': {
      table.row = Math.max(0, table.row);
      const header = table.part === 'head' || tag === 'th';
      table.cell = { words: [], attributes, header };
      break;
    }
  }
}

/** A caption ends with its element, or where the table's rows begin. */
function closeCaption(reading: Reading, table: OpenTable): void {
  if (reading.caption?.of !== 'table') return;
  table.caption = reading.caption.words;
  reading.caption = undefined;
}

function openTable(reading: Reading): void {
  layOutPage(reading);
  nextBlock(reading);
  reading.tables.push({
    cells: [], row: -1, part: 'body', footRows: new Set(), cell: undefined, caption: undefined,
    isLayout: false,
  });
}

/**
 * A table that holds tables or headings only lays out the page: what was read of
 * it so far, and what follows, are paragraphs.
 */
export function layOutPage(reading: Reading): void {
  const table = reading.tables.at(-1);
  if (table === undefined || table.isLayout) return;
  table.isLayout = true;
  for (const { words } of table.cells) reading.blocks.push({ kind: 'paragraph', words });
  const { cell } = table;
  reading.block = cell === undefined ? undefined : { kind: 'paragraph', words: cell.words };
  table.cell = undefined;
}

/** Ends what only tables have; false where the element means the same as elsewhere. */
export function closeInTable(reading: Reading, tag: string): boolean {
  const table = reading.tables.at(-1);
  if (tag === 'table') {
    closeTable(reading);
    return true;
  }
  if (!PARTS.has(tag)) return false;
  if (table === undefined || table.isLayout) nextBlock(reading);
  else closePart(reading, table, tag);
  return true;
}

function closePart(reading: Reading, table: OpenTable, tag: string): void {
  if (tag === 'thead' || tag === 'tfoot') table.part = 'body';
  else if (tag === 'td' || tag === 'th') closeCell(table);
  else if (tag === 'caption') closeCaption(reading, table);
}

function closeCell(table: OpenTable): void {
  const { cell, row } = table;
  table.cell = undefined;
  if (cell === undefined) return;
  table.cells.push({
    words: cell.words,
    row,
    rowSpan: spanFrom(cell.attributes['rowspan'], TALLEST),
    columnSpan: spanFrom(cell.attributes['colspan'], WIDEST),
    header: cell.header,
  });
}

function spanFrom(attribute: string | undefined, most: number): number {
  const value = Number.parseInt(attribute ?? '1', 10);
  return value >= 1 ? Math.min(value, most) : 1;
}

function closeTable(reading: Reading): void {
  nextBlock(reading);
  const table = reading.tables.pop();
  if (table === undefined) return;
  closeCaption(reading, table);
  if (table.isLayout) return;
  const { caption } = table;
  const notes = notesIn(table);
  const cells = table.cells.filter(({ row }) => !notes.has(row));
  reading.blocks.push({ kind: 'table', cells, ...(caption === undefined ? {} : { caption }) });
  for (const { words } of notes.values()) reading.blocks.push({ kind: 'note', words });
}

/** Rows of the foot with nothing but one cell are notes that were set into the table. */
function notesIn({ cells, footRows }: OpenTable): ReadonlyMap<number, ReadCell> {
  const alone = new Map<number, ReadCell>();
  const crowded = new Set<number>();
  for (const cell of cells) {
    if (!footRows.has(cell.row)) continue;
    if (alone.has(cell.row)) crowded.add(cell.row);
    alone.set(cell.row, cell);
  }
  for (const row of crowded) alone.delete(row);
  return alone;
}
