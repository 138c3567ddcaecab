import type { Count, Interval, Printed, PValue, Relation, Result } from '../model/index.ts';

/** A printed number in plain notation with its percent sign: "35.1%" for "35·1%". */
function plain({ plain: digits, percent }: Printed): string {
  return percent ? `${digits}%` : digits;
}

const SIGN: Record<Relation, string> = { '=': '=', '<': '<', '<=': '≤', '>': '>', '>=': '≥' };

/** A p-value as it is read: "p = 0.03", "p < 0.001 for trend". */
export function pInWords({ relation, printed, tests }: PValue): string {
  const what = tests === 'result' ? '' : ` for ${tests}`;
  return `p ${SIGN[relation]} ${plain(printed)}${what}`;
}

/** An interval as it is read: "95% CI 1.05 to 2.41"; "CrI" for a credible one. */
export function intervalInWords({ lower, upper, level, type }: Interval): string {
  const name = type === 'credible' ? 'CrI' : 'CI';
  const said = level === undefined ? name : `${level}% ${name}`;
  return `${said} ${plain(lower)} to ${plain(upper)}`;
}

/** A count with what it is of: "45 of 120 (37.5%)". */
export function countInWords({ count, total, percent }: Count): string {
  const share = percent === undefined ? '' : plain(percent);
  const of = total === undefined ? '' : ` of ${total.plain}`;
  if (count === undefined) return `${share}${of}`;
  return share === '' ? `${count.plain}${of}` : `${count.plain}${of} (${share})`;
}

/**
 * A result in one line, the same for every way of printing it:
 * "OR 1.59 (95% CI 1.05 to 2.41), p = 0.03".
 */
export function resultInWords(result: Result): string {
  const interval = result.interval === undefined ? '' : intervalInWords(result.interval);
  const estimate = result.estimate === undefined ? '' : plain(result.estimate);
  const counts = result.kind === 'proportion' ? result.counts.map(countInWords) : [];
  const head = [measureInWords(result), estimate, estimate === '' || interval === '' ? interval
    : `(${interval})`].filter((part) => part !== '').join(' ');
  const p = result.p === undefined ? [] : [pInWords(result.p)];
  return [head, ...counts, ...p].filter((part) => part !== '').join(', ');
}

/** What stands before the estimate: "OR", "β", "χ²(2) =". */
export function measureInWords(result: Result): string {
  switch (result.kind) {
    case 'ratio': return result.measure;
    case 'difference': return result.measure;
    case 'coefficient': return result.standardError === undefined
      ? 'coefficient' : `coefficient (SE ${plain(result.standardError)})`;
    case 'proportion': return result.estimate === undefined ? '' : 'proportion';
    case 'discrimination': return result.measure === 'C' ? 'C statistic' : result.measure;
    case 'test': return `${STATISTIC[result.statistic]}${freedom(result.degreesOfFreedom)} ${
      SIGN[result.relation]}`;
    case 'other': return result.measure === 'other' ? '' : result.measure;
    default: return result satisfies never;
  }
}

const STATISTIC = { z: 'z', t: 't', 'chi-square': 'χ²', F: 'F', Q: 'Q' } as const;

function freedom(degrees: readonly Printed[]): string {
  return degrees.length === 0 ? '' : `(${degrees.map((degree) => degree.plain).join(', ')})`;
}
