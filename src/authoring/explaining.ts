import type { Interval, Printed, PValue } from '../model/index.ts';
import type { Contrast } from '../stats/contrast.ts';
import { type Explanation, explanations } from '../stats/explanation.ts';
import { explanationSentence, NAMES } from '../stats/explanation-sentence.ts';
import { type Repair, repairs } from '../stats/repair.ts';
import { type ReportedNumbers, usualReading } from '../stats/reported-numbers.ts';
import { reportedNumbers } from './arithmetic.ts';

/** The explanations as a reviewer would think of them, the likeliest first. */
const ORDER: readonly Explanation['kind'][] = [
  'reference switched',
  'one-sided p',
  'two-sided p',
  'other test',
  'natural scale',
  'log scale',
  'other level',
  'adjusted p',
  'other rounding',
  't distribution',
  'asymmetric interval',
];

/** Ratios come from models with at least so many degrees of freedom, or t plays no part. */
const FEWEST_DEGREES = 10;

/** More single slips than this explain anything, and so nothing. */
const TOO_MANY_SLIPS = 15;

/** So many slips are named; they are examples of what to look for, and none is "the" correction. */
const SLIPS_NAMED = 3;

/** What is printed of a ratio, as far as it is to be explained. */
interface Disagreeing {
  readonly estimate: Printed | undefined;
  readonly interval: Interval;
  /** The p, where it is what disagrees. */
  readonly p?: PValue | undefined;
  /** The p, where it does not disagree itself but tells which of the others does. */
  readonly witness?: PValue | undefined;
}

/**
 * What would reconcile the printed numbers of a ratio, in sentences, likeliest first: one
 * other assumption each, and slips of a single digit, of which several often do.
 */
export function explanationsInWords(
  { estimate, interval, p, witness }: Disagreeing,
  contrast: Contrast,
): readonly string[] {
  const numbers = reportedNumbers(estimate, interval, p);
  const found = explanationsInOrder(explanations(numbers, usualReading(numbers, 'log'), contrast))
    .filter((explanation) => isPlausible(explanation, p !== undefined));
  const lopsided = found.filter(({ kind }) => kind === 'asymmetric interval');
  const others = found.filter(({ kind }) => kind !== 'asymmetric interval');
  const tellsApart = witness?.tests === 'result' ? witness : undefined;
  return [
    ...others.map(explanationSentence),
    ...slipsIn(reportedNumbers(estimate, interval, p ?? tellsApart), numbers),
    ...lopsided.map(explanationSentence),
  ];
}

/** Explanations as a reviewer would think of them, likeliest first, without far-fetched ones. */
export function explanationsInOrder(found: readonly Explanation[]): readonly Explanation[] {
  return found
    .filter((explanation) =>
      explanation.kind !== 't distribution' || explanation.most >= FEWEST_DEGREES)
    .toSorted((one, other) => ORDER.indexOf(one.kind) - ORDER.indexOf(other.kind));
}

/** The slips that fit all numbers, the witness included; without it where none does. */
function slipsIn(all: ReportedNumbers, without: ReportedNumbers): readonly string[] {
  const found = [all, without]
    .map((numbers) => likelySlipsInWords(repairs(numbers, usualReading(numbers, 'log'))));
  return found.find((sentences) => sentences.length > 0) ?? [];
}

/** Single slips in a sentence, the first few by name; none where too many would do. */
export function likelySlipsInWords(found: readonly Repair[]): readonly string[] {
  const slips = found.filter(isLikely);
  return slips.length > 0 && slips.length <= TOO_MANY_SLIPS ? [slipsInWords(slips)] : [];
}

/**
 * Logarithms are below zero for half of all ratios, so that limits-in-order meets them first.
 * A lopsided interval explains limits, and not a p that differs from them.
 */
function isPlausible(explanation: Explanation, withP: boolean): boolean {
  if (explanation.kind === 'asymmetric interval') return !withP;
  return explanation.kind !== 'log scale';
}

/** A slip seldom changes how many decimals a number has, and no p-value is exactly zero. */
function isLikely({ of, slip, printed, instead }: Repair): boolean {
  if (of === 'p') return Number(instead) > 0 && slip !== 'digit lost';
  return slip === 'limits swapped' || slip === 'point moved'
    || decimalsOf(printed) === decimalsOf(instead);
}

function decimalsOf(plain: string): number {
  return plain.split('.')[1]?.length ?? 0;
}

function slipsInWords(slips: readonly Repair[]): string {
  const named = slips.slice(0, SLIPS_NAMED)
    .map(({ of, slip, instead }) =>
      `the ${slip === 'limits swapped' ? 'limits' : NAMES[of]} ${instead} (${slip})`);
  const more = slips.length > named.length ? ', among others' : '';
  return `One slip would explain it, for instance ${named.join(', or ')}${more}.`;
}
