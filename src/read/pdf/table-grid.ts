import {
  gridOf,
  isData,
  withGroupLabels,
  type Extent,
  type GridCell,
  type Piece,
} from '../grid.ts';
import type { DraftGrid, Placed } from './draft.ts';
import { phraseOf, wordsOf, type Phrase } from './phrase.ts';
import type { Run } from './run.ts';
import type { TextLine } from './text-line.ts';

type Row = readonly GridCell<Placed>[];

/** Recovers a grid from a table's lines; undefined where there are no two columns. */
export function tableGrid(lines: readonly TextLine[]): DraftGrid | undefined {
  const near = NEAR * (lines[0]?.size ?? 0);
  const printed = printedRows(lines);
  const { cells, columnCount } = gridOf(withoutGlue(printed, near), near);
  if (columnCount < 2) return undefined;
  const rows: GridCell<Placed>[][] = printed.map(() => []);
  for (const cell of cells) rows[cell.row]?.push(cell);
  const whole = withoutBrokenRows(rows);
  const labelled = withGroupLabels(whole.flat(), whole.length);
  return { rows: whole.map((_, i) => labelled.filter(({ row }) => row === i)), columnCount };
}

/** Lines closer than this, in ems, cannot stand one under the other: they are one row. */
const SAME_ROW = 0.92;

/**
 * The rows as printed. A cell of one line is often set midway beside one of two:
 *
 *     Body mass index,
 *                         26.4 (3.9)
 *     mean (SD)
 */
function printedRows(lines: readonly TextLine[]): readonly (readonly Piece<Placed>[])[] {
  const rows: TextLine[][] = [];
  for (const line of lines) {
    const last = rows.at(-1)?.at(-1);
    const step = last === undefined ? Infinity : line.baseline - last.baseline;
    if (step >= 0 && step < SAME_ROW * line.size) rows.at(-1)?.push(line);
    else rows.push([line]);
  }
  return rows.map((row) => row.flatMap(piecesOf).toSorted((a, b) => a.left - b.left));
}

function piecesOf(line: TextLine): readonly Piece<Placed>[] {
  return line.phrases.map((phrase) => pieceOf(line, phrase));
}

function pieceOf(line: TextLine, phrase: Phrase): Piece<Placed> {
  return {
    item: { line, phrase },
    words: wordsOf(phrase.runs),
    left: phrase.left,
    right: phrase.right,
  };
}

/** How far a heading may stand beside its column, in ems. */
const NEAR = 1.5;

/** Wider than any space between the words of a cell, in ems. */
const GLUED = 0.55;

/**
 * Cells that stand close together, as "<0.001" and "113" in neighbouring narrow
 * columns, are one phrase by their gap alone; where other rows show two columns
 * under it, it is parted.
 */
function withoutGlue(
  rows: readonly (readonly Piece<Placed>[])[],
  near: number,
): readonly (readonly Piece<Placed>[])[] {
  const apart = rows.map((row) => row.flatMap((piece) => parted(piece, GLUED)));
  const columns = firmColumns(apart, near);
  const { cells } = gridOf(apart, near);
  const spanning = new Set(
    cells.filter(({ columnSpan }) => columnSpan > 1).flatMap(({ pieces }) => pieces),
  );
  return apart.map((row) =>
    row.flatMap((piece) =>
      spanning.has(piece) || isLoose(piece)
        ? parted(piece, 0.2, columns).flatMap((part) => cutRuns(part, columns))
        : [piece],
    ),
  );
}

/**
 * The columns that the rows show without the pieces that may be two cells in one,
 * where enough is left to show them.
 */
function firmColumns(
  rows: readonly (readonly Piece<Placed>[])[],
  near: number,
): readonly Extent[] {
  const firm = rows.map((row) => row.filter((piece) => !isLoose(piece)));
  return gridOf(firm, near).columns;
}

// 1.47 (1.08–1.99) 1.22 (0.90–1.67)      Crude HR (95%   Adjusted HR
function isLoose({ item }: Piece<Placed>): boolean {
  const { runs } = item.phrase;
  return runs.some(({ text }, i) =>
    /[)\]] \d/.test(text) || (i > 0 && gapBefore(runs.slice(i - 1, i), runs[i] as Run) > WORD_GAP));
}

/**
 * Parts a phrase where data stand on both sides of a gap wider than `gap` ems,
 * and where a gap wider than a word's stands between two of the columns.
 */
function parted(
  piece: Piece<Placed>,
  gap: number,
  columns: readonly Extent[] = [],
): readonly Piece<Placed>[] {
  const { line, phrase } = piece.item;
  const parts: Run[][] = [];
  for (const run of phrase.runs) {
    const part = parts.at(-1);
    if (part === undefined || areApart(part, run, gap) || isBetween(part, run, columns)) {
      parts.push([run]);
    }
    else part.push(run);
  }
  return parts.length === 1 ? [piece] : parts.map((runs) => pieceOf(line, phraseOf(runs)));
}

/** Wider than the space between two words of one cell, in ems, where the words are no figures. */
const WORD_GAP = 0.4;

function areApart(part: readonly Run[], run: Run, gap: number): boolean {
  const own = gapBefore(part, run);
  if (gap < GLUED && own > GLUED) return true;
  if (own > WORD_GAP && startsAnew(part, run)) return true;
  return own > gap && isData(wordsOf(part)) && isData(run.text);
}

function gapBefore(part: readonly Run[], run: Run): number {
  return (run.left - (part.at(-1) as Run).right) / run.size;
}

// 1.47 (1.08–1.99)   1.22 (0.90–1.67)
//                ^   ^ no cell goes on so
function startsAnew(part: readonly Run[], run: Run): boolean {
  return /[)\]]$/.test((part.at(-1) as Run).text) && /^\d/.test(run.text) && isData(wordsOf(part));
}

/** Whether the gap before a run stands where one column ends and the next begins. */
function isBetween(part: readonly Run[], run: Run, columns: readonly Extent[]): boolean {
  if (gapBefore(part, run) <= WORD_GAP) return false;
  const middle = (run.left + (part.at(-1) as Run).right) / 2;
  return columns.some(({ right }, i) => {
    const next = columns[i + 1];
    const slack = run.size / 2;
    return next !== undefined && middle >= right - slack && middle <= next.left + slack;
  });
}

/** Cuts a phrase within its runs, each by itself. */
function cutRuns(piece: Piece<Placed>, columns: readonly Extent[]): readonly Piece<Placed>[] {
  const { line, phrase } = piece.item;
  const parts: Run[][] = [[]];
  for (const run of phrase.runs) {
    const [first, ...others] = cut(pieceOf(line, phraseOf([run])), columns);
    parts.at(-1)?.push(...(first?.item.phrase.runs ?? []));
    for (const other of others) parts.push([...other.item.phrase.runs]);
  }
  return parts.length === 1 ? [piece] : parts.map((runs) => pieceOf(line, phraseOf(runs)));
}

/** Cuts "0.002 0.49 (0.31–0.76)", drawn as one run, where one column ends and the next begins. */
function cut(piece: Piece<Placed>, columns: readonly Extent[]): readonly Piece<Placed>[] {
  const { line, phrase } = piece.item;
  const [run, ...others] = phrase.runs;
  if (run === undefined || others.length > 0) return [piece];
  for (const [i, column] of columns.entries()) {
    const next = columns[i + 1];
    if (next === undefined || run.left >= column.right || run.right <= next.left) continue;
    const at = spaceNear(run, (column.right + next.left) / 2);
    if (at === undefined) continue;
    const u = placeOf(run, at);
    const left = { ...run, text: run.text.slice(0, at), right: Math.min(u, column.right) };
    const from = Math.max(u, next.left);
    const right = { ...run, text: run.text.slice(at + 1), left: from, spaced: true };
    const rest = pieceOf(line, phraseOf([right]));
    return [pieceOf(line, phraseOf([left])), ...cut(rest, columns.slice(i + 1))];
  }
  return [piece];
}

/** The space nearest to `u` that has data on both sides, if it is near enough. */
function spaceNear(run: Run, u: number): number | undefined {
  const spaces = [...run.text.matchAll(/ /g)].map(({ index }) => index);
  const near = spaces.filter((at) => Math.abs(placeOf(run, at) - u) < 1.5 * run.size);
  return near
    .filter((at) => isData(run.text.slice(0, at)) && isData(run.text.slice(at + 1)))
    .sort((a, b) => Math.abs(placeOf(run, a) - u) - Math.abs(placeOf(run, b) - u))[0];
}

/** About where a character of a run stands: figures are all of one width. */
function placeOf({ text, left, right }: Run, at: number): number {
  return left + ((right - left) * (at + 0.5)) / text.length;
}

/** Puts rows back together whose cells were broken over two lines. */
function withoutBrokenRows(rows: readonly Row[]): readonly Row[] {
  const whole: Row[] = [];
  for (const row of rows) {
    const above = whole.at(-1);
    if (above !== undefined && continuesRow(above, row))
      whole[whole.length - 1] = joinedRows(above, row);
    else whole.push(row);
  }
  return whole.map((row, i) => row.map((cell) => ({ ...cell, row: i })));
}

// Current smoker      1.52             Never smoked or
//                (1.10–2.10)           stopped before 1990     1.00
function continuesRow(above: Row, row: Row): boolean {
  if (row.length === 0) return false;
  if (row.every(({ header }) => header)) return continuesHead(above, row);
  if (above.some(({ header }) => header) || row.some(({ header }) => header)) return false;
  const label = row[0]?.column === 0 ? cellWords(row[0]) : '';
  if (above.length === 1 && above[0]?.column === 0)
    return row.length > 1 && goesOn(cellWords(above[0]), label);
  if (!row.every((cell) => above.some((over) => over.column === cell.column))) return false;
  if (row.length === 1 && label !== '') return /^[a-z(]/.test(label);
  return label === '' && row.every((cell) => /^[([]/.test(cellWords(cell)));
}

// None (n =      10–19 years (n
//   2,406)            = 769)        a bracket that is closed in the next line
function continuesHead(above: Row, row: Row): boolean {
  return row.every((cell) => cell.columnSpan === 1) && row.some((cell) => {
    const over = above.find(({ column, columnSpan }) => column === cell.column && columnSpan === 1);
    const words = over === undefined ? '' : cellWords(over);
    return /\([^()]*$/.test(words) && /^[^()]*\)/.test(cellWords(cell));
  });
}

/** Whether a label goes on in the next line: "Never smoked or" does, a group's name does not. */
function goesOn(above: string, label: string): boolean {
  return (
    /^[a-z(]/.test(label) ||
    /\b(?:of|in|for|the|an?|and|or|to|with|by|at|on|is|one|from|than)$/.test(above)
  );
}

function cellWords({ pieces }: GridCell<Placed>): string {
  return pieces.map(({ words }) => words).join(' ');
}

function joinedRows(above: Row, row: Row): Row {
  const columns = [...new Set([...above, ...row].map(({ column }) => column))].sort(
    (a, b) => a - b,
  );
  return columns.flatMap((column) => {
    const [first, second] = [above, row].flatMap(
      (cells) => cells.find((cell) => cell.column === column) ?? [],
    );
    if (first === undefined) return [];
    return [
      second === undefined ? first : { ...first, pieces: [...first.pieces, ...second.pieces] },
    ];
  });
}
