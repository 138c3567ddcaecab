import type { Claim } from '../../model/index.ts';
import { directionIn, type SaidOfDirection } from './direction.ts';
import { firstClause, hasTurn, lastClause, type Reach } from './reach.ts';
import { type SaidOfSignificance, significanceIn } from './significance.ts';
import { scaleIn, sizeIn } from './size.ts';

/**
 * What sentences say of their results, given the words within each result's reach:
 * significance, direction, size, and whether they speak of odds, hazards or risks.
 */
export function findClaims(reaches: readonly Reach[]): readonly Claim[] {
  return bySentence(reaches).flatMap((sentence) => {
    const significance = throughList(sentence, significanceOf, significanceBehind);
    const direction = throughList(sentence, directionOf, directionBehind);
    return sentence.flatMap((reach, index) => claimsOf(reach, significance[index], direction[index]));
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
  behind: (reach: Reach) => Said | undefined,
): readonly (Said | undefined)[] {
  const answers = sentence.map(own);
  for (let at = 1; at < answers.length; at++) {
    if (!hasTurn((sentence[at] as Reach).before)) answers[at] ??= answers[at - 1];
  }
  const trailing = sentence.at(-1) === undefined ? undefined : behind(sentence.at(-1) as Reach);
  for (let at = answers.length - 1; at >= 0; at--) {
    answers[at] ??= trailing;
    if (hasTurn((sentence[at] as Reach).before)) break;
  }
  return answers;
}

/** Words behind a result outweigh those before it only where they state significance. */
function significanceOf({ before, behind }: Reach): SaidOfSignificance | undefined {
  const own = significanceIn(lastClause(before));
  const after = significanceIn(firstClause(behind));
  return after?.manner === 'stated' && own?.manner !== 'stated' ? after : own;
}

const significanceBehind = ({ behind }: Reach) => significanceIn(firstClause(behind));

const directionOf = ({ before, result }: Reach): SaidOfDirection | undefined =>
  directionIn(lastClause(before), result);

const directionBehind = ({ behind, result }: Reach) => directionIn(firstClause(behind), result);

function claimsOf(
  { result, sentence, before, behind }: Reach,
  significance: SaidOfSignificance | undefined,
  direction: SaidOfDirection | undefined,
): readonly Claim[] {
  const common = { sentence, of: result };
  const clause = lastClause(before);
  const size = sizeIn(clause) ?? sizeIn(firstClause(behind));
  const scale = scaleIn(clause);
  const claims: Claim[] = [];
  if (significance !== undefined) claims.push({ kind: 'significance', ...common, ...significance });
  if (direction !== undefined) claims.push({ kind: 'direction', ...common, ...direction });
  if (size !== undefined) {
    claims.push({ kind: 'size', ...common, ...size, ...(scale === undefined ? {} : { scale: scale.scale }) });
  }
  if (scale !== undefined) claims.push({ kind: 'scale', ...common, ...scale });
  return claims;
}
