import { captionLabel, labelsTable } from '../captions.ts';
import { knownHeading } from '../headings.ts';
import { wordsOf } from './phrase.ts';
import type { TextLine } from './text-line.ts';

/** Lines `start` to `end` (not included) of a column that are a table. */
export interface TableRegion {
  readonly start: number;
  readonly end: number;
}

/**
 * Finds the tables among a column's lines: runs of lines set in cells, that is
 * with wide gaps, after a table's caption or at least three together. Single
 * cells between them (group rows, broken labels) belong to the table.
 */
export function tableRegions(lines: readonly TextLine[]): readonly TableRegion[] {
  const regions: TableRegion[] = [];
  for (let i = 0; i < lines.length; ) {
    const region = isInCells(lines[i] as TextLine) ? regionFrom(lines, i) : undefined;
    if (region !== undefined) regions.push(region);
    i = region?.end ?? i + 1;
  }
  return regions;
}

// 12. Oakhollow P.      [12] Oakhollow P.      • First, ask
// ^^^                   ^^^^                   ^
const BULLET = /^(?:\[?\d{1,3}[\].)]|\(?[a-z][.)]|[•▪●–—*·])$/;

/** Whether a line is set in cells: three or more, or two with a gap that no justified line has. */
export function isInCells({ phrases, size }: TextLine): boolean {
  if (phrases.length >= 3) return true;
  const [first, second] = phrases;
  if (first !== undefined && BULLET.test(wordsOf(first.runs))) return false;
  return first !== undefined && second !== undefined && second.left - first.right > 1.6 * size;
}

/** More lines of a single cell than stand together in a table. */
const BARE = 8;

function regionFrom(lines: readonly TextLine[], start: number): TableRegion | undefined {
  let end = start + 1;
  let inCells = 1;
  for (let i = end; i < lines.length && i - end < BARE && !endsTable(lines, i); i++) {
    if (!isInCells(lines[i] as TextLine)) continue;
    inCells++;
    end = i + 1;
  }
  if (isRestOfLabel(lines[end], lines[end - 1] as TextLine)) end++;
  const enough = inCells >= 3 || (inCells >= 2 && captionedAbove(lines, start));
  return enough && inCells * 3 >= end - start ? { start: withHeads(lines, start), end } : undefined;
}

/** Lines of the table's head with one cell only stand above its first line of several cells. */
function withHeads(lines: readonly TextLine[], start: number): number {
  let first = start;
  while (first > 0 && isHead(lines[first - 1] as TextLine, lines[first] as TextLine)) first--;
  return first;
}

function isHead(line: TextLine, below: TextLine): boolean {
  const near = below.baseline - line.baseline < 1.9 * line.size;
  if (!near || isProse(line) || captionLabel(line.words) !== '') return false;
  const alike = Math.abs(line.size - below.size) < 0.04 * below.size;
  const setIn = line.left - line.column.left > 3 * line.size;
  return alike && setIn && !/[.;:]$/.test(line.words);
}

/** The second line of the last row's label: "for patients" under "Use of gloves   12 (10)". */
function isRestOfLabel(line: TextLine | undefined, last: TextLine): boolean {
  if (line === undefined || line.baseline - last.baseline > 1.6 * line.size) return false;
  return (
    Math.abs(line.size - last.size) < 0.05 * last.size &&
    /^[a-z(]/.test(line.words) &&
    !/\.$/.test(line.words)
  );
}

/** A caption, a heading, prose, or a wide empty space before another kind of line end a table. */
function endsTable(lines: readonly TextLine[], i: number): boolean {
  const line = lines[i] as TextLine;
  const before = lines[i - 1] as TextLine;
  if (captionLabel(line.words) !== '') return true;
  if (isInCells(line)) return line.baseline - before.baseline > 6 * line.size;
  if (line.baseline - before.baseline > 3.2 * line.size) return true;
  return isProse(line) && (isProse(lines[i + 1]) || knownHeading(line.words) !== undefined);
}

/** A line that fills its column with words. */
function isProse(line: TextLine | undefined): boolean {
  if (line === undefined || isInCells(line)) return false;
  const { left, right } = line.column;
  return line.right - line.left > 0.7 * (right - left) && line.words.split(' ').length >= 6;
}

function captionedAbove(lines: readonly TextLine[], start: number): boolean {
  return lines
    .slice(Math.max(0, start - 6), start)
    .some(({ words }) => labelsTable(captionLabel(words)));
}
