import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { dirname, join, relative, resolve } from 'node:path';
import ts from 'typescript';
import { describe, expect, test } from 'vitest';

/*
 * Holds the house to its plan: who may import whom, where each library may be
 * used, what may lie at the top level, and how files may be named.
 */

const ROOT = resolve(import.meta.dirname, '..');

/** The rooms of the house, and the rooms that each may import besides itself. */
const ROOMS: Readonly<Record<string, readonly string[] | 'everything'>> = {
  'src/model': [],
  'src/stats': ['src/model'],
  'src/read': ['src/model'],
  'src/extract': ['src/model'],
  'src/check': ['src/model'],
  'src/report': ['src/model'],
  'src/cli': 'everything',
  'src/page': [
    'src/model', 'src/stats', 'src/read', 'src/extract', 'src/check', 'src/report',
    'src/index.ts', 'rules',
  ],
  'src/authoring.ts': ['src/model', 'src/stats', 'src/authoring'],
  'src/authoring': ['src/model', 'src/stats'],
  'src/index.ts': [
    'src/model', 'src/stats', 'src/read', 'src/extract', 'src/check', 'src/report', 'rules',
  ],
  rules: ['src/authoring.ts'],
};

/** The one room in which each library may be used. One not listed here may not be used at all. */
const LIBRARIES: Readonly<Record<string, string>> = {
  jstat: 'src/stats',
  compromise: 'src/extract',
  chalk: 'src/report',
  'string-width': 'src/report',
  commander: 'src/cli',
  'pdfjs-dist': 'src/read',
  saxes: 'src/read',
  htmlparser2: 'src/read',
  fflate: 'src/read',
  marked: 'src/read',
};

/** Files outside `src/cli` that may use Node itself, each for a reason that it states. */
const NODE_OUTSIDE_CLI: readonly string[] = [];

/** Build settings: code of the workshop, not of the house. */
const SETTINGS: readonly string[] = ['src/vite.config.ts', 'src/page/vite.config.ts'];

const TOP_LEVEL: readonly string[] = [
  '.ci', '.gitignore', 'DEVELOPERS.md', 'CHANGELOG.md', 'LICENSE', 'README.md', 'biome.json',
  'fixtures', 'package-lock.json', 'package.json', 'rules', 'src', 'test', 'tsconfig.json',
];

/** Made or fetched, never part of the source. */
const NOT_SOURCE: readonly string[] = ['.git', 'node_modules', 'dist', 'coverage'];

const BANNED_NAMES = /^(utils?|helpers?|common|types|misc|shared|lib)(\.|$)/;

/** Stands for the target of an import that only running the program would tell; no room may. */
const WORKED_OUT = '(a target worked out at run time)';

interface Import {
  readonly from: string;
  readonly target: string;
}

const sources = [...filesUnder('src'), ...filesUnder('rules')]
  .filter((file) => file.endsWith('.ts') && !SETTINGS.includes(file));
const imports = sources.flatMap(importsOf);

describe('the house', () => {
  test('has source in it, so that the tests below test something', () => {
    expect(sources).toContain('src/model/index.ts');
    expect(imports.length).toBeGreaterThan(10);
  });

  test('every source file stands in a room', () => {
    expect(sources.filter((file) => roomOf(file) === undefined)).toEqual([]);
  });

  test('no room imports a room that it may not know', () => {
    const breaches = imports.filter(({ target }) => target.startsWith('.')).filter(isBreach);
    expect(breaches.map(inWords)).toEqual([]);
  });

  test('a rule imports nothing but what is made for rules', () => {
    const breaches = imports.filter(({ from, target }) =>
      roomOf(from) === 'rules' && from !== 'rules/index.ts' && target !== '../src/authoring.ts');
    expect(breaches.map(inWords)).toEqual([]);
  });

  test('every library is used in its own room only', () => {
    const breaches = imports.filter(({ target }) => isLibrary(target))
      .filter(({ from, target }) => LIBRARIES[packageOf(target)] !== roomOf(from));
    expect(breaches.map(inWords)).toEqual([]);
  });

  test('jstat is used in one file', () => {
    const users = imports.filter(({ target }) => packageOf(target) === 'jstat');
    expect(new Set(users.map(({ from }) => from)).size).toBeLessThanOrEqual(1);
  });

  test('only the command uses Node', () => {
    const breaches = imports.filter(({ target }) => target.startsWith('node:'))
      .filter(({ from }) => roomOf(from) !== 'src/cli' && !NODE_OUTSIDE_CLI.includes(from));
    expect(breaches.map(inWords)).toEqual([]);
  });

  test('every import names its file in full', () => {
    const vague = imports.filter(({ target }) => target.startsWith('.'))
      .filter(({ from, target }) => !existsSync(join(ROOT, dirname(from), target)));
    expect(vague.map(inWords)).toEqual([]);
  });

  test('the top level holds only what the house needs', () => {
    const strange = readdirSync(ROOT)
      .filter((name) => !NOT_SOURCE.includes(name) && !TOP_LEVEL.includes(name));
    expect(strange).toEqual([]);
  });

  test('no file is named for being useful', () => {
    const files = [...sources, ...filesUnder('test')];
    expect(files.filter((file) => file.split('/').some((part) => BANNED_NAMES.test(part))))
      .toEqual([]);
  });

  test('files are named in kebab-case', () => {
    const kebab = /^[a-z0-9]+(-[a-z0-9]+)*(\.(test|config|d))?\.ts$/;
    expect(sources.filter((file) => !kebab.test(file.split('/').at(-1) ?? ''))).toEqual([]);
  });
});

describe('the reading of imports', () => {
  test('sees every form in which one file can bring in another', () => {
    const text = [
      "import { a } from './a.ts';",
      "import type { B } from './b.ts';",
      "import './c.ts';",
      "export * from './d.ts';",
      "export type { E } from './e.ts';",
      "const f = await import('./f.ts');",
      "type G = import('./g.ts').G;",
      "const h = require('./h.cjs');",
      "import i = require('./i.cjs');",
      "const j = import.meta.resolve('j');",
      "const k = new URL('./k.ts', import.meta.url);",
      'const l = await import(name);',
    ].join('\n');
    expect(targetsIn(text)).toEqual([
      './a.ts', './b.ts', './c.ts', './d.ts', './e.ts', './f.ts', './g.ts', './h.cjs', './i.cjs',
      'j', './k.ts', WORKED_OUT,
    ]);
  });

  test('knows a package by its name, whatever part of it is imported', () => {
    expect(packageOf('compromise/one')).toBe('compromise');
    expect(packageOf('@scope/name/part.js')).toBe('@scope/name');
  });
});

function filesUnder(folder: string): readonly string[] {
  if (!existsSync(join(ROOT, folder))) return [];
  return readdirSync(join(ROOT, folder), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map((entry) => relative(ROOT, join(entry.parentPath, entry.name)))
    .sort();
}

function importsOf(file: string): readonly Import[] {
  return targetsIn(readFileSync(join(ROOT, file), 'utf8'))
    .map((target) => ({ from: file, target }));
}

/** Everything that a source text imports: statically, dynamically, as a type, by `require`. */
function targetsIn(text: string): readonly string[] {
  const targets: string[] = [];
  const visit = (node: ts.Node): void => {
    const target = targetOf(node);
    if (target !== undefined) {
      targets.push(ts.isStringLiteralLike(target) ? target.text : WORKED_OUT);
    }
    ts.forEachChild(node, visit);
  };
  visit(ts.createSourceFile('source.ts', text, ts.ScriptTarget.Latest, true));
  return targets;
}

function targetOf(node: ts.Node): ts.Node | undefined {
  if (ts.isNewExpression(node) && node.arguments?.[1]?.getText() === 'import.meta.url') {
    return node.arguments[0];
  }
  if (ts.isImportDeclaration(node) || ts.isExportDeclaration(node)) return node.moduleSpecifier;
  if (ts.isExternalModuleReference(node)) return node.expression;
  if (ts.isImportTypeNode(node) && ts.isLiteralTypeNode(node.argument)) {
    return node.argument.literal;
  }
  if (!ts.isCallExpression(node)) return undefined;
  const called = node.expression;
  const brings = called.kind === ts.SyntaxKind.ImportKeyword
    || /^(require|require\.resolve|import\.meta\.resolve)$/.test(called.getText());
  return brings ? node.arguments[0] : undefined;
}

function roomOf(file: string): string | undefined {
  return Object.keys(ROOMS).find((room) => file === room || file.startsWith(`${room}/`));
}

function isBreach({ from, target }: Import): boolean {
  const own = roomOf(from);
  const other = roomOf(relative(ROOT, resolve(ROOT, dirname(from), target)));
  if (own === undefined) return true;
  const known = ROOMS[own];
  if (known === 'everything') return false;
  return other === undefined || (other !== own && known?.includes(other) !== true);
}

function isLibrary(target: string): boolean {
  return !target.startsWith('.') && !target.startsWith('node:');
}

function packageOf(target: string): string {
  return target.split('/').slice(0, target.startsWith('@') ? 2 : 1).join('/');
}

function inWords({ from, target }: Import): string {
  return `${from} imports ${target}`;
}
