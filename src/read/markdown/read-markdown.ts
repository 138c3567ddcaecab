import type { Manuscript } from '../../model/index.ts';
import { composeTold } from '../compose-told.ts';
import { ReadError } from '../read-error.ts';
import { withOneTitle } from '../one-title.ts';
import { blocksOf } from './blocks.ts';
import { linesOf } from './source-line.ts';

/**
 * Reads Markdown as it would be printed: headings, paragraphs, lists, tables
 * drawn with pipes, grids or rules, notes, formulas between dollar signs. The
 * blocks are told apart here, in one pass over the lines, and only the words
 * within them are read by the library, whose cost grows faster than its input.
 */
export function readMarkdown(source: string, name: string): Manuscript {
  const told = blocksOf(linesOf(source.replaceAll('\u0000', '')));
  const manuscript = composeTold(withOneTitle(told), name, 'markdown');
  if (manuscript.blocks.length > 0) return manuscript;
  throw new ReadError('The file holds no text but blanks. Check that it was saved completely.');
}
