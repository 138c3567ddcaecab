import type { Claim } from '../../model/index.ts';
import { directionIn } from './direction.ts';
import { firstClause, lastClause, type Reach, turnsAway } from './reach.ts';
import { type SaidOfSignificance, significanceIn } from './significance.ts';
import { scaleIn, sizeIn } from './size.ts';

/**
 * What sentences say of their results, given the words within each result's reach: significance, direction,
 * size, and whether they speak of odds, hazards, rates or risks.
 */
export function findClaims(reaches: readonly Reach[]): readonly Claim[] {
  const claims: Claim[] = [];
  let listed: SaidOfSignificance | undefined;
  for (const reach of reaches) {
    listed = significanceOf(reach, listed);
    claims.push(...claimsOf(reach, listed));
  }
  return claims;
}

/**
 * What is said of the significance of one result; a result further down a list
 * shares what was said of the list, unless the sentence has turned since.
 */
function significanceOf(
  { before, behind, follows }: Reach,
  listed: SaidOfSignificance | undefined,
): SaidOfSignificance | undefined {
  const own = significanceIn(lastClause(before));
  const after = significanceIn(firstClause(behind));
  if (after?.manner === 'stated' && own?.manner !== 'stated') return after;
  if (own !== undefined) return own;
  if (follows && !turnsAway(before)) return listed;
  return undefined;
}

function claimsOf(
  { result, sentence, before, behind }: Reach,
  significance: SaidOfSignificance | undefined,
): readonly Claim[] {
  const common = { sentence, of: result };
  const clause = lastClause(before);
  const direction = directionIn(clause, result);
  const size = sizeIn(clause) ?? sizeIn(firstClause(behind));
  const scale = scaleIn(clause);
  return [
    ...(significance === undefined ? [] : [{ kind: 'significance', ...common, ...significance } as const]),
    ...(direction === undefined ? [] : [{ kind: 'direction', ...common, ...direction } as const]),
    ...(size === undefined
      ? []
      : [{
          kind: 'size',
          ...common,
          ...size,
          ...(scale === undefined ? {} : { scale: scale.scale }),
        } as const]),
    ...(scale === undefined ? [] : [{ kind: 'scale', ...common, ...scale } as const]),
  ];
}
