import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { isAbsence } from '../src/stats/absence.ts';
import * as stats from '../src/stats/index.ts';

/*
 * Whatever numbers are put in, an answer holds no NaN: it is a number, or an absence with
 * a reason. The calls below are all functions of counts, distributions and models.
 */

/** Numbers that a table of a strange paper, or a slip of ours, may put in. */
const ODD = fc.oneof(
  { weight: 3, arbitrary: fc.integer({ min: -3, max: 200 }) },
  { weight: 3, arbitrary: fc.double({ min: -2, max: 2, noNaN: true }) },
  { weight: 1, arbitrary: fc.constantFrom(NaN, Infinity, -Infinity, 0, -0, 1, 50, 95, 100) },
  { weight: 1, arbitrary: fc.constantFrom(1e10, 1e150, 1e300, 1e-300, Number.MAX_VALUE) },
);

/** Numbers that mostly make sense: counts, shares and levels. */
const PLAIN = fc.oneof(
  { weight: 6, arbitrary: fc.integer({ min: 0, max: 99 }) },
  { weight: 2, arbitrary: fc.double({ min: 0, max: 1, noNaN: true }) },
);

type Call = (x: readonly number[]) => unknown;

const n = (x: readonly number[], i: number): number => x[i] as number;
const table = (x: readonly number[], from = 0): stats.TwoByTwo => ({
  exposedEvents: n(x, from), exposedNonEvents: n(x, from + 1),
  unexposedEvents: n(x, from + 2), unexposedNonEvents: n(x, from + 3),
});
const range = (x: readonly number[], from: number): { low: number; high: number } =>
  ({ low: n(x, from), high: n(x, from + 1) });
const rates = (x: readonly number[]): stats.TwoRates => ({
  exposedEvents: n(x, 0), exposedTime: n(x, 1), unexposedEvents: n(x, 2), unexposedTime: n(x, 3),
});
const pairs = (x: readonly number[]): stats.DiscordantPairs =>
  ({ caseOnly: n(x, 0), controlOnly: n(x, 1) });
const studies = (x: readonly number[]): stats.Study[] =>
  [0, 2, 4].map((i) => ({ estimate: n(x, i), variance: n(x, i + 1) }));
const logRatios = (x: readonly number[], from: number): stats.LogRatioRanges =>
  ({ logEstimate: range(x, from), standardError: range(x, from + 2) });
const group = (x: readonly number[], from: number): stats.GroupSummary =>
  ({ mean: n(x, from), standardDeviation: n(x, from + 1), size: n(x, from + 2) });
const riskGroup = (x: readonly number[], from: number): stats.RiskGroup =>
  ({ total: n(x, from), events: n(x, from + 1), expected: n(x, from + 2) });

const DISTRIBUTIONS: Readonly<Record<string, Call>> = {
  studentTails: (x) => stats.studentTails(n(x, 0), n(x, 1)),
  studentP: (x) => stats.studentP(n(x, 0), n(x, 1)),
  studentQuantile: (x) => stats.studentQuantile(n(x, 0), n(x, 1)),
  studentMultiplier: (x) => stats.studentMultiplier(n(x, 0), n(x, 1)),
  studentOfTwoSidedP: (x) => stats.studentOfTwoSidedP(n(x, 0), n(x, 1)),
  chiSquareTails: (x) => stats.chiSquareTails(n(x, 0), n(x, 1)),
  chiSquareQuantile: (x) => stats.chiSquareQuantile(n(x, 0), n(x, 1)),
  fTails: (x) => stats.fTails(n(x, 0), n(x, 1), n(x, 2)),
  fQuantile: (x) => stats.fQuantile(n(x, 0), n(x, 1), n(x, 2)),
  betaDistributionTails: (x) => stats.betaDistributionTails(n(x, 0), n(x, 1), n(x, 2)),
  betaQuantile: (x) => stats.betaQuantile(n(x, 0), n(x, 1), n(x, 2)),
  binomialTails: (x) => stats.binomialTails(n(x, 0), n(x, 1), n(x, 2)),
  binomialP: (x) => stats.binomialP(n(x, 0), n(x, 1), n(x, 2)),
  binomialQuantile: (x) => stats.binomialQuantile(n(x, 0), n(x, 1), n(x, 2)),
  poissonQuantile: (x) => stats.poissonQuantile(n(x, 0), n(x, 1)),
  hypergeometricTails: (x) => stats.hypergeometricTails(n(x, 0),
    { marked: n(x, 1), unmarked: n(x, 2), drawn: n(x, 3) }),
  hypergeometricQuantile: (x) => stats.hypergeometricQuantile(n(x, 0),
    { marked: n(x, 1), unmarked: n(x, 2), drawn: n(x, 3) }),
  poissonTails: (x) => stats.poissonTails(n(x, 0), n(x, 1)),
  poissonP: (x) => stats.poissonP(n(x, 0), n(x, 1)),
  pOfStatistic: (x) => (['z', 't', 'chi-square', 'F', 'Q'] as const).map((statistic) =>
    [[], [n(x, 2)], [n(x, 2), n(x, 3)]].map((df) =>
      stats.pOfStatistic(statistic, range(x, 0), df))),
};

const COUNTS: Readonly<Record<string, Call>> = {
  tableFromTotals: (x) => stats.tableFromTotals(n(x, 0), n(x, 1), n(x, 2), n(x, 3)),
  oddsRatio: (x) => stats.oddsRatio(table(x), n(x, 4)),
  oddsRatioHalfAdded: (x) => stats.oddsRatioHalfAdded(table(x), n(x, 4)),
  sampleOddsRatio: (x) => stats.sampleOddsRatio(table(x)),
  riskRatio: (x) => stats.riskRatio(table(x), n(x, 4)),
  riskRatioHalfAdded: (x) => stats.riskRatioHalfAdded(table(x), n(x, 4)),
  riskDifference: (x) => stats.riskDifference(table(x), n(x, 4)),
  newcombeInterval: (x) => stats.newcombeInterval(table(x), n(x, 4)),
  scoreIntervalOfDifference: (x) => stats.scoreIntervalOfDifference(table(x), n(x, 4)),
  scoreIntervalOfRiskRatio: (x) => stats.scoreIntervalOfRiskRatio(table(x), n(x, 4)),
  scoreIntervalOfOddsRatio: (x) => stats.scoreIntervalOfOddsRatio(table(x), n(x, 4)),
  associationTests: (x) => stats.associationTests(table(x)),
  fisherExact: (x) => stats.fisherExact(table(x)),
  exactOddsRatio: (x) => stats.exactOddsRatio(table(x), n(x, 4)),
  mantelHaenszel: (x) => stats.mantelHaenszel([table(x), table(x, 4)]),
  mantelHaenszelRiskRatio: (x) => stats.mantelHaenszelRiskRatio([table(x), table(x, 4)]),
  mantelHaenszelRiskDifference: (x) => stats.mantelHaenszelRiskDifference([table(x), table(x, 4)]),
  cochranMantelHaenszel: (x) => stats.cochranMantelHaenszel([table(x), table(x, 4)]),
  breslowDay: (x) => stats.breslowDay([table(x), table(x, 4)]),
  matchedOddsRatio: (x) => stats.matchedOddsRatio(pairs(x), n(x, 2)),
  exactMatchedInterval: (x) => stats.exactMatchedInterval(pairs(x), n(x, 2)),
  mcNemar: (x) => stats.mcNemar(pairs(x)),
  proportionIntervals: (x) => stats.proportionIntervals(n(x, 0), n(x, 1), n(x, 2)),
  ruleOfThree: (x) => stats.ruleOfThree(n(x, 0)),
  exactCountInterval: (x) => stats.exactCountInterval(n(x, 0), n(x, 1)),
  byarCountInterval: (x) => stats.byarCountInterval(n(x, 0), n(x, 1)),
  byarLimits: (x) => stats.byarLimits(n(x, 0), n(x, 1)),
  midPCountInterval: (x) => stats.midPCountInterval(n(x, 0), n(x, 1)),
  standardisedRatio: (x) => stats.standardisedRatio(n(x, 0), n(x, 1), n(x, 2)),
  incidenceRate: (x) => stats.incidenceRate(n(x, 0), n(x, 1), n(x, 2), n(x, 3)),
  incidenceRateRatio: (x) => stats.incidenceRateRatio(rates(x), n(x, 4)),
  exactRateRatio: (x) => stats.exactRateRatio(rates(x), n(x, 4)),
  rateDifference: (x) => stats.rateDifference(rates(x), n(x, 4), n(x, 5)),
  percentOfCount: (x) => stats.percentOfCount(n(x, 0), n(x, 1), { value: n(x, 2), decimals: 1 }),
  countsBehindPercent: (x) => stats.countsBehindPercent({ value: n(x, 0), decimals: 1 }, n(x, 1)),
  percentGranularity: (x) => stats.percentGranularity(n(x, 0), n(x, 1)),
  partsAndTotal: (x) => stats.partsAndTotal(
    [{ value: n(x, 0), decimals: 1 }, { value: n(x, 1), decimals: n(x, 2) }],
    { value: n(x, 3), decimals: 0 },
  ),
  roundedPercentSum: (x) => stats.roundedPercentSum(n(x, 0)),
  quotients: (x) => stats.quotients(range(x, 0), range(x, 2)),
  numberNeeded: (x) => stats.numberNeeded(n(x, 0)),
  numberNeededInterval: (x) => stats.numberNeededInterval(range(x, 0)),
  effectOfRiskRatio: (x) => stats.effectOfRiskRatio(n(x, 0), n(x, 1)),
  effectOfOddsRatio: (x) => stats.effectOfOddsRatio(n(x, 0), n(x, 1)),
  effectOfHazardRatio: (x) => stats.effectOfHazardRatio(n(x, 0), n(x, 1)),
  crudeRatios: (x) => (['OR', 'RR'] as const)
    .map((measure) => stats.crudeRatios(measure, table(x), n(x, 4))),
};

const MODELS: Readonly<Record<string, Call>> = {
  estimatedFrom: (x) => stats.estimatedFrom(n(x, 0), n(x, 1), n(x, 2)),
  ratioFromLog: (x) => stats.ratioFromLog(n(x, 0), n(x, 1), n(x, 2)),
  predictedProbability: (x) => stats.predictedProbability(n(x, 0),
    [{ coefficient: n(x, 1), value: n(x, 2) }]),
  probabilityOfLogit: (x) => stats.probabilityOfLogit(n(x, 0)),
  logitOfProbability: (x) => stats.logitOfProbability(n(x, 0)),
  valueAtProbability: (x) => stats.valueAtProbability(n(x, 0), n(x, 1), n(x, 2)),
  logRatioFromLimits: (x) => stats.logRatioFromLimits(n(x, 0), range(x, 1), n(x, 3)),
  interactionOf: (x) => stats.interactionOf(
    { logRatio: n(x, 0), standardError: n(x, 1) },
    { logRatio: n(x, 2), standardError: n(x, 3) },
    n(x, 4),
  ),
  interactionOfRanges: (x) => stats.interactionOfRanges(logRatios(x, 0), logRatios(x, 4)),
  additiveInteraction: (x) => stats.additiveInteraction(
    { firstOnly: n(x, 0), secondOnly: n(x, 1), both: n(x, 2) },
  ),
  touchingIntervals: (x) => stats.touchingIntervals(n(x, 0), n(x, 1)),
  riskFromOdds: (x) => stats.riskFromOdds(n(x, 0), n(x, 1)),
  rootBias: (x) => stats.rootBias(n(x, 0), n(x, 1)),
  riskRatiosAtBaseline: (x) => stats.riskRatiosAtBaseline(range(x, 0), range(x, 2)),
  riskRatiosAtPrevalence: (x) => stats.riskRatiosAtPrevalence(range(x, 0), range(x, 2)),
  oddsRatioOfRisks: (x) => stats.oddsRatioOfRisks(n(x, 0), n(x, 1)),
  riskMeasures: (x) => stats.riskMeasures(n(x, 0), n(x, 1)),
  ratiosOfRisks: (x) => stats.ratiosOfRisks(range(x, 0), range(x, 2)),
  largestRiskRatio: (x) => stats.largestRiskRatio(n(x, 0)),
  riskFromHazard: (x) => stats.riskFromHazard(n(x, 0), n(x, 1)),
  commonOutcomeRiskRatio: (x) => stats.commonOutcomeRiskRatio(n(x, 0)),
  eValue: (x) => (
    ['risk ratio or rare outcome', 'common odds ratio', 'common hazard ratio'] as const
  ).map((kind) => stats.eValue(n(x, 0), range(x, 1), kind)),
  smallestStandardErrors: (x) => stats.smallestStandardErrors(n(x, 0), n(x, 1)),
  fewestEvents: (x) => stats.fewestEvents(n(x, 0)),
  eventsPerVariable: (x) => stats.eventsPerVariable(n(x, 0), n(x, 1), n(x, 2)),
  sampleSizeForShrinkage: (x) => stats.sampleSizeForShrinkage(n(x, 0), n(x, 1), n(x, 2)),
  largestCoxSnell: (x) => stats.largestCoxSnell(n(x, 0)),
  sampleSizeForRisk: (x) => stats.sampleSizeForRisk(n(x, 0), n(x, 1)),
  logisticSummary: (x) => stats.logisticSummary(
    { total: n(x, 0), events: n(x, 1), logLikelihood: n(x, 2), parameters: n(x, 3) },
  ),
  nestedSummary: (x) => stats.nestedSummary(
    { nullLogLikelihood: n(x, 0), logLikelihood: n(x, 1), parameters: n(x, 2) },
  ),
  logRankSummary: (x) => stats.logRankSummary(
    { observed: [n(x, 0), n(x, 1)], expected: [n(x, 2), n(x, 3)] }, n(x, 4),
  ),
  logRankTest: (x) => stats.logRankTest(n(x, 0), n(x, 1), n(x, 2), n(x, 3)),
  hazardRatioFromP: (x) => [
    stats.hazardRatioFromP(n(x, 0), { total: n(x, 1) }, 'treatment', n(x, 2)),
    stats.hazardRatioFromP(n(x, 0), { treatment: n(x, 1), control: n(x, 2) }, 'control', n(x, 3)),
  ],
  logRankBehindRatio: (x) => stats.logRankBehindRatio(n(x, 0), range(x, 1), n(x, 3)),
  hazardRatioOfMedians: (x) => stats.hazardRatioOfMedians(n(x, 0), n(x, 1)),
  hosmerLemeshow: (x) => stats.hosmerLemeshow([riskGroup(x, 0), riskGroup(x, 3), riskGroup(x, 6)]),
  aucPrecision: (x) => stats.aucPrecision(n(x, 0), n(x, 1), n(x, 2), n(x, 3)),
  somersD: (x) => stats.somersD(n(x, 0)),
  aucDifference: (x) => stats.aucDifference([n(x, 0), n(x, 1)], [n(x, 2), n(x, 3)], n(x, 4)),
  aucOfRatings: (x) => stats.aucOfRatings({ cases: x.slice(0, 3), controls: x.slice(3, 6) }),
  rocAreas: (x) => stats.rocAreas(n(x, 0), n(x, 1)),
  rocAreasOfRanges: (x) => stats.rocAreasOfRanges(range(x, 0), range(x, 2)),
  predictiveValues: (x) => stats.predictiveValues(n(x, 0), n(x, 1), n(x, 2)),
  diagnosticAccuracy: (x) => stats.diagnosticAccuracy(
    {
      truePositives: n(x, 0), falsePositives: n(x, 1),
      falseNegatives: n(x, 2), trueNegatives: n(x, 3),
    },
    n(x, 4),
  ),
  heterogeneityOfQ: (x) => stats.heterogeneityOfQ(n(x, 0), n(x, 1)),
  heterogeneityOfRange: (x) => stats.heterogeneityOfRange(range(x, 0), n(x, 2)),
  fixedEffect: (x) => stats.fixedEffect(studies(x), n(x, 6)),
  betweenStudyVariance: (x) => (['DerSimonian–Laird', 'Paule–Mandel', 'REML'] as const)
    .map((method) => stats.betweenStudyVariance(studies(x), method)),
  randomEffects: (x) => stats.randomEffects(studies(x), n(x, 6), n(x, 7)),
  standardisedDifferenceOfOdds: (x) => stats.standardisedDifferenceOfOdds(n(x, 0)),
  oddsRatioOfStandardisedDifference: (x) => stats.oddsRatioOfStandardisedDifference(n(x, 0)),
  attributableFractions: (x) => stats.attributableFractions(n(x, 0), n(x, 1)),
  populationFraction: (x) => stats.populationFraction(n(x, 0), n(x, 1)),
  efficacyOfRatio: (x) => stats.efficacyOfRatio(n(x, 0), range(x, 1)),
  percentChange: (x) => stats.percentChange(n(x, 0)),
  ratioOfPercentChange: (x) => stats.ratioOfPercentChange(n(x, 0)),
  sampleSizeForProportions: (x) => stats.sampleSizeForProportions(n(x, 0), n(x, 1),
    { power: n(x, 2), significance: n(x, 3) }),
  eventsForHazardRatio: (x) => stats.eventsForHazardRatio(n(x, 0),
    { power: n(x, 1), significance: n(x, 2) }, n(x, 3)),
  compareMeans: (x) => stats.compareMeans(group(x, 0), group(x, 3), n(x, 6)),
  spreadFromP: (x) => stats.spreadFromP(n(x, 0), n(x, 1), n(x, 2), n(x, 3)),
  widthDivisor: (x) => stats.widthDivisor(n(x, 0), n(x, 1)),
  correlationTest: (x) => stats.correlationTest(n(x, 0), n(x, 1), n(x, 2)),
  terminalDigitTest: (x) => stats.terminalDigitTest([...x, n(x, 0)]),
  benfordShare: (x) => stats.benfordShare(n(x, 0)),
};

/** Whether a NaN is anywhere in an answer. */
function holdsNaN(answer: unknown): boolean {
  if (typeof answer === 'number') return Number.isNaN(answer);
  if (answer instanceof Map) return [...answer.values()].some(holdsNaN);
  if (typeof answer === 'object' && answer !== null) return Object.values(answer).some(holdsNaN);
  return false;
}

describe.each([
  ['distributions', DISTRIBUTIONS], ['counts', COUNTS], ['models', MODELS],
] as const)('whatever is put to %s', (_, calls) => {
  it.each(Object.entries(calls))('%s answers a number or a reason', (_name, call) => {
    const nine = { minLength: 9, maxLength: 9 };
    for (const numbers of [ODD, PLAIN, fc.integer({ min: 0, max: 60 })]) {
      fc.assert(fc.property(fc.array(numbers, nine), (given) => {
        expect(holdsNaN(call(given))).toBe(false);
      }), { numRuns: 150 });
    }
    expect(holdsNaN(call(Array.from({ length: 9 }, () => NaN)))).toBe(false);
  });
});

describe('reasons', () => {
  it('name what is amiss', () => {
    const reason = (answer: unknown): string => (isAbsence(answer) ? answer.because : 'none');
    expect(reason(stats.oddsRatio(table([-1, 2, 3, 4])))).toBe('exposedEvents (-1) is not a count');
    expect(reason(stats.oddsRatio(table([0, 2, 3, 4])))).toBe('a cell of the table is empty');
    expect(reason(stats.wilsonInterval(13, 12))).toBe('13 of 12 is not possible for a proportion');
    expect(reason(stats.wilsonInterval(3, 12, 30)))
      .toBe('a level of 30% is not between 50% and 100%');
    expect(reason(stats.riskFromOdds(2, 1)))
      .toBe('baselineRisk (1) is not strictly between 0 and 1');
  });
});
