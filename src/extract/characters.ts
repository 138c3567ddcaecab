/**
 * What characters stand for when a manuscript prints numbers.
 *
 * Manuscripts arrive with every dash, space and decimal point that typesetting
 * knows, and some that only broken text layers know. They are understood here
 * and never replaced: spans keep pointing at what was printed.
 */

/** The character classes that the lexer tells apart. */
export const CharacterClass = {
  other: 0,
  space: 1,
  digit: 2,
  letter: 3,
  point: 4,
  dash: 5,
  comma: 6,
  semicolon: 7,
  colon: 8,
  open: 9,
  close: 10,
  relation: 11,
  percent: 12,
  slash: 13,
  plusMinus: 14,
  softHyphen: 15,
  stop: 16,
  times: 17,
  newline: 18,
  star: 19,
} as const;

/** One of the numbers of `CharacterClass`. */
export type CharacterClass = (typeof CharacterClass)[keyof typeof CharacterClass];

/** Decimal points that are not full stops: `0·72`, and its lookalikes. */
const RAISED_POINTS = '·‧∙⋅・•';

/** Every stroke used between limits or before a negative number. */
const DASHES = '-‐‑‒–—―−﹣－~∼〜～˗⁻\u0096\u0097';

const SPACES = ' \t\u00a0\u1680\u2000\u2001\u2002\u2003\u2004\u2005\u2006\u2007\u2008\u2009\u200a'
  + '\u200b\u202f\u205f\u2060\u3000\ufeff\u200c\u200d';

const CLASSES: readonly (readonly [string, CharacterClass])[] = [
  [SPACES, CharacterClass.space],
  ['\n\r\u000b\f\u0085\u2028\u2029', CharacterClass.newline],
  ['0123456789', CharacterClass.digit],
  ['.', CharacterClass.point],
  [RAISED_POINTS, CharacterClass.point],
  [DASHES, CharacterClass.dash],
  [',，﹐、', CharacterClass.comma],
  [';；', CharacterClass.semicolon],
  [':：∶', CharacterClass.colon],
  ['([{（［｛〔⟨', CharacterClass.open],
  [')]}）］｝〕⟩', CharacterClass.close],
  ['=<>≤≥‹›＜＞＝≦≧⩽⩾≈≅', CharacterClass.relation],
  ['%％‰', CharacterClass.percent],
  ['/⁄∕／', CharacterClass.slash],
  ['±', CharacterClass.plusMinus],
  ['\u00ad', CharacterClass.softHyphen],
  ['!?。', CharacterClass.stop],
  ['×✕⋆', CharacterClass.times],
  ['*†‡§¶#', CharacterClass.star],
];

const TABLE = buildTable();

function buildTable(): Uint8Array {
  const table = new Uint8Array(0x10000);
  for (let code = 0; code < table.length; code++) {
    if (/\p{L}|\p{M}/u.test(String.fromCharCode(code))) table[code] = CharacterClass.letter;
  }
  // Halves of a surrogate pair: mathematical italics such as 𝑝 are letters too.
  table.fill(CharacterClass.letter, 0xd800, 0xe000);
  for (const [characters, kind] of CLASSES) {
    for (const character of characters) table[character.charCodeAt(0)] = kind;
  }
  return table;
}

/** The class of the character at `index`; beyond the text's end it is a space. */
export function classAt(text: string, index: number): CharacterClass {
  const code = text.charCodeAt(index);
  return (code === code ? TABLE[code] : CharacterClass.space) as CharacterClass;
}

/** The digit that a superscript character shows, or −1: `⁵` is 5. */
export function superscriptDigit(code: number): number {
  if (code === 0xb9) return 1;
  if (code === 0xb2) return 2;
  if (code === 0xb3) return 3;
  if (code === 0x2070 || (code >= 0x2074 && code <= 0x2079)) return code - 0x2070;
  return -1;
}
