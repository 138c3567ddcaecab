import { type Manuscript, quote, type Table } from '../../src/model/index.ts';

/** The blocks of a manuscript, one a line: "paragraph | results | The odds ratio was". */
export function outline({ text, blocks }: Manuscript): readonly string[] {
  return blocks.map(({ kind, section, span }) => `${kind} | ${section.role} | ${quote(text, span)}`);
}

/** The cells of a table, one a line: "h 0,1 over 2 columns: Adjusted". */
export function cellsOf({ text }: Manuscript, table: Table | undefined): readonly string[] {
  return (table?.cells ?? []).map(({ header, row, column, rowSpan, columnSpan, span }) => {
    const reach = [
      ...(rowSpan > 1 ? [`over ${rowSpan} rows`] : []),
      ...(columnSpan > 1 ? [`over ${columnSpan} columns`] : []),
    ].join(' ');
    return `${header ? 'h ' : ''}${row},${column}${reach === '' ? '' : ` ${reach}`}: ${quote(text, span)}`;
  });
}

/** The marks of a manuscript with what stands before them: "P = 0.05^12". */
export function marksOf({ text, marks }: Manuscript): readonly string[] {
  return marks.map(({ kind, span }) => {
    const before = text.slice(Math.max(0, span.start - 8), span.start);
    return `${before}${kind === 'superscript' ? '^' : '_'}${quote(text, span)}`;
  });
}
