import type { Relation } from '../src/model/index.ts';
import { isAbsence } from '../src/stats/absence.ts';
import { multiplier, twoSidedP } from '../src/stats/normal.ts';
import { printedNumber } from '../src/stats/printed-text.ts';
import type { ReportedNumbers } from '../src/stats/reported-numbers.ts';
import type { PrintedValue } from '../src/stats/rounding.ts';

/** A stream of pseudo-random numbers from 0 to 1, the same on every machine (mulberry32). */
export function randomStream(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32;
  };
}

/** A row as it is typed: `row('0.72', '0.58', '0.90', '= 0.004')`. */
export function row(
  estimate: string | undefined,
  lower?: string,
  upper?: string,
  p?: string,
  more: Partial<ReportedNumbers> & { readonly oneSided?: boolean } = {},
): ReportedNumbers {
  const { oneSided, ...rest } = more;
  return {
    ...(estimate === undefined ? {} : { estimate: typed(estimate) }),
    ...(lower === undefined ? {} : { lower: typed(lower) }),
    ...(upper === undefined ? {} : { upper: typed(upper) }),
    ...(p === undefined ? {} : { p: { ...typed(p), ...(oneSided ? { oneSided } : {}) } }),
    ...rest,
  };
}

function typed(text: string): PrintedValue & { readonly relation: Relation } {
  const number = printedNumber(text);
  if (isAbsence(number)) throw new Error(number.because);
  return number;
}

/** How software rounds a number for print. */
export type Printer = (value: number, decimals: number) => PrintedValue;

export const nearest: Printer = (value, decimals) => ({
  value: Number(value.toFixed(decimals)),
  decimals,
});

export const halfUp: Printer = (value, decimals) => ({
  value: Math.floor(value * 10 ** decimals + 0.5) / 10 ** decimals,
  decimals,
});

export const halfEven: Printer = (value, decimals) => {
  const scaled = value * 10 ** decimals;
  const down = Math.floor(scaled);
  const tie = scaled - down === 0.5;
  const rounded = tie ? down + (down % 2) : Math.round(scaled);
  return { value: rounded / 10 ** decimals, decimals };
};

/** The true analysis behind a row, on the log scale. */
export interface Analysis {
  readonly theta: number;
  readonly standardError: number;
  readonly level: number;
}

/** A p as papers print it: three decimals with "<0.001", two, or two significant digits. */
export function printedP(p: number, style: number, print: Printer): ReportedNumbers['p'] {
  if (style < 0.4 && p < 0.001) return { relation: '<', value: 0.001, decimals: 3 };
  if (style < 0.4) return { relation: '=', ...print(p, 3) };
  if (style < 0.7) return { relation: '=', ...print(p, 2) };
  if (style < 0.75) return { relation: p < 0.05 ? '<' : '>', value: 0.05, decimals: 2 };
  const decimals = Math.min(20, 1 - Math.floor(Math.log10(Math.max(p, 1e-18))));
  return { relation: '=', ...print(p, decimals) };
}

/** What an honest paper prints of a Wald analysis of a ratio. */
export function waldRow(
  { theta, standardError, level }: Analysis,
  decimals: number,
  print: Printer,
  pStyle: number | undefined,
): ReportedNumbers {
  const reach = multiplier(level);
  if (isAbsence(reach)) throw new Error(reach.because);
  return {
    estimate: print(Math.exp(theta), decimals),
    lower: print(Math.exp(theta - reach * standardError), decimals),
    upper: print(Math.exp(theta + reach * standardError), decimals),
    level,
    ...(pStyle === undefined
      ? {}
      : {
          p: printedP(twoSidedP(theta / standardError), pStyle, print) as NonNullable<
            ReportedNumbers['p']
          >,
        }),
  };
}

/** A random analysis such as clinical papers report. */
export function randomAnalysis(random: () => number): Analysis {
  const normal = Math.sqrt(-2 * Math.log(random() + 1e-12)) * Math.cos(2 * Math.PI * random());
  return {
    theta: 0.8 * normal,
    standardError: Math.exp(Math.log(0.02) + random() * Math.log(50)),
    level: ([95, 95, 95, 90, 99, 97.5, 80] as const)[Math.floor(random() * 7)] as number,
  };
}

/** Slips as hands make them, by kind; `undoneSlips` of the product looks for them backwards. */
export type MadeSlip =
  | 'digit changed'
  | 'digits transposed'
  | 'digit lost'
  | 'digit doubled'
  | 'point moved';

export const MADE_SLIPS: readonly MadeSlip[] = [
  'digit changed',
  'digits transposed',
  'digit lost',
  'digit doubled',
  'point moved',
];

/** The number with one random slip of the kind, or nothing where it leaves no other ratio. */
export function withSlip(
  printed: PrintedValue,
  slip: MadeSlip,
  random: () => number,
): PrintedValue | undefined {
  const text = printed.value.toFixed(printed.decimals);
  const places = [...text].flatMap((character, place) => (/\d/.test(character) ? [place] : []));
  const place = places[Math.floor(random() * places.length)] as number;
  const made = slippedText(text, slip, place, places, random);
  if (made === undefined || !/^(0|[1-9]\d*)(\.\d+)?$/.test(made) || made === text) return undefined;
  const value = Number(made);
  const decimals = made.includes('.') ? made.length - made.indexOf('.') - 1 : 0;
  return value > 0 ? { value, decimals } : undefined;
}

function slippedText(
  text: string,
  slip: MadeSlip,
  place: number,
  places: readonly number[],
  random: () => number,
): string | undefined {
  switch (slip) {
    case 'digit changed':
      return text.slice(0, place) + Math.floor(10 * random()) + text.slice(place + 1);
    case 'digits transposed': {
      const next = places[places.indexOf(place) + 1];
      if (next === undefined) return undefined;
      const between = text.slice(place + 1, next);
      return (
        text.slice(0, place) +
        text.charAt(next) +
        between +
        text.charAt(place) +
        text.slice(next + 1)
      );
    }
    case 'digit lost':
      return text.slice(0, place) + text.slice(place + 1);
    case 'digit doubled':
      return text.slice(0, place) + text.charAt(place) + text.slice(place);
    case 'point moved': {
      const decimals = text.includes('.') ? text.length - text.indexOf('.') - 1 : 0;
      const by = random() < 0.5 ? 1 : -1;
      return decimals + by < 0 ? undefined : Number(`${text}e${-by}`).toFixed(decimals + by);
    }
    default:
      return slip satisfies never;
  }
}
