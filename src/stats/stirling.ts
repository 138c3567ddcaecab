/*
 * What Stirling's formula leaves out of the logarithm of a factorial.
 *
 * Probabilities of counts are built from this and from `devianceTerm` (Loader
 * 2000), because the logarithms of three large factorials would cancel and lose
 * the digits that matter.
 */

/** Where the asymptotic series takes over: its last kept term is below 1e-17 there. */
const SERIES_FROM = 16;

const HALF_LOG_TWO_PI = 0.5 * Math.log(2 * Math.PI);

/**
 * ln Γ(n + 1) − (n + ½) ln n + n − ½ ln 2π for any real n > 0, to about 1e-15
 * absolute. For n = 1 it is 0.0810614667953273. Source: the asymptotic series
 * (Abramowitz & Stegun 6.1.41), reached from small n by δ(n) − δ(n + 1) =
 * artanh(s)/s − 1 with s = 1/(2n + 1), whose terms are all positive.
 */
export function stirlingGap(n: number): number {
  let gap = 0;
  let from = n;
  for (; from < SERIES_FROM; from++) gap += stepGap(from);
  return gap + asymptoticGap(from);
}

/**
 * The natural logarithm of Γ(x) for x > 0, to about 1e-15 of the larger of 1 and
 * its size: ln Γ(5) is ln 24 = 3.1780538303479458.
 */
export function logGamma(x: number): number {
  return (x - 0.5) * Math.log(x) - x + HALF_LOG_TWO_PI + stirlingGap(x);
}

function asymptoticGap(n: number): number {
  const square = n * n;
  const inner = 1 / 1680 - (1 / 1188 - (691 / 360360 - 1 / 156 / square) / square) / square;
  return (1 / 12 - (1 / 360 - (1 / 1260 - inner / square) / square) / square) / n;
}

/** δ(n) − δ(n + 1). For n below ½ the series is slow, and the plain form loses nothing. */
function stepGap(n: number): number {
  if (n < 0.5) return (n + 0.5) * (Math.log1p(n) - Math.log(n)) - 1;
  const square = 1 / ((2 * n + 1) * (2 * n + 1));
  let power = square;
  let sum = 0;
  for (let odd = 3; power > 1e-18; odd += 2) {
    sum += power / odd;
    power *= square;
  }
  return sum;
}
