import type { Recomputation, Worked } from '../../report/recomputation.ts';
import { significant, valueInWords } from '../../report/worked-in-words.ts';
import { isAbsence } from '../../stats/absence.ts';
import { proportionIntervals, ruleOfThree } from '../../stats/proportion-interval.ts';
import { commentOn, countInWords, outcomeOf, percentsBeside } from './beside-counts.ts';
import { InputProblem } from './input-problem.ts';
import type { TypedCount } from './typed-count.ts';
import { USUAL_LEVEL } from './typed-result.ts';

/** One group by its events and total: its share, by every usual interval. */
export function recomputeProportion(count: TypedCount, level = USUAL_LEVEL): Recomputation {
  const { events, total } = count;
  const intervals = proportionIntervals(events, total, level);
  if (isAbsence(intervals)) {
    throw new InputProblem(`No interval can be given: ${intervals.because}.`);
  }
  const share = events / total;
  const value = { low: share, high: share };
  const understood = countInWords(count);
  const beside = percentsBeside([count]);
  return {
    form: 'proportion',
    understood,
    outcome: outcomeOf(beside),
    answer: [
      `${events} of ${total} is ${valueInWords(value, 'share')}.`,
      ...beside.map(({ sentence }) => sentence),
    ],
    groups: [{
      label: 'intervals',
      values: [...intervals].map(([quantity, limits]): Worked => ({
        quantity, unit: 'share', value, interval: { limits, level },
      })),
    }],
    working: workingOf(count, share, level, intervals.get('Wilson')),
    perhaps: [],
    reservations: [
      'A printed interval agrees if any of these gives it: programs differ in their choice. Near '
        + '0% and 100% Wald’s is poor and may pass them.',
      'People are taken to be independent: weighted and clustered samples have wider intervals.',
    ],
    comment: commentOn(understood, beside),
    sources: ['Newcombe 1998, Stat Med 17:857 (seven methods compared); Wilson 1927; Clopper & '
      + 'Pearson 1934; Agresti & Coull 1998; Brown, Cai & DasGupta 2001.'],
  };
}

function workingOf(
  { events, total }: TypedCount, share: number, level: number,
  wilson: { readonly low: number; readonly high: number } | undefined,
): readonly string[] {
  const three = events === 0 ? ruleOfThree(total) : undefined;
  return [
    `The proportion is ${events} / ${total} = ${significant(share, 4)}`
      + (wilson === undefined ? '.' : `, with a ${level}% interval of `
        + `${significant(wilson.low, 4)} to ${significant(wilson.high, 4)} by Wilson’s method.`),
    ...(three === undefined || isAbsence(three) ? []
      : [`With no events the upper limit is about 3 / ${total} = ${significant(three, 3)} (rule of `
        + 'three, Hanley & Lippman-Hand 1983).']),
  ];
}
