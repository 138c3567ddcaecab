import { currentFlow, type Reading, say } from './reading.ts';

type Attributes = Readonly<Record<string, string>>;

/** What stands raised or lowered in an equation. */
const MARKS = { 'm:sup': 'superscript', 'm:sub': 'subscript' } as const;

/** Begins what only equations have: χ², brackets, fractions, roots and sums. */
export function openInEquation(reading: Reading, name: string, attributes: Attributes): void {
  const { val } = attributes;
  const brackets = reading.brackets.at(-1);
  switch (name) {
    case 'm:sup':
    case 'm:sub':
      reading.marks.push(MARKS[name]);
      break;
    case 'm:d':
      reading.brackets.push({ open: '(', close: ')', between: '|', parts: 0 });
      break;
    case 'm:begChr':
      if (brackets !== undefined) brackets.open = val ?? '';
      break;
    case 'm:endChr':
      if (brackets !== undefined) brackets.close = val ?? '';
      break;
    case 'm:sepChr':
      if (brackets !== undefined) brackets.between = val ?? '';
      break;
    case 'm:e':
      if (reading.path.at(-2) === 'm:d' && brackets !== undefined) {
        say(reading, brackets.parts++ === 0 ? brackets.open : brackets.between);
      }
      break;
    case 'm:den':
      say(reading, '/');
      break;
    case 'm:rad':
      say(reading, '√');
      break;
    case 'm:chr':
      if (reading.path.at(-2) === 'm:naryPr') say(reading, val ?? '');
      break;
  }
}

/** Ends what only equations have. An equation set apart from the text ends a line. */
export function closeInEquation(reading: Reading, name: string): void {
  switch (name) {
    case 'm:sup':
    case 'm:sub':
      reading.marks.pop();
      break;
    case 'm:d': {
      const brackets = reading.brackets.pop();
      if (brackets !== undefined && brackets.parts > 0) say(reading, brackets.close);
      break;
    }
    case 'm:oMathPara':
      if (currentFlow(reading).kind === 'document') say(reading, ' ');
      break;
  }
}
