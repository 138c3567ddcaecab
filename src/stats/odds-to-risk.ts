import type { Range } from '../model/index.ts';
import { absence, isAbsence, type Absence, type Maybe } from './absence.ts';
import { refuseClosedShares, refuseNonPositive } from './admissible.ts';
import { spreadOverCorners } from './spread.ts';

/** Why a risk ratio that was worked out from an odds ratio may not be taken at its word. */
export interface Reservation {
  readonly kind: 'adjusted' | 'limits' | 'baseline' | 'design';
  readonly because: string;
  readonly source: string;
}

/**
 * What is wrong with turning an odds ratio into a risk ratio, by what the odds ratio
 * is. A crude ratio at its own group's risk is exact and has no reservation.
 */
export function reservationsAbout(
  odds: { readonly adjusted: boolean; readonly withLimits: boolean },
): readonly Reservation[] {
  return RESERVATIONS.filter(({ kind }) => {
    if (kind === 'adjusted') return odds.adjusted;
    return kind === 'limits' ? odds.adjusted && odds.withLimits : true;
  });
}

const RESERVATIONS: readonly Reservation[] = [
  {
    kind: 'adjusted',
    because: 'an adjusted odds ratio holds within levels of the covariates, and one baseline risk '
      + 'cannot stand for all of them: the risk ratio is biased where there is confounding',
    source: 'McNutt et al. 2003, Am J Epidemiol 157:940',
  },
  {
    kind: 'limits',
    because: 'limits turned with a fixed baseline risk leave out its uncertainty: too narrow',
    source: 'McNutt et al. 2003, Am J Epidemiol 157:940',
  },
  {
    kind: 'baseline',
    because: 'the answer depends on the baseline risk, so a range of them should be tried',
    source: 'Grant 2014, BMJ 348:f7450',
  },
  {
    kind: 'design',
    because: 'in a case-control study the odds ratio may already estimate a rate or risk ratio, '
      + 'depending on how controls were sampled',
    source: 'Knol, Vandenbroucke, Scott & Egger 2008, Am J Epidemiol 168:1073',
  },
];

/** What an odds ratio comes to at a baseline risk. */
export interface RiskFromOdds {
  readonly riskRatio: number;
  readonly exposedRisk: number;
  readonly riskDifference: number;
  /** How much farther from 1 the odds ratio is on the log scale, in percent; absent at 1. */
  readonly logExcessPercent: Maybe<number>;
  /** √OR, within a factor of 1.25 of the risk ratio for risks of 20% to 80% (VanderWeele 2017). */
  readonly rootOddsRatio: number;
}

/**
 * The risk ratio of an odds ratio at the risk of the unexposed: OR/(1 − p₀ + p₀ OR).
 * 2 at 0.2 gives 1.667; 0.6 at 0.906 gives 0.941.
 *
 * Source: Zhang & Yu (1998); exact for a crude table at its own p₀, by algebra. For
 * others see `reservationsAbout`.
 */
export function riskFromOdds(oddsRatio: number, baselineRisk: number): Maybe<RiskFromOdds> {
  const refusal = refuseNonPositive({ oddsRatio }) ?? refuseClosedShares({ baselineRisk });
  if (refusal) return refusal;
  const riskRatio = convert(oddsRatio, baselineRisk);
  return {
    riskRatio,
    exposedRisk: riskRatio * baselineRisk,
    riskDifference: (baselineRisk * (1 - baselineRisk) * (oddsRatio - 1))
      / (1 - baselineRisk + baselineRisk * oddsRatio),
    logExcessPercent: oddsRatio === 1
      ? absence('an odds ratio of 1 is a risk ratio of 1')
      : 100 * (Math.log(oddsRatio) / Math.log(riskRatio) - 1),
    rootOddsRatio: Math.sqrt(oddsRatio),
  };
}

/** √OR over the risk ratio at this risk, 1 where they agree: 2.59 for 10 at 0.8. */
export function rootBias(oddsRatio: number, baselineRisk: number): Maybe<number> {
  const found = riskFromOdds(oddsRatio, baselineRisk);
  return isAbsence(found) ? found : found.rootOddsRatio / found.riskRatio;
}

/** The limits of an odds ratio as a risk ratio's, at one risk: see `reservationsAbout`. */
export function riskRatioLimits(oddsRatioLimits: Range, baselineRisk: number): Maybe<Range> {
  return riskRatiosAtBaseline(oddsRatioLimits, { low: baselineRisk, high: baselineRisk });
}

/**
 * The risk ratios that an odds ratio may come to over a range of baseline risks, such
 * as those behind a printed percentage: OR 1.95 to 2.05 at risks of 0.195 to 0.205
 * gives 1.63 to 1.70. It rises with the odds ratio, and moves one way with the risk,
 * so the ends lie at the corners. Both ranges positive, risks below 1.
 */
export function riskRatiosAtBaseline(oddsRatio: Range, baselineRisk: Range): Maybe<Range> {
  return refuseRanges(oddsRatio, baselineRisk)
    ?? spreadOverCorners(oddsRatio, baselineRisk, (ratio, risk) => convert(ratio, risk));
}

/**
 * The risk ratios that an odds ratio may come to when only the share of everybody
 * with the outcome is known. It lies between the two groups' risks, so the unexposed
 * have it at one extreme (hardly anybody exposed) and the exposed at the other, where
 * the risk ratio is OR (1 − p) + p. OR 2 at 0.34 for all gives 1.49 to 1.66.
 */
export function riskRatiosAtPrevalence(oddsRatio: Range, prevalence: Range): Maybe<Range> {
  const refusal = refuseRanges(oddsRatio, prevalence);
  if (refusal) return refusal;
  const fewExposed = spreadOverCorners(oddsRatio, prevalence, convert);
  const mostExposed = spreadOverCorners(oddsRatio, prevalence, (ratio, p) => ratio * (1 - p) + p);
  return {
    low: Math.min(fewExposed.low, mostExposed.low),
    high: Math.max(fewExposed.high, mostExposed.high),
  };
}

/**
 * The odds ratio of two risks, and with it of a risk ratio at a baseline: risks of
 * 0.847 and 0.906 have the risk ratio 0.935 and the odds ratio 0.574.
 */
export function oddsRatioOfRisks(exposedRisk: number, unexposedRisk: number): Maybe<number> {
  const refusal = refuseClosedShares({ exposedRisk, unexposedRisk });
  return refusal ?? (exposedRisk / (1 - exposedRisk)) / (unexposedRisk / (1 - unexposedRisk));
}

function convert(oddsRatio: number, baselineRisk: number): number {
  return oddsRatio / (1 - baselineRisk + baselineRisk * oddsRatio);
}

function refuseRanges(oddsRatio: Range, risk: Range): Absence | undefined {
  if (!(oddsRatio.low <= oddsRatio.high && risk.low <= risk.high)) {
    return absence('the ends of a range are out of order');
  }
  return refuseNonPositive({ 'odds ratio': oddsRatio.low, 'odds ratio above': oddsRatio.high })
    ?? refuseClosedShares({ risk: risk.low, 'risk above': risk.high });
}
