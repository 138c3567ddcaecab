import {
  agrees,
  cannotTell,
  defineManuscriptRule,
  disagrees,
  flowing,
  type Judgement,
  judgeSayings,
  quote,
  type Reading,
  type Saying,
  sayings,
  toldOnce,
  type Verdict,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'multivariable-in-words',
  question: 'Is a model with one outcome and several predictors called multivariable?',
  why: `
    A multivariate model has several outcomes; one with several predictors and one outcome is
    multivariable. The two are often mixed up, and where several outcomes were recorded a reader
    cannot tell which was done.
  `,
  source: `
    Hidalgo B, Goodman M. Multivariate or multivariable regression? Am J Public Health
    2013;103:39–40.
  `,
  innocent: [
    'The journal or the field writes “multivariate” for both, and everybody understands it.',
    'Several outcomes were in fact modelled together.',
    'The word is that of a program or of an older article.',
  ],
  grade: 'caution',

  judge(reading) {
    const found = judgeSayings(reading, MULTIVARIATE, (saying) => judgeWord(saying, reading));
    const plain = sayings(reading, /\bmultivariable\b/gi)[0];
    const stands: readonly Judgement[] = found.length > 0 || plain === undefined ? []
      : [{ verdict: agrees, span: plain.span, marks: [plain.span] }];
    return [...toldOnce(reading, found).slice(0, 1), ...stands];
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. If there is one outcome, “multivariable” says so.
  `,

  examples: [
    {
      text: 'Multivariate logistic regression with one outcome was used.',
      outcome: 'disagrees',
      note: 'one outcome: multivariable',
    },
    {
      text: 'Multivariable logistic regression was used.',
      outcome: 'agrees',
      note: 'one outcome, several predictors',
    },
    {
      text: 'Multivariate logistic regression was used.',
      outcome: 'cannot tell',
      note: 'the text does not say how many outcomes were modelled together',
    },
    {
      text: 'A multivariate logistic model of a single outcome, relapse, was adjusted for age.',
      outcome: 'disagrees',
      note: 'a single outcome: multivariable',
    },
  ],
});

const MULTIVARIATE = new RegExp(
  '\\bmultivariate\\s+(?:adjusted\\s+|binary\\s+|stepwise\\s+|backward\\s+)?'
    + '(?:logistic|Cox|Poisson|log-?binomial|proportional|hazards?|regression|analys[ie]s'
    + '|models?|adjustment)\\b[^.;]{0,60}',
  'gi',
);

const SEVERAL = new RegExp(
  '\\b(?:manova|outcomes (?:were )?(?:jointly|together)|joint(?:ly)? model'
    + '|multivariate (?:normal|meta|probit|outcomes?|mixed))',
  'i',
);

const ONE_OUTCOME = new RegExp(
  '\\b(?:one|single|the only|a binary|a dichotomous) (?:\\w+ )?'
    + '(?:outcome|dependent variable|response)\\b',
  'i',
);

/** One outcome is named as one; what is only usual in the field is not held against anybody. */
function judgeWord({ span, sentence }: Saying, { manuscript }: Reading): Verdict | undefined {
  if (SEVERAL.test(sentence)) return undefined;
  const words = flowing(quote(manuscript.text, span)).split(' ').slice(0, 2).join(' ');
  return ONE_OUTCOME.test(sentence)
    ? disagrees(`“${words}” is said of a model with one outcome, which is multivariable`)
    : cannotTell(`“${words}” may mean several outcomes or several predictors`);
}
