/*
 * Characters of the fonts Symbol and Wingdings that stand in manuscripts, by the
 * code that Word stores for them. Symbol's codes are Adobe's "Symbol Encoding"
 * (PostScript Language Reference Manual, appendix E), checked from memory.
 */
const SYMBOL: Readonly<Record<number, string>> = {
  0x2a: '*', 0x2b: '+', 0x2d: '−', 0x3c: '<', 0x3d: '=', 0x3e: '>', 0x7e: '~',
  0x61: 'α', 0x62: 'β', 0x63: 'χ', 0x64: 'δ', 0x65: 'ε', 0x67: 'γ', 0x68: 'η', 0x6a: 'φ',
  0x6b: 'κ', 0x6c: 'λ', 0x6d: 'μ', 0x70: 'π', 0x71: 'θ', 0x72: 'ρ', 0x73: 'σ', 0x74: 'τ',
  0x77: 'ω', 0x44: 'Δ', 0x53: 'Σ', 0x57: 'Ω', 0xa3: '≤', 0xa5: '∞', 0xb0: '°', 0xb1: '±',
  0xb3: '≥', 0xb4: '×', 0xb7: '•', 0xb8: '÷', 0xb9: '≠', 0xbb: '≈', 0xd7: '⋅', 0xd6: '√',
  0xae: '→', 0xad: '↑', 0xaf: '↓', 0xe5: '∑',
};

/** The character that a `w:sym` stands for; "" for ornaments that no text needs. */
export function symbolOf(font: string | undefined, code: string | undefined): string {
  const value = Number.parseInt(code ?? '', 16);
  if (!(value > 0)) return '';
  const inFont = value >= 0xf000 && value <= 0xf0ff ? value - 0xf000 : value;
  if (/symbol/i.test(font ?? '') && !/segoe|emoji/i.test(font ?? '')) return SYMBOL[inFont] ?? '';
  return value >= 0xf000 && value <= 0xf0ff ? '' : String.fromCodePoint(Math.min(value, 0x10ffff));
}
