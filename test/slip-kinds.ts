import type {
  Claim, Count, Interval, Printed, PValue, RatioResult, Reading, Result, Span,
} from '../src/model/index.ts';
import { isAbsence } from '../src/stats/absence.ts';
import { outcomeOf } from '../src/stats/agreement.ts';
import { percentOfCount } from '../src/stats/percent-of-count.ts';
import { printedNumber } from '../src/stats/printed-text.ts';
import type { ReportedNumbers } from '../src/stats/reported-numbers.ts';
import { type MadeSlip, withSlip } from './reported-row.ts';
import type { Alteration, Examined } from './slip-texts.ts';

/*
 * The kinds of slips that are planted, one at a time. Each says what it puts where, and whether
 * any method could find it from the numbers alone.
 */

/**
 * Whether the altered numbers betray the slip: by no Wald analysis (`strict`), or by none of
 * the usual methods of two groups either (`ring`). Words and copies betray it in both or none.
 */
export interface Findable {
  readonly strict: boolean;
  readonly ring: boolean;
}

/** An alteration that is a slip of some kind. */
export interface Slip extends Alteration, Findable {}

/** Makes a slip of one kind in a text, at a place that the draw picks; none where none fits. */
export type Planter = (text: Examined, random: () => number) => Slip | undefined;

/** A kind of slip, and whether it is one of numbers, of copies, or of words. */
export interface SlipKind {
  readonly name: string;
  readonly of: 'numbers' | 'counts' | 'places' | 'words';
  readonly plant: Planter;
}

/** A ratio with all three numbers, in prose or in one cell. */
interface Full {
  readonly result: RatioResult;
  readonly estimate: Printed;
  readonly interval: Interval;
}

type Member = 'estimate' | 'lower' | 'upper';

/** The ratios that nothing is said against, so that a slip in one is its only slip. */
function fullRatios({ reading, flags }: Examined): readonly Full[] {
  const loud = flags.filter(({ grade }) => grade !== 'caution');
  return reading.findings.results.flatMap((result): readonly Full[] => {
    if (result.kind !== 'ratio' || result.cited) return [];
    if (loud.some(({ span }) => overlaps(span, result.span))) return [];
    const { estimate, interval } = result;
    const isWhole = estimate !== undefined && interval !== undefined
      && estimate.value > 0 && interval.lower.value > 0;
    return isWhole ? [{ result, estimate, interval }] : [];
  });
}

function overlaps(one: Span, other: Span): boolean {
  return one.start < other.end && other.start < one.end;
}

function pick<Item>(items: readonly Item[], random: () => number): Item | undefined {
  return items[Math.floor(random() * items.length)];
}

function numbersOf({ estimate, interval, result: { p } }: Full): ReportedNumbers {
  const { lower, upper, level } = interval;
  return {
    estimate, lower, upper,
    ...(level === undefined ? {} : { level }),
    ...(p === undefined || p.tests !== 'result' ? {} : { p: { ...p, ...p.printed } }),
  };
}

/** Whether the numbers betray a slip; nothing where they are as good as before. */
function findable(numbers: ReportedNumbers): Findable {
  const [unknown, binary] = [outcomeOf(numbers, 'unknown'), outcomeOf(numbers, 'binary')];
  return { strict: unknown !== 'within rounding', ring: binary === 'neither' };
}

const MEMBERS: readonly Member[] = ['estimate', 'lower', 'upper'];

function printedOf(full: Full, member: Member): Printed {
  return member === 'estimate' ? full.estimate : full.interval[member];
}

/** Puts another number in the place of one of the three. */
function inMember(full: Full, member: Member, instead: string): Slip | undefined {
  const printed = printedOf(full, member);
  const number = printedNumber(instead);
  if (isAbsence(number) || instead === printed.plain) return undefined;
  const numbers = { ...numbersOf(full), [member]: number };
  return { span: printed.span, instead: inStyle(printed, instead), ...findable(numbers) };
}

/** The number with the point that the text uses. */
function inStyle({ text }: Printed, plain: string): string {
  return text.includes('·') ? plain.replace('.', '·') : plain;
}

function digitSlip(slip: MadeSlip): Planter {
  return (text, random) => {
    const full = pick(fullRatios(text), random);
    const member = pick(MEMBERS, random);
    if (full === undefined || member === undefined) return undefined;
    const made = withSlip(printedOf(full, member), slip, random);
    return made && inMember(full, member, made.value.toFixed(made.decimals));
  };
}

/** A ratio and the next one, which a hand may copy from. */
function neighbours(text: Examined, random: () => number): readonly [Full, Full] | undefined {
  const all = fullRatios(text);
  const at = Math.floor(random() * Math.max(0, all.length - 1));
  const [one, next] = [all[at], all[at + 1]];
  return one === undefined || next === undefined ? undefined : [one, next];
}

function copied(member: Member): Planter {
  return (text, random) => {
    const pair = neighbours(text, random);
    return pair && inMember(pair[0], member, printedOf(pair[1], member).plain);
  };
}

/** Puts other limits in the place of a ratio's own. */
function otherLimits(
  { reading }: Examined,
  full: Full,
  lower: string,
  upper: string,
): Slip | undefined {
  const { interval } = full;
  const { text } = reading.manuscript;
  const [low, high] = [printedNumber(lower), printedNumber(upper)];
  if (isAbsence(low) || isAbsence(high)) return undefined;
  if (interval.lower.plain === lower && interval.upper.plain === upper) return undefined;
  const between = text.slice(interval.lower.span.end, interval.upper.span.start);
  const words = inStyle(interval.lower, lower) + between + inStyle(interval.upper, upper);
  const span = { start: interval.lower.span.start, end: interval.upper.span.end };
  return { span, instead: words, ...findable({ ...numbersOf(full), lower: low, upper: high }) };
}

const swapped: Planter = (text, random) => {
  const full = pick(fullRatios(text), random);
  return full && otherLimits(text, full, full.interval.upper.plain, full.interval.lower.plain);
};

const copiedInterval: Planter = (text, random) => {
  const pair = neighbours(text, random);
  if (pair === undefined) return undefined;
  const [one, { interval }] = pair;
  return otherLimits(text, one, interval.lower.plain, interval.upper.plain);
};

/** The reverse comparison: 1 over a number, with as many decimals. */
function reciprocal({ value, decimals }: Printed): string {
  return (1 / value).toFixed(decimals);
}

const switchedEstimate: Planter = (text, random) => {
  const full = pick(fullRatios(text), random);
  return full && inMember(full, 'estimate', reciprocal(full.estimate));
};

const switchedInterval: Planter = (text, random) => {
  const full = pick(fullRatios(text), random);
  if (full === undefined) return undefined;
  return otherLimits(text, full, reciprocal(full.interval.upper), reciprocal(full.interval.lower));
};

const limitIsEstimate: Planter = (text, random) => {
  const full = pick(fullRatios(text), random);
  return full && inMember(full, random() < 0.5 ? 'lower' : 'upper', full.estimate.plain);
};

/** A level beside the limits is called another. */
function mislabelled(level: number): Planter {
  return (examined, random) => {
    const { text } = examined.reading.manuscript;
    const all = fullRatios(examined).flatMap((full) => {
      const { start } = full.interval.lower.span;
      const found = text.slice(Math.max(0, start - 14), start).match(/95(?=\s?%)/);
      if (found?.index === undefined || full.interval.level !== 95) return [];
      const at = Math.max(0, start - 14) + found.index;
      return [{ full, span: { start: at, end: at + 2 } }];
    });
    const one = pick(all, random);
    if (one === undefined) return undefined;
    return { span: one.span, instead: `${level}`, ...findable({ ...numbersOf(one.full), level }) };
  };
}

/** A ratio with a p of its own. */
function withP(text: Examined): readonly (Full & { readonly p: PValue })[] {
  return fullRatios(text).flatMap((full) => {
    const { p } = full.result;
    return p !== undefined && p.tests === 'result' && p.relation === '=' ? [{ ...full, p }] : [];
  });
}

function inP(full: Full, p: PValue, instead: string): Slip | undefined {
  const number = printedNumber(instead);
  if (isAbsence(number) || instead === p.printed.plain) return undefined;
  const slipped = { ...p, ...number, relation: p.relation };
  const shown = p.printed.text.startsWith('.') ? instead.replace(/^0/, '') : instead;
  return {
    span: p.printed.span,
    instead: inStyle(p.printed, shown),
    ...(number.value > 1 ? SURE : findable({ ...numbersOf(full), p: slipped })),
  };
}

const SURE: Findable = { strict: true, ring: true };

function pSlip(slip: MadeSlip): Planter {
  return (text, random) => {
    const full = pick(withP(text), random);
    const made = full && withSlip(full.p.printed, slip, random);
    return full && made && inP(full, full.p, made.value.toFixed(made.decimals));
  };
}

const otherP: Planter = (text, random) => {
  const all = withP(text);
  const at = Math.floor(random() * all.length);
  const [full, other] = [all[at], all[(at + 1) % all.length]];
  return full && other && inP(full, full.p, other.p.printed.plain);
};

const pAboveOne: Planter = (text, random) => {
  const full = pick(withP(text), random);
  return full && inP(full, full.p, `1${full.p.printed.plain.replace(/^0?/, '')}`);
};

/** A count with its total and its percentage. */
type Share = Count & Required<Pick<Count, 'count' | 'total' | 'percent'>>;

function shares({ findings }: Reading): readonly Share[] {
  return findings.counts.filter((counted): counted is Share =>
    counted.count !== undefined && counted.total !== undefined && counted.percent !== undefined);
}

function shareSlip(part: 'count' | 'total' | 'percent', slip: MadeSlip): Planter {
  return ({ reading }, random) => {
    const share = pick(shares(reading), random);
    const made = share && withSlip(share[part], slip, random);
    if (share === undefined || made === undefined) return undefined;
    const slipped: Share = { ...share, [part]: { ...share[part], ...made } };
    const { count, total, percent } = slipped;
    const found = percentOfCount(count.value, total.value, percent);
    const isOff = isAbsence(found) || found.verdict !== 'agrees';
    const instead = made.value.toFixed(made.decimals);
    const { span, text } = share[part];
    const sign = text.slice(text.search(/[^\d.,·]*$/));
    return { span, instead: inStyle(share[part], instead) + sign, strict: isOff, ring: isOff };
  };
}

function slipOfPercent(slip: MadeSlip): Planter {
  return shareSlip('percent', slip);
}

/** 512 women were randomly assigned to one (n = 259) or the other (n = 253) */
const DIVIDED = new RegExp(
  String.raw`(\d{2,5}) (?:patients|participants|women|men|subjects)[^.;()]{0,60}\brandom`
    + String.raw`[^.;()]{0,80}\(n\s?=\s?(\d{2,5})\)[^.;()]{0,60}\(n\s?=\s?(\d{2,5})\)`,
  'g',
);

/** The size of a group beside the number that was divided. */
const groupSlip: Planter = ({ reading }, random) => {
  const { text } = reading.manuscript;
  const all = [...text.matchAll(DIVIDED)].filter(([, whole, one, other]) =>
    Number(one) + Number(other) === Number(whole));
  const found = pick(all, random);
  const size = found?.[3];
  if (found === undefined || size === undefined) return undefined;
  const made = withSlip({ value: Number(size), decimals: 0 }, 'digit changed', random);
  const start = found.index + found[0].lastIndexOf(size);
  const span = { start, end: start + size.length };
  return made && { span, instead: `${made.value}`, ...SURE };
};

function roleOf({ manuscript: { blocks } }: Reading, { start }: Span): string {
  return blocks.findLast(({ span }) => span.start <= start)?.section.role ?? 'other';
}

/** A ratio that two places print: the copies of which one is to be altered. */
function twice(text: Examined, isHere: (result: Result) => boolean): readonly Full[] {
  const all = fullRatios(text);
  const key = ({ estimate, interval }: Full): string =>
    [estimate, interval.lower, interval.upper].map(({ plain }) => plain).join(' ');
  const elsewhere = new Set(all.filter(({ result }) => !isHere(result)).map(key));
  return all.filter((full) => isHere(full.result) && elsewhere.has(key(full)));
}

/** One digit in a ratio that another place prints too. */
function inOnePlace(isHere: (reading: Reading) => (result: Result) => boolean): Planter {
  return (text, random) => {
    const full = pick(twice(text, isHere(text.reading)), random);
    const member = pick(MEMBERS, random);
    if (full === undefined || member === undefined) return undefined;
    const made = withSlip(printedOf(full, member), 'digit changed', random);
    const slip = made && inMember(full, member, made.value.toFixed(made.decimals));
    return slip && { ...slip, ...SURE };
  };
}

const inAbstract = (reading: Reading) => (result: Result): boolean =>
  roleOf(reading, result.span) === 'abstract';

const inTable = () => (result: Result): boolean => result.cell !== undefined;

const ONE_DECIMAL = /(?<=[\s(])\d{2,3}\.\d(?=[\s%),;])/g;

/** A percentage or a decimal of the abstract of an article, which the body prints as well. */
const abstractNumber: Planter = ({ reading }, random) => {
  const { blocks, text } = reading.manuscript;
  const roles = new Set(blocks.map(({ section }) => section.role));
  if (!roles.has('abstract') || !roles.has('methods') || !roles.has('results')) return undefined;
  const body = blocks.filter(({ section }) => section.role === 'results')
    .map(({ span }) => text.slice(span.start, span.end)).join('\n');
  const all = blocks
    .filter(({ section, kind }) => section.role === 'abstract' && kind === 'paragraph')
    .flatMap(({ span }) => [...text.slice(span.start, span.end).matchAll(ONE_DECIMAL)]
      .map((match) => ({ words: match[0], start: span.start + match.index })))
    .filter(({ words }) => body.includes(words));
  const found = pick(all, random);
  const printed = { value: Number(found?.words), decimals: 1 };
  const made = found && withSlip(printed, 'digit changed', random);
  if (found === undefined || made === undefined) return undefined;
  const span = { start: found.start, end: found.start + found.words.length };
  return { span, instead: made.value.toFixed(1), ...SURE };
};

/** A claim about a ratio whose interval is clearly on one side of 1, or around it. */
function claims(reading: Reading, isWanted: (claim: Claim) => boolean): readonly Claim[] {
  return reading.findings.claims.filter((claim) => isWanted(claim) && claim.of?.kind === 'ratio'
    && claim.of.interval !== undefined && !claim.of.cited);
}

/** Other words in the place of some of a claim's. */
function reworded(
  { reading }: Examined,
  random: () => number,
  isWanted: (claim: Claim) => boolean,
  from: RegExp,
  to: (words: string) => string,
): Slip | undefined {
  const { text } = reading.manuscript;
  const all = claims(reading, isWanted).flatMap(({ span }) => {
    const near = { start: Math.max(0, span.start - 12), end: span.end + 6 };
    const found = text.slice(near.start, near.end).match(from);
    if (found?.index === undefined) return [];
    const start = near.start + found.index;
    return [{ span: { start, end: start + found[0].length }, words: found[0] }];
  });
  const found = pick(all, random);
  return found && { span: found.span, instead: to(found.words), ...SURE };
}

/** Whether a ratio's limits lie on one side of 1 and are not rounded from it. */
function isClear({ of }: Claim): boolean {
  const limits = of?.interval === undefined ? [] : [of.interval.lower, of.interval.upper];
  return limits.every(({ value, decimals }) => Math.abs(value - 1) > 10 ** -decimals);
}

const denied: Planter = (text, random) => reworded(text, random,
  (claim) => claim.kind === 'significance' && claim.asserted && claim.manner === 'stated'
    && isClear(claim),
  /(?:was|were) (?:statistically )?significant(?:ly)?/,
  (words) => words.replace(/^(was|were)/, '$1 not'));

const asserted: Planter = (text, random) => reworded(text, random,
  (claim) => claim.kind === 'significance' && !claim.asserted && isClear(claim),
  /\bnot (?=(?:statistically )?significant|associated)|\bnon-?(?=signif)|\bno (?=signif)/i,
  (words) => (/^no /i.test(words) ? 'a ' : ''));

const TURNED: Readonly<Record<string, string>> = {
  increased: 'reduced', reduced: 'increased', higher: 'lower', lower: 'higher', greater: 'lower',
  decreased: 'increased', increase: 'reduction', reduction: 'increase', decrease: 'increase',
};

const turned: Planter = (text, random) => reworded(text, random,
  (claim) => claim.kind === 'direction' && isClear(claim),
  new RegExp(`\\b(?:${Object.keys(TURNED).join('|')})\\b`),
  (words) => TURNED[words] ?? words);

const oddsAsRisk: Planter = (text, random) => {
  const { prevalences } = text.reading.findings;
  const isCommon = prevalences.some(({ share }) => share >= 0.1 && share < 0.9);
  if (!isCommon) return undefined;
  return reworded(text, random,
    (claim) => claim.of?.kind === 'ratio' && claim.of.measure === 'OR' && isClear(claim),
    /\b(?:increased|higher|greater|lower|reduced) odds\b/,
    (words) => words.replace('odds', 'risk'));
};

/** "a 59% increase" becomes "a 159% increase", or another digit. */
function percentChange(
  change: (digits: string, random: () => number) => string | undefined,
): Planter {
  return ({ reading }, random) => {
    const all = claims(reading, ({ kind }) => kind === 'size')
      .flatMap((claim) => (claim.kind === 'size' && claim.printed?.percent === true
        ? [claim.printed]
        : []));
    const printed = pick(all, random);
    const digits = printed?.text.match(/\d+(?:[.·]\d+)?/)?.[0];
    const instead = digits === undefined ? undefined : change(digits, random);
    if (printed === undefined || digits === undefined || instead === undefined) return undefined;
    const start = printed.span.start + printed.text.indexOf(digits);
    return { span: { start, end: start + digits.length }, instead, ...SURE };
  };
}

const digitOfPercent = percentChange((digits, random) => {
  const decimals = digits.split('.')[1]?.length ?? 0;
  const made = withSlip({ value: Number(digits), decimals }, 'digit changed', random);
  const isFar = made !== undefined && Math.abs(made.value - Number(digits)) > 2;
  return isFar ? made.value.toFixed(decimals) : undefined;
});

const ratioAsPercent = percentChange((digits) =>
  (Number(digits) < 100 ? `${Number(digits) + 100}` : undefined));

const timesAltered: Planter = (text, random) => reworded(text, random,
  ({ kind }) => kind === 'size',
  /\b(?:twice|two-fold|twofold|doubled|three times|three-fold|threefold)\b/i,
  (words) => (/^t(?:wo|wice)|^doubled/i.test(words) ? 'five times' : 'ten times'));

/** Every kind that is planted, in the order of the table. */
export const SLIP_KINDS: readonly SlipKind[] = [
  { name: 'digit changed in a ratio', of: 'numbers', plant: digitSlip('digit changed') },
  { name: 'digits transposed in a ratio', of: 'numbers', plant: digitSlip('digits transposed') },
  { name: 'digit lost in a ratio', of: 'numbers', plant: digitSlip('digit lost') },
  { name: 'digit doubled in a ratio', of: 'numbers', plant: digitSlip('digit doubled') },
  { name: 'point moved in a ratio', of: 'numbers', plant: digitSlip('point moved') },
  { name: 'limits swapped', of: 'numbers', plant: swapped },
  { name: 'lower limit of the next result', of: 'numbers', plant: copied('lower') },
  { name: 'upper limit of the next result', of: 'numbers', plant: copied('upper') },
  { name: 'estimate of the next result', of: 'numbers', plant: copied('estimate') },
  { name: 'interval of the next result', of: 'numbers', plant: copiedInterval },
  { name: 'estimate of the reverse comparison', of: 'numbers', plant: switchedEstimate },
  { name: 'interval of the reverse comparison', of: 'numbers', plant: switchedInterval },
  { name: 'estimate printed as a limit', of: 'numbers', plant: limitIsEstimate },
  { name: '95% limits called 90%', of: 'numbers', plant: mislabelled(90) },
  { name: '95% limits called 99%', of: 'numbers', plant: mislabelled(99) },
  { name: 'p of another result', of: 'numbers', plant: otherP },
  { name: 'digit changed in p', of: 'numbers', plant: pSlip('digit changed') },
  { name: 'point moved in p', of: 'numbers', plant: pSlip('point moved') },
  { name: 'p above 1', of: 'numbers', plant: pAboveOne },
  { name: 'digit changed in a percentage', of: 'counts', plant: slipOfPercent('digit changed') },
  {
    name: 'digits transposed in a percentage',
    of: 'counts',
    plant: slipOfPercent('digits transposed'),
  },
  { name: 'digit changed in a count', of: 'counts', plant: shareSlip('count', 'digit changed') },
  { name: 'digit changed in a total', of: 'counts', plant: shareSlip('total', 'digit changed') },
  { name: 'digit changed in a group of a whole', of: 'counts', plant: groupSlip },
  { name: 'ratio of the abstract altered', of: 'places', plant: inOnePlace(inAbstract) },
  { name: 'ratio of a table altered', of: 'places', plant: inOnePlace(inTable) },
  { name: 'other number of the abstract altered', of: 'places', plant: abstractNumber },
  { name: 'significant made not significant', of: 'words', plant: denied },
  { name: 'not significant made significant', of: 'words', plant: asserted },
  { name: 'direction reversed', of: 'words', plant: turned },
  { name: 'odds called risk, common outcome', of: 'words', plant: oddsAsRisk },
  { name: 'percent change: digit changed', of: 'words', plant: digitOfPercent },
  { name: 'percent change: ratio as percent', of: 'words', plant: ratioAsPercent },
  { name: 'times altered', of: 'words', plant: timesAltered },
];
