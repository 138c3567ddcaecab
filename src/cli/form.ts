import { checkJson, extractJson, rules } from '../index.ts';
import type { Examination } from '../model/index.ts';
import { closing, fileReport, resultsList, type Screen } from '../report/index.ts';

/** The forms in which `check` and `extract` can answer so far. */
export const FORMS = ['terminal', 'json'] as const;

/** One of the forms in which `check` and `extract` can answer. */
export type FormName = (typeof FORMS)[number];

/** A report in parts: what is written after each file, and what when all are done. */
export interface Form {
  readonly each: (examination: Examination) => string;
  readonly end: (all: readonly Examination[], unread: number) => string;
}

/** The report of `check` in the form asked for. */
export function checkForm(as: FormName, screen: Screen, quiet: boolean): Form {
  const options = { screen, rules, quiet };
  switch (as) {
    case 'terminal': return {
      each: (examination) => spaced(fileReport(examination, options)),
      end: (all, unread) => closing(all, unread, options),
    };
    case 'json': return { each: () => '', end: checkJson };
    default: return as satisfies never;
  }
}

/** The list of `extract` in the form asked for. */
export function extractForm(as: FormName, screen: Screen): Form {
  switch (as) {
    case 'terminal': return {
      each: (examination) => spaced(resultsList(examination, screen)),
      end: () => '',
    };
    case 'json': return { each: () => '', end: extractJson };
    default: return as satisfies never;
  }
}

function spaced(text: string): string {
  return text === '' ? '' : `${text}\n`;
}
