/*
 * The contract of the JSON, written down a second time and apart from the code
 * that makes it, as a table of what each field may hold.
 */

type Check = (value: unknown, path: string) => readonly string[];

const string: Check = (value, path) => (typeof value === 'string' ? [] : [path]);
const boolean: Check = (value, path) => (typeof value === 'boolean' ? [] : [path]);
const number: Check = (value, path) =>
  (typeof value === 'number' && Number.isFinite(value) ? [] : [path]);
const NUMERAL = /^[-+]?(\d[\d,]*\.?\d*|\.\d+|∞)([eE×].*)?$/;
const numeral: Check = (value, path) =>
  (typeof value === 'string' && NUMERAL.test(value) ? [] : [path]);

function oneOf(...allowed: readonly string[]): Check {
  return (value, path) => (allowed.includes(value as string) ? [] : [path]);
}

function orNull(check: Check): Check {
  return (value, path) => (value === null ? [] : check(value, path));
}

function listOf(check: Check): Check {
  return (value, path) => (Array.isArray(value)
    ? value.flatMap((item, index) => check(item, `${path}[${index}]`)) : [path]);
}

/** Exactly these fields: none missing, none more. */
function record(fields: Readonly<Record<string, Check>>): Check {
  return (value, path) => {
    if (typeof value !== 'object' || value === null) return [path];
    const held = value as Record<string, unknown>;
    const more = Object.keys(held).filter((name) => !(name in fields));
    return [
      ...Object.entries(fields).flatMap(([name, check]) => check(held[name], join(path, name))),
      ...more.map((name) => join(path, name)),
    ];
  };
}

function join(path: string, name: string): string {
  return path === '' ? name : `${path}.${name}`;
}

const table = orNull(record({
  label: orNull(string), row: orNull(string), column: orNull(string),
}));

const result = record({
  kind: oneOf(
    'ratio', 'coefficient', 'difference', 'proportion', 'discrimination', 'test', 'other'),
  measure: orNull(string), adjusted: orNull(boolean),
  estimate: orNull(numeral), lower: orNull(numeral), upper: orNull(numeral), level: orNull(number),
  p: orNull(record({ relation: oneOf('=', '<', '<=', '>', '>='), value: numeral })),
  logEstimate: orNull(number), standardError: orNull(number),
  outcome: orNull(string), term: orNull(string), comparison: orNull(string), unit: orNull(string),
  counts: listOf(record({
    count: orNull(numeral), total: orNull(numeral), percent: orNull(numeral),
  })),
  in: oneOf('prose', 'table'), section: orNull(string), page: orNull(number), line: orNull(number),
  table, inferred: listOf(string), quote: string, span: listOf(number),
});

const flag = record({
  rule: string, grade: oneOf('contradiction', 'discrepancy', 'caution'),
  place: record({
    words: string, section: orNull(string), page: orNull(number), line: orNull(number), table,
  }),
  quote: string, printed: listOf(string),
  recomputed: orNull(record({ quantity: string, low: orNull(number), high: orNull(number) })),
  working: listOf(string), innocent: listOf(string), comment: string,
});

const file = {
  file: string, format: oneOf('text', 'pdf', 'jats', 'docx', 'html', 'latex', 'markdown'),
  notices: listOf(string), results: listOf(result),
};

const CONTRACTS = {
  extract: listOf(record(file)),
  check: listOf(record({ ...file, flags: listOf(flag) })),
};

/** The paths of all fields that are not as the contract of this command has them. */
export function breachesOf(json: unknown, command: 'extract' | 'check'): readonly string[] {
  return CONTRACTS[command](json, '');
}
