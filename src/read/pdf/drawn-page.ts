import type { PDFPageProxy } from 'pdfjs-dist';
import { intoFrame, type DrawnPage, type Frame, type Run, type Side } from './run.ts';

/** What this module needs of pdf.js's text items. */
interface Item {
  readonly str: string;
  readonly width: number;
  readonly transform: readonly number[];
  readonly fontName: string;
}

/** More items than any honest page draws; beyond them a page is given up. */
const MOST_ITEMS = 50_000;

/** Reads what is drawn on a page: runs of characters with their places, by direction. */
export async function drawnPage(page: PDFPageProxy, number: number): Promise<DrawnPage> {
  const view = page.getViewport({ scale: 1 });
  const content = await page.getTextContent();
  if (content.items.length > MOST_ITEMS) throw new Error(`${content.items.length} text items`);
  const sides: Run[][] = [[], [], [], []];
  let spaced = true;
  for (const [order, item] of content.items.entries()) {
    if (!('str' in item)) continue;
    if (item.str.trim() === '') {
      spaced = true;
      continue;
    }
    const placed = place(item as Item, view.transform as readonly number[], order, spaced);
    if (placed !== undefined) sides[placed.turns]?.push(placed.run);
    spaced = /\s$/.test(item.str);
  }
  return { number, width: view.width, height: view.height, sides: inOrder(sides) };
}

function inOrder(sides: readonly (readonly Run[])[]): readonly Side[] {
  const length = ({ runs }: Side): number => runs.reduce((sum, { text }) => sum + text.length, 0);
  return sides
    .map((runs, turns) => ({ frame: { turns } as Frame, runs: withoutDoubles(runs) }))
    .filter(({ runs }) => runs.length > 0)
    .sort((a, b) => length(b) - length(a));
}

/** Slanted text (a watermark across the page) has no frame and is left out. */
const SLANT = 0.05;

function place(
  item: Item,
  view: readonly number[],
  order: number,
  spaced: boolean,
): { readonly turns: Frame['turns']; readonly run: Run } | undefined {
  const [a, b, c, d, x, y] = product(view, item.transform);
  const size = Math.hypot(c, d);
  const quarter = Math.atan2(b, a) / (Math.PI / 2);
  const turns = ((Math.round(quarter) + 4) % 4) as Frame['turns'];
  if (!(size > 0.5) || Math.abs(quarter - Math.round(quarter)) > SLANT) return undefined;
  const { u, v } = intoFrame({ turns }, x, y);
  const text = item.str.trim();
  const startsSpaced = spaced || /^\s/.test(item.str);
  const run = { text, left: u, right: u + item.width, baseline: v, size, font: item.fontName };
  return { turns, run: { ...run, spaced: startsSpaced, order } };
}

type Matrix = readonly [number, number, number, number, number, number];

function product(m: readonly number[], n: readonly number[]): Matrix {
  const [a = 1, b = 0, c = 0, d = 1, e = 0, f = 0] = m;
  const [p = 1, q = 0, r = 0, s = 1, t = 0, u = 0] = n;
  return [
    a * p + c * q,
    b * p + d * q,
    a * r + c * s,
    b * r + d * s,
    a * t + c * u + e,
    b * t + d * u + f,
  ];
}

/** Words printed twice over themselves, to look bold, are one. */
function withoutDoubles(runs: readonly Run[]): readonly Run[] {
  const seen = new Map<string, Run>();
  return runs.filter((run) => {
    const key = `${run.text} ${Math.round(run.left / 2)} ${Math.round(run.baseline / 2)}`;
    const twin = seen.get(key);
    seen.set(key, run);
    return twin === undefined || Math.abs(twin.size - run.size) > 0.5;
  });
}
