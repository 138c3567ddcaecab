import type { Range } from '../../model/index.ts';
import type { Worked, WorkedGroup, WorkedUnit } from '../../report/recomputation.ts';
import { isAbsence } from '../../stats/absence.ts';
import type { Agreement } from '../../stats/agreement.ts';
import { leanOf } from '../../stats/contrast.ts';
import { NAMES } from '../../stats/explanation-sentence.ts';
import { feasibleRegion, linearRange } from '../../stats/feasible-region.ts';
import { type OthersImply, othersImply } from '../../stats/implied.ts';
import { multiplier } from '../../stats/normal.ts';
import { exponentials } from '../../stats/ranges.ts';
import { type ReportedNumbers, stripsOf, usualReading } from '../../stats/reported-numbers.ts';
import type { Quantity, Strip } from '../../stats/strip.ts';

/** The scales on which typed results are compared: of a ratio's log, or of a difference. */
export type TypedScale = 'log' | 'difference';

/** In which terms answers are given: on which scale, of what, in which unit. */
export interface TypedTerms {
  readonly scale: TypedScale;
  readonly name: string;
  readonly unit: WorkedUnit;
}

/** The label of what each number would be by the others. */
export const FROM_OTHERS = 'from others';

/** What the numbers imply together, and each of them from the others. */
export function impliedGroups(
  found: Agreement, numbers: ReportedNumbers, terms: TypedTerms,
): readonly WorkedGroup[] {
  return [
    { label: 'together', values: together(found, numbers, terms) },
    { label: FROM_OTHERS, values: fromOthers(found, numbers, terms) },
  ].filter(({ values }) => values.length > 0);
}

function together(
  found: Agreement, numbers: ReportedNumbers, { scale, name, unit }: TypedTerms,
): readonly Worked[] {
  if (found.outcome !== 'within rounding' && found.outcome !== 'within another standard method') {
    return [];
  }
  const { estimate, logEstimate, standardError, z, p } = found.implied;
  const ofLog = scale === 'log' && numbers.coefficient === undefined;
  return [
    ...(numbers.estimate === undefined && ofLog ? [number(name, estimate, unit)] : []),
    ...(ofLog ? [number(`log of the ${name}`, logEstimate, 'number')] : []),
    ...(numbers.coefficient === undefined ? [] : [number('coefficient', logEstimate, 'number')]),
    number('standard error', standardError, unit, ofLog ? 'of the log' : undefined),
    ...(ofLog || scale === 'difference'
      ? missingLimits(found, numbers, { scale, name, unit }) : []),
    number('z', z, 'number'),
    { quantity: 'p', unit: 'probability', value: p, note: 'two-sided' },
  ];
}

/** The limits that estimate and p imply where no limits are printed, as of two unknowns alone. */
function missingLimits(
  found: Agreement, numbers: ReportedNumbers, { scale, unit }: TypedTerms,
): readonly Worked[] {
  const level = numbers.level ?? 95;
  const reach = multiplier(level);
  if (numbers.lower || numbers.upper || found.outcome !== 'within rounding' || isAbsence(reach)) {
    return [];
  }
  return ([['lower', -reach], ['upper', reach]] as const).flatMap(([side, up]) => {
    const range = linearRange(found.region, 1, up);
    if (range === undefined) return [];
    const limit = scale === 'log' ? exponentials(range) : range;
    return [number(`${side} limit`, limit, unit, `${level}%`)];
  });
}

function number(quantity: string, value: Range, unit: WorkedUnit, note?: string): Worked {
  return { quantity, unit, value, ...(note === undefined ? {} : { note }) };
}

/** For each printed number what the others imply; nothing where two numbers alone are there. */
function fromOthers(
  found: Agreement, numbers: ReportedNumbers, { scale, unit }: TypedTerms,
): readonly Worked[] {
  return othersOn(found, numbers, scale).flatMap(({ of, strict, leaning }) => {
    const range = strict ?? (found.outcome === 'neither' ? undefined : leaning);
    if (range === undefined) return [];
    const notes = [
      ...(of === 'p' && numbers.p?.oneSided === true ? ['one-sided'] : []),
      ...(strict === undefined ? ['by any usual method'] : []),
    ];
    return [number(NAMES[of], range, unitOf(of, unit), notes.join(', ') || undefined)];
  });
}

function unitOf(of: Quantity, unit: WorkedUnit): WorkedUnit {
  if (of === 'p') return 'probability';
  return of === 'z' || of === 'Wald statistic' ? 'number' : unit;
}

/** What the other printed numbers imply for each, also where all of them agree. */
export function othersOn(
  found: Agreement, numbers: ReportedNumbers, scale: TypedScale,
): readonly OthersImply[] {
  const reading = usualReading(numbers, scale);
  const strips = stripsOf(numbers, reading);
  if (isAbsence(strips) || strips.length < 3) return [];
  const contrast = scale === 'log' ? 'binary' : 'difference';
  const all = found.outcome === 'neither' ? found.othersImply
    : othersImply(strips, reading, leanOf(contrast, strips));
  return all.map((one) => onItsSide(one, strips, scale));
}

/**
 * A p-value knows no direction, so that the others may leave an estimate on either side of no
 * effect. It is asked for on the side on which it is printed: -0.48 to -0.43, not -0.48 to 0.48.
 */
function onItsSide(one: OthersImply, strips: readonly Strip[], scale: TypedScale): OthersImply {
  const own = strips.find(({ of }) => of === one.of);
  if (own?.kind !== 'position' || one.strict === undefined) return one;
  const { low, high } = own.range;
  if (low <= 0 && high >= 0) return one;
  const range = low > 0 ? { low: 0, high: Infinity } : { low: -Infinity, high: 0 };
  const others = strips.filter((strip) => strip !== own);
  const strict = linearRange(feasibleRegion([...others, { ...own, range }]), 1, 0);
  if (strict === undefined) return one;
  const isLog = scale === 'log' && one.of !== 'coefficient';
  return { ...one, strict: isLog ? exponentials(strict) : strict };
}
