import type { Reading, Span } from '../model/index.ts';
import { type BareNumber, numbersIn } from './numbers-in-text.ts';

/** A whole and the groups it is divided into, as one sentence prints them. */
export interface DividedWhole {
  readonly total: BareNumber;
  readonly groups: readonly BareNumber[];
  /** From the total to the last group. */
  readonly span: Span;
  /** All whole numbers of the sentence, among which another total may be. */
  readonly others: readonly number[];
}

/** Words by which people come into groups. */
const DIVIDED = new RegExp(
  String.raw`\b(?:randomi[sz]ed|assigned|allocated|divided|split|separated|classified`
    + String.raw`|categori[sz]ed|stratified)\b`,
  'gi',
);

const PEOPLE = '(?:patients|participants|subjects|persons|people|individuals|women|men|children'
  + '|infants|adults|residents|students|volunteers|pregnancies|mothers|girls|boys|eyes|neonates'
  + '|newborns|workers|cases|smokers|mice|rats|physicians|nurses|animals|adolescents|veterans)';

// 275 resident physicians   172 (65%) patients   76 were randomized
const WHOLE = new RegExp(
  String.raw`^\s*(?:\([^()]{1,12}\)\s*)?(?:(?:[\p{L}-]+\s+){0,3}${PEOPLE}\b|(?:were|was)\b)`,
  'iu',
);

const OBJECT = new RegExp(String.raw`^\s+(?:[\p{L}-]+\s+){0,3}${PEOPLE}\b`, 'iu');

// to brevane (n = 259) or placebo (253 patients)
//            ^^^^^^^^^             ^^^^^^^^^^^^^^
const IN_BRACKETS = new RegExp(
  String.raw`[([](?:n\s*=\s*(?<named>\d[\d,]*)|(?<told>\d[\d,]*)\s+${PEOPLE})\s*[)\];,:]`, 'giu');

// 60 to brevane and 62 to placebo    148 were assigned to brevane
const BEFORE_TO = new RegExp(
  String.raw`(?<![\d.,:/-])(?<told>\d[\d,]*)(?:\s+${PEOPLE})?(?:\s+were)?`
    + String.raw`(?:\s+(?:assigned|allocated|randomi[sz]ed))?\s+(?:in)?to\s+(?!\d)`,
  'giu',
);

/** Every sentence that prints a whole and, behind a word for dividing, the sizes of its groups. */
export function dividedWholes({ manuscript }: Reading): readonly DividedWhole[] {
  const { blocks, text } = manuscript;
  return blocks.filter(({ kind }) => kind === 'paragraph')
    .flatMap(({ span }) => sentencesIn(text, span))
    .flatMap((sentence) => dividedWhole(text, sentence));
}

function sentencesIn(text: string, { start, end }: Span): readonly Span[] {
  const cuts = [...text.slice(start, end).matchAll(/[.;]\s+(?=\p{Lu})/gu)]
    .map(({ 0: cut, index }) => start + index + cut.length);
  return [start, ...cuts].map((from, at) => ({ start: from, end: cuts[at] ?? end }));
}

/** A sentence is not as long as this; what is, is no prose. */
const LONGEST_SENTENCE = 1500;

function dividedWhole(text: string, sentence: Span): readonly DividedWhole[] {
  if (sentence.end - sentence.start > LONGEST_SENTENCE) return [];
  const words = text.slice(sentence.start, sentence.end);
  const numbers = numbersIn(text, sentence).filter(({ decimals }) => decimals === 0);
  for (const { 0: verb, index } of words.matchAll(DIVIDED)) {
    const from = sentence.start + index;
    const end = from + verb.length;
    const total = numbers.findLast(({ span }) => span.end <= from && isWhole(text, span, from))
      ?? numbers.find(({ span }) => span.start >= end && isObject(text, span, end));
    if (total === undefined) continue;
    const zone = { start: Math.max(end, total.span.end), end: sentence.end };
    const groups = groupsIn(text, zone, numbers);
    const last = groups.at(-1);
    if (last === undefined || groups.length < 2) continue;
    const others = numbers.map(({ value }) => value);
    return [{ total, groups, others, span: { start: total.span.start, end: last.span.end } }];
  }
  return [];
}

// we randomly assigned 2840 women to receive
//                      ^^^^
function isObject(text: string, { start, end }: Span, verb: number): boolean {
  return /^\s+(?:a total of\s+)?$/.test(text.slice(verb, start))
    && OBJECT.test(text.slice(end, end + 60));
}

/** Before these a number is a bound, a ratio, or the size of a larger whole. */
const PART = /[(=<>≥≤~/-]\s*$|\d\s?:\s*$|\bof\s+(?:the\s+)?$/i;

/** The words up to the verb, and a little more, make the number before it one of people. */
function isWhole(text: string, { start, end }: Span, verb: number): boolean {
  const before = text.slice(Math.max(0, start - 10), start);
  const isPart = PART.test(before) && !/\btotal of\s*$/i.test(before);
  return !isPart && WHOLE.test(text.slice(end, verb + 4));
}

function groupsIn(
  text: string,
  zone: Span,
  numbers: readonly BareNumber[],
): readonly BareNumber[] {
  const words = text.slice(zone.start, zone.end);
  const starts = (pattern: RegExp): readonly number[] =>
    [...words.matchAll(pattern)].map(({ 0: all, index, groups }) =>
      zone.start + index + all.indexOf(groups?.['named'] ?? groups?.['told'] ?? ''));
  const inBrackets = starts(IN_BRACKETS);
  const found = inBrackets.length > 0 ? inBrackets : starts(BEFORE_TO);
  return found.flatMap((start) => numbers.find(({ span }) => span.start === start) ?? []);
}
