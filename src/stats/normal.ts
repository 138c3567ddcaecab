import { absence, type Maybe } from './absence.ts';

/*
 * The standard normal distribution with full relative accuracy in both tails.
 *
 * Up to z = 1.5 the central probability comes from its power series (Marsaglia
 * 2004), whose terms are all positive, so that nothing cancels; beyond, the tail
 * is the density times Mills' ratio by Laplace's continued fraction. Functions
 * that take a z or a probability checked by their callers throw a RangeError on
 * NaN and on a probability outside 0 to 1: that is a fault of the caller, not of
 * a manuscript. `multiplier` takes what a reader typed and answers an absence.
 */

const ROOT_TWO_PI = Math.sqrt(2 * Math.PI);
const LOG_ROOT_TWO_PI = 0.5 * Math.log(2 * Math.PI);

/** The multiplier of nearly every interval, which is worth keeping: zOfUpperTail(0.025). */
const Z_OF_95 = 1.959963984540054;

/** Where the series for the centre hands over to the continued fraction for the tail. */
const HANDOVER = 1.5;

/** After a change below this share of z, Halley's cubic convergence has reached the last digit. */
const CONVERGED = 1e-6;

/** Beyond this z, Mills' ratio is 1/z to the last digit, and z² may overflow. */
const VERY_FAR = 1e8;

/**
 * The density at z. The exponent is split so that no digit of z² is lost: the
 * rounded part has an exact square, the rest is small. (z = 38: 1.1e-16 relative.)
 */
export function density(z: number): number {
  const coarse = Math.round(Math.abs(z) * 16) / 16;
  const fine = Math.abs(z) - coarse;
  if (coarse > 40) return 0;
  const rest = Math.exp(-fine * (coarse + 0.5 * fine));
  return (Math.exp(-0.5 * coarse * coarse) * rest) / ROOT_TWO_PI;
}

/**
 * The probability of a standard normal value above z, to 3e-15 relative from
 * z = −∞ to 37.5 (1e-308; measured against 60-digit arithmetic), and in fewer digits
 * below, where doubles thin out. Above 1.959963984540054 lies 0.025.
 */
export function upperTail(z: number): number {
  refuseNaN(z);
  if (z < 0) return 1 - upperTail(-z);
  return z < HANDOVER ? 0.5 - fromCentre(z) : density(z) * millsRatio(z);
}

/**
 * The natural logarithm of `upperTail`, without limit: at z = 40 it is −804.6,
 * where the probability itself is below the smallest double.
 */
export function logUpperTail(z: number): number {
  refuseNaN(z);
  if (z < -1) return Math.log1p(-upperTail(-z));
  if (z < HANDOVER) return Math.log(upperTail(z));
  return z === Infinity ? -Infinity : -0.5 * z * z - LOG_ROOT_TWO_PI + Math.log(millsRatio(z));
}

/**
 * The two-sided p-value of a z statistic of either sign: 1.96 gives 0.0499958.
 * Exact zero only beyond |z| = 38.5; `log10TwoSidedP` goes on.
 */
export function twoSidedP(z: number): number {
  return Math.min(1, 2 * upperTail(Math.abs(z)));
}

/** The base-10 logarithm of the two-sided p: z = 40 gives −349.13. */
export function log10TwoSidedP(z: number): number {
  return (logUpperTail(Math.abs(z)) + Math.LN2) / Math.LN10;
}

/**
 * The z above which the probability `p` lies, to about 1e-15 relative: 0.025
 * gives 1.959963984540054; 0 gives ∞ and 1 gives −∞.
 */
export function zOfUpperTail(p: number): number {
  refuseProbability(p);
  if (p > 0.5) return -zOfUpperTail(1 - p);
  return p > 0.1 ? zOfCentre(0.5 - p) : zOfLogUpperTail(Math.log(p));
}

/**
 * The z at which a share `p` lies below: the usual quantile. 0.975 gives
 * 1.959963984540054 and 1e-300 gives −37.0471.
 */
export function quantile(p: number): number {
  return zOfUpperTail(p) === 0 ? 0 : -zOfUpperTail(p);
}

/** The |z| whose two-sided p-value is `p`: 0.05 gives 1.959963984540054. */
export function zOfTwoSidedP(p: number): number {
  refuseProbability(p);
  return p === 0 ? Infinity : zOfUpperTail(p / 2);
}

/**
 * The z whose upper tail has the natural logarithm `logP`, for tails of at most
 * 0.1 (`logP` ≤ −2.3) down to any depth: Halley's method on the log tail, from
 * the rational start of Hastings (Abramowitz & Stegun 26.2.23; within 4.5e-4).
 */
export function zOfLogUpperTail(logP: number): number {
  refuseNaN(logP);
  if (logP === -Infinity) return Infinity;
  if (logP > -2.3) return zOfUpperTail(Math.min(1, Math.exp(logP)));
  const t = Math.sqrt(-2 * logP);
  const above = 2.515517 + t * (0.802853 + t * 0.010328);
  const below = 1 + t * (1.432788 + t * (0.189269 + t * 0.001308));
  let z = t - above / below;
  for (let step = 0; step < 4; step++) {
    const change = halleyOnLogTail(z, logP);
    z -= change;
    if (Math.abs(change) < CONVERGED * z) break;
  }
  return z;
}

/**
 * How many standard errors an interval of this level reaches to each side:
 * 95 gives 1.959963984540054. The level is in percent, at least 50 and below
 * 100; for others there is no answer.
 */
export function multiplier(level: number): Maybe<number> {
  if (!(level >= 50 && level < 100)) {
    return absence(`a level of ${level}% is not between 50% and 100%`);
  }
  return level === 95 ? Z_OF_95 : zOfUpperTail((100 - level) / 200);
}

/** The probability between 0 and z ≥ 0: density times the series z + z³/3 + z⁵/(3·5) + … */
function fromCentre(z: number): number {
  let term = z;
  let sum = z;
  for (let odd = 3; term > sum * 1e-18; odd += 2) {
    term *= (z * z) / odd;
    sum += term;
  }
  return density(z) * sum;
}

/** Newton's method with Halley's correction on the central probability; good near z = 0 too. */
function zOfCentre(probability: number): number {
  let z = probability * ROOT_TWO_PI;
  for (let step = 0; step < 5; step++) {
    const newton = (fromCentre(z) - probability) / density(z);
    z -= newton / (1 + 0.5 * newton * z);
  }
  return z;
}

/** One step's change for f = ln tail − logP, where f′ = −1/Mills and f″ = f′(−z − f′). */
function halleyOnLogTail(z: number, logP: number): number {
  const mills = millsRatio(z);
  const slope = -1 / mills;
  const logTail = -0.5 * z * z - LOG_ROOT_TWO_PI + Math.log(mills);
  const newton = (logTail - logP) / slope;
  return newton / (1 - 0.5 * newton * (-z - slope));
}

/**
 * Mills' ratio, tail over density, for z > 1: Laplace's continued fraction
 * 1/(z + 1/(z + 2/(z + 3/…))) from the inside out. The depth keeps the remainder,
 * about exp(−2z√depth) of the ratio, below 1e-17.
 */
function millsRatio(z: number): number {
  if (z > VERY_FAR) return 1 / z;
  let fraction = z;
  for (let level = 12 + Math.ceil(350 / (z * z)); level >= 1; level--) {
    fraction = z + level / fraction;
  }
  return 1 / fraction;
}

function refuseNaN(z: number): void {
  if (Number.isNaN(z)) throw new RangeError('a z statistic cannot be NaN');
}

function refuseProbability(p: number): void {
  if (!(p >= 0 && p <= 1)) throw new RangeError(`a probability cannot be ${p}`);
}
