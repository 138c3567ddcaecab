import type { Range } from '../model/index.ts';
import { isAbsence, type Absence, type Maybe } from './absence.ts';
import {
  refuseCounts, refuseExcess, refuseLevel, refuseNonPositive,
} from './admissible.ts';
import { betaQuantile } from './beta-distribution.ts';
import { zOfUpperTail } from './normal.ts';

/*
 * Intervals for a proportion, on the scale 0 to 1, from a count and its total.
 * Packages differ in which they give by default, so a printed interval agrees if
 * any of them does. All assume independent individuals with one probability:
 * weighted and clustered samples have wider ones. Levels are in percent.
 */

/** Estimate ± multiplier × √(pq/n): 81 of 263 gives 0.2522 to 0.3638. May pass 0 or 1. */
export function waldInterval(events: number, total: number, level = 95): Maybe<Range> {
  return refuseProportion(events, total, level) ?? around(events / total, total, level);
}

/** Wilson's (1927) score interval: 81 of 263 gives 0.2553 to 0.3662. */
export function wilsonInterval(events: number, total: number, level = 95): Maybe<Range> {
  const refusal = refuseProportion(events, total, level);
  if (refusal) return refusal;
  const z = reach(level);
  const spread = z * Math.sqrt(z * z + 4 * events * (1 - events / total));
  return {
    low: events === 0 ? 0 : (2 * events + z * z - spread) / (2 * (total + z * z)),
    high: events === total ? 1 : (2 * events + z * z + spread) / (2 * (total + z * z)),
  };
}

/**
 * Wilson's interval with continuity correction: 81 of 263 gives 0.2535 to 0.3682.
 * Source: Newcombe (1998), method 4; R's prop.test gives it by default.
 */
export function wilsonCorrectedInterval(events: number, total: number, level = 95): Maybe<Range> {
  const refusal = refuseProportion(events, total, level);
  if (refusal) return refusal;
  const high = (count: number): number => {
    const z = reach(level);
    const inner = z * z + 2 - 1 / total + (4 * count * (total - count - 1)) / total;
    return (2 * count + z * z + 1 + z * Math.sqrt(inner)) / (2 * (total + z * z));
  };
  return {
    low: events === 0 ? 0 : 1 - high(total - events),
    high: events === total ? 1 : high(events),
  };
}

/** Wald's interval after adding z²/2 to each side (Agresti & Coull 1998): 0.2552 to 0.3663. */
export function agrestiCoullInterval(events: number, total: number, level = 95): Maybe<Range> {
  const refusal = refuseProportion(events, total, level);
  if (refusal) return refusal;
  const square = reach(level) ** 2;
  const raised = total + square;
  return around((events + square / 2) / raised, raised, level);
}

/**
 * The exact interval of Clopper & Pearson (1934): 81 of 263 gives 0.2527 to 0.3676,
 * 0 of 20 gives 0 to 0.1684.
 */
export function clopperPearsonInterval(events: number, total: number, level = 95): Maybe<Range> {
  const refusal = refuseProportion(events, total, level);
  if (refusal) return refusal;
  const outside = (100 - level) / 200;
  return betaRange(
    events === 0 ? 0 : betaQuantile(outside, events, total - events + 1),
    events === total ? 1 : betaQuantile(1 - outside, events + 1, total - events),
  );
}

/**
 * The equal-tailed interval with Jeffreys' prior: 81 of 263 gives 0.2545 to 0.3656.
 * Source: Brown, Cai & DasGupta (2001), who set the limit at 0 or n events to 0 or 1.
 */
export function jeffreysInterval(events: number, total: number, level = 95): Maybe<Range> {
  const refusal = refuseProportion(events, total, level);
  if (refusal) return refusal;
  const outside = (100 - level) / 200;
  const [a, b] = [events + 0.5, total - events + 0.5];
  return betaRange(
    events === 0 ? 0 : betaQuantile(outside, a, b),
    events === total ? 1 : betaQuantile(1 - outside, a, b),
  );
}

/**
 * The rule of three: with no events among n, the upper 95% limit is about 3/n. 0 of
 * 20 gives 0.15. Source: Hanley & Lippman-Hand (1983); one-sided, so that it lies
 * below Clopper & Pearson's two-sided limit of 0.168.
 */
export function ruleOfThree(total: number): Maybe<number> {
  return refuseCounts({ total }) ?? refuseNonPositive({ total }) ?? 3 / total;
}

/** The usual intervals by the names their methods go by. */
export type ProportionMethod =
  | 'Wald' | 'Wilson' | 'Wilson with continuity correction'
  | 'Agresti–Coull' | 'Clopper–Pearson' | 'Jeffreys';

/** Every interval of the above for one count, to hold a printed one against. */
export function proportionIntervals(
  events: number,
  total: number,
  level = 95,
): Maybe<ReadonlyMap<ProportionMethod, Range>> {
  const found = new Map<ProportionMethod, Range>();
  for (const [method, interval] of METHODS) {
    const range = interval(events, total, level);
    if (isAbsence(range)) return range;
    found.set(method, range);
  }
  return found;
}

const METHODS: readonly [ProportionMethod, typeof waldInterval][] = [
  ['Wald', waldInterval],
  ['Wilson', wilsonInterval],
  ['Wilson with continuity correction', wilsonCorrectedInterval],
  ['Agresti–Coull', agrestiCoullInterval],
  ['Clopper–Pearson', clopperPearsonInterval],
  ['Jeffreys', jeffreysInterval],
];

function refuseProportion(events: number, total: number, level: number): Absence | undefined {
  return refuseCounts({ events, total }) ?? refuseNonPositive({ total })
    ?? refuseExcess(events, total, 'a proportion') ?? refuseLevel(level);
}

function reach(level: number): number {
  return zOfUpperTail((100 - level) / 200);
}

function around(share: number, total: number, level: number): Range {
  const half = reach(level) * Math.sqrt((share * (1 - share)) / total);
  return { low: share - half, high: share + half };
}

function betaRange(low: Maybe<number>, high: Maybe<number>): Maybe<Range> {
  if (isAbsence(low)) return low;
  return isAbsence(high) ? high : { low, high };
}
