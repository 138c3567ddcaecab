import {
  agrees,
  cannotTell,
  type Claim,
  contrastOf,
  cover,
  defineManuscriptRule,
  disagrees,
  flowing,
  type Interval,
  type Judgement,
  impliedP,
  levelOf,
  limitsStand,
  multiplierInWords,
  limitsInWords,
  pInWords,
  probabilitiesOf,
  type PValue,
  quote,
  type Range,
  type RatioResult,
  type Reading,
  sideOfOne,
  spansOf,
  type Verdict,
  wordsAround,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'interval-and-significance',
  question: 'Do the words claim significance where the interval excludes 1, and only there?',
  why: `
    An interval that holds 1 leaves room for no difference at its level, so that “significant”
    goes beyond it; one that excludes 1 does not bear “no association”. Readers take the words
    with them, not the limits.
  `,
  source: `
    Gardner MJ, Altman DG. Confidence intervals rather than P values: estimation rather than
    hypothesis testing. BMJ 1986;292:746–750. Altman DG, Bland JM. Absence of evidence is not
    evidence of absence. BMJ 1995;311:485.
  `,
  innocent: [
    'The claim rests on another test than the interval: log-rank, likelihood ratio or exact.',
    'The test was one-sided, or its level was not 5%.',
    'Significance was judged after adjustment for multiple comparisons, and the interval was not.',
    'The words speak of another result in the same sentence.',
    '“No difference” was meant as no difference that matters, by a margin set in advance.',
  ],
  grade: 'discrepancy',

  judge(reading) {
    return reading.findings.claims.flatMap((claim): readonly Judgement[] => {
      const result = claim.of;
      if (claim.kind !== 'significance' || claim.manner === 'implied') return [];
      if (result?.kind !== 'ratio' || result.interval === undefined) return [];
      if (!speaksOf(claim, result, reading)) return [];
      const verdict = judgeClaim(claim, result, result.interval, reading);
      if (verdict === undefined) return [];
      const { lower, upper } = result.interval;
      const marks = [claim.span, ...spansOf([lower, upper])];
      return [{ verdict, span: cover(claim.span, result.span), marks, result }];
    });
  },

  comment: (words, { because }) => `
    In “${words}”, ${because}. Could the authors say which test the claim rests on, or reword it
    so that it says what the interval says?
  `,

  examples: [
    {
      text: 'Smoking was significantly associated with relapse (OR 1.59, 95% CI 1.05 to 2.41).',
      outcome: 'agrees',
      note: 'the interval lies above 1',
    },
    {
      text: 'Smoking was significantly associated with relapse (OR 1.20, 95% CI 0.95 to 1.52).',
      outcome: 'disagrees',
      note: 'the interval holds 1: p between 0.12 and 0.14',
    },
    {
      text: 'Smoking was not associated with relapse (OR 1.59, 95% CI 1.05 to 2.41).',
      outcome: 'disagrees',
      note: 'the interval excludes 1: p = 0.03',
    },
    {
      text: 'Smoking was not significantly associated with relapse (OR 1.20, 95% CI 0.95 to 1.52).',
      outcome: 'agrees',
      note: 'the interval holds 1',
    },
    {
      text: 'Smoking was significantly associated with relapse (OR 1.31, 95% CI 1.00 to 1.72).',
      outcome: 'cannot tell',
      note: '"1.00" may be 0.997 or 1.004',
    },
    {
      text: 'Smoking was significantly associated with relapse (OR 1.31, 90% CI 1.03 to 1.67).',
      outcome: 'cannot tell',
      note: 'a 90% interval that excludes 1 bears p < 0.10, and p is 0.06 to 0.08 here',
    },
  ],
});

type SignificanceClaim = Extract<Claim, { readonly kind: 'significance' }>;

/** Words by which a claim denies an effect of its own; "similar" compares two results. */
const DENIAL = new RegExp(
  '\\b(?:no|not|without|neither|nor|lack of|never)\\b.*'
    + '\\b(?:significan\\w*|associat\\w*|effects?|differ\\w*|relat(?:ed|ion\\w*)'
    + '|benefits?|impact|influenced?)'
    + '|\\b(?:non|in).?significan',
  'i',
);

/** Negations that turn an assertion round from further away. */
const NEGATION =
  /\b(?:no|not|non\w*|neither|nor|never|without|fail\w*|lack\w*|unlikely|cannot)\b|n['’]t\b/i;

/** Where a clause ends, so that what follows need not be about what went before. */
const CLAUSE_END = new RegExp(
  '(?<!\\b(?:vs?|e\\.g|i\\.e|approx|no))[.;](?:\\s*,?\\s|$)'
    + '|\\b(?:but|whereas|while|although|though|however|despite|except)\\b',
  'i',
);

/** Where the words come after the numbers, a new subject may come between as well. */
const NEW_SUBJECT = /\b(?:and|with|for|in|among|when)\b/i;

/** What may be changed, explained or compared in words of significance other than a result. */
const OF_SOMETHING_ELSE = new RegExp(
  '\\b(?:heterogene\\w*|homogene\\w*|interaction|trend|dose.respons\\w*|modif\\w*|collinear\\w*'
    + '|chang(?:e|ed|ing)|alter(?:ed)?|attenuat\\w*|explain\\w*|between the \\d+)\\b',
  'i',
);

/** Words after which a denial tells who is meant: "those whose income was not related". */
const OF_A_GROUP = /\b(?:whose|who|which|those|if)\b[^,;]*$/i;

/** How far apart the words and the numbers may stand: before the numbers, and after them. */
const REACH = { before: 160, after: 40 } as const;

/**
 * Whether the words are plainly of this result: in one clause with it and near it,
 * neither turned round by a negation further away, nor about something else.
 */
function speaksOf(claim: SignificanceClaim, result: RatioResult, reading: Reading): boolean {
  const { text } = reading.manuscript;
  const { start, end } = claim.span;
  const leadIn = text.slice(Math.max(claim.sentence.start, start - 100), start);
  const words = text.slice(start, Math.min(claim.sentence.end, end + 30));
  if (!sharesClause(claim, result, text) || OF_SOMETHING_ELSE.test(words)) return false;
  return claim.asserted
    ? !NEGATION.test(leadIn + text.slice(start, end))
    : DENIAL.test(words) && !OF_A_GROUP.test(leadIn);
}

function sharesClause({ span }: SignificanceClaim, result: RatioResult, text: string): boolean {
  if (span.end <= result.span.start) {
    const between = text.slice(span.end, result.span.start);
    return between.length <= REACH.before && !CLAUSE_END.test(between);
  }
  const between = text.slice(result.span.end, span.start);
  return between.length <= REACH.after && !CLAUSE_END.test(between) && !NEW_SUBJECT.test(between);
}

/** The level at which a p-value is called significant where nothing else is said. */
const USUAL_LEVEL = 0.05;

/**
 * The claim is held against what the interval says of 1 and against the two-sided
 * p that follows from the interval. It disagrees only where it goes against both:
 * at 95% they are the same, and at another level a reader may go by either.
 */
function judgeClaim(
  claim: SignificanceClaim,
  result: RatioResult,
  interval: Interval,
  reading: Reading,
): Verdict | undefined {
  if (!limitsStand(result.estimate, interval, contrastOf(reading, result))) return undefined;
  const p = impliedP(interval);
  if (p === undefined) return cannotTell('no p-value can be worked out from these limits');
  const side = sideOfOne(interval);
  const byInterval = side !== 'undecided' && (side !== 'around') === claim.asserted;
  const byP = agreesWithP(claim.asserted, p);
  if (byInterval && byP) return agrees;
  if (restsOnItsP(claim, result.p)) return undefined;
  if (side === 'undecided') {
    return cannotTell(`a limit of ${limitsInWords(interval)} may be rounded from 1`);
  }
  const other = wordsAround(reading, result.span, 150).match(OTHER_THRESHOLD)?.[0];
  if (other !== undefined) {
    return cannotTell(`the text speaks of “${other}” here, so that the claim need `
      + 'not rest on this interval');
  }
  return byInterval || byP
    ? cannotTell(`an interval of ${levelOf(interval)}% and a test at 5% need not say the same: `
      + `p would be ${pInWords(p)}`)
    : disagreesOn(claim, interval, p, reading);
}

/** Words that tell of another test, or another threshold, than a reader would assume. */
const OTHER_THRESHOLD = new RegExp(
  '\\b(?:Bonferroni|Holm|false discovery|FDR|multiple (?:testing|comparisons)|multiplicity'
    + '|one.sided|one.tailed|non.?inferior\\w*|equivalen\\w+|log.?rank|p.?for trend|trend test)\\b',
  'i',
);

/**
 * Whether the words follow the printed p. Then the matter lies between p and the
 * interval, which is the question of p-from-interval.
 */
function restsOnItsP({ asserted }: SignificanceClaim, p: PValue | undefined): boolean {
  const printed = p === undefined ? undefined : probabilitiesOf(p);
  return printed !== undefined && agreesWithP(asserted, printed);
}

function agreesWithP(asserted: boolean, { low, high }: Range): boolean {
  return asserted ? low < USUAL_LEVEL : high > USUAL_LEVEL;
}

function disagreesOn(
  { asserted, span }: SignificanceClaim,
  interval: Interval,
  p: Range,
  { manuscript }: Reading,
): Verdict {
  const words = flowing(quote(manuscript.text, span));
  const holds = `the interval ${limitsInWords(interval)} ${asserted ? 'holds' : 'excludes'} 1`;
  return disagrees(`${holds}, and the words say “${words}”`, {
    recomputed: { quantity: 'p', range: p },
    working: [
      `standard error from the limits: ln(${interval.upper.plain} / ${interval.lower.plain}) / `
        + `(2 × ${multiplierInWords(interval)})`,
      `p from the limits, two-sided: ${pInWords(p)}`,
    ],
    explanations: [
      ...(interval.level === undefined
        ? ['No level is printed for the interval; it was taken to be 95%.']
        : []),
      ...(asserted || p.low >= USUAL_LEVEL
        ? []
        : ['The level of the test may be below 5%, as where it is shared among several outcomes.']),
    ],
  });
}
