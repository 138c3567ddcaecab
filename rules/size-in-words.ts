import {
  agrees,
  cannotTell,
  type Claim,
  cover,
  defineManuscriptRule,
  disagrees,
  fixed,
  flowing,
  type Judgement,
  overlap,
  type Printed,
  type Range,
  type RatioResult,
  type Reading,
  sayings,
  spansOf,
  unrounded,
  type Verdict,
  wordsOfClaim,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'size-in-words',
  question: 'Is the effect in words as large as the ratio beside it?',
  why: `
    A ratio of 1.35 is 35% more, or 1.35 times as much; one of 0.65 is 35% less. “135% higher” and
    “65% lower” are frequent slips, and readers remember the percentage and not the ratio.
  `,
  source: `
    Lang TA, Secic M. How to Report Statistics in Medicine, 2nd edition. American College of
    Physicians, 2006 (percentages of change). Bland JM, Altman DG. The odds ratio. BMJ
    2000;320:1468. “Times higher” has two readings: common practice.
  `,
  innocent: [
    'The percentage is a difference of two percentages (points), and not a relative change.',
    'The words give the crude result, or that of another model, and the ratio the adjusted one.',
    'The words tell a risk that was worked out from the odds ratio.',
    'The percentage is that of the other group: the ratio turned round.',
    'The number in words is rounded, as “about a third” is.',
  ],
  grade: 'discrepancy',

  judge(reading) {
    return [...reading.findings.claims.flatMap((claim) => ofClaim(claim, reading)),
      ...beyondAll(reading)];
  },

  comment: (words, { because }) => `
    In “${words}”, ${because}. Could the authors check which of the two was meant?
  `,

  examples: [
    {
      text: 'Smoking went with a 35% increase in the odds of relapse (OR 1.35, 95% CI 1.10 to '
        + '1.66).',
      outcome: 'agrees',
      note: '1.35 is 35% more',
    },
    {
      text: 'Smoking went with a 135% increase in the odds of relapse (OR 1.35, 95% CI 1.10 to '
        + '1.66).',
      outcome: 'disagrees',
      note: '1.35 is 35% more: the ratio itself was taken for the increase',
    },
    {
      text: 'Walking went with a 65% reduction in the odds of relapse (OR 0.65, 95% CI 0.50 to '
        + '0.84).',
      outcome: 'disagrees',
      note: '0.65 is 35% less: the ratio itself was taken for the reduction',
    },
    {
      text: 'The new splint brought a 120% reduction in the risk of a fall.',
      outcome: 'disagrees',
      note: 'a risk cannot fall by more than 100%',
    },
    {
      text: 'Smokers had three times the odds of relapse (OR 3.0, 95% CI 1.9 to 4.8).',
      outcome: 'agrees',
      note: '3.0 is three times as much',
    },
    {
      text: 'Mortality was 3 times higher in smokers (RR 3.0, 95% CI 1.9 to 4.8).',
      outcome: 'cannot tell',
      note: '“3 times higher” is read as 3 times as high or as 4 times as high',
    },
    {
      text: 'Smoking went with a 59% increase in the odds of relapse (OR 1.95, 95% CI 1.25 to '
        + '3.04).',
      outcome: 'disagrees',
      note: '1.95 is 95% more: two digits may have changed places',
    },
  ],
});

type SizeClaim = Extract<Claim, { readonly kind: 'size' }>;

function ofClaim(claim: Claim, reading: Reading): readonly Judgement[] {
  const result = claim.of;
  if (claim.kind !== 'size' || result?.kind !== 'ratio') return [];
  const { estimate } = result;
  if (estimate === undefined || estimate.value <= 0 || result.measure === 'DOR') return [];
  const verdict = judgeSize({ claim, result, estimate, words: wordsOf(claim, result, reading) });
  if (verdict === undefined) return [];
  const marks = [claim.span, ...spansOf([estimate])];
  return [{ verdict, span: cover(claim.span, result.span), marks, result }];
}

/** A size in words beside its ratio, with the words around the size in small letters. */
interface Beside {
  readonly claim: SizeClaim;
  readonly result: RatioResult;
  readonly estimate: Printed;
  readonly words: Words;
}

interface Words {
  readonly said: string;
  readonly before: string;
  readonly behind: string;
  readonly between: string;
}

function wordsOf({ span, sentence }: SizeClaim, result: RatioResult, reading: Reading): Words {
  const { text } = reading.manuscript;
  const between = text.slice(span.end, result.span.start).toLowerCase();
  return {
    said: wordsOfClaim(reading, span),
    before: text.slice(Math.max(sentence.start, span.start - 40), span.start).toLowerCase(),
    behind: flowing(between.slice(0, 40)),
    between,
  };
}

/** Words between a size and a ratio after which the ratio is another's. */
const ANOTHER = /respectively|[.;]\s|\bci\b|\bbut\b|whereas|despite|null|margin|to detect/;

/** Words before a size that make it a step, a definition, a wish, or the end of a range. */
const NO_SIZE = new RegExp(
  '\\b(?:per|each|every|for (?:a|an|one))\\s+$|defined as|to detect|more than$'
    + '|\\d\\s*(?:[-–—]|to|or)\\s*$',
);

function judgeSize(beside: Beside): Verdict | undefined {
  const { claim, estimate, words } = beside;
  if (claim.factor === 1 || ANOTHER.test(words.between) || words.between.length > 200) {
    return undefined;
  }
  if (NO_SIZE.test(words.before)) return undefined;
  const isTurned = (claim.factor > 1) !== (estimate.value > 1);
  return claim.printed?.percent === true
    ? isTurned ? undefined : judgePercent(beside, claim.printed)
    : judgeTimes(beside, isTurned);
}

/** Near enough for words: so many points of percentage, or such a share of them. */
const ROUNDED = { points: 2.5, share: 0.1 } as const;

function judgePercent(beside: Beside, said: Printed): Verdict | undefined {
  const { claim, estimate } = beside;
  const behind = unrounded(estimate);
  const change: Range = claim.factor > 1
    ? { low: 100 * (behind.low - 1), high: 100 * (behind.high - 1) }
    : { low: 100 * (1 - behind.high), high: 100 * (1 - behind.low) };
  if (isNear(said, change, ROUNDED)) return agrees;
  const itself = { low: 100 * behind.low, high: 100 * behind.high };
  if (isNear(said, itself, { points: 0.5, share: 0 })) return asItself(beside, said, change);
  if (isNear(said, turned(behind), ROUNDED)) {
    return cannotTell(`${said.plain}% is the change from the other group, with the ratio turned `
      + `round`);
  }
  return isOfOtherKind(beside) ? undefined : asOther(beside, said, change);
}

function isNear(
  { value, decimals }: Printed,
  { low, high }: Range,
  by: { readonly points: number; readonly share: number },
): boolean {
  const half = 0.5 * 10 ** -decimals;
  const room = Math.max(by.points, by.share * value);
  return overlap({ low: value - half - room, high: value + half + room }, { low, high });
}

/** The percentage by which the other group differs: 0.67 is 33% less, and turned round 49% more. */
function turned({ low, high }: Range): Range {
  const ends = [Math.abs(100 * (1 / low - 1)), Math.abs(100 * (1 / high - 1))];
  return { low: Math.min(...ends), high: Math.max(...ends) };
}

/**
 * Whether words and ratio may be of two kinds: a percentage of a risk or a rate beside an
 * odds ratio, points of percentage, or a ratio per unit beside a change of the exposure.
 */
function isOfOtherKind({ claim, result, words }: Beside): boolean {
  const isOdds = result.measure === 'OR' || result.measure === 'POR';
  if (isOdds && claim.scale !== 'odds' && claim.scale !== undefined) return true;
  if (claim.scale === undefined && !/^\W*(?:in|of) the (?:odds|hazard|risk)/.test(words.behind)) {
    return true;
  }
  return OF_POINTS.test(words.between);
}

/** Words of a percentage that is no relative change, or that is another's. */
const OF_POINTS = /absolute|points?\b|%|vs|versus|from \d|interval|crude|unadjusted/;

function asItself({ estimate, words, claim }: Beside, said: Printed, change: Range): Verdict {
  return disagrees(
    `the words “${words.said}” take the ratio ${estimate.plain} itself for the change, which is `
      + `${percentOf(change)}% ${claim.factor > 1 ? 'more' : 'less'}`,
    {
      recomputed: { quantity: 'percentage', range: change },
      working: [workingOf(estimate, claim.factor > 1, change)],
      explanations: [claim.factor > 1
        ? `“${said.plain}% of” would fit the ratio, and “${said.plain}% more” does not.`
        : `${said.plain}% is what remains, and not what is taken away.`],
    },
  );
}

function asOther({ estimate, words, claim }: Beside, said: Printed, change: Range): Verdict {
  const [shown] = percentOf(change).split('.');
  const isSwapped = shown?.length === 2 && said.plain === `${shown[1]}${shown[0]}`;
  return disagrees(
    `the words say “${words.said}”, and a ratio of ${estimate.plain} is ${percentOf(change)}% `
      + `${claim.factor > 1 ? 'more' : 'less'}`,
    {
      recomputed: { quantity: 'percentage', range: change },
      working: [workingOf(estimate, claim.factor > 1, change)],
      explanations: isSwapped ? ['Two digits may have changed places.'] : [],
    },
  );
}

function workingOf({ plain }: Printed, isMore: boolean, change: Range): string {
  const sum = isMore ? `${plain} − 1` : `1 − ${plain}`;
  return `100 × (${sum}) = ${percentOf(change)}%`;
}

/** The middle of the range as a whole percentage where the ratio has two decimals. */
function percentOf({ low, high }: Range): string {
  const middle = (low + high) / 2;
  return fixed(middle, high - low < 0.5 ? 1 : 0);
}

/** "times higher", "fold greater": read as so many times, or as so many times more. */
const ADDED = /^(?:higher|greater|more|larger|increase|increased risk|elevated)\b/;
/** "times lower", "fold less": a ratio turned round, or a subtraction. */
const TAKEN = /^(?:lower|less|fewer|smaller|reduced|reduction)\b/;

function judgeTimes(beside: Beside, isTurned: boolean): Verdict | undefined {
  const { claim, estimate, words } = beside;
  const behind = unrounded(estimate);
  if (TAKEN.test(words.behind)) {
    return cannotTell(`“${words.said} ${words.behind.split(' ')[0]}” has more than one reading: `
      + `the ratio itself, ${estimate.plain}, or a percentage of reduction says it plainly`);
  }
  if (isTurned) return undefined;
  const fits = isAbout(claim, behind);
  if (claim.printed !== undefined && ADDED.test(words.behind) && !words.said.endsWith('fold')) {
    if (isAbout({ ...claim, factor: claim.factor + 1 }, behind) && !fits) return agrees;
    if (fits) return cannotTell(twoReadings(beside));
  }
  if (fits) return agrees;
  if (isOfOtherKind({ ...beside, claim: { ...claim, scale: claim.scale ?? 'odds' } })) {
    return undefined;
  }
  return asFarOff(beside);
}

function twoReadings({ claim, words, estimate }: Beside): string {
  const more = Number((claim.factor + 1).toFixed(2));
  return `“${words.said} higher” is read as ${claim.factor} times as high or as ${more} times as `
    + `high; “${estimate.plain} times as high” has one reading`;
}

/** Whole numbers in words stand for what lies within one of them: "two-fold" for 1.6 to 2.9. */
function isAbout({ factor, printed }: SizeClaim, { low, high }: Range): boolean {
  const decimals = printed?.decimals ?? 0;
  if (factor < 1) return overlap({ low: factor * 0.7, high: factor * 1.4 }, { low, high });
  return decimals > 0
    ? overlap({ low: factor * 0.93, high: factor * 1.07 }, { low, high })
    : overlap({ low: factor - Math.max(0.55, 0.15 * factor), high: factor + 1 }, { low, high });
}

/** Farther than this from the ratio the words are not a rounding of it. */
const FAR_OFF = 1.5;

function asFarOff({ claim, estimate, words }: Beside): Verdict {
  const apart = Math.max(claim.factor / estimate.value, estimate.value / claim.factor);
  const because = `the words say “${words.said}”, and the ratio is ${estimate.plain}`;
  return apart < FAR_OFF ? cannotTell(because) : disagrees(because);
}

/** Reductions that take away more than all. */
// a 120% reduction in risk       reduced the odds by 130%
//   ^^^^^^^^^^^^^^                ^^^^^^^^^^^^^^^^^^^^^^^^
const BEYOND_ALL = new RegExp(
  '(?<![-–\\d.,])(\\d{3}(?:\\.\\d+)?)\\s?%\\s+(?:relative |risk |lower |significant )*'
    + '(?:reductions?|decreases?|declines?|lower|fewer|less(?: likely)?)\\s+(?:in|of|the|for)?\\s*'
    + '(?:the\\s+)?(?:\\p{L}+\\s+){0,2}?'
    + '(?:risks?|odds|hazards?|rates?|incidence|mortality|prevalence|deaths?|cases|events)\\b'
    + '|\\b(?:risks?|odds|hazards?|rates?|incidence|mortality'
    + '|prevalence)(?:\\s+of\\s+(?:\\p{L}+\\s?){1,4})?\\s+'
    + '(?:was |were )?(?:fell|dropped|declined|decreased|reduced'
    + '|lowered)\\s+by\\s+(\\d{3}(?:\\.\\d+)?)\\s?%'
    + '|\\b(?:reduc|decreas|lower)\\w*\\s+(?:the\\s+)?(?:risks?|odds|hazards?|rates?'
    + '|incidence|mortality'
    + '|prevalence)(?:\\s+of\\s+(?:\\p{L}+\\s?){1,4})?\\s+by\\s+(\\d{3}(?:\\.\\d+)?)\\s?%',
  'giu',
);

function beyondAll(reading: Reading): readonly Judgement[] {
  return sayings(reading, BEYOND_ALL).flatMap(({ span, parts }): readonly Judgement[] => {
    const percent = parts.find((part) => part !== undefined) ?? '';
    if (!(Number(percent) > 100)) return [];
    const verdict = disagrees(
      `nothing can be reduced by more than 100%, and ${percent}% is printed`,
      { grade: 'contradiction', working: [`${percent}% > 100%`] },
    );
    return [{ verdict, span, marks: [span] }];
  });
}
