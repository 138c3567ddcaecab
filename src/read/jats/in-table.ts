import type { Span } from '../../model/index.ts';
import {
  addNotes, breakLine, closeBlock, closeTable, type Composition, openBlock, separateCells, textSince, write,
} from '../composition.ts';
import { TALLEST, WIDEST } from '../spanning-cells.ts';
import { type Attributes, type OpenTable, type Reading, sectionOf } from './reading.ts';

/** Begins what only tables have; false where the element means the same as elsewhere. */
export function openInTable(
  reading: Reading,
  table: OpenTable,
  tag: string,
  attributes: Attributes,
): boolean {
  const { composition } = reading;
  switch (tag) {
    case 'label':
      if (table.cells.length === 0 && reading.inFoot === 0) table.labelStart = composition.length;
      return true;
    case 'table':
      table.caption ??= endCaption(composition);
      openBlock(composition, 'table', sectionOf(reading));
      [table.cells, table.row] = [[], -1];
      return true;
    case 'thead':
      table.inHead = true;
      return true;
    case 'tr':
      table.row++;
      if (table.cells.length > 0) breakLine(composition);
      return true;
    case 'td':
    case 'th':
      openCell(composition, table, tag, attributes);
      return true;
    case 'table-wrap-foot':
      reading.inFoot++;
      return true;
    case 'fn':
    case 'p':
      if (reading.inFoot > 0) openBlock(composition, 'note', sectionOf(reading));
      return reading.inFoot > 0;
    default:
      return false;
  }
}

/** Ends the caption, which is the block that was open when the table began. */
function endCaption(composition: Composition): Span | undefined {
  const blocks = composition.blocks.length;
  closeBlock(composition);
  return composition.blocks[blocks]?.span;
}

function openCell(
  composition: Composition,
  table: OpenTable,
  tag: string,
  attributes: Attributes,
): void {
  if (table.cells.at(-1)?.row === table.row) separateCells(composition);
  table.cell = { start: composition.length, attributes, header: table.inHead || tag === 'th' };
}

/** Ends what only tables have; false where the element means the same as elsewhere. */
export function closeInTable(reading: Reading, table: OpenTable, tag: string): boolean {
  const { composition } = reading;
  switch (tag) {
    case 'label':
      closeLabel(composition, table);
      return true;
    case 'td':
    case 'th':
      closeCell(composition, table);
      return true;
    case 'thead':
      table.inHead = false;
      return true;
    case 'table':
      closeTable(composition, table.label.replace(/[.:\s]+$/, ''), table.caption, table.cells);
      closeBlock(composition);
      return true;
    case 'fn':
    case 'p':
      if (reading.inFoot > 0) closeNote(composition, table);
      return reading.inFoot > 0;
    case 'table-wrap-foot':
      closeNote(composition, table);
      reading.inFoot--;
      return true;
    case 'table-wrap':
      closeTableWrap(reading, table);
      return true;
    default:
      return false;
  }
}

function closeLabel(composition: Composition, table: OpenTable): void {
  if (table.labelStart !== undefined) table.label = textSince(composition, table.labelStart).trim();
  table.labelStart = undefined;
  write(composition, ' ');
}

function closeNote(composition: Composition, table: OpenTable): void {
  const blocks = composition.blocks.length;
  if (composition.open?.kind === 'note') closeBlock(composition);
  const note = composition.blocks[blocks];
  if (note !== undefined) table.notes.push(note.span);
}

function closeTableWrap(reading: Reading, table: OpenTable): void {
  closeBlock(reading.composition);
  addNotes(reading.composition, table.firstTable, table.notes);
  reading.inCaption--;
  reading.table = undefined;
}

function closeCell(composition: Composition, table: OpenTable): void {
  const { cell, row } = table;
  table.cell = undefined;
  if (cell === undefined || row < 0) return;
  table.cells.push({
    row,
    rowSpan: spanFrom(cell.attributes['rowspan'], TALLEST),
    columnSpan: spanFrom(cell.attributes['colspan'], WIDEST),
    header: cell.header,
    span: { start: Math.min(cell.start, composition.length), end: composition.length },
  });
}

function spanFrom(attribute: string | undefined, most: number): number {
  const value = Number.parseInt(attribute ?? '1', 10);
  return value >= 1 ? Math.min(value, most) : 1;
}
