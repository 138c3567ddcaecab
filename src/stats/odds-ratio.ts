import { absence, isAbsence, type Maybe } from './absence.ts';
import { ratioFromLog, type EstimatedRatio } from './estimated.ts';
import { halfAdded, refuseTable } from './cells.ts';
import type { TwoByTwo } from './two-by-two.ts';

/**
 * The crude odds ratio with Woolf's interval: log odds ratio ± multiplier × √(1/a +
 * 1/b + 1/c + 1/d). Doll & Hill's men give 14.04 (3.33 to 59.30).
 *
 * Source: Woolf (1955). It is also Wald's interval of a logistic regression on
 * the exposure alone. An empty cell leaves no odds ratio or no standard error, and
 * is refused; `oddsRatioHalfAdded` and `exactOddsRatio` answer there.
 */
export function oddsRatio(table: TwoByTwo, level = 95): Maybe<EstimatedRatio> {
  const refusal = refuseTable(table);
  if (refusal) return refusal;
  if (Object.values(table).includes(0)) return absence('a cell of the table is empty');
  return woolf(table, level);
}

/**
 * The odds ratio with one half added to all four cells, and its interval; it
 * exists for any table. 10 of 10 against 0 of 10 gives 441 (7.98 to 24373).
 * Source: Haldane (1956), Anscombe (1956); it is Firth's (1993) penalised estimate.
 */
export function oddsRatioHalfAdded(table: TwoByTwo, level = 95): Maybe<EstimatedRatio> {
  const refusal = refuseTable(table);
  return refusal ?? woolf(halfAdded(table), level);
}

/** The odds ratio itself where only one side is empty: 0 or ∞; absent where it is 0/0. */
export function sampleOddsRatio(table: TwoByTwo): Maybe<number> {
  const refusal = refuseTable(table);
  if (refusal) return refusal;
  const { exposedEvents: a, exposedNonEvents: b } = table;
  const { unexposedEvents: c, unexposedNonEvents: d } = table;
  const ratio = (a * d) / (b * c);
  return Number.isNaN(ratio) ? absence('the odds ratio is 0/0') : ratio;
}

function woolf(table: TwoByTwo, level: number): Maybe<EstimatedRatio> {
  const { exposedEvents: a, exposedNonEvents: b } = table;
  const { unexposedEvents: c, unexposedNonEvents: d } = table;
  const standardError = Math.sqrt(1 / a + 1 / b + 1 / c + 1 / d);
  const estimated = ratioFromLog(Math.log(a / b) - Math.log(c / d), standardError, level);
  return isAbsence(estimated) ? estimated : { ...estimated, ratio: (a * d) / (b * c) };
}
