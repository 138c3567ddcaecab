import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { extract } from '../src/extract/index.ts';
import type { RatioResult, Result } from '../src/model/index.ts';
import { readManuscript, readText } from '../src/read/index.ts';

/*
 * What is read, held against results read by hand from real abstracts and tables, and PDFs
 * against the XML of the same articles. The material stays outside the project; where it is
 * not beside it, these tests are skipped and say so.
 */

const MATERIAL = '../shared';
const HAS_MATERIAL = existsSync(`${MATERIAL}/gold`);
const NAME = HAS_MATERIAL ? 'against hand-read results' : `skipped: no hand-read results in ${MATERIAL}/gold`;

/** A ratio with an interval as the hand-reader wrote it, and what is compared of it. */
interface HandRead {
  readonly measure: string;
  readonly estimate: string | null;
  readonly lower: string | null;
  readonly upper: string | null;
  readonly level: number | null;
  readonly p: { readonly relation: string; readonly value: string } | null;
}

const RATIOS = new Set(['OR', 'HR', 'RR', 'IRR', 'PR', 'SMR', 'SIR', 'ratio', 'POR', 'DOR', 'ROR', 'GMR', 'SHR', 'csHR', 'RRR']);

interface Score {
  hand: number;
  found: number;
  extra: number;
  measure: number;
  level: number;
  p: number;
}

const linesOf = (file: string): readonly unknown[] =>
  readFileSync(`${MATERIAL}/gold/${file}`, 'utf8').trim().split('\n').map((line) => JSON.parse(line) as unknown);

const ratiosOf = (results: readonly Result[]): readonly RatioResult[] =>
  results.filter((result) => result.kind === 'ratio').filter(({ interval }) => interval !== undefined);

const plain = (text: string | null | undefined): string =>
  text === null || text === undefined ? '-' : String(Number(text.replace('·', '.').replace(',', '')) || text);

const handKey = ({ estimate, lower, upper }: HandRead): string => [estimate, lower, upper].map(plain).join(' ');

const resultKey = ({ estimate, interval }: RatioResult): string =>
  [estimate?.plain, interval?.lower.plain, interval?.upper.plain].map(plain).join(' ');

const pOf = (p: HandRead['p']): string => (p === null ? '-' : `${p.relation}${plain(p.value)}`);

function compare(score: Score, hand: readonly HandRead[], read: readonly RatioResult[]): void {
  const pool = new Map<string, RatioResult[]>();
  for (const result of read) pool.set(resultKey(result), [...(pool.get(resultKey(result)) ?? []), result]);
  for (const entry of hand) {
    score.hand++;
    const match = pool.get(handKey(entry))?.shift();
    if (match === undefined) continue;
    score.found++;
    if (match.measure === entry.measure) score.measure++;
    if (entry.level === null || match.interval?.level === Number(entry.level)) score.level++;
    const p = match.p === undefined ? null : { relation: match.p.relation, value: match.p.printed.plain };
    if (pOf(p) === pOf(entry.p)) score.p++;
  }
  score.extra += [...pool.values()].reduce((sum, rest) => sum + rest.length, 0);
}

const blank = (): Score => ({ hand: 0, found: 0, extra: 0, measure: 0, level: 0, p: 0 });

const shares = ({ hand, found, extra, measure, level, p }: Score) => ({
  recall: found / hand, precision: found / (found + extra), measure: measure / found, level: level / found, p: p / found,
});

const bytesOf = (path: string): Uint8Array => new Uint8Array(readFileSync(path));

const handRatios = (results: readonly HandRead[]): readonly HandRead[] =>
  results.filter(({ measure, lower, upper }) => RATIOS.has(measure) && lower !== null && upper !== null);

describe.skipIf(!HAS_MATERIAL)(NAME, () => {
  it('ratios with intervals in abstracts are found, and no others', async () => {
    const hand = linesOf('abstracts.gold.jsonl') as { id: string; results: HandRead[] }[];
    const texts = new Map((linesOf('abstracts.jsonl') as { id: string; text: string }[]).map(({ id, text }) => [id, text]));
    const score = blank();
    for (const { id, results } of hand) {
      const found = await extract(readText(texts.get(id) ?? '', id));
      compare(score, handRatios(results), ratiosOf(found.results));
    }
    const { recall, precision, measure, level, p } = shares(score);
    expect(recall).toBeGreaterThanOrEqual(0.98);
    expect(precision).toBeGreaterThanOrEqual(0.995);
    expect(Math.min(measure, p)).toBeGreaterThanOrEqual(0.98);
    expect(level).toBeGreaterThanOrEqual(0.99);
  });

  it('ratios with intervals in the tables of XML articles are found, and no others', async () => {
    const score = blank();
    for (const { id, results } of linesOf('tables.gold.jsonl') as { id: string; results: HandRead[] }[]) {
      const path = [`${MATERIAL}/corpus/jats/${id}.xml`, `${MATERIAL}/corpus/pairs/${id}.xml`].find(existsSync);
      const found = await extract(await readManuscript(bytesOf(path ?? ''), `${id}.xml`));
      compare(score, handRatios(results), ratiosOf(found.results).filter(({ cell }) => cell !== undefined));
    }
    const { recall, precision, measure } = shares(score);
    expect(recall).toBeGreaterThanOrEqual(0.97);
    expect(precision).toBeGreaterThanOrEqual(0.99);
    expect(measure).toBeGreaterThanOrEqual(0.98);
  });

  it('a PDF gives the results that its XML gives', async () => {
    const folder = `${MATERIAL}/corpus/pairs`;
    const score = blank();
    for (const file of readdirSync(folder).filter((name) => name.endsWith('.pdf'))) {
      const [fromXml, fromPdf] = await Promise.all([file.replace('.pdf', '.xml'), file].map(async (name) =>
        ratiosOf((await extract(await readManuscript(bytesOf(`${folder}/${name}`), name))).results)));
      // Where the XML has its tables as pictures alone, the PDF holds more.
      const hand = (fromXml ?? []).map((result): HandRead => ({
        measure: result.measure, estimate: result.estimate?.plain ?? null, level: null, p: null,
        lower: result.interval?.lower.plain ?? null, upper: result.interval?.upper.plain ?? null,
      }));
      compare(score, hand, fromPdf ?? []);
    }
    expect(shares(score).recall).toBeGreaterThanOrEqual(0.97);
    expect(shares(score).measure).toBeGreaterThanOrEqual(0.98);
  });
});
