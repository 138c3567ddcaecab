import type { Inline, ToldCell } from '../told.ts';
import type { SourceLine } from './source-line.ts';

/** A row of a table: its cells as written, and the line they begin in. */
interface Row {
  readonly cells: readonly string[];
  readonly line: number;
}

/** A table as written: its rows, and how many lines of the source it took. */
export interface WrittenTable {
  readonly rows: readonly Row[];
  readonly headerRows: number;
  readonly length: number;
}

/** Reads a table that begins at line `start`, in any of the ways of drawing one. */
export function tableAt(lines: readonly SourceLine[], start: number): WrittenTable | undefined {
  return pipeTable(lines, start) ?? gridTable(lines, start) ?? ruledTable(lines, start);
}

const DELIMITERS = /^\s*\|?\s*:?-+:?\s*(?:\|\s*:?-+:?\s*)*\|?\s*$/;

// | Town | OR (95% CI) |
// |------|-------------|
// | Noss | 1.2 (0.8–1.9) |
function pipeTable(lines: readonly SourceLine[], start: number): WrittenTable | undefined {
  const head = lines[start]?.text ?? '';
  const rule = lines[start + 1]?.text ?? '';
  if (!head.includes('|') || !rule.includes('|') || !DELIMITERS.test(rule)) return undefined;
  let end = start + 2;
  while (lines[end]?.text.includes('|') === true) end++;
  const body = lines.slice(start + 2, end);
  const rows = [lines[start] as SourceLine, ...body].map(pipeRow);
  const hasHead = rows[0]?.cells.some((cell) => cell !== '') === true;
  return { rows: hasHead ? rows : rows.slice(1), headerRows: hasHead ? 1 : 0, length: end - start };
}

function pipeRow({ text, number }: SourceLine): Row {
  const cells = cellsBetweenPipes(text.trim().replace(/^\|/, '').replace(/(?<!\\)\|$/, ''));
  return { cells, line: number };
}

function cellsBetweenPipes(row: string): readonly string[] {
  return row.split(/(?<!\\)\|/).map((cell) => cell.replace(/\\\|/g, '|').trim());
}

const GRID_RULE = /^\s*\+(?:[-=:]+\+)+\s*$/;

// +------+-----+
// | Town | OR  |
// +======+=====+
function gridTable(lines: readonly SourceLine[], start: number): WrittenTable | undefined {
  if (!GRID_RULE.test(lines[start]?.text ?? '')) return undefined;
  const rows: Row[] = [];
  let [at, headerRows, open] = [start, 0, false];
  for (; /^\s*[+|]/.test(lines[at]?.text ?? ''); at++) {
    const line = lines[at] as SourceLine;
    if (GRID_RULE.test(line.text)) {
      open = false;
      if (line.text.includes('=')) headerRows = rows.length;
    } else {
      const row = pipeRow(line);
      const last = rows.at(-1);
      if (open && last !== undefined) rows[rows.length - 1] = joined(last, row);
      else rows.push(row);
      open = true;
    }
  }
  return rows.length === 0 ? undefined : { rows, headerRows, length: at - start };
}

/** A cell of several lines. */
function joined({ cells, line }: Row, { cells: more }: Row): Row {
  return { cells: cells.map((cell, i) => `${cell}\n${more[i] ?? ''}`.trim()), line };
}

const RULE = /^\s*-{2,}(?:\s+-{2,})+\s*$/;

//  Town    OR (95% CI)
// ------  -------------
//  Noss    1.2 (0.8–1.9)
function ruledTable(lines: readonly SourceLine[], start: number): WrittenTable | undefined {
  const rule = lines[start + 1]?.text ?? '';
  const head = lines[start]?.text ?? '';
  if (!RULE.test(rule) || head.trim() === '' || RULE.test(head)) return undefined;
  const columns = [...rule.matchAll(/-+/g)].map(({ index }) => index);
  let end = start + 2;
  while (!/^\s*$/.test(lines[end]?.text ?? '') && !RULE.test(lines[end]?.text ?? '')) end++;
  const closed = RULE.test(lines[end]?.text ?? '') ? 1 : 0;
  const written = [lines[start] as SourceLine, ...lines.slice(start + 2, end)];
  const rows = written.map(({ text, number }) => ({
    cells: columns.map((from, i) => text.slice(i === 0 ? 0 : from, columns[i + 1]).trim()),
    line: number,
  }));
  return { rows, headerRows: 1, length: end + closed - start };
}

/** The cells of a written table, their words read by `read`. */
export function toldCells(
  { rows, headerRows }: WrittenTable,
  read: (source: string, line: number) => readonly Inline[],
): readonly ToldCell[] {
  return rows.flatMap(({ cells, line }, row) =>
    cells.map((cell) => ({
      words: read(cell, line),
      row,
      rowSpan: 1,
      columnSpan: 1,
      header: row < headerRows,
    })));
}
