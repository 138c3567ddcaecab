#!/usr/bin/env node
import { CommanderError } from 'commander';
import { COULD_NOT_RUN } from './exit-status.ts';
import { faultInWords } from './fault.ts';
import { programFor } from './program.ts';

/*
 * The command. The exit status is set and not forced, so that all that was
 * written reaches a slow reader before the process ends.
 */

process.stdout.on('error', endQuietly);
process.stderr.on('error', endQuietly);
process.on('uncaughtException', failed);
process.on('unhandledRejection', failed);

/** The built command and the built worker lie side by side. */
const here = import.meta.url;

const program = programFor(
  { process, workerAddress: new URL('worker.js', here) },
  (status) => {
    process.exitCode = status;
  },
);

try {
  if (process.argv.length === 2) program.outputHelp();
  else await program.parseAsync();
} catch (problem) {
  if (!(problem instanceof CommanderError)) failed(problem);
  else if (problem.exitCode !== 0) usageFailed(problem);
}

/** Whoever read the output has seen enough: `tallystick check paper.pdf | head`. */
function endQuietly(problem: NodeJS.ErrnoException): void {
  if (problem.code === 'EPIPE') process.exit();
  throw problem;
}

function failed(problem: unknown): void {
  process.stderr.write(`${faultInWords(problem)}\n`);
  process.exitCode = COULD_NOT_RUN;
}

function usageFailed({ code }: CommanderError): void {
  const [first = ''] = process.argv.slice(2);
  if (code === 'commander.unknownCommand' && /[./\\]/.test(first)) {
    process.stderr.write(`To check a file: tallystick check ${first}\n`);
  }
  process.exitCode = COULD_NOT_RUN;
}
