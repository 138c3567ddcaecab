import {
  agrees,
  cannotTell,
  defineManuscriptRule,
  disagrees,
  judgeSayings,
  type Saying,
  type Verdict,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'p-value-meaning',
  question: 'Is a p-value or an interval explained as what it is?',
  why: `
    A p-value is the probability of data at least as far from the hypothesis as those seen, if the
    hypothesis and all else assumed hold. It is not the probability that the hypothesis holds,
    nor that the result is due to chance.
  `,
  source: `
    Wasserstein RL, Lazar NA. The ASA statement on p-values: context, process, and purpose. Am
    Stat 2016;70:129–133. Greenland S, Senn SJ, Rothman KJ, et al. Statistical tests, P values,
    confidence intervals, and power: a guide to misinterpretations. Eur J Epidemiol
    2016;31:337–350.
  `,
  innocent: [
    'The sentence tells a misreading in order to warn of it.',
    'The analysis is Bayesian, and the number is a posterior probability.',
    'The sentence is a short form that the authors explain better elsewhere.',
  ],
  grade: 'caution',

  judge(reading) {
    return judgeSayings(reading, EXPLAINED, judgeMeaning);
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Please reword it, for instance: the probability, if there were no
    effect, of a result at least as far from none as the one seen.
  `,

  examples: [
    {
      text: 'The p value is the probability that the hypothesis of no effect is true.',
      outcome: 'disagrees',
      note: 'it is worked out on the supposition that the hypothesis is true',
    },
    {
      text: 'The p-value gives the probability that the finding is due to chance.',
      outcome: 'disagrees',
      note: 'chance alone is what the p-value supposes',
    },
    {
      text: 'The p-value is the probability of a result at least as extreme if there '
        + 'is no effect.',
      outcome: 'agrees',
      note: 'conditional on the hypothesis',
    },
    {
      text: 'The p-value is not the probability that the hypothesis of no effect is true.',
      outcome: 'agrees',
      note: 'a warning',
    },
    {
      text: 'In the Bayesian analysis the p value is the probability that the hypothesis of no '
        + 'effect is true.',
      outcome: 'cannot tell',
      note: 'a posterior probability may be meant',
    },
  ],
});

const EXPLAINED = new RegExp(
  '\\bp\\s?[<=>]\\s?0?[.·]\\d+\\s+(?:means?|implies|indicates|says'
    + '|tells)\\b[^.;]{0,50}\\b(?:probability|chance)\\b[^.;]{0,90}|'
    + '\\bp[ -]?values?\\b[^.;]{0,40}\\b(?:probability|likelihood|chance|odds)\\b[^.;]{0,90}',
  'gi',
);

const MISREAD = new RegExp(
  '\\b(?:probability|likelihood|chance|odds)\\s+(?:that|of)\\s+(?:the |a |an |our |this |these )*'
    + '(?:(?:(?:null|alternative|study|research) ?hypothes[ie]s|hypothesis(?: of no \\p{L}+)?'
    + '|H0)(?:\\s+(?:is|was|being|to be))?\\s+(?:true|false|correct|right)'
    + '|(?:findings?|results?|effects?|differences?|associations?|data'
    + '|observations?)\\s+(?:is|are|was|were|being|arose|occurred|happened)?'
    + '\\s*(?:due to|by|caused by|because of|from|the result of)\\s+(?:random )?chance)',
  'iu',
);

const WARNING =
  /\b(?:not|never|misinterpret\w*|misread\w*|often thought|mistakenly|contrary)\b|n['’]t\b/i;

const CONDITIONAL = /\b(?:if|assuming|given|under)\b[^.;]{0,40}\b(?:null|no effect|no difference)/i;

function judgeMeaning({ sentence }: Saying): Verdict | undefined {
  if (!MISREAD.test(sentence)) {
    return /\bif\b|\bunder\b|assuming|given|extreme/i.test(sentence) ? agrees : undefined;
  }
  if (WARNING.test(sentence)) return agrees;
  if (/bayes|posterior/i.test(sentence)) return cannotTell('a posterior probability may be meant');
  if (CONDITIONAL.test(sentence)) return agrees;
  return disagrees('a p-value is explained as the probability of a hypothesis or of chance, and it '
    + 'is worked out on the supposition that the hypothesis holds');
}
