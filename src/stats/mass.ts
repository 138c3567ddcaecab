import { stirlingGap } from './stirling.ts';

/*
 * Logarithms of binomial and Poisson probabilities for real arguments, by the
 * saddle-point form of Loader (2000, "Fast and accurate computation of binomial
 * probabilities"): a deviance and Stirling gaps, with no large terms that cancel.
 * Accurate to about 1e-15 of the logarithm itself. Callers see to it that the
 * arguments are positive.
 */

const LOG_TWO_PI = Math.log(2 * Math.PI);

/**
 * x ln(x/m) + m − x for x, m > 0: how far a count x is from its mean m, in units
 * of log probability. Zero where they are equal; 12 from a mean of 10 gives 0.188.
 */
export function devianceTerm(x: number, mean: number): number {
  const v = (x - mean) / (x + mean);
  if (Math.abs(v) > 0.5) return x * Math.log(x / mean) + mean - x;
  const square = v * v;
  let power = 2 * x * v;
  let sum = (x - mean) * v;
  for (let odd = 3; ; odd += 2) {
    power *= square;
    const next = sum + power / odd;
    if (next === sum) return sum;
    sum = next;
  }
}

/**
 * ln of Γ(n+1)/(Γ(k+1) Γ(n−k+1)) pᵏ qⁿ⁻ᵏ for real k, n − k > 0 and p + q = 1, both
 * given so that neither loses digits. For 3 of 10 at p = 0.5: ln 0.1171875.
 */
export function logBinomialMass(k: number, rest: number, p: number, q: number): number {
  const n = k + rest;
  if (p === 0 || q === 0) return -Infinity;
  const gaps = stirlingGap(n) - stirlingGap(k) - stirlingGap(rest);
  const deviance = devianceTerm(k, n * p) + devianceTerm(rest, n * q);
  return gaps - deviance - 0.5 * (LOG_TWO_PI + Math.log(k * (rest / n)));
}

/** ln of λᵏ e^−λ / Γ(k+1) for real k, λ > 0. For 3 at a mean of 2: ln 0.180447. */
export function logPoissonMass(k: number, mean: number): number {
  return -stirlingGap(k) - devianceTerm(k, mean) - 0.5 * (LOG_TWO_PI + Math.log(k));
}
