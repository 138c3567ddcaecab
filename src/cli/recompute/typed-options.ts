import { InputProblem } from './input-problem.ts';
import type { TypedForm } from './typed-form.ts';

/** What can be typed beside the numbers, each as it was typed. */
export interface TypedOptions {
  readonly measure?: string;
  readonly level?: string;
  readonly p?: string;
  readonly oneSided?: boolean;
  readonly se?: string;
  readonly z?: string;
  readonly wald?: string;
  readonly ratio?: string;
  readonly printed?: string;
  readonly baseline?: string;
  readonly crude?: boolean;
  readonly events?: string;
  readonly others?: string;
}

const BELONGING: Readonly<Record<TypedForm, readonly (keyof TypedOptions)[]>> = {
  ratio: ['measure', 'level', 'p', 'oneSided'],
  difference: ['measure', 'level', 'p', 'oneSided'],
  coefficient: ['level', 'p', 'oneSided', 'se', 'z', 'wald', 'ratio'],
  counts: ['level', 'printed'],
  risk: ['measure', 'level', 'baseline', 'crude'],
  compare: ['measure', 'level'],
  discrimination: ['level', 'events', 'others'],
  text: ['level', 'p', 'oneSided', 'baseline', 'crude', 'events', 'others'],
};

const ALL = [...new Set(Object.values(BELONGING).flat())];

/** Refuses an option that says nothing of what is asked, with the forms that it belongs to. */
export function refuseStrangers(form: TypedForm, options: TypedOptions): void {
  const strange = ALL.find((name) =>
    options[name] !== undefined && options[name] !== false && !BELONGING[form].includes(name));
  if (strange === undefined) return;
  const homes = (Object.keys(BELONGING) as TypedForm[])
    .filter((home) => home !== 'text' && BELONGING[home].includes(strange));
  const here = form === 'text' ? 'a result pasted whole' : `recompute ${form}`;
  throw new InputProblem(`${typedAs(strange)} does not belong to ${here} but to recompute `
    + `${homes.join(', ')}: leave it out, or name the form.`);
}

/** An option as it is typed: "--one-sided". */
function typedAs(name: keyof TypedOptions): string {
  return `--${name.replace(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`)}`;
}
