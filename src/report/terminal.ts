import {
  describePlace, type Examination, type Notice, placeOf, type Rule, type Unjudged,
} from '../model/index.ts';
import { flagCard } from './flag-card.ts';
import { harmless } from './harmless.ts';
import { inkFor } from './ink.ts';
import { counted } from './numbers-in-words.ts';
import { indented, type Screen } from './screen.ts';
import { countGrades, gradesInWords } from './severity.ts';
import { checksInWords, formInWords, resultsInWords } from './what-was-read.ts';

/** What the terminal report needs beside the examination itself. */
export interface TerminalOptions {
  readonly screen: Screen;
  /** The rules that were put to the manuscript, for their questions. */
  readonly rules: readonly Rule[];
  /** True leaves only the flags: not what was read, nor what could not be judged. */
  readonly quiet: boolean;
}

/** The report on one file: what was read, what is flagged, what could not be judged. */
export function fileReport(examination: Examination, options: TerminalOptions): string {
  const { manuscript, checked } = examination;
  const { screen, quiet } = options;
  if (quiet && checked.flags.length === 0) return '';
  const name = indented(screen, harmless(manuscript.name), {
    indent: 0, ink: inkFor(screen.colours).strong,
  });
  const cards = checked.flags.flatMap((flag, index) =>
    ['', ...flagCard(flag, index + 1, { manuscript, ...options }, screen)]);
  const around = quiet ? [[], []] : [wasRead(examination, screen), unjudged(examination, options)];
  return lines([...name, ...(around[0] ?? []), ...cards, ...(around[1] ?? [])]);
}

/** What stands below the last file: totals where there were several, and how to take it all. */
export function closing(
  examinations: readonly Examination[], unread: number, { screen, quiet }: TerminalOptions,
): string {
  if (quiet) return '';
  const totals = examinations.length + unread > 1
    ? [...indented(screen, totalsInWords(examinations, unread), { indent: 0 }), ''] : [];
  if (examinations.length === 0) return '';
  return lines([...totals, ...CAUTIONS.flatMap((words) => indented(screen, words, { indent: 0 }))]);
}

/** The whole report on several files, as one text. */
export function terminalReport(
  examinations: readonly Examination[], options: TerminalOptions,
): string {
  const reports = examinations.map((examination) => fileReport(examination, options));
  return [...reports, closing(examinations, 0, options)].filter((text) => text !== '').join('\n');
}

const CAUTIONS = [
  'A flag is a question for the authors and says nothing about them. What is not flagged has not '
    + 'been shown to be right.',
  'This replaces no statistician, and nothing here is for clinical decisions.',
];

function lines(all: readonly string[]): string {
  return all.map((line) => `${line}\n`).join('');
}

function wasRead(examination: Examination, screen: Screen): readonly string[] {
  const { manuscript, findings, checked } = examination;
  return [
    formInWords(manuscript),
    resultsInWords(findings.results),
    checksInWords(checked),
    ...manuscript.notices.map(noticeInWords),
  ].flatMap((sentence) => (sentence === '' ? [] : indented(screen, sentence)));
}

/** A notice as a sentence: "Note, page 3: the page has no text." */
export function noticeInWords({ message, page }: Notice): string {
  return `Note${page === undefined ? '' : `, page ${page}`}: ${harmless(message)}`;
}

function totalsInWords(examinations: readonly Examination[], unread: number): string {
  const flags = examinations.flatMap(({ checked }) => checked.flags);
  const flagged = examinations.filter(({ checked }) => checked.flags.length > 0).length;
  const read = `${counted(examinations.length, 'file')} read`;
  const said = flags.length === 0 ? 'nothing flagged'
    : `${gradesInWords(countGrades(flags))} in ${counted(flagged, 'file')}`;
  const missing = unread === 0 ? '' : `; ${counted(unread, 'file')} could not be read`;
  return `All together: ${read}, ${said}${missing}.`;
}

const PLACES_SHOWN = 3;

/** For each question that was left open: how often, and the first few places with why. */
function unjudged(
  { manuscript, checked }: Examination, { screen, rules }: TerminalOptions,
): readonly string[] {
  if (checked.unjudged.length === 0) return [];
  const shown = [...byRule(checked.unjudged)].flatMap(([rule, cases]) => {
    const question = rules.find(({ id }) => id === rule)?.question ?? rule;
    const places = cases.slice(0, PLACES_SHOWN).map(({ span, because }) =>
      `${describePlace(placeOf(manuscript, span))}: ${harmless(because)}.`);
    const more = cases.length - places.length;
    return [
      ...indented(screen, question),
      ...[...places, ...(more > 0 ? [`and ${counted(more, 'more place')}.`] : [])]
        .flatMap((place) => indented(screen, place, { indent: 6 })),
    ];
  });
  return ['', ...indented(screen, 'Could not be judged', {
    indent: 0, ink: inkFor(screen.colours).strong,
  }), ...shown];
}

function byRule(all: readonly Unjudged[]): ReadonlyMap<string, readonly Unjudged[]> {
  const groups = new Map<string, Unjudged[]>();
  for (const one of all) {
    const group = groups.get(one.rule);
    if (group === undefined) groups.set(one.rule, [one]);
    else group.push(one);
  }
  return groups;
}
