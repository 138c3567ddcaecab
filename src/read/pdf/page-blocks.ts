import { captionLabel, labelsTable, looksLikeNote } from '../captions.ts';
import { isNumberedHeading, knownHeading, labelLength } from '../headings.ts';
import type { BodyType } from './body-type.ts';
import { leadingOf } from './body-type.ts';
import type { Draft } from './draft.ts';
import { tableGrid } from './table-grid.ts';
import { tableRegions, type TableRegion } from './table-region.ts';
import { endsSentence, type TextLine } from './text-line.ts';

/** Divides the lines of one column into blocks, from top to bottom. */
export function blocksOfColumn(lines: readonly TextLine[], body: BodyType): readonly Draft[] {
  const drafts: Draft[] = [];
  let start = 0;
  for (const region of [...tableRegions(lines), { start: lines.length, end: lines.length }]) {
    drafts.push(...proseBlocks(lines.slice(start, region.start), body, drafts.at(-1)));
    if (region.end > region.start) drafts.push(tableOf(lines, region));
    start = region.end;
  }
  return drafts;
}

function tableOf(lines: readonly TextLine[], { start, end }: TableRegion): Draft {
  const own = lines.slice(start, end);
  const grid = tableGrid(own);
  return { kind: 'table', lines: own, ...(grid === undefined ? {} : { grid }) };
}

function proseBlocks(
  lines: readonly TextLine[],
  body: BodyType,
  before: Draft | undefined,
): readonly Draft[] {
  const drafts: Draft[] = [];
  const leading = lines.length > 3 ? leadingOf(lines) : body.leading;
  let group: TextLine[] = [];
  const close = (): void => {
    if (group.length > 0) drafts.push(draftOf(group, body, drafts.at(-1) ?? before));
    group = [];
  };
  for (const line of lines) {
    if (group.length > 0 && begins(line, group, body, leading)) close();
    group.push(line);
  }
  close();
  return drafts;
}

/** Type so much larger than the body's is a title's, over as many lines as it takes. */
const LARGE = 1.3;

/** Whether a line begins another block than the lines just before it. */
function begins(
  line: TextLine,
  group: readonly TextLine[],
  body: BodyType,
  leading: number,
): boolean {
  const last = group.at(-1) as TextLine;
  const step = (line.baseline - last.baseline) / Math.max(line.size, last.size);
  if (step > 1.3 * Math.max(leading, 1) || step < 0) return true;
  if (Math.abs(line.size - last.size) > 0.08 * last.size) return true;
  if (line.size > LARGE * body.size) return knownHeading(line.words) !== undefined;
  const heading = isHeadingLine(line, body) && !isMidSentence(last, line);
  if (heading !== isHeadingLine(last, body)) return true;
  if (heading) return knownHeading(line.words) !== undefined;
  if (startsCaption(line, last)) return true;
  if (labelLength(line.words) > 0 && endsSentence(last.words)) return true;
  return isIndented(line, group) || (isShort(last) && endsSentence(last.words));
}

function isShort({ right, left, column }: TextLine): boolean {
  return right < column.right - 0.12 * (column.right - column.left) && right - left > 0;
}

/** A first line set in from the lines before it, which themselves stand at the column's edge. */
function isIndented(line: TextLine, group: readonly TextLine[]): boolean {
  const last = group.at(-1) as TextLine;
  const indent = line.left - last.left;
  if (indent < 0.8 * line.size || indent > 4 * line.size) return false;
  return endsSentence(last.words) && last.left - line.column.left < 0.8 * line.size;
}

/** A full line without a stop, in the same type, goes on in the next line. */
function isMidSentence(last: TextLine, line: TextLine): boolean {
  return last.font === line.font && !isShort(last) && !endsSentence(last.words);
}

function startsCaption(line: TextLine, last: TextLine): boolean {
  if (captionLabel(line.words) === '') return false;
  const first = line.phrases[0]?.runs[0]?.font;
  return endsSentence(last.words) || first !== last.font || isShort(last);
}

/** A line set as a heading: known words alone, or short and in another type than the body. */
function isHeadingLine(line: TextLine, body: BodyType): boolean {
  const { words, size, font } = line;
  if (words.length > 140 || captionLabel(words) !== '') return false;
  if (labelLength(words) > 0 && labelLength(words) < words.length) return false;
  const apart = size > 1.06 * body.size || (font !== body.font && !holdsBodyType(line, body));
  if (knownHeading(words) !== undefined) return apart || isUpperOrTitle(words);
  if (!apart || size < 0.93 * body.size || /[.,;:]$/.test(words)) return false;
  if (isNumberedHeading(words)) return true;
  return (
    /^[A-Z]/.test(words) &&
    isShort(line) &&
    !/[=<>%]|\d\.\d/.test(words) &&
    /[a-z]{3}|[A-Z]{3}/.test(words)
  );
}

/** A line of text with a long word in italics is no heading: most of it is set as the text is. */
function holdsBodyType({ phrases }: TextLine, body: BodyType): boolean {
  return phrases.some(({ runs }) =>
    runs.some(
      ({ font, text, mark }) => font === body.font && mark === undefined && text.length > 3,
    ),
  );
}

function isUpperOrTitle(words: string): boolean {
  return words === words.toUpperCase() || words.length < 45;
}

function draftOf(lines: readonly TextLine[], body: BodyType, before: Draft | undefined): Draft {
  const [first] = lines as readonly [TextLine];
  if (captionLabel(first.words) !== '') return { kind: 'caption', lines };
  if (isHeadingLine(first, body)) return { kind: 'heading', lines };
  if (isNote(lines, first, body, before)) return { kind: 'note', lines };
  const label = labelLength(first.words);
  return { kind: 'paragraph', lines, ...(label > 0 ? { label } : {}) };
}

function isNote(
  lines: readonly TextLine[],
  first: TextLine,
  body: BodyType,
  before: Draft | undefined,
): boolean {
  const small = first.size < 0.95 * body.size;
  if (small && /^[*†‡§¶#‖]/.test(first.words)) return true;
  if (before?.kind === 'table' || before?.kind === 'note')
    return small || looksLikeNote(first.words);
  const underCaption =
    before?.kind === 'caption' && labelsTable(captionLabel(before.lines[0]?.words ?? ''));
  return underCaption && small && lines.length < 12;
}
