import type { Box, Mark } from '../../model/index.ts';

/**
 * The frame in which text reads from left to right: the page turned so many
 * quarter turns. `u` grows along the line, `v` downwards from line to line.
 */
export interface Frame {
  readonly turns: 0 | 1 | 2 | 3;
}

/** A run of characters in one font and size, as the PDF draws it, in its frame. */
export interface Run {
  readonly text: string;
  readonly left: number;
  readonly right: number;
  readonly baseline: number;
  readonly size: number;
  readonly font: string;
  /** Whether blank space was drawn just before it. */
  readonly spaced: boolean;
  /** The run's place in the order of drawing. */
  readonly order: number;
  /** Set for raised or lowered marks that were set beside a larger run. */
  readonly mark?: Mark['kind'];
}

/** What was drawn on one page in one direction. */
export interface Side {
  readonly frame: Frame;
  readonly runs: readonly Run[];
}

/** One page as it was drawn: sizes in points, the page upright. */
export interface DrawnPage {
  readonly number: number;
  readonly width: number;
  readonly height: number;
  /** Text by direction, the direction of most text first. */
  readonly sides: readonly Side[];
}

const COS = [1, 0, -1, 0] as const;
const SIN = [0, 1, 0, -1] as const;

/** Turns a point of the page into a frame's coordinates. */
export function intoFrame({ turns }: Frame, x: number, y: number): { u: number; v: number } {
  return { u: x * COS[turns] + y * SIN[turns], v: y * COS[turns] - x * SIN[turns] };
}

/** Turns a rectangle of a frame back into a box on the upright page. */
export function boxOnPage(
  { turns }: Frame,
  left: number,
  top: number,
  right: number,
  bottom: number,
): Box {
  if (turns === 0) return { x: left, y: top, width: right - left, height: bottom - top };
  const xs = [left, right].flatMap((u) =>
    [top, bottom].map((v) => u * COS[turns] - v * SIN[turns]),
  );
  const ys = [left, right].flatMap((u) =>
    [top, bottom].map((v) => u * SIN[turns] + v * COS[turns]),
  );
  const x = Math.min(...xs);
  const y = Math.min(...ys);
  return { x, y, width: Math.max(...xs) - x, height: Math.max(...ys) - y };
}
