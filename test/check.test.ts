import { describe, expect, test } from 'vitest';
import { agrees, cannotTell, defineRule, disagrees, type Verdict } from '../src/authoring.ts';
import { check } from '../src/check/index.ts';
import type {
  Findings,
  Grade,
  Judgement,
  Manuscript,
  Printed,
  RatioResult,
  Rule,
} from '../src/model/index.ts';

const TEXT = 'First 0.72 (0.58 to 0.98).\nThen 1.59 (1.05\n to 2.41).';

const manuscript: Manuscript = {
  name: 'pasted text',
  format: 'text',
  text: TEXT,
  blocks: [],
  tables: [],
  lines: [
    { span: { start: 0, end: 26 }, number: 1, numbering: 'counted' },
    { span: { start: 27, end: 42 }, number: 2, numbering: 'counted' },
    { span: { start: 43, end: TEXT.length }, number: 3, numbering: 'counted' },
  ],
  pages: [],
  marks: [],
  notices: [],
};

const first = ratio('0.72', '0.58', '0.98');
const second = ratio('1.59', '1.05', '2.41');
const findings: Findings = {
  results: [first, second],
  claims: [],
  counts: [],
  prevalences: [],
};

describe('checking', () => {
  test('turns what disagrees into flags with their place, words and working', () => {
    const verdict = disagrees('they do not centre', { working: ['√(0.58 × 0.98) = 0.75'] });
    const { flags } = check(manuscript, findings, [saying('one', { [first.span.start]: verdict })]);
    expect(flags).toMatchObject([{
      rule: 'one',
      grade: 'discrepancy',
      span: first.span,
      place: { line: 1, numbering: 'counted' },
      because: 'they do not centre',
      working: ['√(0.58 × 0.98) = 0.75'],
      comment: 'On “0.72 (0.58 to 0.98)”.',
      result: first,
    }]);
  });

  test('marks the printed numbers of the result, and quotes words on one line', () => {
    const [flag] = check(manuscript, findings, [always('one', disagrees('…'))]).flags.slice(1);
    expect(flag?.marks.map(({ start, end }) => TEXT.slice(start, end)))
      .toEqual(['1.59', '1.05', '2.41']);
    expect(flag?.comment).toBe('On “1.59 (1.05 to 2.41)”.');
  });

  test('closes a bracket in the quotation that the result leaves open', () => {
    const open: RatioResult = { ...first, span: { start: 6, end: 24 } };
    const { flags } = check(manuscript, { ...findings, results: [open] }, [
      always('one', disagrees('…')),
    ]);
    expect(flags.map(({ comment }) => comment)).toEqual(['On “0.72 (0.58 to 0.98)”.']);
  });

  test('puts the surest flags first, and then keeps reading order', () => {
    const { flags } = check(manuscript, findings, [
      always('mild', disagrees('…'), 'caution'),
      always('sure', disagrees('…'), 'contradiction'),
      always('middling', disagrees('…', { grade: 'discrepancy' }), 'caution'),
    ]);
    expect(flags.map(({ rule, span }) => `${rule} ${span.start}`)).toEqual([
      'sure 6', 'sure 32', 'middling 6', 'middling 32', 'mild 6', 'mild 32',
    ]);
  });

  test('gives the explanations that fit these numbers before the general ones, each once', () => {
    const verdict = disagrees('…', { explanations: ['fits well', 'general'] });
    const [flag] = check(manuscript, findings, [always('one', verdict)]).flags;
    expect(flag?.innocent).toEqual(['fits well', 'general', 'also general']);
  });

  test('counts what agreed and keeps what could not be judged, with why', () => {
    const checked = check(manuscript, findings, [
      saying('one', { [first.span.start]: agrees, [second.span.start]: cannotTell('too coarse') }),
    ]);
    expect(checked.agreed).toBe(1);
    expect(checked.flags).toEqual([]);
    expect(checked.unjudged)
      .toEqual([{ rule: 'one', span: second.span, because: 'too coarse' }]);
  });

  test('says once what a rule says twice of the same result, and says the loudest', () => {
    const judgement = (verdict: Verdict): Judgement =>
      ({ verdict, span: first.span, marks: [], result: first });
    const twice: Rule = {
      ...always('one', agrees),
      judgements: () => [agrees, disagrees('a'), disagrees('b'), agrees].map(judgement),
    };
    const checked = check(manuscript, findings, [twice]);
    expect(checked.flags.map(({ because }) => because)).toEqual(['a']);
    expect(checked.agreed).toBe(0);
  });

  test('is silent where a rule is', () => {
    expect(check(manuscript, findings, [saying('one', {})]))
      .toEqual({ flags: [], unjudged: [], agreed: 0 });
  });
});

describe('a rule about one kind of result', () => {
  test('is not asked about results of another kind', () => {
    const card = cardOf('one', 'caution');
    const rule = defineRule({ ...card, reads: 'difference', judge: () => agrees });
    expect(rule.judgements({ manuscript, findings })).toEqual([]);
  });
});

function cardOf(id: string, grade: Grade) {
  return {
    id,
    question: 'Does it?',
    why: 'Because.',
    source: 'Anon. 1999.',
    innocent: ['general', 'also general'],
    grade,
    comment: (words: string) => `On “${words}”.`,
    examples: [],
  };
}

/** A rule that says the same of every ratio. */
function always(id: string, verdict: Verdict, grade: Grade = 'discrepancy'): Rule {
  return defineRule({ ...cardOf(id, grade), reads: 'ratio', judge: () => verdict });
}

/** A rule that says what is given for the result that starts at an offset. */
function saying(id: string, verdicts: Readonly<Record<number, Verdict>>): Rule {
  return defineRule({
    ...cardOf(id, 'discrepancy'),
    reads: 'ratio',
    judge: ({ span }) => verdicts[span.start],
  });
}

function ratio(estimate: string, lower: string, upper: string): RatioResult {
  const [e, l, u] = [printed(estimate), printed(lower), printed(upper)];
  const span = { start: e.span.start, end: u.span.end + 1 };
  return {
    kind: 'ratio',
    measure: 'HR',
    span,
    about: {},
    inferred: [],
    counts: [],
    cited: false,
    estimate: e,
    interval: { lower: l, upper: u, level: 95, type: 'confidence', span },
  };
}

function printed(text: string): Printed {
  const start = TEXT.indexOf(text);
  return {
    text,
    plain: text,
    value: Number(text),
    decimals: text.split('.')[1]?.length ?? 0,
    percent: false,
    span: { start, end: start + text.length },
  };
}
