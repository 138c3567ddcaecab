import { expect } from 'vitest';
import { contains, quote, type Manuscript, type Placed } from '../src/model/index.ts';

/** Holds for every manuscript, whatever it was read from. */
export function expectWellFormed({ text, blocks, tables, lines, marks, pages }: Manuscript): void {
  expectInOrder(blocks, text);
  expectInOrder(lines, text);
  expectInOrder(pages, text);
  for (const { span } of blocks) expect(quote(text, span)).toBe(quote(text, span).trim());
  for (const { span } of blocks) expect(span.end).toBeGreaterThan(span.start);
  expectCovered(blocks, lines, text);
  for (const { span } of marks) expect(quote(text, span).trim()).not.toBe('');
  for (const table of tables) {
    expect(blocks.some(({ kind, span }) => kind === 'table' && contains(span, table.span))).toBe(
      true,
    );
    expectInOrder(table.cells, text);
    for (const cell of table.cells) {
      expect(contains(table.span, cell.span)).toBe(true);
      expect(cell.row + cell.rowSpan).toBeLessThanOrEqual(table.rowCount);
      expect(cell.column + cell.columnSpan).toBeLessThanOrEqual(table.columnCount);
    }
  }
}

function expectInOrder(placed: readonly Placed[], text: string): void {
  let end = 0;
  for (const { span } of placed) {
    expect(span.start).toBeGreaterThanOrEqual(end);
    expect(span.end).toBeGreaterThanOrEqual(span.start);
    end = span.end;
  }
  expect(end).toBeLessThanOrEqual(text.length);
}

/** Every character of a block that is not blank stands in a line, in forms that have lines. */
function expectCovered(blocks: readonly Placed[], lines: readonly Placed[], text: string): void {
  if (lines.length === 0) return;
  let i = 0;
  for (const { span } of blocks) {
    let offset = span.start;
    while (offset < span.end) {
      while (i < lines.length && (lines[i] as Placed).span.end <= offset) i++;
      const line = lines[i];
      const gap = text.slice(offset, Math.min(span.end, line?.span.start ?? span.end));
      expect(gap.trim()).toBe('');
      offset = Math.max(offset + gap.length, Math.min(span.end, line?.span.end ?? span.end));
    }
  }
}
