import type { Grade } from '../model/index.ts';
import { atLeast, type Screen } from '../report/index.ts';
import { examinerAt } from './examiner.ts';
import { examineFiles, type Outcome } from './examine-files.ts';
import { COULD_NOT_RUN, type ExitStatus, FLAGGED, NOTHING_FLAGGED } from './exit-status.ts';
import { checkForm, extractForm, type Form, type FormName } from './form.ts';
import { outputTo, outputToFile, refuseObstacle, WriteError } from './output.ts';
import { screenOf, screenOfFile, type Surroundings } from './screen-of.ts';
import { sourcesOf } from './source.ts';

/** The options that `check` and `extract` share. */
export interface ReportOptions {
  readonly as: FormName;
  readonly out?: string;
  readonly color: boolean;
  readonly plain: boolean;
  /** How long the reading of one file may take, in seconds. */
  readonly timeLimit: number;
}

/** The options of `check`. */
export interface CheckOptions extends ReportOptions {
  readonly quiet: boolean;
  /** The least serious grade that ends the command with exit status 1. */
  readonly failOn: Grade;
}

/** The command's surroundings: its streams, its environment, and its own files. */
export interface Shell {
  readonly process: NodeJS.Process;
  readonly workerAddress: URL;
}

/** `check`: reports the flagged lines of the files. */
export async function checkFiles(
  paths: readonly string[], options: CheckOptions, shell: Shell,
): Promise<ExitStatus> {
  const form = checkForm(options.as, screenFor(options, shell), options.quiet);
  const outcome = await reportOn(paths, form, options, shell);
  if (outcome === undefined || outcome.unread > 0) return COULD_NOT_RUN;
  const flags = outcome.examinations.flatMap(({ checked }) => checked.flags);
  return flags.some(({ grade }) => atLeast(grade, options.failOn)) ? FLAGGED : NOTHING_FLAGGED;
}

/** `extract`: lists every result of the files. */
export async function extractFiles(
  paths: readonly string[], options: ReportOptions, shell: Shell,
): Promise<ExitStatus> {
  const form = extractForm(options.as, screenFor(options, shell));
  const outcome = await reportOn(paths, form, options, shell);
  return outcome === undefined || outcome.unread > 0 ? COULD_NOT_RUN : NOTHING_FLAGGED;
}

function screenFor(options: ReportOptions, { process }: Shell): Screen {
  return options.out === undefined ? screenOf(surroundings(process), options)
    : screenOfFile(options);
}

/** What is known of the terminal that standard output may be. */
export function surroundings({ stdout, env, platform }: NodeJS.Process): Surroundings {
  return {
    columns: stdout.columns as number | undefined,
    isTerminal: stdout.isTTY === true,
    colourDepth: stdout.isTTY === true ? stdout.getColorDepth() : 1,
    environment: env,
    platform,
  };
}

/** The outcome; undefined where the report could not be put where it should go. */
async function reportOn(
  paths: readonly string[], form: Form, options: ReportOptions, { process, workerAddress }: Shell,
): Promise<Outcome | undefined> {
  const say = (sentence: string): void => {
    process.stderr.write(`${sentence}\n`);
  };
  const { out, timeLimit } = options;
  const examiner = examinerAt(workerAddress, { seconds: timeLimit, megabytes: MEGABYTES });
  try {
    if (out !== undefined) await refuseObstacle(out, paths);
    const output = out === undefined ? outputTo(process.stdout) : outputToFile(out);
    const sources = sourcesOf(paths, { stream: process.stdin, hint: say });
    const outcome = await examineFiles(sources, { examiner, form, output, say });
    if (outcome.examinations.length > 0) await output.finish();
    return outcome;
  } catch (problem) {
    if (!(problem instanceof WriteError)) throw problem;
    say(problem.message);
    return undefined;
  } finally {
    await examiner.close();
  }
}

/** The memory that the worker may take for one file. */
const MEGABYTES = 1536;
