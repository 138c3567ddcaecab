import type { Recomputation } from '../../report/recomputation.ts';
import { recomputeCoefficient } from './coefficient-form.ts';
import { recomputeComparison } from './compare-form.ts';
import { comparedIn } from './compared.ts';
import { recomputeCounts } from './counts-form.ts';
import { recomputeDiscrimination } from './discrimination-form.ts';
import { InputProblem, quoted } from './input-problem.ts';
import { recomputeInterval } from './interval-form.ts';
import { recomputeProportion } from './proportion-form.ts';
import { baselinesOf, recomputeRisk } from './risk-form.ts';
import { countsIn } from './typed-count.ts';
import { type Asked, asked, measureFor } from './typed-form.ts';
import { countOf, levelOf, pValueOf } from './typed-number.ts';
import { refuseStrangers, type TypedOptions } from './typed-options.ts';
import { type Said, typedResult } from './typed-result.ts';

/** More than any result takes, with its sentence. */
const LONGEST_TEXT = 4000;

/**
 * Everything that follows from the words typed behind `recompute`: one answer for each result.
 * Throws an `InputProblem`, whose message says what to do, where they make no sense.
 */
export async function recomputeTyped(
  words: readonly string[], options: TypedOptions,
): Promise<readonly Recomputation[]> {
  refuseMistyped(words);
  const question = atBaseline(asked(words), options);
  refuseStrangers(question.form, options);
  if (question.words.join('').trim() === '') {
    throw new InputProblem('No numbers are typed: see the examples with tallystick recompute '
      + '--help.');
  }
  if (question.form !== 'text') return [await recomputeForm(question, options)];
  const { recomputePasted } = await import('./pasted.ts');
  return recomputePasted(words.join(' '), options, saidBy(question, options));
}

/** A ratio that is typed with a baseline risk is to be seen as risks. */
function atBaseline(question: Asked, { baseline }: TypedOptions): Asked {
  return question.form === 'ratio' && baseline !== undefined
    ? { ...question, form: 'risk' } : question;
}

function refuseMistyped(words: readonly string[]): void {
  const strange = words.find((word) => /^--?[a-z]/i.test(word));
  if (strange !== undefined) {
    throw new InputProblem(`There is no option ${quoted(strange)}: see tallystick recompute `
      + '--help.');
  }
  if (words.join(' ').length > LONGEST_TEXT) {
    throw new InputProblem('This is a longer text than a result: let tallystick check read it.');
  }
}

/** What the options and the first word say of the result. */
function saidBy({ form, measure }: Asked, options: TypedOptions): Said {
  const named = options.measure === undefined ? measure : measureFor(form, options.measure);
  return {
    ...(options.level === undefined ? {} : { level: levelOf(options.level) }),
    ...(options.p === undefined ? {} : { p: pValueOf(options.p, options.oneSided === true) }),
    ...(named === undefined ? {} : { measure: named }),
  };
}

async function recomputeForm(question: Asked, options: TypedOptions): Promise<Recomputation> {
  const { form, words } = question;
  const said = saidBy(question, options);
  switch (form) {
    case 'ratio':
    case 'difference': return recomputeInterval(oneSided(
      await typedResult(words, form, form, said), options), form);
    case 'coefficient': return typedCoefficient(words, said, options);
    case 'counts': return typedCounts(words, said, options);
    case 'risk': return recomputeRisk({
      result: await typedResult(words, 'OR', 'ratio', said),
      baselines: baselinesOf(options.baseline),
      crude: options.crude === true,
    });
    case 'compare': return recomputeComparison(...await comparedIn(words, said));
    case 'discrimination': return recomputeDiscrimination({
      result: await typedResult(words, 'AUC', 'discrimination', said),
      ...sizesOf(options),
    });
    case 'text': throw new InputProblem('A text has no form of its own.');
    default: return form satisfies never;
  }
}

/** --one-sided goes also with a p that the pasted words hold. */
export function oneSided<Result extends { readonly p?: Said['p'] }>(
  result: Result, options: TypedOptions,
): Result {
  if (options.oneSided !== true) return result;
  if (result.p === undefined) {
    throw new InputProblem('--one-sided speaks of a p-value, and none is typed: add --p 0.03.');
  }
  return { ...result, p: { ...result.p, oneSided: true } };
}

/** The sizes of the two groups behind an area under the curve, as far as they are typed. */
export function sizesOf(
  { events, others }: TypedOptions,
): { readonly events?: number; readonly others?: number } {
  return {
    ...(events === undefined ? {} : { events: countOf('number with the event', events) }),
    ...(others === undefined ? {} : { others: countOf('number without the event', others) }),
  };
}

async function typedCoefficient(
  words: readonly string[], said: Said, options: TypedOptions,
): Promise<Recomputation> {
  const { coefficientFrom } = await import('./typed-coefficient.ts');
  return recomputeCoefficient(await coefficientFrom(words, said, options));
}

async function typedCounts(
  words: readonly string[], said: Said, { printed }: TypedOptions,
): Promise<Recomputation> {
  const [one, other, more] = countsIn(words);
  if (one === undefined || more !== undefined) {
    throw new InputProblem(`${one === undefined ? 'No counts were' : 'More than two counts were'} `
      + `recognised in ${quoted(words.join(' '))}: type the events and all people of each group, `
      + 'such as 45/120 30/118.');
  }
  if (other === undefined) {
    if (printed === undefined) return recomputeProportion(one, said.level);
    throw new InputProblem('A ratio follows from two groups, and one is typed: add the other, such '
      + 'as 45/120 30/118.');
  }
  const beside = printed === undefined ? undefined
    : await typedResult(printed.split(/\s+/), 'ratio', 'ratio', {});
  return recomputeCounts({
    groups: [one, other],
    ...(said.level === undefined ? {} : { level: said.level }),
    ...(beside === undefined ? {} : { printed: beside }),
  });
}

