import type { Rule } from '../src/authoring.ts';
import abstractInBody from './abstract-in-body.ts';
import accuracyOfATest from './accuracy-of-a-test.ts';
import coefficientAndRatio from './coefficient-and-ratio.ts';
import crudeRatioFromCounts from './crude-ratio-from-counts.ts';
import differenceInSignificance from './difference-in-significance.ts';
import digitsEnough from './digits-enough.ts';
import directionInWords from './direction-in-words.ts';
import discriminationInWords from './discrimination-in-words.ts';
import efficacyOfRatio from './efficacy-of-ratio.ts';
import estimateInsideInterval from './estimate-inside-interval.ts';
import goodnessOfFitInWords from './goodness-of-fit-in-words.ts';
import groupsOfWhole from './groups-of-whole.ts';
import hazardRatioAsRisk from './hazard-ratio-as-risk.ts';
import iSquaredFromQ from './i-squared-from-q.ts';
import interceptAsRatio from './intercept-as-ratio.ts';
import intervalAndSignificance from './interval-and-significance.ts';
import intervalSymmetry from './interval-symmetry.ts';
import intervalWideEnough from './interval-wide-enough.ts';
import limitsInOrder from './limits-in-order.ts';
import multivariableInWords from './multivariable-in-words.ts';
import nearSignificanceInWords from './near-significance-in-words.ts';
import noDifferenceFromWideInterval from './no-difference-from-wide-interval.ts';
import nonInferiorityFromP from './non-inferiority-from-p.ts';
import numberNeededToTreat from './number-needed-to-treat.ts';
import numbersOfAnotherRow from './numbers-of-another-row.ts';
import observedAndExpected from './observed-and-expected.ts';
import oddsRatioAsRisk from './odds-ratio-as-risk.ts';
import overlappingIntervals from './overlapping-intervals.ts';
import pFromInterval from './p-from-interval.ts';
import pValueExact from './p-value-exact.ts';
import pValueMeaning from './p-value-meaning.ts';
import pValuePossible from './p-value-possible.ts';
import partsAndTotal from './parts-and-total.ts';
import percentOfCount from './percent-of-count.ts';
import pooledInsideStudies from './pooled-inside-studies.ts';
import postHocPower from './post-hoc-power.ts';
import proportionalHazardsInWords from './proportional-hazards-in-words.ts';
import rateOfEvents from './rate-of-events.ts';
import resultsPrintedTwice from './results-printed-twice.ts';
import sharePossible from './share-possible.ts';
import sizeInWords from './size-in-words.ts';
import spreadOfMean from './spread-of-mean.ts';
import unboundedEstimate from './unbounded-estimate.ts';
import unitOfPredictor from './unit-of-predictor.ts';
import valuePossible from './value-possible.ts';
import whatAReaderNeeds from './what-a-reader-needs.ts';

/** Every rule of the house, from the plainest question to the finest. */
export const rules: readonly Rule[] = [
  limitsInOrder,
  estimateInsideInterval,
  intervalSymmetry,
  pFromInterval,
  coefficientAndRatio,
  numbersOfAnotherRow,
  intervalAndSignificance,
  pValuePossible,
  valuePossible,
  percentOfCount,
  partsAndTotal,
  crudeRatioFromCounts,
  intervalWideEnough,
  unboundedEstimate,
  digitsEnough,
  directionInWords,
  sizeInWords,
  oddsRatioAsRisk,
  hazardRatioAsRisk,
  noDifferenceFromWideInterval,
  differenceInSignificance,
  discriminationInWords,
  goodnessOfFitInWords,
  nonInferiorityFromP,
  overlappingIntervals,
  nearSignificanceInWords,
  sharePossible,
  spreadOfMean,
  unitOfPredictor,
  interceptAsRatio,
  proportionalHazardsInWords,
  pValueExact,
  pValueMeaning,
  postHocPower,
  multivariableInWords,
  groupsOfWhole,
  resultsPrintedTwice,
  abstractInBody,
  accuracyOfATest,
  iSquaredFromQ,
  pooledInsideStudies,
  rateOfEvents,
  observedAndExpected,
  numberNeededToTreat,
  efficacyOfRatio,
  whatAReaderNeeds,
];
