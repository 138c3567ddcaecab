import type { Interval, Printed, Reading, Result, Span } from '../model/index.ts';
import { resultsWithin, type Saying, sayings } from './sayings.ts';

/** An area under the curve or C statistic in prose, with the words that go with it. */
export interface AreaInText {
  readonly value: Printed;
  readonly interval?: Interval;
  readonly result?: Result;
  readonly span: Span;
  /** The clause it stands in, in one line: where a label such as "excellent" is looked for. */
  readonly words: string;
}

/** The name of an area, and its value: names of drugs' curves over time have other units. */
// AUC 0.71      area under the ROC curve of 0.86 (      C statistic was 72.3%
const AREA = new RegExp(
  '\\b(?:AUROCs?|AUCs?|AUC-ROC|ROC[ -]AUC|[Cc][- ](?:statistics?|index|indices)'
    + '|concordance (?:index|statistic)'
    + '|area under (?:the )?(?:ROC'
    + '|receiver[ -]operating[ -]characteristics?)? ?(?:\\(ROC\\) '
    + ')?curve(?: \\([A-Za-z ]{2,8}\\))?)'
    + '(?:[ ,:=(]|\\bof\\b|\\bwas\\b|\\bis\\b|\\bwere\\b|\\bvalue\\b|\\bwas only\\b'
    + '|\\bequal to\\b|[-–]value|for the model|for this model)*'
    + '(0?[.·]\\d{2,4}|1\\.00?|\\d{2}\\.\\d+\\s?%|\\d{2}\\s?%)',
  'g',
);

/**
 * Areas under the curve in the prose, whether or not an interval is printed: "the AUC of
 * 0.54 (95% CI 0.47–0.61)" and "discrimination was excellent (AUC 0.71)".
 */
export function areasInText(reading: Reading): readonly AreaInText[] {
  return sayings(reading, AREA).flatMap((saying) => {
    const value = valueOf(saying);
    if (value === undefined) return [];
    const result = resultsWithin(reading, saying.sentenceSpan)
      .find(({ estimate }) => estimate?.span.start === value.span.start);
    return [{
      value,
      span: result === undefined ? saying.span
        : { start: saying.span.start, end: Math.max(saying.span.end, result.span.end) },
      words: clauseOf(reading, saying),
      ...(result === undefined ? {} : { result }),
      ...(result?.interval === undefined ? {} : { interval: result.interval }),
    }];
  });
}

function valueOf({ span, parts: [number] }: Saying): Printed | undefined {
  if (number === undefined) return undefined;
  const text = number.replace(/\s?%$/, '');
  const plain = text.replace('·', '.');
  const start = span.end - number.length;
  return {
    text,
    plain,
    value: Number(plain),
    decimals: plain.split('.')[1]?.length ?? 0,
    percent: number.endsWith('%'),
    span: { start, end: start + text.length },
  };
}

/** How far a clause is followed from the number, in characters. */
const REACH = 140;

const CLAUSE_END = /;|\bbut\b|\bwhereas\b|\bAUC\b/;

/** The words around an area up to the next semicolon, "but" or another area. */
function clauseOf({ manuscript }: Reading, { span, sentenceSpan }: Saying): string {
  const from = Math.max(sentenceSpan.start, span.start - REACH);
  const to = Math.min(sentenceSpan.end, span.end + REACH);
  const before = manuscript.text.slice(from, span.start).split(CLAUSE_END).at(-1) ?? '';
  const behind = manuscript.text.slice(span.end, to).split(CLAUSE_END)[0] ?? '';
  return `${before} ${behind}`.replace(/\s+/g, ' ').trim();
}
