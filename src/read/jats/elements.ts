import type { Reading } from './reading.ts';

/** Elements whose words are no part of what a reader reads as the article. */
export const PASSED_OVER: ReadonlySet<string> = new Set(['journal-meta', 'contrib-group', 'aff',
  'author-notes', 'pub-date', 'history', 'permissions', 'kwd-group', 'funding-group', 'article-id',
  'article-categories', 'volume', 'issue', 'fpage', 'lpage', 'elocation-id', 'self-uri', 'counts',
  'custom-meta-group', 'related-article', 'tex-math', 'alt-title', 'object-id', 'alt-text', 'long-desc',
  'graphic', 'media', 'email']);

/** Elements whose words are parted from those beside them: parts of a reference, of a list. */
export const SEPARATED: ReadonlySet<string> = new Set(['list-item', 'term', 'surname', 'given-names',
  'year', 'source', 'volume', 'person-group', 'string-name', 'name', 'pub-id']);

/** White space between a table's cells lays out the markup and belongs to no cell. */
export function isLayout({ table, composition }: Reading): boolean {
  return table !== undefined && composition.open?.kind === 'table' && table.cell === undefined;
}
