import { rowsOf, type Phrase, type Row } from './phrase.ts';

/** Phrases that are read together from top to bottom, with the column's edges. */
export interface Column {
  readonly phrases: readonly Phrase[];
  readonly left: number;
  readonly right: number;
}

/** White space from top to bottom of a part of the page, between two columns of text. */
export interface Gutter {
  readonly left: number;
  readonly right: number;
}

/**
 * Divides a page's phrases into columns in reading order. What reaches across
 * a gutter (a title, a wide table) is a column of its own, between those above
 * and those below it.
 */
export function columnsOf(
  phrases: readonly Phrase[],
  known: readonly Gutter[] = [],
  depth = 0,
): readonly Column[] {
  if (phrases.length === 0) return [];
  const left = Math.min(...phrases.map((phrase) => phrase.left));
  const right = Math.max(...phrases.map((phrase) => phrase.right));
  const gutter = depth < 3 ? gutterIn(phrases, left, right, known) : undefined;
  if (gutter === undefined) return [{ phrases, left, right }];
  return zonesOf(phrases, gutter).flatMap((zone) => {
    if (zone.across) return [{ phrases: zone.phrases, left, right }];
    const onLeft = zone.phrases.filter((phrase) => isLeftOf(phrase, gutter));
    const onRight = zone.phrases.filter((phrase) => !isLeftOf(phrase, gutter));
    return [...columnsOf(onLeft, [], depth + 1), ...columnsOf(onRight, [], depth + 1)];
  });
}

function isLeftOf(phrase: Phrase, gutter: Gutter): boolean {
  return phrase.left + phrase.right < gutter.left + gutter.right;
}

/** The gutter of a whole page, if it has one: other pages of the document have theirs there too. */
export function pageGutter(phrases: readonly Phrase[]): Gutter | undefined {
  if (phrases.length === 0) return undefined;
  const left = Math.min(...phrases.map((phrase) => phrase.left));
  return gutterIn(phrases, left, Math.max(...phrases.map((phrase) => phrase.right)), []);
}

/** The fewest full lines on either side that make a column, and where other pages have a gutter. */
const FEWEST = 4;
const FEWEST_KNOWN = 1;

/** Where text lines end on the left and begin on the right of the same white strip. */
function gutterIn(
  phrases: readonly Phrase[],
  left: number,
  right: number,
  known: readonly Gutter[],
): Gutter | undefined {
  const width = right - left;
  let best: { readonly gutter: Gutter; readonly worth: number } | undefined;
  for (const gutter of stripsIn(phrases, left + 0.2 * width, right - 0.2 * width)) {
    const fewest = known.some((other) => isSame(gutter, other)) ? FEWEST_KNOWN : FEWEST;
    const worth = worthOf(gutter, phrases, left, right, fewest);
    if (worth !== undefined && (best === undefined || worth > best.worth)) best = { gutter, worth };
  }
  return best?.gutter;
}

/** How many full lines a gutter parts, less what crosses it; undefined where it parts nothing. */
function worthOf(
  gutter: Gutter,
  phrases: readonly Phrase[],
  left: number,
  right: number,
  fewest: number,
): number | undefined {
  const onLeft = phrases.filter((p) => p.right <= gutter.left + 1);
  const onRight = phrases.filter((p) => p.left >= gutter.right - 1);
  const fullLeft = onLeft.filter((p) => isFull(p, left, gutter.left)).length;
  const fullRight = onRight.filter((p) => isFull(p, gutter.right, right)).length;
  const crossings = phrases.length - onLeft.length - onRight.length;
  const lines = Math.min(fullLeft, fullRight);
  if (lines >= fewest && crossings <= 3 * (fullLeft + fullRight)) return lines - crossings;
  const text = Math.max(fullLeft, fullRight);
  const besides = Math.min(onLeft.length, onRight.length);
  const isBox = text >= 3 * FEWEST && besides >= FEWEST && crossings < text;
  return isBox && areUneven(onLeft, onRight) ? FEWEST - crossings : undefined;
}

/** A box beside the text has lines of its own; the cells of a table's rows share theirs. */
function areUneven(onLeft: readonly Phrase[], onRight: readonly Phrase[]): boolean {
  const [few, many] = onLeft.length < onRight.length ? [onLeft, onRight] : [onRight, onLeft];
  const heights = new Set(
    many.flatMap(({ baseline }) => [Math.round(baseline), Math.round(baseline + 0.5)]),
  );
  const even = few.filter(({ baseline }) => heights.has(Math.round(baseline))).length;
  return even < 0.4 * few.length;
}

function isSame(a: Gutter, b: Gutter): boolean {
  return Math.min(a.right, b.right) - Math.max(a.left, b.left) > 0.5 * (b.right - b.left);
}

/** A line fills its column if it reaches over more than half of it. */
function isFull(phrase: Phrase, left: number, right: number): boolean {
  return phrase.right - phrase.left > 0.6 * (right - left);
}

/** Strips in which no phrase begins or ends, on a grid of points: any of them may be a gutter. */
function stripsIn(phrases: readonly Phrase[], from: number, to: number): readonly Gutter[] {
  const counts = crossingCounts(phrases, from, to);
  const strips: Gutter[] = [];
  for (let i = 0; i < counts.length; ) {
    let end = i + 1;
    while (end < counts.length && counts[end] === counts[i]) end++;
    if (end - i >= 3) strips.push({ left: from + i, right: from + end });
    i = end;
  }
  return strips;
}

function crossingCounts(phrases: readonly Phrase[], from: number, to: number): readonly number[] {
  const changes = new Array<number>(Math.max(1, Math.ceil(to - from)) + 1).fill(0);
  const at = (u: number): number => Math.min(changes.length - 1, Math.max(0, Math.round(u - from)));
  for (const { left, right } of phrases) {
    changes[at(left)] = (changes[at(left)] ?? 0) + 1;
    changes[at(right)] = (changes[at(right)] ?? 0) - 1;
  }
  let count = 0;
  return changes.slice(0, -1).map((change) => (count += change));
}

/** Phrases of one height range that are read across the gutter, or column by column. */
interface Zone {
  readonly across: boolean;
  readonly phrases: readonly Phrase[];
}

/** Rows are put together into zones; neighbours that are read alike are one zone. */
function zonesOf(phrases: readonly Phrase[], gutter: Gutter): readonly Zone[] {
  const rows = rowsOf(phrases);
  const edges = columnEdges(phrases, gutter);
  const kinds = settled(
    rows.map((row) => kindOf(row, gutter, edges)),
    rows,
    gutter,
  );
  const zones: { across: boolean; phrases: Phrase[] }[] = [];
  for (const [i, row] of rows.entries()) {
    const across = kinds[i] === 'across';
    const last = zones.at(-1);
    if (last?.across === across) last.phrases.push(...row);
    else zones.push({ across, phrases: [...row] });
  }
  return zones;
}

/** Where lines of the right column begin: at its edge, and at that of a box in it. */
function columnEdges(phrases: readonly Phrase[], gutter: Gutter): readonly number[] {
  const right = Math.max(...phrases.map((p) => p.right));
  const counts = new Map<number, number>();
  for (const p of phrases) {
    if (p.left < gutter.right - 2 || !isFull(p, gutter.right, right)) continue;
    counts.set(Math.round(p.left), (counts.get(Math.round(p.left)) ?? 0) + 1);
  }
  const edges = [...counts].filter(([, count]) => count >= 2).map(([left]) => left);
  return edges.length > 0 ? edges : [gutter.right];
}

/**
 * How a row is read. Lines of text begin at their column's edge; the cells of a
 * wide table begin anywhere. What stands on the left alone tells nothing.
 */
type RowKind = 'across' | 'cells' | 'columns' | 'either';

function kindOf(row: Row, gutter: Gutter, edges: readonly number[]): RowKind {
  if (row.some((p) => p.left < gutter.left - 2 && p.right > gutter.right + 2)) return 'across';
  const onRight = row.find((p) => !isLeftOf(p, gutter));
  if (onRight === undefined) return 'either';
  const [left, right] = [Math.min(...row.map((p) => p.left)), Math.max(...row.map((p) => p.right))];
  const leftFull = row.some((p) => isLeftOf(p, gutter) && isFull(p, left, gutter.left));
  const atEdge = edges.some((edge) => Math.abs(onRight.left - edge) < 2 * onRight.size);
  if (atEdge)
    return isFull(onRight, gutter.right, right) && onRight.length > 20 ? 'columns' : 'either';
  return leftFull || onRight === row[0] ? 'either' : 'cells';
}

/**
 * Rows that tell nothing go with those around them: between rows of a wide table
 * they are part of it, and under its first rows as long as they look like it.
 */
function settled(
  kinds: readonly RowKind[],
  rows: readonly Row[],
  gutter: Gutter,
): readonly RowKind[] {
  const sure = kinds.map(
    (kind, i): RowKind => (kind === 'cells' ? (hasCompany(kinds, i) ? 'across' : 'either') : kind),
  );
  const result = [...sure];
  for (let i = 0; i < sure.length; ) {
    const end = runEnd(sure, i);
    if (sure[i] === 'either') settleRun(result, rows, i, end, gutter);
    i = end;
  }
  return result;
}

/** Settles rows `start` to `end` (not included), which tell nothing themselves. */
function settleRun(
  kinds: RowKind[],
  rows: readonly Row[],
  start: number,
  end: number,
  gutter: Gutter,
): void {
  const [above, below] = [kinds[start - 1], kinds[end]];
  if ((above === 'across' && below === 'across') || areCells(rows.slice(start, end), gutter)) {
    kinds.fill('across', start, end);
    return;
  }
  const bottom = above === 'across' ? tableEnd(rows, start, end, gutter) : start;
  const top = below === 'across' ? tableTop(rows, bottom, end) : end;
  kinds.fill('across', start, bottom).fill('columns', bottom, top).fill('across', top, end);
}

/** Many rows of four or more short phrases are a table, though it begins as the columns do. */
function areCells(rows: readonly Row[], gutter: Gutter): boolean {
  const cells = rows.filter((row) => row.length >= 4 && isOverGutter(row, gutter)).length;
  return cells >= 3 && cells > 0.6 * rows.length;
}

/** Short phrases on both sides: a line of text beside the row of a narrow table is none. */
function isOverGutter(row: Row, gutter: Gutter, longest = WORDY): boolean {
  const onLeft = row.filter((phrase) => isLeftOf(phrase, gutter));
  if (onLeft.length === 0 || onLeft.length === row.length) return false;
  return onLeft.length > 1 || (onLeft[0]?.length ?? 0) < longest;
}

/** Where the head of a table begins whose first sure row is row `end`. */
function tableTop(rows: readonly Row[], start: number, end: number): number {
  let top = end;
  while (top > start && isSetAlike(rows[top - 1] as Row, rows[top] as Row)) top--;
  return top;
}

/** More characters than a table's heading has; as many as a line of a column. */
const WORDY = 32;

/** In the same type, and no farther apart than the rows of a table. */
function isSetAlike(above: Row, row: Row): boolean {
  const [before, own] = [above[0], row[0]];
  if (before === undefined || own === undefined) return false;
  const alike = Math.abs(before.size - own.size) < 0.04 * own.size;
  return (
    alike &&
    above.every(({ length }) => length < WORDY) &&
    own.baseline - before.baseline < 2.8 * own.size
  );
}

function runEnd(kinds: readonly RowKind[], start: number): number {
  const end = kinds.findIndex((kind, i) => i > start && kind !== kinds[start]);
  return end < 0 ? kinds.length : end;
}

/** Where a table that began above row `start` ends, at the latest before row `end`. */
function tableEnd(rows: readonly Row[], start: number, end: number, gutter: Gutter): number {
  const sure = rows[start - 1]?.[0]?.size ?? 0;
  const alike = rows.slice(start, end).map((row) => {
    const longest = (row[0]?.size ?? 0) === sure ? 1.5 * WORDY : WORDY;
    return row.length >= 3 && isOverGutter(row, gutter, longest);
  });
  const last = alike.lastIndexOf(true) + 1;
  if (alike.filter(Boolean).length * 2 < last || last < 2) return start;
  let after = start + last;
  while (after < end && isAlike(rows[after - 1] as Row, rows[after] as Row)) after++;
  return after;
}

/** The last rows of a table may have fewer cells; they are set as the others are. */
function isAlike(above: Row, row: Row): boolean {
  const [before, own] = [above[0], row[0]];
  if (before === undefined || own === undefined || row.length < 2) return false;
  const near =
    own.baseline - before.baseline < 2 * own.size &&
    Math.abs(own.left - before.left) < 2 * own.size;
  return near && Math.abs(own.size - before.size) < 0.02 * own.size;
}

function hasCompany(kinds: readonly RowKind[], i: number): boolean {
  const near = kinds.slice(Math.max(0, i - 3), i + 4);
  return near.filter((kind) => kind === 'cells' || kind === 'across').length >= 2;
}
