import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { rules } from '../rules/index.ts';
import { check } from '../src/check/index.ts';
import { extract } from '../src/extract/index.ts';
import type { Flag, Reading, Span } from '../src/model/index.ts';
import { readManuscript } from '../src/read/index.ts';

/*
 * Texts for planting slips: real abstracts and articles of the material folder, if present,
 * and the invented manuscripts of this repository. An alteration is made in what
 * stands in the file, and the whole path is run again.
 */

/** Where a text is from. */
export type Origin = 'abstracts' | 'articles' | 'own manuscripts';

/** A text as it lies in its file, with what is found in it and said of it. */
export interface Examined {
  readonly name: string;
  readonly origin: Origin;
  readonly raw: string;
  readonly reading: Reading;
  readonly flags: readonly Flag[];
}

const OWN = resolve(import.meta.dirname, '../fixtures/manuscripts');
const MATERIAL = resolve(import.meta.dirname, '../../shared/corpus');

/** Whether the material folder is there. */
export const hasMaterial = existsSync(MATERIAL);

/** Reads a text and puts every rule to it. */
export async function examined(name: string, origin: Origin, raw: string): Promise<Examined> {
  const manuscript = await readManuscript(new TextEncoder().encode(raw), name);
  const reading = { manuscript, findings: await extract(manuscript) };
  return { name, origin, raw, reading, flags: check(manuscript, reading.findings, rules).flags };
}

/** The invented manuscripts, whose own slips are listed beside them. */
export async function ownManuscripts(): Promise<readonly Examined[]> {
  const names = readdirSync(OWN)
    .filter((name) => existsSync(join(OWN, name, 'manuscript.txt'))).sort();
  return Promise.all(names.map((name) => examined(
    `${name}.txt`, 'own manuscripts', readFileSync(join(OWN, name, 'manuscript.txt'), 'utf8'),
  )));
}

/** Every so many of the real abstracts. */
export async function abstracts(step: number): Promise<readonly Examined[]> {
  if (!hasMaterial) return [];
  const lines = readFileSync(join(MATERIAL, 'abstracts.jsonl'), 'utf8').split('\n').filter(Boolean);
  const found: Examined[] = [];
  for (let at = 0; at < lines.length; at += step) {
    const { id, text } = JSON.parse(lines[at] as string) as Record<'id' | 'text', string>;
    found.push(await examined(`${id.replace(/\W/g, '-')}.txt`, 'abstracts', text));
  }
  return found;
}

/** Every so many of the real articles. */
export async function articles(step: number): Promise<readonly Examined[]> {
  if (!hasMaterial) return [];
  const folder = join(MATERIAL, 'jats');
  const names = readdirSync(folder).filter((name) => name.endsWith('.xml')).sort()
    .filter((_, at) => at % step === 0);
  const found: Examined[] = [];
  for (const name of names) {
    found.push(await examined(name, 'articles', readFileSync(join(folder, name), 'utf8')));
  }
  return found;
}

/** Whether the numbers of a text agree, so that a slip planted in it is the only one. */
export function agrees({ flags, reading }: Examined): boolean {
  return reading.findings.results.length > 0 && flags.every(({ grade }) => grade === 'caution');
}

/** Other words for a stretch of the text. */
export interface Alteration {
  readonly span: Span;
  readonly instead: string;
}

/** How much of the text around an alteration is looked for in the file, at most. */
const WIDEST = 40;

/**
 * The file with the alteration made, or nothing where its place in the file is not plain:
 * the words, with as many around them as it takes, must stand there once.
 */
export function altered(
  { raw, reading }: Examined,
  { span, instead }: Alteration,
): string | undefined {
  const { text } = reading.manuscript;
  for (let wide = 0; wide <= WIDEST; wide += 4) {
    const before = escaped(raw, text.slice(Math.max(0, span.start - wide), span.start));
    const words = escaped(raw, text.slice(span.start, span.end));
    const behind = escaped(raw, text.slice(span.end, span.end + wide));
    const at = raw.indexOf(before + words + behind);
    if (at < 0) return undefined;
    if (raw.indexOf(before + words + behind, at + 1) >= 0) continue;
    const start = at + before.length;
    return raw.slice(0, start) + escaped(raw, instead) + raw.slice(start + words.length);
  }
  return undefined;
}

/** Words as a file of XML writes them. */
function escaped(raw: string, words: string): string {
  if (!raw.trimStart().startsWith('<')) return words;
  return words.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;');
}

/** The flags that are raised after the alteration and were not before. */
export function newFlags(before: Examined, after: Examined): readonly Flag[] {
  const known = new Set(before.flags.map(({ rule, because }) => `${rule}: ${because}`));
  return after.flags.filter(({ rule, because }) => !known.has(`${rule}: ${because}`));
}
