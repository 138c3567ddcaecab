import {
  agreementOf,
  agrees,
  cannotTell,
  contrastOf,
  defineRule,
  disagrees,
  fixed,
  type Interval,
  isAbsence,
  levelOf,
  limitsInWords,
  limitsStand,
  type Printed,
  rangeInWords,
  type RatioResult,
  smallestStandardErrors,
  type TwoGroups,
  twoGroupsOfRow,
  type Verdict,
  wordsAround,
} from '../src/authoring.ts';

export default defineRule({
  id: 'interval-wide-enough',
  question: 'Is the interval as wide as the number of events beside it asks for?',
  why: `
    So many events among so many people hold a limited amount of information. No analysis of two
    groups gives a log odds ratio a standard error below 2√(1/D + 1/(N − D)), nor a log hazard
    ratio one below 2/√D, and adjustment does not lower it. An interval narrower than that has
    more events behind it than are printed, or another level.
  `,
  source: `
    Schoenfeld DA. Sample-size formula for the proportional-hazards regression model. Biometrics
    1983;39:499–503. Robinson LD, Jewell NP. Some surprising results about covariate adjustment in
    logistic regression models. Int Stat Rev 1991;59:227–240.
  `,
  innocent: [
    'The counts are of people, and the ratio is of events or visits of which there are more.',
    'The interval is of another level than stated, or shows the estimate plus and minus one '
      + 'standard error.',
    'The analysis is matched, clustered, weighted, pooled or penalised.',
    'The ratio is of another period or other people than the counts.',
    'A digit of a limit was mistyped, or the limits are those of another row.',
  ],
  grade: 'discrepancy',
  reads: 'ratio',
  marks: ({ estimate, interval }) => [estimate, interval?.lower, interval?.upper],

  judge(result, reading) {
    const { estimate, interval, measure } = result;
    if (!HAS_BOUND.has(measure)) return undefined;
    if (estimate === undefined || interval === undefined) return undefined;
    const groups = twoGroupsOfRow(reading, result);
    if (groups === undefined || groups.events < FEWEST_EVENTS) return undefined;
    if (contrastOf(reading, result) !== 'binary' || !limitsStand(estimate, interval, 'binary')) {
      return undefined;
    }
    const verdict = judgeWidth(result, estimate, interval, groups);
    const method = wordsAround(reading, result.span, 400).match(OF_OTHER_DESIGN)?.[0];
    return verdict?.outcome === 'disagrees' && method !== undefined
      ? cannotTell(`the text speaks of “${method}” here, and the bound holds for people one by one`)
      : verdict;
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Could the authors check the limits and the counts, and say what the
    ratio is of?
  `,

  examples: [
    {
      text: 'Table 3. Falls\nOutcome\tSplint (n = 120)\tNo splint (n = 118)\tOR (95% CI)\n'
        + 'Any fall\t45 (37.5)\t60 (50.8)\t0.58 (0.35–0.97)',
      outcome: 'agrees',
      note: 'standard error 0.260; at least 2√(1/105 + 1/133) = 0.261, and rounding leaves room',
    },
    {
      text: 'Table 3. Falls\nOutcome\tSplint (n = 120)\tNo splint (n = 118)\tOR (95% CI)\n'
        + 'Any fall\t45 (37.5)\t60 (50.8)\t0.58 (0.45–0.75)',
      outcome: 'disagrees',
      note: 'standard error 0.13, half of what 105 events among 238 people allow',
    },
    {
      text: 'Table 3. Death\nOutcome\tSplint\tNo splint\tHR (95% CI)\nDeath\t20/120\t29/118\t'
        + '0.66 (0.54–0.81)',
      outcome: 'disagrees',
      note: 'standard error 0.10; 49 deaths allow none below 2/√49 = 0.29',
    },
    {
      text: 'Table 3. Falls, matched by ward\nOutcome\tSplint\tNo splint\tMatched OR (95% CI)\n'
        + 'Any fall\t45/120\t60/118\t0.58 (0.45–0.75)',
      outcome: 'cannot tell',
      note: 'the bound holds for people who were not matched',
    },
  ],
});

/** Ratios of which the information in a number of events has a bound. */
const HAS_BOUND: ReadonlySet<RatioResult['measure']> = new Set(['OR', 'POR', 'HR', 'csHR']);

/** With fewer events than this the standard error itself says little. */
const FEWEST_EVENTS = 10;

/** A standard error short of the bound by less than this is not asked about. */
const ROOM = 0.85;

/** Words for designs and methods to which the bound does not apply. */
const OF_OTHER_DESIGN = new RegExp(
  '\\b(?:match\\w*|cluster\\w*|weight\\w*|pooled|meta.analy\\w*|penali[sz]ed|Bayes\\w*|episodes'
    + '|repeated|GEE|generali[sz]ed estimating|ordinal|shift|proportional odds'
    + '|mixed.effects|multilevel|stratif\\w*|paired|cross.?over)\\b',
  'i',
);

function judgeWidth(
  { measure }: RatioResult,
  estimate: Printed,
  interval: Interval,
  { events, total }: TwoGroups,
): Verdict | undefined {
  const bounds = smallestStandardErrors(events, total);
  const found = agreementOf(estimate, interval, 'binary');
  if (isAbsence(bounds) || !('implied' in found)) return undefined;
  const isHazard = measure === 'HR' || measure === 'csHR';
  const least = isHazard ? bounds.logHazardRatio : bounds.logOddsRatio;
  const { standardError } = found.implied;
  if (standardError.high >= ROOM * least) return agrees;
  const formula = isHazard ? `2 / √${events}` : `2 × √(1/${events} + 1/${total - events})`;
  const needed = Math.ceil(4 / standardError.high ** 2);
  return disagrees(
    `the interval ${limitsInWords(interval)} has a standard error of at most `
      + `${fixed(standardError.high, 3)}, and ${events} events among ${total} allow none below `
      + fixed(least, 3),
    {
      recomputed: { quantity: 'standard error', range: { low: least, high: least } },
      working: [
        `standard error from the limits, at ${levelOf(interval)}%: `
          + rangeInWords(standardError, 3),
        `least for ${events} events: ${formula} = ${fixed(least, 3)}`,
        ...(isHazard ? [`so narrow an interval takes ${needed} events or more`] : []),
      ],
    },
  );
}
