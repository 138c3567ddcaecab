import type { Block, Findings, Manuscript, Result } from '../model/index.ts';
import { aboutOf } from './about.ts';
import { findClaims } from './claims/claims.ts';
import { type Reach, reachesOf } from './claims/reach.ts';
import { findDefinitions } from './definitions.ts';
import { lex } from './lex.ts';
import { numberStyleOf } from './number.ts';
import { findBareRatios } from './parse/bare-ratios.ts';
import { findCounts } from './parse/counts.ts';
import { findIntervals } from './parse/intervals.ts';
import { readItems } from './parse/items.ts';
import { findStatistics } from './parse/statistics.ts';
import { type Passage, passageOf } from './parse/passage.ts';
import { customsOf } from './resolve/customs.ts';
import { prevalencesIn } from './prevalences.ts';
import { mattering, promiseOf, type Promised } from './promise.ts';
import { type Customs, resolveResults, resolveStatistics } from './resolve/results.ts';
import { loadSentenceSplitter } from './sentences.ts';
import { withCoefficients } from './tables/coefficient-rows.ts';
import { sheetOf } from './tables/sheet.ts';
import { countsInTable } from './tables/table-counts.ts';
import { resultsInTable } from './tables/table-results.ts';
import type { Token } from './token.ts';

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
  const definitions = findDefinitions(text);
  const prose = manuscript.blocks.filter(isProse).flatMap(({ span }): readonly Prose[] => {
    const promised = promiseOf(text, span);
    if (promised === 'nothing') return [];
    const sentences = promised === 'results' ? split(text, span) : [span];
    const tokens = mattering(text, sentences).flatMap((part) => lex(text, part, style, marks));
    const items = readItems(text, tokens, definitions);
    return [{ promised, tokens, passage: passageOf(items, sentences) }];
  });
  const customs = customsOf(prose.map(({ passage }) => passage));
  const found = prose.map((block) => findingsOf(text, block, customs));
  const context = { text, style, marks, definitions, customs };
  const sheets = manuscript.tables.map((table) => sheetOf(table, context));
  const tabled = sheets.flatMap((sheet) => withCoefficients(sheet, resultsInTable(sheet)));
  return {
    results: inOrder([...found.flatMap(({ results }) => results), ...tabled]),
    claims: found.flatMap(({ claims }) => claims),
    counts: [...found.flatMap(({ counts }) => counts), ...sheets.flatMap(countsInTable)],
    prevalences: found.flatMap(({ prevalences }) => prevalences),
  };
}

/** A block of prose made ready for reading. */
interface Prose {
  readonly promised: Promised;
  readonly tokens: readonly Token[];
  readonly passage: Passage;
}

function inOrder(results: readonly Result[]): readonly Result[] {
  return results.toSorted((a, b) => a.span.start - b.span.start);
}

function findingsOf(text: string, { promised, tokens, passage }: Prose, customs: Customs): Findings {
  const { results, claims } = promised === 'results'
    ? resultsAndClaims(text, passage, tokens, customs)
    : { results: [], claims: [] };
  return {
    results,
    claims,
    counts: findCounts(text, passage.items),
    prevalences: prevalencesIn(text, tokens),
  };
}

function resultsAndClaims(
  text: string,
  passage: Passage,
  tokens: readonly Token[],
  customs: Customs,
): Pick<Findings, 'results' | 'claims'> {
  const intervals = findIntervals(passage);
  const bare = findBareRatios(passage, intervals);
  const drafts = [...intervals, ...bare].sort((a, b) => a.anchor - b.anchor);
  const statistics = findStatistics(passage.items).filter(({ start, end }) =>
    !drafts.some((draft) => draft.anchor >= start && draft.anchor < end));
  const resolved = [
    ...resolveResults(passage, drafts, customs),
    ...resolveStatistics(statistics),
  ].sort((a, b) => a.span.start - b.span.start);
  const reaches = reachesOf(passage, tokens, resolved);
  const results = reaches.map((reach) => withAbout(text, reach));
  return {
    results,
    claims: findClaims(reaches.map((reach, index) => ({ ...reach, result: results[index] ?? reach.result }))),
  };
}

function withAbout(text: string, reach: Reach): Result {
  const { result } = reach;
  const about = aboutOf(text, reach);
  // The words nearest to a result are mostly, and not always, what it is of.
  const inferred = about.term === undefined ? result.inferred : [...result.inferred, 'term' as const];
  return { ...result, about, inferred };
}

const PROSE: ReadonlySet<Block['kind']> = new Set(['title', 'heading', 'paragraph', 'caption', 'note']);

function isProse({ kind, section }: Block): boolean {
  return PROSE.has(kind) && section.role !== 'references';
}
