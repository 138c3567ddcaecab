import { Parser } from 'htmlparser2';
import type { Notice } from '../model/index.ts';

/** What is told of markup while it is read, element by element. */
export interface MarkupReader {
  readonly open: (tag: string, attributes: Readonly<Record<string, string>>) => void;
  readonly text: (text: string) => void;
  readonly close: (tag: string) => void;
}

/** Elements lie no deeper than this in any page; each step of the parser costs their depth. */
const DEEPEST = 2000;

/** Markup goes to the parser in parts, between which its depth is looked at. */
const PART = 16_384;

/**
 * Reads XML or HTML from its beginning to its end, and forgives what is not well
 * formed. Stops with a notice where elements lie deeper than any page's.
 */
export function readMarkup(
  source: string,
  language: 'xml' | 'html',
  reader: MarkupReader,
): readonly Notice[] {
  let depth = 0;
  const parser = new Parser(
    {
      onopentag: (tag, attributes) => {
        depth++;
        reader.open(tag, attributes);
      },
      ontext: (text) => reader.text(text),
      onclosetag: (tag) => {
        depth--;
        reader.close(tag);
      },
    },
    { xmlMode: language === 'xml', decodeEntities: true },
  );
  let at = 0;
  while (at < source.length && depth <= DEEPEST) {
    parser.write(source.slice(at, at + PART));
    at += PART;
  }
  parser.end();
  return at < source.length ? [{ message: TOO_DEEP }] : [];
}

const TOO_DEEP =
  'The elements of the file lie within each other deeper than in any page; ' +
  'only what stands before that was read.';
