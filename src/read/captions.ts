// Table 2. Adjusted …    Figure S1 Flow of …    TABLE III: …    Supplementary Table 4 | …
// ^^^^^^^^               ^^^^^^^^^              ^^^^^^^^^       ^^^^^^^^^^^^^^^^^^^^^
const BEFORE =
  /(?:(?:[Ss]upplement(?:ary|al)|SUPPLEMENT(?:ARY|AL)|[Aa]ppendix|[Oo]nline|Extended [Dd]ata)\s+)?/;
const THING = /(?:e?Table|TABLE|eFigure|Figure|FIGURE|Fig\.?|FIG\.?|Box|BOX|Scheme)/;
const NUMBER = /\s*(?:[SAe]?\d{1,2}[A-Za-z]?|[A-Z]\d{1,2}|[IVX]{1,5})/;
const AFTER = /(?:\s*[.:|–—](?=\s|$)|\s*\((?:continued|cont)|\s*$|\s+(?=[A-Z(“"‘]))/;
const CAPTION = new RegExp(`^(${BEFORE.source}${THING.source}${NUMBER.source})${AFTER.source}`);

/**
 * The label that opens a caption, "Table 2", or "" where the words open none:
 * "Table 2 shows that" is a sentence.
 */
export function captionLabel(words: string): string {
  return CAPTION.exec(words.trimStart())?.[1] ?? '';
}

/** Whether a caption's label names a table, and not a figure: "Supplementary Table 4". */
export function labelsTable(label: string): boolean {
  return /table/i.test(label);
}

// * P < 0.05      a Adjusted for age      CI, confidence interval      Note: …      Data are …
const MARKED = /^(?:[*†‡§¶#‖^]|(?:[a-h]|\d)[.)\]]?\s?[A-Z]|\(?[a-h]\)\s)/;
const WORDED = /^(?:N(?:otes?|OTES?)|Abbreviations?|(?:Data|Values) are|Source|Significant)\b/;
const MODELS = /^(?:Adjusted for|Models? \d)\b/;
const EXPLAINED = /^[A-Z][A-Za-z]{1,5}\s?[,:=]\s?[A-Za-z]+ [a-z]/;

/** Whether words that stand under a table read like its notes. */
export function looksLikeNote(words: string): boolean {
  const start = words.trimStart();
  return [MARKED, WORDED, MODELS, EXPLAINED].some((pattern) => pattern.test(start));
}
