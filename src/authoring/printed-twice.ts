import type { Interval, Printed, RatioResult, Reading, Result } from '../model/index.ts';
import { samePrint } from './same-print.ts';
import { type Zone, zoneOf } from './sections.ts';

/** A ratio with all of its three numbers, and the kind of place it is printed in. */
export interface FullRatio {
  readonly result: RatioResult;
  readonly estimate: Printed;
  readonly interval: Interval;
  readonly zone: Zone;
}

/** One of the three numbers of a ratio with its interval. */
export type Member = 'estimate' | 'lower' | 'upper';

const MEMBERS: readonly Member[] = ['estimate', 'lower', 'upper'];

/** All ratios printed with an interval, in reading order, but for those that may be others' own. */
export function fullRatios(reading: Reading): readonly FullRatio[] {
  return reading.findings.results.flatMap((result) => {
    const full = fullRatio(reading, result);
    return full === undefined || full.zone === 'aside' ? [] : [full];
  });
}

function fullRatio(reading: Reading, result: Result): FullRatio | undefined {
  if (result.kind !== 'ratio') return undefined;
  const { estimate, interval } = result;
  if (estimate === undefined || interval === undefined) return undefined;
  return { result, estimate, interval, zone: zoneOf(reading, result) };
}

/** The printed number that a member names. */
export function memberOf({ estimate, interval }: FullRatio, member: Member): Printed {
  return member === 'estimate' ? estimate : interval[member];
}

/** Which of the three numbers two ratios print alike, as far as rounding goes. */
export function membersAlike(one: FullRatio, other: FullRatio): readonly Member[] {
  return MEMBERS.filter((member) => samePrint(memberOf(one, member), memberOf(other, member)));
}

/** Looks up the ratios that share at least two numbers with the given one. */
export type Lookup = (one: FullRatio) => readonly FullRatio[];

/** Numbers within 5% of each other share a drawer or lie in neighbouring ones. */
const DRAWERS = 20;

/** More ratios than this in one drawer tell none apart; it also bounds the work. */
const MOST = 40;

/**
 * Lays all ratios in drawers by estimate and by lower limit, so that finding those which
 * share two of three numbers with one (then at least one of these two) needs no search.
 */
export function drawersOf(ratios: readonly FullRatio[]): Lookup {
  const drawers = new Map<string, FullRatio[]>();
  for (const ratio of ratios) {
    for (const key of [keyOf(ratio, 'estimate', 0), keyOf(ratio, 'lower', 0)]) {
      const drawer = drawers.get(key) ?? [];
      if (drawer.length < MOST) drawer.push(ratio);
      drawers.set(key, drawer);
    }
  }
  return (one) => {
    const near = [-1, 0, 1].flatMap((step) => [
      ...(drawers.get(keyOf(one, 'estimate', step)) ?? []),
      ...(drawers.get(keyOf(one, 'lower', step)) ?? []),
    ]);
    return [...new Set(near)]
      .filter((other) => other.result !== one.result && membersAlike(one, other).length >= 2);
  };
}

function keyOf(ratio: FullRatio, member: Member, step: number): string {
  const { value } = memberOf(ratio, member);
  const drawer = value > 0 ? Math.round(Math.log(value) * DRAWERS) : 'zero or below';
  return `${member} ${typeof drawer === 'number' ? drawer + step : drawer}`;
}
