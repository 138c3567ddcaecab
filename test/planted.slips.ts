import { expect, test } from 'vitest';
import { randomStream } from './reported-row.ts';
import { type Slip, SLIP_KINDS, type SlipKind } from './slip-kinds.ts';
import {
  abstracts, agrees, altered, articles, examined, type Examined, hasMaterial, newFlags,
  ownManuscripts,
} from './slip-texts.ts';

/*
 * How many slips are found. Slips of many kinds are planted, one at a time, in texts whose
 * numbers agree; the whole path is run again, and a slip is found where a flag is raised that
 * was not there before. Beside it stands the share that the altered numbers betray at all:
 * `strict` where no Wald analysis gives them, `ring` where no usual method does. What neither
 * betrays can still be found from a copy elsewhere. The draws are seeded: every run prints
 * the same table.
 */

/** So many slips of each kind, at most; so many texts are tried for them. */
const MOST = { slips: 40, tries: 600, inArticles: 10 } as const;

interface Tally {
  planted: number;
  found: number;
  loud: number;
  strict: number;
  ring: number;
  /** Found among those that the ring betrays. */
  foundInRing: number;
  missed: string[];
  /** What was planted, so that nothing is planted twice. */
  readonly seen: Set<string>;
}

test('the share of planted slips that is found, by kind', async () => {
  const texts = [...await ownManuscripts(), ...await articles(4), ...await abstracts(4)];
  const agreeing = texts.filter((text) => text.origin === 'own manuscripts' || agrees(text));
  const tallies = new Map<SlipKind, Tally>();
  for (const [at, kind] of SLIP_KINDS.entries()) {
    tallies.set(kind, await tallyOf(kind, agreeing, randomStream(1000 + at)));
  }
  console.log([
    hasMaterial ? 'with the material folder' : 'without the material folder: own manuscripts alone',
    ...unaltered(texts),
    '',
    ...tableOf(tallies),
    ...missedOf(tallies),
  ].join('\n'));
  const planted = [...tallies.values()].filter((tally) => tally.planted > 0);
  expect(SLIP_KINDS.length).toBeGreaterThanOrEqual(25);
  expect(planted.length).toBeGreaterThanOrEqual(hasMaterial ? 25 : 12);
});

/** Plants one kind in texts that the draw picks, articles seldom, since they take long. */
async function tallyOf(
  kind: SlipKind,
  texts: readonly Examined[],
  random: () => number,
): Promise<Tally> {
  const tally: Tally = {
    planted: 0, found: 0, loud: 0, strict: 0, ring: 0, foundInRing: 0, missed: [], seen: new Set(),
  };
  const groups = [texts.filter(isLong), texts.filter((text) => !isLong(text))];
  for (let tries = 0, long = 0; tries < MOST.tries && tally.planted < MOST.slips; tries++) {
    const wantsLong = long < MOST.inArticles && tries % 3 === 0;
    const pool = kind.of === 'places' || wantsLong ? groups[0] : groups[1];
    const text = pool?.[Math.floor(random() * pool.length)];
    if (text === undefined) continue;
    const isPlanted = await plantIn(text, kind, random, tally);
    if (isPlanted && isLong(text)) long++;
    if (kind.of === 'places' && long >= 2 * MOST.inArticles) break;
  }
  return tally;
}

function isLong({ origin }: Examined): boolean {
  return origin !== 'abstracts';
}

async function plantIn(
  text: Examined,
  kind: SlipKind,
  random: () => number,
  tally: Tally,
): Promise<boolean> {
  const slip = kind.plant(text, random);
  const raw = slip && altered(text, slip);
  if (slip === undefined || raw === undefined || tally.seen.has(raw)) return false;
  tally.seen.add(raw);
  const raised = newFlags(text, await examined(text.name, text.origin, raw));
  const isFound = raised.length > 0;
  tally.planted++;
  tally.found += isFound ? 1 : 0;
  tally.loud += raised.some(({ grade }) => grade !== 'caution') ? 1 : 0;
  tally.strict += slip.strict ? 1 : 0;
  tally.ring += slip.ring ? 1 : 0;
  tally.foundInRing += slip.ring && isFound ? 1 : 0;
  if (slip.ring && !isFound) tally.missed.push(shown(text, slip));
  return true;
}

/** The altered words with what stands around them, for a reader of the misses. */
function shown({ name, reading }: Examined, slip: Slip): string {
  const { text } = reading.manuscript;
  const before = text.slice(Math.max(0, slip.span.start - 70), slip.span.start);
  const words = text.slice(slip.span.start, slip.span.end);
  const behind = text.slice(slip.span.end, slip.span.end + 50);
  return `${name}: ${before}[${words} → ${slip.instead}]${behind}`.replace(/\s+/g, ' ');
}

/** How many texts have flags as they are. */
function unaltered(texts: readonly Examined[]): readonly string[] {
  return (['own manuscripts', 'articles', 'abstracts'] as const).flatMap((origin) => {
    const own = texts.filter((text) => text.origin === origin);
    const share = (isCounted: (text: Examined) => boolean): string =>
      `${Math.round((100 * own.filter(isCounted).length) / own.length)}%`;
    return own.length === 0 ? [] : [
      `${own.length} ${origin} as they are: ${share(({ flags }) => flags.length > 0)} with a flag, `
        + `${share(({ flags }) => flags.some(({ grade }) => grade !== 'caution'))} with a `
        + 'contradiction or discrepancy',
    ];
  });
}

function tableOf(tallies: ReadonlyMap<SlipKind, Tally>): readonly string[] {
  const columns = ['planted', 'found', 'not as caution', 'strict', 'ring', 'found of ring'];
  const row = (name: string, cells: readonly string[]): string =>
    name.padEnd(40)
    + cells.map((cell, at) => cell.padStart((columns[at] ?? '').length + 2)).join('');
  return [row('', columns), ...[...tallies].map(([{ name }, tally]) => {
    const { planted, found, loud, strict, ring, foundInRing } = tally;
    const percent = (part: number, of = planted): string =>
      (of === 0 ? '–' : `${Math.round((100 * part) / of)}%`);
    return row(name, [`${planted}`, percent(found), percent(loud), percent(strict), percent(ring),
      percent(foundInRing, ring)]);
  })];
}

/** A few of those that the numbers betray and no rule tells. */
function missedOf(tallies: ReadonlyMap<SlipKind, Tally>): readonly string[] {
  const lines = [...tallies].flatMap(([{ name }, { missed }]) =>
    missed.slice(0, 3).map((line) => `${name} | ${line}`));
  const heading = 'betrayed and not told, up to three of each kind:';
  return lines.length === 0 ? [] : ['', heading, ...lines];
}
