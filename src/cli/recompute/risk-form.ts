import type { Range, RatioMeasure } from '../../model/index.ts';
import type { Recomputation, Worked, WorkedGroup } from '../../report/recomputation.ts';
import { significant, valueInWords } from '../../report/worked-in-words.ts';
import { isAbsence, type Maybe } from '../../stats/absence.ts';
import {
  type AbsoluteEffect, effectOfHazardRatio, effectOfOddsRatio, effectOfRiskRatio,
  numberNeededInterval,
} from '../../stats/number-needed-to-treat.ts';
import { reservationsAbout } from '../../stats/odds-to-risk.ts';
import { largestRiskRatio } from '../../stats/risk-measures.ts';
import { unrounded } from '../../stats/rounding.ts';
import { InputProblem, quoted } from './input-problem.ts';
import { numbersIn, type Typed } from './typed-number.ts';
import { numberInWords, resultInWords, type TypedResult, USUAL_LEVEL } from './typed-result.ts';

/** A ratio with the risks of the unexposed at which it is to be seen. */
export interface TypedRisk {
  readonly result: TypedResult;
  /** Shares, taken exactly as typed: they are chosen, where the ratio is printed. */
  readonly baselines: readonly number[];
  /** Whether the ratio is known to be crude, so that nothing stands against turning it. */
  readonly crude: boolean;
}

/** The kinds of ratio that a baseline risk turns into risks. */
type Turning = 'odds' | 'hazard' | 'risk';

const EFFECTS: Readonly<Record<Turning, (ratio: number, risk: number) => Maybe<AbsoluteEffect>>> = {
  odds: effectOfOddsRatio, hazard: effectOfHazardRatio, risk: effectOfRiskRatio,
};

/** What a ratio comes to as risks, at one baseline risk and over a range of them. */
export function recomputeRisk({ result, baselines, crude }: TypedRisk): Recomputation {
  const { estimate } = result;
  if (estimate === undefined) {
    throw new InputProblem('The estimate is missing: type it first, such as recompute risk 2.0 '
      + '--baseline 30%.');
  }
  const kind = kindOf(result.name);
  const ratio = positive(estimate);
  const first = baselines[0] as number;
  return {
    form: 'risk',
    understood: `${resultInWords(result)}, at a baseline risk of `
      + baselines.map(inPercent).join(' and '),
    outcome: 'not compared',
    answer: [answerAt(kind, estimate, first)],
    groups: [
      ...baselines.map((baseline) => risksAt(kind, result, ratio, baseline)),
      overBaselines(kind, ratio),
    ],
    working: [workingAt(kind, estimate, first)],
    perhaps: [],
    reservations: reservationsOf(kind, result, crude),
    comment: '',
    sources: SOURCES[kind],
  };
}

function kindOf(name: string): Turning {
  switch (name as RatioMeasure) {
    case 'OR': case 'POR': return 'odds';
    case 'HR': case 'csHR': return 'hazard';
    case 'RR': case 'PR': return 'risk';
    default: throw new InputProblem(`A ratio of the kind ${quoted(name)} is not turned into risks: `
      + 'name it with --measure OR, HR or RR.');
  }
}

const SOURCES: Readonly<Record<Turning, readonly string[]>> = {
  odds: ['Risk ratio of an odds ratio, OR / (1 − p₀ + p₀ × OR): Zhang & Yu 1998, JAMA 280:1690; a '
    + 'range of baselines: Grant 2014, BMJ 348:f7450.', 'Number needed to treat: Altman 1998.'],
  hazard: ['Risk under proportional hazards, 1 − (1 − p₀)^HR: Symons & Moore 2002; number needed '
    + 'to treat: Altman & Andersen 1999, BMJ 319:1492.'],
  risk: ['Risk and number needed to treat at a baseline risk: Cochrane Handbook, section 15.4.4; '
    + 'Altman 1998.'],
};

function positive(number: Typed): Range {
  const range = unrounded(number);
  if (range.low > 0 && Number.isFinite(range.high) && !number.percent) return range;
  throw new InputProblem(`A ratio of ${quoted(numberInWords(number))} cannot be turned into risks: `
    + 'type a number above 0 with enough digits, such as 0.72.');
}

/** The risks, ratio and difference that a ratio's rounding allows at one baseline risk. */
function risksAt(kind: Turning, result: TypedResult, ratio: Range, baseline: number): WorkedGroup {
  const [low, high] = [ratio.low, ratio.high].map((end) => EFFECTS[kind](end, baseline));
  const label = `at ${inPercent(baseline)}`;
  if (low === undefined || high === undefined || isAbsence(low) || isAbsence(high)) {
    return { label, values: [impossible(low, high, baseline)] };
  }
  const difference = { low: -low.riskReduction, high: -high.riskReduction };
  const needed = numberNeededInterval({ low: high.riskReduction, high: low.riskReduction });
  const exposed = { low: low.treatedRisk, high: high.treatedRisk };
  return {
    label,
    values: [
      { quantity: 'risk of the exposed', unit: 'share', value: exposed },
      ...(kind === 'risk' ? [] : [{
        quantity: 'risk ratio', unit: 'number',
        value: { low: low.treatedRisk / baseline, high: high.treatedRisk / baseline },
      } as const]),
      ...limitRows(kind, result, baseline),
      { quantity: 'risk difference', unit: 'share', value: difference },
      ...(isAbsence(needed) || needed.kind === 'through infinity' ? [] : [{
        quantity: 'number needed', unit: 'number', value: needed.range,
        note: `for one event ${needed.direction === 'benefit' ? 'fewer' : 'more'}`,
      } as const]),
    ],
  };
}

function impossible(
  low: Maybe<AbsoluteEffect> | undefined, high: Maybe<AbsoluteEffect> | undefined, baseline: number,
): Worked {
  const why = [low, high].find(isAbsence);
  const most = largestRiskRatio(baseline);
  return {
    quantity: 'no answer',
    unit: 'number',
    note: isAbsence(most) ? why?.because ?? ''
      : `no risk ratio can exceed ${significant(most, 3)} here, since no risk exceeds 100%`,
  };
}

/** The printed limits turned in the same way: too narrow, as the reservations say. */
function limitRows(kind: Turning, result: TypedResult, baseline: number): readonly Worked[] {
  const { lower, upper, level = USUAL_LEVEL } = result;
  if (lower === undefined || upper === undefined || kind === 'risk') return [];
  const limits = [['lower limit', lower], ['upper limit', upper]] as const;
  return limits.flatMap(([quantity, limit]): readonly Worked[] => {
    const value = turned(kind, unrounded(limit), baseline);
    const note = `of the risk ratio, from the ${level}% limit ${limit.plain}`;
    return value === undefined ? [] : [{ quantity, unit: 'number', value, note }];
  });
}

/** The risk ratios that a range of ratios comes to at one baseline risk. */
function turned(kind: Turning, ratio: Range, baseline: number): Range | undefined {
  const [low, high] = [ratio.low, ratio.high].map((end) => EFFECTS[kind](end, baseline));
  if (low === undefined || high === undefined) return undefined;
  if (isAbsence(low) || isAbsence(high)) return undefined;
  return { low: low.treatedRisk / baseline, high: high.treatedRisk / baseline };
}

/** From rare to common: how much hangs on the baseline. */
const BASELINES = [0.01, 0.05, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.8] as const;

function overBaselines(kind: Turning, ratio: Range): WorkedGroup {
  return {
    label: 'by baseline',
    values: BASELINES.flatMap((baseline): readonly Worked[] => {
      const [low, high] = [ratio.low, ratio.high].map((end) => EFFECTS[kind](end, baseline));
      if (low === undefined || high === undefined || isAbsence(low) || isAbsence(high)) return [];
      const difference = { low: -low.riskReduction, high: -high.riskReduction };
      return [{
        ...(kind === 'risk'
          ? {
              quantity: `risk at ${inPercent(baseline)}`,
              unit: 'share',
              value: { low: low.treatedRisk, high: high.treatedRisk },
            }
          : {
              quantity: `risk ratio at ${inPercent(baseline)}`,
              unit: 'number',
              value: { low: low.treatedRisk / baseline, high: high.treatedRisk / baseline },
            }),
        note: `risk difference ${valueInWords(difference, 'share')}`,
      }];
    }),
  };
}

const NOUN: Readonly<Record<Turning, string>> = {
  odds: 'an odds ratio', hazard: 'a hazard ratio', risk: 'a risk ratio',
};

function answerAt(kind: Turning, estimate: Typed, baseline: number): string {
  const found = EFFECTS[kind](estimate.value, baseline);
  if (isAbsence(found)) {
    return `At a baseline risk of ${inPercent(baseline)} this ratio gives no risk.`;
  }
  const risk = found.treatedRisk;
  const change = Math.abs(found.riskReduction) * 1000;
  const ratio = kind === 'risk' ? '' : `a risk ratio of ${significant(risk / baseline, 3)}, and `;
  return `Where ${inPercent(baseline)} of the unexposed have the outcome, ${NOUN[kind]} of `
    + `${estimate.plain} means ${(risk * 100).toFixed(1)}% of the exposed: `
    + `${ratio}${significant(change, 3)} `
    + `${found.riskReduction < 0 ? 'more' : 'fewer'} in 1000.`;
}

function workingAt(kind: Turning, estimate: Typed, baseline: number): string {
  const found = EFFECTS[kind](estimate.value, baseline);
  const risk = isAbsence(found) ? undefined : found.treatedRisk;
  if (risk === undefined) return `${inPercent(baseline)} × ${estimate.plain} is above 100%.`;
  const [p0, ratio] = [`${Number(baseline.toPrecision(6))}`, estimate.plain];
  const answer = significant(risk / baseline, 4);
  switch (kind) {
    case 'odds': return `The risk ratio is OR / (1 − p₀ + p₀ × OR) = ${ratio} / (1 − ${p0} + `
      + `${p0} × ${ratio}) = ${answer}.`;
    case 'hazard': return `The risk of the exposed is 1 − (1 − p₀)^HR = 1 − (1 − ${p0})^${ratio} = `
      + `${significant(risk, 4)}, and the risk ratio ${significant(risk, 4)} / ${p0} = ${answer}.`;
    case 'risk': return `The risk of the exposed is ${p0} × ${ratio} = ${significant(risk, 4)}.`;
    default: return kind satisfies never;
  }
}

const EXACTLY = 'The baseline risk is taken exactly as typed; the ranges come from the rounding of '
  + 'the ratio alone.';

function reservationsOf(kind: Turning, { lower }: TypedResult, crude: boolean): readonly string[] {
  switch (kind) {
    case 'odds': return [
      ...reservationsAbout({ adjusted: !crude, withLimits: lower !== undefined })
        .map(({ because, source }) => `${because.charAt(0).toUpperCase()}${because.slice(1)} `
          + `(${source}).`),
      ...(crude ? [] : ['Nothing stands against it for a crude odds ratio at the risk of its own '
        + 'unexposed group: add --crude.']),
      EXACTLY,
    ];
    case 'hazard': return ['Hazards are taken to be proportional, without competing risks, and '
      + 'both risks to be those by the end of the same follow-up.', EXACTLY];
    case 'risk': return ['The risk ratio is taken to be the same at every baseline risk.', EXACTLY];
    default: return kind satisfies never;
  }
}

function inPercent(share: number): string {
  return `${Number((share * 100).toPrecision(4))}%`;
}

/** Baseline risks as typed: "30%", "0.30", or two ends, "20–40%", "0.2 0.4". */
export function baselinesOf(text: string | undefined): readonly number[] {
  if (text === undefined) {
    throw new InputProblem('The risk of the unexposed is missing: add it, such as --baseline 30%, '
      + 'or two of them, such as --baseline 20-40%.');
  }
  const numbers = numbersIn([text]) ?? [];
  const percent = numbers.some((number) => number.percent);
  const shares = numbers.map(({ value }) => (percent ? value / 100 : value));
  if (shares.length >= 1 && shares.length <= 2 && shares.every((p) => p > 0 && p < 1)) {
    return shares;
  }
  throw new InputProblem(`The baseline risk ${quoted(text)} is none between 0% and 100%: type it `
    + 'as 30% or 0.30, or two of them as 20-40%.');
}
