import { indexAt, type Mark, type Relation, type Span } from '../model/index.ts';
import { CharacterClass, classAt, superscriptDigit } from './characters.ts';
import { type NumberStyle, scanNumber, startsNumber } from './number.ts';
import type { Token, TokenKind } from './token.ts';

const POINTS: NumberStyle = { decimalComma: false };

/**
 * Turns a stretch of text into tokens in one pass.
 *
 * Prose and table cells go through the same lexer. The text is only looked at:
 * every token's span, and every number's, gives back what was printed.
 *
 * ```
 * HR 0·72 (95% CI 0·58–0·90)
 * ^^ ^^^^ ^^^  ^^ ^^^^ ^^^^
 * ```
 *
 * A percent sign after a number becomes a property of the number; a stroke before
 * it is its sign unless it stands between two numbers. `marks` are the raised
 * and lowered marks of the manuscript, in order: their digits join no number.
 */
export function lex(
  text: string,
  span: Span,
  style: NumberStyle = POINTS,
  marks: readonly Mark[] = [],
): Token[] {
  const mark = Math.max(0, indexAt(marks, span.start));
  const scan: Scan = { text, end: span.end, style, marks, tokens: [], mark, spaced: true };
  let at = span.start;
  while (at < span.end) at = step(scan, at);
  return scan.tokens;
}

/** What the lexer knows while it goes over a stretch of text. */
interface Scan {
  readonly text: string;
  readonly end: number;
  readonly style: NumberStyle;
  readonly marks: readonly Mark[];
  readonly tokens: Token[];
  /** The first mark that does not end before the current place. */
  mark: number;
  spaced: boolean;
}

const PUNCTUATION = new Map<CharacterClass, TokenKind>([
  [CharacterClass.comma, 'comma'],
  [CharacterClass.semicolon, 'semicolon'],
  [CharacterClass.colon, 'colon'],
  [CharacterClass.open, 'open'],
  [CharacterClass.close, 'close'],
  [CharacterClass.percent, 'percent'],
  [CharacterClass.slash, 'slash'],
  [CharacterClass.plusMinus, 'plus-minus'],
  [CharacterClass.times, 'times'],
  [CharacterClass.stop, 'stop'],
  [CharacterClass.point, 'stop'],
  [CharacterClass.star, 'star'],
]);

/** Reads one token, or skips one character, and says where the next begins. */
function step(scan: Scan, at: number): number {
  const { text } = scan;
  switch (classAt(text, at)) {
    case CharacterClass.space:
    case CharacterClass.newline:
      scan.spaced = true;
      return at + 1;
    case CharacterClass.letter:
      return readEndless(scan, at) ?? readWord(scan, at);
    case CharacterClass.digit:
      return readNumber(scan, at, at);
    case CharacterClass.point:
      return isLeadingPoint(scan, at) ? readNumber(scan, at, at) : punctuate(scan, at);
    case CharacterClass.dash:
      return readDash(scan, at);
    case CharacterClass.relation:
      return readRelation(scan, at);
    case CharacterClass.stop:
      return isLostSpace(scan, at) ? at + 1 : punctuate(scan, at);
    case CharacterClass.other:
      return readOther(scan, at);
    default:
      return punctuate(scan, at);
  }
}

function push(
  scan: Scan,
  kind: TokenKind,
  start: number,
  end: number,
  word: string,
  relation?: Relation,
): number {
  const { spaced } = scan;
  const span = { start, end };
  scan.tokens.push({ kind, span, word, spaced, glued: false, printed: undefined, relation });
  scan.spaced = false;
  return end;
}

function last(scan: Scan, back = 1): Token | undefined {
  return scan.tokens[scan.tokens.length - back];
}

function punctuate(scan: Scan, at: number): number {
  const kind = PUNCTUATION.get(classAt(scan.text, at)) ?? 'other';
  return push(scan, kind, at, at + 1, scan.text[at] as string);
}

// ---- numbers

/** Abbreviations after which a number may follow without a space: "CI.99", "OR1.6". */
const INTRODUCES = new Set(
  'ci cl or hr rr p aor ahr arr ors hrs rrs cor chr irr pr ratio of at'.split(' '),
);

// CI.99-1.83   (.72)   but not: reported.5 Other   or: P<.001).5 Other
//   ^^^         ^^^
function isLeadingPoint(scan: Scan, at: number): boolean {
  if (!startsNumber(scan.text, at) || markAt(scan, at).limit <= at + 1) return false;
  if (at === 0 || scan.spaced) return true;
  const before = classAt(scan.text, at - 1);
  if (before === CharacterClass.close || before === CharacterClass.digit) return false;
  return before !== CharacterClass.letter || INTRODUCES.has(last(scan)?.word ?? '');
}

function readNumber(scan: Scan, start: number, digits: number): number {
  const { text, style } = scan;
  const previous = last(scan);
  const { limit, raised } = markAt(scan, digits);
  const introduced = previous?.kind === 'relation' || INTRODUCES.has(previous?.word ?? '');
  const barePower = previous?.relation !== undefined && last(scan, 2)?.word === 'p';
  const isSize = last(scan, 2)?.word === 'n' && previous?.relation === '=';
  const spacedThousands = previous?.kind === 'slash' || previous?.word === 'of' || isSize;
  const partner = last(scan, 2)?.printed;
  const isJoint = previous?.kind === 'comma' || previous?.kind === 'dash' || previous?.word === 'to';
  const stray = isJoint && partner?.decimals === 2 && !partner.percent && scan.spaced;
  const context = { text, limit, style, barePower, split: introduced, spacedThousands, stray };
  const number = scanNumber(context, start, digits);
  const { span } = number;
  const end = endWithPercent(text, span.end, scan.end);
  scan.tokens.push({
    kind: raised ? 'raised' : 'number',
    span,
    word: '',
    spaced: scan.spaced,
    glued: previous?.kind !== 'dash' && isGlued(text, start, span.end),
    printed: end > span.end ? { ...number, percent: true } : number,
    relation: undefined,
  });
  scan.spaced = false;
  return end;
}

const ENDLESS = /^(?:infinity|infinite|inf)(?![\p{L}.])/iu;

// 1.54 to infinity   0.00-∞
//         ^^^^^^^^        ^
function readEndless(scan: Scan, at: number): number | undefined {
  if (scan.text.charCodeAt(at) !== 0x69 || last(scan)?.kind === 'word' && last(scan)?.word !== 'to') {
    return undefined;
  }
  const word = ENDLESS.exec(scan.text.slice(at, at + 10))?.[0];
  return word === undefined ? undefined : pushEndless(scan, at, at + word.length);
}

function pushEndless(scan: Scan, start: number, end: number): number {
  const span = { start, end };
  const text = scan.text.slice(start, end);
  const printed = { text, plain: '∞', value: Infinity, decimals: 0, percent: false, span };
  const { spaced } = scan;
  scan.tokens.push({ kind: 'number', span, word: '', spaced, glued: false, printed, relation: undefined });
  scan.spaced = false;
  return end;
}

/** Where reading must stop because a raised mark begins, or whether it is one. */
function markAt(scan: Scan, at: number): { readonly limit: number; readonly raised: boolean } {
  const { marks } = scan;
  while (scan.mark < marks.length && (marks[scan.mark] as Mark).span.end <= at) scan.mark++;
  const mark = marks[scan.mark];
  if (mark === undefined || mark.span.start >= scan.end) return { limit: scan.end, raised: false };
  if (mark.span.start > at) return { limit: mark.span.start, raised: false };
  return { limit: Math.min(mark.span.end, scan.end), raised: true };
}

// 35.1%   35.1 %
//     ^        ^
function endWithPercent(text: string, at: number, limit: number): number {
  const next = classAt(text, at) === CharacterClass.space ? at + 1 : at;
  return next < limit && classAt(text, next) === CharacterClass.percent ? next + 1 : at;
}

// IL6   10mg   but not: 1.59a (a mark)   or: OR1.59 (see INTRODUCES)
function isGlued(text: string, start: number, end: number): boolean {
  if (start > 0 && classAt(text, start - 1) === CharacterClass.letter) return true;
  const isLetter = (at: number) => classAt(text, at) === CharacterClass.letter;
  return isLetter(end) && isLetter(end + 1);
}

// ---- dashes, relations and the rest

const SIGNS = '-−–‐‑﹣－⁻';

function readDash(scan: Scan, at: number): number {
  const { text } = scan;
  if (isSign(scan, at)) return readNumber(scan, at, at + 1);
  const doubled = text[at] === '-' && text[at + 1] === '-';
  return push(scan, 'dash', at, doubled ? at + 2 : at + 1, text[at] as string);
}

// CI -162.7, 86.8   (−0.5; 0.3)   -0.5 - -0.1   but not: 0.5 -0.9   or: IL-6
//    ^               ^            ^      ^
function isSign(scan: Scan, at: number): boolean {
  if (!SIGNS.includes(scan.text[at] as string) || !startsNumber(scan.text, at + 1)) return false;
  if (markAt(scan, at).limit <= at + 1) return false;
  const previous = last(scan);
  switch (previous?.kind) {
    case 'number':
      return false;
    case 'dash':
      return scan.spaced || previous.span.end === at;
    case 'word':
    case 'close':
    case 'raised':
    case 'stop':
      return scan.spaced;
    default:
      return true;
  }
}

const RELATIONS: Readonly<Record<string, Relation>> = {
  '=': '=', '＝': '=', '≈': '=', '≅': '=',
  '<': '<', '‹': '<', '＜': '<',
  '>': '>', '›': '>', '＞': '>',
  '≤': '<=', '≦': '<=', '⩽': '<=',
  '≥': '>=', '≧': '>=', '⩾': '>=',
};

// <   <=   =<   < or =   ≤
function readRelation(scan: Scan, at: number): number {
  const { text } = scan;
  const first = RELATIONS[text[at] as string] ?? '=';
  const more = /^(\s*)(or\s*(?:=|equal to)|[=<>≤≥‹›])/.exec(text.slice(at + 1, at + 16));
  if (more === null) return push(scan, 'relation', at, at + 1, text[at] as string, first);
  const end = at + 1 + more[0].length;
  const second = more[2] as string;
  // "P = < 0.01" and "p=‹0.01" say "less than"; "=<" without a space says "at most".
  const isFont = second === '‹' || second === '›';
  const replaced = (more[1] !== '' || isFont) && first === '=' ? RELATIONS[second] : undefined;
  return push(scan, 'relation', at, end, text[at] as string, replaced ?? combine(first, second));
}

function combine(first: Relation, second: string): Relation {
  if (first === '<' || second === '<') return '<=';
  if (first === '>' || second === '>') return '>=';
  return first;
}

/** A question mark beside a relation stands for a space that was lost: `p?=?0.04`. */
function isLostSpace(scan: Scan, at: number): boolean {
  if (scan.text[at] !== '?') return false;
  const isRelation = (place: number) => classAt(scan.text, place) === CharacterClass.relation;
  return isRelation(at + 1) || (at > 0 && isRelation(at - 1));
}

/** An escaped relation, a raised digit, or a character with no part in numbers. */
function readOther(scan: Scan, at: number): number {
  const { text } = scan;
  const escaped = /^&(lt|gt|le|ge|#8804|#8805);/.exec(text.slice(at, at + 7))?.[1];
  if (escaped !== undefined) {
    const relation: Relation = escaped === 'lt' ? '<' : escaped === 'gt' ? '>' : '<=';
    return push(scan, 'relation', at, at + escaped.length + 2, '<', relation);
  }
  // 1.15¡X11.25: what an en dash becomes in a text that passed through Big5.
  if (text[at] === '¡' && /[XV]/.test(text[at + 1] ?? '')) return push(scan, 'dash', at, at + 2, '–');
  let end = at;
  while (end < scan.end && superscriptDigit(text.charCodeAt(end)) >= 0) end++;
  if (end > at) return push(scan, 'raised', at, end, text.slice(at, end));
  if (text[at] === '∞') return pushEndless(scan, at, at + 1);
  return push(scan, 'other', at, at + 1, text[at] as string);
}

// ---- words

/** First halves of compounds that keep their hyphen when a line breaks behind it. */
const COMPOUND = new Set(
  ('odds hazard hazards risk rate prevalence confidence one two non self cause sub p half '
    + 'age sex well long short high low follow').split(' '),
);

function readWord(scan: Scan, at: number): number {
  const { text } = scan;
  let end = endOfLetters(text, at, scan.end);
  let word = fold(text.slice(at, end));
  const rest = COMPOUND.has(word) ? undefined : restOfBrokenWord(text, end, scan.end);
  if (rest !== undefined) {
    word += fold(text.slice(rest.start, rest.end));
    end = rest.end;
  }
  push(scan, 'word', at, end, word);
  if (word === 'percent' || word === 'cent') return markPercent(scan, word, end);
  return end;
}

function endOfLetters(text: string, at: number, limit: number): number {
  let end = at;
  for (; end < limit; end++) {
    const kind = classAt(text, end);
    if (kind === CharacterClass.letter) continue;
    const inner = kind === CharacterClass.softHyphen || text[end] === "'" || text[end] === '’';
    if (!inner || classAt(text, end + 1) !== CharacterClass.letter) break;
  }
  return end;
}

// haz-⏎ard ratio
//    ^^
function restOfBrokenWord(text: string, at: number, limit: number): Span | undefined {
  const kind = classAt(text, at);
  if (kind !== CharacterClass.dash && kind !== CharacterClass.softHyphen) return undefined;
  let next = at + 1;
  while (next < limit && text[next] === ' ') next++;
  if (classAt(text, next) !== CharacterClass.newline) return undefined;
  while (next < limit && classAt(text, next) !== CharacterClass.letter) {
    const blank = classAt(text, next);
    if (blank !== CharacterClass.newline && blank !== CharacterClass.space) return undefined;
    next++;
  }
  const end = endOfLetters(text, next, limit);
  const lowerCase = text[next] === text[next]?.toLowerCase();
  return end > next && lowerCase ? { start: next, end } : undefined;
}

const PLAIN = /^[a-z]+$/;

/** Words already folded: prose repeats itself, and most words need no second look. */
const FOLDED = new Map<string, string>();

/** The cache is emptied when it holds so many words. */
const MOST_FOLDED = 20_000;

/** The word as it is looked up: ligatures undone, soft hyphens dropped, in lower case. */
function fold(word: string): string {
  const known = FOLDED.get(word);
  if (known !== undefined) return known;
  const lower = word.toLowerCase();
  const folded = PLAIN.test(lower)
    ? lower
    : lower.normalize('NFKC').replaceAll('\u00ad', '').toLowerCase();
  if (FOLDED.size >= MOST_FOLDED) FOLDED.clear();
  if (word.length <= 40) FOLDED.set(word, folded);
  return folded;
}

/** "37 per cent" says of the number what "37%" says. */
function markPercent(scan: Scan, word: string, end: number): number {
  const back = word === 'percent' ? 2 : 3;
  if (word === 'cent' && last(scan, 2)?.word !== 'per') return end;
  const index = scan.tokens.length - back;
  const number = scan.tokens[index];
  if (number?.printed === undefined) return end;
  scan.tokens[index] = { ...number, printed: { ...number.printed, percent: true } };
  scan.tokens.length = index + 1;
  return end;
}
