/**
 * Words that sentences and table rows share without speaking of the same thing.
 */
const EMPTY_WORDS = new Set((
  'among with history level levels increased higher lower report reported overall total '
  + 'risk risks rate rates ratio ratios odds hazard hazards relative incidence prevalence '
  + 'patients women children adults participants people their from during after before '
  + 'between versus compared than that this these those were have having been associated '
  + 'association confidence interval adjusted unadjusted crude model models significant '
  + 'significantly group groups analysis analyses result results table data study studies '
  + 'variable variables estimate effect effects outcome outcomes years year mean other '
  + 'within also there which when more less most only controlling reference univariate '
  + 'multivariate multivariable regression respectively number likely showed found'
).split(' '));

/** The telling words of a text: of four letters or more, and not among the empty ones. */
function tellingWords(text: string): readonly string[] {
  const words = text.toLowerCase().match(/\p{L}{4,}/gu) ?? [];
  return words.filter((word) => !EMPTY_WORDS.has(word)).map((word) => word.replace(/s$/, ''));
}

/** How many letters two words must begin with alike to be one: "falls" and "falling". */
const STEM = 5;

/**
 * How many telling words two texts share. "Asia" and "Asian" are one word, and so are
 * "depression" and "depressed".
 */
export function wordsShared(one: string, other: string): number {
  const known = tellingWords(other);
  const stems = new Set(known.flatMap((word) => [word.slice(0, STEM), word.slice(0, STEM - 1)]));
  const short = new Set(known.filter((word) => word.length < STEM));
  return new Set(tellingWords(one)
    .map((word) => word.slice(0, STEM))
    .filter((stem) => stems.has(stem) || short.has(stem.slice(0, STEM - 1)))).size;
}
