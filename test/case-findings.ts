import {
  contains,
  cover,
  type Placed,
  quote,
  type Reading,
  type Result,
  type Span,
} from '../src/model/index.ts';
import type { Found, Sense } from './case-file.ts';
import { asidesOfResult, partOfClaim, partsOfCount, partsOfResult } from './what-was-read.ts';

/*
 * Holds the lines of a case that tell what is read, counted and heard against what
 * was found in its text.
 */

/** Something found, by where its numbers stand, in the parts of a case file. */
export interface Heard extends Placed {
  readonly parts: readonly string[];
  readonly asides: readonly string[];
}

/** Everything that one of the verbs of reading can speak of. */
export function foundBy(sense: Sense, { findings }: Reading): readonly Heard[] {
  const { results, counts, claims } = findings;
  if (sense === 'counts') {
    return counts.map((count) => ({ span: count.span, parts: partsOfCount(count), asides: [] }));
  }
  return results.map((result) => ({
    span: numbersOf(result),
    parts:
      sense === 'reads'
        ? partsOfResult(result)
        : claims
            .filter((claim) => claim.of === result)
            .map(partOfClaim)
            .filter((part) => part !== ''),
    asides: sense === 'reads' ? asidesOfResult(result) : [],
  }));
}

/** Where the estimate and the limits of a result stand. */
function numbersOf({ estimate, interval, span }: Result): Span {
  const [first, ...others] = [estimate?.span, interval?.lower.span, interval?.upper.span].flatMap(
    (part) => part ?? [],
  );
  return first === undefined ? span : cover(first, ...others);
}

/** What is amiss with a line on reading: nothing, or one sentence. */
export function failureOfFinding({ sense, words, as }: Found, reading: Reading): readonly string[] {
  const places = placesOf(words, reading.manuscript.text);
  const [place] = places;
  if (place === undefined || places.length > 1) {
    return [`"${words}" stands ${places.length} times in the text`];
  }
  const heard = foundBy(sense, reading).filter(({ span }) => contains(place, span));
  if (as.length === 0 && heard.every(({ parts }) => parts.length === 0)) return [];
  if (heard.length !== 1 && as.length > 0) return [`${sense} ${heard.length} things in "${words}"`];
  return heard.some((one) => as.length > 0 && isSaid(as, one))
    ? []
    : [`${sense} "${words}" as ${heard.map(inWords).join(' and ')}`];
}

/** All parts must be listed, and nothing else but asides that are known. */
function isSaid(as: readonly string[], { parts, asides }: Heard): boolean {
  const listed = as.filter((part) => !asides.includes(part));
  return listed.length === parts.length && parts.every((part) => listed.includes(part));
}

/** The parts and asides of something found, in one line. */
export function inWords({ parts, asides }: Heard): string {
  return [...parts, ...asides].join(', ');
}

/** Ratios and counts that were found and that no line lists, in a file that lists them. */
export function unlisted(
  found: readonly Found[],
  senses: ReadonlySet<Sense>,
  reading: Reading,
): readonly string[] {
  const ratios = reading.findings.results.filter(({ kind }) => kind === 'ratio').map(numbersOf);
  const spans = {
    reads: senses.has('reads') ? ratios : [],
    counts: senses.has('counts') ? reading.findings.counts.map(({ span }) => span) : [],
  };
  return (['reads', 'counts'] as const).flatMap((sense) =>
    spans[sense]
      .filter(
        (span) =>
          !found.some(
            (one) =>
              one.sense === sense
              && placesOf(one.words, reading.manuscript.text).some((place) =>
                contains(place, span),
              ),
          ),
      )
      .map((span) => `not listed: ${sense} "${quote(reading.manuscript.text, span)}"`),
  );
}

/** Everywhere the words stand in the text; a line may break between two of them. */
export function placesOf(words: string, text: string): readonly Span[] {
  const pattern = words.split(/\s+/).map((word) => word.replace(/[\\^$.*+?()[\]{}|]/g, '\\$&'));
  return [...text.matchAll(new RegExp(pattern.join('\\s+'), 'g'))].map((match) => ({
    start: match.index,
    end: match.index + match[0].length,
  }));
}
