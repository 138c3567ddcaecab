import type { Judgement, Rule, Span } from '../src/model/index.ts';

/** Words to be drawn under a stretch of the text. */
export interface Drawn {
  readonly span: Span;
  readonly words: string;
}

/** What a rule says of a judgement: "interval-symmetry: disagrees (discrepancy), …". */
export function drawnJudgement(rule: Rule, { span, verdict }: Judgement): Drawn {
  const grade = verdict.outcome === 'disagrees' ? ` (${verdict.grade ?? rule.grade})` : '';
  const because = verdict.outcome === 'agrees' ? '' : `, ${verdict.because}`;
  return { span, words: `${rule.id}: ${verdict.outcome}${grade}${because}` };
}

/**
 * A text with what is to be drawn under the words it is about:
 *
 *   The hazard ratio was 0.72 (0.58 to 0.98).
 *                        ~~~~~~~~~~~~~~~~~~~
 *                        interval-symmetry: disagrees (discrepancy), …
 */
export function draw(text: string, drawn: readonly Drawn[]): string {
  const lines: string[] = [];
  let start = 0;
  for (const line of text.split('\n')) {
    const span = { start, end: start + line.length };
    lines.push(line, ...drawn.filter(startsIn(span)).flatMap((one) => under(one, line, span)));
    start = span.end + 1;
  }
  return lines.join('\n');
}

function startsIn({ start, end }: Span): (drawn: Drawn) => boolean {
  return ({ span }) => start <= span.start && span.start <= end;
}

/** Tabs before the words stay tabs, so that the stroke stands under them. */
function under({ span, words }: Drawn, line: string, at: Span): readonly string[] {
  const indent = line.slice(0, span.start - at.start).replace(/[^\t]/g, ' ');
  const underline = '~'.repeat(Math.max(1, Math.min(span.end, at.end) - span.start));
  return [`${indent}${underline}`, `${indent}${words}`];
}
