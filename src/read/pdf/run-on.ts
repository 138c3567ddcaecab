import type { Draft } from './draft.ts';
import { endsSentence, type TextLine } from './text-line.ts';

/**
 * Puts paragraphs back together that run on in the next column or on the next
 * page. What stands between (a table at the top of the page, notes at its foot)
 * is read after the whole paragraph.
 */
export function withoutBreaks(drafts: readonly Draft[]): readonly Draft[] {
  const whole: Draft[] = [];
  const used = new Set<Draft>();
  for (const [i, draft] of drafts.entries()) {
    if (used.has(draft)) continue;
    whole.push(continued(draft, drafts, i, used));
  }
  return whole;
}

/** How many blocks may stand between the two parts of a paragraph. */
const REACH = 24;

function continued(draft: Draft, drafts: readonly Draft[], i: number, used: Set<Draft>): Draft {
  let whole = draft;
  for (let j = i + 1; j < Math.min(drafts.length, i + 1 + REACH) && isBroken(whole); j++) {
    const next = drafts[j] as Draft;
    if (used.has(next) || isBetween(next) || isSmaller(next, whole)) continue;
    if (!goesOn(whole, next)) break;
    used.add(next);
    whole = { ...whole, lines: [...whole.lines, ...next.lines] };
  }
  return whole;
}

function isBroken({ kind, lines }: Draft): boolean {
  const last = lines.at(-1);
  return kind === 'paragraph' && last !== undefined && !endsSentence(last.words);
}

function isBetween({ kind }: Draft): boolean {
  return (
    kind === 'table' ||
    kind === 'caption' ||
    kind === 'note' ||
    kind === 'furniture' ||
    kind === 'figure'
  );
}

/** Small print at the foot of a page or under a table. */
function isSmaller(next: Draft, { lines }: Draft): boolean {
  return (next.lines[0]?.size ?? 0) < 0.95 * (lines.at(-1)?.size ?? 0);
}

/** The next part stands in another column, in the same type, and begins inside a sentence. */
function goesOn({ lines }: Draft, next: Draft): boolean {
  const last = lines.at(-1);
  const first = next.lines[0];
  if (last === undefined || first === undefined || next.kind !== 'paragraph') return false;
  if (last.column === first.column || next.label !== undefined) return false;
  if (Math.abs(last.size - first.size) > 0.05 * last.size) return false;
  return /^[a-z\d([<>≤≥=±–−"“]/.test(first.words) || isFull(last);
}

function isFull({ left, right, column }: TextLine): boolean {
  return right - left > 0.85 * (column.right - column.left);
}
