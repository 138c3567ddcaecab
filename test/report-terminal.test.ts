import { describe, expect, test } from 'vitest';
import fc from 'fast-check';
import stringWidth from 'string-width';
import type { Examination, Manuscript } from '../src/model/index.ts';
import { resultsList, ruleCard, ruleList, type Screen } from '../src/report/index.ts';
import { terminalReport, type TerminalOptions } from '../src/report/index.ts';
import {
  cards, examinationOf, flaggedExamination, flagOn, manuscriptOf, ratioIn, spanOf,
} from './made/examinations.ts';

const SCREEN: Screen = { columns: 80, colours: 0, unicode: true, drawings: true };
const OPTIONS: TerminalOptions = { screen: SCREEN, rules: cards, quiet: false };

function reportOf(examination: Examination, screen: Partial<Screen> = {}, quiet = false): string {
  return terminalReport([examination], { ...OPTIONS, screen: { ...SCREEN, ...screen }, quiet });
}

/** A report with its line breaks closed up, so that wrapping does not matter. */
function flowing(report: string): string {
  return report.replace(/\s+/g, ' ');
}

describe('the terminal report', () => {
  const report = reportOf(flaggedExamination());

  test('says what was read, what agreed, what is flagged and what was left open', () => {
    expect(report).toMatch(/^saltmarsh\.pdf\n/);
    expect(report).toContain('PDF, 1 page, 44 words.');
    expect(report).toContain('1 result found: 1 ratio.');
    expect(report).toContain('12 checks agree. Flagged: 1 contradiction. 1 could not be judged.');
    expect(report).toContain('Could not be judged\n');
    expect(flowing(report)).toContain(
      'page 4, line 140: a limit may be rounded from zero, which has no logarithm.');
  });

  test('gives a flag its grade, place, question, answer, working, explanation and comment', () => {
    expect(report).toContain('1. Contradiction, page 4, line 140, in Results');
    expect(report).toContain('Does the estimate lie inside its own interval?');
    expect(report).toContain('The estimate 0.72 lies below its interval, 0.75 to 0.98.');
    expect(report).toMatch(/printed +estimate 0\.72\n/);
    expect(report).toMatch(/recomputed +estimate 0\.85 to 0\.87\n/);
    expect(report).toMatch(/working +√\(0\.75 × 0\.98\) = 0\.857\n/);
    expect(report).toMatch(/perhaps +A limit may have been copied from another row\.\n/);
    expect(flowing(report)).toContain('Could the authors please check these numbers?');
  });

  test('quotes the sentence, and no other, with a line under each number in question', () => {
    expect(flowing(report)).toContain('“In the adjusted model the hazard ratio');
    expect(report).not.toContain('412 residents');
    expect(report).not.toContain('No other food');
    const rows = report.split('\n');
    const at = rows.findIndex((line) => line.includes('was 0.72 (95% CI 0.75 to 0.98)'));
    expect(underlined(rows[at] ?? '', rows[at + 1] ?? '')).toEqual(['0.72', '0.75', '0.98']);
  });

  test('draws the interval, the estimate and the recomputed range where they stand', () => {
    const rows = report.split('\n');
    const printedRow = rows.find((line) => line.includes('├')) ?? '';
    const recomputedRow = rows.find((line) => line.includes('▒')) ?? '';
    expect(printedRow.indexOf('●')).toBeLessThan(printedRow.indexOf('├'));
    expect(printedRow.indexOf('┤')).toBeLessThan(printedRow.indexOf('┊'));
    expect(recomputedRow.indexOf('▒')).toBeGreaterThan(printedRow.indexOf('├'));
    expect(recomputedRow.lastIndexOf('▒')).toBeLessThan(printedRow.indexOf('┤'));
    expect(recomputedRow.indexOf('┊')).toBe(printedRow.indexOf('┊'));
  });

  test('closes up words that were broken at a line end, keeping the hyphen as printed', () => {
    const text = 'The hazard was associ-\nated: 0.72 (0.75 to 0.98).';
    const whole = { start: 0, end: text.length };
    const manuscript = manuscriptOf(text, {
      blocks: [{ kind: 'paragraph', span: whole, section: { role: 'other', heading: '' } }],
    });
    const result = ratioIn(text, { estimate: '0.72', lower: '0.75', upper: '0.98' });
    expect(reportOf(examinationOf(manuscript, [result], [flagOn(manuscript, result)])))
      .toContain('“The hazard was associ-ated: 0.72 (0.75 to 0.98).”');
  });

  test('explains by what fits these numbers, or else by the likeliest of the rule', () => {
    const { manuscript, checked: { flags: [flag] } } = flaggedExamination();
    const explained = (innocent: readonly string[]): string => {
      if (flag === undefined) throw new Error('no flag');
      return flowing(reportOf(examinationOf(manuscript, [], [{ ...flag, innocent }])));
    };
    const [first = '', second = ''] = flag?.innocent ?? [];
    expect(explained([first, second])).toContain(
      `perhaps ${first} (1 more: tallystick explain estimate-inside-interval)`);
    expect(explained(['0.72 may be 0.82.', 'It may be 90%.', first, second])).toContain(
      'perhaps 0.72 may be 0.82. It may be 90%. (2 more: tallystick explain');
  });

  test('takes the cautions along, and never speaks of people', () => {
    expect(report).toContain('nothing here is for clinical decisions');
    expect(report).not.toMatch(/\berror|wrong|suspicious|misconduct|fraud/i);
  });

  test('says so where nothing is flagged and where nothing was recognised', () => {
    const manuscript = manuscriptOf('Nothing is counted here.');
    const silent = reportOf(examinationOf(manuscript, [], [], { agreed: 0 }));
    expect(flowing(silent)).toContain('No result was recognised');
    const text = 'OR 1.59 (1.05 to 2.41)';
    const result = ratioIn(text, { estimate: '1.59', lower: '1.05', upper: '2.41' });
    const sound = reportOf(examinationOf(manuscriptOf(text), [result], []));
    expect(sound).toContain('Nothing is flagged.');
    expect(flowing(sound)).toContain('What is not flagged has not been shown to be right.');
  });

  test('shows every notice', () => {
    const manuscript = manuscriptOf('Few words.', {
      notices: [{ message: 'The page has no text.', page: 3 }],
    });
    expect(reportOf(examinationOf(manuscript, [], []))).toContain(
      'Note, page 3: The page has no text.');
  });

  test('quotes each further place that a flag marks, with where it stands', () => {
    const manuscript = manuscriptOf('The OR was 1.59 (1.05 to 2.41).\nIn the table it was 1.95.');
    const result = ratioIn(manuscript.text, { estimate: '1.59', lower: '1.05', upper: '2.41' });
    const first = spanOf(manuscript.text, '1.59');
    const flag = flagOn(manuscript, { ...result, span: first }, {
      marks: [first, spanOf(manuscript.text, '1.95')],
    });
    const text = reportOf(examinationOf(manuscript, [result], [flag]));
    expect(text).toContain('“The OR was 1.59 (1.05 to 2.41).”');
    expect(text).toContain('and page 4, line 141:');
    expect(text).toContain('“In the table it was 1.95.”');
  });

  test('closes with totals where there are several files', () => {
    const both = terminalReport([flaggedExamination(), flaggedExamination()], OPTIONS);
    expect(both).toContain('All together: 2 files read, 2 contradictions in 2 files.');
  });

  test('says only what is flagged when it is to be quiet', () => {
    const quiet = reportOf(flaggedExamination(), {}, true);
    expect(quiet).toContain('1. Contradiction');
    expect(quiet).not.toMatch(/words\.|Could not be judged|clinical/);
    expect(reportOf(examinationOf(manuscriptOf('Sound.'), [], []), {}, true)).toBe('');
  });
});

describe('the screen', () => {
  test('no line is longer than the screen, from 20 columns up', () => {
    for (let columns = 20; columns <= 130; columns += 1) {
      const lines = reportOf(wideExamination(), { columns }).split('\n');
      expect(lines.filter((line) => stringWidth(line) > columns)).toEqual([]);
    }
  });

  test('whatever the manuscript says, lines keep their width and nothing acts', () => {
    fc.assert(fc.property(anyText(), fc.integer({ min: 20, max: 100 }), (before, columns) => {
      const text = `${before} 0.72 (0.75 to 0.98) ${before}`;
      const manuscript = manuscriptOf(text, { name: before });
      const from = before.length;
      const result = ratioIn(' '.repeat(from) + text.slice(from), {
        estimate: '0.72', lower: '0.75', upper: '0.98',
      });
      const examination = examinationOf(manuscript, [result], [flagOn(manuscript, result)]);
      const report = reportOf(examination, { columns });
      expect(report.split('\n').filter((line) => stringWidth(line) > columns)).toEqual([]);
      expect(report).not.toMatch(/(?!\n)\p{Cc}|\p{Cs}|[\u202a-\u202e\u2066-\u2069\u200e\u200f]/u);
    }));
  });

  test('colours add nothing that is not there without them', () => {
    const coloured = reportOf(flaggedExamination(), { colours: 3 });
    expect(coloured).toContain('\x1b[');
    expect(coloured.replace(/\x1b\[[0-9;]*m/g, '')).toBe(reportOf(flaggedExamination()));
    expect(reportOf(flaggedExamination())).not.toContain('\x1b');
  });

  test('without drawing characters all of our own signs are ASCII', () => {
    const text = 'The OR was 0.72 (0.75 to 0.98).';
    const manuscript = manuscriptOf(text);
    const result = ratioIn(text, { estimate: '0.72', lower: '0.75', upper: '0.98' });
    const flag = flagOn(manuscript, result, { working: ['none'], comment: 'Please check.' });
    const typed = reportOf(examinationOf(manuscript, [result], [flag]), { unicode: false });
    expect(typed).toMatch(/\|-+\|/);
    expect(typed).toMatch(/^[\n -~]*$/);
  });

  test('without drawings every part has a word of its own, for ears', () => {
    const spoken = reportOf(flaggedExamination(), { drawings: false });
    expect(spoken).not.toMatch(/[\u2500-\u25ff‾]/);
    expect(spoken).toContain('   In question: 0.72, 0.75, 0.98\n');
    expect(spoken).toContain('   Printed: estimate 0.72\n');
    expect(spoken).toContain('   Recomputed: estimate 0.85 to 0.87\n');
    expect(spoken).toContain('   Working: √(0.75 × 0.98) = 0.857\n');
    expect(flowing(spoken)).toContain('To ask: For “0.72');
  });

  test('wide and combining characters keep their underlines in place', () => {
    const text = '生存のハザード比は 0.72 (0.75 to 0.98) de\u0301ja\u0300 vu';
    const manuscript = manuscriptOf(text);
    const result = ratioIn(text, { estimate: '0.72', lower: '0.75', upper: '0.98' });
    const rows = reportOf(examinationOf(manuscript, [result], [flagOn(manuscript, result)]))
      .split('\n');
    const at = rows.findIndex((line) => line.includes('ハザード'));
    const before = (rows[at] ?? '').slice(0, (rows[at] ?? '').indexOf('0.72'));
    expect((rows[at + 1] ?? '').indexOf('‾')).toBe(stringWidth(before));
  });
});

describe('a hostile manuscript', () => {
  const hostile = 'Was \x1b[2J\x1b]8;;https://a.example\x07link\x1b]8;;\x07 \u009b31m \u202eOR '
    + '0.72 (0.75 to 0.98)\u202c \u2066x\u2069 \u{e0041}\ud800 \x00\r\b\x7f seen.';
  const manuscript = manuscriptOf(hostile, {
    name: 'a\x1b]0;owned\x07.pdf', notices: [{ message: 'Lost \x1b[31m a page' }],
  });
  const result = ratioIn(hostile, { estimate: '0.72', lower: '0.75', upper: '0.98' }, {
    about: { outcome: 'death\x1b[5m' },
    cell: {
      table: { span: { start: 0, end: 1 }, label: 'T\x1b1', notes: [], cells: [], rowCount: 1,
        columnCount: 1 },
      cell: { span: { start: 0, end: 1 }, row: 0, column: 0, rowSpan: 1, columnSpan: 1,
        header: false },
      row: 'row\x1b[1m', column: 'column\u202e',
    },
  });
  const flag = flagOn(manuscript, result, {
    because: 'the \x1b[1m words', comment: `For “${hostile}”`, working: ['\x07'],
    innocent: ['\x1b'],
  });
  const examination = examinationOf(manuscript, [result], [flag], {
    unjudged: [{ rule: 'x', span: result.span, because: 'not \x1b[2J told' }],
  });
  const acting = /(?!\n)\p{Cc}|\p{Cs}|[\u202a-\u202e\u2066-\u2069]|[\u{e0000}-\u{e007f}]/u;

  test('is shown, and does nothing', () => {
    const report = reportOf(examination);
    expect(report).not.toMatch(acting);
    expect(report).toContain('0.72 (0.75 to 0.98)');
    expect(report).toContain('\ufffd[2J');
  });

  test('does nothing in the list of results either', () => {
    expect(resultsList(examination, SCREEN)).not.toMatch(acting);
  });
});

describe('the list of results', () => {
  test('gives each result in one way of writing, with its place and what it is about', () => {
    const text = 'HR 0·72 (95% CI 0·58–0·98; p = 0.03)';
    const result = ratioIn(text, { estimate: '0·72', lower: '0·58', upper: '0·98', p: '0.03' }, {
      adjusted: true, about: { outcome: 'death', term: 'samphire' }, inferred: ['level'],
    });
    const list = resultsList(examinationOf(manuscriptOf(text), [result], []), SCREEN);
    expect(list).toContain('HR 0.72 (95% CI 0.58 to 0.98), p = 0.03');
    expect(list).toContain('page 4, line 140');
    expect(list).toContain(
      'adjusted; outcome: death; term: samphire; taken from elsewhere: level');
  });
});

describe('the card of a rule', () => {
  const [rule] = cards as [(typeof cards)[number]];

  test('holds the question, the reason, the source, the explanations and the examples', () => {
    const card = ruleCard(rule, SCREEN);
    for (const words of [rule.question, rule.why, rule.source, ...rule.innocent]) {
      expect(flowing(card)).toContain(words);
    }
    expect(card).toContain('“hazard ratio 0.72 (95% CI 0.75 to 0.98)”');
    expect(card).toContain('disagrees: below');
  });

  test('is listed with its question', () => {
    expect(ruleList(cards, SCREEN)).toContain(`${rule.id}\n   ${rule.question}\n`);
  });
});

/** The words above each run of the underline. */
function underlined(line: string, below: string): readonly string[] {
  return [...below.matchAll(/‾+/g)].map(({ index, 0: run }) =>
    line.slice(index, index + run.length));
}

function anyText(): fc.Arbitrary<string> {
  const odd = fc.constantFrom('\x1b[31m', '\u202e', '\u009b', '\ud800', '漢字', 'e\u0301',
    '\u200b', '👩‍🔬', '\t', '\r\n', ' ', '. ', 'x'.repeat(120), '\u00ad', '각', 'ﬁ');
  return fc.array(fc.oneof(odd, fc.string({ unit: 'binary', maxLength: 6 })), { maxLength: 12 })
    .map((parts) => parts.join('').replace(/\d/g, 'd'));
}

/** Long words, wide words, a table cell and many notices in one. */
function wideExamination(): Examination {
  const text = `${'漢字'.repeat(60)} https://example.org/${'a'.repeat(150)} `
    + 'the OR was 0.72 (0.75 to 0.98), p = 0.03';
  const manuscript: Manuscript = manuscriptOf(text, {
    name: `${'long-name-'.repeat(15)}.pdf`, notices: [{ message: 'b'.repeat(100) }],
  });
  const result = ratioIn(text, { estimate: '0.72', lower: '0.75', upper: '0.98', p: '0.03' });
  return examinationOf(manuscript, [result], [flagOn(manuscript, result)], {
    unjudged: [{ rule: 'c'.repeat(90), span: result.span, because: 'd'.repeat(90) }],
  });
}
