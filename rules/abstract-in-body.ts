import {
  agrees,
  type BareNumber,
  bodyBlocks,
  cannotTell,
  defineManuscriptRule,
  disagrees,
  drawersOf,
  fullRatios,
  isWholeArticle,
  type Judgement,
  numbersIn,
  type Reading,
  roleAt,
  type Span,
  spansOf,
  tablesNotRead,
  tellingDigits,
  unrounded,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'abstract-in-body',
  question: 'Do the abstract’s numbers stand in the article as well?',
  why: `
    A reader takes the abstract’s numbers for those of the article. A number that stands nowhere
    else in the text and the tables cannot be followed up, and may be left over from another
    version.
  `,
  source: `
    Pitkin RM, Branagan MA, Burmeister LF. Accuracy of data in abstracts of published research
    articles. JAMA 1999;281:1110–1111. Asked for by the CONSORT extension for abstracts: Hopewell
    S et al. Lancet 2008;371:281–283.
  `,
  innocent: [
    'The number stands in a figure, a supplement or a table that could not be read here.',
    'It is a sum, a difference or another unit of numbers that the article does print.',
    'The number is from the background, and not a finding.',
  ],
  grade: 'caution',

  judge(reading) {
    if (!isWholeArticle(reading)) return [];
    const printed = abstractNumbers(reading);
    const [first] = printed;
    if (first === undefined) return [];
    const missing = missingFrom(reading, printed);
    const [alone] = missing;
    if (alone === undefined) return [{ verdict: agrees, span: first.span, marks: [] }];
    return [judgementOn(reading, alone, missing)];
  },

  comment: (words, { because }) => `
    On “${words}” in the abstract: ${because}. Could the authors report these in the results as
    well, or bring the abstract in line with the article?
  `,

  examples: [
    {
      text: article('Healing took 33.5 days.', 'Healing took 33.5 days with brevane.'),
      outcome: 'agrees',
      note: '33.5 stands in the results',
    },
    {
      text: article('Healing took 33.5 days.', 'Healing took 35.3 days with brevane.'),
      outcome: 'disagrees',
      note: '33.5 stands in the abstract alone',
    },
    {
      text: article('Healing took 33.5 days.', 'Healing took 33.48 days with brevane.'),
      outcome: 'agrees',
      note: '33.48 is rounded to 33.5 in the abstract',
    },
    {
      text: article('Healing took 33.5 days.', 'Table 2 shows the time to healing.'),
      outcome: 'cannot tell',
      note: 'it may stand in Table 2, which is not in this text',
    },
  ],
});

/** A short article, for examples. */
function article(abstract: string, results: string): string {
  return `Abstract\n\n${abstract}\n\nMethods\n\nWe timed healing.\n\nResults\n\n${results}`;
}

/** A number of two digits turns up by chance; from this many on, one is looked for. */
const TELLING = 3;

/** The numbers of the abstract that are findings by their looks. */
function abstractNumbers({ manuscript }: Reading): readonly BareNumber[] {
  const { blocks, text } = manuscript;
  return blocks
    .filter(({ section, kind }) => section.role === 'abstract' && kind === 'paragraph')
    .flatMap(({ span }) => numbersIn(text, span)
      .filter((number) => isFinding(number, contextOf(text, span, number.span))));
}

/** The words right before and right behind a number. */
interface Context {
  readonly before: string;
  readonly behind: string;
}

function contextOf(text: string, block: Span, { start, end }: Span): Context {
  return {
    before: text.slice(Math.max(block.start, start - 40), start),
    behind: text.slice(end, Math.min(block.end, end + 12)),
  };
}

/** A registration number, an address or a part of one. */
const IN_A_NAME = new RegExp(
  String.raw`(?:ISRCTN|NCT|doi|https?|www|regist\w{0,8}|identifier|number|\bID|trials\.gov`
    + String.raw`|reference)\W{0,4}\S*\s?\S*$`,
  'i',
);

/** Words that make a number no more than a size. */
const ROUGHLY = new RegExp(
  '(?:about|almost|approximately|nearly|around|over|than|some|roughly|planned|~|≈|[<>≤≥])\\s*$',
  'i',
);

function isFinding(number: BareNumber, { before, behind }: Context): boolean {
  if (tellingDigits(number) < TELLING) return false;
  const isWhole = number.decimals === 0;
  if (isWhole && (isYear(number) || number.value >= 1e6 || /^[-–/]\d/.test(behind))) return false;
  if (/^\s?(?:million|billion|thousand)/i.test(behind) || /^[\p{L}_]/u.test(behind)) return false;
  return !IN_A_NAME.test(before) && !ROUGHLY.test(before) && !/[-/]$/.test(isWhole ? before : '');
}

function isYear({ value, plain }: BareNumber): boolean {
  return plain.length === 4 && value >= 1900 && value < 2100;
}

/** The numbers that the body prints neither as they are nor with more digits. */
function missingFrom(reading: Reading, printed: readonly BareNumber[]): readonly BareNumber[] {
  const body = bodyBlocks(reading.manuscript)
    .flatMap(({ span }) => numbersIn(reading.manuscript.text, span));
  const exact = new Set(body.map(({ plain }) => Number(plain)));
  const sorted = [...exact].sort((one, other) => one - other);
  const twice = printedTwice(reading);
  const shares = sharesOfCounts(reading, exact);
  return printed.filter((number) => !isIn(number, exact, sorted) && !shares.has(number.span.start)
    && !twice.has(number.span.start));
}

/**
 * Where percentages start that follow from a count which the body prints without one:
 * "650 (88.7%)" where the body has 650.
 */
function sharesOfCounts(reading: Reading, exact: ReadonlySet<number>): ReadonlySet<number> {
  const { counts } = reading.findings;
  const withPercent = new Set(counts.flatMap(({ count, percent, span }) =>
    (percent !== undefined && roleAt(reading, span) !== 'abstract' ? [count?.value] : [])));
  return new Set(counts.flatMap(({ count, percent }) =>
    (count !== undefined && percent !== undefined && exact.has(count.value)
      && !withPercent.has(count.value) ? [percent.span.start] : [])));
}

/** As it is, with more digits, as a share for a percentage, or as what is left of 100%. */
function isIn(number: BareNumber, exact: ReadonlySet<number>, sorted: readonly number[]): boolean {
  const { low, high } = unrounded(number);
  if (exact.has(number.value)) return true;
  const rounded = (from: number, to: number): boolean => {
    const found = sorted[firstAtLeast(sorted, from)];
    return found !== undefined && found <= to;
  };
  if (number.decimals === 0) return rounded(number.value, number.value);
  return rounded(low, high) || rounded(low / 100, high / 100) || rounded(100 - high, 100 - low);
}

/** Where in ascending numbers the first stands that is at least `least`. */
function firstAtLeast(sorted: readonly number[], least: number): number {
  let [low, high] = [0, sorted.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((sorted[middle] as number) < least) low = middle + 1;
    else high = middle;
  }
  return low;
}

/**
 * Where the numbers of those ratios start that the body prints with one number otherwise:
 * results-printed-twice asks about them.
 */
function printedTwice(reading: Reading): ReadonlySet<number> {
  const ratios = fullRatios(reading);
  const similar = drawersOf(ratios);
  const twice = ratios.filter((one) => one.zone === 'abstract'
    && similar(one).some(({ zone }) => zone !== 'abstract'));
  return new Set(twice.flatMap(({ estimate, interval: { lower, upper } }) =>
    spansOf([estimate, lower, upper]).map(({ start }) => start)));
}

/** So many are named one by one. */
const NAMED = 6;

function judgementOn(
  reading: Reading,
  first: BareNumber,
  missing: readonly BareNumber[],
): Judgement {
  const marks = missing.map(({ span }) => span);
  const span = wordsOf(reading, first);
  const unread = tablesNotRead(reading);
  const listed = listOf(missing.map(({ plain }) => plain));
  if (unread.length > 0) {
    const because = `${listed} may stand in ${listOf(unread)}, which could not be read`;
    return { verdict: cannotTell(because), span, marks };
  }
  const because = missing.length === 1
    ? `${listed} was found in no other part of the article`
    : `${listed} were found in no other part of the article`;
  return { verdict: disagrees(because), span, marks };
}

function listOf(items: readonly string[]): string {
  const distinct = [...new Set(items)];
  const shown = distinct.slice(0, NAMED);
  const more = distinct.length - shown.length;
  const last = more > 0 ? `${more} more` : shown.pop();
  return shown.length === 0 ? `${last}` : `${shown.join(', ')} and ${last}`;
}

/** The number with the words around it, or the result it belongs to, to be quoted. */
function wordsOf({ findings, manuscript: { text } }: Reading, { span }: BareNumber): Span {
  const result = findings.results.find((candidate) =>
    candidate.span.start <= span.start && span.end <= candidate.span.end);
  if (result !== undefined) return result.span;
  const before = text.slice(Math.max(0, span.start - 30), span.start)
    .match(/\S+\s+\S+\s+$|\S+\s+$/);
  const behind = text.slice(span.end, span.end + 24).match(/^\S*\s\S+/);
  return {
    start: span.start - (before?.[0].length ?? 0),
    end: span.end + (behind?.[0].length ?? 0),
  };
}
