import { quote, type Cell, type Span, type Table } from '../model/index.ts';
import { captionLabel, labelsTable } from './captions.ts';
import type { Unsectioned } from './sections.ts';

/** A table's cells once they stand in the text. */
export interface WrittenGrid {
  readonly cells: readonly Cell[];
  readonly rowCount: number;
  readonly columnCount: number;
}

/** A block with its offsets; a table with its grid and the caption that is tied to it. */
export interface WrittenBlock extends Unsectioned {
  readonly grid?: WrittenGrid;
  readonly caption?: Span;
}

/** The tables among the blocks, each with the caption beside it and the notes under it. */
export function tablesAmong(text: string, blocks: readonly WrittenBlock[]): readonly Table[] {
  const captions = tableCaptions(text, blocks);
  return blocks.flatMap(({ kind, span, grid, caption }, i) => {
    if (kind !== 'table' || grid === undefined) return [];
    const captioned = caption === undefined ? captions.get(i) : tied(text, caption);
    return [{ span, ...(captioned ?? { label: '' }), notes: notesAfter(blocks, i), ...grid }];
  });
}

type Captioned = Pick<Table, 'label' | 'caption'>;

function tied(text: string, caption: Span): Captioned {
  return { label: captionLabel(quote(text, caption)), caption };
}

/**
 * The caption of each table, by its block's index. A journal sets all captions
 * above its tables or all below: whichever way gives more tables one of their own.
 */
function tableCaptions(
  text: string,
  blocks: readonly WrittenBlock[],
): ReadonlyMap<number, Captioned> {
  const above = captionsAt(text, blocks, [-1, -2]);
  const below = captionsAt(text, blocks, [1, 2, 3]);
  return below.size > above.size ? below : new Map([...below, ...above]);
}

function captionsAt(
  text: string,
  blocks: readonly WrittenBlock[],
  steps: readonly number[],
): Map<number, Captioned> {
  const found = new Map<number, Captioned>();
  const used = new Set<WrittenBlock>();
  for (const [i, { kind }] of blocks.entries()) {
    if (kind !== 'table') continue;
    const caption = captionBeside(blocks, i, steps);
    if (caption?.kind !== 'caption' || used.has(caption)) continue;
    const label = captionLabel(quote(text, caption.span));
    if (labelsTable(label)) found.set(i, { label, caption: caption.span });
    used.add(caption);
  }
  return found;
}

/** The first caption on one side of a table, with no other table between. */
function captionBeside(
  blocks: readonly WrittenBlock[],
  i: number,
  steps: readonly number[],
): WrittenBlock | undefined {
  const beside = steps.flatMap((step) => blocks[i + step] ?? []);
  return beside.find(({ kind }) => kind === 'caption' || kind === 'table' || kind === 'heading');
}

function notesAfter(blocks: readonly WrittenBlock[], i: number): readonly Span[] {
  const notes: Span[] = [];
  for (let j = i + 1; blocks[j]?.kind === 'note'; j++) notes.push((blocks[j] as WrittenBlock).span);
  return notes;
}
