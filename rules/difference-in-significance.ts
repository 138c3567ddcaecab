import {
  agrees,
  cannotTell,
  cover,
  defineManuscriptRule,
  disagrees,
  interactionOfPrinted,
  type Judgement,
  pInWords,
  rangeInWords,
  type RatioResult,
  type Reading,
  resultsWithin,
  type Saying,
  sayings,
  sideOfOne,
  spansOf,
  type Verdict,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'difference-in-significance',
  question: 'Is “in one group but not in the other” borne by a comparison of the two?',
  why: `
    One group significant and the other not does not show that they differ: the difference
    between significant and not significant is itself often not significant. What tells is the
    ratio of the two estimates with its interval, or a test of interaction.
  `,
  source: `
    Altman DG, Bland JM. Interaction revisited: the difference between two estimates. BMJ
    2003;326:219. Gelman A, Stern H. The difference between “significant” and “not significant”
    is not itself statistically significant. Am Stat 2006;60:328–331.
  `,
  innocent: [
    'A test of interaction was made and is reported elsewhere in the article.',
    'The two groups were to be looked at one by one, and no difference between them is claimed.',
    'The interaction comes from one adjusted model, which differs a little from this working.',
    'The groups overlap, so that the two estimates are not independent.',
  ],
  grade: 'caution',

  judge(reading) {
    const elsewhere = COMPARED.test(reading.manuscript.text);
    return sayings(reading, NOT_IN_THE_OTHER).flatMap((saying): readonly Judgement[] => {
      if (!NOT_ONLY_IN.test(saying.sentence) || !OF_EFFECTS.test(saying.sentence)) return [];
      const pair = pairOf(saying, reading);
      const verdict = pair === undefined
        ? judgeWords(saying, elsewhere)
        : judgePair(pair, saying, elsewhere);
      if (verdict === undefined) return [];
      const numbers = (pair ?? []).map(({ span }) => span);
      const marks = [saying.span, ...marksOf(pair)];
      return [{ verdict, span: cover(saying.span, ...numbers), marks }];
    });
  },

  comment: (words, { because }) => `
    In “${words}”, ${because}. Please compare the two groups directly, with the ratio of the two
    estimates and its interval or a test of interaction, before saying that they differ.
  `,

  examples: [
    {
      text: 'Walking lowered the risk of falls in women (RR 0.67, 95% CI 0.46 to 0.98) but not in '
        + 'men (RR 0.88, 95% CI 0.71 to 1.08).',
      outcome: 'disagrees',
      note: 'ratio of the two 0.76, p = 0.22: Altman and Bland’s example with other words',
    },
    {
      text: 'Walking lowered the risk of falls in women (RR 0.35, 95% CI 0.24 to 0.51) but not in '
        + 'men (RR 1.05, 95% CI 0.85 to 1.30).',
      outcome: 'agrees',
      note: 'ratio of the two 0.33, p below 0.0001',
    },
    {
      text: 'The effect was significant in men (p = 0.03) but not in women (p = 0.12), so that the '
        + 'splint works in men only.',
      outcome: 'disagrees',
      note: 'two p-values are no comparison',
    },
    {
      text: 'The splint lowered the risk of falls in men but not in women.',
      outcome: 'cannot tell',
      note: 'no estimates and no p-values to compare',
    },
    {
      text: 'The effect was significant in men (p = 0.03) but not in women (p = 0.12; p for '
        + 'interaction 0.004).',
      outcome: 'agrees',
      note: 'the comparison itself is tested',
    },
  ],
});

const GROUP = '(?:wom[ae]n|m[ae]n|males?|females?|boys|girls|smokers|(?:non|never|ex)-?\\s?smokers'
  + '|diabetics?'
  + '|non-?diabetics?|patients|participants|subjects|individuals|adults|children|infants'
  + '|people|persons'
  + '|those|subgroups?|carriers|non-?carriers|homozygotes|heterozygotes|users|non-?users|genotypes?'
  + '|whites|blacks|elderly|younger|older)';

/** The second half of the contrast; the first is looked for in the sentence. */
// in women (RR 0.67 …) but not in men        significant among smokers, not among others
//                      ^^^^^^^^^^^^^^
const NOT_IN_THE_OTHER = new RegExp(
  '\\b(?:but|and|although|though|whereas|while)\\s+(?:(?:was|were|there was|it was|this was'
    + '|had)\\s+)?(?:not|no)\\s+'
    + '(?:(?:statistically |significant(?:ly)? |such |clear )*(?:associat\\w+|effect'
    + '|difference|reduction|increase|benefit)?\\s*)?'
    + `(?:in|among)\\s+(?:the\\s+)?(?:[\\p{L}-]+\\s+){0,3}?${GROUP}\\b`,
  'giu',
);

/** The first half: the same words without the denial, earlier in the sentence. */
const NOT_ONLY_IN = new RegExp(
  `\\b(?:in|among)\\s+(?:the\\s+)?(?:[\\p{L}-]+\\s+){0,3}?${GROUP}\\b.*\\b(?:not|no)\\b`,
  'iu',
);

/** What is said of an effect, and not of a share, a method or a correlation. */
const OF_EFFECTS = new RegExp(
  '\\b(?:effect|significan|associat|reduc|increas|lower|higher|benefi|risk|odds|prevent'
    + '|protect|predict|improv|work)',
  'i',
);

/** Two results of which the first excludes 1 and the second holds it. */
type Pair = readonly [RatioResult, RatioResult];

/** The results right before and right after the words "but not in". */
function pairOf({ span, sentenceSpan }: Saying, reading: Reading): Pair | undefined {
  const ratios = resultsWithin(reading, sentenceSpan)
    .filter((result): result is RatioResult => result.kind === 'ratio');
  const first = ratios.filter((result) => result.span.end <= span.start).at(-1);
  const second = ratios.find((result) => result.span.start >= span.end);
  return first === undefined || second === undefined ? undefined : [first, second];
}

function marksOf(pair: Pair | undefined) {
  return (pair ?? []).flatMap(({ estimate, interval }) =>
    spansOf([estimate, interval?.lower, interval?.upper]));
}

/** Words by which the two groups are compared themselves. */
const COMPARED = new RegExp(
  '\\binteraction|\\bheterogene|\\beffect modification|\\bp for (?:difference'
    + '|heterogeneity)',
  'i',
);

function judgePair([one, other]: Pair, saying: Saying, elsewhere: boolean): Verdict | undefined {
  if (one.measure !== other.measure) return undefined;
  if (COMPARED.test(saying.sentence)) return agrees;
  const [first, second] = [one.interval, other.interval];
  if (first === undefined || second === undefined) return judgeWords(saying, elsewhere);
  if (sideOfOne(first) === 'around' || sideOfOne(second) !== 'around') return undefined;
  const found = interactionOfPrinted(one, other);
  if (found === undefined) {
    return cannotTell('the two results cannot be compared as they are printed');
  }
  const ratio = rangeInWords(found.ratio, 2);
  if (found.p.high < 0.05) return agrees;
  if (found.p.low < 0.05) {
    return cannotTell(`the two differ by a ratio of ${ratio}, p ${pInWords(found.p)}`);
  }
  return disagrees(
    'one group is significant and the other is not, and the two estimates differ by a ratio of '
      + `${ratio}, for which p is ${pInWords(found.p)}`,
    {
      recomputed: { quantity: 'p for interaction', range: found.p },
      working: [
        `ratio of the two: ${one.estimate?.plain} / ${other.estimate?.plain}`,
        'its standard error: the root of the sum of both squared, on the log scale',
        `p of no difference between the two, two-sided: ${pInWords(found.p)}`,
      ],
    },
  );
}

/** Two p-values, one on each side of 0.05, or words of significance with no numbers at all. */
function judgeWords({ sentence }: Saying, elsewhere: boolean): Verdict | undefined {
  if (COMPARED.test(sentence)) return agrees;
  const values = [...sentence.matchAll(/\bp\s?[=<>]\s?(0?[.·]\d+)/gi)].map(([, p = '']) =>
    Number(p.replace('·', '.')));
  const [first, ...others] = values;
  if (first === undefined || others.length === 0) {
    return /\d/.test(sentence)
      ? undefined
      : cannotTell('no estimates are printed that could be compared');
  }
  if (first > 0.05 || !others.some((p) => p > 0.05)) return undefined;
  if (elsewhere) {
    return cannotTell('the text speaks of a test of interaction, which may be that of these '
      + 'groups');
  }
  return disagrees('one group is significant and the other is not, which does not compare the two');
}
