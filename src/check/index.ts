import type {
  Checked,
  Findings,
  Flag,
  Grade,
  Judgement,
  Manuscript,
  Rule,
  Unjudged,
} from '../model/index.ts';
import { flagOf } from './flag-of.ts';
import { pooled } from './pool.ts';

/** A judgement, and the rule that gave it. */
interface Given {
  readonly rule: Rule;
  readonly judgement: Judgement;
}

/**
 * Puts every rule to a manuscript and its findings.
 *
 * The surest flags come first, and among equals those that a reader meets first.
 * What a rule says twice about the same result is kept once.
 */
export function check(
  manuscript: Manuscript,
  findings: Findings,
  rules: readonly Rule[],
): Checked {
  const given = rules.flatMap((rule) => once(rule, rule.judgements({ manuscript, findings })));
  const flags = given.flatMap(({ rule, judgement }) => {
    const flag = flagOf(manuscript, rule, judgement);
    return flag === undefined ? [] : [flag];
  });
  return {
    flags: pooled(flags.sort(bySurenessThenPlace)),
    unjudged: given.flatMap(unjudgedOf).sort(byPlace),
    agreed: given.filter(({ judgement }) => judgement.verdict.outcome === 'agrees').length,
  };
}

/** How much each outcome says, for choosing among a rule's verdicts on one thing. */
const WEIGHT = { disagrees: 0, 'cannot tell': 1, agrees: 2 } as const;

/**
 * A rule's judgements with one for each thing judged. Two claims may speak of the
 * same result: what disagrees then speaks for both, and else what stands first.
 */
function once(rule: Rule, judgements: readonly Judgement[]): readonly Given[] {
  const kept = new Map<string, Judgement>();
  for (const judgement of judgements) {
    const { start, end } = judgement.result?.span ?? judgement.span;
    const known = kept.get(`${start}-${end}`);
    if (known === undefined || weightOf(judgement) < weightOf(known)) {
      kept.set(`${start}-${end}`, judgement);
    }
  }
  return [...kept.values()].map((judgement) => ({ rule, judgement }));
}

function weightOf({ verdict }: Judgement): number {
  return WEIGHT[verdict.outcome];
}

function unjudgedOf({ rule, judgement: { verdict, span } }: Given): readonly Unjudged[] {
  if (verdict.outcome !== 'cannot tell') return [];
  return [{ rule: rule.id, span, because: verdict.because }];
}

/** The grades from the surest to the least sure. */
const SURENESS: Readonly<Record<Grade, number>> = { contradiction: 0, discrepancy: 1, caution: 2 };

function bySurenessThenPlace(one: Flag, other: Flag): number {
  return SURENESS[one.grade] - SURENESS[other.grade] || byPlace(one, other);
}

function byPlace(one: Pick<Flag, 'span'>, other: Pick<Flag, 'span'>): number {
  return one.span.start - other.span.start || one.span.end - other.span.end;
}
