import type { Range } from '../model/index.ts';
import { hull, magnitudes } from './ranges.ts';
import { signsOf, type Sign, type Strip } from './strip.ts';

/*
 * The feasible region: every pair of an estimate θ and a standard error s that
 * agrees with all printed numbers, whatever the rounding.
 *
 * Each printed number confines (θ, s) to a strip bounded by straight lines, so
 * the region is a convex polygon; a two-sided p gives two, one for each sign of θ.
 * They are found by clipping a box with one half-plane after the other
 * (Sutherland & Hodgman 1974, exact for convex polygons).
 *
 * Accuracy. A corner is the crossing of two lines, computed to a few units in the last
 * place of the box's size (mostly below 100). A half-plane keeps what lies outside it by
 * less than about 1e-12, so that regions that only touch are never lost; numbers that
 * miss each other by less than that agree, which no printed digit could show.
 */

/** A pair of the two unknowns, on the scale where the interval is symmetric. */
export interface Point {
  readonly estimate: number;
  readonly standardError: number;
}

/** How the region goes on beyond a far corner: `above` with a bounded θ, or to a side as well. */
export type Farness = 'above' | 'aside';

/**
 * A convex polygon by its corners in order; a single corner or two are possible.
 * Where the numbers leave it open, it is cut off at a far box: those corners are
 * listed in `far`, and the region goes on without end beyond them.
 */
export interface Polygon {
  readonly corners: readonly Point[];
  readonly far: ReadonlyMap<Point, Farness>;
}

/** All pairs that agree with the printed numbers: none, one or two polygons. */
export type Region = readonly Polygon[];

/** The half-plane `across·θ + up·s ≤ limit`. */
interface HalfPlane {
  readonly across: number;
  readonly up: number;
  readonly limit: number;
}

/** The far box: beyond every finite corner, so that what reaches it is open. */
interface Box {
  readonly across: number;
  readonly up: number;
  /** How far outside a half-plane still counts as touching it. */
  readonly slack: number;
}

/** Below this z a p of 1 is no longer told from exactly 1: s would be a thousand times |θ|. */
const FLATTEST = 1e-3;

const NOWHERE: Polygon = { corners: [], far: new Map() };

/** The region in which all strips agree. Empty where the numbers disagree. */
export function feasibleRegion(strips: readonly Strip[]): Region {
  const box = farBox(strips);
  return signsOf(strips)
    .map((sign) => polygonFor(strips, sign, box))
    .filter((polygon) => polygon.corners.length > 0);
}

/** Whether any pair of estimate and standard error agrees with all strips. */
export function isFeasible(strips: readonly Strip[]): boolean {
  const box = farBox(strips);
  return signsOf(strips).some((sign) => polygonFor(strips, sign, box).corners.length > 0);
}

/** The values that `across·θ + up·s` takes in the region; infinite where it is open. */
export function linearRange(region: Region, across: number, up: number): Range | undefined {
  return linearEnds(region, ({ estimate, standardError }) =>
    across * estimate + up * standardError);
}

/**
 * The values of θ/s in the region. The quotient is monotone along every edge, so its
 * ends are at corners; where s goes on without end beside a bounded θ it comes down to 0.
 */
export function quotientRange(region: Region): Range | undefined {
  const quotients = region.flatMap(({ corners, far }) => corners.map((corner) =>
    (far.get(corner) === 'above' ? 0 : quotient(corner))));
  const [low, high] = [Math.min(...quotients), Math.max(...quotients)];
  return low > high ? undefined : { low, high };
}

/** The values of |θ|/s in the region, from 0 where the region reaches across θ = 0. */
export function magnitudeRange(region: Region): Range | undefined {
  let all: Range | undefined;
  for (const polygon of region) {
    const quotients = quotientRange([polygon]);
    const here = quotients && magnitudes(quotients);
    all = here && all ? hull(all, here) : here ?? all;
  }
  return all;
}

function quotient({ estimate, standardError }: Point): number {
  return estimate === 0 ? 0 : estimate / standardError;
}

/** The ends of a linear quantity; an end reached only at a far corner is infinite. */
function linearEnds(region: Region, value: (corner: Point) => number): Range | undefined {
  const near: number[] = [];
  const far: number[] = [];
  for (const polygon of region) {
    for (const corner of polygon.corners) {
      (polygon.far.has(corner) ? far : near).push(value(corner));
    }
  }
  const low = Math.min(...near, ...far);
  const high = Math.max(...near, ...far);
  return low > high ? undefined : {
    low: low < Math.min(...near) ? -Infinity : low,
    high: high > Math.max(...near) ? Infinity : high,
  };
}

function polygonFor(strips: readonly Strip[], sign: Sign, box: Box): Polygon {
  let corners: readonly Point[] = [
    { estimate: -box.across, standardError: 0 },
    { estimate: box.across, standardError: 0 },
    { estimate: box.across, standardError: box.up },
    { estimate: -box.across, standardError: box.up },
  ];
  for (const strip of strips) {
    for (const plane of halfPlanes(strip, sign)) {
      corners = clipped(corners, plane, box.slack);
      if (corners.length === 0) return NOWHERE;
    }
  }
  // Cones alone always share s = 0, where there is no analysis.
  if (!corners.some(({ standardError }) => standardError > 10 * box.slack)) return NOWHERE;
  return { corners, far: farCorners(corners, box) };
}

function farCorners(corners: readonly Point[], box: Box): ReadonlyMap<Point, Farness> {
  const far = new Map<Point, Farness>();
  for (const corner of corners) {
    const aside = Math.abs(corner.estimate) >= box.across / 2;
    const onSide = Math.abs(corner.estimate) >= box.across * (1 - 1e-9);
    if (onSide || corner.standardError >= box.up * (1 - 1e-9)) {
      far.set(corner, aside ? 'aside' : 'above');
    }
  }
  return far;
}

/** Keeps the part of a convex polygon on the inner side of a line, and what touches it. */
function clipped(corners: readonly Point[], plane: HalfPlane, slack: number): readonly Point[] {
  const excess = corners.map((corner) => excessOf(corner, plane));
  if (excess.every((amount) => amount <= slack)) return corners;
  const kept: Point[] = [];
  corners.forEach((corner, i) => {
    const next = (i + 1) % corners.length;
    const here = excess[i] as number;
    const there = excess[next] as number;
    if (here <= slack) kept.push(corner);
    if (here <= slack !== there <= slack && Math.min(here, there) < 0) {
      kept.push(crossing(corner, corners[next] as Point, here, there));
    }
  });
  return kept;
}

function excessOf({ estimate, standardError }: Point, { across, up, limit }: HalfPlane): number {
  return across * estimate + up * standardError - limit;
}

/** The point on the edge where the excess is zero. */
function crossing(one: Point, other: Point, here: number, there: number): Point {
  const share = here / (here - there);
  return {
    estimate: one.estimate + share * (other.estimate - one.estimate),
    standardError: one.standardError + share * (other.standardError - one.standardError),
  };
}

/** The one or two half-planes of a strip, under one sign of θ. Infinite ends give none. */
function halfPlanes(strip: Strip, sign: Sign): readonly HalfPlane[] {
  switch (strip.kind) {
    case 'position':
      return between(strip.range, 1, 0);
    case 'limit':
      return between(strip.range, 1, strip.multiplier);
    case 'spread':
      return between(strip.range, 0, 1);
    case 'statistic':
      return cone(strip.range, strip.eitherSign, strip.eitherSign ? sign : 1);
    default:
      return strip satisfies never;
  }
}

function between({ low, high }: Range, across: number, up: number): readonly HalfPlane[] {
  const planes: HalfPlane[] = [];
  if (low !== -Infinity) planes.push({ across: -across, up: -up, limit: -low });
  if (high !== Infinity) planes.push({ across, up, limit: high });
  return planes;
}

/** θ between low·s and high·s; symmetric where the sign is free and the range starts at 0. */
function cone({ low, high }: Range, eitherSign: boolean, sign: Sign): readonly HalfPlane[] {
  const least = eitherSign && low === 0 ? -high : low;
  const planes: HalfPlane[] = [];
  if (least === Infinity) return [{ across: 0, up: 1, limit: 0 }];
  if (least !== -Infinity) planes.push({ across: -sign, up: least, limit: 0 });
  if (high !== Infinity) planes.push({ across: sign, up: -high, limit: 0 });
  return planes;
}

/** A box that holds every corner of lines with these ends and slopes, with room to spare. */
function farBox(strips: readonly Strip[]): Box {
  let reach = 1;
  let flattest = 1;
  let steepest = 1;
  for (const strip of strips) {
    const ends = [strip.range.low, strip.range.high].map(Math.abs).filter(isPositiveNumber);
    if (strip.kind === 'limit') steepest = Math.max(steepest, Math.abs(strip.multiplier));
    if (strip.kind !== 'statistic') reach = Math.max(reach, ...ends);
    else flattest = Math.min(flattest, ...ends);
    if (strip.kind === 'statistic') steepest = Math.max(steepest, ...ends);
  }
  const across = 4 * reach * steepest;
  const up = across / Math.max(flattest, FLATTEST);
  return { across, up, slack: 1e-12 * reach + 1e-15 * up * steepest };
}

function isPositiveNumber(value: number): boolean {
  return value > 0 && value < Infinity;
}
