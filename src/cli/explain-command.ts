import { ruleCard, ruleList } from '../report/index.ts';
import { rules } from '../../rules/index.ts';
import { COULD_NOT_RUN, type ExitStatus, NOTHING_FLAGGED } from './exit-status.ts';
import { type Shell, surroundings } from './report-command.ts';
import { screenOf } from './screen-of.ts';

/** `explain`: a rule's card, or the list of rules. */
export function explain(
  name: string | undefined,
  options: { readonly color: boolean; readonly plain: boolean },
  { process }: Shell,
): ExitStatus {
  const screen = screenOf(surroundings(process), options);
  if (name === undefined) {
    process.stdout.write(ruleList(rules, screen));
    return NOTHING_FLAGGED;
  }
  const rule = rules.find(({ id }) => id === name.toLowerCase());
  if (rule === undefined) {
    process.stderr.write(`There is no rule ${JSON.stringify(name)}. ${closest(name)}\n`);
    return COULD_NOT_RUN;
  }
  process.stdout.write(ruleCard(rule, screen));
  return NOTHING_FLAGGED;
}

/** The rules whose names share a word with what was typed, or how to see them all. */
function closest(name: string): string {
  const typed = name.toLowerCase().split(/[^a-z]+/).filter((word) => word.length > 2);
  const near = rules.filter(({ id }) => typed.some((word) => id.includes(word)));
  if (near.length === 0) return 'The list of rules: tallystick explain';
  return `Near to it: ${near.map(({ id }) => id).join(', ')}.`;
}
