import { describePlace, type Flag, type Manuscript, quote, type Span } from '../model/index.ts';
import type { FlagJson, PlaceJson } from './json-contract.ts';
import { tableJson } from './result-json.ts';
import { sectionName } from './section-name.ts';

/** A flag as the contract has it. */
export function flagJson({ text }: Manuscript, flag: Flag): FlagJson {
  return {
    rule: flag.rule,
    grade: flag.grade,
    place: placeJson(flag),
    quote: quote(text, flag.span),
    printed: flag.marks.map((mark) => asPrinted(text, mark, flag)),
    recomputed: recomputedJson(flag),
    working: flag.working,
    innocent: flag.innocent,
    comment: flag.comment,
  };
}

function placeJson({ place, result }: Flag): PlaceJson {
  const label = place.table === undefined || place.table.label === '' ? null : place.table.label;
  return {
    words: describePlace(place),
    section: sectionName(place.section),
    page: place.page ?? null,
    line: place.line ?? null,
    table: (result === undefined ? null : tableJson(result))
      ?? (place.table === undefined ? null : { label, row: null, column: null }),
  };
}

/** A marked number in plain notation, marked words as they stand. */
function asPrinted(text: string, mark: Span, { result }: Flag): string {
  const { estimate, interval, p } = result ?? {};
  const number = [estimate, interval?.lower, interval?.upper, p?.printed]
    .find((candidate) => candidate?.span.start === mark.start && candidate.span.end === mark.end);
  return number?.plain ?? quote(text, mark);
}

function recomputedJson({ recomputed }: Flag): FlagJson['recomputed'] {
  if (recomputed === undefined) return null;
  const { quantity, range: { low, high } } = recomputed;
  return { quantity, low: finiteOrNull(low), high: finiteOrNull(high) };
}

function finiteOrNull(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}
