import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { describePlace, type Manuscript, placeOf, quote } from '../src/model/index.ts';
import { ReadError, readManuscript } from '../src/read/index.ts';
import { cellsOf, marksOf, outline } from './made/outline.ts';
import { expectWellFormed } from './read-invariants.ts';

async function read(source: string): Promise<Manuscript> {
  const manuscript = await readManuscript(new TextEncoder().encode(source), 'paper.tex');
  expectWellFormed(manuscript);
  return manuscript;
}

const document = (body: string, preamble = ''): string =>
  `\\documentclass{article}\n${preamble}\n\\begin{document}\n${body}\n\\end{document}\nnot printed`;

const textOf = async (body: string, preamble = ''): Promise<string> =>
  (await read(document(body, preamble))).text;

describe('LaTeX source', () => {
  test('becomes blocks with their sections', async () => {
    const manuscript = await read(document(
      `\\maketitle
\\begin{abstract}
\\textbf{Results:} OR 1.59.
\\end{abstract}
\\section*{Methods}\\label{sec:m} We asked.

% a remark
Of the town.\\footnote{By post.} All of it.
\\begin{itemize}\\item One \\item Two\\end{itemize}
\\section[Short]{Results} \\subsection{Winter} It was \\emph{so}.
\\begin{theorem}Tar is sticky.\\end{theorem}
\\begin{thebibliography}{9}\\bibitem{a} Noss A. Tar.\\end{thebibliography}`,
      '\\title{Tar and cough in ferry towns}\\author{Ilse Tarnow}',
    ));
    expect(manuscript.format).toBe('latex');
    expect(outline(manuscript)).toEqual([
      'title | title | Tar and cough in ferry towns',
      'heading | abstract | Abstract', 'heading | abstract | Results:', 'paragraph | abstract | OR 1.59.',
      'heading | methods | Methods', 'paragraph | methods | We asked.',
      'paragraph | methods | Of the town.1 All of it.', 'note | methods | By post.',
      'paragraph | methods | One', 'paragraph | methods | Two',
      'heading | results | Results', 'heading | results | Winter', 'paragraph | results | It was so.',
      'paragraph | results | Tar is sticky.',
      'heading | references | References', 'references | references | 1. Noss A. Tar.',
    ]);
  });

  test.each([
    ['signs', 'Q\\&A, 95\\%, \\#1, \\$5, a\\_b, \\{x\\}', 'Q&A, 95%, #1, $5, a_b, {x}'],
    ['dashes, quotes and spaces', "1.05--2.41 --- ``so'' 1\\,234~g", '1.05–2.41 — “so” 1\u2009234\u00a0g'],
    ['accents', "Caf\\'e, na\\\"{\\i}ve, \\c{c}a, \\ss, G\\\"odel", 'Café, naïve, ça, ß, Gödel'],
    ['formulas', '$p<0.05$, $\\beta = -0.3$, $\\geq 65$, \\(x\\), $1.2 \\times 10^{-5}$', 'p<0.05, β = −0.3, ≥ 65, x, 1.2 × 10−5'],
    ['a comma in braces', '$0{,}72$', '0,72'],
    ['fractions and roots', '$\\frac{a}{\\frac{b}{c}} + \\sqrt{d}$', 'a/b/c + √d'],
    ['words in formulas', '$\\text{OR} = 1.59\\ (\\mathrm{CI}~1.05\\text{--}2.41)$', 'OR = 1.59 (CI\u00a01.05–2.41)'],
    ['numbers with units', '\\num{1.59} and \\SI{5}{mg}', '1.59 and 5 mg'],
    ['changes that were tracked', 'OR \\deleted{1.95}\\added{1.59}\\replaced{ new}{ old}', 'OR 1.59 new'],
    ['colours and boxes', '\\textcolor{red}{OR} \\mbox{1.59}\\phantom{0} \\href{http://x.y}{here}', 'OR 1.59 here'],
    ['commands nobody knows', '\\revised[x]{OR \\zz{1.59}} [1.05, 2.41]', 'OR 1.59 [1.05, 2.41]'],
    ['dropped branches', 'a\\iffalse b\\fi c', 'ac'],
    ['listings', 'a \\begin{verbatim}OR 9.9}\\end{verbatim} b', 'a b'],
  ])('prints %s', async (_, source, printed) => {
    expect((await textOf(source))).toBe(printed);
  });

  test('keeps raised marks off the numbers, citations among them', async () => {
    const manuscript = await read(document('0.05\\textsuperscript{12}, $\\chi^2$, known~\\cite{b,a} and \\citep[p.~3]{a}.'));
    expect(manuscript.text).toBe('0.0512, χ2, known\u00a0[1,2] and [2].');
    expect(marksOf(manuscript)).toEqual(['0.05^12', '.0512, χ^2', ', known\u00a0^[1,2]', ',2] and ^[2]']);
  });

  test('prints what commands of its own stand for', async () => {
    const preamble = '\\newcommand{\\ci}[2]{(95\\% CI #1--#2)} \\def\\pv#1{$p = #1$} \\newcommand\\OR{odds ratio}' +
      '\\newcommand{\\opt}[2][x]{#1#2} \\renewcommand{\\textbf}[1]{gone}';
    expect(await textOf('\\OR{} 1.59 \\ci{1.05}{2.41}, \\pv{0.03}, \\opt{b}\\opt[a]{b} \\textbf{bold}', preamble))
      .toBe('odds ratio 1.59 (95% CI 1.05–2.41), p = 0.03, xbab bold');
  });

  test('says in which line of the source words stand', async () => {
    const manuscript = await read(document('One.\n\nTwo\nwords.'));
    const start = manuscript.text.indexOf('words');
    expect(describePlace(placeOf(manuscript, { start, end: start + 5 }))).toBe('line 7 (counted)');
  });

  test('tells of a percent sign that hides the rest of its line', async () => {
    const { text, notices } = await read(document('OR 1.59 (95% CI 1.05 to 2.41)\nand more. % a remark\nEnd.'));
    expect(text).toBe('OR 1.59 (95and more. End.');
    expect(notices.map(({ message }) => message)).toEqual([
      'A percent sign without a backslash hides the rest of its line, as it does in print: line 4. ' +
        'If it was to be printed, write \\%.',
    ]);
  });

  test('tells of files that it brings in', async () => {
    const { notices } = await read(document('Text. \\input{tables/main.tex}'));
    expect(notices[0]?.message).toContain('“tables/main.tex”, which was not read');
  });
});

describe('a table in LaTeX', () => {
  const table = `Before the table
\\begin{table}[ht]\\centering
\\caption[Short]{Odds of cough in 95\\% of towns}\\label{tab:odds}
\\begin{tabular}{@{}l*{2}{c}@{}}
\\toprule
\\multirow{2}{*}{Town} & \\multicolumn{2}{c}{Adjusted\\textsuperscript{a}} \\\\ \\cmidrule(lr){2-3}
 & OR & \\begin{tabular}{c}95\\% CI\\\\(Wald)\\end{tabular} \\\\
\\midrule
\\multirow{2}{2cm}{Ferry} & 1.59 & 1.05--2.41 \\\\[2pt]
 & 0.80 & -- \\\\
Q\\&A & $<$0.1 & \\\\
\\bottomrule
\\end{tabular}
\\begin{tablenotes}\\item[a] For age.\\end{tablenotes}
\\end{table}
goes on. See Table~\\ref{tab:odds} and \\autoref{tab:odds}.`;

  test('becomes a grid with its spans, header rows, label, caption and notes', async () => {
    const manuscript = await read(document(table));
    const [found] = manuscript.tables;
    expect(cellsOf(manuscript, found)).toEqual([
      'h 0,0 over 2 rows: Town', 'h 0,1 over 2 columns: Adjusteda', 'h 1,1: OR', 'h 1,2: 95% CI\n(Wald)',
      '2,0 over 2 rows: Ferry', '2,1: 1.59', '2,2: 1.05–2.41', '3,1: 0.80', '3,2: –',
      '4,0: Q&A', '4,1: <0.1',
    ]);
    expect([found?.label, found?.rowCount, found?.columnCount]).toEqual(['Table 1', 5, 3]);
    expect(quote(manuscript.text, found?.caption ?? { start: 0, end: 0 }))
      .toBe('Table 1. Odds of cough in 95% of towns');
    expect(found?.notes.map((note) => quote(manuscript.text, note))).toEqual(['a For age.']);
  });

  test('stands after the paragraph that it interrupts', async () => {
    const manuscript = await read(document(table));
    expect(outline(manuscript)[0])
      .toBe('paragraph | other | Before the table goes on. See Table\u00a01 and Table 1.');
  });

  test('over several pages is read once', async () => {
    const manuscript = await read(document(`\\begin{longtable}{lr}
\\caption{Odds} \\\\ \\hline Town & OR \\\\ \\hline \\endfirsthead
\\hline Town & OR \\\\ \\hline \\endhead
\\multicolumn{2}{r}{goes on} \\\\ \\endfoot \\hline \\endlastfoot
Noss & 1.2 \\\\ Brann & 1.3
\\end{longtable}`));
    expect(cellsOf(manuscript, manuscript.tables[0])).toEqual([
      'h 0,0: Town', 'h 0,1: OR', '1,0: Noss', '1,1: 1.2', '2,0: Brann', '2,1: 1.3',
    ]);
    expect(manuscript.tables[0]?.label).toBe('Table 1');
  });

  test('may be of any of the usual kinds', async () => {
    for (const begin of ['tabular*}{\\textwidth}[t]{lr', 'tabularx}{\\textwidth}{lX', 'tabulary}{1cm}{LR', 'tblr}{ll']) {
      const name = begin.slice(0, begin.indexOf('}'));
      const { tables } = await read(document(`\\begin{${begin}}Town & OR \\\\ Noss & 1.2\\end{${name}}`));
      expect(tables[0]?.cells).toHaveLength(4);
    }
  });

  test('keeps the caption of a figure apart', async () => {
    const manuscript = await read(document('\\begin{figure}\\includegraphics[width=1cm]{a.pdf}\\caption{Towns}\\end{figure}'));
    expect(outline(manuscript)).toEqual(['caption | other | Figure 1. Towns']);
  });
});

test('a source that prints nothing is refused with a sentence', async () => {
  const reading = read(document('\\input{a}'));
  await expect(reading).rejects.toBeInstanceOf(ReadError);
  await expect(reading).rejects.toThrow('read the PDF');
});

describe('damaged or hostile source', () => {
  const DEEP = 100_000;
  test.each([
    ['braces without end', '{'.repeat(DEEP)],
    ['braces that close nothing', '}'.repeat(DEEP)],
    ['braces in braces', `${'{'.repeat(DEEP)}x${'}'.repeat(DEEP)}`],
    ['a formula without end', '$p < 0.05\n\nNext.'],
    ['environments without end', '\\begin{table}\\begin{tabular}{l}'.repeat(5000)],
    ['ends without a beginning', '\\end{table}\\end{tabular}'.repeat(5000)],
    ['commands that stand for themselves', '\\newcommand{\\a}{\\a\\a x}\\a'],
    ['commands that stand for each other', '\\def\\a{\\b\\b}\\def\\b{\\a\\a}\\a'],
    ['commands that double', `\\def\\a{x}${'\\edef\\a{\\a\\a}'.repeat(50)}\\a`],
    ['definitions without end', '\\newcommand{\\x}{'.repeat(5000)],
    ['arguments without end', '\\cite{'.repeat(20_000)],
    ['options without end', '\\foo['.repeat(20_000)],
    ['notes in notes', '\\footnote{a'.repeat(20_000)],
    ['fractions in fractions', '$\\frac{\\frac{'.repeat(10_000)],
    ['raised and raised again', `$${'x^{'.repeat(20_000)}`],
    ['spans beyond reason', '\\begin{tabular}{l}\\multicolumn{999999999}{l}{a}&\\multirow{-99999}{*}{b}\\\\\\end{tabular}'],
    ['lists of empty comments', '%\n'.repeat(DEEP)],
    ['a backslash at the end', '\\'],
  ])('%s is read as far as it goes', async (_, body) => {
    const { text } = await read(`OR 1.59\n\n\\begin{document}OR 1.59. ${body}`);
    expect(text).toContain('OR 1.59');
  });

  test('gives a well-formed manuscript, whatever it is', async () => {
    const pieces = fc.constantFrom(
      '{', '}', '$', '$$', '&', '\\\\', '%', '\n', '\n\n', '^', '_', '~', 'OR 1.59', '\\section', '\\caption',
      '\\begin{table}', '\\end{table}', '\\begin{tabular}{ll}', '\\end{tabular}', '\\footnote', '\\item',
      '\\multirow{2}{*}', '\\multicolumn{2}{c}', '\\textbf', '\\frac', '\\midrule', '\\cite{a}', '[', ']', '\\(', '\\)',
    );
    await fc.assert(
      fc.asyncProperty(fc.array(pieces, { maxLength: 40 }), async (parts) => {
        await read(`Begins. ${parts.join(' ')}`);
      }),
    );
  });
});
