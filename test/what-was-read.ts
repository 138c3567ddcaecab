import type { Claim, Count, Interval, PValue, Result } from '../src/model/index.ts';

/*
 * What was found in a text, in the words of a case file: the parts of a line
 * "reads … as", "counts … as", "hears of … that it is".
 */

/** A result in parts that a case lists in full: "OR 1.59", "1.05 to 2.41 at 95%", "p = 0.03". */
export function partsOfResult(result: Result): readonly string[] {
  const { estimate, interval, p, adjusted } = result;
  return [
    [nameOf(result), ...(estimate === undefined ? [] : [numberOf(estimate)])].join(' '),
    ...(interval === undefined ? [] : [intervalInWords(interval)]),
    ...extrasOf(result),
    ...(p === undefined ? [] : [pInWords(p)]),
    ...(adjusted === undefined ? [] : [adjusted ? 'adjusted' : 'crude']),
  ];
}

/** What else is known of a result; a case may list any of these: `outcome "cough"`. */
export function asidesOfResult({ about, cell }: Result): readonly string[] {
  const known = { ...about, row: cell?.row, column: cell?.column };
  return Object.entries(known).flatMap(([name, words]) =>
    words === undefined ? [] : [`${name} "${words}"`],
  );
}

/** "percentage" for a proportion, "amount" for what has no name of its own. */
function nameOf(result: Result): string {
  switch (result.kind) {
    case 'proportion':
      return 'percentage';
    case 'coefficient':
      return 'coefficient';
    case 'test':
      return result.statistic;
    case 'other':
      return result.measure === 'other' ? 'amount' : result.measure;
    default:
      return result.measure;
  }
}

function extrasOf(result: Result): readonly string[] {
  if (result.kind === 'coefficient' && result.standardError !== undefined) {
    return [`SE ${result.standardError.plain}`];
  }
  if (result.kind !== 'test' || result.degreesOfFreedom.length === 0) return [];
  return [`df ${result.degreesOfFreedom.map(({ plain }) => plain).join(' and ')}`];
}

function numberOf({
  plain,
  percent,
}: {
  readonly plain: string;
  readonly percent: boolean;
}): string {
  return percent ? `${plain}%` : plain;
}

function intervalInWords({ lower, upper, level, type }: Interval): string {
  const at = level === undefined ? '' : ` at ${level}%`;
  const limits = `${numberOf(lower)} to ${numberOf(upper)}${at}`;
  return type === 'credible' ? `credible ${limits}` : limits;
}

function pInWords({ relation, printed, tests, oneSided }: PValue): string {
  const sides = oneSided === undefined ? '' : oneSided ? 'one-sided ' : 'two-sided ';
  const of = tests === 'result' ? '' : tests === 'factor' ? ' of the factor' : ` for ${tests}`;
  return `${sides}p${of} ${relation} ${printed.plain}`;
}

/** A count in parts: "19 of 66" and "29%", or "85" and "64.4%". */
export function partsOfCount({ count, total, percent }: Count): readonly string[] {
  const number = [count?.plain, total?.plain].filter((part) => part !== undefined).join(' of ');
  return [
    ...(number === '' ? [] : [number]),
    ...(percent === undefined ? [] : [numberOf(percent)]),
  ];
}

/** What a claim says of its result, in a word or two; "" where a case file has no word for it. */
export function partOfClaim(claim: Claim): string {
  switch (claim.kind) {
    case 'significance':
      return claim.asserted ? 'significant' : 'not significant';
    case 'direction':
      return claim.direction;
    case 'size':
      return `${Number(claim.factor.toFixed(4))} times`;
    case 'scale':
      return `in ${claim.scale}`;
    case 'comparison':
    case 'prediction':
      return '';
    default:
      return claim satisfies never;
  }
}
