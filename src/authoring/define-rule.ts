import type {
  Disagreement,
  Example,
  Judgement,
  Printed,
  Reading,
  Result,
  ResultKind,
  ResultOf,
  Rule,
  Verdict,
} from '../model/index.ts';
import { numbersOf, spansOf } from './printed-numbers.ts';
import { flowing } from './wording.ts';

/** What every rule says of itself, whatever it reads. */
interface Card {
  /** The same as the name of the file that holds it. */
  readonly id: string;
  readonly question: string;
  readonly why: string;
  readonly source: string;
  readonly innocent: readonly string[];
  readonly grade: Rule['grade'];
  readonly comment: (words: string, verdict: Disagreement) => string;
  readonly examples: readonly Example[];
}

/** A rule about one result at a time. Silence (`undefined`) is for results it does not read. */
export interface ResultRule<Kind extends ResultKind> extends Card {
  readonly reads: Kind;
  readonly judge: (result: ResultOf<Kind>, reading: Reading) => Verdict | undefined;
  /** The printed numbers in question; without it the estimate, the limits and p. */
  readonly marks?: (result: ResultOf<Kind>) => readonly (Printed | undefined)[];
}

/** A rule that looks at the manuscript as a whole and says which words it judged. */
export interface ManuscriptRule extends Card {
  readonly judge: (reading: Reading) => readonly Judgement[];
}

/**
 * Makes a rule out of a card about one kind of result.
 *
 * A `ResultRule<'ratio'>` is no `ResultRule<ResultKind>`, since its judge takes
 * less than every result. The guard on the kind, here, spares every rule a cast.
 */
export function defineRule<const Kind extends ResultKind>(card: ResultRule<Kind>): Rule {
  const isOfKind = (result: Result): result is ResultOf<Kind> => result.kind === card.reads;
  const { judge, marks = numbersOf, ...rest } = card;
  return {
    ...rest,
    ...inFlowingText(card),
    judgements: (reading) =>
      reading.findings.results.filter(isOfKind).flatMap((result) => {
        const verdict = judge(result, reading);
        return verdict === undefined ? [] : [judgementOf(result, verdict, marks(result))];
      }),
  };
}

/** Makes a rule out of a card about the whole manuscript. */
export function defineManuscriptRule({ judge, ...card }: ManuscriptRule): Rule {
  return { ...card, ...inFlowingText(card), reads: 'manuscript', judgements: judge };
}

/** A card's longer texts without the line breaks and indents of the file that holds it. */
function inFlowingText({ why, source, comment }: Card): Pick<Card, 'why' | 'source' | 'comment'> {
  return {
    why: flowing(why),
    source: flowing(source),
    comment: (words, verdict) => flowing(comment(words, verdict)),
  };
}

function judgementOf(
  result: Result,
  verdict: Verdict,
  marked: readonly (Printed | undefined)[],
): Judgement {
  return { verdict, span: result.span, marks: spansOf(marked), result };
}
