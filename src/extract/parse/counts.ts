import { type Count, cover, type Printed } from '../../model/index.ts';
import type { Item } from './item.ts';
import { type CountNumber, numberInWords } from './number-words.ts';

/**
 * Finds the counts that are printed with a total or a percentage.
 *
 * ```
 * 35 of 203 (17%)   19 (29%) of 66   45/120   90% [44/49]   85 patients (64.4%)   n = 54; 11%
 * ```
 */
export function findCounts(text: string, items: readonly Item[]): readonly Count[] {
  const counts: Count[] = [];
  let at = 0;
  while (at < items.length) {
    const found = countAt(text, items, at);
    if (found === undefined) at++;
    else {
      counts.push(found.count);
      at = found.end;
    }
  }
  return counts;
}

interface Found {
  readonly count: Count;
  readonly end: number;
}

function countAt(text: string, items: readonly Item[], at: number): Found | undefined {
  const percent = percentAt(items, at);
  if (percent !== undefined) return behindPercent(text, items, at, percent);
  const number = wholeNumber(text, items, at);
  if (number === undefined || !isCountable(items, at, number.printed)) return undefined;
  return withTotal(text, items, number) ?? behindTotal(text, items, at, number)
    ?? withPercent(text, items, at, number);
}

/** How far before "of which" the total may stand, in items. */
const TOTAL_REACH = 6;

// 34 articles, of which 9 (26%) were   120 ferrymen, of whom 45 fell
// ^^                    ^  ^^^         ^^^                   ^^
function behindTotal(
  text: string,
  items: readonly Item[],
  at: number,
  number: CountNumber,
): Found | undefined {
  const [of, which] = [items[at - 2], items[at - 1]];
  const isOfWhich = of?.kind === 'word' && of.word === 'of'
    && which?.kind === 'word' && (which.word === 'which' || which.word === 'whom');
  if (!isOfWhich) return undefined;
  for (let back = at - 3; back >= Math.max(0, at - 3 - TOTAL_REACH); back--) {
    const total = items[back]?.kind === 'number' ? wholeNumber(text, items, back) : undefined;
    if (items[back]?.kind === 'number' && total === undefined) return undefined;
    if (total === undefined) continue;
    const unit = items[total.end];
    const isAmount = unit?.kind === 'word' && (isTime(unit) || unit.word === 'person');
    if (isAmount || total.printed.value < number.printed.value) return undefined;
    const isOpen = items[number.end]?.kind === 'open';
    const percent = isOpen ? percentAt(items, number.end + 1) : undefined;
    const isShare = percent !== undefined && endsQuantity(items, number.end + 2);
    const parts = { count: number.printed, total: total.printed };
    return isShare
      ? found(items, { ...parts, percent }, number.end + 2)
      : found(items, parts, number.end);
  }
  return undefined;
}

function percentAt(items: readonly Item[], at: number): Printed | undefined {
  const item = items[at];
  return item?.kind === 'number' && item.printed.percent ? item.printed : undefined;
}

/** A count of things: a whole number in digits or words. */
function wholeNumber(text: string, items: readonly Item[], at: number): CountNumber | undefined {
  const item = items[at];
  if (item?.kind !== 'number') return numberInWords(text, items, at);
  const { printed, attached } = item;
  const isWhole = !attached && !printed.percent && /^\d+$/.test(printed.plain);
  return isWhole ? { printed, end: at + 1 } : undefined;
}

// not: grade 3 (25%)   age ≥65 (45%)   in 2005 (45%)
function isCountable(items: readonly Item[], at: number, { value }: Printed): boolean {
  const before = items[at - 1];
  if (continuesWords(items, at) || continuesDigits(items, at)) return false;
  if (before?.kind === 'relation') return isSampleSize(items, at);
  if (before?.kind === 'dash' || before?.kind === 'slash' || before?.kind === 'plus-minus') return false;
  const isYear = value >= 1900 && value < 2100 && before?.kind === 'word' && before.word === 'in';
  return !isYear && !(before?.kind === 'word' && NUMBERED.has(before.word));
}

// three hundred and eleven: the whole is not read, so its end must not be either
function continuesWords(items: readonly Item[], at: number): boolean {
  const isLarge = (item: Item | undefined): boolean =>
    item?.kind === 'word' && (item.word === 'hundred' || item.word === 'thousand');
  const before = items[at - 1];
  const isAnd = before?.kind === 'word' && before.word === 'and';
  return isLarge(before) || (isAnd && isLarge(items[at - 2])) || isLarge(items[at + 1]);
}

// 12 345 of 56 789 (21.7%): behind a plain space the end of a number cannot be told from a
//    ^^^    ^^^^^^         number, and the total alone is no count
function continuesDigits(items: readonly Item[], at: number): boolean {
  const [before, item] = [items[at - 1], items[at]];
  const isOf = before?.kind === 'word' && before.word === 'of';
  if (isOf && items[at - 2]?.kind === 'number') return true;
  return before?.kind === 'number' && /^\d{1,3}$/.test(before.printed.plain)
    && item?.kind === 'number' && /^\d{3}$/.test(item.printed.text);
}

/** Words whose number is a name or a bound, not a count: "grade 3", "at least 5". */
const NUMBERED = new Set([
  'grade', 'stage', 'phase', 'type', 'day', 'week', 'month', 'year', 'table', 'figure', 'fig',
  'model', 'age', 'aged', 'score', 'class', 'version', 'per', 'than', 'least', 'level', 'ref',
  'quartile', 'quintile', 'tertile', 'every', 'each', 'step', 'visit', 'group', 'arm', 'cycle',
  'within',
]);

// n = 54
function isSampleSize(items: readonly Item[], at: number): boolean {
  const [name, relation] = [items[at - 2], items[at - 1]];
  return name?.kind === 'word' && name.word === 'n' && relation?.kind === 'relation'
    && relation.relation === '=';
}

// 35 of 203 patients (17%)   45/120 (37.5%)   34 out of the 182
function withTotal(text: string, items: readonly Item[], number: CountNumber): Found | undefined {
  const slash = items[number.end]?.kind === 'slash';
  const spoken = afterOf(items, number.end) ?? afterAmong(items, number.end);
  const start = slash ? number.end + 1 : spoken;
  const total = start === undefined ? undefined : wholeNumber(text, items, start);
  if (total === undefined || items[total.end]?.kind === 'slash') return undefined;
  const bracket = openWithin(items, total.end, 5);
  const percent = bracket === undefined ? undefined : percentAt(items, bracket + 1);
  const isSingle = bracket !== undefined && endsQuantity(items, bracket + 2);
  if (percent !== undefined && isSingle) {
    return found(items, { count: number.printed, total: total.printed, percent }, bracket as number + 2);
  }
  if (!isPlausible(number.printed, total.printed, slash)) return undefined;
  return found(items, { count: number.printed, total: total.printed }, total.end);
}

// 45/120   but not: 2008/2009   1/2   01/001   120/80
function isPlausible(count: Printed, total: Printed, slash: boolean): boolean {
  if (count.value > total.value) return false;
  const isSeason = count.value >= 1900 && total.value - count.value <= 1;
  const isPadded = count.plain.length > 1 && count.plain.startsWith('0');
  return !slash || !(isSeason || isPadded || total.value < 5);
}

function afterOf(items: readonly Item[], at: number): number | undefined {
  const words = ['out', 'of', 'the', 'all', 'these'];
  let next = at;
  let isOf = false;
  for (; next < at + 4; next++) {
    const item = items[next];
    if (item?.kind !== 'word' || !words.includes(item.word)) break;
    isOf ||= item.word === 'of';
  }
  return isOf ? next : undefined;
}

/** Of these there may be some among patients that are no share of them. */
const OF_STUDIES = new Set([
  'countries', 'centers', 'centres', 'sites', 'options', 'trials', 'studies', 'hospitals',
  'treatment', 'treatments', 'groups', 'arms', 'doses', 'questions', 'items', 'variables',
]);

// 26 among the 194 children   23 events occurred among 189 children
//    ^^^^^^^^^                   ^^^^^^^^^^^^^^^^^^^^^
function afterAmong(items: readonly Item[], at: number): number | undefined {
  for (let next = at; next < at + 4; next++) {
    const item = items[next];
    if (item?.kind !== 'word' || isTime(item) || OF_STUDIES.has(item.word)) return undefined;
    if (item.word !== 'among') continue;
    const article = items[next + 1];
    const isThe = article?.kind === 'word' && (article.word === 'the' || article.word === 'all');
    return isThe ? next + 2 : next + 1;
  }
  return undefined;
}

/** The bracket that opens within so many words. */
function openWithin(items: readonly Item[], at: number, words: number): number | undefined {
  for (let next = at; next < at + words; next++) {
    const item = items[next];
    if (item?.kind === 'open') return next;
    const isAttached = item?.kind === 'number' && item.attached;
    const passes = item?.kind === 'word' || item?.kind === 'name' || item?.kind === 'dash' || isAttached;
    if (!passes || (item?.kind === 'word' && isTime(item))) return undefined;
  }
  return undefined;
}

const TIMES = new Set([
  'months', 'month', 'years', 'year', 'yrs', 'weeks', 'week', 'days', 'day', 'hours', 'minutes',
  'mg', 'kg', 'g', 'ml', 'mm', 'cm', 'mmhg', 'points', 'mo', 'yr', 'h', 'min',
]);

function isTime(item: Item): boolean {
  return item.kind === 'word' && TIMES.has(item.word);
}

function endsQuantity(items: readonly Item[], at: number): boolean {
  const item = items[at];
  return item?.kind !== 'dash' && item?.kind !== 'number' && item?.kind !== 'plus-minus'
    && !(item?.kind === 'word' && item.word === 'to');
}

// 85 patients (64.4%)   19 (29%) of 66   15 (12% of 125)   n = 54; 11%
function withPercent(
  text: string,
  items: readonly Item[],
  at: number,
  number: CountNumber,
): Found | undefined {
  if (isSampleSize(items, at)) return sampleWithPercent(items, number);
  const bracket = openWithin(items, number.end, 7);
  if (bracket === undefined) return undefined;
  const percent = percentAt(items, bracket + 1);
  if (percent === undefined || !endsQuantity(items, bracket + 2)) return undefined;
  const count = number.printed;
  const isClosed = items[bracket + 2]?.kind === 'close';
  const start = afterOf(items, bracket + (isClosed ? 3 : 2));
  const total = start === undefined ? undefined : wholeNumber(text, items, start);
  const isShareOfOther = !isClosed && start !== undefined && total === undefined;
  if (isShareOfOther) return undefined;
  if (total === undefined) return found(items, { count, percent }, bracket + 2);
  return found(items, { count, percent, total: total.printed }, total.end);
}

function sampleWithPercent(items: readonly Item[], number: CountNumber): Found | undefined {
  const separator = items[number.end]?.kind;
  const percent = percentAt(items, number.end + 1);
  const joined = separator === 'semicolon' || separator === 'comma' || separator === 'open';
  if (!joined || percent === undefined || !endsQuantity(items, number.end + 2)) return undefined;
  return found(items, { count: number.printed, percent }, number.end + 2);
}

// 90% [44/49]   84.6% (n=369)   43% (26 of 60)   18% (5)
function behindPercent(
  text: string,
  items: readonly Item[],
  at: number,
  percent: Printed,
): Found | undefined {
  if (items[at + 1]?.kind !== 'open') return undefined;
  const start = isSampleSize(items, at + 4) ? at + 4 : at + 2;
  const number = wholeNumber(text, items, start);
  if (number === undefined) return undefined;
  const slash = items[number.end]?.kind === 'slash';
  const totalStart = slash ? number.end + 1 : afterOf(items, number.end);
  const total = totalStart === undefined ? undefined : wholeNumber(text, items, totalStart);
  const end = total?.end ?? number.end;
  if (total === undefined && items[end]?.kind !== 'close') return undefined;
  const count = { count: number.printed, percent };
  return found(items, total === undefined ? count : { ...count, total: total.printed }, end);
}

/** The count, from its first number to the bracket that closes behind its last. */
function found(items: readonly Item[], parts: Omit<Count, 'span'>, end: number): Found {
  const spans = [parts.count, parts.total, parts.percent].flatMap((part) => part?.span ?? []);
  const [first, ...others] = spans;
  if (first === undefined) throw new Error('a count without a number');
  const close = items[end];
  const whole = close?.kind === 'close' ? cover(first, ...others, close.span) : cover(first, ...others);
  return { count: { ...parts, span: whole }, end };
}
