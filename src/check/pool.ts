import type { Flag, Table } from '../model/index.ts';

/** From so many flags of one rule on, a table has one cause and not many. */
const MANY = 4;

/**
 * Gathers the flags that one rule raises all over one table: what is said of the
 * first holds for the others, and a reader wants to hear it once.
 */
export function pooled(flags: readonly Flag[]): readonly Flag[] {
  const groups = new Map<string, Flag[]>();
  const numbers = new Map<Table, number>();
  for (const flag of flags) {
    const key = keyOf(flag, numbers);
    const group = groups.get(key);
    if (group === undefined) groups.set(key, [flag]);
    else group.push(flag);
  }
  const gathered = new Map([...groups.values()].flatMap((group) =>
    (group.length < MANY ? group.map((flag) => [flag, flag] as const) : [[group[0] as Flag, gather(group)]])));
  return flags.flatMap((flag) => gathered.get(flag) ?? []);
}

/** The same for flags of one rule and grade in one table; flags elsewhere have each their own. */
function keyOf({ rule, grade, place, span }: Flag, numbers: Map<Table, number>): string {
  const { table } = place;
  if (table === undefined) return `${rule} at ${span.start}-${span.end}`;
  const number = numbers.get(table) ?? numbers.size;
  numbers.set(table, number);
  return `${rule} ${grade} in table ${number}`;
}

function gather(group: readonly Flag[]): Flag {
  const [first, ...others] = group as readonly [Flag, ...Flag[]];
  const table = first.place.table?.label || 'the same table';
  const rows = others.flatMap(({ result }) => result?.cell?.row ?? []);
  const also = `The same holds of ${others.length} more in ${table}`;
  return {
    ...first,
    because: `${first.because}; ${also.charAt(0).toLowerCase()}${also.slice(1)}`,
    working: [...first.working, `${also}: ${named(rows)}`],
    comment: `${first.comment} ${also}.`,
  };
}

/** The first few rows by their labels. */
function named(rows: readonly string[]): string {
  const distinct = [...new Set(rows.filter((row) => row !== ''))];
  const shown = distinct.slice(0, 6).join('; ');
  return distinct.length > 6 ? `${shown}; …` : shown || 'rows without a label';
}
