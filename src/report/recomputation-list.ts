import { harmless } from './harmless.ts';
import { inkFor } from './ink.ts';
import type { Recomputation, Worked, WorkedGroup } from './recomputation.ts';
import { bodyIndent, indented, labelledWords, lineWidth, type Screen } from './screen.ts';
import { workedInWords } from './worked-in-words.ts';
import { widthOf } from './wrap.ts';

/** The answers to all that was typed in, as a person reads them. */
export function recomputationList(all: readonly Recomputation[], screen: Screen): string {
  return all.map((one) => card(one, screen)).map((lines) => lines.join('\n')).join('\n\n')
    .concat('\n');
}

function card(one: Recomputation, screen: Screen): readonly string[] {
  const { strong } = inkFor(screen.colours);
  const said = (label: string, sentences: readonly string[]): readonly string[] =>
    labelledWords(screen, label, sentences.map(harmless));
  return parted([
    [
      ...indented(screen, harmless(one.understood), { indent: 0, ink: strong }),
      ...one.answer.flatMap((sentence) => indented(screen, harmless(sentence))),
    ],
    ...one.groups.map((group) => rows(group, screen)),
    said('working', one.working),
    said('perhaps', one.perhaps),
    said('bear in mind', one.reservations),
    said('to ask', one.comment === '' ? [] : [one.comment]),
    said('sources', one.sources),
  ]);
}

function parted(parts: readonly (readonly string[])[]): readonly string[] {
  return parts.filter((part) => part.length > 0)
    .flatMap((part, index) => (index === 0 ? part : ['', ...part]));
}

/** Below this many columns for names and values together, a value stands behind its colon. */
const ROOM_FOR_COLUMNS = 56;

/**
 * Values under a label, in two columns where there is room for them:
 *
 *     together     standard error   0.2081 to 0.2158, of the log
 *                  z                2.14 to 2.24
 */
function rows({ label, values }: WorkedGroup, screen: Screen): readonly string[] {
  const indent = bodyIndent(screen);
  const longest = Math.max(0, ...values.map(({ quantity }) => widthOf(quantity)));
  const column = longest + GAP;
  const wide = screen.drawings && lineWidth(screen) - indent >= ROOM_FOR_COLUMNS
    && column <= WIDEST_NAME;
  if (!wide) {
    const sentences = values.map((value) => `${value.quantity}: ${answerOf(value)}`);
    return labelledWords(screen, label, sentences.map(harmless));
  }
  const lines = values.flatMap((value) => {
    const hung = indented(screen, harmless(answerOf(value)), { indent: indent + column });
    const name = ' '.repeat(indent) + value.quantity.padEnd(column);
    return [name + (hung[0] ?? '').slice(indent + column), ...hung.slice(1)];
  });
  const [first = '', ...rest] = lines;
  const head = `   ${inkFor(screen.colours).faint(label)}`;
  if (indent <= 3 + label.length) return [head, ...lines];
  return [head + first.slice(3 + label.length), ...rest];
}

const GAP = 2;
const WIDEST_NAME = 34;

function answerOf(worked: Worked): string {
  const { method, note } = worked;
  return [workedInWords(worked), method, note]
    .filter((part) => part !== undefined && part !== '').join(', ');
}
