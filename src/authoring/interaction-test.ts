import type { Range, RatioResult } from '../model/index.ts';
import { isAbsence } from '../stats/absence.ts';
import { interactionOfRanges, type LogRatioRanges } from '../stats/interaction.ts';
import { agreementOf } from './arithmetic.ts';

/** How two printed ratios differ: the ratio of the first to the second, and the test of it. */
export interface PrintedInteraction {
  readonly ratio: Range;
  /** Two-sided. */
  readonly p: Range;
}

/**
 * The test that two printed ratios of groups without members in common are the same, from
 * their limits (Altman & Bland 2003): 0.67 (0.46 to 0.98) and 0.88 (0.71 to 1.08) give a
 * ratio of ratios of about 0.76 and p between 0.19 and 0.25. Nothing where one has no
 * interval, or numbers that do not stand together.
 */
export function interactionOfPrinted(
  one: RatioResult,
  other: RatioResult,
): PrintedInteraction | undefined {
  const [first, second] = [rangesOf(one), rangesOf(other)];
  if (first === undefined || second === undefined) return undefined;
  const found = interactionOfRanges(first, second);
  return isAbsence(found) ? undefined : { ratio: found.ratio, p: found.p };
}

function rangesOf({ estimate, interval }: RatioResult): LogRatioRanges | undefined {
  if (estimate === undefined || interval === undefined) return undefined;
  const found = agreementOf(estimate, interval, 'binary');
  return 'implied' in found ? found.implied : undefined;
}
