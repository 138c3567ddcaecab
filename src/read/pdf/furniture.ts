import { rowsOf, wordsOf, type Phrase, type Row } from './phrase.ts';

/** The rows at the top and the bottom of a page in which running heads and feet stand. */
const EDGE_ROWS = 4;

/** What this module needs of a page: its phrases and height. */
export interface PagePhrases {
  readonly phrases: readonly Phrase[];
  readonly height: number;
}

/** A row near a page's edge, in a form that is alike on every page: digits become "#". */
interface EdgeRow {
  readonly page: number;
  readonly phrases: readonly Phrase[];
  readonly key: string;
  readonly number: number | undefined;
}

/**
 * Finds running heads, running feet and page numbers: what stands in the same
 * place at the top or bottom of several pages, and is alike but for its digits.
 */
export function furnitureOf(pages: readonly PagePhrases[]): ReadonlySet<Phrase> {
  const rows = pages.flatMap((page, i) => edgeRows(page, i));
  const found = new Set<Phrase>();
  for (const alike of groupedBy(rows, ({ key }) => key)) {
    if (repeats(alike, pages.length))
      for (const { phrases } of alike) for (const phrase of phrases) found.add(phrase);
  }
  for (const row of rows.filter(({ number }) => number !== undefined)) {
    if (numbersItsPage(row, rows)) for (const phrase of row.phrases) found.add(phrase);
  }
  return found;
}

function edgeRows({ phrases, height }: PagePhrases, page: number): readonly EdgeRow[] {
  const rows = rowsOf(phrases);
  const at = (i: number): number => rows[i]?.[0]?.baseline ?? 0;
  const top = rows
    .slice(0, EDGE_ROWS)
    .filter((_, i) => at(i) < height * 0.16 && isApart(rows, i, i + 1));
  const bottom = rows.filter((_, i) => i >= rows.length - EDGE_ROWS && at(i) > height * 0.84);
  return [...new Set([...top, ...bottom])].flat().map((phrase) => edgeRow([phrase], page));
}

/** A running head stands off from what follows; the head of a table does not. */
function isApart(rows: readonly Row[], i: number, j: number): boolean {
  const [own, next] = [rows[i]?.[0], rows[j]?.[0]];
  if (own === undefined || next === undefined) return true;
  return (
    next.baseline - own.baseline > 1.45 * Math.max(own.size, next.size) || isSmallAboveHead(rows, i)
  );
}

/** The first lines of a running head of several lines. */
function isSmallAboveHead(rows: readonly Row[], i: number): boolean {
  return i < 2 && isApart(rows, i + 1, i + 2);
}

function edgeRow(phrases: readonly Phrase[], page: number): EdgeRow {
  const words = phrases.map(({ runs }) => wordsOf(runs)).join(' ');
  const height = Math.round((phrases[0]?.baseline ?? 0) / 4);
  const number = /^\W*(?:page\s+)?(\d{1,5})(?:\s*(?:of|\/)\s*\d+)?\W*$/i.exec(words)?.[1];
  return {
    page,
    phrases,
    key: `${height} ${words.replace(/\d+/g, '#').replace(/\s+/g, ' ').toLowerCase()}`,
    number: number === undefined ? undefined : Number(number),
  };
}

function groupedBy<Item>(
  items: readonly Item[],
  keyOf: (item: Item) => string,
): readonly (readonly Item[])[] {
  const groups = new Map<string, Item[]>();
  for (const item of items) {
    const group = groups.get(keyOf(item));
    if (group === undefined) groups.set(keyOf(item), [item]);
    else group.push(item);
  }
  return [...groups.values()];
}

/** On two pages, or on a good part of many: heads alternate between left and right pages. */
function repeats(alike: readonly EdgeRow[], pageCount: number): boolean {
  const pages = new Set(alike.map(({ page }) => page)).size;
  return pages >= 2 && pages >= Math.min(3, pageCount) && pages >= pageCount * 0.2;
}

/** A lone number near the edge whose distance to its page's count is the same elsewhere. */
function numbersItsPage(row: EdgeRow, rows: readonly EdgeRow[]): boolean {
  const offset = (row.number ?? 0) - row.page;
  const alike = rows.filter(({ number, page }) => number !== undefined && number - page === offset);
  return new Set(alike.map(({ page }) => page)).size >= 2;
}
