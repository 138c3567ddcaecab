/**
 * Where a continuous function crosses zero between `low` and `high`, at whose
 * ends it has different signs, to about 2e-16 of the larger of 1 and the answer.
 * The function may be infinite at places. √2 is the root of x² − 2 from 1 to 2.
 *
 * Source: Chandrupatla (1997), which takes inverse quadratic steps where they
 * are safe and halves the bracket where not; a dozen evaluations are usual.
 */
export function rootBetween(f: (x: number) => number, low: number, high: number): number {
  let a = { x: low, y: f(low) };
  let b = { x: high, y: f(high) };
  let c = a;
  let step = 0.5;
  for (let round = 0; round < 300; round++) {
    const x = a.x + step * (b.x - a.x);
    const point = { x, y: f(x) };
    if (point.y === 0) return x;
    if (Math.sign(point.y) === Math.sign(a.y)) c = a;
    else [b, c] = [a, b];
    a = point;
    const best = Math.abs(a.y) < Math.abs(b.y) ? a : b;
    const tolerance = 2 ** -53 * (1 + Math.abs(best.x));
    const smallest = tolerance / Math.abs(b.x - a.x);
    if (smallest > 0.5) return best.x;
    step = Math.min(1 - smallest, Math.max(smallest, nextStep(a, b, c)));
  }
  return a.x;
}

interface Point {
  readonly x: number;
  readonly y: number;
}

function nextStep(a: Point, b: Point, c: Point): number {
  const xi = (a.x - b.x) / (c.x - b.x);
  const phi = (a.y - b.y) / (c.y - b.y);
  if (!(phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi)) return 0.5;
  const quadratic = (a.y / (b.y - a.y)) * (c.y / (b.y - c.y))
    + (((c.x - a.x) / (b.x - a.x)) * (a.y / (c.y - a.y)) * b.y) / (c.y - b.y);
  return Number.isFinite(quadratic) ? quadratic : 0.5;
}
