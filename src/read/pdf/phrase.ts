import type { Run } from './run.ts';

/**
 * Runs that stand close together on one baseline: a line of a paragraph, or one
 * cell of a table's row. Wide gaps part phrases.
 */
export interface Phrase {
  readonly runs: readonly Run[];
  readonly left: number;
  readonly right: number;
  readonly baseline: number;
  /** The size of most of its characters, in points. */
  readonly size: number;
  /** The font of most of its characters. */
  readonly font: string;
  readonly length: number;
}

/** Phrases on one baseline, from left to right. */
export type Row = readonly Phrase[];

/** Gaps wider than this, in ems, part phrases: no word space is as wide in well-set text. */
const WIDE = 1.05;

/** Baselines nearer than this, in ems, are one row. */
const LEVEL = 0.28;

/** Sorts runs into rows by their baselines; each row from left to right. */
export function rowsOf<
  Item extends { readonly baseline: number; readonly size: number; readonly left: number },
>(items: readonly Item[]): readonly (readonly Item[])[] {
  const rows: Item[][] = [];
  let reference: Item | undefined;
  for (const item of [...items].sort((a, b) => a.baseline - b.baseline)) {
    const level =
      reference !== undefined &&
      item.baseline - reference.baseline <= LEVEL * Math.min(item.size, reference.size);
    if (level) rows.at(-1)?.push(item);
    else {
      rows.push([item]);
      reference = item;
    }
  }
  return rows.map((row) => row.sort((a, b) => a.left - b.left));
}

/** Joins the runs of each row into phrases. */
export function phrasesOf(runs: readonly Run[]): readonly Phrase[] {
  return rowsOf(runs).flatMap((row) => {
    const groups: Run[][] = [];
    for (const run of row) {
      const group = groups.at(-1);
      if (group !== undefined && isNear(group, run)) group.push(run);
      else groups.push([run]);
    }
    return groups.map(phraseOf);
  });
}

function isNear(group: readonly Run[], run: Run): boolean {
  const last = group.at(-1) as Run;
  const right = Math.max(...group.slice(-4).map((before) => before.right));
  return run.left - right <= WIDE * Math.max(last.size, run.size);
}

/** A phrase of runs on one baseline, which must be in order and at least one. */
export function phraseOf(runs: readonly Run[]): Phrase {
  const main = mainRun(runs);
  return {
    runs,
    left: Math.min(...runs.map(({ left }) => left)),
    right: Math.max(...runs.map(({ right }) => right)),
    baseline: main.baseline,
    size: main.size,
    font: main.font,
    length: runs.reduce((sum, { text }) => sum + text.length, 0),
  };
}

/** The longest run that is no mark speaks for the whole. */
function mainRun(runs: readonly Run[]): Run {
  const plain = runs.filter(({ mark }) => mark === undefined);
  return (plain.length > 0 ? plain : runs).reduce((best, run) =>
    run.text.length > best.text.length ? run : best,
  );
}

/** Whether blank space stands between two runs of a phrase. */
export function isSpaced(before: Run, after: Run): boolean {
  const gap = after.left - before.right;
  const size = Math.min(before.size, after.size);
  if (gap > 0.18 * size) return true;
  return after.spaced && after.order > before.order && gap > 0.05 * size;
}

/** The words of a phrase as they will stand in the text. */
export function wordsOf(runs: readonly Run[]): string {
  let words = '';
  for (const [i, run] of runs.entries()) {
    const before = runs[i - 1];
    words += before !== undefined && isSpaced(before, run) ? ` ${run.text}` : run.text;
  }
  return words;
}
