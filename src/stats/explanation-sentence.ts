import type { Explanation } from './explanation.ts';
import type { Quantity } from './strip.ts';

/**
 * An explanation as a plain sentence that can stand in a report: "The limits would
 * agree with the rest if they were those of a 90% interval instead of a 95% one."
 */
export function explanationSentence(explanation: Explanation): string {
  switch (explanation.kind) {
    case 'other level':
      return levelSentence(explanation.stated, explanation.levels);
    case 'one-sided p':
      return 'All numbers agree if the p-value is one-sided.';
    case 'two-sided p':
      return 'All numbers agree if the p-value is two-sided.';
    case 't distribution':
      return studentSentence(explanation);
    case 'other test':
      return 'The p-value may come from another test of the same data than the interval: '
        + 'a likelihood-ratio, score, log-rank or exact test beside a Wald interval.';
    case 'adjusted p':
      return 'All numbers agree if the p-value was multiplied for '
        + `${oneOf(explanation.tests)} tests and the interval was not adjusted.`;
    case 'asymmetric interval':
      return asymmetrySentence(explanation.type);
    case 'log scale':
      return 'The numbers agree if estimate and limits are logarithms of ratios, not ratios.';
    case 'natural scale':
      return 'The interval is symmetric about the ratio itself, not about its logarithm.';
    case 'reference switched':
      return `The ${NAMES[explanation.of]} would agree with the rest if it compared the groups `
        + 'the other way round.';
    case 'other rounding':
      return explanation.rounding === 'twice'
        ? 'The numbers agree if they were rounded twice, first to one decimal more.'
        : 'The numbers agree if digits were cut off instead of rounded.';
    default:
      return explanation satisfies never;
  }
}

/** How the printed numbers are called in sentences. */
export const NAMES: Readonly<Record<Quantity, string>> = {
  estimate: 'estimate',
  lower: 'lower limit',
  upper: 'upper limit',
  p: 'p-value',
  coefficient: 'coefficient',
  'standard error': 'standard error',
  z: 'z statistic',
  'Wald statistic': 'Wald statistic',
};

function levelSentence(stated: number, levels: readonly number[]): string {
  const [first] = levels;
  if (levels.length === 1 && first === 68.27) {
    return 'The limits agree with the rest as the estimate plus and minus one standard error.';
  }
  if (levels.length === 1 && first === 95.45) {
    return 'The limits agree with the rest as the estimate plus and minus two standard errors.';
  }
  const named = oneOf(levels.map((level) => `${level}%`));
  return `The limits would agree with the rest as those of a ${named} interval `
    + `instead of a ${stated}% one.`;
}

function studentSentence(
  { of, least, most }: Extract<Explanation, { kind: 't distribution' }>,
): string {
  const degrees = least === most ? `${least}` : `${least} to ${most}`;
  const what = of === 'p' ? 'p-value' : 'interval and p-value';
  const verb = of === 'interval and p' ? 'come' : 'comes';
  return `All numbers agree if the ${what} ${verb} from a t distribution with ${degrees} `
    + 'degrees of freedom.';
}

function asymmetrySentence(type: 'likelihood' | 'bootstrap'): string {
  return type === 'likelihood'
    ? 'The interval may be a profile-likelihood, exact or score interval, which need not be '
      + 'symmetric on the log scale.'
    : 'The interval is too lopsided for a profile-likelihood or exact one; a bootstrap or '
      + 'Bayesian interval could be so.';
}

/** "3", "3 or 4", "3, 4 or 5". */
function oneOf(items: readonly (string | number)[]): string {
  const last = `${items[items.length - 1]}`;
  return items.length < 2 ? last : `${items.slice(0, -1).join(', ')} or ${last}`;
}
