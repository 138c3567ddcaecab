/** Characters by the names that HTML gives them, as far as manuscripts use these. */
const NAMED: Readonly<Record<string, string>> = {
  amp: '&', lt: '<', gt: '>', quot: '"', apos: "'", nbsp: '\u00a0', thinsp: '\u2009',
  ndash: '–', mdash: '—', minus: '−', times: '×', middot: '·', plusmn: '±', deg: '°', le: '≤',
  ge: '≥', ne: '≠', infin: '∞', asymp: '≈', hellip: '…', dagger: '†', Dagger: '‡', sect: '§',
  para: '¶', sup2: '²', sup3: '³', frac12: '½', micro: 'µ', alpha: 'α', beta: 'β', gamma: 'γ',
  delta: 'δ', chi: 'χ', kappa: 'κ', lambda: 'λ', mu: 'μ', rho: 'ρ', sigma: 'σ', tau: 'τ',
  Delta: 'Δ',
  lsquo: '‘', rsquo: '’', ldquo: '“', rdquo: '”', shy: '\u00ad',
};

const ENTITY = /&(?:#(\d{1,7})|#[xX]([\da-fA-F]{1,6})|([A-Za-z]{2,8}\d?));/g;

/** Text with the characters that `&le;` and `&#8804;` stand for. */
export function withCharacters(text: string): string {
  if (!text.includes('&')) return text;
  return text.replace(ENTITY, (all, decimal?: string, hexadecimal?: string, name?: string) => {
    if (name !== undefined) return Object.hasOwn(NAMED, name) ? (NAMED[name] as string) : all;
    const code = decimal === undefined ? Number.parseInt(hexadecimal ?? '', 16) : Number(decimal);
    return code > 0 && code <= 0x10ffff ? String.fromCodePoint(code) : all;
  });
}
