import type { CoefficientResult } from '../../model/index.ts';
import type { TypedCoefficient } from './coefficient-form.ts';
import { InputProblem, quoted } from './input-problem.ts';
import { numbersIn, oneNumber, type Typed } from './typed-number.ts';
import type { TypedOptions } from './typed-options.ts';
import { ofResult, type Said, type TypedResult, typedResult } from './typed-result.ts';

/**
 * A coefficient's row from typed words: the coefficient alone, with its standard error behind
 * it, or with both its limits; or "β = 0.46 (SE 0.21), p = 0.03" pasted whole.
 */
export async function coefficientFrom(
  words: readonly string[], said: Said, options: TypedOptions,
): Promise<TypedCoefficient> {
  const numbers = numbersIn(words);
  const row = numbers === undefined ? await coefficientInProse(words.join(' '))
    : coefficientOfNumbers(numbers);
  const { se, z, wald, ratio } = options;
  const oneSided = options.oneSided === true;
  const p = said.p ?? row.row.p;
  return {
    ...row,
    row: {
      ...row.row,
      ...(said.level === undefined ? {} : { level: said.level }),
      ...(p === undefined ? {} : { p: { ...p, oneSided: oneSided || p.oneSided } }),
    },
    ...(se === undefined ? {} : { standardError: oneNumber('standard error', se) }),
    ...(z === undefined ? {} : { z: oneNumber('z statistic', z) }),
    ...(wald === undefined ? {} : { wald: oneNumber('Wald statistic', wald) }),
    ...(ratio === undefined ? {} : { ratio: await printedRatio(ratio) }),
  };
}

/** The exp(b) that a row prints; its limits may be left out. */
async function printedRatio(text: string): Promise<TypedResult> {
  return typedResult([text], 'ratio', 'ratio', {});
}

function coefficientOfNumbers(numbers: readonly Typed[]): TypedCoefficient {
  const [coefficient, second, third] = numbers;
  if (coefficient === undefined || numbers.length > 3) {
    throw new InputProblem(`${numbers.length} numbers are typed: type the coefficient and its `
      + 'standard error, such as 0.46 --se 0.21, or its two limits, such as 0.46 0.05 0.87.');
  }
  const row = { name: 'coefficient' };
  if (second === undefined) return { coefficient, row };
  return third === undefined ? { coefficient, standardError: second, row }
    : { coefficient, row: { ...row, estimate: coefficient, lower: second, upper: third } };
}

async function coefficientInProse(text: string): Promise<TypedCoefficient> {
  const { findingsIn } = await import('./typed-prose.ts');
  for (const worded of [text, `β = ${text}`]) {
    const { results } = await findingsIn(worded);
    const found = results.filter((result) => result.kind === 'coefficient');
    if (found.length === 1) return ofCoefficient(found[0] as CoefficientResult);
  }
  throw new InputProblem(`No single coefficient was recognised in ${quoted(text)}: type its `
    + 'numbers, such as 0.46 --se 0.21.');
}

/** A coefficient found in prose, as if its numbers had been typed one by one. */
export function ofCoefficient(result: CoefficientResult): TypedCoefficient {
  const { estimate, standardError, statistic } = result;
  const row = ofResult(result, 'coefficient');
  return {
    coefficient: estimate,
    ...(standardError === undefined ? {} : { standardError }),
    ...(statistic?.of === 'z' ? { z: statistic.printed } : {}),
    ...(statistic?.of === 'Wald' ? { wald: statistic.printed } : {}),
    row,
  };
}
