import {
  agrees,
  cover,
  defineManuscriptRule,
  disagrees,
  flowing,
  type Judgement,
  quote,
  type Reading,
  sayings,
  toldOnce,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'intercept-as-ratio',
  question: 'Is the intercept of a model shown or read as a ratio?',
  why: `
    The intercept of a logistic model is the log odds of the outcome where every predictor is
    zero or at its reference. Its exponential is an odds, and compares no two groups; in a
    case-control study it depends on how many controls were chosen.
  `,
  source: `
    Hosmer DW, Lemeshow S, Sturdivant RX. Applied Logistic Regression, 3rd edition. Wiley, 2013,
    chapter 3. Rothman KJ, Greenland S, Lash TL. Modern Epidemiology, 3rd edition, 2008 (the
    intercept in case-control studies).
  `,
  innocent: [
    'A program prints the row with the others, and it was copied along.',
    'The value is given so that readers can work out predicted risks, and is not interpreted.',
    'The exponential of the intercept is labelled as the baseline odds elsewhere.',
  ],
  grade: 'caution',

  judge(reading) {
    return toldOnce(reading, [...inTables(reading), ...inWords(reading)]);
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. Please give the intercept as a coefficient, or leave it out of the
    column of ratios.
  `,

  examples: [
    {
      text: 'Table 2. Relapse\nVariable\tOR (95% CI)\nSmoking\t1.59 (1.05 to 2.41)\n'
        + 'Constant\t0.12 (0.06 to 0.24)\nAge over 60\t1.20 (0.95 to 1.52)\n',
      outcome: 'disagrees',
      note: '0.12 is the odds at the reference, not a ratio of odds',
    },
    {
      text: 'Table 2. Relapse\nVariable\tOR (95% CI)\nSmoking\t1.59 (1.05 to 2.41)\n'
        + 'Age over 60\t1.20 (0.95 to 1.52)\nDrinking\t1.31 (1.03 to 1.67)\n',
      outcome: 'agrees',
      note: 'every row compares two groups',
    },
    {
      text: 'The significant intercept shows that relapse was less likely (OR 0.12, 95% CI 0.06 '
        + 'to 0.24).',
      outcome: 'disagrees',
      note: 'an intercept compares no two groups',
    },
    {
      text: 'Table 2. Relapse\nVariable\tOR (95% CI)\nSmoking\t1.59 (1.05 to 2.41)\n'
        + 'Constant illness\t1.20 (0.95 to 1.52)\nDrinking\t1.31 (1.03 to 1.67)\n',
      outcome: 'agrees',
      note: 'a predictor that is called constant is no intercept',
    },
  ],
});

const NAME = new RegExp(
  '^\\W*(?:\\(?intercept\\)?|constant(?: term)?|_cons|model constant'
    + '|regression constant)\\W*$',
  'i',
);

/** Heads of columns that hold ratios: "Exp(B)", "Adjusted OR (95% CI)". */
const OF_RATIOS = /\b(?:[ac]?OR|[ac]?HR|RR|IRR|odds ratios?|hazard ratios?|exp ?\([Bbβ]\))(?!\w)/;

/** Rows of intercepts are read as no results, so that the tables are looked at themselves. */
function inTables(reading: Reading): readonly Judgement[] {
  const { text, tables } = reading.manuscript;
  return tables.flatMap(({ cells }): readonly Judgement[] => {
    const heads = cells.filter(({ header, span }) => header && OF_RATIOS.test(quote(text, span)));
    const [head] = heads;
    if (head === undefined) return [];
    const row = cells.find(({ column, span }) => column === 0 && NAME.test(quote(text, span)));
    const inRow = cells.find((cell) => cell.row === row?.row && /\d/.test(quote(text, cell.span))
      && heads.some((over) => isUnder(cell, over)));
    if (row === undefined || inRow === undefined) {
      return [{ verdict: agrees, span: head.span, marks: [] }];
    }
    const verdict = disagrees(`the row “${flowing(quote(text, row.span))}” stands among the `
      + 'ratios, and the exponential of an intercept is an odds, not a ratio of odds');
    return [{ verdict, span: cover(row.span, inRow.span), marks: [inRow.span] }];
  });
}

/** A cell's column, and how many columns it spans. */
interface Wide {
  readonly column: number;
  readonly columnSpan: number;
}

function isUnder({ column }: Wide, head: Wide): boolean {
  return column >= head.column && column < head.column + head.columnSpan;
}

/** An intercept or a constant that shows, means or is significant. */
const READ = new RegExp(
  '(?<!random[ -]|random-effects )\\b(?:significant (?:intercept|constant)(?= (?:shows?'
    + '|means?|indicat|suggest))'
    + '|(?:intercept'
    + '|constant term)(?: \\([^)]*\\))? (?:was (?:also )?(?:statistically )?significant'
    + '|(?:shows|showed|means|indicates|indicated|suggests|suggested) that))\\b'
    + '|\\b(?:intercept|constant)\\s*[,(:]?\\s*(?:had an? |with an? )?(?:OR|HR|RR|IRR'
    + '|odds ratio|exp ?\\(B\\))\\s*(?:=|of|was|:)?\\s*\\d',
  'gi',
);

function inWords(reading: Reading): readonly Judgement[] {
  return sayings(reading, READ)
    .filter(({ sentence }) => !/random|slope|growth|Egger/i.test(sentence))
    .map(({ span }) => ({
      verdict: disagrees('the intercept is read as a finding, and it tells the odds of the outcome '
        + 'where every predictor is zero or at its reference'),
      span,
      marks: [span],
    }));
}
