import {
  agrees,
  cannotTell,
  cover,
  defineManuscriptRule,
  disagrees,
  divided,
  type Judgement,
  numberAt,
  type NamedNumber,
  overlap,
  passages,
  type Range,
  rangeInWords,
  type Span,
  unrounded,
  type Verdict,
  wordsAround,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'rate-of-events',
  question: 'Is a rate that of its own events and person-time?',
  why: `
    Events divided by person-time give one rate. Where all three are printed and another rate
    stands beside them, one of the three is of another group or outcome, or was copied amiss.
  `,
  source: `
    Rothman KJ, Greenland S, Lash TL. Modern Epidemiology. 3rd ed. Philadelphia: Lippincott
    Williams & Wilkins; 2008 (chapter 3, measures of occurrence).
  `,
  innocent: [
    'The rate is adjusted, standardised or weighted.',
    'The person-time is rounded, or is that of the whole study and not of this outcome.',
    'The events include repeated ones, and the rate counts people.',
  ],
  grade: 'discrepancy',

  judge(reading) {
    const { text } = reading.manuscript;
    return passages(reading).flatMap((span): readonly Judgement[] =>
      ratesIn(text, span).map((rate) => ({
        verdict: judgeRate(rate, wordsAround(reading, rate.span, 60)),
        span: rate.span,
        marks: [rate.events, rate.time, rate.printed].map((number) => number.span),
      })));
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Could the authors check the three numbers, and say so if the rate
    is adjusted?
  `,

  examples: [
    {
      text: 'There were 54 falls in 1,234 person-years (43.8 per 1000 person-years).',
      outcome: 'agrees',
      note: '54 / 1234 × 1000 = 43.76',
    },
    {
      text: 'There were 54 falls in 1,234 person-years (48.3 per 1000 person-years).',
      outcome: 'disagrees',
      note: '54 / 1234 × 1000 = 43.76',
    },
    {
      text: 'There were 54 falls in 1,234 person-years (4.38 per 1000 person-years).',
      outcome: 'disagrees',
      note: 'the point moved, or the rate is per 100',
    },
    {
      text: 'Over 1,234 person-years there were 54 falls (age-adjusted rate 39.0 per 1000 '
        + 'person-years).',
      outcome: 'cannot tell',
      note: 'an adjusted rate is not events over person-time',
    },
  ],
});

/** The three numbers of a rate, and per how much person-time it is. */
interface Rate {
  readonly events: NamedNumber['printed'];
  readonly time: NamedNumber['printed'];
  readonly printed: NamedNumber['printed'];
  readonly per: number;
  readonly span: Span;
}

const TIME = String.raw`(?:person|patient|participant|woman|child|subject|man)[-‐–\s]?`
  + '(?:years|yrs|months|days)';
const COUNT = String.raw`\d{1,3}(?:[,\u2009\u202f]\d{3})+|\d+`;
const RATE = String.raw`(?<rate>\d+(?:[.·]\d+)?)\s+(?:[\p{L}-]+\s+)?per\s+`
  + String.raw`(?<per>10{2,5}|10{0,2},000)\s+${TIME}`;

// 54 falls in 1,234 person-years (43.8 per 1000 person-years)
// ^^          ^^^^^               ^^^^     ^^^^
const EVENTS_FIRST = new RegExp(
  String.raw`(?<![\d.,·–-])(?<events>${COUNT})\s+[\p{L}\s-]{3,60}?\b(?:in|during|over|per|for)\s+`
    + String.raw`(?<time>${COUNT})\s+${TIME}[^\d;]{1,60}?${RATE}`,
  'gu',
);

// Over 1,234 person-years there were 54 falls (43.8 per 1000 person-years)
const TIME_FIRST = new RegExp(
  String.raw`(?<![\d.,·–-])(?<time>${COUNT})\s+${TIME}[^\d;.()]{2,60}?(?<events>${COUNT})\s+`
    + String.raw`[\p{L}\s-]{3,40}?[^\d;.]{0,40}?${RATE}`,
  'gu',
);

function ratesIn(text: string, { start, end }: Span): readonly Rate[] {
  const words = text.slice(start, end);
  return [EVENTS_FIRST, TIME_FIRST].flatMap((pattern) =>
    [...words.matchAll(pattern)].map(({ 0: all, index, groups = {} }) => {
      const at = start + index;
      const number = (name: string, from = 0): NamedNumber['printed'] => {
        const digits = groups[name] ?? '';
        const plain = digits.replace(/[\u2009\u202f]/g, ',');
        return numberAt(plain, at + all.indexOf(digits, from), false);
      };
      const per = Number((groups['per'] ?? '').replace(',', ''));
      const [events, time] = [number('events'), number('time')];
      const behind = Math.max(events.span.end, time.span.end) - at;
      const printed = number('rate', behind);
      return { events, time, printed, per, span: cover(events.span, time.span, printed.span) };
    }));
}

const OTHER_RATE =
  /\b(?:adjusted|standardi[sz]ed|weighted|age.specific|expected|modell?ed|estimated)\b/i;

function judgeRate({ events, time, printed, per }: Rate, nearby: string): Verdict {
  const share = divided({ low: events.value, high: events.value }, asRounded(time));
  if (share === undefined) return cannotTell('the person-time may be rounded from nothing');
  const implied = { low: share.low * per, high: share.high * per };
  if (overlap(implied, unrounded(printed))) return agrees;
  const other = nearby.match(OTHER_RATE)?.[0];
  if (other !== undefined) {
    return cannotTell(`the text speaks of “${other}” here, so that the rate need not be events `
      + 'over person-time');
  }
  const shown = rangeInWords(implied, printed.decimals + 1);
  return disagrees(
    `${events.plain} in ${time.plain} is ${shown} per ${per}, and ${printed.plain} is printed`,
    {
      recomputed: { quantity: 'rate', range: implied },
      working: [`${per} × ${events.plain} / ${time.plain} = ${shown}`],
    },
  );
}

/** A person-time that ends in zeros may be rounded to them: "12,000" for 11,500 to 12,500. */
function asRounded({ value, plain }: NamedNumber['printed']): Range {
  const zeros = plain.match(/0+$/)?.[0].length ?? 0;
  return unrounded({ value, decimals: -zeros });
}
