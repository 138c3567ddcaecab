import {
  type Flag,
  type Judgement,
  type Manuscript,
  placeOf,
  quote,
  type Rule,
  type Span,
} from '../model/index.ts';

/**
 * The flag that a judgement raises, ready for a reader; none where it agrees or
 * cannot tell. What explains these numbers in particular comes before the
 * rule's general explanations.
 */
export function flagOf(
  manuscript: Manuscript,
  rule: Rule,
  { verdict, span, marks, result }: Judgement,
): Flag | undefined {
  if (verdict.outcome !== 'disagrees') return undefined;
  return {
    rule: rule.id,
    grade: verdict.grade ?? rule.grade,
    span,
    place: placeOf(manuscript, span),
    marks,
    because: verdict.because,
    ...(verdict.recomputed === undefined ? {} : { recomputed: verdict.recomputed }),
    working: verdict.working,
    innocent: [...new Set([...verdict.explanations, ...rule.innocent])],
    comment: rule.comment(quotable(manuscript.text, span), verdict),
    ...(result === undefined ? {} : { result }),
  };
}

/**
 * Words as they are quoted in a sentence: on one line, and with the bracket that closes
 * an open one where it stands next: "19/66 (31.2" becomes "19/66 (31.2%)".
 */
function quotable(text: string, span: Span): string {
  const words = quote(text, span);
  const next = text.slice(span.end, span.end + 2).match(/^%?[)\]]/)?.[0] ?? '';
  const isOpen = (words.match(/[([]/g) ?? []).length > (words.match(/[)\]]/g) ?? []).length;
  return `${words}${isOpen ? next : ''}`.replace(/\s+/g, ' ').trim();
}
