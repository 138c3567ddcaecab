import type { Range } from '../model/index.ts';
import { isAbsence, type Maybe } from './absence.ts';
import type { EstimatedRatio } from './estimated.ts';
import { exactOddsRatio } from './exact-odds-ratio.ts';
import { oddsRatio, oddsRatioHalfAdded } from './odds-ratio.ts';
import { includes } from './ranges.ts';
import { riskRatio, riskRatioHalfAdded } from './risk-ratio.ts';
import { unrounded, type PrintedValue } from './rounding.ts';
import { scoreIntervalOfOddsRatio, scoreIntervalOfRiskRatio } from './score-interval.ts';
import type { TwoByTwo } from './two-by-two.ts';

/** One method's crude ratio of a 2×2 table. */
export interface CrudeRatio {
  readonly method: 'Wald' | 'one half added' | 'score' | 'exact' | 'mid-P';
  readonly ratio: number;
  readonly interval: Range;
}

/**
 * The crude odds or risk ratios that the usual methods give for one table, the usual
 * one first; those that the table leaves without an answer are missing. Wald is Woolf's
 * for odds ratios and Katz's for risk ratios. Exact ones are conditional.
 */
export function crudeRatios(
  measure: 'OR' | 'RR',
  table: TwoByTwo,
  level = 95,
): readonly CrudeRatio[] {
  const odds = measure === 'OR';
  const wald = odds ? oddsRatio(table, level) : riskRatio(table, level);
  const half = odds ? oddsRatioHalfAdded(table, level) : riskRatioHalfAdded(table, level);
  const scored = odds ? scoreIntervalOfOddsRatio : scoreIntervalOfRiskRatio;
  const score = scored(table, level);
  return [
    ...named('Wald', wald),
    ...named('one half added', half),
    ...(isAbsence(wald) || isAbsence(score)
      ? [] : [{ method: 'score' as const, ratio: wald.ratio, interval: score }]),
    ...(odds ? conditional(table, level) : []),
  ];
}

/** A ratio with its limits as printed; limits may be missing. */
export interface PrintedRatio {
  readonly estimate: PrintedValue;
  readonly lower?: PrintedValue;
  readonly upper?: PrintedValue;
}

/** Which of the printed numbers a method gives back. */
export interface CrudeMatch {
  readonly crude: CrudeRatio;
  readonly estimate: boolean;
  readonly lower: boolean;
  readonly upper: boolean;
}

/**
 * Holds a printed crude ratio against the counts beside it, by every usual method: 266,
 * 19, 68 and 47 give 9.676 (5.333 to 17.556) to the last digit by Wald's. A number that
 * is not printed counts as given back. An adjusted, matched or weighted ratio need not
 * follow from counts at all.
 */
export function matchesOfCounts(
  measure: 'OR' | 'RR',
  table: TwoByTwo,
  printed: PrintedRatio,
  level = 95,
): readonly CrudeMatch[] {
  return crudeRatios(measure, table, level).map((crude) => ({
    crude,
    estimate: givesBack(printed.estimate, crude.ratio),
    lower: givesBack(printed.lower, crude.interval.low),
    upper: givesBack(printed.upper, crude.interval.high),
  }));
}

function givesBack(printed: PrintedValue | undefined, value: number): boolean {
  if (printed === undefined) return true;
  return !Number.isNaN(printed.value) && includes(unrounded(printed), value);
}

function named(method: CrudeRatio['method'], found: Maybe<EstimatedRatio>): readonly CrudeRatio[] {
  return isAbsence(found) ? [] : [{ method, ratio: found.ratio, interval: found.interval }];
}

function conditional(table: TwoByTwo, level: number): readonly CrudeRatio[] {
  const found = exactOddsRatio(table, level);
  if (isAbsence(found)) return [];
  return [
    { method: 'exact', ratio: found.conditional, interval: found.exact },
    { method: 'mid-P', ratio: found.conditional, interval: found.midP },
  ];
}
