import {
  agrees,
  defineManuscriptRule,
  disagrees,
  isWholeArticle,
  type Judgement,
  type RatioResult,
  type Reading,
  type Result,
  roleAt,
  tablesNotRead,
  textIn,
  zoneOf,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'what-a-reader-needs',
  question: 'Does the article give what its ratios need to be understood?',
  why: `
    A hazard ratio sums up a follow-up well only where hazards are proportional; an adjusted
    ratio means what its covariates make of it; a ratio without risks, or without an interval,
    does not tell how much is at stake or how sure it is.
  `,
  source: `
    von Elm E et al. STROBE statement. Lancet 2007;370:1453–1457 (items 12, 16). Schulz KF et al.
    CONSORT 2010. BMJ 2010;340:c332 (item 17b). Collins GS et al. TRIPOD. BMJ 2015;350:g7594 (items
    10d, 16). Kuitunen I et al. BMC Med Res Methodol 2022 found proportional hazards examined in 12%
    of 77 articles.
  `,
  innocent: [
    'It stands in a supplement, a protocol or a figure, or is told in words not known here.',
    'The journal leaves no room for it.',
    'It was examined, and nothing was found worth reporting.',
  ],
  grade: 'caution',

  judge(reading) {
    if (!isWholeArticle(reading)) return [];
    const own = reading.findings.results.filter((result) => isOwn(reading, result));
    const needs = asked(reading, own);
    const first = needs[0]?.about;
    if (first === undefined) return [];
    const lacking = needs.filter(({ isGiven }) => !isGiven);
    const at = lacking[0]?.about ?? first;
    const judgement = { span: at.span, marks: [] };
    return [lacking.length === 0
      ? { ...judgement, verdict: agrees }
      : { ...judgement, verdict: listed(lacking) }] satisfies readonly Judgement[];
  },

  comment: (words, { because }) => `
    On results such as “${words}”: ${because}. Could the authors add it, or point to where it is
    reported?
  `,

  examples: [
    {
      text: article('Cox models; proportionality was examined with Schoenfeld residuals.'),
      outcome: 'agrees',
      note: 'the assumption was examined',
    },
    {
      text: article('We fitted Cox models.'),
      outcome: 'disagrees',
      note: 'nothing is said of proportional hazards',
    },
    {
      text: article('We fitted Cox proportional hazards models.'),
      outcome: 'disagrees',
      note: 'the model is named, and not whether its assumption holds',
    },
    {
      text: article('We fitted Cox models. The proportional hazards assumption was met.'),
      outcome: 'agrees',
      note: 'the assumption is spoken of',
    },
  ],
});

/** A short article, for examples. */
function article(methods: string): string {
  return `Abstract\n\nWomen fell.\n\nMethods\n\n${methods}\n\nResults\n\n`
    + 'Of 120 women, 45 (37.5%) fell. '
    + 'The hazard ratio for a fall was 1.59 (95% CI 1.05 to 2.41) with tarring, and '
    + 'the hazard ratio for a fracture was 1.21 (95% CI 0.80 to 1.83).';
}

/** A discussion compares with what others found. */
function isOwn(reading: Reading, result: Result): boolean {
  return zoneOf(reading, result) !== 'aside' && roleAt(reading, result.span) !== 'discussion';
}

/** Something that a reader needs beside some result, and whether the article gives it. */
interface Need {
  readonly what: string;
  readonly about: Result;
  readonly isGiven: boolean;
}

/** Every need that the article's own results raise. */
function asked(reading: Reading, own: readonly Result[]): readonly Need[] {
  const ratios = own.filter((result) => result.kind === 'ratio');
  const text = textIn(reading,
    ['abstract', 'methods', 'results', 'discussion', 'other', 'supplement']);
  return [
    ...needOfHazards(ratios, text),
    ...needsOfAdjustment(reading, ratios, text),
    ...needOfRisks(reading, ratios, text),
    ...needOfIntervals(reading, ratios),
    ...needsOfDiscrimination(own, text),
  ];
}

/** Fewer results of a kind than this are no main matter of an article. */
const FEWEST = 2;

function need(what: string, results: readonly Result[], isGiven: boolean): readonly Need[] {
  const [about] = results;
  return about === undefined || results.length < FEWEST ? [] : [{ what, about, isGiven }];
}

/** So many other words may stand between two that belong together. */
const WORDS = (most: number): string => String.raw`\s+(?:\S{1,40}\s+){0,${most}}`;

/** Words on whether hazards are proportional, and not only the model's name. */
const PROPORTIONALITY = new RegExp(
  String.raw`schoenfeld|non.?proportional|proportionality`
    + String.raw`|proportional[\s-]+hazards?\s+(?:assumption|was|were|held|hold|violat|could|test)`
    + String.raw`|assum[a-z]{1,8}${WORDS(5)}proportional|proportional${WORDS(6)}assumption`
    + String.raw`|log[\s(–-]{0,3}log|restricted mean|time.(?:varying|dependent)`
    + String.raw`|interactions?\s+with${WORDS(3)}time`,
  'i',
);

function needOfHazards(ratios: readonly RatioResult[], text: string): readonly Need[] {
  const hazards = ratios.filter(({ measure }) => measure === 'HR' || measure === 'csHR');
  return need('whether hazards were proportional', hazards, PROPORTIONALITY.test(text));
}

const ENTERED = '(?:includ|enter|select|retain|stepwise|backward|forward)';
const MODEL = '(?:model|regression|analys)';

const COVARIATES = new RegExp(
  String.raw`adjust[a-z]{0,6}${WORDS(8)}(?:for|by|to|on|with)\b|adjust[a-z]{0,6}\s+for\b`
    + String.raw`|(?:controll[a-z]{1,4}|account[a-z]{0,4}|correct[a-z]{0,4})\s+for\b`
    + String.raw`|\b(?:covariates?|confounders?|covariables?|predictors)\b`
    + String.raw`|\b(?:independent|explanatory) variables|\bpropensity|\bstratified\b`
    + String.raw`|${ENTERED}[a-z]{0,6}${WORDS(14)}${MODEL}`
    + String.raw`|${MODEL}[a-z]{0,6}${WORDS(14)}${ENTERED}`,
  'i',
);

const CRUDE = new RegExp(
  String.raw`\b(?:crude|un-?adjusted|uni-?vari\w{2,6}|bi-?vari\w{2,6}|cOR|UOR|non-?adjusted`
    + String.raw`|minimally adjusted|age.adjusted|before adjust\w{0,5}|Kaplan)\b`,
  'i',
);

function needsOfAdjustment(
  { findings }: Reading,
  ratios: readonly RatioResult[],
  text: string,
): readonly Need[] {
  const adjusted = ratios.filter((result) => result.adjusted === true);
  const hasCrude = ratios.some((result) => result.adjusted === false)
    || /person.?years/i.test(text)
    || findings.counts.some(({ count, percent }) => count !== undefined && percent !== undefined);
  return [
    ...need('what the ratios are adjusted for', adjusted, COVARIATES.test(text)),
    ...need('the crude ratios or the counts beside the adjusted ones', adjusted,
      hasCrude || CRUDE.test(text)),
  ];
}

const RISKS = new RegExp(
  String.raw`\d\s?%|\bper\s?cent|person.years|absolute risk|risk difference|number needed`
    + String.raw`|\bper\s+(?:\d[\d,]{0,8}\s+)?(?:hundred|thousand|person|patient|woman|child|year)`
    + String.raw`|cumulative incidence|incidence rate|Kaplan|event rate`,
  'i',
);

function needOfRisks(
  { findings }: Reading,
  ratios: readonly RatioResult[],
  text: string,
): readonly Need[] {
  const has = findings.counts.length > 0 || findings.prevalences.length > 0 || RISKS.test(text);
  return need('risks or rates beside the ratios', ratios, has);
}

/** The ratios whose estimate is printed with no interval anywhere. */
function needOfIntervals(reading: Reading, ratios: readonly RatioResult[]): readonly Need[] {
  if (tablesNotRead(reading).length > 0) return [];
  const withInterval = new Set(ratios.filter(({ interval }) => interval !== undefined)
    .map(({ estimate }) => estimate?.value));
  const without = ratios.filter(({ interval, estimate }) =>
    interval === undefined && estimate !== undefined && !withInterval.has(estimate.value));
  const isMost = without.length * 2 > ratios.length;
  return need('intervals for most of the ratios', without, !isMost);
}

const CALIBRATION = new RegExp(
  String.raw`calibrat|hosmer|brier|goodness.of.fit`
    + String.raw`|observed\s+(?:and|to|versus|vs\.?)\s+(?:expected|predicted)`,
  'i',
);
const VALIDATION = new RegExp(
  String.raw`validat|bootstrap|optimism|split.sample|jack.?knife`
    + String.raw`|(?:training|testing|test) (?:set|sample|cohort|data)`,
  'i',
);
const OF_A_MODEL = new RegExp(
  String.raw`\b(?:prediction|predictive|prognostic|risk)\s+(?:model|score|rule|index|tool)s?\b`
    + '|\\bnomogram',
  'i',
);

function needsOfDiscrimination(own: readonly Result[], text: string): readonly Need[] {
  const areas = own.filter(({ kind }) => kind === 'discrimination');
  const bare = areas.filter(({ interval }) => interval === undefined);
  const isOfModel = OF_A_MODEL.test(text);
  return [
    ...need('intervals for the areas under the curve', bare, bare.length * 2 <= areas.length),
    ...(isOfModel
      ? [
        ...need('how well predicted and observed risks agree (calibration)', areas,
          CALIBRATION.test(text)),
        ...need('how the model was validated', areas, VALIDATION.test(text)),
      ]
      : []),
  ];
}

function listed(lacking: readonly Need[]): Judgement['verdict'] {
  const whats = lacking.map(({ what }) => what);
  return disagrees(`not found in the article: ${whats.join('; ')}`, {
    working: lacking.map(({ what }) => `looked for in the whole text, and not found: ${what}`),
  });
}
