import type { Judgement, Rule, Span } from '../src/model/index.ts';

/** A judgement with the rule that gave it, to be drawn under the words it is about. */
export interface Drawn {
  readonly rule: Rule;
  readonly judgement: Judgement;
}

/**
 * A text with each judgement under the words it is about:
 *
 *   The hazard ratio was 0.72 (0.58 to 0.98).
 *                        ~~~~~~~~~~~~~~~~~~~
 *                        interval-symmetry: disagrees (discrepancy), …
 */
export function draw(text: string, judgements: readonly Drawn[]): string {
  const drawn: string[] = [];
  let start = 0;
  for (const line of text.split('\n')) {
    const span = { start, end: start + line.length };
    drawn.push(line, ...judgements.filter(startsIn(span)).flatMap((one) => under(one, span)));
    start = span.end + 1;
  }
  return drawn.join('\n');
}

function startsIn({ start, end }: Span): (drawn: Drawn) => boolean {
  return ({ judgement }) => start <= judgement.span.start && judgement.span.start <= end;
}

function under({ rule, judgement: { span, verdict } }: Drawn, line: Span): readonly string[] {
  const indent = ' '.repeat(span.start - line.start);
  const underline = '~'.repeat(Math.max(1, Math.min(span.end, line.end) - span.start));
  const grade = verdict.outcome === 'disagrees' ? ` (${verdict.grade ?? rule.grade})` : '';
  const because = verdict.outcome === 'agrees' ? '' : `, ${verdict.because}`;
  return [`${indent}${underline}`, `${indent}${rule.id}: ${verdict.outcome}${grade}${because}`];
}
