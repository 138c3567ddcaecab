import { type Command, InvalidArgumentError, Option } from 'commander';
import { RECOMPUTE_HELP } from './help-text.ts';
import type { Finish } from './program.ts';
import type { RecomputeOptions } from './recompute-command.ts';
import type { Shell } from './report-command.ts';

/**
 * What may be typed behind `recompute`. Unknown options are let through, since a negative
 * number looks like one; what is really none is told of by the command.
 */
export function addRecompute(program: Command, shell: Shell, finish: Finish): void {
  program.command('recompute')
    .description('what follows from numbers typed in')
    .usage('[form] numbers... [options]')
    .argument('[numbers...]', 'as printed, behind a form; or a whole result in quotation marks; '
      + '- reads one from standard input')
    .option('--measure <name>', 'OR, HR, RR, … or RD, MD, SMD')
    .option('--level <percent>', 'of the interval; 95 where none is typed')
    .option('--p <p>', 'the printed p-value, such as 0.03 or "<0.001"')
    .option('--one-sided', 'the p-value is one-sided')
    .option('--se <number>', 'standard error of a coefficient')
    .option('--z <number>', 'coefficient over standard error, as printed')
    .option('--wald <number>', 'the square of that, as printed')
    .option('--ratio <numbers>', 'exp(b) as printed beside a coefficient, with limits or without')
    .option('--printed <ratio>', 'an OR or RR as printed beside counts')
    .option('--baseline <risk>', 'risk of the unexposed: 30%, or two, 20-40%')
    .option('--crude', 'the ratio that meets a baseline risk is not adjusted')
    .option('--events <count>', 'people with the event, behind an area under the curve')
    .option('--others <count>', 'people without it')
    .addOption(new Option('--as <form>', 'terminal or json').argParser(formNamed)
      .default('terminal'))
    .option('--no-color', 'no colours; so does the variable NO_COLOR')
    .option('--plain', 'labels as words of the sentence, for a screen reader')
    .allowUnknownOption()
    .addHelpText('after', RECOMPUTE_HELP)
    .action(async (numbers: string[], options: RecomputeOptions) => {
      const { recompute } = await import('./recompute-command.ts');
      finish(await recompute(numbers, { ...options, plain: options.plain === true }, shell));
    });
}

function formNamed(name: string): RecomputeOptions['as'] {
  if (name === 'terminal' || name === 'json') return name;
  throw new InvalidArgumentError('recompute writes terminal and json.');
}
