import type { Block, Findings, Manuscript, Result } from '../model/index.ts';
import { type Definitions, findDefinitions } from './definitions.ts';
import { lex } from './lex.ts';
import { numberStyleOf } from './number.ts';
import { findBareRatios } from './parse/bare-ratios.ts';
import { findCounts } from './parse/counts.ts';
import { findIntervals } from './parse/intervals.ts';
import { readItems } from './parse/items.ts';
import { type Passage, passageOf } from './parse/passage.ts';
import { customsOf } from './resolve/customs.ts';
import { resolveResults } from './resolve/results.ts';
import { loadSentenceSplitter } from './sentences.ts';

/**
 * Finds every result, claim, count and prevalence in a manuscript's text.
 *
 * Three steps, each linear in the length of the text: lex (characters → tokens),
 * parse (tokens → drafts of results), resolve (what a draft inherits).
 */
export async function extract(manuscript: Manuscript): Promise<Findings> {
  const split = await loadSentenceSplitter();
  const { text, marks } = manuscript;
  const style = numberStyleOf(text);
  const blocks = manuscript.blocks.filter(isProse);
  const tokens = blocks.map(({ span }) => lex(text, span, style, marks));
  const definitions = findDefinitions(text, tokens);
  const passages = blocks.map(({ span }, index) =>
    passageOf(readItems(text, tokens[index] ?? [], definitions), split(text, span)),
  );
  const customs = customsOf(passages);
  const results = passages.flatMap((passage): readonly Result[] => {
    const intervals = findIntervals(passage);
    const bare = findBareRatios(passage, intervals);
    const drafts = [...intervals, ...bare].sort((a, b) => a.anchor - b.anchor);
    return resolveResults(passage, drafts, customs);
  });
  const counts = passages.flatMap(({ items }) => findCounts(text, items));
  return { results, claims: [], counts, prevalences: [] };
}

const PROSE: ReadonlySet<Block['kind']> = new Set(['title', 'heading', 'paragraph', 'caption', 'note']);

function isProse({ kind, section }: Block): boolean {
  return PROSE.has(kind) && section.role !== 'references';
}

export type { Definitions, Passage };
