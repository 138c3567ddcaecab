import { InputProblem } from './input-problem.ts';

/** What can be asked for by its own word; a result pasted whole needs none. */
export type TypedForm =
  | 'ratio' | 'difference' | 'coefficient' | 'counts' | 'risk' | 'compare' | 'discrimination'
  | 'text';

/** The measures that may be named, each with the form in which its numbers are typed. */
const MEASURES: Readonly<Record<string, 'ratio' | 'difference' | 'discrimination'>> = {
  OR: 'ratio', HR: 'ratio', RR: 'ratio', IRR: 'ratio', PR: 'ratio', SMR: 'ratio', SIR: 'ratio',
  SHR: 'ratio', csHR: 'ratio', POR: 'ratio', DOR: 'ratio', ROR: 'ratio', GMR: 'ratio',
  RD: 'difference', MD: 'difference', SMD: 'difference', AUC: 'discrimination', C: 'discrimination',
};

const WORDS: Readonly<Record<string, Exclude<TypedForm, 'text'>>> = {
  ratio: 'ratio', difference: 'difference', coefficient: 'coefficient', beta: 'coefficient',
  β: 'coefficient', counts: 'counts', count: 'counts', proportion: 'counts', risk: 'risk',
  compare: 'compare', discrimination: 'discrimination',
};

/** What the first typed word asks for, and the words that are left. */
export interface Asked {
  readonly form: TypedForm;
  readonly words: readonly string[];
  /** The measure, where the first word names one: "OR", also for "aOR". */
  readonly measure?: string;
}

/** Reads the first word as the name of a form or a measure; else all of it is a pasted text. */
export function asked(words: readonly string[]): Asked {
  const [first = '', ...rest] = words;
  const form = Object.hasOwn(WORDS, first.toLowerCase()) ? WORDS[first.toLowerCase()] : undefined;
  if (form !== undefined) return { form, words: rest };
  const measure = measureCalled(first);
  const measured = measure === undefined ? undefined : MEASURES[measure];
  if (measure === undefined || measured === undefined) return { form: 'text', words };
  return { form: measured, words: rest, measure };
}

/** The measure by its abbreviation in any case, with a or c for adjusted and crude: "aHR". */
function measureCalled(word: string): string | undefined {
  const bare = word.replace(/^[ac](?=[A-Z]{2})/, '').toLowerCase();
  return Object.keys(MEASURES).find((name) => name.toLowerCase() === bare
    || name.toLowerCase() === word.toLowerCase());
}

/** The measure that was named with --measure, which must go with the form. */
export function measureFor(form: TypedForm, name: string): string {
  const fitting = form === 'difference' ? 'difference' : 'ratio';
  const measure = measureCalled(name);
  if (measure !== undefined && MEASURES[measure] === fitting) return measure;
  const known = Object.keys(MEASURES).filter((one) => MEASURES[one] === fitting);
  throw new InputProblem(`--measure ${name} is none of a ${fitting}: name one of `
    + `${known.join(', ')}.`);
}
