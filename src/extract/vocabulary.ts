import type { DifferenceMeasure, OtherResult, RatioMeasure, Relation } from '../model/index.ts';
import { phrasebook } from './phrases.ts';

/**
 * What a number may be a value of. Anything but a ratio is named so that it is
 * not mistaken for one: the nearest name decides what a number is.
 */
export type Quantity =
  | { readonly kind: 'ratio'; readonly measure: RatioMeasure }
  | { readonly kind: 'difference'; readonly measure: DifferenceMeasure }
  | { readonly kind: 'proportion' }
  | { readonly kind: 'coefficient' }
  | { readonly kind: 'discrimination'; readonly measure: 'AUC' | 'C' }
  | { readonly kind: 'other'; readonly measure: OtherResult['measure'] };

/** A quantity as named, and how firmly the name holds on to a number further on. */
export interface Naming {
  readonly quantity: Quantity;
  /**
   * A firm name ("odds ratio") reaches over a whole sentence; a loose one
   * ("rate", "difference") only to the number right behind it.
   */
  readonly firm: boolean;
}

const ratio = (measure: RatioMeasure): Naming => ({
  quantity: { kind: 'ratio', measure },
  firm: true,
});
const difference = (measure: DifferenceMeasure, firm = true): Naming => ({
  quantity: { kind: 'difference', measure },
  firm,
});
const other = (measure: OtherResult['measure'], firm = false): Naming => ({
  quantity: { kind: 'other', measure },
  firm,
});
const proportion = (firm = false): Naming => ({ quantity: { kind: 'proportion' }, firm });
const discrimination = (measure: 'AUC' | 'C'): Naming => ({
  quantity: { kind: 'discrimination', measure },
  firm: true,
});
const coefficient: Naming = { quantity: { kind: 'coefficient' }, firm: true };

/** The names of quantities, in words. Names of ratios first; then what is not one. */
export const NAMES = phrasebook<Naming>([
  ['odds ratio | odds ratios | relative odds | odds rate | odds ration | odd ratio | odd ratios '
    + '| matched odds ratio | oddsratio | exp b | exponentiated coefficient', ratio('OR')],
  ['hazard ratio | hazard ratios | hazards ratio | hazards ratios | hazard rate ratio '
    + '| hazard rate ratios | relative hazard | relative hazards | hazard risk ratio '
    + '| relative hazard ratio | hazard risk | hazard rates ratio', ratio('HR')],
  ['relative risk | relative risks | risk ratio | risk ratios | relative risk ratio of risk '
    + '| cumulative incidence ratio | risks ratio | rate of relative risk', ratio('RR')],
  ['relative risk ratio | relative risk ratios', ratio('RRR')],
  ['rate ratio | rate ratios | incidence rate ratio | incidence rate ratios | incidence ratio '
    + '| incidence ratios | incidence density ratio | incident rate ratio | relative rate '
    + '| incident rate ratios | relative rates | rates ratio | event rate ratio '
    + '| mortality rate ratio | mortality rate ratios | mortality ratio | hospitalisation ratio '
    + '| incidence density ratios | relative incidence', ratio('IRR')],
  ['prevalence ratio | prevalence ratios | prevalence rate ratio | prevalence rate ratios '
    + '| prevalence proportion ratio', ratio('PR')],
  ['standardized mortality ratio | standardised mortality ratio | standardized mortality ratios '
    + '| standardised mortality ratios | standard mortality ratio', ratio('SMR')],
  ['standardized incidence ratio | standardised incidence ratio | standardized incidence ratios '
    + '| standardised incidence ratios', ratio('SIR')],
  ['subdistribution hazard ratio | subdistribution hazard ratios | sub distribution hazard ratio '
    + '| subhazard ratio | subhazard ratios | sub hazard ratio | sub distribution hazard ratios',
    ratio('SHR')],
  ['cause specific hazard ratio | cause specific hazard ratios', ratio('csHR')],
  ['prevalence odds ratio | prevalence odds ratios', ratio('POR')],
  ['diagnostic odds ratio | diagnostic odds ratios', ratio('DOR')],
  ['ratio of odds ratios | relative odds ratio | reporting odds ratio', ratio('ROR')],
  ['geometric mean ratio | ratio of geometric means | geometric mean ratios '
    + '| ratio of means | ratio of geometric mean', ratio('GMR')],
  ['ratio | ratios', { ...ratio('ratio'), firm: false }],
  ['odds', { ...ratio('OR'), firm: false }],
  ['hazard', { ...ratio('HR'), firm: false }],

  ['likelihood ratio | likelihood ratios | positive likelihood ratio | negative likelihood ratio '
    + '| waist hip ratio | waist to hip ratio | signal to noise ratio | incremental cost '
    + 'effectiveness ratio | neutrophil to lymphocyte ratio | neutrophil lymphocyte ratio '
    + '| international normalized ratio | international normalised ratio | sex ratio | h h ratio',
    other('other', true)],
  ['risk difference | risk differences | absolute risk reduction | absolute risk difference '
    + '| absolute difference | absolute reduction | absolute risk increase | rate difference '
    + '| absolute increase | absolute benefit | difference in risk | difference in proportions',
    difference('RD')],
  ['mean difference | mean differences | weighted mean difference | difference in means '
    + '| adjusted mean difference | difference in mean | mean change | mean reduction '
    + '| between group difference | treatment difference | mean treatment difference',
    difference('MD')],
  ['standardized mean difference | standardised mean difference | standardized mean differences '
    + '| standardised mean differences | effect size | effect sizes | cohen d | hedges g',
    difference('SMD')],
  ['difference | differences | increase | decrease | reduction | change | increases | changes '
    + '| improvement | gain | reductions | decreases', difference('difference', false)],
  ['relative risk reduction | relative risk increase | relative reduction | efficacy '
    + '| vaccine efficacy | vaccine effectiveness | effectiveness | attributable fraction '
    + '| population attributable fraction | attributable risk | relative risk reductions '
    + '| preventable fraction | protective efficacy | population attributable risk',
    other('other', true)],
  ['median | medians | median survival | median overall survival', other('median')],
  ['mean | means | average | geometric mean', other('mean')],
  ['incidence rate | mortality rate | incidence | rate | rates | event rate', other('rate')],
  ['number needed to treat | number needed to harm | number needed | numbers needed | heritability | i squared | kappa | icc '
    + '| intraclass correlation | intraclass correlation coefficient', other('other', true)],
  ['correlation | correlation coefficient | pearson correlation | spearman correlation '
    + '| correlation coefficients | correlations | rank correlation', other('correlation', true)],
  ['prevalence | proportion | percentage | sensitivity | specificity | survival | response rate '
    + '| survival rate | positive predictive value | negative predictive value | accuracy '
    + '| cumulative incidence | risk of | seroprevalence | specificities | sensitivities | yield '
    + '| detection rate | attack rate | success rate | cure rate | recurrence rate',
    proportion()],
  ['area under the curve | area under the receiver operating characteristic curve '
    + '| area under the roc curve | area under the receiver operating curve '
    + '| area under curve | areas under the curve | area under the receiver operating '
    + 'characteristics curve | areas under the receiver operating characteristic curve',
    discrimination('AUC')],
  ['c statistic | c index | concordance index | c statistics | concordance statistic '
    + '| harrell c | harrell c index', discrimination('C')],
  ['regression coefficient | beta coefficient | coefficient | coefficients | beta | β '
    + '| regression coefficients | slope | standardized beta | standardised beta', coefficient],
]);

/** The ratio measures behind their abbreviations, which are matched in upper case. */
const ABBREVIATED: Readonly<Record<string, RatioMeasure>> = {
  OR: 'OR', HR: 'HR', RR: 'RR', IRR: 'IRR', PR: 'PR', SMR: 'SMR', SIR: 'SIR', SHR: 'SHR',
  POR: 'POR', DOR: 'DOR', ROR: 'ROR', GMR: 'GMR', RRR: 'RRR', MRR: 'IRR', PRR: 'PR', HRR: 'HR',
  CSHR: 'csHR', csHR: 'csHR', sdHR: 'SHR', sHR: 'SHR', SDHR: 'SHR', IDR: 'IRR', TR: 'ratio',
  RaR: 'IRR', RtR: 'IRR', POOR: 'POR',
};

/** An abbreviation's measure, and whether its letters say adjusted or crude. */
export interface Abbreviation {
  readonly naming: Naming;
  readonly adjusted?: boolean;
}

const NOT_A_RATIO: Readonly<Record<string, Naming>> = {
  AUC: discrimination('AUC'),
  AUROC: discrimination('AUC'),
  AUCs: discrimination('AUC'),
  MD: difference('MD'),
  WMD: difference('MD'),
  SMD: difference('SMD'),
  RD: difference('RD'),
  ARD: difference('RD'),
  ES: difference('SMD'),
  NNT: other('other', true),
  NNH: other('other', true),
  ICC: other('other', true),
  VE: other('other', true),
  PAF: other('other', true),
  PAR: other('other', true),
  LR: other('other', true),
  PPV: proportion(true),
  NPV: proportion(true),
};

/** The abbreviations that mean the same in every manuscript, by how they are printed. */
export const ABBREVIATIONS: ReadonlyMap<string, Abbreviation> = buildAbbreviations();

function buildAbbreviations(): Map<string, Abbreviation> {
  const all = new Map<string, Abbreviation>();
  for (const [letters, naming] of Object.entries(NOT_A_RATIO)) all.set(letters, { naming });
  for (const [letters, measure] of Object.entries(ABBREVIATED)) {
    const naming = ratio(measure);
    for (const plural of ['', 's', "'s", '’s']) {
      for (const [form, adjusted] of formsOf(letters)) {
        const printed = form + plural;
        if (all.has(printed)) continue;
        all.set(printed, adjusted === undefined ? { naming } : { naming, adjusted });
      }
    }
  }
  all.delete('ARR');
  return all;
}

// aOR  AOR  adjOR  ORadj  ORa   cOR  COR  uOR  ORc
function formsOf(letters: string): readonly (readonly [string, boolean | undefined])[] {
  const adjusted = [`a${letters}`, `A${letters}`, `adj${letters}`, `Adj${letters}`, `ad${letters}`,
    `${letters}a`, `${letters}adj`, `m${letters}`, `ma${letters}`, `${letters}adjusted`];
  const crude = [`c${letters}`, `C${letters}`, `u${letters}`, `U${letters}`, `${letters}c`,
    `${letters}crude`, `${letters}unadj`];
  const plain = [letters, `p${letters}`, `s${letters}`];
  return [
    ...plain.map((form) => [form, undefined] as const),
    ...adjusted.map((form) => [form, true] as const),
    ...crude.map((form) => [form, false] as const),
  ];
}

/** Words that say how an interval was made; the label "95% CI" in all its forms. */
export const INTERVAL_NAMES = phrasebook<'confidence' | 'credible'>([
  ['ci | ic | cis | cl | cls | confidence interval | confidence intervals | confidence limit '
    + '| confidence limits | confidence bounds | confidence range | conf interval | c i '
    + '| confidence intervalls | confidence interval limits | fiducial limits | confident interval '
    + '| confidence internal | confidential interval | confidence level | conﬁdence interval '
    + '| cinf | rci | repeated confidence interval | lcl ucl | confident intervals | confidence levels', 'confidence'],
  ['credible interval | credible intervals | credibility interval | credibility intervals | cri '
    + '| crl | crls | cris | bayesian credible interval | posterior interval | hpd | hdi | bci '
    + '| bayesian confidence interval | highest density interval | uncertainty interval '
    + '| uncertainty intervals | credibility limits | ui', 'credible'],
]);

/** Words that call a result adjusted (true) or crude (false). */
export const ADJUSTMENT = phrasebook<boolean>([
  ['adjusted | multivariable | multivariate | multi variable | multi variate | covariate adjusted '
    + '| age adjusted | fully adjusted | adj | multivariably | multiple logistic '
    + '| multiply adjusted | controlled for | controlling for | adjusting for '
    + '| after adjustment | independently | independent predictor | independent predictors '
    + '| independent risk factor | independent risk factors | adjustment', true],
  ['crude | unadjusted | univariate | univariable | uni variate | univariately', false],
]);

/** Words for a relation in front of a p-value: "p less than 0.05". */
export const SPOKEN_RELATIONS = phrasebook<Relation>([
  ['less than | lower than | below | smaller than | under', '<'],
  ['greater than | more than | above | larger than | higher than', '>'],
  ['equal to | equals | of | was | is | were | at', '='],
]);
