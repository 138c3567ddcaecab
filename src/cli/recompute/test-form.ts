import type { Range, TestResult } from '../../model/index.ts';
import { resultInWords } from '../../report/result-in-words.ts';
import type { Recomputation } from '../../report/recomputation.ts';
import { probabilityInWords, valueInWords } from '../../report/worked-in-words.ts';
import { isAbsence } from '../../stats/absence.ts';
import { pOfStatistic } from '../../stats/p-of-statistic.ts';
import { meet } from '../../stats/ranges.ts';
import { probabilitiesBehind, relatedValues } from '../../stats/rounding.ts';
import { InputProblem } from './input-problem.ts';

/** A test statistic with its degrees of freedom: the p that it has, beside the printed one. */
export function recomputeTest(result: TestResult): Recomputation {
  const range = relatedValues(result.relation, result.estimate);
  const freedom = result.degreesOfFreedom.map(({ value }) => value);
  const p = pOfStatistic(result.statistic, range, freedom);
  if (isAbsence(p)) throw new InputProblem(`The statistic has no p-value: ${p.because}.`);
  const agrees = agreesWith(result, p);
  const understood = resultInWords(result);
  return {
    form: 'test',
    understood,
    outcome: agrees === undefined ? 'not compared' : agrees ? 'within rounding' : 'neither',
    answer: [answerOf(p, agrees)],
    groups: [{
      label: 'implied',
      values: [{ quantity: 'p', unit: 'probability', value: p, note: sidesOf(result) }],
    }],
    working: [`A statistic of ${valueInWords(range, 'number')}, which the printed one stands for, `
      + `has a p of ${probabilityInWords(p)} (${sidesOf(result)}).`],
    perhaps: agrees === false && halved(result, p)
      ? ['All numbers agree if the p is one-sided.'] : [],
    reservations: [],
    comment: agrees !== false ? '' : `For “${understood}”: the statistic and its degrees of `
      + `freedom give p ${probabilityInWords(p)}. Could the authors check the three?`,
    sources: ['The distribution of the statistic under no effect, as in tables of any textbook.'],
  };
}

function sidesOf({ statistic }: TestResult): string {
  return statistic === 'z' || statistic === 't' ? 'two-sided' : 'upper tail';
}

function agreesWith({ p }: TestResult, implied: Range): boolean | undefined {
  if (p === undefined) return undefined;
  const printed = probabilitiesBehind(p.relation, p.printed);
  return isAbsence(printed) ? undefined : meet(printed, implied);
}

function halved(result: TestResult, { low, high }: Range): boolean {
  const half = { low: low / 2, high: high / 2 };
  return sidesOf(result) === 'two-sided' && agreesWith(result, half) === true;
}

function answerOf(p: Range, agrees: boolean | undefined): string {
  const implied = `The statistic has p ${probabilityInWords(p)}`;
  if (agrees === undefined) return `${implied}.`;
  return agrees ? `${implied}: the printed p agrees.`
    : `${implied}, and the printed p is not among these, whatever the rounding.`;
}
