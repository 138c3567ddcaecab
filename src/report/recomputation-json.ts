import type { Range } from '../model/index.ts';
import { harmlessJson } from './harmless.ts';
import type {
  Recomputation, RecomputationForm, RecomputationOutcome, Worked,
} from './recomputation.ts';

/*
 * The contract of `recompute --as json`: an array with one object per result that was typed
 * in. Every field is always there; what is absent is null. Fields are added, never renamed.
 */

/** One result that was typed in, recomputed, for a program. */
export interface RecomputationJson {
  readonly form: RecomputationForm;
  /** The numbers as they were understood. */
  readonly understood: string;
  readonly outcome: RecomputationOutcome;
  readonly answer: readonly string[];
  readonly values: readonly WorkedJson[];
  readonly working: readonly string[];
  readonly perhaps: readonly string[];
  readonly reservations: readonly string[];
  /** A question to the authors, or null. */
  readonly comment: string | null;
  readonly sources: readonly string[];
}

/** A value that was worked out, in full precision. */
export interface WorkedJson {
  /** The label under which it stands: "together". */
  readonly group: string;
  readonly quantity: string;
  readonly method: string | null;
  /** `share` is on the scale 0 to 1, `percent` on that of 0 to 100, `probability` is a p-value. */
  readonly unit: Worked['unit'];
  /** The ends of the range, equal where it is exact; null for an end that is infinite. */
  readonly low: number | null;
  readonly high: number | null;
  /** Limits of confidence, where there are some, and their level in percent. */
  readonly lower: number | null;
  readonly upper: number | null;
  readonly level: number | null;
  readonly note: string | null;
}

/** The text of `recompute --as json`. */
export function recomputationsJson(all: readonly Recomputation[]): string {
  return `${harmlessJson(JSON.stringify(all.map(asJson), null, 2))}\n`;
}

function asJson(one: Recomputation): RecomputationJson {
  return {
    form: one.form,
    understood: one.understood,
    outcome: one.outcome,
    answer: one.answer,
    values: one.groups.flatMap(({ label, values }) =>
      values.map((value) => workedJson(label, value))),
    working: one.working,
    perhaps: one.perhaps,
    reservations: one.reservations,
    comment: one.comment === '' ? null : one.comment,
    sources: one.sources,
  };
}

function workedJson(group: string, worked: Worked): WorkedJson {
  const { quantity, method, unit, value, interval, note } = worked;
  return {
    group,
    quantity,
    method: method ?? null,
    unit,
    ...endsOf(value),
    lower: finite(interval?.limits.low),
    upper: finite(interval?.limits.high),
    level: interval?.level ?? null,
    note: note ?? null,
  };
}

function endsOf(range: Range | undefined): { low: number | null; high: number | null } {
  return { low: finite(range?.low), high: finite(range?.high) };
}

function finite(value: number | undefined): number | null {
  return value !== undefined && Number.isFinite(value) ? value : null;
}
