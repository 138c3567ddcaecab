import {
  describePlace, type Examination, type Manuscript, placeOf, type Result,
} from '../model/index.ts';
import { harmless } from './harmless.ts';
import { inkFor } from './ink.ts';
import { countInWords, resultInWords } from './result-in-words.ts';
import { indented, type Screen } from './screen.ts';
import { noticeInWords } from './terminal.ts';
import { formInWords, resultsInWords } from './what-was-read.ts';

/** `extract` on a terminal: every result of a file in reading order, each with its place. */
export function resultsList({ manuscript, findings }: Examination, screen: Screen): string {
  const { strong } = inkFor(screen.colours);
  const lines = [
    ...indented(screen, harmless(manuscript.name), { indent: 0, ink: strong }),
    ...indented(screen, formInWords(manuscript)),
    ...indented(screen, resultsInWords(findings.results)),
    ...manuscript.notices.flatMap((notice) => indented(screen, noticeInWords(notice))),
    ...findings.results.flatMap((result) => entry(manuscript, result, screen)),
  ];
  return lines.map((line) => `${line}\n`).join('');
}

function entry(manuscript: Manuscript, result: Result, screen: Screen): readonly string[] {
  const { strong, faint } = inkFor(screen.colours);
  const about = aboutInWords(result);
  return [
    '',
    ...indented(screen, harmless(resultInWords(result)), { ink: strong }),
    ...indented(screen, placeInWords(manuscript, result), { indent: 6, ink: faint }),
    ...(about === '' ? [] : indented(screen, harmless(about), { indent: 6 })),
  ];
}

function placeInWords(manuscript: Manuscript, { span, cell }: Result): string {
  const { row = '', column = '' } = cell ?? {};
  return harmless([describePlace(placeOf(manuscript, span)), row, column]
    .filter((part) => part !== '').join(', '));
}

/** "adjusted; outcome: death; term: samphire; counts: 45 of 120; not printed here: level". */
function aboutInWords(result: Result): string {
  const { about, adjusted, counts, inferred, kind } = result;
  const named = (['outcome', 'term', 'comparison', 'unit'] as const).flatMap((part) =>
    (about[part] === undefined ? [] : [`${part}: ${about[part]}`]));
  return [
    ...(adjusted === undefined ? [] : [adjusted ? 'adjusted' : 'not adjusted']),
    ...named,
    ...(counts.length === 0 || kind === 'proportion' ? []
      : [`counts: ${counts.map(countInWords).join(', ')}`]),
    ...(inferred.length === 0 ? [] : [`taken from elsewhere: ${inferred.join(', ')}`]),
  ].join('; ');
}
