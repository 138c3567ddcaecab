import { existsSync, readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { type Examination, examine } from '../src/index.ts';
import { type Manuscript, placeOf, type Printed, type Result } from '../src/model/index.ts';
import { expectWellFormed } from './read-invariants.ts';

/*
 * The same manuscript in every form must give the same results and the same
 * flags. The plain text, in which nothing is to be recovered, is the measure.
 */

const FIXTURES = new URL('../fixtures/manuscripts/', import.meta.url);
const NAMES = ['ferry-cohort', 'granary-case-control', 'tarvicine-trial'] as const;
const FORMS = [
  'manuscript.docx', 'manuscript.html', 'manuscript.tex', 'manuscript.md', 'manuscript.xml',
  'latex.pdf', 'office.pdf', 'browser.pdf',
] as const;

async function examined(name: string, form: string): Promise<Examination> {
  const own = `${name}/${form}`;
  const path = existsSync(new URL(own, FIXTURES)) ? own : `${name}.pdf`;
  return examine(readFileSync(new URL(path, FIXTURES)), path.slice(path.lastIndexOf('/') + 1));
}

const plain = (printed: Printed | undefined): string => printed?.plain ?? '–';

/** A result by its numbers and place: "ratio OR 1.59 (1.05 to 2.41) 95% p = 0.03 in results". */
function numbersOf(result: Result, manuscript: Manuscript): string {
  const { kind, interval, p, cell, span } = result;
  const measure = 'measure' in result ? result.measure : kind === 'test' ? result.statistic : '';
  const estimate = 'estimate' in result ? result.estimate : undefined;
  const limits = `(${plain(interval?.lower)} to ${plain(interval?.upper)}) ${interval?.level ?? '–'}%`;
  const value = p === undefined ? '' : ` p ${p.relation} ${plain(p.printed)} of ${p.tests}`;
  // a heading's reference mark is a character in one form, and raised in another
  const heading = cell?.column.replace(/(?<=[)%])\s?[ᵃa*]/, '');
  const { role } = placeOf(manuscript, span).section;
  const place = cell === undefined ? ` in ${role}` : ` in ${cell.table.label}, ${cell.row} | ${heading}`;
  return `${kind} ${measure} ${plain(estimate)} ${limits}${value}${place}`;
}

function resultsOf({ findings, manuscript }: Examination): readonly string[] {
  return findings.results.map((result) => numbersOf(result, manuscript)).toSorted();
}

function countsOf({ findings }: Examination): readonly string[] {
  return findings.counts
    .map(({ count, total, percent }) => `${plain(count)} of ${plain(total)}, ${plain(percent)}%`)
    .toSorted();
}

/** Flags by their rule and what is printed, without the white space of forms. */
function flagsOf({ manuscript, checked }: Examination): readonly string[] {
  return checked.flags.map(({ rule, grade, marks }) => {
    const words = marks.map(({ start, end }) => manuscript.text.slice(start, end));
    return `${rule} ${grade}: ${words.join(' | ')}`.replace(/\s+/g, ' ');
  });
}

describe.each(NAMES)('%s', (name) => {
  test.each(FORMS)('gives the same results and flags as %s', async (form) => {
    const [text, other] = [await examined(name, 'manuscript.txt'), await examined(name, form)];
    expectWellFormed(other.manuscript);
    expect(other.manuscript.notices).toEqual([]);
    expect(text.findings.results.length).toBeGreaterThan(12);
    expect(resultsOf(other)).toEqual(resultsOf(text));
    expect(countsOf(other)).toEqual(countsOf(text));
    expect(flagsOf(other).toSorted()).toEqual(flagsOf(text).toSorted());
  });
});
