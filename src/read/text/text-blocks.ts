import { quote, type Span } from '../../model/index.ts';
import { captionLabel, looksLikeNote } from '../captions.ts';
import { isNumberedHeading, knownHeading, labelLength } from '../headings.ts';
import type { Unsectioned } from '../sections.ts';
import { layoutOf, trimmed, type Layout } from './typed-tables.ts';

/** A block of typed text; tables keep their lines and how these are laid out. */
export interface TextBlock extends Unsectioned {
  readonly rows?: readonly Span[];
  readonly layout?: Layout;
}

/** A line with what must be known of it to find where blocks begin and end. */
interface TypedLine {
  readonly span: Span;
  readonly words: string;
  readonly indent: number;
  readonly layout: Layout;
  readonly blank: boolean;
}

/** Divides typed text into blocks, in order. */
export function blocksOf(text: string, lines: readonly Span[]): readonly TextBlock[] {
  const typed = lines.map((span) => typedLine(text, span));
  const blocks: TextBlock[] = [];
  for (let i = 0; i < typed.length; ) {
    const group = nextGroup(typed, i);
    blocks.push(...blocksIn(text, typed, group, blocks));
    i = group.end;
  }
  return withTitle(text, blocks);
}

function typedLine(text: string, span: Span): TypedLine {
  const line = quote(text, span);
  const words = line.trim();
  return { span, words, indent: line.search(/\S|$/), layout: layoutOf(line), blank: words === '' };
}

/** Lines `start` to `end` (not included) that belong together, and as what. */
interface Group {
  readonly start: number;
  readonly end: number;
  readonly as: 'blank' | 'table' | 'heading' | 'prose';
  readonly layout: Layout;
}

function nextGroup(lines: readonly TypedLine[], start: number): Group {
  const first = lines[start] as TypedLine;
  if (first.blank) return { start, end: start + 1, as: 'blank', layout: 'none' };
  const table = tableFrom(lines, start);
  if (table !== undefined) return table;
  if (standsAsHeading(lines, start))
    return { start, end: start + 1, as: 'heading', layout: 'none' };
  let end = start + 1;
  while (end < lines.length && continues(lines, start, end)) end++;
  return { start, end, as: 'prose', layout: 'none' };
}

const RULE = /^[-=_+|\s–—]+$/;

/** A table is two or more lines laid out alike; rules and single-cell rows may stand between. */
function tableFrom(lines: readonly TypedLine[], start: number): Group | undefined {
  const layout = (lines[start] as TypedLine).layout;
  if (layout === 'none') return undefined;
  let end = start + 1;
  for (let i = end; i < lines.length && mayStandInTable(lines[i] as TypedLine, layout); i++) {
    if (lines[i]?.layout === layout) end = i + 1;
  }
  const rows = lines.slice(start, end).filter((line) => line.layout === layout).length;
  return rows < 2 ? undefined : { start, end, as: 'table', layout };
}

function mayStandInTable({ layout, words, blank }: TypedLine, table: Layout): boolean {
  if (layout === table) return true;
  if (blank || captionLabel(words) !== '') return false;
  return RULE.test(words) || (words.length <= 60 && !/[.;]$/.test(words));
}

function standsAsHeading(lines: readonly TypedLine[], i: number): boolean {
  const { words } = lines[i] as TypedLine;
  const before = lines[i - 1];
  if (!/^[A-Z\d]/.test(words) || /[,;]$/.test(words)) return false;
  if (knownHeading(words) !== undefined) return !isMidSentence(before);
  const alone = before === undefined || before.blank;
  return alone && (isNumberedHeading(words) || isSubheading(words, lines[i + 1]));
}

/** A full line without a stop at its end goes on in the next; short lines stand by themselves. */
function isMidSentence(line: TypedLine | undefined): boolean {
  return line !== undefined && line.words.length >= 60 && !/[.!?:)]$/.test(line.words);
}

/** A short line by itself, without a stop and without numbers: "Cardiovascular outcomes". */
function isSubheading(words: string, after: TypedLine | undefined): boolean {
  const follows = after?.blank === true;
  return follows && words.length <= 70 && /^[A-Z][^\d=<>%.;:]+$/.test(words);
}

const LONG_LINE = 200;

/** Whether line `i` belongs to the paragraph that began at `start`. */
function continues(lines: readonly TypedLine[], start: number, i: number): boolean {
  const line = lines[i] as TypedLine;
  const before = lines[i - 1] as TypedLine;
  if (line.blank || tableFrom(lines, i) !== undefined) return false;
  if (standsAsHeading(lines, i) || labelLength(line.words) > 0) return false;
  if (captionLabel(line.words) !== '' && /[.!?:)]$/.test(before.words)) return false;
  if (line.indent >= 2 && line.indent > before.indent && i > start + 1) return false;
  if (line.indent >= 2 && before.indent === 0) return false;
  return !(before.words.length > LONG_LINE && /[.!?)]$/.test(before.words));
}

function blocksIn(
  text: string,
  lines: readonly TypedLine[],
  group: Group,
  before: readonly TextBlock[],
): readonly TextBlock[] {
  const own = lines.slice(group.start, group.end);
  const span = trimmed(text, { start: own[0]?.span.start ?? 0, end: own.at(-1)?.span.end ?? 0 });
  if (group.as === 'blank' || span === undefined) return [];
  if (group.as === 'table') {
    const rows = own.filter(({ words }) => !RULE.test(words)).map((line) => line.span);
    return [{ kind: 'table', span, rows, layout: group.layout }];
  }
  if (group.as === 'heading') return [{ kind: 'heading', span }];
  return prose(text, span, before);
}

function prose(text: string, span: Span, before: readonly TextBlock[]): readonly TextBlock[] {
  const words = quote(text, span);
  if (captionLabel(words) !== '') return [{ kind: 'caption', span }];
  const previous = before.at(-1)?.kind;
  if ((previous === 'table' || previous === 'note') && looksLikeNote(words))
    return [{ kind: 'note', span }];
  const label = labelLength(words);
  if (label === 0) return [{ kind: 'paragraph', span }];
  const rest = trimmed(text, { start: span.start + label, end: span.end });
  const heading: TextBlock = {
    kind: 'heading',
    span: { start: span.start, end: span.start + label },
    runIn: true,
  };
  return rest === undefined ? [heading] : [heading, { kind: 'paragraph', span: rest }];
}

/** The first block is the title if it stands by itself, has no stop and reports no numbers. */
function withTitle(text: string, blocks: readonly TextBlock[]): readonly TextBlock[] {
  const [first, ...others] = blocks;
  if (first === undefined || others.length === 0) return blocks;
  const words = quote(text, first.span);
  const plain =
    first.kind === 'paragraph' || (first.kind === 'heading' && knownHeading(words) === undefined);
  if (!plain || words.length > 300 || /[.;:,]$|[=<>%]|\d\.\d/.test(words)) return blocks;
  return [{ ...first, kind: 'title' }, ...others];
}
