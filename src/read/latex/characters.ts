/** Commands that print a character or a few, in text or in formulas. */
export const CHARACTERS: ReadonlyMap<string, string> = new Map(Object.entries({
  '%': '%', '&': '&', '#': '#', _: '_', $: '$', '{': '{', '}': '}', ' ': ' ', '\n': ' ',
  ',': '\u2009', ';': ' ', ':': ' ', '>': ' ', '!': '', '/': '', '-': '\u00ad', '@': '', '|': '‖',
  thinspace: '\u2009', quad: ' ', qquad: ' ', enspace: ' ', enskip: ' ', space: ' ', hfill: ' ',
  textbackslash: '\\', textasciitilde: '~', textasciicircum: '^', textless: '<', textgreater: '>',
  textbar: '|', textendash: '–', textemdash: '—', textpm: '±', texttimes: '×', textdegree: '°',
  textmu: 'µ', textperiodcentered: '·', textminus: '−', textquoteleft: '‘', textquoteright: '’',
  textquotedblleft: '“', textquotedblright: '”', textasteriskcentered: '*', textdagger: '†',
  textdaggerdbl: '‡', textsection: '§', textbullet: '•', textonehalf: '½', textellipsis: '…',
  textregistered: '®', texttrademark: '™', textcopyright: '©', textunderscore: '_',
  percent: '%', slash: '/', S: '§', P: '¶', dag: '†', ddag: '‡', dagger: '†', ddagger: '‡',
  ldots: '…', dots: '…', cdots: '⋯', copyright: '©', pounds: '£', euro: '€', texteuro: '€',
  ss: 'ß', o: 'ø', O: 'Ø', ae: 'æ', AE: 'Æ', oe: 'œ', OE: 'Œ', aa: 'å', AA: 'Å', l: 'ł', L: 'Ł',
  i: 'ı', j: 'ȷ', TeX: 'TeX', LaTeX: 'LaTeX',
  times: '×', cdot: '·', pm: '±', mp: '∓', div: '÷', ast: '*', star: '⋆', circ: '°', bullet: '•',
  leq: '≤', le: '≤', leqslant: '≤', geq: '≥', ge: '≥', geqslant: '≥', lt: '<', gt: '>', ll: '≪',
  gg: '≫', neq: '≠', ne: '≠', approx: '≈', sim: '~', simeq: '≃', cong: '≅', equiv: '≡', propto: '∝',
  infty: '∞', prime: '′', to: '→', rightarrow: '→', leftarrow: '←', uparrow: '↑', downarrow: '↓',
  Rightarrow: '⇒', in: '∈', sum: '∑', prod: '∏', int: '∫', mid: '|', vert: '|', lvert: '|',
  rvert: '|', colon: ':', degree: '°', ell: 'ℓ', partial: '∂', ln: 'ln', log: 'log', exp: 'exp',
  min: 'min', max: 'max', Pr: 'Pr', lbrack: '[', rbrack: ']', langle: '⟨', rangle: '⟩',
  alpha: 'α', beta: 'β', gamma: 'γ', delta: 'δ', epsilon: 'ε', varepsilon: 'ε', zeta: 'ζ', eta: 'η',
  theta: 'θ', iota: 'ι', kappa: 'κ', lambda: 'λ', mu: 'μ', nu: 'ν', xi: 'ξ', pi: 'π', rho: 'ρ',
  sigma: 'σ', tau: 'τ', upsilon: 'υ', phi: 'φ', varphi: 'φ', chi: 'χ', psi: 'ψ', omega: 'ω',
  Gamma: 'Γ', Delta: 'Δ', Theta: 'Θ', Lambda: 'Λ', Xi: 'Ξ', Pi: 'Π', Sigma: 'Σ', Phi: 'Φ', Psi: 'Ψ',
  Omega: 'Ω', textalpha: 'α', textbeta: 'β', textchi: 'χ',
}));

/** Accents and the marks that Unicode combines with a letter: `\'e` is é, `\hat p` is p̂. */
export const ACCENTS: ReadonlyMap<string, string> = new Map(Object.entries({
  "'": '\u0301', '`': '\u0300', '^': '\u0302', '"': '\u0308', '~': '\u0303', '=': '\u0304',
  '.': '\u0307', c: '\u0327', v: '\u030c', H: '\u030b', k: '\u0328', r: '\u030a', u: '\u0306',
  d: '\u0323', b: '\u0331', hat: '\u0302', bar: '\u0304', tilde: '\u0303', widehat: '\u0302',
}));

/** Words as TeX prints them outside formulas: dashes and quotes of several signs become one. */
export function printedText(text: string): string {
  return text
    .replace(/---/g, '—')
    .replace(/--/g, '–')
    .replace(/``/g, '“')
    .replace(/''/g, '”')
    .replace(/`/g, '‘')
    .replace(/'/g, '’');
}

/** Signs as TeX prints them inside formulas, where a hyphen is a minus. */
export function printedMath(text: string): string {
  return text.replace(/-/g, '−').replace(/'/g, '′');
}
