/**
 * What a function of stats answers where there is no number to give: a reason,
 * never NaN. "a level of 30% is not between 50 and 100" is such a reason.
 */
export interface Absence {
  readonly kind: 'absence';
  /** Why there is no answer, as a clause that follows "there is no answer, because". */
  readonly because: string;
}

/** An answer, or the reason why there is none. */
export type Maybe<Answer> = Answer | Absence;

/** The absence of an answer, for the given reason. */
export function absence(because: string): Absence {
  return { kind: 'absence', because };
}

/** Whether there is a reason in place of an answer. */
export function isAbsence(answer: unknown): answer is Absence {
  return typeof answer === 'object' && answer !== null && 'kind' in answer
    && answer.kind === 'absence';
}
