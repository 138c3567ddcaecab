import {
  agrees,
  cover,
  defineManuscriptRule,
  disagrees,
  firstBehind,
  type Judgement,
  type NamedNumber,
  namedNumbers,
  numberAt,
  overlap,
  passages,
  type Range,
  rangeInWords,
  unrounded,
  type Verdict,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'efficacy-of-ratio',
  question: 'Is an efficacy what the ratio beside it leaves of 100%?',
  why: `
    Efficacy, effectiveness and relative risk reduction are 100% less the ratio in percent, and
    their limits are those of the ratio the other way round: a ratio of 0.39 (0.25 to 0.60) is
    an efficacy of 61% (40% to 75%).
  `,
  source: `
    Orenstein WA et al. Field evaluation of vaccine efficacy. Bull World Health Organ
    1985;63:1055–1068.
  `,
  innocent: [
    'The efficacy comes from another model than the ratio, or is adjusted where that is crude.',
    'The efficacy is worked out from a ratio with more digits than are printed.',
    'The two are of different outcomes or groups.',
  ],
  grade: 'discrepancy',

  judge(reading) {
    const { text } = reading.manuscript;
    return passages(reading).flatMap((span): readonly Judgement[] => {
      const found = namedNumbers(text, span, EFFICACY, 40).filter(({ printed }) => printed.percent);
      if (found.length === 0) return [];
      const ratios = namedNumbers(text, span, RATIO, 12).filter(({ printed }) => !printed.percent);
      return found.flatMap((efficacy) => judgementOn(text, efficacy, ratios));
    });
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Could the authors check the two, and say so if they come from
    different analyses?
  `,

  examples: [
    {
      text: 'Vaccine efficacy was 61% (95% CI 40 to 75; RR 0.39, 95% CI 0.25 to 0.60).',
      outcome: 'agrees',
      note: '1 − 0.39 = 0.61, 1 − 0.60 = 0.40, 1 − 0.25 = 0.75',
    },
    {
      text: 'Vaccine efficacy was 69% (95% CI 40 to 75; RR 0.39, 95% CI 0.25 to 0.60).',
      outcome: 'disagrees',
      note: '1 − 0.39 = 0.61',
    },
    {
      text: 'Vaccine efficacy was 61% (95% CI 25 to 60; RR 0.39, 95% CI 0.25 to 0.60).',
      outcome: 'disagrees',
      note: 'the limits of the ratio, and not those of the efficacy',
    },
    {
      text: 'The relative risk reduction was 35% (hazard ratio 0.65, 95% CI 0.49 to 0.86).',
      outcome: 'agrees',
      note: '1 − 0.65 = 0.35',
    },
  ],
});

const EFFICACY = '\\b(?:[Ee]fficacy|[Ee]ffectiveness|[Rr]elative risk reduction|RRR|VE)\\b';

const RATIO = String.raw`\b(?:a?(?:RR|HR|OR|IRR)|(?:[Rr]isk|[Hh]azards?|[Oo]dds|[Rr]ate`
  + String.raw`|[Ii]ncidence) ratio(?:\s*\([A-Z]{2,3}\))?|[Rr]elative risk)\b`;

/** The ratio stands right behind the efficacy, in the same bracket or sentence. */
const REACH = 60;

/** A new sentence, or a second group or outcome, between the two. */
const OTHER_RESULT = /[.;]\s+\p{Lu}\p{Ll}|\b(?:and|versus|vs|while|whereas|compared)\b/u;

/** A ratio above 1 compares the other way round, or something else. */
function judgementOn(
  text: string,
  efficacy: NamedNumber,
  ratios: readonly NamedNumber[],
): readonly Judgement[] {
  const ratio = firstBehind(ratios, efficacy.span.end);
  if (ratio === undefined || ratio.printed.value > 1) return [];
  const between = text.slice(efficacy.span.end, ratio.span.start);
  if (between.length > REACH || OTHER_RESULT.test(between)) return [];
  const marks = [efficacy.printed.span, ratio.printed.span];
  const verdict = judgePair(efficacy.printed, ratio.printed,
    limitsBehind(text, efficacy), limitsBehind(text, ratio));
  return [{ verdict, span: cover(efficacy.span, ratio.span), marks }];
}

/** 61% (95% CI 40 to 75   61% [40–75]   0.39, 95% CI 0.25 to 0.60 */
const LIMITS = new RegExp(
  String.raw`^\s*[([,;]\s*(?:9\d\s?%\s*(?:CI|confidence interval|CrI)\s*[,:;=]?\s*)?[[(]?`
    + String.raw`(?<lower>[-−]?\d+(?:[.·]\d+)?)\s?%?\s*(?:to|–|-|,|;)\s*`
    + String.raw`(?<upper>[-−]?\d+(?:[.·]\d+)?)\s?%?\s*[)\];,.]`,
);

type Limits = Readonly<Record<'lower' | 'upper', NamedNumber['printed']>>;

function limitsBehind(text: string, { span }: NamedNumber): Limits | undefined {
  const { lower, upper } = text.slice(span.end, span.end + 60).match(LIMITS)?.groups ?? {};
  if (lower === undefined || upper === undefined) return undefined;
  return { lower: numberAt(lower, span.end, false), upper: numberAt(upper, span.end, false) };
}

/** What is left of 100% when a ratio is taken from it. */
function leftOf(ratio: NamedNumber['printed']): Range {
  const { low, high } = unrounded(ratio);
  return { low: 100 * (1 - high), high: 100 * (1 - low) };
}

function judgePair(
  efficacy: NamedNumber['printed'],
  ratio: NamedNumber['printed'],
  limits: Limits | undefined,
  ofRatio: Limits | undefined,
): Verdict {
  const implied = leftOf(ratio);
  if (!overlap(implied, unrounded(efficacy))) {
    return disagrees(`a ratio of ${ratio.plain} leaves ${inPercent(implied, efficacy)}, and an `
      + `efficacy of ${efficacy.plain}% is printed`, {
      recomputed: { quantity: 'efficacy', range: implied },
      working: [`100 × (1 − ${ratio.plain}) = ${inPercent(implied, efficacy)}`],
    });
  }
  return limits === undefined || ofRatio === undefined ? agrees : judgeLimits(limits, ofRatio);
}

function judgeLimits({ lower, upper }: Limits, interval: Limits): Verdict {
  const [low, high] = [leftOf(interval.upper), leftOf(interval.lower)];
  if (overlap(low, unrounded(lower)) && overlap(high, unrounded(upper))) return agrees;
  return disagrees(
    `the limits ${interval.lower.plain} and ${interval.upper.plain} of the ratio leave `
      + `${inPercent(low, lower)} and ${inPercent(high, upper)}, and ${lower.plain}% to `
      + `${upper.plain}% is printed`,
    {
      working: [
        `lower limit: 100 × (1 − ${interval.upper.plain}) = ${inPercent(low, lower)}`,
        `upper limit: 100 × (1 − ${interval.lower.plain}) = ${inPercent(high, upper)}`,
      ],
    },
  );
}

function inPercent(range: Range, { decimals }: NamedNumber['printed']): string {
  return `${rangeInWords(range, decimals + 1)}%`;
}
