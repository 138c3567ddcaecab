import { absence, type Maybe } from './absence.ts';
import { refuseCounts, refuseExcess, refuseNonPositive } from './admissible.ts';
import { chiSquareTest, type ChiSquareTest } from './chi-square-test.ts';

/** A group of similar predicted risk: its size, its events, and the sum of predicted risks. */
export interface RiskGroup {
  readonly total: number;
  readonly events: number;
  readonly expected: number;
}

/**
 * The Hosmer–Lemeshow statistic: the sum over groups of (O − E)²/(E (1 − E/n)), on two
 * degrees of freedom fewer than groups, or on all of them for data the model has not
 * seen. A large p is no evidence of misfit; a small one is evidence of it, never of fit.
 *
 * Source: Hosmer & Lemeshow (1980). It depends on how the groups were cut, and grows
 * with the sample.
 */
export function hosmerLemeshow(
  groups: readonly RiskGroup[],
  data: 'fitted' | 'external' = 'fitted',
): Maybe<ChiSquareTest> {
  if (groups.length < 3) return absence('it takes at least 3 groups');
  for (const { total, events, expected } of groups) {
    const refusal = refuseCounts({ total, events }) ?? refuseExcess(events, total, 'a group')
      ?? refuseNonPositive({ expected, 'expected non-events': total - expected });
    if (refusal) return refusal;
  }
  const statistic = groups.reduce((so, { total, events, expected }) =>
    so + (events - expected) ** 2 / (expected * (1 - expected / total)), 0);
  return chiSquareTest(statistic, data === 'fitted' ? groups.length - 2 : groups.length);
}
