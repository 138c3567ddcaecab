import type { Rule } from '../src/authoring.ts';
import estimateInsideInterval from './estimate-inside-interval.ts';
import intervalAndSignificance from './interval-and-significance.ts';
import intervalSymmetry from './interval-symmetry.ts';
import limitsInOrder from './limits-in-order.ts';
import oddsRatioAsRisk from './odds-ratio-as-risk.ts';
import pFromInterval from './p-from-interval.ts';
import pValuePossible from './p-value-possible.ts';
import percentOfCount from './percent-of-count.ts';

/** Every rule of the house, from the plainest question to the finest. */
export const rules: readonly Rule[] = [
  limitsInOrder,
  estimateInsideInterval,
  intervalSymmetry,
  pFromInterval,
  intervalAndSignificance,
  pValuePossible,
  percentOfCount,
  oddsRatioAsRisk,
];
