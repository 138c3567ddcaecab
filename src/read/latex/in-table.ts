import { TALLEST, WIDEST } from '../spanning-cells.ts';
import { plainWords, type ToldCell } from '../told.ts';
import { currentSource, layOut, type OpenCell, type OpenTable, type Reading } from './reading.ts';
import { readArgument, readOption } from './scanning.ts';

/** Begins a table; one inside a cell only breaks the cell into lines. */
export function openTable(reading: Reading): void {
  if (reading.table !== undefined) reading.table.inner++;
  else {
    reading.table = {
      cells: [], row: [], cell: emptyCell(), rowNumber: 0, column: 0, taken: new Map(),
      headerRows: undefined, repeatedFrom: undefined, inner: 0,
    };
  }
}

function emptyCell(): OpenCell {
  return { words: [], columnSpan: 1, rowSpan: 1 };
}

/** Ends a cell at "&". */
export function nextCell(reading: Reading): void {
  const { table } = reading;
  if (table === undefined) return;
  if (table.inner > 0) layOut(reading, 'tab');
  else endCell(table);
}

/** Ends a row at "\\"; inside a cell it ends a line of it. */
export function nextRow(reading: Reading): void {
  const { table } = reading;
  if (table === undefined || table.inner > 0) layOut(reading, 'break');
  else endRow(table);
}

/** A cell under one that reaches down is written as an empty one, which is none. */
function endCell(table: OpenTable): void {
  const { cell, column, taken, rowNumber } = table;
  const isTaken = (taken.get(column) ?? 0) > rowNumber && plainWords(cell.words) === '';
  if (!isTaken) table.row.push({ ...cell, row: rowNumber });
  if (cell.rowSpan > 1) {
    for (let at = column; at < column + cell.columnSpan; at++) {
      taken.set(at, rowNumber + cell.rowSpan);
    }
  }
  table.column += cell.columnSpan;
  table.cell = emptyCell();
}

/** Rows without a word are spaces between the others. */
function endRow(table: OpenTable): void {
  endCell(table);
  const hasWords = table.row.some(({ words }) => plainWords(words) !== '');
  if (hasWords) {
    table.cells.push(...table.row);
    table.rowNumber++;
  }
  [table.row, table.column] = [[], 0];
}

/** A rule below the first rows parts the header from the body. */
export function ruleIn({ table }: Reading): void {
  if (table === undefined || table.inner > 0 || table.rowNumber === 0) return;
  table.headerRows ??= table.rowNumber;
}

/** What a long table repeats on its other pages is read once. */
export function endRepeated({ table }: Reading, command: string): void {
  if (table === undefined) return;
  if (table.repeatedFrom !== undefined) dropRowsFrom(table, table.repeatedFrom);
  else if (command === 'endfirsthead' || command === 'endhead') table.headerRows = table.rowNumber;
  table.repeatedFrom = table.rowNumber;
}

function dropRowsFrom(table: OpenTable, row: number): void {
  while ((table.cells.at(-1)?.row ?? -1) >= row) table.cells.pop();
  table.rowNumber = row;
}

/** \multicolumn{3}{c}{…}   \multirow[t]{2}{*}{…}: what follows is the cell's words. */
export function spanCell(reading: Reading, command: 'multicolumn' | 'multirow'): void {
  const source = currentSource(reading);
  readOption(source);
  const span = Number.parseInt(readArgument(source, 200) ?? '1', 10);
  readOption(source);
  readArgument(source, 2000);
  readOption(source);
  const { table } = reading;
  if (table === undefined || !(span > 1)) return;
  if (command === 'multicolumn') table.cell.columnSpan = Math.min(span, WIDEST);
  else table.cell.rowSpan = Math.min(span, TALLEST);
}

/** Ends a table: its cells, with those of the rows above the first rule as headers. */
export function closeTable(reading: Reading): readonly ToldCell[] | undefined {
  const { table } = reading;
  if (table === undefined) return undefined;
  if (table.inner > 0) {
    table.inner--;
    return undefined;
  }
  if (table.row.length > 0 || plainWords(table.cell.words) !== '') endRow(table);
  reading.table = undefined;
  const { headerRows = 0, rowNumber } = table;
  const heads = headerRows < rowNumber ? headerRows : 0;
  return table.cells.map((cell) => ({ ...cell, header: cell.row < heads }));
}
