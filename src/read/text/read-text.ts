import { quote, type Line, type Manuscript, type Notice, type Span } from '../../model/index.ts';
import { withSections } from '../sections.ts';
import { blocksOf, type TextBlock } from './text-blocks.ts';
import { tablesOf } from './text-table.ts';
import { withoutMarginNumbers } from './margin-numbers.ts';
import { sourceLines } from './source-lines.ts';

/**
 * Reads pasted or typed text. Paragraphs end at blank lines, headings and
 * indentation; lines are counted from 1. Only where the paste brought the line
 * numbers of its margin along are those taken out of the text and kept as places.
 */
export function readText(text: string, name: string): Manuscript {
  const unnumbered = withoutMarginNumbers(text);
  return structured(unnumbered?.text ?? text, name, unnumbered?.numbers);
}

function structured(text: string, name: string, numbers?: readonly number[]): Manuscript {
  const spans = sourceLines(text);
  const blocks = blocksOf(text, spans);
  return {
    name,
    format: 'text',
    text,
    blocks: withSections(text, blocks),
    tables: tablesOf(text, blocks),
    lines: linesOf(spans, numbers),
    pages: [],
    marks: [],
    notices: [...noticeOf(numbers), ...lostNotice(text, blocks)],
  };
}

function linesOf(spans: readonly Span[], numbers?: readonly number[]): readonly Line[] {
  return spans.map((span, i) => {
    const number = numbers?.[i];
    if (number === undefined) return { span, number: i + 1, numbering: 'counted' };
    return { span, number, numbering: 'printed' };
  });
}

function noticeOf(numbers?: readonly number[]): readonly Notice[] {
  if (numbers === undefined) return [];
  return [
    {
      message:
        `The numbers ${numbers[0]} to ${numbers.at(-1)} at the beginning of lines ` +
        'were taken as line numbers, not as text.',
    },
  ];
}

const LOST = '\ufffd';

function lostNotice(text: string, blocks: readonly TextBlock[]): readonly Notice[] {
  const lost = blocks.some(({ span }) => quote(text, span).includes(LOST));
  if (!lost) return [];
  return [
    {
      message:
        'Some characters were lost before the text came here (shown as \ufffd); ' +
        'numbers beside them may be incomplete.',
    },
  ];
}
