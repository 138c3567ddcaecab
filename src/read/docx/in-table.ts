import { TALLEST, WIDEST } from '../spanning-cells.ts';
import { currentFlow, flattened, type OpenTable, type Reading } from './reading.ts';

type Attributes = Readonly<Record<string, string>>;

/** Begins what only tables have. */
export function openInTable(reading: Reading, name: string, attributes: Attributes): void {
  const table = reading.tables.at(-1);
  if (name === 'w:tbl') reading.tables.push(emptyTable());
  else if (table === undefined) return;
  else if (name === 'w:tr') startRow(table);
  else if (name === 'w:tc') startCell(reading, table);
  else describe(table, name, attributes);
}

function emptyTable(): OpenTable {
  return {
    cells: [], after: [], reaching: new Map(), row: -1, column: 0, isHeaderRow: false,
    isDeletedRow: false, cell: undefined,
  };
}

function startRow(table: OpenTable): void {
  table.row++;
  [table.column, table.isHeaderRow, table.isDeletedRow] = [0, false, false];
}

function startCell(reading: Reading, table: OpenTable): void {
  reading.flows.push({ kind: 'cell', blocks: [] });
  table.cell = {
    row: table.row, words: [], rowSpan: 1, columnSpan: 1, header: table.isHeaderRow,
    continued: false,
  };
}

function describe(table: OpenTable, name: string, attributes: Attributes): void {
  const { cell } = table;
  switch (name) {
    case 'w:tblHeader':
      table.isHeaderRow = !/^(?:0|false|off)$/.test(attributes['val'] ?? '');
      break;
    case 'w:gridBefore':
      skipColumns(table, spanFrom(attributes['val']));
      break;
    case 'w:gridSpan':
      if (cell !== undefined) cell.columnSpan = spanFrom(attributes['val']);
      break;
    case 'w:vMerge':
      if (cell !== undefined) cell.continued = attributes['val'] !== 'restart';
      break;
  }
}

/** A row may begin some columns in: an empty cell keeps their places. */
function skipColumns(table: OpenTable, columnSpan: number): void {
  const row = Math.max(0, table.row);
  table.cells.push({ row, words: [], rowSpan: 1, columnSpan, header: false, continued: false });
  table.column += columnSpan;
}

function spanFrom(value: string | undefined): number {
  const span = Number.parseInt(value ?? '1', 10);
  return span >= 1 ? Math.min(span, WIDEST) : 1;
}

/** Ends a cell: its words are known, and whether it goes on with the one above. */
export function closeCell(reading: Reading): void {
  const table = reading.tables.at(-1);
  const cell = table?.cell;
  if (table === undefined || cell === undefined || currentFlow(reading).kind !== 'cell') return;
  cell.words = flattened(reading.flows.pop()?.blocks ?? []);
  table.cell = undefined;
  const above = table.reaching.get(table.column);
  if (cell.continued && above !== undefined && above.row + above.rowSpan === table.row) {
    above.rowSpan = Math.min(above.rowSpan + 1, TALLEST);
  } else {
    table.cells.push(cell);
    table.reaching.set(table.column, cell);
  }
  table.column += cell.columnSpan;
}

/** Ends a row; one that was deleted in a tracked change is dropped. */
export function closeRow({ tables }: Reading): void {
  const table = tables.at(-1);
  if (table?.isDeletedRow !== true) return;
  while (table.cells.at(-1)?.row === table.row) table.cells.pop();
  table.row--;
}

/** Ends a table, which becomes a block of the flow around it. */
export function closeTable(reading: Reading): void {
  const table = reading.tables.pop();
  if (table === undefined) return;
  const flow = currentFlow(reading);
  flow.blocks.push({ kind: 'table', cells: table.cells });
  const outer = flow.kind === 'cell' ? reading.tables.at(-1) : undefined;
  (outer?.after ?? flow.blocks).push(...table.after);
}
