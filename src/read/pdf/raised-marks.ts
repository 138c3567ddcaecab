import type { Mark } from '../../model/index.ts';
import type { Run } from './run.ts';

/**
 * Finds raised and lowered marks: runs set beside a larger one, off its
 * baseline. They are given their host's baseline, so that they stay in its line,
 * and are known from then on as marks.
 *
 *     0.05¹²
 *         ^^ smaller, raised, and beside "0.05"
 */
export function withMarks(runs: readonly Run[]): readonly Run[] {
  const ends = endsByPlace(runs);
  const found = new Map<Run, Run>();
  for (const run of [...runs].sort((a, b) => a.left - b.left)) {
    const marked = run.text.length > LONGEST ? undefined : markedBy(run, ends, found);
    if (marked !== undefined) found.set(run, marked);
  }
  return found.size === 0 ? runs : runs.map((run) => found.get(run) ?? run);
}

/** Marks are short: "12", "a,b", "st". */
const LONGEST = 24;

/** The side of the squares by which neighbours are found, in points. */
const SQUARE = 8;

/** More ends than any honest square holds. */
const CROWDED = 64;

type Ends = ReadonlyMap<number, readonly Run[]>;

/** Every run under the squares in which it begins and ends. */
function endsByPlace(runs: readonly Run[]): Ends {
  const places = new Map<number, Run[]>();
  for (const run of runs) {
    for (const u of [run.left, run.right]) {
      const key = squareOf(u, run.baseline);
      const place = places.get(key);
      if (place === undefined) places.set(key, [run]);
      else if (place.length < CROWDED) place.push(run);
    }
  }
  return places;
}

/** Squares are counted row by row; a row has far more than any page is wide. */
const ROW = 100_000;

function squareOf(u: number, v: number): number {
  return Math.round(v / SQUARE) * ROW + Math.round(u / SQUARE);
}

const AROUND = [-1, 0, 1].flatMap((down) => [-1, 0, 1].map((across) => down * ROW + across));

function markedBy(run: Run, ends: Ends, found: ReadonlyMap<Run, Run>): Run | undefined {
  let earlier: Run | undefined;
  for (const square of [squareOf(run.left, run.baseline), squareOf(run.right, run.baseline)]) {
    for (const step of AROUND) {
      for (const other of ends.get(square + step) ?? []) {
        const kind = markBeside(run, other);
        if (kind !== undefined) return { ...run, mark: kind, baseline: other.baseline };
        if (earlier === undefined && found.size > 0 && isPartOfSame(run, other))
          earlier = found.get(other);
      }
    }
  }
  // "1", ",", "2": a later part of a mark has an earlier part beside it, not the host
  return earlier?.mark === undefined
    ? undefined
    : { ...run, mark: earlier.mark, baseline: earlier.baseline };
}

function markBeside(run: Run, host: Run): Mark['kind'] | undefined {
  if (run.size > host.size * 0.86 || !touches(run, host, host.size)) return undefined;
  const raised = (host.baseline - run.baseline) / host.size;
  if (raised > 0.12 && raised < 0.8) return 'superscript';
  if (raised < -0.06 && raised > -0.5) return 'subscript';
  return undefined;
}

function isPartOfSame(run: Run, part: Run): boolean {
  if (part === run) return false;
  const level = Math.abs(run.baseline - part.baseline) < 0.2 * part.size;
  return (
    level && Math.abs(run.size - part.size) < 0.15 * part.size && touches(run, part, part.size)
  );
}

function touches(a: Run, b: Run, size: number): boolean {
  const gap = a.left >= b.left ? a.left - b.right : b.left - a.right;
  return gap > -0.5 * size && gap < 0.45 * size;
}
