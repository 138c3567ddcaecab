import type { Claim } from '../../model/index.ts';
import { directionIn, type SaidOfDirection } from './direction.ts';
import type { Token } from '../token.ts';
import { firstClause, hasTurn, hasVerb, saidBefore } from './clauses.ts';
import type { Reach } from './reach.ts';
import { elliptic, type SaidOfSignificance, significanceIn } from './significance.ts';
import { NEGATIONS } from './negation.ts';
import { scaleIn } from './scale.ts';
import { sizeIn } from './size.ts';

/**
 * What sentences say of their results, given the words within each result's reach:
 * significance, direction, size, and whether they speak of odds, hazards or risks.
 */
export function findClaims(reaches: readonly Reach[]): readonly Claim[] {
  return bySentence(reaches).flatMap((sentence) => {
    const significance = throughList(sentence, significanceOf, significanceBefore, significanceBehind);
    const direction = throughList(withListWords(sentence), directionOf, directionBefore, directionBehind);
    return sentence.flatMap((reach, index) =>
      claimsOf(reach, significance[index], direction[index]),
    );
  });
}

function bySentence(reaches: readonly Reach[]): readonly (readonly Reach[])[] {
  const sentences: Reach[][] = [];
  for (const reach of reaches) {
    if (reach.follows) sentences.at(-1)?.push(reach);
    else sentences.push([reach]);
  }
  return sentences;
}

/**
 * What is said of each result of a sentence; one further down a list shares what
 * was said before it, and what follows a list holds for all of it, up to a turn.
 *
 * ```
 * was associated with smoking (OR 2.1 …), obesity (OR 1.8 …) and age (OR 1.1 …)
 * smoking (OR 2.1 …) and obesity (OR 1.8 …) were associated with relapse
 * ```
 */
function throughList<Said>(
  sentence: readonly Reach[],
  own: (reach: Reach) => Said | undefined,
  before: (reach: Reach) => Said | undefined,
  behind: (reach: Reach) => Said | undefined,
): readonly (Said | undefined)[] {
  let shared: Said | undefined;
  const answers = sentence.map((reach) => {
    if (!goesOn(reach)) shared = undefined;
    shared = before(reach) ?? shared;
    return own(reach) ?? shared;
  });
  const trailing = sentence.at(-1) === undefined ? undefined : behind(sentence.at(-1) as Reach);
  for (let at = answers.length - 1; at >= 0; at--) {
    answers[at] ??= trailing;
    if (hasTurn((sentence[at] as Reach).before)) break;
  }
  return answers;
}

/** Whether a result further down a list shares what was said before it. */
function goesOn({ before }: Reach): boolean {
  const denies = hasVerb(before) && before.some(({ word }) => NEGATIONS.has(word));
  return !denies && !hasTurn(before);
}

/**
 * The results of a sentence, those without a verb of their own with the words of
 * those before them: a list says once which way all of it points.
 */
function withListWords(sentence: readonly Reach[]): readonly Reach[] {
  let words: readonly Token[] = [];
  return sentence.map((reach) => {
    const isListed = reach.follows && !hasVerb(reach.before) && goesOn(reach);
    words = isListed ? [...words, ...reach.before].slice(-LONGEST_LIST) : reach.before;
    return { ...reach, before: words };
  });
}

/** The words of a list are followed back so far and no further, in tokens. */
const LONGEST_LIST = 200;

/** Words behind a result outweigh those before it only where they state significance. */
function significanceOf(reach: Reach): SaidOfSignificance | undefined {
  const own = significanceBefore(reach);
  const after = significanceBehind(reach);
  return after?.manner === 'stated' && own?.manner !== 'stated' ? after : (own ?? after);
}

const significanceBefore = ({ before }: Reach) =>
  saidBefore(before, (clause, turned) => significanceIn(clause) ?? elliptic(clause, turned));

const significanceBehind = ({ behind }: Reach) => significanceIn(firstClause(behind));

const directionOf = (reach: Reach): SaidOfDirection | undefined =>
  directionBefore(reach) ?? directionBehind(reach);

const directionBefore = ({ before, result }: Reach) =>
  saidBefore(before, (clause) => directionIn(clause, result));

const directionBehind = ({ behind, result }: Reach) => directionIn(firstClause(behind), result);

function claimsOf(
  { result, sentence, before, behind }: Reach,
  significance: SaidOfSignificance | undefined,
  direction: SaidOfDirection | undefined,
): readonly Claim[] {
  const common = { sentence, of: result };
  const size = saidBefore(before, sizeIn) ?? sizeIn(firstClause(behind));
  const scale = saidBefore(before, scaleIn);
  const claims: Claim[] = [];
  if (significance !== undefined) claims.push({ kind: 'significance', ...common, ...significance });
  if (direction !== undefined) claims.push({ kind: 'direction', ...common, ...direction });
  if (size !== undefined) {
    claims.push({
      kind: 'size',
      ...common,
      ...size,
      ...(scale === undefined ? {} : { scale: scale.scale }),
    });
  }
  if (scale !== undefined) claims.push({ kind: 'scale', ...common, ...scale });
  return claims;
}
