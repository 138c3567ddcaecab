import { Lexer, type MarkedToken, type Token } from 'marked';
import type { Mark } from '../../model/index.ts';
import { formulaWords } from '../latex/read-latex.ts';
import { citation } from '../latex/numbering.ts';
import type { Inline, Look, Words } from '../told.ts';
import { withCharacters } from './entities.ts';

/** Numbers that are given to notes and references in the order in which they are called for. */
export interface Called {
  readonly notes: Map<string, number>;
  readonly references: Map<string, number>;
}

/** How words are set around a place. */
interface Setting {
  readonly mark?: Mark['kind'];
  readonly look?: Look;
}

/** Paragraphs are taken in pieces no longer than this: what they cost grows with its square. */
const LONGEST_PIECE = 2500;

/** The words of a stretch of Markdown that begins in line `line`. */
export function inlinesOf(source: string, line: number, called: Called): readonly Inline[] {
  const inlines: Inline[] = [];
  let at = line;
  for (const piece of pieces(source)) {
    inlines.push(...pieceInlines(piece, at, called));
    at += newlines(piece);
  }
  return inlines;
}

function pieces(source: string): readonly string[] {
  const found: string[] = [];
  for (let start = 0; start < source.length;) {
    const rest = source.length - start;
    const cut = rest <= LONGEST_PIECE ? -1 : source.lastIndexOf(' ', start + LONGEST_PIECE);
    const end = rest <= LONGEST_PIECE ? source.length : cut > start ? cut : start + LONGEST_PIECE;
    found.push(source.slice(start, end));
    start = end;
  }
  return found;
}

function newlines(text: string): number {
  let count = 0;
  for (let at = text.indexOf('\n'); at >= 0; at = text.indexOf('\n', at + 1)) count++;
  return count;
}

// $p < 0.05$   but not: $5 and $6
const FORMULA = /\$(?=\S)((?:[^$\\\n]|\\.){1,400}?)(?<!\s)\$(?!\d)/g;
const HOLD = '\ue000';

/** Formulas are held out of the reading of emphasis, which would take their signs for its own. */
function pieceInlines(piece: string, line: number, called: Called): readonly Inline[] {
  const formulas: string[] = [];
  const held = piece.replaceAll(HOLD, '').replace(FORMULA, (all, formula: string) => {
    if (!/[=<>\\^_]/.test(formula)) return all;
    formulas.push(formula);
    return HOLD;
  });
  const writer = { inlines: [] as Inline[], formulas, next: 0, line, called, raised: undefined };
  walk(Lexer.lexInline(held), writer);
  return writer.inlines;
}

interface Writer {
  readonly inlines: Inline[];
  readonly formulas: readonly string[];
  next: number;
  line: number;
  readonly called: Called;
  /** What a tag of the markup raised or lowered, until its end. */
  raised: Mark['kind'] | undefined;
}

interface Step {
  readonly token: Token;
  readonly setting: Setting;
}

/** Goes through the tokens from left to right without calling itself: they may lie deep. */
function walk(tokens: readonly Token[], writer: Writer): void {
  const steps: Step[] = tokens.map((token) => ({ token, setting: {} })).reverse();
  for (let step = steps.pop(); step !== undefined; step = steps.pop()) {
    const { token, setting } = step;
    const inner = innerSetting(token as MarkedToken, setting);
    const children = 'tokens' in token ? (token.tokens ?? []) : [];
    if (inner !== undefined && children.length > 0) {
      for (const child of [...children].reverse()) steps.push({ token: child, setting: inner });
    } else writeToken(token as MarkedToken, setting, writer);
  }
}

/** How the words inside a token are set; undefined where it has none inside. */
function innerSetting(token: MarkedToken, setting: Setting): Setting | undefined {
  switch (token.type) {
    case 'strong':
      return { ...setting, look: 'strong' };
    case 'em':
      return { ...setting, look: setting.look ?? 'emphasis' };
    case 'del':
      // ~2~ is lowered, ~~two~~ is struck out
      return token.raw.startsWith('~~') ? undefined : { ...setting, mark: 'subscript' };
    case 'link':
    case 'text':
      return setting;
    default:
      return undefined;
  }
}

const TAG = /^<(\/?)(sup|sub|br)\b/i;

function writeToken(token: MarkedToken, setting: Setting, writer: Writer): void {
  switch (token.type) {
    case 'br':
      writer.inlines.push({ kind: 'break' });
      writer.line++;
      break;
    case 'html':
      followTag(TAG.exec(token.raw), writer);
      break;
    case 'codespan':
      writeWords(token.text, setting, writer);
      break;
    case 'text':
    case 'escape':
      writeText(token.text, setting, writer);
      break;
    case 'link':
      writeText(token.text, setting, writer);
      break;
  }
}

function followTag(tag: RegExpExecArray | null, writer: Writer): void {
  if (tag === null) return;
  const name = (tag[2] as string).toLowerCase();
  if (name === 'br') writer.inlines.push({ kind: 'break' });
  else if (tag[1] === '/') writer.raised = undefined;
  else writer.raised = name === 'sup' ? 'superscript' : 'subscript';
}

// before.^1,2^      note[^a]      as known [@oak2011; @elm2014]      a held formula
//       ^^^^^           ^^^^               ^^^^^^^^^^^^^^^^^^^^
const SPECIAL = /\^([^\s^]{1,60})\^|\[\^([^\]\s]{1,80})\]|\[(-?@[^\]]{1,400})\]|\ue000/g;

function writeText(text: string, setting: Setting, writer: Writer): void {
  let end = 0;
  for (const found of text.matchAll(SPECIAL)) {
    writeWords(text.slice(end, found.index), setting, writer);
    end = found.index + found[0].length;
    const [, raised, note, references] = found;
    if (raised !== undefined) writeWords(raised, { ...setting, mark: 'superscript' }, writer);
    else if (note !== undefined) callNote(note, setting, writer);
    else if (references !== undefined) callReferences(references, setting, writer);
    else writeFormula(writer);
  }
  writeWords(text.slice(end), setting, writer);
}

function callNote(note: string, setting: Setting, writer: Writer): void {
  const { notes } = writer.called;
  const number = notes.get(note) ?? notes.size + 1;
  notes.set(note, number);
  writeWords(String(number), { ...setting, mark: 'superscript' }, writer);
}

function callReferences(words: string, setting: Setting, writer: Writer): void {
  const keys = [...words.matchAll(/@([\w:./-]+)/g)].map(([, key]) => key).join(',');
  const text = citation(keys, writer.called.references);
  writeWords(text, { ...setting, mark: 'superscript' }, writer);
}

function writeFormula(writer: Writer): void {
  const formula = writer.formulas[writer.next++];
  if (formula === undefined) return;
  for (const inline of formulaWords(formula)) {
    writer.inlines.push(inline.kind === 'words' ? { ...inline, line: writer.line } : inline);
  }
}

function writeWords(text: string, { mark, look }: Setting, writer: Writer): void {
  const raised = writer.raised ?? mark;
  for (const [i, part] of text.split('\n').entries()) {
    if (i > 0) writer.line++;
    const words: Words = {
      kind: 'words',
      text: i > 0 ? `\n${withCharacters(part)}` : withCharacters(part),
      line: writer.line,
      ...(raised === undefined ? {} : { mark: raised }),
      ...(look === undefined ? {} : { look }),
    };
    if (words.text !== '') writer.inlines.push(words);
  }
}
