import { rowsOf } from './phrase.ts';
import type { Run } from './run.ts';

/** A number printed in the margin, beside the line with the same baseline. */
export interface PrintedNumber {
  readonly number: number;
  readonly baseline: number;
}

/** A file of rising numbers in one margin of a page, from top to bottom. */
export interface NumberFile {
  readonly left: number;
  readonly right: number;
  /** By how much they rise: 1 beside every line, 5 beside every fifth. */
  readonly step: number;
  readonly numbers: readonly PrintedNumber[];
}

/** A page's runs without the numbers of its margins, and those numbers. */
export interface Numbered {
  readonly runs: readonly Run[];
  readonly files: readonly NumberFile[];
}

interface Candidate {
  readonly files: readonly NumberFile[];
  readonly taken: ReadonlySet<Run>;
}

/**
 * Tells the line numbers of the margin from the text, on all pages together.
 * They rise evenly down the page in a strip that no text enters, and do so on
 * most pages; a table's rising first column or a numbered list does neither.
 */
export function withoutPrintedNumbers(pages: readonly (readonly Run[])[]): readonly Numbered[] {
  const candidates = pages.map(candidateOn);
  const written = pages.filter((runs) => runs.length >= 20).length;
  const numbered = candidates.filter(({ files }) => files.length > 0).length;
  const real = numbered > 0 && numbered >= written * 0.5;
  return pages.map((runs, i) => {
    const candidate = candidates[i];
    if (!real || candidate === undefined) return { runs, files: [] };
    return { runs: runs.filter((run) => !candidate.taken.has(run)), files: candidate.files };
  });
}

function candidateOn(runs: readonly Run[]): Candidate {
  const lone = loneNumbers(runs);
  const taken = new Set<Run>();
  const files: NumberFile[] = [];
  for (const edge of ['right', 'left'] as const) {
    for (const strip of strips(
      lone.filter((run) => !taken.has(run)),
      edge,
    )) {
      const file = fileOf(strip, runs);
      if (file === undefined) continue;
      files.push(file);
      for (const run of strip) taken.add(run);
    }
  }
  return { files, taken };
}

/** Whole numbers with white space on both sides. */
function loneNumbers(runs: readonly Run[]): readonly Run[] {
  return rowsOf(runs).flatMap((row) =>
    row.filter((run, i) => {
      if (!/^\d{1,5}$/.test(run.text)) return false;
      const before = row[i - 1];
      const after = row[i + 1];
      const free = (gap: number): boolean => gap > 0.4 * run.size;
      return (
        (before === undefined || free(run.left - before.right)) &&
        (after === undefined || free(after.left - run.right))
      );
    }),
  );
}

/** How far numbers of one file may stand apart at their common edge, in points. */
const EDGE = 2.5;
const FEWEST = 4;

function strips(lone: readonly Run[], edge: 'left' | 'right'): readonly (readonly Run[])[] {
  const groups: Run[][] = [];
  for (const run of [...lone].sort((a, b) => a[edge] - b[edge])) {
    const group = groups.at(-1);
    if (group !== undefined && run[edge] - (group.at(-1) as Run)[edge] < EDGE) group.push(run);
    else groups.push([run]);
  }
  return groups.filter(({ length }) => length >= FEWEST);
}

function fileOf(strip: readonly Run[], runs: readonly Run[]): NumberFile | undefined {
  const sorted = [...strip].sort((a, b) => a.baseline - b.baseline);
  const numbers = sorted.map(({ text, baseline }) => ({ number: Number(text), baseline }));
  const step = stepOf(numbers);
  const left = Math.min(...strip.map((run) => run.left));
  const right = Math.max(...strip.map((run) => run.right));
  if (step === undefined || entered(runs, strip, left, right)) return undefined;
  return { left, right, step, numbers };
}

/** The even step by which numbers rise, if nearly all do; they may begin again once. */
function stepOf(numbers: readonly PrintedNumber[]): number | undefined {
  const steps = numbers
    .slice(1)
    .map(({ number }, i) => number - (numbers[i] as PrintedNumber).number);
  for (const step of [1, 5, 2, 10]) {
    if (steps.filter((own) => own === step).length >= steps.length * 0.85) return step;
  }
  return undefined;
}

/** Whether text stands in the strip of the numbers, or beside few of the lines there is one. */
function entered(
  runs: readonly Run[],
  strip: readonly Run[],
  left: number,
  right: number,
): boolean {
  const own = new Set(strip);
  const top = Math.min(...strip.map(({ baseline }) => baseline)) - 2;
  const bottom = Math.max(...strip.map(({ baseline }) => baseline)) + 2;
  const within = runs.filter(
    (run) => run.baseline >= top && run.baseline <= bottom && !own.has(run),
  );
  const inside = within.filter((run) => run.left < right && run.right > left).length;
  return inside > strip.length * 0.05;
}

/**
 * The number of a line at `baseline`, or undefined where none is printed for it.
 * Between the numbers of a file that counts by fives, lines are counted on by
 * their distance, which is even.
 */
export function numberAt(
  { numbers, step }: NumberFile,
  baseline: number,
  size: number,
): number | undefined {
  const own = numbers.find((printed) => Math.abs(printed.baseline - baseline) < 0.45 * size);
  if (own !== undefined || step === 1) return own?.number;
  const after = numbers.findIndex((printed) => printed.baseline > baseline);
  const from = after === -1 ? numbers.length - 2 : Math.max(0, after - 1);
  const [above, below] = [numbers[from], numbers[from + 1]];
  if (above === undefined || below === undefined) return undefined;
  const pitch = (below.baseline - above.baseline) / (below.number - above.number);
  const number = above.number + Math.round((baseline - above.baseline) / pitch);
  return number > 0 ? number : undefined;
}
