import {
  agrees,
  cannotTell,
  type Claim,
  contrastOf,
  cover,
  defineManuscriptRule,
  disagrees,
  flowing,
  type Judgement,
  limitsInWords,
  limitsStand,
  NO_EFFECT,
  type Printed,
  quote,
  type RatioResult,
  type Reading,
  sideOfOne,
  spansOf,
  unrounded,
  type Verdict,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'direction-in-words',
  question: 'Do the words point the way that the ratio points?',
  why: `
    A ratio above 1 says more in the group named first, one below 1 says less. Where the words say
    “higher” and the whole interval lies below 1, a reader cannot tell which group is compared
    with which, and may take away the opposite of what was found.
  `,
  source: `
    Lang TA, Altman DG. Basic statistical reporting for articles published in biomedical
    journals: the SAMPL guidelines. Int J Nurs Stud 2015;52:5–9 (name the reference group).
    Deeks JJ, Higgins JPT, Altman DG. Cochrane Handbook for Systematic Reviews of Interventions,
    chapter 6, 2019 (the direction of a ratio).
  `,
  innocent: [
    'The reference group is the one that the sentence names first, so that the ratio is turned '
      + 'round.',
    'The ratio is of the other outcome: of staying well, of success, of no event.',
    'The word belongs to the name of the exposure or the outcome, as in “reduced growth”.',
    'The words speak of the crude comparison, and the ratio is adjusted.',
  ],
  grade: 'discrepancy',

  judge(reading) {
    return reading.findings.claims.flatMap((claim): readonly Judgement[] => {
      const result = claim.of;
      if (claim.kind !== 'direction' || result?.kind !== 'ratio') return [];
      if (result.estimate === undefined || result.measure === 'DOR') return [];
      const verdict = judgeDirection(claim, result, result.estimate, reading);
      if (verdict === undefined) return [];
      const { interval } = result;
      const marks = [claim.span, ...spansOf([result.estimate, interval?.lower, interval?.upper])];
      return [{ verdict, span: cover(claim.span, result.span), marks, result }];
    });
  },

  comment: (words, { because }) => `
    In “${words}”, ${because}. Could the authors check the direction, and name the reference group
    next to the ratio?
  `,

  examples: [
    {
      text: 'Walkers had a lower risk of death (HR 0.62, 95% CI 0.45 to 0.85).',
      outcome: 'agrees',
      note: 'the interval lies below 1',
    },
    {
      text: 'Walking was a protective factor for death (OR 1.45, 95% CI 1.10 to 1.91).',
      outcome: 'disagrees',
      note: '“protective”, and the interval lies above 1',
    },
    {
      text: 'Smoking was a risk factor for death (HR 0.62, 95% CI 0.45 to 0.85).',
      outcome: 'disagrees',
      note: '“risk factor”, and the interval lies below 1',
    },
    {
      text: 'Smokers had a higher risk of death (HR 0.92, 95% CI 0.65 to 1.31).',
      outcome: 'cannot tell',
      note: 'the interval holds 1, so that the ratio points neither way for sure',
    },
    {
      text: 'Patients were more likely to stay at home, with a higher rate of survival '
        + '(OR 1.45, 95% CI 1.10 to 1.91).',
      outcome: 'agrees',
      note: 'a good outcome: an odds ratio of survival above 1 is a higher rate of it',
    },
  ],
});

type DirectionClaim = Extract<Claim, { readonly kind: 'direction' }>;

function judgeDirection(
  claim: DirectionClaim,
  result: RatioResult,
  estimate: Printed,
  reading: Reading,
): Verdict | undefined {
  const side = sideOfEstimate(estimate);
  if (side === undefined || estimate.value <= 0) return undefined;
  if (side === claim.direction) return agrees;
  const { interval } = result;
  if (interval !== undefined && !limitsStand(estimate, interval, contrastOf(reading, result))) {
    return undefined;
  }
  if (!speaksPlainly(claim, result, reading)) return undefined;
  const surely = interval === undefined ? undefined : sideOfOne(interval);
  if (interval === undefined || surely === 'around' || surely === 'undecided') {
    return cannotTell(interval === undefined
      ? 'no interval is printed that would tell how sure the direction of the ratio is'
      : `the interval ${limitsInWords(interval)} does not settle which way the ratio points`);
  }
  const words = flowing(quote(reading.manuscript.text, claim.span));
  return disagrees(
    `the words “${words}” say ${claim.direction === 'up' ? 'more' : 'less'}, and the ratio `
      + `${estimate.plain} (${limitsInWords(interval)}) lies ${surely} 1`,
    { explanations: turnedRound(estimate) },
  );
}

/** Which way an estimate points: `up` where all that rounds to it lies above 1. */
function sideOfEstimate(estimate: Printed): 'up' | 'down' | undefined {
  const { low, high } = unrounded(estimate);
  if (low > NO_EFFECT) return 'up';
  return high < NO_EFFECT ? 'down' : undefined;
}

function turnedRound(estimate: Printed): readonly string[] {
  const other = (1 / estimate.value).toPrecision(3);
  return [`With the groups the other way round the ratio would be ${Number(other)}.`];
}

/** A word of direction that is said of how much there is of something, and not part of a name. */
// a lower risk   more likely   at increased risk   fewer deaths   higher mortality
const OF_AN_AMOUNT = new RegExp(
  '^\\S+\\s+(?:(?:the|adjusted|relative|overall|their|long-term|\\d+-\\p{L}+|subsequent'
    + '|incident)\\s+)*'
    + '(?:(?:\\p{L}+\\s+){0,2}?(?:risks?|odds|hazards?|rates?|likelihood|probability|chances?'
    + '|incidence'
    + '|prevalence|mortality|frequency|numbers?|proportions?|deaths?|event)'
    + '|likely|frequent(?:ly)?|common(?:ly)?|often|prone)\\b',
  'iu',
);
const BY_ITSELF = /^(?:protective|factors?|halved|doubled|tripled|twice|inverse(?:ly)?|fewer)$/i;

/** The verbs among them, and the nouns. */
const VERB = new RegExp(
  '^(?:reduced|increased|decreased|lowered|raised|halved|doubled|tripled|reduces'
    + '|increases|decreases|lowers|raises)$',
  'i',
);
const NOUN = /^(?:reductions?|increases?|decreases?|excess)$/i;

/** "was", and what may stand between it and the word: "was significantly", "seemed to be". */
const WAS = /\b(?:was|were|is|are|been|be)\s+(?:(?:\w+ly|much|also|even|far)\s+)*$/i;

/** Words that bring a finding: "was associated with a", "resulted in a", "there was a". */
const BRINGS = new RegExp(
  '\\b(?:(?:associated|linked|related|correlated) (?:with|to)|(?:resulted|results'
    + '|resulting) in|led to|showed|found'
    + '|demonstrated|produced|reported|there (?:was|were)|observed|had|have|has|at)\\s+'
    + '(?:(?:an?|the|\\w+ly|\\d+(?:\\.\\d+)?\\s?%|\\w+fold|significant|substantial'
    + '|considerable|modest|strong|clear'
    + '|statistically|relative|marked|small|large)\\s+)*$',
  'i',
);

/** Words after which a change is a step of the exposure, a condition or part of a name. */
const NAMES = new RegExp(
  '(?:^|[.,;:(]|\\b(?:per|each|every|with|of|on|in|by|for|from|to|among|between|and|or|the'
    + '|an?|if|whether|who|whose'
    + '|that had|who had|as|than|greater|more|less|lesser|defined as|without|despite))\\s*$',
  'i',
);

/** Words that take a finding back, or that come before one in another clause. */
const DENIED = new RegExp(
  '\\b(?:no|not|nor|neither|without|lack of|never|unlikely|failed|inferior'
    + '|less effective)\\b',
  'i',
);

/** Words that tell that something else may be meant between the claim and the numbers. */
const ANOTHER_WAY = new RegExp(
  '\\b(?:higher|lower|more|less|fewer|greater|increas\\w*|decreas\\w*|reduc\\w*|rais\\w*|elevat\\w*'
    + '|improv\\w*|but|whereas|while|although|respectively|no|not|CI|WMD|favou?rs?|reference'
    + '|in (?:the )?controls?|surviv\\w*|success\\w*|alternative|predict\\w*)\\b',
  'i',
);

/** Where a sentence ends after all. */
const STOP = /[.;]\s+\p{Lu}\p{Ll}/u;

/** Words right behind that make a change one over time, or one that something else brought. */
const OVER_TIME = /^\s*(?:with|by|to|when|over|from|as|until|since|after \d)\b/i;

/** What is lower “with” a treatment is lower in those who have it. */
const ADJECTIVE = new RegExp(
  '^(?:lower|higher|less|more|greater|fewer|better|worse|longer|shorter|protective)$',
  'i',
);

/** Said of survival, with a hazard ratio: "better overall survival". */
const OF_SURVIVAL = new RegExp(
  '^(?:better|worse|longer|shorter|improved|poorer?|prolonged|inferior'
    + '|superior)\\s+(?:\\p{L}+[- ]){0,2}survival\\b',
  'iu',
);

/** Farther apart than this the words and the numbers may belong to different comparisons. */
const REACH = { before: 200, after: 60 } as const;

/** The words of a claim with what stands around them. */
interface Surroundings {
  readonly word: string;
  readonly before: string;
  readonly behind: string;
}

/**
 * Whether the words plainly say which way this ratio points: a word of amount and what it is
 * an amount of, in one stretch with the numbers, and nothing between that points elsewhere.
 */
function speaksPlainly(claim: DirectionClaim, result: RatioResult, reading: Reading): boolean {
  const { text } = reading.manuscript;
  const { start, end } = claim.span;
  if (result.cited || !standsNear(claim, result, text)) return false;
  const around = {
    word: flowing(text.slice(start, end)),
    before: text.slice(Math.max(claim.sentence.start, start - 70), start).replace(/\s+/g, ' '),
    behind: flowing(text.slice(start, end + 70)),
  };
  const isRightAfter = end <= result.span.start
    || /(?:was|were|is|are)\b/.test(text.slice(result.span.end, start));
  return isRightAfter && !DENIED.test(around.before.slice(-45)) && isFinding(around);
}

/** Whether nothing between the words and the numbers, or right after these, points elsewhere. */
function standsNear({ span }: DirectionClaim, result: RatioResult, text: string): boolean {
  const isBefore = span.end <= result.span.start;
  const between = isBefore
    ? text.slice(span.end, result.span.start)
    : text.slice(result.span.end, span.start);
  const rest = between.replace(/^\W*(?:\p{L}+\W+){0,2}surviv\w+/iu, '');
  const after = text.slice(result.span.end, result.span.end + 80);
  if (/\bfavou?rs?\b|\breference\b/i.test(after)) return false;
  return between.length <= (isBefore ? REACH.before : REACH.after) && !ANOTHER_WAY.test(rest)
    && !STOP.test(between);
}

function isFinding({ word, before, behind }: Surroundings): boolean {
  if (!ADJECTIVE.test(word) && OVER_TIME.test(behind.slice(word.length))) return false;
  if (WAS.test(before) || BY_ITSELF.test(word)) return true;
  const isBrought = BRINGS.test(before) && !/\bwho\b[^,]*$/i.test(before.slice(-25));
  if (NOUN.test(word)) return isBrought && /^\S+\s+(?:in|of)\b/i.test(behind);
  if (OF_SURVIVAL.test(behind) || OF_AN_AMOUNT.test(behind)) {
    return isBrought
      || !NAMES.test(before) || /(?:^|[.:] )$|\b(?:an?|the)\s+(?:\w+ly\s+)?$/i.test(before);
  }
  if (!VERB.test(word) || isBrought) return false;
  return before.trim() === '' ? /^\S+\s+the\b/.test(behind) : !NAMES.test(before);
}
