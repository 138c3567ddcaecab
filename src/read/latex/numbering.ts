/** The numbers that TeX gives to what a source refers to. */
export interface Numbering {
  /** Tables and figures by their labels: "tab:main" is Table 2. */
  readonly labels: ReadonlyMap<string, Numbered>;
  /** References by their keys, in the order of the list, or else of their first mention. */
  readonly references: Map<string, number>;
}

/** What a label names. */
export interface Numbered {
  readonly thing: 'Table' | 'Figure';
  readonly number: number;
}

const PIECE = new RegExp(
  [
    /\\begin\{(\w+)\*?\}/, /\\end\{(\w+)\*?\}/, /\\(caption)(?![a-z])/,
    /\\label\{([^{}]{1,200})\}/, /\\bibitem\s{0,9}(?:\[[^\]]{0,300}\])?\{([^{}]{1,200})\}/,
  ].map(({ source }) => source).join('|'),
  'g',
);

/** Numbers tables, figures and the list of references in the order of their captions. */
export function numberingOf(
  source: string,
  floats: ReadonlyMap<string, 'Table' | 'Figure'>,
): Numbering {
  const labels = new Map<string, Numbered>();
  const references = new Map<string, number>();
  const counts = { Table: 0, Figure: 0 };
  let thing: 'Table' | 'Figure' | undefined;
  for (const [, begun = '', ended = '', caption, label, reference] of source.matchAll(PIECE)) {
    if (floats.has(begun)) thing = floats.get(begun);
    else if (floats.has(ended)) thing = undefined;
    else if (caption !== undefined && thing !== undefined) counts[thing]++;
    else if (label !== undefined && thing !== undefined) {
      labels.set(label, { thing, number: counts[thing] });
    } else if (reference !== undefined && !references.has(reference)) {
      references.set(reference, references.size + 1);
    }
  }
  return { labels, references };
}

/** How references are cited in the text, "[2,5]"; new ones are counted on. */
export function citation(keys: string, references: Map<string, number>): string {
  const numbers = keys.split(',').map((key) => {
    const known = references.get(key.trim()) ?? references.size + 1;
    references.set(key.trim(), known);
    return known;
  });
  return `[${numbers.join(',')}]`;
}
