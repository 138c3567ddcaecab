import { readFileSync } from 'node:fs';
import type { ReportedNumbers } from '../src/stats/reported-numbers.ts';
import { nearest, printedP } from './reported-row.ts';

/** One data set of fixtures/reference/standard-methods.csv: intervals and p-values by method. */
export interface DataSet {
  readonly design: string;
  readonly estimate: number;
  readonly intervals: (readonly [string, number, number])[];
  readonly ps: (readonly [string, number])[];
}

/** All data sets, made with R 4.2.2 by the script beside the file. */
export function dataSets(): readonly DataSet[] {
  const place = new URL('../fixtures/reference/standard-methods.csv', import.meta.url);
  const sets = new Map<string, DataSet>();
  for (const line of readFileSync(place, 'utf8').trim().split('\n').slice(1)) {
    const [id, design, estimate, what, method, lower, upper] = line.split(',') as [
      string,
      string,
      string,
      string,
      string,
      string,
      string,
    ];
    const key = `${id} ${design}`;
    const set = sets.get(key) ?? { design, estimate: Number(estimate), intervals: [], ps: [] };
    if (what === 'interval') set.intervals.push([method, Number(lower), Number(upper)]);
    else set.ps.push([method, Number(lower)]);
    sets.set(key, set);
  }
  return [...sets.values()];
}

/** What a paper prints of one interval of the data set, alone and with one of its p-values. */
export interface Print {
  readonly interval: string;
  /** The method of the p, "none" where none is printed. */
  readonly p: string;
  readonly numbers: ReportedNumbers;
}

/** Every interval of a data set beside every p-value, as a paper may print them. */
export function printsOf(set: DataSet, decimals: number): readonly Print[] {
  return set.intervals.flatMap(([interval, lower, upper]) => {
    const numbers = {
      estimate: nearest(set.estimate, decimals),
      lower: nearest(lower, decimals),
      upper: nearest(upper, decimals),
    };
    const withP = set.ps.map(([p, value]) => {
      const printed = printedP(value, 0.2, nearest) as NonNullable<ReportedNumbers['p']>;
      return { interval, p, numbers: { ...numbers, p: printed } };
    });
    return [{ interval, p: 'none', numbers }, ...withP];
  });
}
