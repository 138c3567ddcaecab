import {
  type Block, indexAt, type Judgement, quote, type Reading, type Result, type SectionRole,
  type Span, type Verdict,
} from '../model/index.ts';
import { flowing } from './wording.ts';

/** Words of the article's own prose that a rule listens for, and the sentence they stand in. */
export interface Saying {
  readonly span: Span;
  /** The sentence in one line, without line breaks. */
  readonly sentence: string;
  readonly sentenceSpan: Span;
  readonly role: SectionRole;
  /** What the groups of the pattern caught: "0.71" in "AUC of 0.71". */
  readonly parts: readonly (string | undefined)[];
}

const PROSE: ReadonlySet<Block['kind']> = new Set(['title', 'paragraph', 'caption']);

/**
 * Every place in the prose of a manuscript at which a pattern stands, in reading order:
 * titles, paragraphs and captions, but no table, no note under one and no reference.
 * The pattern is global. Costs one pass over the text.
 */
export function sayings({ manuscript }: Reading, pattern: RegExp): readonly Saying[] {
  return manuscript.blocks.filter(isProse).flatMap(({ span, section }) => {
    const words = manuscript.text.slice(span.start, span.end);
    return [...words.matchAll(pattern)].map((match): Saying => {
      const [from, to] = sentenceAround(words, match.index, match.index + match[0].length);
      return {
        span: shifted(span.start, match.index, match.index + match[0].length),
        sentence: flowing(words.slice(from, to)),
        sentenceSpan: shifted(span.start, from, to),
        role: section.role,
        parts: match.slice(1),
      };
    });
  });
}

/** What a rule has to say of each saying, marked where it stands; nothing where it has nothing. */
export function judgeSayings(
  reading: Reading,
  pattern: RegExp,
  judge: (saying: Saying) => Verdict | undefined,
): readonly Judgement[] {
  return sayings(reading, pattern).flatMap((saying) => {
    const verdict = judge(saying);
    return verdict === undefined ? [] : [{ verdict, span: saying.span, marks: [saying.span] }];
  });
}

function isProse({ kind, section }: Block): boolean {
  return PROSE.has(kind) && section.role !== 'references';
}

function shifted(by: number, start: number, end: number): Span {
  return { start: by + start, end: by + end };
}

/** A sentence is followed to either side so far and no further, in characters. */
const LONGEST = 700;

/** Where one sentence ends and the next begins; "vs. " and "Fig. 2" end none. */
// … in either group. The odds ratio …
//                  ^^^
const STOP = new RegExp(
  '(?<!\\b(?:vs|cf|e\\.g|i\\.e|al|Fig|approx|Dr|No|resp'
    + '|ref))[.?!]["”’)\\]]*\\s+(?=[“"(\\[]?\\p{Lu})',
  'gu',
);

function sentenceAround(words: string, start: number, end: number): readonly [number, number] {
  const first = Math.max(0, start - LONGEST);
  const before = [...words.slice(first, start).matchAll(STOP)].at(-1);
  const after = words.slice(end, end + LONGEST).search(STOP);
  const last = after < 0 ? Math.min(words.length, end + LONGEST) : end + after + 1;
  return [before === undefined ? first : first + before.index + before[0].length, last];
}

/** The words of a claim in one line, with the percent sign that belongs to their number. */
export function wordsOfClaim({ manuscript }: Reading, span: Span): string {
  const isPercent = /^\s?%/.test(manuscript.text.slice(span.end, span.end + 2))
    && /\d$/.test(quote(manuscript.text, span));
  return `${flowing(quote(manuscript.text, span))}${isPercent ? '%' : ''}`;
}

/** The results that stand wholly within a span, in reading order. Costs a binary search. */
export function resultsWithin({ findings }: Reading, span: Span): readonly Result[] {
  const { results } = findings;
  const within: Result[] = [];
  for (let at = indexAt(results, span.start - 1) + 1; at < results.length; at++) {
    const result = results[at] as Result;
    if (result.span.start >= span.end) break;
    if (result.span.end <= span.end) within.push(result);
  }
  return within;
}

/**
 * Judgements of the lowest voice with all that disagree told once: the first speaks, and
 * says how many places more it holds for. What agrees or cannot be judged stays as it is.
 */
export function toldOnce(
  { manuscript }: Reading,
  judgements: readonly Judgement[],
): readonly Judgement[] {
  const [first, ...more] = judgements.filter(({ verdict }) => verdict.outcome === 'disagrees');
  if (first?.verdict.outcome !== 'disagrees' || more.length === 0) return judgements;
  const { verdict } = first;
  const words = more.map(({ span }) => `“${clipped(flowing(quote(manuscript.text, span)))}”`);
  const count = `${more.length} ${more.length === 1 ? 'place' : 'places'} more`;
  const told: Judgement = {
    ...first,
    verdict: {
      ...verdict,
      because: `${verdict.because}; the same holds in ${count}`,
      working: [...verdict.working, `also: ${[...new Set(words)].slice(0, SHOWN).join('; ')}`],
    },
  };
  return judgements.flatMap((judgement) => {
    if (judgement === first) return [told];
    return judgement.verdict.outcome === 'disagrees' ? [] : [judgement];
  });
}

/** So many of the other places are quoted. */
const SHOWN = 5;

function clipped(words: string): string {
  return words.length > 90 ? `${words.slice(0, 88)}…` : words;
}
