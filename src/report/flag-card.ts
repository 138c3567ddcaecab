import {
  describePlace, type Flag, type Grade, type Manuscript, placeOf, type Rule,
} from '../model/index.ts';
import { DRAWN, type Drawing, drawingOf, type Signs, TYPED } from './drawing.ts';
import { harmless } from './harmless.ts';
import { inkFor } from './ink.ts';
import { type Passage, passagesOf } from './passage.ts';
import { quotation } from './quotation.ts';
import { besideOf, markedWords } from './recomputed-in-words.ts';
import { bodyIndent, indented, labelledWords, lineWidth, type Screen } from './screen.ts';
import { sectionName } from './section-name.ts';
import { wrap } from './wrap.ts';

/** The manuscript and the rules that a flag is explained from. */
export interface Background {
  readonly manuscript: Manuscript;
  readonly rules: readonly Rule[];
}

/** A flag as a reviewer reads it: where, what was asked, the words, the numbers, what to do. */
export function flagCard(
  flag: Flag, number: number, background: Background, screen: Screen,
): readonly string[] {
  const { manuscript, rules } = background;
  const rule = rules.find(({ id }) => id === flag.rule);
  return parted([
    heading(flag, number, screen),
    asked(flag, rule, screen),
    quoted(flag, manuscript, screen),
    numbers(flag, manuscript, screen),
    labelledWords(screen, 'working', flag.working.map(harmless)),
    labelledWords(screen, 'perhaps', explanations(flag, rule).map(harmless)),
    labelledWords(screen, 'to ask', [harmless(flag.comment)]),
  ]);
}

/** The parts that there are, with a blank line between them. */
function parted(parts: readonly (readonly string[])[]): readonly string[] {
  return parts.filter((part) => part.length > 0)
    .flatMap((part, index) => (index === 0 ? part : ['', ...part]));
}

/** A notch for each step of the grade, as on a tally stick: three for a contradiction. */
const NOTCHES: Readonly<Record<Grade, number>> = { contradiction: 3, discrepancy: 2, caution: 1 };

function heading(flag: Flag, number: number, screen: Screen): readonly string[] {
  const ink = inkFor(screen.colours);
  const title = `${number}. ${capital(flag.grade)}, ${whereInWords(flag)}`;
  const lines = wrap(title, lineWidth(screen)).map((line) => ink.grade(flag.grade, line));
  return screen.drawings ? [ink.faint(stick(flag.grade, screen)), ...lines] : lines;
}

function stick(grade: Grade, screen: Screen): string {
  const [wood, notch] = screen.unicode ? ['─', '┬'] : ['-', 'v'];
  const notches = `${wood}${notch}`.repeat(NOTCHES[grade]);
  return notches.padEnd(lineWidth(screen), wood);
}

function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}

/** "page 4, Table 2, line 143, in Results, row Obese, column OR (95% CI)". */
function whereInWords({ place, result }: Flag): string {
  const section = sectionName(place.section);
  const { row = '', column = '' } = result?.cell ?? {};
  return harmless([
    describePlace(place),
    ...(section === null ? [] : [`in ${section}`]),
    ...(row === '' ? [] : [`row ${row}`]),
    ...(column === '' ? [] : [`column ${column}`]),
  ].join(', '));
}

/** The rule's question, and the answer in one sentence. */
function asked(flag: Flag, rule: Rule | undefined, screen: Screen): readonly string[] {
  const { strong } = inkFor(screen.colours);
  return [
    ...indented(screen, harmless(rule?.question ?? flag.rule), { ink: strong }),
    ...indented(screen, harmless(sentence(flag.because))),
  ];
}

/** A clause as a sentence. "p = 0.03 …" and "0.72 …" begin as they are. */
function sentence(clause: string): string {
  const begun = /^\p{Ll}\p{L}/u.test(clause) ? capital(clause) : clause;
  return /[.?!]["”’)]?$/.test(begun) ? begun : `${begun}.`;
}

function quoted(flag: Flag, manuscript: Manuscript, screen: Screen): readonly string[] {
  return passagesOf(manuscript, flag).flatMap((passage, index) => [
    ...(index === 0 ? [] : alsoAt(manuscript, passage, screen)),
    ...quotation(manuscript, passage, {
      width: lineWidth(screen) - QUOTE_INDENT,
      quotes: screen.unicode ? ['“', '”'] : ['"', '"'],
      ellipsis: screen.unicode ? '…' : '...',
      underline: !screen.drawings ? '' : screen.unicode ? '‾' : '=',
      ink: inkFor(screen.colours),
    }).map((line) => ' '.repeat(QUOTE_INDENT) + line),
  ]);
}

const QUOTE_INDENT = 5;

function alsoAt(
  manuscript: Manuscript, { span, marks: [mark] }: Passage, screen: Screen,
): readonly string[] {
  const place = describePlace(placeOf(manuscript, mark ?? span));
  return ['', ...indented(screen, `and ${harmless(place)}:`)];
}

/** What is printed and what was recomputed, each in words and, below them, drawn. */
function numbers(flag: Flag, manuscript: Manuscript, screen: Screen): readonly string[] {
  const drawing = drawingFor(flag, screen);
  const { printed, recomputed } = besideOf(flag, manuscript.text);
  const said = (label: string, words: string): readonly string[] =>
    labelledWords(screen, label, words === '' ? [] : [harmless(words)]);
  return [
    ...(screen.drawings ? [] : said('in question', markedWords(manuscript.text, flag))),
    ...said('printed', printed),
    ...body(screen, drawing?.printed),
    ...said('recomputed', recomputed),
    ...body(screen, drawing?.recomputed),
    ...body(screen, drawing?.scale),
    ...(drawing === undefined ? [] : legend(screen)),
  ];
}

function drawingFor(flag: Flag, screen: Screen): Drawing | undefined {
  if (!screen.drawings) return undefined;
  const width = Math.min(WIDEST_DRAWING, lineWidth(screen) - bodyIndent(screen));
  return drawingOf(flag, width, signsOf(screen));
}

const WIDEST_DRAWING = 60;

function signsOf({ unicode }: Screen): Signs {
  return unicode ? DRAWN : TYPED;
}

function body(screen: Screen, drawn: readonly string[] = []): readonly string[] {
  return drawn.map((line) => ' '.repeat(bodyIndent(screen)) + line);
}

function legend(screen: Screen): readonly string[] {
  return indented(screen, `log scale; at 1 (${signsOf(screen).one}) there is no difference`, {
    indent: bodyIndent(screen), ink: inkFor(screen.colours).faint,
  });
}

/**
 * What would clear the flag: all that fits these numbers in particular, or else
 * the likeliest of the rule's, and where the rule's others can be read.
 */
function explanations({ innocent, rule: id }: Flag, rule: Rule | undefined): readonly string[] {
  const general = rule?.innocent ?? [];
  const particular = innocent.filter((explanation) => !general.includes(explanation));
  const shown = particular.length > 0 ? particular : innocent.slice(0, 1);
  const more = general.filter((explanation) => !shown.includes(explanation)).length;
  return more === 0 ? shown : [...shown, `(${more} more: tallystick explain ${id})`];
}
