import type { Definitions } from '../definitions.ts';
import type { Token } from '../token.ts';
import { readIntervalLabel } from './interval-label.ts';
import type { Item, OtherItem, Recognised } from './item.ts';
import { readName } from './name.ts';
import { readPValue } from './p-value.ts';

/**
 * Tells, in one pass over a block's tokens, numbers from what names them:
 * names of quantities, announcements of intervals, p-values, and the rest.
 */
export function readItems(
  text: string,
  tokens: readonly Token[],
  definitions: Definitions,
): readonly Item[] {
  const items: Item[] = [];
  let at = 0;
  while (at < tokens.length) {
    const { item, end } = readItem(text, tokens, at, definitions);
    items.push(item);
    at = end;
  }
  return items;
}

function readItem(
  text: string,
  tokens: readonly Token[],
  at: number,
  definitions: Definitions,
): Recognised<Item> {
  const token = tokens[at] as Token;
  if (token.kind === 'number') {
    return readIntervalLabel(text, tokens, at) ?? { item: asNumber(tokens, at), end: at + 1 };
  }
  if (token.kind !== 'word') return { item: token as OtherItem, end: at + 1 };
  return readPValue(tokens, at)
    ?? readIntervalLabel(text, tokens, at)
    ?? readName(text, tokens, at, definitions)
    ?? { item: token as OtherItem, end: at + 1 };
}

function asNumber(tokens: readonly Token[], at: number): Item {
  const { span, spaced, printed, glued } = tokens[at] as Token;
  if (printed === undefined) throw new Error('a number token without its number');
  const attached = glued || isHyphenated(tokens, at);
  return { kind: 'number', span, spaced, printed, attached };
}

// 5-year   IL-6   but not: 0.72-0.90   or: HR - 0.72   or: 1.7-fold
function isHyphenated(tokens: readonly Token[], at: number): boolean {
  const { spaced } = tokens[at] as Token;
  const [before, dash, next, after] = [tokens[at - 2], tokens[at - 1], tokens[at + 1], tokens[at + 2]];
  if (dash?.kind === 'dash' && !spaced && !dash.spaced && before?.kind === 'word') return true;
  const isCompound = next?.kind === 'dash' && !next.spaced && after?.kind === 'word' && !after.spaced;
  return isCompound && after.word !== 'fold';
}
