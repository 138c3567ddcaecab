import { cover, type PValue, type Relation } from '../../model/index.ts';
import { findPhrase } from '../phrases.ts';
import type { Token } from '../token.ts';
import { SPOKEN_RELATIONS } from '../vocabulary.ts';
import type { PValueItem, Recognised } from './item.ts';

const P_WORDS = new Set(['p', 'ρ', 'ptrend', 'pinteraction', 'pint', 'phet', 'pheterogeneity',
  'pvalue', 'pvalues', 'plogrank', 'pdiff', 'pdifference', 'pcorr', 'padj', 'padjusted', 'ps']);

/**
 * The p-value that begins at token `at`.
 *
 * ```
 * P < 0.001     p=·03     P value of 0.03     P for trend = 0.02     p(interaction) 0.4
 * ^^^^^^^^^     ^^^^^     ^^^^^^^^^^^^^^^     ^^^^^^^^^^^^^^^^^^     ^^^^^^^^^^^^^^^^^^
 * ```
 */
export function readPValue(
  tokens: readonly Token[],
  at: number,
): Recognised<PValueItem> | undefined {
  const first = tokens[at] as Token;
  if (!P_WORDS.has(first.word)) return undefined;
  const heading = readHeading(tokens, at);
  const relation = readRelation(tokens, heading.end);
  const number = tokens[relation.end];
  if (number?.kind !== 'number' || number.printed === undefined) return undefined;
  if (!relation.said && !standsAlone(tokens, at, number, heading.value)) return undefined;
  const oneSided = sidedness(tokens, at, relation.end + 1);
  const span = cover(first.span, number.span);
  const value: PValue = {
    relation: relation.relation,
    printed: number.printed,
    tests: heading.tests,
    ...(oneSided === undefined ? {} : { oneSided }),
    span,
  };
  const shared = isShared(tokens, at, relation.end + 1);
  return { item: { kind: 'p', span, spaced: first.spaced, value, shared }, end: relation.end + 1 };
}

interface Heading {
  readonly end: number;
  readonly tests: PValue['tests'];
  /** Whether it says "value", so that a number may follow without a relation. */
  readonly value: boolean;
}

const TESTS: Readonly<Record<string, PValue['tests']>> = {
  trend: 'trend', trends: 'trend', linear: 'trend', ptrend: 'trend',
  interaction: 'interaction', interactions: 'interaction', int: 'interaction',
  pinteraction: 'interaction', pint: 'interaction',
  heterogeneity: 'heterogeneity', het: 'heterogeneity', phet: 'heterogeneity',
  pheterogeneity: 'heterogeneity',
};

const HEADING_WORDS = new Set(['value', 'values', 'val', 'for', 'of', 'the', 'linear', 'trend',
  'trends', 'interaction', 'interactions', 'int', 'heterogeneity', 'het', 'difference', 'test',
  'non', 'inferiority', 'noninferiority', 'superiority', 'log', 'rank', 'logrank', 'adjusted', 'adj', 'corrected', 'comparison', 'overall', 'all']);

/** Reads on over "value for trend" up to where a relation or the number must stand. */
function readHeading(tokens: readonly Token[], at: number): Heading {
  let tests = TESTS[(tokens[at] as Token).word] ?? 'result';
  let value = (tokens[at] as Token).word.startsWith('pvalue');
  let end = at + 1;
  for (; end < Math.min(tokens.length, at + 9); end++) {
    const { kind, word } = tokens[end] as Token;
    const passes = kind === 'dash' || kind === 'open' || kind === 'close' || kind === 'raised'
      || word === '_' || (kind === 'word' && HEADING_WORDS.has(word)) || isSubscript(tokens, end);
    if (!passes || (word === 'of' && tokens[end + 1]?.kind === 'number')) break;
    tests = TESTS[word] ?? tests;
    value ||= word === 'value' || word === 'values';
  }
  return { end, tests, value };
}

// P m = 0.60
//   ^
function isSubscript(tokens: readonly Token[], at: number): boolean {
  const { kind, word } = tokens[at] as Token;
  return kind === 'word' && word.length === 1 && tokens[at + 1]?.relation !== undefined;
}

interface Spoken {
  readonly relation: Relation;
  readonly said: boolean;
  readonly end: number;
}

function readRelation(tokens: readonly Token[], at: number): Spoken {
  let end = at;
  while (tokens[end]?.kind === 'colon' || tokens[end]?.kind === 'comma') end++;
  const token = tokens[end];
  if (token?.relation !== undefined) {
    const doubled = tokens[end + 1]?.relation !== undefined ? 1 : 0;
    return { relation: token.relation, said: true, end: end + 1 + doubled };
  }
  if (token?.kind === 'word') {
    const spoken = findPhrase(SPOKEN_RELATIONS, tokens, end);
    if (spoken !== undefined) return { relation: spoken.meaning, said: true, end: spoken.end };
  }
  return { relation: '=', said: false, end };
}

// p .03   p 0.03   P-value 0.03   but not: vitamin P 3
function standsAlone(
  tokens: readonly Token[],
  at: number,
  number: Token,
  value: boolean,
): boolean {
  const plain = number.printed?.plain ?? '';
  const fraction = plain.startsWith('.') || plain.startsWith('0.');
  return fraction && (value || number.span.start - (tokens[at] as Token).span.end <= 3);
}

/** Whether the words around say "one-sided" or "two-tailed". */
function sidedness(tokens: readonly Token[], at: number, end: number): boolean | undefined {
  for (const from of [at - 4, at - 3, at - 2, at - 1, end, end + 1]) {
    const [first, second, third] = [tokens[from], tokens[from + 1], tokens[from + 2]];
    const word = first?.printed?.plain ?? first?.word;
    const sided = second?.kind === 'dash' ? third?.word : second?.word;
    if (sided !== 'sided' && sided !== 'tailed' && sided !== 'tail') continue;
    if (word === 'one' || word === '1') return true;
    if (word === 'two' || word === '2') return false;
  }
  return undefined;
}

// P<0.001 for all three comparisons   both p < 0.05   all P<.01
//         ^^^^^^^                     ^^^^
function isShared(tokens: readonly Token[], at: number, end: number): boolean {
  const several = (word: string | undefined) => word === 'all' || word === 'both' || word === 'each';
  if (several(tokens[at - 1]?.word)) return true;
  return tokens[end]?.word === 'for' && several(tokens[end + 1]?.word);
}
