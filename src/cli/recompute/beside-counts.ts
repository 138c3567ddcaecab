import type { RecomputationOutcome } from '../../report/recomputation.ts';
import { significant } from '../../report/worked-in-words.ts';
import { isAbsence } from '../../stats/absence.ts';
import { type CrudeMatch, matchesOfCounts } from '../../stats/crude-ratio.ts';
import { percentOfCount } from '../../stats/percent-of-count.ts';
import type { TwoByTwo } from '../../stats/two-by-two.ts';
import { InputProblem } from './input-problem.ts';
import type { TypedCount } from './typed-count.ts';
import { numberInWords, type TypedResult } from './typed-result.ts';

/** How a number that is printed beside counts stands to them. */
export interface Beside {
  readonly outcome: Exclude<RecomputationOutcome, 'cannot tell' | 'not compared'>;
  readonly sentence: string;
}

/** A count as it is read: "45 of 120", "45 of 120 (37.5%)". */
export function countInWords({ events, total, percent }: TypedCount): string {
  const share = percent === undefined ? '' : ` (${numberInWords(percent)})`;
  return `${events} of ${total}${share}`;
}

/** The worst outcome of all that is printed beside the counts. */
export function outcomeOf(all: readonly Beside[]): RecomputationOutcome {
  const order = ['neither', 'within another standard method', 'within rounding'] as const;
  return order.find((outcome) => all.some((one) => one.outcome === outcome)) ?? 'not compared';
}

/** A question to the authors where something does not follow from the counts. */
export function commentOn(understood: string, all: readonly Beside[]): string {
  const open = all.filter(({ outcome }) => outcome === 'neither');
  if (open.length === 0) return '';
  const said = open.map(({ sentence }) => sentence).join(' ');
  return `On “${understood}”: ${said} Could the authors check the counts, or say of whom the other `
    + 'numbers are?';
}

/** Whether printed percentages follow from their counts. */
export function percentsBeside(groups: readonly TypedCount[]): readonly Beside[] {
  return groups.flatMap(({ events, total, percent }): readonly Beside[] => {
    if (percent === undefined) return [];
    const found = percentOfCount(events, total, percent);
    if (isAbsence(found)) return [];
    const said = `${events} of ${total} is ${significant(found.percent, 4)}%, and `
      + `${numberInWords(percent)} is printed`;
    switch (found.verdict) {
      case 'agrees': return [{ outcome: 'within rounding', sentence: `${said}: they agree.` }];
      case 'cut off': return [{
        outcome: 'within rounding',
        sentence: `${said}: its digits were cut off instead of rounded.`,
      }];
      case 'differs': return [{
        outcome: 'neither',
        sentence: `${said}: they do not agree, unless it is a percentage of another total.`,
      }];
      default: return found.verdict satisfies never;
    }
  });
}

/** Which methods give back a printed crude ratio with its limits. */
export function ratioBeside(
  table: TwoByTwo, printed: TypedResult | undefined, usualLevel: number,
): readonly Beside[] {
  if (printed === undefined) return [];
  const { name, estimate, lower, upper, level = usualLevel } = printed;
  if ((name !== 'OR' && name !== 'RR') || estimate === undefined) {
    throw new InputProblem('Only an odds or a risk ratio can be held against counts: type it with '
      + 'its measure, such as --printed "OR 1.76 (1.01 to 3.06)".');
  }
  const limits = lower === undefined || upper === undefined ? {} : { lower, upper };
  const found = matchesOfCounts(name, table, { estimate, ...limits }, level);
  return [matched(found, name, numberInWords(estimate))];
}

function matched(
  found: readonly CrudeMatch[], measure: 'OR' | 'RR', estimate: string,
): Beside {
  const whole = found.filter((match) => match.estimate && match.lower && match.upper);
  if (whole.length > 0) {
    const byWald = whole.some(({ crude }) => crude.method === 'Wald');
    return {
      outcome: byWald ? 'within rounding' : 'within another standard method',
      sentence: `The printed ${measure} follows from the counts (${namesOf(whole, measure)}).`,
    };
  }
  const estimates = found.filter((match) => match.estimate);
  return {
    outcome: 'neither',
    sentence: estimates.length > 0
      ? `The printed ${measure} ${estimate} follows from the counts `
        + `(${namesOf(estimates, measure)}), but its limits do not by any usual method.`
      : `No usual method gives the printed ${measure} ${estimate} from these counts; an adjusted, `
        + 'matched or weighted one need not follow from them.',
  };
}

function namesOf(matches: readonly CrudeMatch[], measure: 'OR' | 'RR'): string {
  return matches
    .map(({ crude }) => (crude.method === 'Wald' ? waldName(measure) : crude.method)).join(', ');
}

/** What Wald's method is called for each ratio. */
export function waldName(measure: 'OR' | 'RR'): string {
  return measure === 'OR' ? 'Woolf' : 'Katz';
}
