import { explanationsInOrder, likelySlipsInWords } from '../../authoring/explaining.ts';
import { listed } from '../../report/numbers-in-words.ts';
import { type Agreement, agreement } from '../../stats/agreement.ts';
import { explanationSentence, NAMES } from '../../stats/explanation-sentence.ts';
import type { OthersImply } from '../../stats/implied.ts';
import type { ReportedNumbers } from '../../stats/reported-numbers.ts';
import type { Quantity } from '../../stats/strip.ts';

/** Ratios whose methods lean further than those of odds and hazards of two groups. */
const FREER = new Set(['RR', 'PR', 'GMR', 'RRR']);

/**
 * How a ratio's numbers stand to each other, as of two groups; for a risk ratio or a ratio of
 * means, whose likelihoods lean further, by the wider bound.
 */
export function ratioAgreement(numbers: ReportedNumbers, name: string): Agreement {
  return agreement(numbers, FREER.has(name) ? 'unknown' : 'binary');
}

/** What is told first where two groups could not give the numbers, and a measured thing could. */
export function freerInWords(found: Agreement, numbers: ReportedNumbers): readonly string[] {
  if (found.outcome !== 'neither') return [];
  if (agreement(numbers, 'unknown').outcome === 'neither') return [];
  return ['Of two groups no usual method gives such numbers; per unit of something measured, or as '
    + 'a risk ratio of a common outcome, a profile-likelihood or exact interval or test could.'];
}

/** How the printed numbers stand to each other, in a sentence or two. */
export function agreementInWords(found: Agreement, read: string): readonly string[] {
  switch (found.outcome) {
    case 'within rounding': return [found.spare > 0
      ? 'The printed numbers agree within their rounding.'
      : 'Two numbers can always agree; this is what follows from them.'];
    case 'within another standard method': return [
      'By the standard (Wald) method the printed numbers do not follow from each other, but '
        + `another usual method of the same data could give them: ${LEANING[found.leaning]}`
        + `${found.contrast === 'per unit' ? ', if the ratio is per unit of something measured'
          : ''}.`,
      conflictsInWords(found.conflicts),
    ];
    case 'neither': return [
      `No rounding and no usual method reconciles the printed numbers, read as ${read}.`,
      outlierInWords(found.othersImply) ?? conflictsInWords(found.conflicts),
    ];
    case 'cannot tell': return [`Nothing can be compared: ${found.because}.`];
    default: return found satisfies never;
  }
}

const LEANING = {
  p: 'the p-value may come from a likelihood-ratio, score, log-rank or exact test',
  interval: 'the interval may be a profile-likelihood, exact or score interval',
  'interval and p': 'interval and p-value may both be of a likelihood, score or exact kind',
} as const;

/** The one number without which all others agree, where there is just one and enough others. */
function outlierInWords(all: readonly OthersImply[]): string | undefined {
  const [only, more] = all.filter(({ strict }) => strict !== undefined);
  if (only === undefined || more !== undefined || all.length < 4) return undefined;
  return `Without the ${NAMES[only.of]} the others agree with each other.`;
}

const CONFLICTS_NAMED = 3;

/** "The estimate and the upper limit do not go together; nor do …". */
function conflictsInWords(conflicts: readonly (readonly Quantity[])[]): string {
  const named = conflicts.slice(0, CONFLICTS_NAMED)
    .map((conflict) => listed(conflict.map((quantity) => `the ${NAMES[quantity]}`)));
  const [first = '', ...others] = named;
  const alone = conflicts[0]?.length === 1;
  const sentence = `${first.charAt(0).toUpperCase()}${first.slice(1)} `
    + (alone ? 'cannot be as printed' : 'do not go together');
  return `${[sentence, ...others.map((other) => `nor do ${other}`)].join('; ')}.`;
}

/** What would reconcile numbers that disagree, likeliest first. */
export function reconcilingInWords(found: Agreement): readonly string[] {
  switch (found.outcome) {
    case 'neither': return [
      ...explanationsInOrder(found.explanations).map(explanationSentence),
      ...likelySlipsInWords(found.repairs),
    ];
    case 'cannot tell': return found.explanations.map(explanationSentence);
    case 'within rounding':
    case 'within another standard method': return [];
    default: return found satisfies never;
  }
}
