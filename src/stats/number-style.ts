import { absence, type Maybe } from './absence.ts';

/**
 * A ratio printed by Cole's rule of four (BMJ 2015;350:h1845): two significant digits
 * where the first one is 4 or more, else three. 22.68 (7.51 to 73.67) becomes 22.7 (7.5 to 74).
 */
export function byRuleOfFour(ratio: number): Maybe<string> {
  if (!(ratio > 0 && ratio < Infinity)) return absence(`${ratio} is not a positive number`);
  const text = ratio.toExponential(15);
  const digits = Number(text.charAt(0)) >= 4 ? 2 : 3;
  return roundedHalfUp(ratio, digits - 1 - exponentOf(text));
}

/** How many decimals the rule of four gives a ratio: 2 for 0.88, 1 for 22.7, 0 for 74. */
export function ruleOfFourDecimals(ratio: number): Maybe<number> {
  if (!(ratio > 0 && ratio < Infinity)) return absence(`${ratio} is not a positive number`);
  const text = ratio.toExponential(15);
  return Math.max(0, (Number(text.charAt(0)) >= 4 ? 1 : 2) - exponentOf(text));
}

/** Journals' ways of printing p-values (their instructions to authors). */
export type PStyle = 'AMA' | 'NEJM' | 'Annals';

/**
 * A p-value as a journal prints it. AMA: two decimals without the zero, three below 0.01
 * or where two would turn .049 into .05, ends P<.001 and P>.99. NEJM: two decimals from
 * 0.01, three to 0.001, then P<0.001. Annals of Internal Medicine: three decimals up to
 * 0.20, two above. 0.0497 is "P=.050", "P=0.05" and "P=0.050".
 */
export function styledP(p: number, style: PStyle): Maybe<string> {
  if (!(p >= 0 && p <= 1)) return absence(`${p} is not a probability`);
  if (p < 0.001) return style === 'AMA' ? 'P<.001' : 'P<0.001';
  switch (style) {
    case 'AMA':
      return amaP(p);
    case 'NEJM':
      return `P=${roundedHalfUp(p, p < 0.01 ? 3 : 2)}`;
    case 'Annals':
      return `P=${roundedHalfUp(p, p <= 0.2 ? 3 : 2)}`;
    default:
      return style satisfies never;
  }
}

function amaP(p: number): string {
  if (p > 0.99) return 'P>.99';
  const crosses = p < 0.05 && Number(roundedHalfUp(p, 2)) >= 0.05;
  return `P=${roundedHalfUp(p, p < 0.01 || crosses ? 3 : 2)}`.replace('=0.', '=.');
}

function exponentOf(text: string): number {
  return Number(text.slice(text.indexOf('e') + 1));
}

/**
 * Rounds half up by the decimal digits as they are written, not by the binary value:
 * 1.005 to two decimals is "1.01". For decimals below zero, to tens and hundreds.
 */
export function roundedHalfUp(value: number, decimals: number): string {
  const scaled = Math.round(Number(`${shortest(value)}e${decimals}`));
  const rounded = Number(`${scaled}e${-decimals}`);
  return rounded.toFixed(Math.max(0, decimals));
}

/** The shortest decimal that reads back as the value, without an exponent. */
function shortest(value: number): string {
  const text = `${value}`;
  return text.includes('e') ? value.toFixed(20) : text;
}
