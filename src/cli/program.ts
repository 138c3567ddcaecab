import { Command, InvalidArgumentError, Option } from 'commander';
import type { Grade } from '../model/index.ts';
import type { ExitStatus } from './exit-status.ts';
import type { FormName } from './form.ts';
import { CHECK_HELP, EXPLAIN_HELP, EXTRACT_HELP, PROGRAM_HELP } from './help-text.ts';
import { addRecompute } from './recompute-line.ts';
import type { CheckOptions, ReportOptions, Shell } from './report-command.ts';
import { version } from './version.ts';

/** Receives the exit status of the command that ran. */
export type Finish = (status: ExitStatus) => void;

/**
 * The command line: what may be typed and what it calls. What a command needs is
 * loaded when it runs, so that `--version` and `--help` load next to nothing.
 */
export function programFor(shell: Shell, finish: Finish): Command {
  const program = new Command('tallystick')
    .description('Reads manuscripts, recomputes what their odds ratios, hazard ratios and kin '
      + 'allow, and reports the lines that do not tally.')
    .version(version, '-V, --version', 'print the version')
    .helpOption('-h, --help', 'print this help')
    .helpCommand(false)
    .addHelpText('after', PROGRAM_HELP)
    .configureHelp({ helpWidth: 80 })
    .exitOverride()
    .configureOutput({ outputError: (message, write) => write(asSentence(message)) });
  addCheck(program, shell, finish);
  addExtract(program, shell, finish);
  addRecompute(program, shell, finish);
  addExplain(program, shell, finish);
  return program;
}

/** The library's "error: unknown option '--x'\n(Did you mean --y?)" as sentences of ours. */
function asSentence(message: string): string {
  const [first = '', ...rest] = message.replace(/^error: /, '').trim().split('\n');
  const sentence = `${first.charAt(0).toUpperCase()}${first.slice(1).replace(/\.$/, '')}.`;
  return `${[sentence, ...rest].join(' ')}\nHelp: tallystick --help\n`;
}

const FILES = 'PDF or plain text; - or none reads standard input';

function addCheck(program: Command, shell: Shell, finish: Finish): void {
  withReportOptions(program.command('check'))
    .description('report what does not tally')
    .argument('[files...]', FILES)
    .option('--quiet', 'only the flags: nothing on what was read or could not be judged')
    .addOption(new Option('--fail-on <grade>', 'the least grade that ends with status 1')
      .choices(['contradiction', 'discrepancy', 'caution'] satisfies Grade[])
      .default('discrepancy'))
    .addHelpText('after', CHECK_HELP)
    .action(async (files: string[], options: CheckOptions) => {
      const { checkFiles } = await import('./report-command.ts');
      finish(await checkFiles(files, withFlags(options), shell));
    });
}

function addExtract(program: Command, shell: Shell, finish: Finish): void {
  withReportOptions(program.command('extract'))
    .description('list every result, flagged or not')
    .argument('[files...]', FILES)
    .addHelpText('after', EXTRACT_HELP)
    .action(async (files: string[], options: ReportOptions) => {
      const { extractFiles } = await import('./report-command.ts');
      finish(await extractFiles(files, withFlags(options), shell));
    });
}

function addExplain(program: Command, shell: Shell, finish: Finish): void {
  program.command('explain')
    .description("show a rule's card, or the list of rules")
    .argument('[rule]', 'the name of a rule, as reports print it')
    .option('--no-color', 'no colours')
    .option('--plain', 'labels as words of the sentence, for a screen reader')
    .addHelpText('after', EXPLAIN_HELP)
    .action(async (rule: string | undefined, options: { color: boolean; plain: boolean }) => {
      const { explain } = await import('./explain-command.ts');
      finish(explain(rule, withFlags(options), shell));
    });
}

/** Options that are there when given, as false when not: help need not print that. */
function withFlags<Options extends object>(
  options: Options,
): { readonly quiet: boolean; readonly plain: boolean } & Options {
  return { quiet: false, plain: false, ...options };
}

function withReportOptions(command: Command): Command {
  return command
    .addOption(new Option('--as <form>', 'terminal or json').argParser(formNamed)
      .default('terminal'))
    .option('--out <path>', 'write the report to this file')
    .option('--no-color', 'no colours; so does the variable NO_COLOR')
    .option('--plain', 'nothing drawn, labels as words: for a screen reader')
    .addOption(new Option('--time-limit <seconds>', 'for reading one file').argParser(seconds)
      .default(120));
}

function formNamed(name: string): FormName {
  if (name === 'terminal' || name === 'json') return name;
  throw new InvalidArgumentError('This version writes terminal and json.');
}

function seconds(typed: string): number {
  const value = Number(typed);
  if (value > 0 && value <= 86_400) return value;
  throw new InvalidArgumentError('It is a number of seconds, such as 300.');
}
