import type { Notice } from '../../model/index.ts';

/** A character that a font's faulty table puts in place of another, and how to tell. */
interface Substitution {
  readonly stored: string;
  readonly meant: string;
  /** Where it must stand to be undone. */
  readonly pattern: RegExp;
  readonly fewest: number;
  /** Places that show the character to be meant as it is. */
  readonly honest?: RegExp;
}

const SUBSTITUTIONS: readonly Substitution[] = [
  // 0Æ150, 95% CI: 0Æ047–0Æ479
  //  ^              ^     ^
  { stored: 'Æ', meant: '·', pattern: /(?<=\d)Æ(?=\d)|(?<=[\s(<=>])Æ(?=\d)/g, fewest: 3 },
  // P ¼ 0.03      n ¼ 120
  //   ^             ^
  {
    stored: '¼',
    meant: '=',
    pattern: /(?<=[A-Za-z²)\]]\s?)¼(?=\s?[-–−]?[\d.·])/g,
    fewest: 2,
    honest: /\d¼|¼ (?:of|hour|mile)/,
  },
  // ðOR ¼ 1.5Þ
  // ^        ^
  {
    stored: 'ð',
    meant: '(',
    pattern: /ð(?=[^ðÞ\n]{1,80}Þ)/g,
    fewest: 2,
    honest: /[a-zæöáéíóúý]ð|ð[aiurt]/,
  },
  { stored: 'Þ', meant: ')', pattern: /(?<=[\w%.])Þ/g, fewest: 2, honest: /Þ[a-zæöáéíóúý]/ },
  // 1.06e1.12     0.58e0.90
  //     ^             ^
  { stored: 'e', meant: '–', pattern: /(?<=\d[.·]\d{1,4})e(?=\d{1,3}[.·]\d)/g, fewest: 2 },
  // aged ‡65 years
  //      ^
  {
    stored: '‡',
    meant: '≥',
    pattern: /(?<=[\s(])‡(?=\s?\d)/g,
    fewest: 2,
    honest: /[\d)]‡|‡\s?[A-Z]/,
  },
];

/** Text with a font's substitutions undone; every character stays where it was. */
export interface Restored {
  readonly text: string;
  readonly notices: readonly Notice[];
}

/**
 * Undoes characters that a document stores throughout in place of others. Each
 * stands for one character, so offsets are kept. One or two cases prove nothing
 * and are left alone.
 */
export function restore(text: string): Restored {
  let restored = text;
  const notices: Notice[] = [];
  for (const { stored, meant, pattern, fewest, honest } of SUBSTITUTIONS) {
    if (!restored.includes(stored) || honest?.test(restored)) continue;
    const count = restored.match(pattern)?.length ?? 0;
    if (count < fewest) continue;
    restored = restored.replace(pattern, meant);
    notices.push({ message: noticeOf(stored, meant, count) });
  }
  return { text: restored, notices };
}

function noticeOf(stored: string, meant: string, count: number): string {
  return `The file stores "${meant}" as "${stored}"; it was read as "${meant}" in ${count} places.`;
}
