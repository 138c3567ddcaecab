/** A line of the source with its number, from 1, and without its end. */
export interface SourceLine {
  readonly text: string;
  readonly number: number;
}

/** The lines of a source. */
export function linesOf(source: string): readonly SourceLine[] {
  return source.split(/\r\n|\n|\r/).map((text, i) => ({ text, number: i + 1 }));
}
