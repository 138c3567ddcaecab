import type { Token } from '../token.ts';

const TURNS = new Set([
  'but', 'whereas', 'while', 'although', 'though', 'however', 'yet', 'except',
]);

const VERBS = new Set((
  'was were is are had did has have showed shows found observed associated remained became '
  + 'increased decreased reduced raised lowered predicted developed died occurred'
).split(' '));

/** Whether a clause has a verb of its own, so that it need not borrow one from before. */
export function hasVerb(tokens: readonly Token[]): boolean {
  return tokens.some((_, at) => isVerb(tokens, at));
}

/** Whether a verb says something here; one behind "to" does not: "likely to have". */
export function isVerb(tokens: readonly Token[], at: number): boolean {
  return VERBS.has(tokens[at]?.word ?? '') && tokens[at - 1]?.word !== 'to';
}

/** Whether the sentence turns on the way to a result, so that lists end there. */
export function hasTurn(tokens: readonly Token[]): boolean {
  return tokens.some(({ word }) => TURNS.has(word));
}

/** A clause, and whether a word that turns the sentence begins it. */
interface Clause {
  readonly tokens: readonly Token[];
  readonly turned: boolean;
}

/**
 * The clauses before a result, the nearest first. They end at words that turn the
 * sentence and at semicolons outside brackets.
 *
 * ```
 * survival was longer (15 versus 11 months; HR 0.78)     predictors of cough; dust (OR 2.1)
 *                                         no clause                         ^
 * ```
 */
function clausesOf(tokens: readonly Token[]): readonly Clause[] {
  const clauses: Clause[] = [];
  let [start, depth, turned] = [0, 0, false];
  tokens.forEach(({ kind, word }, at) => {
    if (kind === 'open') depth++;
    if (kind === 'close') depth = Math.max(0, depth - 1);
    const turns = TURNS.has(word) || isStop(tokens, at);
    if (!turns && !(kind === 'semicolon' && depth === 0)) return;
    clauses.push({ tokens: tokens.slice(start, at), turned });
    [start, turned] = [at + 1, turns];
  });
  clauses.push({ tokens: tokens.slice(start), turned });
  return clauses.reverse();
}

// "… were few., Main results, Six trials": a sentence's end that a heading hides
function isStop(tokens: readonly Token[], at: number): boolean {
  return tokens[at]?.word === '.' && tokens[at + 1]?.kind === 'comma';
}

/** Words by which a clause goes on speaking of what was said before it. */
const ANAPHORS = new Set([
  'this', 'these', 'it', 'difference', 'differences', 'benefit', 'which', 'not',
]);

/**
 * What the clauses before a result say: the nearest one, or one further off where
 * the nearest only goes on about it.
 *
 * ```
 * predictors of cough; dust (OR 2.1)     was higher, but this was not significant (OR 1.2)
 * ^^^^^^^^^^           ^^^^                  ^^^^^^      ^^^^
 * ```
 */
export function saidBefore<Said>(
  tokens: readonly Token[],
  find: (clause: readonly Token[], turned: boolean) => Said | undefined,
): Said | undefined {
  for (const clause of clausesOf(tokens)) {
    const said = find(clause.tokens, clause.turned);
    if (said !== undefined) return said;
    const goesOn = clause.tokens.slice(0, 4).some(({ word }) => ANAPHORS.has(word));
    const isList = !clause.turned && !hasVerb(clause.tokens);
    if (!isList && !(goesOn && hasVerb(clause.tokens))) return undefined;
  }
  return undefined;
}

/**
 * The clause that follows a result, with what stands behind it in its own bracket:
 * up to a semicolon, a new subject, or a turn that does not speak of the result.
 */
export function firstClause(tokens: readonly Token[]): readonly Token[] {
  const from = afterBrackets(tokens);
  for (let at = from; at < tokens.length; at++) {
    const { kind, word } = tokens[at] as Token;
    const isAside = tokens[at - 1]?.kind === 'close' || tokens[at - 1]?.kind === 'comma';
    const isNew =
      word === 'and' || isStop(tokens, at) || (isAside && (word === 'with' || word === 'without'));
    if (kind === 'semicolon' || isNew) return tokens.slice(0, at);
    if (TURNS.has(word) && !speaksOn(tokens, at)) return tokens.slice(0, at);
  }
  return tokens;
}

/** The index behind the brackets that close around a result: "…; p = 0.03) was". */
function afterBrackets(tokens: readonly Token[]): number {
  let [depth, after] = [0, 0];
  for (let at = 0; at < Math.min(tokens.length, 24); at++) {
    const { kind } = tokens[at] as Token;
    if (kind === 'open') depth++;
    if (kind !== 'close') continue;
    if (depth === 0) after = at + 1;
    else depth--;
  }
  return after;
}

// 1.5 (0.9–2.3), although this was not significant   0.88 (0.69–1.12) but was not significant
//                ^^^^^^^^^^^^^                                         ^^^^^^^
function speaksOn(tokens: readonly Token[], at: number): boolean {
  const next = tokens[at + 1]?.word ?? '';
  if (isVerb(tokens, at + 1) || next === 'not') return true;
  const named = next === 'the' || next === 'possible' ? tokens[at + 2] : tokens[at + 1];
  return (
    ANAPHORS.has(named?.word ?? '') || (next === 'the' && ANAPHORS.has(tokens[at + 3]?.word ?? ''))
  );
}
