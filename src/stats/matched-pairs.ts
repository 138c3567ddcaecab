import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Maybe } from './absence.ts';
import { refuseCounts } from './admissible.ts';
import { chiSquareTest, type ChiSquareTest } from './chi-square-test.ts';
import { binomialTails } from './binomial.ts';
import { ratioFromLog, type EstimatedRatio } from './estimated.ts';
import { clopperPearsonInterval } from './proportion-interval.ts';

/**
 * The pairs that differ in a matched study: in `caseOnly` of them only the case (or
 * only the first of two measurements) was exposed, in `controlOnly` only the control.
 * Pairs that agree say nothing about the odds ratio.
 */
export interface DiscordantPairs {
  readonly caseOnly: number;
  readonly controlOnly: number;
}

/**
 * The odds ratio of matched pairs, b/c, with the interval of its log: 40 and 20
 * give 2.00 (1.17 to 3.42). It need not agree with the odds ratio of the unmatched
 * counts. Source: Kraus (1960); Breslow & Day (1980). Refused where either is 0.
 */
export function matchedOddsRatio(pairs: DiscordantPairs, level = 95): Maybe<EstimatedRatio> {
  const refusal = refusePairs(pairs);
  if (refusal) return refusal;
  const { caseOnly, controlOnly } = pairs;
  if (caseOnly === 0 || controlOnly === 0) return absence('no pairs of one kind differ');
  const logRatio = Math.log(caseOnly / controlOnly);
  return ratioFromLog(logRatio, Math.sqrt(1 / caseOnly + 1 / controlOnly), level);
}

/**
 * The exact interval of the matched odds ratio, from Clopper & Pearson's limits of
 * the share b/(b + c) turned into odds: 40 and 20 give 1.14 to 3.61. May reach 0 and ∞.
 */
export function exactMatchedInterval(pairs: DiscordantPairs, level = 95): Maybe<Range> {
  const refusal = refusePairs(pairs);
  if (refusal) return refusal;
  const { caseOnly, controlOnly } = pairs;
  const share = clopperPearsonInterval(caseOnly, caseOnly + controlOnly, level);
  if (isAbsence(share)) return share;
  return { low: share.low / (1 - share.low), high: share.high / (1 - share.high) };
}

/** McNemar's tests of matched pairs in their usual forms. */
export interface McNemarTests {
  readonly uncorrected: ChiSquareTest;
  /** With Edwards' (1948) continuity correction. */
  readonly corrected: ChiSquareTest;
  /** Twice the smaller binomial tail, at most 1. */
  readonly exactP: number;
  /** The exact p less the probability of the pairs seen (Fagerland et al. 2013). */
  readonly midP: number;
}

/**
 * McNemar's (1947) test: (b − c)²/(b + c) on one degree of freedom, and its kin.
 * 40 and 20 give χ² = 6.667, p = 0.0098; exact p = 0.0135.
 */
export function mcNemar(pairs: DiscordantPairs): Maybe<McNemarTests> {
  const refusal = refusePairs(pairs);
  if (refusal) return refusal;
  const { caseOnly, controlOnly } = pairs;
  const total = caseOnly + controlOnly;
  const smaller = binomialTails(Math.min(caseOnly, controlOnly), total, 0.5);
  if (isAbsence(smaller)) return smaller;
  const gap = Math.abs(caseOnly - controlOnly);
  return {
    uncorrected: chiSquareTest((gap * gap) / total, 1),
    corrected: chiSquareTest(Math.max(0, gap - 1) ** 2 / total, 1),
    exactP: Math.min(1, 2 * smaller.atMost),
    midP: gap === 0 ? 1 - smaller.exactly / 2 : 2 * smaller.atMost - smaller.exactly,
  };
}

function refusePairs(pairs: DiscordantPairs): ReturnType<typeof refuseCounts> {
  const refusal = refuseCounts({ ...pairs });
  if (refusal) return refusal;
  return pairs.caseOnly + pairs.controlOnly === 0 ? absence('no pairs differ') : undefined;
}
