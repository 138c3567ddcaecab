import { spawnSync } from 'node:child_process';
import {
  chmodSync, existsSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, statSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { breachesOf } from './made/json-contract.ts';
import { smallPdf } from './made/small-pdf.ts';

/*
 * Runs the command as a person does. It is built anew for these tests, beside
 * the installed packages, so that they never see an old build.
 */

const ROOT = resolve(import.meta.dirname, '..');
const BUILT = join(ROOT, 'node_modules', '.tallystick-cli-test');
const VERSION = JSON.parse(readFileSync(join(ROOT, 'package.json'), 'utf8')).version as string;
const FLAGGED_TEXT = 'Results\n\nThe hazard ratio was 0.72 (95% CI 0.75 to 0.98) in the reeds.\n';
const SOUND_TEXT = 'Results\n\nThe hazard ratio was 0.72 (95% CI 0.58 to 0.90) in the reeds.\n';

const PNG_HEADER = Buffer.from('89504e470d0a1a0a0000000d49484452', 'hex');

let folder = '';

beforeAll(() => {
  const vite = join(ROOT, 'node_modules', 'vite', 'bin', 'vite.js');
  const built = spawnSync(process.execPath, [
    vite, 'build', '--config', 'src/vite.config.ts', '--outDir', BUILT, '--emptyOutDir',
  ], { cwd: ROOT, encoding: 'utf8' });
  expect(built.status, built.stderr).toBe(0);
  folder = mkdtempSync(join(tmpdir(), 'tallystick-'));
  writeFileSync(join(folder, 'flagged.txt'), FLAGGED_TEXT);
  writeFileSync(join(folder, 'sound.txt'), SOUND_TEXT);
  writeFileSync(join(folder, 'empty.txt'), '');
  writeFileSync(join(folder, 'picture.pdf'), PNG_HEADER);
  writeFileSync(join(folder, 'damaged.pdf'), '%PDF-1.4\nnothing of a PDF follows');
  writeFileSync(join(folder, 'flagged.pdf'), smallPdf([
    'Results', 'The hazard ratio was 0.72 (95% CI 0.75 to 0.98) in the reeds.',
  ]));
  mkdirSync(join(folder, 'papers'));
});

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
  rmSync(BUILT, { recursive: true, force: true });
});

interface Run {
  readonly status: number | null;
  readonly out: string;
  readonly err: string;
}

interface Given {
  readonly input?: string;
  readonly env?: NodeJS.ProcessEnv;
}

function run(args: readonly string[], { input = '', env = {} }: Given = {}): Run {
  const { status, stdout, stderr } = spawnSync(process.execPath, [join(BUILT, 'cli.js'), ...args], {
    cwd: folder,
    input,
    encoding: 'utf8',
    env: { PATH: process.env['PATH'], LANG: 'C.UTF-8', ...env },
  });
  return { status, out: stdout, err: stderr };
}

describe('check', () => {
  test('ends with 1 where something is flagged, and shows it', () => {
    const { status, out, err } = run(['check', 'flagged.txt']);
    expect([status, err]).toEqual([1, '']);
    expect(out).toContain('1. Contradiction, line 3 (counted), in Results');
    expect(out).toContain('nothing here is for clinical decisions');
  });

  test('ends with 0 where nothing is', () => {
    const { status, out } = run(['check', 'sound.txt']);
    expect(status).toBe(0);
    expect(out).toContain('Nothing is flagged.');
  });

  test('reads a PDF in its worker', () => {
    const { status, out, err } = run(['check', 'flagged.pdf']);
    expect([status, err]).toEqual([1, '']);
    expect(out).toContain('PDF, 1 page');
    expect(out).toContain('1. Contradiction, page 1, line 2 (counted)');
  });

  test('reads standard input, with a dash or without', () => {
    for (const args of [['check'], ['check', '-']]) {
      const { status, out } = run(args, { input: FLAGGED_TEXT });
      expect(status).toBe(1);
      expect(out).toMatch(/^pasted text\n/);
    }
  });

  test('with --quiet says only what is flagged', () => {
    expect(run(['check', 'sound.txt', '--quiet'])).toEqual({ status: 0, out: '', err: '' });
    const { out } = run(['check', 'flagged.txt', '--quiet']);
    expect(out).toContain('1. Contradiction');
    expect(out).not.toContain('clinical');
  });

  test('counts cautions for the exit status only when asked', () => {
    const input = 'The hazard ratio was 1.88 (95% CI 1.44 to 2.47; P = 0.000).';
    const unasked = run(['check'], { input });
    expect(unasked.out).toContain('Flagged: 1 caution.');
    expect(unasked.status).toBe(0);
    expect(run(['check', '--fail-on', 'caution'], { input }).status).toBe(1);
    expect(run(['check', 'flagged.txt', '--fail-on', 'contradiction']).status).toBe(1);
  });

  test('keeps the contract of the JSON', () => {
    const { status, out } = run(['check', 'flagged.txt', 'sound.txt', '--as', 'json']);
    const files = JSON.parse(out);
    expect(status).toBe(1);
    expect(breachesOf(files, 'check')).toEqual([]);
    expect(files.map(({ file, flags }: { file: string; flags: unknown[] }) =>
      [file, flags.length])).toEqual([['flagged.txt', 1], ['sound.txt', 0]]);
  });

  test('writes no colours where there is no terminal, nor with NO_COLOR', () => {
    expect(run(['check', 'flagged.txt']).out).not.toContain('\x1b');
    expect(run(['check', 'flagged.txt'], { env: { NO_COLOR: '1' } }).out).not.toContain('\x1b');
  });

  test('keeps to the width that COLUMNS names', () => {
    const { out } = run(['check', 'flagged.txt'], { env: { COLUMNS: '50' } });
    expect(Math.max(...out.split('\n').map((line) => line.length))).toBeLessThanOrEqual(50);
  });
});

describe('extract', () => {
  test('lists what was read and ends with 0, flagged or not', () => {
    const { status, out } = run(['extract', 'flagged.txt']);
    expect(status).toBe(0);
    expect(out).toContain('HR 0.72 (95% CI 0.75 to 0.98)');
  });

  test('keeps the contract of the JSON', () => {
    const { status, out } = run(['extract', 'sound.txt', '--as', 'json']);
    const [file] = JSON.parse(out);
    expect(status).toBe(0);
    expect(breachesOf([file], 'extract')).toEqual([]);
    expect(file.results[0]).toMatchObject({
      kind: 'ratio', measure: 'HR', estimate: '0.72', lower: '0.58', upper: '0.90', level: 95,
      // (ln 0.90 − ln 0.58) / (2 × 1.959964) = 0.11209
      logEstimate: -0.3285, standardError: 0.1121,
    });
  });
});

describe('a file that cannot be read', () => {
  const cases: readonly (readonly [string, RegExp])[] = [
    ['missing.pdf', /^missing\.pdf: There is no such file\. .*spelling/],
    ['papers', /^papers: This is a folder\. Name the files in it/],
    ['empty.txt', /^empty\.txt: The file is empty\. /],
    ['picture.pdf', /^picture\.pdf: The file is named \.pdf but is /],
    ['damaged.pdf', /^damaged\.pdf: [^\n]+\. [^\n]+\.\n$/],
  ];

  test.each(cases)('%s: a sentence, status 2, and the others still reported', (name, sentence) => {
    const { status, out, err } = run(['check', name, 'flagged.txt']);
    expect(status).toBe(2);
    expect(err).toMatch(sentence);
    expect(err.trim().split('\n')).toHaveLength(1);
    expect(out).toContain('1. Contradiction, line 3');
    expect(out).toContain('1 file could not be read.');
  });

  test.skipIf(process.getuid?.() === 0)('one without permission says so', () => {
    const path = join(folder, 'locked.txt');
    writeFileSync(path, SOUND_TEXT);
    chmodSync(path, 0o000);
    expect(run(['check', 'locked.txt']).err).toContain('You may not read this file.');
  });

  test('empty standard input says what to do', () => {
    const { status, err } = run(['check']);
    expect(status).toBe(2);
    expect(err).toMatch(/Nothing came in\. Paste or pipe in some text, or name a file\./);
  });

  test('a PDF that takes too long is stopped, and the next file is read', () => {
    const { status, out, err } = run(
      ['check', 'flagged.pdf', 'flagged.txt', '--time-limit', '0.001']);
    expect(status).toBe(2);
    expect(err).toContain('Reading took longer than 0.001 seconds and was stopped.');
    expect(out).toContain('1. Contradiction, line 3');
  });

  test('leaves valid JSON of the others, and of none', () => {
    expect(JSON.parse(run(['extract', 'missing.pdf', '--as', 'json']).out)).toEqual([]);
    expect(JSON.parse(run(['extract', 'missing.pdf', 'sound.txt', '--as', 'json']).out))
      .toHaveLength(1);
  });
});

describe('--out', () => {
  test('writes the report to the file and nothing to the terminal', () => {
    const { status, out } = run(['check', 'flagged.txt', '--out', 'report.txt']);
    expect([status, out]).toEqual([1, '']);
    expect(readFileSync(join(folder, 'report.txt'), 'utf8')).toContain('1. Contradiction');
    expect(readdirSync(folder).filter((name) => name.endsWith('.part'))).toEqual([]);
  });

  test('replaces a file whole, and keeps the old one where nothing could be read', () => {
    writeFileSync(join(folder, 'old.json'), 'x'.repeat(100_000), { mode: 0o640 });
    run(['extract', 'sound.txt', '--as', 'json', '--out', 'old.json']);
    const replaced = readFileSync(join(folder, 'old.json'), 'utf8');
    expect(JSON.parse(replaced)).toHaveLength(1);
    expect(statSync(join(folder, 'old.json')).mode & 0o777).toBe(0o640);
    run(['extract', 'missing.txt', '--as', 'json', '--out', 'old.json']);
    expect(readFileSync(join(folder, 'old.json'), 'utf8')).toBe(replaced);
  });

  test('says what to do where writing fails in the end', () => {
    const path = `${'long'.repeat(100)}.txt`;
    const { status, err } = run(['check', 'sound.txt', '--out', path]);
    expect(status).toBe(2);
    expect(err).toContain('could not be written (ENAMETOOLONG). Name a file in a folder where');
  });

  test.each([
    ['nowhere/report.txt', 'There is no folder nowhere'],
    ['papers', 'papers is a folder. Name a file for the report.'],
    ['flagged.txt', 'flagged.txt is one of the files to be read.'],
  ])('says before reading why it cannot write %s', (path, sentence) => {
    const { status, out, err } = run(['check', 'flagged.txt', '--out', path]);
    expect([status, out]).toEqual([2, '']);
    expect(err).toContain(sentence);
    expect(readFileSync(join(folder, 'flagged.txt'), 'utf8')).toBe(FLAGGED_TEXT);
  });
});

describe('explain', () => {
  test('lists the rules, and shows the card of one', () => {
    expect(run(['explain']).out).toContain('estimate-inside-interval\n');
    const { status, out } = run(['explain', 'estimate-inside-interval']);
    expect(status).toBe(0);
    expect(out).toContain('looks at each ratio, flags a contradiction');
    expect(out).toContain('Examples');
  });

  test('names what is near to a rule that does not exist', () => {
    const { status, err } = run(['explain', 'estimate-outside']);
    expect(status).toBe(2);
    expect(err).toContain('There is no rule "estimate-outside". Near to it: ');
  });
});

describe('the command line', () => {
  test('prints its version and its help', () => {
    expect(run(['--version'])).toEqual({ status: 0, out: `${VERSION}\n`, err: '' });
    expect(run([]).out).toContain('tallystick check paper.pdf');
    expect(run(['check', '--help']).out).toContain('Exit status');
  });

  test.each([
    [['check', '--as', 'html', 'sound.txt'], 'This version writes terminal and json.'],
    [['check', '--fail-on', 'doubt', 'sound.txt'], 'Allowed choices are contradiction'],
    [['check', '--time-limit', 'soon', 'sound.txt'], 'It is a number of seconds'],
    [['check', '--failon', 'caution'], 'Did you mean --fail-on?'],
    [['sound.txt'], 'To check a file: tallystick check sound.txt'],
  ])('answers %j with a sentence and status 2', (args, sentence) => {
    const { status, out, err } = run(args);
    expect([status, out]).toEqual([2, '']);
    expect(err).toContain(sentence);
    expect(err).not.toMatch(/^error:/m);
  });

  test('ends in silence when its reader has seen enough', () => {
    const many = Array.from({ length: 40 }, (_, index) => {
      writeFileSync(join(folder, `many-${index}.txt`), FLAGGED_TEXT.repeat(30));
      return `many-${index}.txt`;
    });
    const { stdout, stderr } = spawnSync('sh', [
      '-c', '"$0" "$@" | head -n 1', process.execPath, join(BUILT, 'cli.js'), 'check', ...many,
    ], { cwd: folder, encoding: 'utf8' });
    expect([stdout, stderr]).toEqual(['many-0.txt\n', '']);
  });

  test('loads neither compromise nor pdf.js before they are used', () => {
    const atStart = [...loadedFrom('cli.js')];
    expect(atStart.filter((file) => /report-command|one\.js|index\.js/.test(file))).toEqual([]);
    const all = [...loadedFrom('cli.js'), ...loadedFrom('index.js')].map((file) =>
      readFileSync(join(BUILT, file), 'utf8'));
    expect(all.filter((code) => /^import .*pdfjs-dist/m.test(code))).toEqual([]);
    expect(all.filter((code) => code.includes('node_modules/compromise/'))).toEqual([]);
  });
});

describe('the README', () => {
  const readme = readFileSync(join(ROOT, 'README.md'), 'utf8');

  // `npm run accept` puts the present report in its place.
  test('shows a report that the command still prints', async () => {
    const manuscript = /tallystick check (\S+)/.exec(readme)?.[1] ?? '';
    const { out } = run(['check', join(ROOT, manuscript)]);
    const card = cardsIn(out).find((text) =>
      text.includes('midway between its limits') && text.includes(' 2.18 '));
    expect(card).toMatch(/^[─┬]+\n\d+\. Discrepancy, page \d/);
    const current = readme.replace(/(?<=```text\n)[^]+?(?=\n```)/, () => card ?? '');
    await expect(current).toMatchFileSnapshot('../README.md');
  });

  test('names every option and every command, and no other', () => {
    const help = ['check', 'extract', 'recompute', 'explain'].map((command) => run([command, '--help']).out);
    const offered = new Set(help.join('').match(/--[a-z-]+/g));
    const table = readme.slice(readme.indexOf('| option |'), readme.indexOf('| exit status |'));
    expect(new Set(table.match(/`--[a-z-]+/g)?.map((option) => option.slice(1))))
      .toEqual(new Set([...offered].filter((option) => option !== '--help')));
    expect(readme.match(/^\| `tallystick (\w+)/gm)).toHaveLength(help.length);
  });
});

/** The flags of a report, each from its stick to the next or to what could not be judged. */
function cardsIn(report: string): readonly string[] {
  const [flagged = ''] = report.split(/\n(?:Could not be judged|A flag is a question)/);
  return flagged.split(/\n(?=[─┬]{20,}\n)/).slice(1).map((card) => card.trimEnd());
}

/** The files of the build that are loaded when `file` is, before anything runs. */
function loadedFrom(file: string, known: Set<string> = new Set()): ReadonlySet<string> {
  if (known.has(file) || !existsSync(join(BUILT, file))) return known;
  known.add(file);
  const code = readFileSync(join(BUILT, file), 'utf8');
  for (const [, target = ''] of code.matchAll(/^(?:import|export) [^;]*?"(\.{1,2}\/[^"]+)";$/gm)) {
    loadedFrom(join(file, '..', target), known);
  }
  return known;
}
