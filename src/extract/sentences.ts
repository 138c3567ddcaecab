import type { Span } from '../model/index.ts';

/** Splits a stretch of text into sentences; spaces after a sentence belong to it. */
export type SentenceSplitter = (text: string, span: Span) => readonly Span[];

/** Abbreviations after which a full stop ends nothing, beside those compromise knows. */
const ABBREVIATIONS = [
  'vs', 'cf', 'ref', 'refs', 'fig', 'figs', 'suppl', 'eq', 'eqs', 'approx', 'resp', 'al', 'ca',
  'no', 'nos', 'tab', 'e.g', 'i.e', 'incl', 'excl', 'est', 'max', 'min', 'yr', 'yrs', 'mo',
  'adj', 'unadj', 'sig', 'c.i', 'o.r', 'h.r', 'r.r',
];

interface Compromise {
  readonly model: () => { readonly one: { readonly abbreviations: Record<string, boolean> } };
  readonly world: () => unknown;
  readonly methods: () => {
    readonly one: {
      readonly tokenize: {
        readonly splitSentences: (text: string, world: unknown) => readonly string[];
      };
    };
  };
}

/**
 * Loads compromise's sentence splitter. Its first tier alone is loaded, and only
 * its splitter is used: it reads "1.05-2.41" as a noun, so numbers are ours.
 */
export async function loadSentenceSplitter(): Promise<SentenceSplitter> {
  const { default: nlp } = (await import('compromise/one')) as unknown as { default: Compromise };
  for (const word of ABBREVIATIONS) nlp.model().one.abbreviations[word] = true;
  const world = nlp.world();
  const { splitSentences } = nlp.methods().one.tokenize;
  return (text, span) => portions(text, span).flatMap((portion) => {
    // A line end inside a paragraph is a space; the replacement keeps every offset.
    const flat = text.slice(portion.start, portion.end).replace(/[\n\r]/g, ' ');
    return place(splitSentences(flat, world), flat, portion.start);
  });
}

/** No sentence is longer, in characters: what goes on beyond is cut at a space. */
const LONGEST = 4000;

/**
 * A block cut into portions that the splitter takes well, since its cost grows with
 * the square of what it is given. Cuts fall behind a full stop where there is one.
 */
function portions(text: string, { start, end }: Span): readonly Span[] {
  const cut: Span[] = [];
  let from = start;
  while (end - from > LONGEST) {
    const window = text.slice(from, from + LONGEST);
    const stop = window.lastIndexOf('. ') + 1;
    const space = window.lastIndexOf(' ') + 1;
    const to = from + (stop > LONGEST / 2 ? stop : space > LONGEST / 2 ? space : LONGEST);
    cut.push({ start: from, end: to });
    from = to;
  }
  return [...cut, { start: from, end }];
}

/** Gives the pieces back their offsets; whatever lies between two pieces joins the first. */
function place(pieces: readonly string[], flat: string, start: number): readonly Span[] {
  const starts: number[] = [];
  let at = 0;
  for (const piece of pieces) {
    const found = flat.indexOf(piece, at);
    if (found < 0) continue;
    starts.push(found);
    at = found + piece.length;
  }
  return starts.map((from, index) => ({
    start: start + (index === 0 ? 0 : from),
    end: start + (starts[index + 1] ?? flat.length),
  }));
}
