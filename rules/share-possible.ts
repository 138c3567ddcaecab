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
  id: 'share-possible',
  question: 'Is every share of a whole at most 100%?',
  why: `
    A sensitivity, a predictive value, a prevalence or a survival is a part of a whole, and lies
    between 0% and 100%. A larger number has lost its decimal point or is another quantity.
  `,
  source: `
    Altman DG, Bland JM. Diagnostic tests 1: sensitivity and specificity. BMJ 1994;308:1552
    (shares of those with and without the condition).
  `,
  innocent: [
    'A decimal point was lost: 103 for 10.3.',
    'A reference mark or the digit of a footnote was read as part of the number.',
    'The number is a ratio or an index of that name, with 100 as its base.',
  ],
  grade: 'contradiction',

  judge(reading) {
    return judgeSayings(reading, SHARE, judgeShare);
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Could the authors check the number? A decimal point may have been
    lost.
  `,

  examples: [
    {
      text: 'The swab had a sensitivity of 103% and a specificity of 88%.',
      outcome: 'disagrees',
      note: '103 of 100 cannot be',
    },
    {
      text: 'The swab had a sensitivity of 100% and a specificity of 88%.',
      outcome: 'agrees',
      note: 'all of them is possible',
    },
    {
      text: 'The prevalence of falls was 134% in the old ward.',
      outcome: 'disagrees',
      note: 'more than all',
    },
    {
      text: 'The prevalence of falls was 134% of that in the old ward.',
      outcome: 'cannot tell',
      note: 'a comparison of two prevalences',
    },
  ],
});

const SHARE = new RegExp(
  '\\b(?:sensitivity|specificity|(?:positive |negative )?predictive values?|[PN]PV'
    + '|prevalence|(?:overall |event-free )?survival'
    + '|cumulative incidence|response rate|case fatality|mortality rate|proportion|coverage'
    + '|diagnostic accuracy)'
    + '(?:\\s+of\\s+(?:the\\s+)?[\\p{L}-]+)?(?:\\s*[:=(,]\\s*|\\s+(?:of|was|were|is|at'
    + '|reached)\\s+|\\s+)'
    + '([-−]?\\d{1,4}(?:[.·]\\d+)?)\\s?%'
    + '|\\b(?:AUROC|AUC|C[- ]statistic|C[- ]index)\\s*(?:[=:]|of'
    + '|was)?\\s*(1\\.\\d*[1-9])(?![\\d.]|\\s?(?:[µμnpm]?g|[µμnp]?mol|IU|U|h)\\b|\\s?[×x%·*/]'
    + '|\\s?[-–]\\s?\\d)'
    + '|\\b(?:Pearson|Spearman|correlation)\\b[^.;,()]{0,40}[,( ](?:r|rho|ρ'
    + '|rs)\\s?=\\s?([1-9]\\d*\\.\\d*[1-9])(?![\\d%]|\\s?[×x])',
  'giu',
);

/** Right behind a percentage that compares two shares: "134% of that". */
const COMPARED = /^\s?%\s*(?:of (?:that|those|the)|higher|lower|increase|more|greater|relative)/;

function judgeShare({ parts: [number = '', area, correlation], sentence }: Saying): Verdict {
  if (area !== undefined || correlation !== undefined) {
    return disagrees(`${area === undefined ? 'a correlation' : 'an area under the curve'} is at `
      + `most 1, `
      + `and ${area ?? correlation} is printed`);
  }
  const share = Number(number.replace('·', '.').replace('−', '-'));
  if (share < 0) {
    return disagrees(`a share of a whole is never below 0%, and ${number}% is printed`);
  }
  if (share <= 100) return agrees;
  const behind = sentence.slice(sentence.indexOf(number) + number.length);
  return COMPARED.test(behind)
    ? cannotTell('the percentage seems to compare two shares')
    : disagrees(`a share of a whole is at most 100%, and ${number}% is printed`);
}
