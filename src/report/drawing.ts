import { contains, type Flag, type Printed, type Range, type RatioResult } from '../model/index.ts';

/** What the drawing is made of; the second set needs no character beyond ASCII. */
export interface Signs {
  readonly from: string;
  readonly to: string;
  readonly between: string;
  readonly estimate: string;
  readonly recomputed: string;
  /** Where the ratio is 1: alone, and where it crosses the interval. */
  readonly one: string;
  readonly crossed: string;
  readonly axis: string;
  readonly tick: string;
}

/** Signs for a screen with box-drawing characters. */
export const DRAWN: Signs = {
  from: '├', to: '┤', between: '─', estimate: '●', recomputed: '▒',
  one: '┊', crossed: '┼', axis: '─', tick: '┴',
};

/** Signs for every screen. */
export const TYPED: Signs = {
  from: '|', to: '|', between: '-', estimate: 'o', recomputed: '#',
  one: ':', crossed: '+', axis: '-', tick: '+',
};

/** A ratio on a log axis: lines of equal scale that stand one below the other. */
export interface Drawing {
  readonly printed: readonly string[];
  readonly recomputed: readonly string[];
  readonly scale: readonly string[];
}

/** The printed numbers of a ratio and what was recomputed, all on the scale of the ratio. */
interface Drawn {
  readonly lower: number;
  readonly upper: number;
  readonly estimate?: number;
  readonly recomputed?: Range;
}

/**
 * The printed interval on a log axis, the number 1 at which a ratio shows no
 * difference, and below it what the other numbers imply:
 *
 *     ├──────●──────┤    ┊
 *              ▒▒        ┊
 *     ┴──────┴──────┴────┴─
 *     0.6    0.7   0.8   1
 *
 * Nothing is drawn where the interval is not in question, or a limit has no logarithm.
 */
export function drawingOf(flag: Flag, width: number, signs: Signs): Drawing | undefined {
  const drawn = whatToDraw(flag);
  if (drawn === undefined || width < NARROWEST) return undefined;
  const axis = axisOver(valuesOf(drawn), width);
  return {
    printed: [printedRow(drawn, axis, signs)],
    recomputed: drawn.recomputed === undefined ? []
      : [recomputedRow(drawn.recomputed, axis, signs)],
    scale: scaleRows(axis, signs),
  };
}

const NARROWEST = 24;

function whatToDraw({ result, recomputed, marks }: Flag): Drawn | undefined {
  if (result?.kind !== 'ratio' || result.interval === undefined) return undefined;
  const { lower, upper } = result.interval;
  if (![lower, upper].every(hasLogarithm)) return undefined;
  if (!marks.some((mark) => contains(result.interval?.span ?? mark, mark))) return undefined;
  const onScale = recomputed !== undefined && isOnRatioScale(recomputed.quantity)
    && recomputed.range.low > 0 && Number.isFinite(recomputed.range.high);
  return {
    lower: lower.value,
    upper: upper.value,
    ...estimateOf(result),
    ...(onScale ? { recomputed: recomputed.range } : {}),
  };
}

function estimateOf({ estimate }: RatioResult): Pick<Drawn, 'estimate'> {
  return estimate !== undefined && hasLogarithm(estimate) ? { estimate: estimate.value } : {};
}

function hasLogarithm({ value }: Printed): boolean {
  return value > 0 && Number.isFinite(value);
}

/** "upper limit", "estimate" and "risk ratio" are on the axis; "p" and "percentage" are not. */
export function isOnRatioScale(quantity: string): boolean {
  return /\b(estimate|limit|ratio|middle|midpoint)\b/i.test(quantity);
}

function valuesOf({ lower, upper, estimate, recomputed }: Drawn): readonly number[] {
  return [lower, upper, 1, ...(estimate === undefined ? [] : [estimate]),
    ...(recomputed === undefined ? [] : [recomputed.low, recomputed.high])];
}

/** An axis of so many columns, with the logarithms of its ends. */
interface Axis {
  readonly low: number;
  readonly high: number;
  readonly width: number;
}

/** An axis over all of the values with a little room at both ends. */
function axisOver(values: readonly number[], width: number): Axis {
  const logs = values.map(Math.log);
  const [low, high] = [Math.min(...logs), Math.max(...logs)];
  const room = Math.max(0.02, (high - low) * 0.04);
  return { low: low - room, high: high + room, width };
}

function columnOf(value: number, { low, high, width }: Axis): number {
  return Math.round(((Math.log(value) - low) / (high - low)) * (width - 1));
}

function printedRow({ lower, upper, estimate }: Drawn, axis: Axis, signs: Signs): string {
  const cells = blank(axis, signs);
  const [left, right] = [lower, upper].sort((one, other) => one - other) as [number, number];
  const [from, to, one] = [columnOf(left, axis), columnOf(right, axis), columnOf(1, axis)];
  for (let column = from; column <= to; column++) {
    cells[column] = column === one ? signs.crossed : signs.between;
  }
  cells[from] = signs.from;
  cells[to] = signs.to;
  if (estimate !== undefined) cells[columnOf(estimate, axis)] = signs.estimate;
  return cells.join('').trimEnd();
}

function recomputedRow({ low, high }: Range, axis: Axis, signs: Signs): string {
  const cells = blank(axis, signs);
  for (let column = columnOf(low, axis); column <= columnOf(high, axis); column++) {
    cells[column] = signs.recomputed;
  }
  return cells.join('').trimEnd();
}

function blank(axis: Axis, signs: Signs): string[] {
  const cells = new Array<string>(axis.width).fill(' ');
  cells[columnOf(1, axis)] = signs.one;
  return cells;
}

function scaleRows(axis: Axis, signs: Signs): readonly string[] {
  const line = new Array<string>(axis.width).fill(signs.axis);
  const labels = new Array<string>(axis.width).fill(' ');
  for (const { column, start, words } of ticksOn(axis)) {
    line[column] = signs.tick;
    [...words].forEach((character, index) => {
      labels[start + index] = character;
    });
  }
  return [line.join(''), labels.join('').trimEnd()];
}

interface Tick {
  readonly column: number;
  readonly start: number;
  readonly words: string;
}

/** The round numbers that fit on the axis without touching, 1 before all others. */
function ticksOn(axis: Axis): readonly Tick[] {
  const ticks: Tick[] = [];
  for (const value of roundNumbers(axis)) {
    const column = columnOf(value, axis);
    const words = tickInWords(value);
    const start = Math.max(0, Math.min(axis.width - words.length, column - (words.length >> 1)));
    const touches = ticks.some((tick) =>
      start <= tick.start + tick.words.length + 1 && tick.start <= start + words.length + 1);
    if (!touches) ticks.push({ column, start, words });
  }
  return ticks;
}

/** 0.30000000000000004 as "0.3", ten million as "1e+7". */
function tickInWords(value: number): string {
  return String(Number(value.toPrecision(6)));
}

/** 1, then powers of ten, then 5s and 2s and 3s; on a short axis steps of equal size. */
function roundNumbers({ low, high }: Axis): readonly number[] {
  const within = (value: number): boolean => Math.log(value) >= low && Math.log(value) <= high;
  if (high - low < SHORT_AXIS) {
    const step = roundStep((Math.exp(high) - Math.exp(low)) / MOST_STEPS);
    const first = Math.ceil(Math.exp(low) / step);
    const steps = Array.from({ length: MOST_STEPS + 1 }, (_, index) => (first + index) * step);
    return [1, ...steps].filter(within);
  }
  const powers = Array.from({ length: 41 }, (_, index) => 10 ** (index - 20));
  return [1, ...[1, 5, 2, 3].flatMap((digit) => powers.map((power) => digit * power))]
    .filter(within);
}

/** Where the upper end is less than four times the lower. */
const SHORT_AXIS = Math.log(4);

/** More round numbers than fit; those that would touch are left out. */
const MOST_STEPS = 8;

function roundStep(atLeast: number): number {
  const power = 10 ** Math.floor(Math.log10(atLeast));
  return ([1, 2, 5, 10].find((digit) => digit * power >= atLeast) ?? 10) * power;
}
