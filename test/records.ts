import { readFileSync } from 'node:fs';
import { expect } from 'vitest';
import { isAbsence, type Maybe } from '../src/stats/absence.ts';

/** How far an answer may be from what a record expects. */
interface Tolerance {
  readonly rel?: number;
  readonly abs?: number;
  readonly exact?: boolean;
  readonly [other: string]: unknown;
}

/** A check value: inputs, expected answers, tolerance, and where it is from. */
export interface CheckRecord {
  readonly id: string;
  readonly kind: string;
  /** They differ by kind, and the test of a kind knows its own. */
  readonly inputs: unknown;
  readonly expected: Readonly<Record<string, unknown>>;
  readonly tolerance: Tolerance;
  readonly source: string;
  readonly how: string;
}

/** The true value of a field, and why it is not the record's. */
interface Correction {
  readonly value: number;
  readonly because: string;
}

/** How the records of a kind are answered, and which fields are not, with the reason. */
export interface Answering {
  readonly answer: (record: CheckRecord) => Readonly<Record<string, unknown>>;
  /** Expected fields that nothing here can give, with why. */
  readonly unanswered?: Readonly<Record<string, string>>;
  /** Values of single records that three other tools contradict, with the true ones and why. */
  readonly corrected?: Readonly<Record<string, Correction>>;
  /** The relative tolerance of a field where the record has several. */
  readonly relative?: (field: string, tolerance: Tolerance) => number | undefined;
}

/** The records of one subject, `fixtures/reference/records-<subject>.json`. */
export function recordsOf(subject: string): readonly CheckRecord[] {
  const place = new URL(`../fixtures/reference/records-${subject}.json`, import.meta.url);
  return JSON.parse(readFileSync(place, 'utf8')) as readonly CheckRecord[];
}

/** The records of a subject by kind, in the order of the file. */
export function kindsOf(subject: string): readonly (readonly [string, readonly CheckRecord[]])[] {
  const kinds = new Map<string, CheckRecord[]>();
  for (const record of recordsOf(subject)) {
    kinds.set(record.kind, [...(kinds.get(record.kind) ?? []), record]);
  }
  return [...kinds];
}

/** An answer that must be there: an absence fails the test with its reason. */
export function given<Answer>(answer: Maybe<Answer>): Answer {
  if (isAbsence(answer)) throw new Error(`no answer, because ${answer.because}`);
  return answer;
}

/** Holds every expected field of a record against its answer. */
export function reproduce(record: CheckRecord, answering: Answering): void {
  const answers = answering.answer(record);
  for (const [field, wanted] of Object.entries(record.expected)) {
    if (answering.unanswered?.[field] !== undefined) continue;
    const relative = answering.relative?.(field, record.tolerance) ?? record.tolerance.rel ?? 0;
    const value = answering.corrected?.[`${record.id}: ${field}`]?.value ?? wanted;
    const tolerance = { ...record.tolerance, rel: relative };
    expectClose(answers[field], value, tolerance, `${record.id}: ${field}`);
  }
}

function expectClose(got: unknown, wanted: unknown, tolerance: Tolerance, where: string): void {
  if (Array.isArray(wanted)) {
    const list = asList(got);
    expect(list.length, `${where} is a list of ${wanted.length}`).toBe(wanted.length);
    wanted.forEach((value, i) => expectClose(list[i], value, tolerance, `${where}[${i}]`));
    return;
  }
  if (wanted === 'Inf') return expect(got, where).toBe(Infinity);
  if (typeof wanted !== 'number') return expect(got, where).toEqual(wanted);
  if (typeof got !== 'number') throw new Error(`${where} has the answer ${JSON.stringify(got)}`);
  const room = (tolerance.rel ?? 0) * Math.abs(wanted) + (tolerance.abs ?? 1e-13);
  const distance = Math.abs(got - wanted);
  expect(distance <= room, `${where}: ${got} for ${wanted}, ${distance} apart`).toBe(true);
}

/** A range as the pair that records have. */
function asList(value: unknown): readonly unknown[] {
  if (Array.isArray(value)) return value;
  if (typeof value === 'object' && value !== null && 'low' in value && 'high' in value) {
    return [value.low, value.high];
  }
  return [];
}
