import {
  agrees,
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
  id: 'p-value-exact',
  question: 'Are p-values given as numbers, and not as NS or as a side of 0.05?',
  why: `
    “NS”, “p > 0.05” and “p < 0.05” hide whether p was 0.051 or 0.94, 0.049 or 0.0002. A reader
    who wants to weigh the result, or to use it in a meta-analysis, needs the number, and better
    still the estimate with its interval.
  `,
  source: `
    Lang TA, Altman DG. Basic statistical reporting for articles published in biomedical
    journals: the SAMPL guidelines. Int J Nurs Stud 2015;52:5–9 (exact p-values, not NS).
  `,
  innocent: [
    'The threshold is named as such, in the methods or under a table.',
    'The exact values stand in a table.',
    'Only the side of a threshold is known, as from permutations or an older article.',
  ],
  grade: 'caution',

  judge(reading) {
    const found = judgeSayings(reading, ON_A_SIDE, (saying) => judgeP(saying, reading));
    const exact = sayings(reading, EXACT)[0];
    const stands: readonly Judgement[] = found.length > 0 || exact === undefined ? []
      : [{ verdict: agrees, span: exact.span, marks: [exact.span] }];
    return toldOnce(reading, [...found, ...stands]);
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Please give exact p-values, with the estimate and its interval.
  `,

  examples: [
    {
      text: 'Relapse did not differ between the wards (p = NS).',
      outcome: 'disagrees',
      note: 'p may be anything from 0.051 to 1',
    },
    {
      text: 'Relapse did not differ between the wards (p > 0.05).',
      outcome: 'disagrees',
      note: 'p may be anything from 0.051 to 1',
    },
    {
      text: 'Relapse was more frequent in the old ward (p < 0.05).',
      outcome: 'disagrees',
      note: 'p may be 0.049 or far below',
    },
    {
      text: 'Relapse was more frequent in the old ward (p = 0.03).',
      outcome: 'agrees',
      note: 'an exact value',
    },
    {
      text: 'Relapse was more frequent in the old ward (p = 0.03). A value of p < 0.05 was '
        + 'considered '
        + 'statistically significant.',
      outcome: 'agrees',
      note: 'p < 0.05 names the threshold and is no result',
    },
  ],
});

const ON_A_SIDE = new RegExp(
  '\\b[Pp](?:[ -]?values?)?\\s?[=:]?\\s?(?:NS|N\\.S\\.|ns|n\\.s\\.|non-?significant)(?!\\w)'
    + '|\\(\\s?(?:NS|N\\.S\\.|n\\.s\\.)\\s?\\)'
    + '|\\b[Pp](?:[ -]?values?)?\\s?(?:[<>≤≥]|&gt;|&lt;)\\s?(?:0?[.·]050?)(?!\\d)',
  'g',
);

const EXACT = /\b[Pp](?:[ -]?values?)?\s?(?:[=]|<|was|of)\s?0?[.·]\d{2,4}\b/g;

/** Words that make p < 0.05 a threshold, a rule of choice, or the value of several results. */
const THRESHOLD = new RegExp(
  '\\b(?:consider\\w*|defin\\w*|levels?|set|threshold|criteri\\w*|deem\\w*|regard\\w*'
    + '|accept\\w*|cut-?off'
    + '|two-?\\s?(?:sided|tailed)|alpha|α|retain\\w*|enter\\w*|includ\\w*|select\\w*|if'
    + '|denot\\w*|indicat\\w*'
    + '|significance was|statistical significance|taken|assum\\w*|adopted|required|used|all'
    + '|both|each|any'
    + '|either|every|powered?|determined|judged|interpreted|represent\\w*|identified by'
    + '|probability|detect|power|sample size|having an?|variables with)\\b',
  'i',
);

function judgeP({ span, sentence, role }: Saying, { manuscript }: Reading): Verdict | undefined {
  const words = flowing(quote(manuscript.text, span));
  if (role === 'introduction') return undefined;
  const isNamed = /NS|N\.S|ns|n\.s|signif/.test(words);
  if (!isNamed && (role === 'methods' || THRESHOLD.test(sentence))) return undefined;
  return disagrees(isNamed || />|≥/.test(words)
    ? `“${words}” says of p only that it is above 0.05`
    : `“${words}” says of p only that it is below 0.05`);
}
