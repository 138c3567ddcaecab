import { absence, type Absence, type Maybe } from './absence.ts';
import { refuseCounts } from './admissible.ts';

/** An area under the ROC curve from data, with DeLong's standard error. */
export interface AucFromData {
  readonly auc: number;
  readonly standardError: number;
}

/**
 * How many people gave each rating, from the lowest to the highest, among those without
 * the event (`controls`) and with it (`cases`).
 */
export interface RatingCounts {
  readonly controls: readonly number[];
  readonly cases: readonly number[];
}

/**
 * The area under the ROC curve of ratings, ties counting half, with the standard error
 * of DeLong, DeLong & Clarke-Pearson (1988). Hanley & McNeil's 109 patients, rated 1 to
 * 5, give 0.8932 with 0.0307. A continuous score is one whose counts are 0 and 1.
 */
export function aucOfRatings(ratings: RatingCounts): Maybe<AucFromData> {
  const refusal = refuseRatings(ratings);
  if (refusal) return refusal;
  const { cases, controls } = ratings;
  const ofCases = sharesBeaten(controls);
  const ofControls = sharesBeaten([...cases].reverse()).reverse();
  const auc = mean(ofCases, cases);
  const variance = spread(ofCases, cases, auc) + spread(ofControls, controls, auc);
  return { auc, standardError: Math.sqrt(variance) };
}

/** For each rating the share of the group that it beats, ties by half. */
function sharesBeaten(group: readonly number[]): number[] {
  const total = sum(group);
  let below = 0;
  return group.map((count) => {
    const share = (below + count / 2) / total;
    below += count;
    return share;
  });
}

function sum(counts: readonly number[]): number {
  return counts.reduce((so, count) => so + count, 0);
}

function mean(values: readonly number[], counts: readonly number[]): number {
  return values.reduce((so, value, i) => so + value * (counts[i] ?? 0), 0) / sum(counts);
}

/** The variance of the mean of the values. */
function spread(values: readonly number[], counts: readonly number[], centre: number): number {
  const total = sum(counts);
  const squares = values.reduce((so, value, i) => so + (value - centre) ** 2 * (counts[i] ?? 0), 0);
  return squares / (total - 1) / total;
}

function refuseRatings({ cases, controls }: RatingCounts): Absence | undefined {
  if (cases.length !== controls.length) return absence('the groups have different ratings');
  const refusal = [...cases, ...controls]
    .map((count) => refuseCounts({ count })).find((refused) => refused !== undefined);
  if (refusal) return refusal;
  const few = sum(cases) < 2 || sum(controls) < 2;
  return few ? absence('it takes two people in each group') : undefined;
}
