import type { PValue } from '../../model/index.ts';
import type { Item, LabelItem, NameItem } from '../parse/item.ts';
import { findPhrase, type Worded } from '../phrases.ts';
import { ADJUSTMENT, type Naming } from '../vocabulary.ts';

/** What a heading, a row's label, a caption or a note says of the numbers it is over. */
export interface Heading {
  readonly names: readonly Naming[];
  readonly label?: LabelItem;
  readonly adjusted?: boolean;
  /** Set where the column holds p-values, with what they test. */
  readonly p?: PValue['tests'];
  /** Which limit a column of single limits holds. */
  readonly limit?: 'lower' | 'upper';
  /** Whether it speaks of counts, shares, means, medians or spreads: of no ratio. */
  readonly plain: boolean;
  /** Whether it speaks of means, medians or spreads, whose brackets hold no interval of a ratio. */
  readonly spread: boolean;
}

const PLAIN = new Set(['n', 'no', 'number', 'iqr', 'sd', 'range', 'gmt', 'percent', 'frequency', 'deaths',
  'person', 'persons', 'se', 'interquartile', 'percentage', 'nnt', 'count']);

const P_HEADINGS = new Set(['p', 'ptrend', 'pvalue', 'pinteraction', 'sig', 'pint', 'phet', 'pfor']);

/** Words that may stand before the P of a heading: "Wald p value", "Log-rank P". */
const BEFORE_P = new Set(['wald', 'log', 'rank', 'logrank', 'likelihood', 'ratio', 'adjusted', 'unadjusted',
  'nominal', 'two', 'one', 'sided', 'stratified', 'test', 'crude', 'multivariate', 'univariate', 'overall']);

/** Reads what the items of a heading say. */
export function headingOf(items: readonly Item[]): Heading {
  const names = items.flatMap((item) => (item.kind === 'name' ? [item] : []));
  const label = items.find((item) => item.kind === 'label');
  const adjusted = adjustmentIn(items, names);
  const p = pHeading(items);
  const limit = limitIn(items);
  const firm = isExponential(items)
    ? [EXPONENTIAL, ...names.map(({ naming }) => naming).filter(({ quantity }) =>
      quantity.kind !== 'coefficient')]
    : names.map(({ naming }) => naming);
  return {
    names: firm,
    ...(label === undefined ? {} : { label }),
    ...(adjusted === undefined ? {} : { adjusted }),
    ...(p === undefined ? {} : { p }),
    ...(limit === undefined ? {} : { limit }),
    plain: isPlain(items, firm),
    spread: items.some((item) => item.kind === 'plus-minus' || isNamedSpread(item)),
  };
}

/** An exponential of a coefficient is a ratio, and the model tells of what. */
const EXPONENTIAL: Naming = { quantity: { kind: 'ratio', measure: 'ratio' }, firm: true };

// Exp(B)   exp(β)   EXP (coef)
function isExponential(items: readonly Item[]): boolean {
  const at = items.findIndex((item) => item.kind === 'word' && item.word === 'exp');
  const inside = items[at + 2];
  if (at < 0 || items[at + 1]?.kind !== 'open') return false;
  return (inside?.kind === 'word' && /^(?:b|β|coeff?|beta)$/.test(inside.word))
    || (inside?.kind === 'name' && inside.naming.quantity.kind === 'coefficient');
}

function adjustmentIn(items: readonly Item[], names: readonly NameItem[]): boolean | undefined {
  const own = names.find((name) => name.adjusted !== undefined)?.adjusted;
  if (own !== undefined) return own;
  for (let at = 0; at < items.length; at++) {
    if (items[at]?.kind !== 'word') continue;
    const said = findPhrase(ADJUSTMENT, items as readonly Worded[], at)?.meaning;
    if (said !== undefined) return said;
  }
  return undefined;
}

// P   P-value   p for trend   Ptrend   Sig.
function pHeading(items: readonly Item[]): PValue['tests'] | undefined {
  const first = items.find((item) => item.kind === 'name' || item.kind === 'label' || item.kind === 'number'
    || (item.kind === 'word' && !BEFORE_P.has(item.word)));
  if (first?.kind !== 'word' || !P_HEADINGS.has(first.word)) return undefined;
  const words = items.flatMap((item) => (item.kind === 'word' ? [item.word] : [])).join(' ');
  if (/trend/.test(words)) return 'trend';
  if (/inter|pint/.test(words)) return 'interaction';
  return /het/.test(words) ? 'heterogeneity' : 'result';
}

function limitIn(items: readonly Item[]): Heading['limit'] {
  const words = new Set(items.flatMap((item) => (item.kind === 'word' ? [item.word] : [])));
  if (words.has('lower') || words.has('lcl') || words.has('ll')) return 'lower';
  return words.has('upper') || words.has('ucl') || words.has('ul') ? 'upper' : undefined;
}

// MERS cases (n = 36): a size, not what the column holds
function isSampleSize(items: readonly Item[], at: number): boolean {
  const item = items[at];
  return item?.kind === 'word' && item.word === 'n' && items[at + 1]?.kind === 'relation';
}

/** "No reported progression" denies; "No. of patients" counts. */
function isDenial(items: readonly Item[], at: number): boolean {
  const item = items[at];
  return item?.kind === 'word' && item.word === 'no' && items[at + 1]?.kind === 'word';
}

/** The heading of a column from those of its levels, the lowest speaking first. */
export function joinHeadings(levels: readonly Heading[]): Heading {
  const lowestFirst = levels.toReversed();
  const names = lowestFirst.flatMap((level) => level.names);
  const isRatio = names.some(({ quantity, firm }) => firm && quantity.kind === 'ratio');
  const label = lowestFirst.find((level) => level.label !== undefined)?.label;
  const adjusted = lowestFirst.find((level) => level.adjusted !== undefined)?.adjusted;
  const limit = lowestFirst.find((level) => level.limit !== undefined)?.limit;
  const p = lowestFirst[0]?.p;
  return {
    names,
    ...(label === undefined ? {} : { label }),
    ...(adjusted === undefined ? {} : { adjusted }),
    ...(p === undefined ? {} : { p }),
    ...(limit === undefined ? {} : { limit }),
    plain: !isRatio && levels.some(({ plain }) => plain),
    spread: levels.some(({ spread }) => spread),
  };
}

const SPREADS = new Set(['iqr', 'sd', 'gmt', 'interquartile', 'range', 'quartiles']);

function isNamedSpread(item: Item): boolean {
  if (item.kind === 'word') return SPREADS.has(item.word);
  const { quantity } = item.kind === 'name' ? item.naming : {};
  return quantity?.kind === 'other' && (quantity.measure === 'mean' || quantity.measure === 'median');
}

function isPlain(items: readonly Item[], names: readonly Naming[]): boolean {
  if (names.some(({ quantity, firm }) => firm && quantity.kind === 'ratio')) return false;
  if (names.some(({ quantity }) => quantity.kind !== 'ratio')) return true;
  return items.some((item, at) => item.kind === 'percent' || item.kind === 'plus-minus'
    || (item.kind === 'word' && PLAIN.has(item.word) && !isSampleSize(items, at) && !isDenial(items, at)));
}
