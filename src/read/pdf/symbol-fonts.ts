import type { Notice } from '../../model/index.ts';
import type { DrawnPage, Run, Side } from './run.ts';

/**
 * A symbol font of many older journals, as PDFs store it without a table of its
 * characters: the key that typed the sign in place of the sign. Which key stands
 * for which sign was found by holding such PDFs against the same articles' XML;
 * keys that were not met there are left as they are.
 *
 *     p,0.001 is p<0.001        20.45 is −0.45        aged $65 is aged ≥65
 */
const SIGNS: Readonly<Record<string, string>> = {
  ',': '<',
  '.': '>',
  '2': '−',
  $: '≥',
  '#': '≤',
};

/** Keys that are seen in such a font but are left as they are. */
const OTHER_KEYS = /^["1356789?+=mu'<>±≥≤−×]$/;

/** Pages with the signs of symbol fonts restored, and what to say of it. */
export interface Restored {
  readonly pages: readonly DrawnPage[];
  readonly notices: readonly Notice[];
}

/**
 * Finds fonts that draw nothing but single keys of the chart, and draw them
 * where signs stand and not where commas and figures do; gives their signs back.
 */
export function withSigns(pages: readonly DrawnPage[]): Restored {
  const fonts = symbolFonts(pages);
  if (fonts.size === 0) return { pages, notices: [] };
  const signed = pages.map((page) => ({
    ...page,
    sides: page.sides.map((side) => signedSide(side, fonts)),
  }));
  return { pages: signed, notices: [{ message: NOTICE }] };
}

const NOTICE =
  'A symbol font of the file stores signs as other characters ("<" as ",", "−" as "2"); ' +
  'the signs were restored where it is used.';

function signedSide({ frame, runs }: Side, fonts: ReadonlySet<string>): Side {
  const signed = runs.map((run) =>
    fonts.has(run.font) ? { ...run, text: SIGNS[run.text] ?? run.text } : run,
  );
  return { frame, runs: signed };
}

function symbolFonts(pages: readonly DrawnPage[]): ReadonlySet<string> {
  const only = new Map<string, boolean>();
  const signs = new Map<string, number>();
  for (const { runs } of pages.flatMap(({ sides }) => sides)) {
    for (const [i, run] of runs.entries()) {
      const isKey = run.text.length === 1 && (run.text in SIGNS || OTHER_KEYS.test(run.text));
      only.set(run.font, isKey && (only.get(run.font) ?? true));
      if (isKey && standsAsSign(run, runs[i + 1]))
        signs.set(run.font, (signs.get(run.font) ?? 0) + 1);
    }
  }
  return new Set(
    [...signs]
      .filter(([font, count]) => count >= 2 && only.get(font) === true)
      .map(([font]) => font),
  );
}

/** A comma, a dollar or a number sign with a figure drawn right after it: no comma stands so. */
function standsAsSign(run: Run, next: Run | undefined): boolean {
  if (next === undefined || !/^[,$#]$/.test(run.text)) return false;
  const near =
    Math.abs(next.left - run.right) < 0.3 * run.size && Math.abs(next.baseline - run.baseline) < 1;
  return near && /^[\d.]/.test(next.text);
}
