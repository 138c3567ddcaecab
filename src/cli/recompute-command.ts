import { recomputationList } from '../report/recomputation-list.ts';
import { recomputationsJson } from '../report/recomputation-json.ts';
import { COULD_NOT_RUN, type ExitStatus, NOTHING_FLAGGED } from './exit-status.ts';
import { InputProblem } from './recompute/input-problem.ts';
import { recomputeTyped } from './recompute/recompute-typed.ts';
import type { TypedOptions } from './recompute/typed-options.ts';
import { type Shell, surroundings } from './report-command.ts';
import { screenOf } from './screen-of.ts';

/** The options of `recompute`: what is typed beside the numbers, and how the answer looks. */
export interface RecomputeOptions extends TypedOptions {
  readonly as: 'terminal' | 'json';
  readonly color: boolean;
  readonly plain: boolean;
}

/** `recompute`: what follows from numbers typed in, or from a result pasted whole. */
export async function recompute(
  words: readonly string[], options: RecomputeOptions, { process }: Shell,
): Promise<ExitStatus> {
  try {
    const typed = words.length === 1 && words[0] === '-' ? [await pasted(process)] : words;
    const answers = await recomputeTyped(typed, options);
    process.stdout.write(options.as === 'json' ? recomputationsJson(answers)
      : recomputationList(answers, screenOf(surroundings(process), options)));
    return NOTHING_FLAGGED;
  } catch (problem) {
    if (!(problem instanceof InputProblem)) throw problem;
    process.stderr.write(`${problem.message}\n`);
    return COULD_NOT_RUN;
  }
}

/** A result from standard input, where brackets and < need no quotation marks. */
async function pasted({ stdin, stderr }: NodeJS.Process): Promise<string> {
  if (stdin.isTTY) stderr.write('Paste the result, press Enter, then Ctrl-D (Windows: Ctrl-Z).\n');
  const parts: Buffer[] = [];
  let size = 0;
  for await (const part of stdin) {
    parts.push(Buffer.from(part as Buffer));
    size += (part as Buffer).length;
    if (size > MOST_BYTES) break;
  }
  return Buffer.concat(parts).toString('utf8').trim();
}

/** Enough to see that it is too much. */
const MOST_BYTES = 100_000;
