import type { TextLine } from './text-line.ts';

/** The type in which most of the document is set, by which headings and notes are told. */
export interface BodyType {
  readonly size: number;
  readonly font: string;
  /** From one baseline to the next within a paragraph, in ems. */
  readonly leading: number;
}

/** Finds the type of most characters, and its usual distance between lines. */
export function bodyTypeOf(lines: readonly TextLine[]): BodyType {
  const size = heaviest(lines, (line) => Math.round(line.size * 4) / 4) ?? 10;
  const body = lines.filter((line) => Math.abs(line.size - size) <= 0.15);
  const font = heaviest(body, (line) => line.font) ?? '';
  return { size, font, leading: leadingOf(body) };
}

function heaviest<Key>(
  lines: readonly TextLine[],
  keyOf: (line: TextLine) => Key,
): Key | undefined {
  const weights = new Map<Key, number>();
  for (const line of lines)
    weights.set(keyOf(line), (weights.get(keyOf(line)) ?? 0) + line.words.length);
  return [...weights].sort((a, b) => b[1] - a[1])[0]?.[0];
}

/** The median step between neighbouring lines of one column, in ems. */
export function leadingOf(lines: readonly TextLine[]): number {
  const steps = lines
    .slice(1)
    .flatMap((line, i) => {
      const before = lines[i] as TextLine;
      const step = (line.baseline - before.baseline) / line.size;
      return line.column === before.column && step > 0.7 && step < 4 ? [step] : [];
    })
    .sort((a, b) => a - b);
  return steps[steps.length >> 1] ?? 1.2;
}
