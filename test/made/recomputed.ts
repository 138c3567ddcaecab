import { recomputeTyped } from '../../src/cli/recompute/recompute-typed.ts';
import type { TypedOptions } from '../../src/cli/recompute/typed-options.ts';
import type { Range } from '../../src/model/index.ts';
import type { Recomputation, Worked } from '../../src/report/recomputation.ts';

/** The only answer to words that are typed with spaces between them. */
export async function answerTo(typed: string, options: TypedOptions = {}): Promise<Recomputation> {
  const all = await recomputeTyped(typed.split(' '), options);
  if (all.length !== 1) throw new Error(`${all.length} answers to ${typed}`);
  return all[0] as Recomputation;
}

/** One of the values worked out, by the label it stands under and its name. */
export function valueIn(answer: Recomputation, label: string, quantity: string): Worked {
  const found = answer.groups.filter((group) => group.label === label)
    .flatMap(({ values }) => values).find((value) => value.quantity === quantity);
  if (found === undefined) throw new Error(`there is no ${quantity} under ${label}`);
  return found;
}

/** The range of such a value. */
export function rangeIn(answer: Recomputation, label: string, quantity: string): Range {
  const { value } = valueIn(answer, label, quantity);
  if (value === undefined) throw new Error(`${quantity} has no value`);
  return value;
}

/** What can be typed, one example of every form; all have an answer. */
export const EXAMPLES: readonly (readonly [words: readonly string[], options: TypedOptions])[] = [
  [['ratio', '1.59', '1.05', '2.41'], { p: '0.03' }],
  [['HR', '0·72', '0·58–0·98'], { level: '95' }],
  [['OR', '1.59', '2.41', '1.05'], {}],
  [['OR', '14.0', '3.5', '122.2'], { p: '<0.001' }],
  [['OR', '-0.45', '-0.80', '-0.10'], {}],
  [['OR', '1.59'], { p: '0.03' }],
  [['RR', '0.97–1.05'], {}],
  [['MD', '17', '1.4', '32.6'], { p: '0.032' }],
  [['RD', '-5,2%', '-9,3%', '-1,1%'], {}],
  [['coefficient', '-0.46'], { se: '0.21', p: '0.5', z: '-2.19', wald: '4.8' }],
  [['coefficient', '0.46', '0.21'], { ratio: '1.58 (1.05-2.39)' }],
  [['coefficient', '0.46', '0.05', '0.87'], {}],
  [['counts', '45/120 (38.9%)', '30/118'], { printed: 'OR 1.76 (1.01–3.06)' }],
  [['counts', '0/20', '5/20'], {}],
  [['counts', '0/20'], {}],
  [['risk', '2.0', '1.2', '3.3'], { baseline: '20-40%' }],
  [['risk', '0.72'], { measure: 'HR', baseline: '0.3' }],
  [['risk', '3.1'], { measure: 'RR', baseline: '40%' }],
  [['compare', '0.67', '0.46', '0.98', 'with', '0.88', '0.71', '1.08'], {}],
  [['AUC', '0.78', '0.70', '0.86'], { events: '40', others: '120' }],
  [['t(18) = 2.10, p = 0.03'], {}],
  [['OR 1.59 (95% CI 1.05–2.41), p = 0.001'], {}],
];
