import { absence, type Maybe } from './absence.ts';
import type { Margins } from './margins.ts';

/** What can be put to an independent library as well. Degrees of freedom at most 1e4. */
export type DistributionQuestion =
  | { readonly of: 'two-sided t'; readonly t: number; readonly df: number }
  | { readonly of: 'F tail'; readonly f: number; readonly dfs: readonly [number, number] }
  | { readonly of: 't quantile'; readonly lower: number; readonly df: number }
  | { readonly of: 'chi-square quantile'; readonly lower: number; readonly df: number }
  | {
      readonly of: 'beta quantile';
      readonly lower: number;
      readonly shapes: readonly [number, number];
    }
  | { readonly of: 'hypergeometric mass'; readonly count: number; readonly margins: Margins };

/**
 * The answer of jstat, a general library, to a question that this folder answers by
 * itself: for a check of one against the other. t = 2.5 on 10 gives 0.0314468 by both.
 *
 * Only forms that keep their digits are asked (its distribution functions lose the upper
 * tail): about 1e-6 relative. The library is loaded when first asked, and by nothing else.
 */
export async function secondOpinion(question: DistributionQuestion): Promise<Maybe<number>> {
  const { default: { jStat } } = await import('jstat');
  const answer = answerOf(question, jStat);
  return Number.isFinite(answer) ? answer : absence('the other library has no answer either');
}

type Library = Awaited<typeof import('jstat')>['default']['jStat'];

function answerOf(question: DistributionQuestion, jStat: Library): number {
  switch (question.of) {
    case 'two-sided t': {
      const { t, df } = question;
      return jStat.ibeta(df / (df + t * t), df / 2, 0.5);
    }
    case 'F tail': {
      const { f, dfs: [d1, d2] } = question;
      return jStat.ibeta(d2 / (d2 + d1 * f), d2 / 2, d1 / 2);
    }
    case 't quantile':
      return jStat.studentt.inv(question.lower, question.df);
    case 'chi-square quantile':
      return jStat.chisquare.inv(question.lower, question.df);
    case 'beta quantile':
      return jStat.beta.inv(question.lower, ...question.shapes);
    case 'hypergeometric mass': {
      const { marked, unmarked, drawn } = question.margins;
      return jStat.hypgeom.pdf(question.count, marked + unmarked, marked, drawn);
    }
    default:
      return question satisfies never;
  }
}
