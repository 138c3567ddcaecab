import type { Flag, Grade } from '../model/index.ts';
import { counted, listed } from './numbers-in-words.ts';

/** The grades, the most serious first. */
export const GRADES: readonly Grade[] = ['contradiction', 'discrepancy', 'caution'];

/** Whether `grade` is at least as serious as `least`: a contradiction is, whatever `least` is. */
export function atLeast(grade: Grade, least: Grade): boolean {
  return GRADES.indexOf(grade) <= GRADES.indexOf(least);
}

/** How many flags there are of each grade. */
export function countGrades(flags: readonly Flag[]): Readonly<Record<Grade, number>> {
  const counts = { contradiction: 0, discrepancy: 0, caution: 0 };
  for (const { grade } of flags) counts[grade] += 1;
  return counts;
}

const PLURALS: Readonly<Record<Grade, string>> = {
  contradiction: 'contradictions', discrepancy: 'discrepancies', caution: 'cautions',
};

/** "2 contradictions and 1 caution"; "" for none. */
export function gradesInWords(counts: Readonly<Record<Grade, number>>): string {
  return listed(GRADES.flatMap((grade) =>
    counts[grade] === 0 ? [] : [counted(counts[grade], grade, PLURALS[grade])]));
}
