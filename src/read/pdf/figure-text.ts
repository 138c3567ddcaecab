import { captionLabel, labelsTable } from '../captions.ts';
import { knownHeading } from '../headings.ts';
import type { Draft } from './draft.ts';
import { endsSentence, type TextLine } from './text-line.ts';

/** Fewer lines above a figure's caption may be a heading; these are what the figure says. */
const FEWEST = 3;

/**
 * Sets apart what stands in figures: scattered short lines right above the
 * caption of a figure, as the labels of axes and branches are.
 */
export function withFigures(drafts: readonly Draft[]): readonly Draft[] {
  const figures = new Set<Draft>();
  for (const [i, draft] of drafts.entries()) {
    if (!isFigureCaption(draft)) continue;
    const above = scatteredAbove(drafts, i);
    const lines = above.reduce((sum, each) => sum + each.lines.length, 0);
    if (lines >= FEWEST) for (const each of above) figures.add(each);
  }
  if (figures.size === 0) return drafts;
  return drafts.map((draft) =>
    figures.has(draft) ? { kind: 'figure', lines: draft.lines } : draft);
}

function isFigureCaption({ kind, lines }: Draft): boolean {
  const label = captionLabel(lines[0]?.words ?? '');
  return kind === 'caption' && label !== '' && !labelsTable(label);
}

function scatteredAbove(drafts: readonly Draft[], caption: number): readonly Draft[] {
  const page = drafts[caption]?.lines[0]?.page;
  const found: Draft[] = [];
  for (let i = caption - 1; i >= 0; i--) {
    const draft = drafts[i] as Draft;
    const mayBe = draft.kind === 'paragraph' || draft.kind === 'heading';
    if (!mayBe || draft.lines.some((line) => line.page !== page || !isScattered(line))) break;
    found.push(draft);
  }
  return found;
}

/** The longest label of an axis or a branch. */
const LONGEST = 40;

function isScattered({ words, left, right, column }: TextLine): boolean {
  if (words.length > LONGEST || endsSentence(words)) return false;
  if (knownHeading(words) !== undefined) return false;
  return right - left < 0.5 * (column.right - column.left);
}
