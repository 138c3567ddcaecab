/** Characters of no width that carry no meaning on a screen: they are left out. */
const INVISIBLE = /[\u00ad\u200b\u2060\ufeff]/gu;

/**
 * Characters that act instead of being seen: control characters (the escape
 * character among them), halves of surrogate pairs, and formats such as the
 * marks that turn the direction of text. The two joiners stay: scripts need them.
 */
const ACTING = /[\p{Cc}\p{Cs}]|(?![\u200c\u200d])\p{Cf}/gu;

/** More marks on one letter than any script stacks; the rest would spill over other lines. */
const STACKED = /(\p{M}{8})\p{M}+/gu;

/** Where a word goes on in the next line: "associ-", "ated" is shown as "associ-ated". */
const BROKEN_WORD = /(?<=\p{L}-)[^\S\n]*\n\s*(?=\p{Ll})/gu;

/**
 * Words of a manuscript made safe to show: what would act on a terminal becomes
 * "\ufffd", and any run of spaces, tabs and line ends one space. A manuscript's text
 * is data, whoever wrote it: "\x1b[2J" is shown as "\ufffd[2J" and clears no screen.
 */
export function harmless(words: string): string {
  return words
    .replace(INVISIBLE, '')
    .replace(BROKEN_WORD, '')
    .replace(/[\s\u0085]+/gu, ' ')
    .replace(ACTING, '\ufffd')
    .replace(STACKED, '$1');
}

/**
 * JSON in which the same characters stand as escapes. It reads back to exactly
 * the same data, and is as harmless on a terminal: U+202E becomes "\u202e".
 */
export function harmlessJson(json: string): string {
  return json.replace(/(?!\n)[\p{Cc}\p{Cs}\p{Cf}\u2028\u2029]/gu, (character) =>
    character
      .split('')
      .map((unit) => `\\u${unit.charCodeAt(0).toString(16).padStart(4, '0')}`)
      .join(''));
}
