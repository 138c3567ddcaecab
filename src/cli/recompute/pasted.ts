import type { Count, Findings, Result } from '../../model/index.ts';
import type { Recomputation } from '../../report/recomputation.ts';
import { recomputeCoefficient } from './coefficient-form.ts';
import { recomputeCounts } from './counts-form.ts';
import { recomputeDiscrimination } from './discrimination-form.ts';
import { InputProblem, quoted } from './input-problem.ts';
import { recomputeInterval } from './interval-form.ts';
import { recomputeProportion } from './proportion-form.ts';
import { oneSided, sizesOf } from './recompute-typed.ts';
import { baselinesOf, recomputeRisk } from './risk-form.ts';
import { recomputeTest } from './test-form.ts';
import { ofCoefficient } from './typed-coefficient.ts';
import type { TypedCount } from './typed-count.ts';
import type { TypedOptions } from './typed-options.ts';
import { findingsIn } from './typed-prose.ts';
import { ofResult, type Said, type TypedResult } from './typed-result.ts';

/** Every result of a text that was pasted whole: "OR 1.59 (95% CI 1.05–2.41), p = 0.03". */
export async function recomputePasted(
  text: string, options: TypedOptions, said: Said,
): Promise<readonly Recomputation[]> {
  const findings = await findingsIn(text);
  const usable = findings.results.filter(isUsable);
  if (said.p !== undefined && usable.length !== 1) {
    throw new InputProblem(`--p belongs to one result, and ${usable.length} were recognised.`);
  }
  const answers = [
    ...usable.map((result) => recomputeOne(result, options, said)),
    ...recomputeCountsOf(findings, usable, said.level),
  ];
  if (answers.length > 0) return answers;
  throw new InputProblem(`No result was recognised in ${quoted(text)}: say what its numbers are, `
    + 'such as tallystick recompute ratio 1.59 1.05 2.41.');
}

/** Shares are recomputed from their counts; of other kinds nothing is known. */
function isUsable({ kind }: Result): boolean {
  return kind !== 'proportion' && kind !== 'other';
}

function recomputeOne(result: Result, options: TypedOptions, said: Said): Recomputation {
  const typed = withSaid(ofResult(result), said);
  switch (result.kind) {
    case 'ratio': return options.baseline === undefined
      ? recomputeInterval(oneSided(typed, options), 'ratio')
      : recomputeRisk({
        result: typed,
        baselines: baselinesOf(options.baseline),
        crude: options.crude === true || result.adjusted === false,
      });
    case 'difference': return recomputeInterval(oneSided(typed, options), 'difference');
    case 'coefficient': {
      const row = ofCoefficient(result);
      return recomputeCoefficient({ ...row, row: oneSided(withSaid(row.row, said), options) });
    }
    case 'discrimination': return recomputeDiscrimination({ result: typed, ...sizesOf(options) });
    case 'test': return recomputeTest(result);
    case 'proportion':
    case 'other': throw new InputProblem('Nothing can be recomputed of a share without its count.');
    default: return result satisfies never;
  }
}

function withSaid(result: TypedResult, { level, p }: Said): TypedResult {
  return {
    ...result, ...(level === undefined ? {} : { level }), ...(p === undefined ? {} : { p }),
  };
}

/** Two counts are two groups, with the crude ratio beside them; other numbers stand alone. */
function recomputeCountsOf(
  { counts }: Findings, results: readonly Result[], level: number | undefined,
): readonly Recomputation[] {
  const typed = counts.flatMap(typedCount);
  const [one, other] = typed;
  if (one === undefined || other === undefined || typed.length !== 2) {
    return typed.map((count) => recomputeProportion(count, level));
  }
  const printed = results.filter((result) => result.kind === 'ratio' && result.adjusted !== true
    && result.estimate !== undefined && (result.measure === 'OR' || result.measure === 'RR'));
  return [recomputeCounts({
    groups: [one, other],
    ...(level === undefined ? {} : { level }),
    ...(printed.length === 1 ? { printed: ofResult(printed[0] as Result) } : {}),
  })];
}

function typedCount({ count, total, percent }: Count): readonly TypedCount[] {
  if (count === undefined || total === undefined || count.value > total.value) return [];
  return [{
    events: count.value, total: total.value, ...(percent === undefined ? {} : { percent }),
  }];
}
