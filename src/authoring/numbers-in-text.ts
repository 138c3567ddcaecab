import type { Block, Manuscript, Span } from '../model/index.ts';

/** A number as it stands anywhere in the text, read without its surroundings. */
export interface BareNumber {
  readonly span: Span;
  readonly value: number;
  readonly decimals: number;
  /** Its digits in plain notation, without separators of thousands. */
  readonly plain: string;
}

/** Digits with their separators, and not the end of a name: "1,240", "0·72", ".05", not "T2". */
const NUMBER = /(?<![\p{L}_])(?:\d{1,3}(?:[,\u2009\u202f\u00a0]\d{3})+(?!\d)|\d+)?(?:[.·]\d+)?/gu;

/** Every number of a stretch of text, in order. Linear in its length. */
export function numbersIn(text: string, { start, end }: Span): readonly BareNumber[] {
  return [...text.slice(start, end).matchAll(NUMBER)].flatMap(({ 0: printed, index }) => {
    if (printed === '') return [];
    const plain = printed.replace(/[,\u2009\u202f\u00a0]/g, '').replace('·', '.');
    const decimals = plain.split('.')[1]?.length ?? 0;
    const at = start + index;
    const span = { start: at, end: at + printed.length };
    return [{ span, value: Number(plain), decimals, plain }];
  });
}

/** Where the article reports: everything but its abstract, its title and its references. */
export function bodyBlocks({ blocks }: Manuscript): readonly Block[] {
  return blocks.filter(({ section }) => !NO_BODY.has(section.role));
}

const NO_BODY: ReadonlySet<string> = new Set(['abstract', 'title', 'references']);
