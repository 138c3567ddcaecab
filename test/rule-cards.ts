import type { Example, Rule } from '../src/model/index.ts';

/** What the rules look at, in words for a reader of the list. */
const READS: Readonly<Record<Rule['reads'], string>> = {
  ratio: 'each ratio',
  coefficient: 'each coefficient',
  difference: 'each difference',
  proportion: 'each proportion',
  discrimination: 'each area under a curve',
  test: 'each test statistic',
  other: 'each other estimate',
  manuscript: 'the whole manuscript',
};

/** All the cards as one Markdown document, which is kept as rules/README.md. */
export function cardsInMarkdown(rules: readonly Rule[]): string {
  return [
    '# The rules',
    'Made from the cards in this folder by `npm run accept`; change the cards, not this page.',
    'A rule compares printed numbers and never says who or what is at fault. It answers that '
      + 'they agree, that they disagree, or that it cannot tell; each card lists what may '
      + 'innocently explain a disagreement. The grades: a **contradiction** is reconciled by no '
      + 'rounding and no method; a **discrepancy** is not reproduced by the standard method, '
      + 'though a named other might; a **caution** leaves the numbers standing and asks about '
      + 'the words.',
    rules.map(({ id, question }) => `- [${id}](#${id}): ${question}`).join('\n'),
    ...rules.map(cardInMarkdown),
    '',
  ].join('\n\n').trimEnd().concat('\n');
}

function cardInMarkdown(rule: Rule): string {
  return [
    `## ${rule.id}`,
    `**${rule.question}**`,
    rule.why,
    `Reads ${READS[rule.reads]}. Grade: ${rule.grade}.`,
    `Source: ${rule.source}`,
    'May innocently explain it:',
    rule.innocent.map((explanation) => `- ${explanation}`).join('\n'),
    'Examples:',
    rule.examples.map(exampleInMarkdown).join('\n'),
  ].join('\n\n');
}

function exampleInMarkdown({ text, outcome, note }: Example): string {
  return `- “${inOneLine(text)}” **${outcome}**: ${note}`;
}

/** A pasted table in one line: its columns parted by bars, its rows by slashes. */
function inOneLine(text: string): string {
  return text.replaceAll('\t', ' | ').replaceAll('\n', ' / ');
}
