import { cover, type Result, type Span } from '../../model/index.ts';
import type { Passage } from '../parse/passage.ts';
import type { Token } from '../token.ts';

/**
 * The words that may speak of one result: in its sentence, from the result before
 * it up to its own end, and for the last result of a sentence what follows too.
 */
export interface Reach {
  readonly result: Result;
  readonly sentence: Span;
  /** Whether another result stands before it in the sentence. */
  readonly follows: boolean;
  readonly before: readonly Token[];
  /** The words between its first number and its last. */
  readonly inside: readonly Token[];
  readonly behind: readonly Token[];
}

/** The reach of each result of a passage, in reading order. */
export function reachesOf(
  passage: Passage,
  tokens: readonly Token[],
  results: readonly Result[],
): readonly Reach[] {
  const words = tokensInSentences(passage, tokens);
  const bySentence = new Map<number, Result[]>();
  for (const result of results) {
    const sentence = sentenceOf(passage, result.span.start);
    const others = bySentence.get(sentence);
    if (others === undefined) bySentence.set(sentence, [result]);
    else others.push(result);
  }
  return [...bySentence].flatMap(([sentence, own]) =>
    own.map((result, index) =>
      reachOf(passage, words[sentence] ?? [], sentence, own, result, index),
    ),
  );
}

function reachOf(
  { sentenceSpans }: Passage,
  words: readonly Token[],
  sentence: number,
  own: readonly Result[],
  result: Result,
  index: number,
): Reach {
  const next = own[index + 1];
  const previous = own[index - 1];
  const { start, end } = numbersOf(result);
  const leading = between(words, previous === undefined ? -1 : numbersOf(previous).end, start);
  const trailing = between(words, end, next === undefined ? Infinity : numbersOf(next).start);
  return {
    result,
    sentence: sentenceSpans[sentence] ?? result.span,
    follows: previous !== undefined,
    before: previous === undefined ? leading : leading.slice(afterthought(leading)),
    inside: between(words, start, end),
    behind:
      next === undefined
        ? trailing
        : trailing.slice(0, predicate(trailing) || afterthought(trailing)),
  };
}

function between(words: readonly Token[], from: number, to: number): readonly Token[] {
  return words.filter(({ span }) => span.start >= from && span.end <= to);
}

const JOINS = new Set(['and', 'while', 'whereas', 'but']);
const VERBS = new Set(['was', 'were', 'is', 'are', 'had', 'did', 'has', 'have', 'showed']);

/**
 * How many of the words between two results still speak of the first: those up to
 * a conjunction that begins a clause of its own.
 *
 * ```
 * the HR was 1.34 (0.96–1.87), a significant increase, and for the others it was 1.22
 *                              ^^^^^^^^^^^^^^^^^^^^^^
 * ```
 */
function afterthought(words: readonly Token[]): number {
  const join = words.findIndex(({ word }) => JOINS.has(word));
  if (join < 0) return 0;
  return words.slice(join).some(({ word }) => VERBS.has(word)) ? join : 0;
}

const MULTIPLIERS = new Set(['times', 'fold']);

/**
 * How many of the words between two results go on with the first: a verb right
 * behind it, or "times", and what belongs to that.
 *
 * ```
 * dust (OR 2.1 …) was associated with cough, as was salt     had 2.0 (1.7–2.4) times the risk, and
 *                 ^^^^^^^^^^^^^^^^^^^^^^^^^^                                    ^^^^^^^^^^^^^^
 * ```
 */
function predicate(words: readonly Token[]): number {
  const first = words.findIndex(({ kind }) => kind === 'word');
  const closed = words.findLastIndex(({ kind }, at) => kind === 'close' && at < 14);
  const start = Math.max(
    first,
    words.findIndex(({ kind }, at) => kind === 'word' && at > closed),
  );
  const { word } = words[start] ?? { word: '' };
  if (!VERBS.has(word) && !MULTIPLIERS.has(word)) return 0;
  const end = words.findIndex(
    ({ kind, word: joint }, at) =>
      at > start
      && (kind === 'comma' || kind === 'semicolon' || kind === 'open' || JOINS.has(joint)),
  );
  return Math.max(0, end);
}

/** Where the estimate and interval stand; words may come between them and the p-value. */
function numbersOf({ estimate, interval, span }: Result): Span {
  const parts = [estimate?.span, interval?.span].filter((part) => part !== undefined);
  const [first, ...others] = parts;
  return first === undefined ? span : cover(first, ...others);
}

function sentenceOf({ sentenceSpans }: Passage, offset: number): number {
  let low = 0;
  let high = sentenceSpans.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((sentenceSpans[middle] as Span).start <= offset) low = middle + 1;
    else high = middle;
  }
  return low - 1;
}

function tokensInSentences(passage: Passage, tokens: readonly Token[]): readonly Token[][] {
  const sentences: Token[][] = passage.sentenceSpans.map(() => []);
  let sentence = 0;
  for (const token of tokens) {
    while ((passage.sentenceSpans[sentence + 1]?.start ?? Infinity) <= token.span.start) sentence++;
    sentences[sentence]?.push(token);
  }
  return sentences;
}
