import type { Range } from '../model/index.ts';
import { greatestLean, leastLean, longestArm, shortestArm } from './lean.ts';
import {
  leaningPoint, mirrored, multiplierOf, possibleEstimates, sectionAt, type Lean, type Section,
} from './leaning-region.ts';
import { hull, negated, shifted } from './ranges.ts';
import { signsOf, type Sign, type Strip } from './strip.ts';

/*
 * How far a quantity reaches over the outer ring. At a fixed estimate the ring is two
 * intervals, of s and of the arm, and every quantity has its ends in closed form. Over the
 * estimates these ends are followed on a grid that is dense around a known point of the
 * ring, closed in on at the ring's own ends by bisection and at the best point by
 * golden section. Accurate to about 1e-6 of the range; for what is told, not for what is decided.
 */

/** The ends of a quantity in one section of the ring. */
export type InSection = (section: Section) => Range;

const GRID = 24;
const BISECTIONS = 40;
const GOLDEN = (Math.sqrt(5) - 1) / 2;
const GOLDEN_STEPS = 26;

/** The values of the estimate itself. */
export function ofEstimate(side: Sign): InSection {
  return ({ estimate }) => ({ low: side * estimate, high: side * estimate });
}

/** The values of the standard error. */
export function ofStandardError(): InSection {
  return ({ s }) => s;
}

/** The values of estimate over standard error, with its sign. */
export function ofQuotient(side: Sign): InSection {
  return ({ estimate, s }) => {
    const [one, other] = [quotient(side * estimate, s.low), quotient(side * estimate, s.high)];
    return { low: Math.min(one, other), high: Math.max(one, other) };
  };
}

/** The values of the limit on one side, by any method within the lean. */
export function ofLimit(limit: Sign, lean: Lean): (side: Sign) => InSection {
  return (side) => ({ estimate, v }) => {
    const arm = lean.interval
      ? { low: shortestArm(v.low, lean.reach), high: longestArm(v.high, lean.reach) }
      : v;
    return shifted(limit === 1 ? arm : negated(arm), side * estimate);
  };
}

/** The values of |z| that a test within the lean may give, exact methods included. */
export function ofTest(lean: Lean): () => InSection {
  return () => ({ estimate, s }) => {
    const distance = Math.abs(estimate);
    const most = lean.p ? greatestLean(distance, lean.reach) : distance;
    const least = lean.p ? leastLean(distance, lean.reach) : distance;
    const correction = lean.p ? lean.continuity * s.high : 0;
    return {
      low: Math.max(0, quotient(least, s.high) - correction),
      high: quotient(most, s.low),
    };
  };
}

/** Zero over anything is zero: no effect is no evidence, however it is measured. */
function quotient(above: number, below: number): number {
  return above === 0 ? 0 : above / below;
}

/** How a quantity is read off a section; `side` is −1 where the strips are seen mirrored. */
export type QuantityOf = (side: Sign) => InSection;

/**
 * The values of a quantity over the ring of the strips; nothing where the ring is empty.
 * Where a sign is free the negative side is seen mirrored, and `quantity` is asked
 * to turn its values back.
 */
export function leaningExtent(
  strips: readonly Strip[],
  lean: Lean,
  quantity: QuantityOf,
  multiplier?: number,
): Range | undefined {
  return leaningExtents(strips, lean, [quantity], multiplier)?.[0];
}

/** The same for several quantities at once, in their order, which costs little more. */
export function leaningExtents(
  strips: readonly Strip[],
  lean: Lean,
  quantities: readonly QuantityOf[],
  multiplier = multiplierOf(strips) ?? 1,
): readonly Range[] | undefined {
  let all: readonly Range[] | undefined;
  for (const sign of signsOf(strips)) {
    const ring = ringOf(sign === 1 ? strips : strips.map(mirrored), lean, multiplier);
    if (ring === undefined) continue;
    const ranges = quantities.map((quantity) => extentOver(ring, quantity(sign)));
    all = all ? all.map((range, i) => hull(range, ranges[i] as Range)) : ranges;
  }
  return all;
}

/** The ring under one sign: sections at many estimates in order, and at any other on demand. */
interface Ring {
  readonly sections: readonly Section[];
  readonly sectionAt: (estimate: number) => Section | undefined;
}

function ringOf(strips: readonly Strip[], lean: Lean, multiplier: number): Ring | undefined {
  const anchor = anchorOf(strips, lean);
  const domain = possibleEstimates(strips);
  if (anchor === undefined || domain === undefined) return undefined;
  const at = (estimate: number) => sectionAt(strips, lean, multiplier, estimate);
  const sections = ringSections(grid(domain, anchor), at);
  return sections.length === 0 ? undefined : { sections, sectionAt: at };
}

function extentOver(ring: Ring, quantity: InSection): Range {
  return {
    low: -greatest(ring, (section) => -quantity(section).low),
    high: greatest(ring, (section) => quantity(section).high),
  };
}

/** A point of the ring with the free sign positive, as the strips are seen. */
function anchorOf(strips: readonly Strip[], lean: Lean): number | undefined {
  const oneSided = strips.map((strip): Strip =>
    strip.kind === 'statistic' && strip.eitherSign && strip.range.low > 0
      ? { ...strip, eitherSign: false }
      : strip);
  return leaningPoint(oneSided, lean)?.estimate;
}

/** Places over the domain, dense around the anchor. */
function grid({ low, high }: Range, anchor: number): readonly number[] {
  const places = [anchor];
  for (let i = 1; i <= GRID; i++) {
    const share = i / GRID;
    places.push(low + (share - 1 / GRID) * (high - low));
    places.push(anchor + share ** 4 * (high - anchor), anchor + share ** 4 * (low - anchor));
  }
  return [...new Set(places)].sort((one, other) => one - other);
}

/** The sections at the places that are in the ring, with its ends between them closed in on. */
function ringSections(
  places: readonly number[],
  at: (estimate: number) => Section | undefined,
): readonly Section[] {
  const found = places.map(at);
  return found.flatMap((section, i) => {
    const next = found[i + 1];
    const here = section ? [section] : [];
    if (i + 1 === places.length || (section === undefined) === (next === undefined)) return here;
    const outer = places[section ? i + 1 : i] as number;
    return [...here, ringEnd((section ?? next) as Section, outer, at)];
  });
}

/** The last section on the way from one inside the ring to a place outside. */
function ringEnd(
  inner: Section,
  outer: number,
  at: (estimate: number) => Section | undefined,
): Section {
  let inside = inner;
  let outside = outer;
  for (let i = 0; i < BISECTIONS; i++) {
    const middle = (inside.estimate + outside) / 2;
    const section = at(middle);
    if (section === undefined) outside = middle;
    else inside = section;
  }
  return inside;
}

/** The greatest value over the ring, refined by golden section beside the best section. */
function greatest(ring: Ring, value: (section: Section) => number): number {
  const values = ring.sections.map(value);
  const most = Math.max(...values);
  const top = values.indexOf(most);
  const from = ring.sections[Math.max(0, top - 1)] as Section;
  const to = ring.sections[Math.min(values.length - 1, top + 1)] as Section;
  const merit = (place: number) => {
    const section = ring.sectionAt(place);
    return section === undefined ? -Infinity : value(section);
  };
  return Math.max(most, goldenSection(merit, from.estimate, to.estimate));
}

function goldenSection(merit: (place: number) => number, from: number, to: number): number {
  let [low, high] = [from, to];
  let [left, right] = [high - GOLDEN * (high - low), low + GOLDEN * (high - low)];
  let [a, b] = [merit(left), merit(right)];
  let most = Math.max(a, b);
  for (let step = 0; step < GOLDEN_STEPS; step++) {
    if (a >= b) {
      [high, right, b] = [right, left, a];
      left = high - GOLDEN * (high - low);
      a = merit(left);
    } else {
      [low, left, a] = [left, right, b];
      right = low + GOLDEN * (high - low);
      b = merit(right);
    }
    most = Math.max(most, a, b);
  }
  return most;
}
