import { examine } from '../index.ts';
import type { Examination } from '../model/index.ts';
import { ReadError } from '../read/read-error.ts';
import { recognise } from '../read/recognise.ts';
import { harmless } from '../report/harmless.ts';
import type { Examiner } from './examiner.ts';
import { faultInWords } from './fault.ts';
import type { Form } from './form.ts';
import type { Output } from './output.ts';
import type { Source } from './source.ts';

/** What came of several files. */
export interface Outcome {
  readonly examinations: readonly Examination[];
  /** How many files could not be examined. */
  readonly unread: number;
}

/** What is needed to examine files and to report on them. */
export interface Desk {
  readonly examiner: Examiner;
  readonly form: Form;
  readonly output: Output;
  /** Says a sentence to the person at the terminal, apart from the report. */
  readonly say: (sentence: string) => void;
}

/**
 * Examines file after file and reports on each as it is done. A file that cannot
 * be examined is told of and does not keep the others from being reported.
 */
export async function examineFiles(sources: readonly Source[], desk: Desk): Promise<Outcome> {
  const examinations: Examination[] = [];
  for (const source of sources) {
    try {
      const examination = await examineOne(source, desk.examiner);
      examinations.push(examination);
      desk.output.write(desk.form.each(examination));
    } catch (problem) {
      desk.say(`${harmless(source.name)}: ${sentenceFor(problem)}`);
    }
  }
  const unread = sources.length - examinations.length;
  desk.output.write(desk.form.end(examinations, unread));
  return { examinations, unread };
}

/** Plain text is examined here and now; what needs a parser goes to the worker. */
async function examineOne({ name, bytes }: Source, examiner: Examiner): Promise<Examination> {
  const content = await bytes();
  const recognised = recognise(content, name);
  const isSimple = content.length === 0 || recognised.kind === 'other'
    || recognised.format === 'text';
  return isSimple ? examine(content, name) : examiner.examine(content, name);
}

function sentenceFor(problem: unknown): string {
  return problem instanceof ReadError ? harmless(problem.message) : faultInWords(problem);
}
