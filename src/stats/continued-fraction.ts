/** One level of a continued fraction: what stands above the bar, and what is added below. */
export interface Level {
  readonly above: number;
  readonly below: number;
}

/** More levels than any argument within the documented limits needs. */
const MOST_LEVELS = 1_000_000;

/**
 * The value of b₀ + a₁/(b₁ + a₂/(b₂ + …)), to about 1e-15 where it converges, by
 * Lentz's method as modified by Thompson & Barnett (1986). `level(0)` gives b₀ in
 * `below`. b = 1 and a = 1 throughout give the golden ratio, 1.618….
 */
export function continuedFraction(level: (depth: number) => Level): number {
  const first = level(0).below;
  let value = first === 0 ? Number.MIN_VALUE ** 0.5 : first;
  let upper = value;
  let lower = 0;
  for (let depth = 1; depth < MOST_LEVELS; depth++) {
    const { above, below } = level(depth);
    lower = 1 / notZero(below + above * lower);
    upper = notZero(below + above / upper);
    value *= upper * lower;
    if (Math.abs(upper * lower - 1) < 4e-16) return value;
  }
  throw new RangeError('a continued fraction was asked for outside its limits');
}

function notZero(x: number): number {
  return x === 0 ? 1e-150 : x;
}
