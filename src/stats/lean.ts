/*
 * The outer ring: how far the intervals and p-values of other standard methods
 * may lean away from Wald's.
 *
 * Let I(ψ) be the information about a log ratio ψ in a likelihood, and s = 1/√I(θ)
 * Wald's standard error at the estimate θ. For a contrast of two groups
 *
 *     |d ln I/dψ| ≤ 1 .                                                     (1)
 *
 * For the profile likelihood of a 2×2 table 1/I = 1/a + 1/b + 1/c + 1/d at the fitted
 * cells, which move by ±I, so d ln I/dψ = I²·(1/a² + 1/d² − 1/b² − 1/c²) ≤ I²·(Σ 1/n)² = 1.
 * For the conditional likelihoods (hypergeometric, binomial, Cox's partial likelihood with
 * one binary covariate) the count is a sum of independent Bernoulli variables, whose third
 * cumulant never exceeds the second. Bach (2010, Electron J Stat 4:384) uses the same
 * property, "self-concordance", of logistic models. The skewness bound |γ| ≤ s is (1) at θ.
 * For adjusted contrasts of two groups (1) is not proved; the fitted ones of the fixtures obey.
 *
 * Integrating (1) twice from θ, the deviance D at the distance x from θ obeys
 *
 *     2(e^−x − 1 + x) ≤ s²·D ≤ 2(e^x − 1 − x) ,    x ≥ 0,                   (2)
 *
 * and both ends are reached, by tables with one sparse cell (a Poisson count). With
 *
 *     Φ⁻(x) = √(2(e^−x − 1 + x)) = x − x²/6 + …,   Φ⁺(x) = √(2(e^x − 1 − x)) = x + x²/6 + …
 *
 * a signed-root statistic z of the hypothesis at distance x satisfies Φ⁻(x) ≤ s·z ≤ Φ⁺(x),
 * where Wald's has s·z = x. So each arm x of a profile-likelihood interval with
 * multiplier k satisfies Φ⁻(x) ≤ k·s ≤ Φ⁺(x), and a likelihood-ratio p likewise at
 * x = |θ|. To third order this is the lean h of one sign, |h| ≤ s²: limits θ ∓ k·s + k²h/6,
 * z + h·z²/(6s), ln A ≈ (k/3)·h/s. Score and log-rank statistics (2·sinh(x/2)/s for one
 * sparse cell) lie between the same ends, in general by simulation and not by proof; exact
 * methods add a continuity correction of half a count, s/2 on the scale of z, to both
 * arms, and take it from the z of a p.
 *
 * `reach` widens the bound for contrasts of more than one unit: |d ln I/dψ| ≤ reach.
 */

/** Below this the series is used, where the difference of exponentials would cancel. */
const SMALL = 0.06;

/**
 * The least s·z that a distance x > 0 from the estimate can have: Φ⁻ with the given
 * reach. 0.7 gives 0.6270 at reach 1. Accurate to 1e-14 relative; for x < 0, 0.
 */
export function leastLean(distance: number, reach: number): number {
  return distance <= 0 ? 0 : Math.sqrt(doubledExcess(-distance * reach)) / reach;
}

/**
 * The greatest s·z that a distance x > 0 from the estimate can have: Φ⁺ with the
 * given reach. 0.7 gives 0.7922 at reach 1; infinite beyond 700; for x < 0, 0.
 */
export function greatestLean(distance: number, reach: number): number {
  return distance <= 0 ? 0 : Math.sqrt(doubledExcess(distance * reach)) / reach;
}

/**
 * By what factor half the width of an interval may differ from k·s, apart from the
 * continuity correction. To third order it does not. Measured on 420 tables, 160 Cox and 160
 * logistic models (by the script of fixtures/reference/standard-methods.csv) half the width over
 * k·s is 1 to 1 + 0.10·s² for profile likelihood, to 1 + 0.16·s² for mid-p, and down to
 * 1 − 0.15·s² for score intervals; s is in units of 1/reach. 1.0018 at s = 0.1, reach 1.
 */
export function evenBend(standardError: number, reach: number): number {
  return 1 + 0.18 * (reach * standardError) ** 2;
}

/** 2(e^x − 1 − x), which is x² near 0. */
function doubledExcess(x: number): number {
  if (x > 700) return Infinity;
  if (Math.abs(x) > SMALL) return 2 * (Math.expm1(x) - x);
  return x * x * (1 + (x / 3) * (1 + (x / 4) * (1 + (x / 5) * (1 + (x / 6) * (1 + x / 7)))));
}

/** The shortest arm that reaches v: the inverse of Φ⁺. 0.7922 gives 0.7. */
export function shortestArm(v: number, reach: number): number {
  return solved(v * reach, 1) / reach;
}

/** The longest arm that reaches v: the inverse of Φ⁻. 0.6270 gives 0.7. */
export function longestArm(v: number, reach: number): number {
  return solved(v * reach, -1) / reach;
}

/** Beyond this a square has no place; nothing printed comes near it. */
const LARGEST = 1e150;

/** Below the root, where a step of Newton's goes too far by little: ln(1 + y²/2) for large y. */
function startOfShort(y: number): number {
  return y > 12 ? Math.log1p((y * y) / 2) : y / (1 + y / 12);
}

/**
 * The x > 0 with 2(e^±x − 1 ∓ x) = y², by Newton's method from a start on the side
 * from which it converges without overshooting.
 */
function solved(distance: number, side: 1 | -1): number {
  if (!(distance > 0) || distance === Infinity) return Math.max(0, distance);
  const y = Math.min(distance, LARGEST);
  let x = side === 1 ? startOfShort(y) : y + (y * y) / 2;
  for (let step = 0; step < 60; step++) {
    const slope = 2 * side * Math.expm1(side * x);
    const change = (doubledExcess(side * x) - y * y) / slope;
    x -= change;
    if (Math.abs(change) <= 1e-15 * x) break;
  }
  return x;
}
