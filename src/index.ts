import { check } from './check/index.ts';
import { extract } from './extract/index.ts';
import type { Examination, Manuscript } from './model/index.ts';
import { type ReadOptions, readManuscript, readText } from './read/index.ts';
import * as report from './report/index.ts';
import { isAbsence } from './stats/absence.ts';
import { multiplier } from './stats/normal.ts';
import { rules } from '../rules/index.ts';

/*
 * The library's front door: a manuscript goes in, an examination comes out, and
 * a report of it. Nothing here touches files, the network or the terminal.
 */

export type * from './model/index.ts';
export { describePlace, placeOf, quote } from './model/index.ts';
export { type PdfHost, ReadError, type ReadOptions } from './read/index.ts';
export type {
  CheckedFileJson, CountJson, FileJson, FlagJson, PlaceJson, ResultJson, Screen, TableJson,
} from './report/index.ts';
export { rules };

/**
 * Reads a manuscript from a file's bytes, finds its results and what is said of
 * them, and puts every rule to them. Throws `ReadError`, whose message says what
 * to do next, where the file cannot be read.
 *
 *     const { checked } = await examine(await readFile('paper.pdf'), 'paper.pdf');
 */
export async function examine(
  bytes: Uint8Array, name: string, options: ReadOptions = {},
): Promise<Examination> {
  return examineManuscript(await readManuscript(bytes, name, options));
}

/** Examines pasted text: `await examineText('OR 1.59 (95% CI 1.05–2.41), p = 0.03')`. */
export async function examineText(text: string, name = 'pasted text'): Promise<Examination> {
  return examineManuscript(readText(text, name));
}

async function examineManuscript(manuscript: Manuscript): Promise<Examination> {
  const findings = await extract(manuscript);
  return { manuscript, findings, checked: check(manuscript, findings, rules) };
}

/** What `extract --as json` prints: every result of every file. */
export function extractJson(examinations: readonly Examination[]): string {
  return report.extractJson(examinations, multiplierOf);
}

/** What `check --as json` prints: every result and every flag of every file. */
export function checkJson(examinations: readonly Examination[]): string {
  return report.checkJson(examinations, multiplierOf);
}

/** The report as text for a screen of so many columns, without colours where none are given. */
export function terminalReport(
  examinations: readonly Examination[], screen: Partial<report.Screen> = {},
): string {
  return report.terminalReport(examinations, {
    screen: { columns: 80, colours: 0, unicode: true, drawings: true, ...screen },
    rules,
    quiet: false,
  });
}

function multiplierOf(level: number): number | undefined {
  const found = multiplier(level);
  return isAbsence(found) ? undefined : found;
}
