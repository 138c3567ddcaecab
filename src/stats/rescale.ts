import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Maybe } from './absence.ts';
import { refuseInfinite, refuseNonPositive } from './admissible.ts';
import { workedOut, type WorkedOut } from './interval-arithmetic.ts';

/** A ratio per so many units of what it was per one unit. */
export interface Rescaled extends WorkedOut {
  readonly ratio: number;
  readonly interval: Range;
}

/**
 * A ratio per unit as a ratio per `units` of them: each number to that power, limits
 * exchanged for a negative number of units, z and p unchanged. 1.1173 (1.0658 to
 * 1.1713) per year is 3.03 (1.89 to 4.86) per ten. From rounded numbers the answer is
 * rounded worse: 1.00 per gram says nothing per kilogram.
 */
export function rescaled(
  ratio: number,
  interval: Range,
  units: number,
  level: number,
): Maybe<Rescaled> {
  const { low, high } = interval;
  const refusal = refuseNonPositive({ ratio, 'lower limit': low, 'upper limit': high })
    ?? refuseInfinite({ units });
  if (refusal) return refusal;
  if (units === 0) return absence('a ratio per no units is always 1');
  const [one, other] = [low ** units, high ** units];
  const turned = { low: Math.min(one, other), high: Math.max(one, other) };
  const worked = workedOut('log', ratio ** units, turned, level);
  return isAbsence(worked) ? worked : { ...worked, ratio: ratio ** units, interval: turned };
}

/** The range of a printed ratio per so many units: its ends to that power. */
export function rescaledRange({ low, high }: Range, units: number): Maybe<Range> {
  const refusal = refuseNonPositive({ 'lower end': low, 'upper end': high })
    ?? refuseInfinite({ units });
  if (refusal) return refusal;
  const [one, other] = [low ** units, high ** units];
  return { low: Math.min(one, other), high: Math.max(one, other) };
}
