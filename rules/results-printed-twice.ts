import {
  agrees,
  blockAt,
  describePlace,
  disagrees,
  defineManuscriptRule,
  drawersOf,
  type FullRatio,
  fullRatios,
  type Judgement,
  limitsInWords,
  limitsStand,
  type Lookup,
  type Member,
  memberOf,
  membersAlike,
  otherTestNamed,
  overlap,
  placeOf,
  probabilitiesOf,
  type PValue,
  quote,
  type Reading,
  samePrint,
  spansOf,
  type Table,
  tellingDigits,
  unrounded,
  type Verdict,
  wordsAround,
  wordsShared,
} from '../src/authoring.ts';

export default defineManuscriptRule({
  id: 'results-printed-twice',
  question: 'Is a result that is printed twice printed alike?',
  why: `
    The abstract, the text and the tables often print one result, copied by hand. Where two of
    its three numbers are the same in both places and the third is not, one of the places
    shows another number than was meant, unless they are two analyses.
  `,
  source: `
    Pitkin RM, Branagan MA, Burmeister LF. Accuracy of data in abstracts of published research
    articles. JAMA 1999;281:1110–1111, found data in abstracts that the article gives otherwise or
    not at all in 18% to 68% of articles.
  `,
  innocent: [
    'The two places print two analyses: another model, another set of people, imputed data.',
    'The two places print results of two outcomes or groups that happen to be alike.',
    'One of the two was rounded from a number that had been rounded before.',
  ],
  grade: 'discrepancy',

  judge(reading) {
    const ratios = fullRatios(reading);
    const similar = drawersOf(ratios);
    return ratios.filter(({ zone }) => zone !== 'table').flatMap((one): readonly Judgement[] => {
      const verdict = judgeOne(one, similar, reading);
      if (verdict === undefined) return [];
      const { result, estimate, interval: { lower, upper } } = one;
      const marks = spansOf([estimate, lower, upper]);
      return [{ verdict, span: result.span, marks, result }];
    });
  },

  comment: (words, { because }) => `
    For “${words}”: ${because}. If both report the same analysis, could the authors make them
    agree, and if not, say in the text how they differ?
  `,

  examples: [
    {
      text: 'Abstract\n\nTarring was associated with cough (OR 1.59, 95% CI 1.05 to 2.41).\n\n'
        + 'Results\n\nThe odds of cough were higher after tarring (OR 1.59, 95% CI 1.05 to 2.41).',
      outcome: 'agrees',
      note: 'all three numbers are the same',
    },
    {
      text: 'Abstract\n\nTarring was associated with cough (OR 1.59, 95% CI 1.05 to 2.14).\n\n'
        + 'Results\n\nThe odds of cough were higher after tarring (OR 1.59, 95% CI 1.05 to 2.41).',
      outcome: 'disagrees',
      note: '2.14 in the abstract, 2.41 in the text',
    },
    {
      text: 'Abstract\n\nTarring was associated with cough (OR 1.6, 95% CI 1.1 to 2.4).\n\n'
        + 'Results\n\nThe odds of cough were higher after tarring (OR 1.59, 95% CI 1.05 to 2.41).',
      outcome: 'agrees',
      note: 'the abstract is rounded to one decimal',
    },
    {
      text: 'Abstract\n\nTarring was associated with cough (OR 1.95, 95% CI 1.05 to 2.41).\n\n'
        + 'Results\n\nThe odds of cough were higher after tarring (OR 1.59, 95% CI 1.05 to 2.41).',
      outcome: 'disagrees',
      note: '1.95 in the abstract, 1.59 in the text, between the same limits',
    },
  ],
});

/** Of more ratios than this that share two numbers none tells anything. */
const MOST_ASKED = 12;

function judgeOne(one: FullRatio, similar: Lookup, reading: Reading): Verdict | undefined {
  const others = similar(one).filter((other) => isElsewhere(one, other, reading));
  const same = others.filter((other) => membersAlike(one, other).length === 3);
  if (same.length > 0 && !mayHaveTable(one, same)) return judgePs(one, same, reading) ?? agrees;
  const asked = others.filter((other) => membersAlike(one, other).length === 2
    && (same.length === 0 || other.zone === 'table'));
  const near = asked.slice(0, MOST_ASKED).filter((other) =>
    isCandidate(one, other, similar, reading, same.length > 0));
  const [first] = near;
  if (first === undefined || !near.every((other) => membersAlike(first, other).length === 3)) {
    return same.length > 0 ? judgePs(one, same, reading) ?? agrees : undefined;
  }
  return isToldThere(one, first) ? undefined : numbersDiffer(one, first, reading);
}

/** Abstract and text agree, and a table may still print another number: the text is asked. */
function mayHaveTable(one: FullRatio, same: readonly FullRatio[]): boolean {
  return one.zone === 'prose' && same.every(({ zone }) => zone !== 'table');
}

/** Of two places in prose the first is asked about, the abstract before any other. */
function isToldThere(one: FullRatio, other: FullRatio): boolean {
  if (other.zone === 'table' || one.zone === 'abstract') return false;
  return other.zone === 'abstract' || other.result.span.start < one.result.span.start;
}

/** Two mentions in one paragraph are mostly two results. */
function isElsewhere(one: FullRatio, other: FullRatio, reading: Reading): boolean {
  if (one.zone === 'abstract' && other.zone === 'abstract') return false;
  if (other.zone === 'table') return true;
  return blockAt(reading, one.result.span) !== blockAt(reading, other.result.span);
}

/** So many digits of the two shared numbers tell them from others without any words. */
const TELLING = 7;

/** Whether the other is plainly meant to be the same result, with one number printed otherwise. */
function isCandidate(
  one: FullRatio,
  other: FullRatio,
  similar: Lookup,
  reading: Reading,
  isPrintedAlike: boolean,
): boolean {
  if (!mayBeSameMeasure(one, other) || areTwoModels(one, other)) return false;
  const digits = membersAlike(one, other).map((member) => tellingDigits(memberOf(one, member)));
  const sum = digits.reduce((so, count) => so + count, 0);
  if (Math.min(...digits) < 1 || sum < 3) return false;
  const shared = wordsShared(wordsOf(one, reading), wordsOf(other, reading));
  if (shared === 0 && sum < TELLING) return false;
  if (stands(other) !== stands(one)) return sum >= 4 || shared >= 2;
  if (sum < 4 || hasTwin(other, one, similar)) return false;
  if (isPrintedAlike) return shared > 0;
  return one.zone === 'abstract' || limitsAlike(one, other) || !stands(one)
    || samePs(one.result.p, other.result.p);
}

/** Whether the other's numbers are printed in full where the first stands: then these are two. */
function hasTwin(other: FullRatio, one: FullRatio, similar: Lookup): boolean {
  return similar(other).some((twin) => membersAlike(other, twin).length === 3
    && (one.zone === 'abstract' ? twin.zone === 'abstract' : twin.zone !== 'table'));
}

function stands({ estimate, interval }: FullRatio): boolean {
  return limitsStand(estimate, interval, 'binary');
}

function limitsAlike(one: FullRatio, other: FullRatio): boolean {
  return !membersAlike(one, other).includes('estimate');
}

function samePs(one: PValue | undefined, other: PValue | undefined): boolean {
  return one?.relation === '=' && other?.relation === '='
    && one.printed.decimals >= 2 && samePrint(one.printed, other.printed);
}

/** A crude and an adjusted ratio are two results. */
function areTwoModels({ result: one }: FullRatio, { result: other }: FullRatio): boolean {
  return one.adjusted !== undefined && other.adjusted !== undefined
    && one.adjusted !== other.adjusted;
}

/** Hazard ratios are called relative risks here and there; an odds ratio is another number. */
function mayBeSameMeasure({ result: one }: FullRatio, { result: other }: FullRatio): boolean {
  const isLoose = one.measure === 'ratio' || other.measure === 'ratio';
  return isLoose || one.measure === other.measure;
}

/** The words by which a reader knows what a result is of: those before it, or its row. */
function wordsOf({ result }: FullRatio, reading: Reading): string {
  const { cell, about } = result;
  const said = Object.values(about).join(' ');
  return cell === undefined
    ? `${said} ${wordsAround(reading, result.span, 200)}`
    : `${said} ${cell.row} ${cell.column} ${captionOf(cell.table, reading)}`;
}

function captionOf({ caption }: Table, { manuscript }: Reading): string {
  return caption === undefined ? '' : quote(manuscript.text, caption);
}

const NAMES: Readonly<Record<Member, string>> = {
  estimate: 'estimate',
  lower: 'lower limit',
  upper: 'upper limit',
};

function numbersDiffer(one: FullRatio, other: FullRatio, reading: Reading): Verdict {
  const alike = membersAlike(one, other);
  const odd = (['estimate', 'lower', 'upper'] as const).find((member) => !alike.includes(member));
  if (odd === undefined) return agrees;
  const [here, there] = [memberOf(one, odd), memberOf(other, odd)];
  const place = placeInWords(other, reading);
  const isSlip = limitsAlike(one, other) || stands(one) !== stands(other);
  return disagrees(
    `the ${NAMES[odd]} is ${here.plain} here and ${there.plain} in ${place}, beside the same `
      + alike.map((member) => `${NAMES[member]} ${memberOf(one, member).plain}`).join(' and '),
    {
      recomputed: { quantity: NAMES[odd], range: unrounded(there) },
      working: [`here: ${inWords(one)}`, `${place}: ${inWords(other)}`],
      ...(isSlip ? { grade: 'contradiction' } : {}),
    },
  );
}

function inWords({ estimate, interval }: FullRatio): string {
  return `${estimate.plain} (${limitsInWords(interval)})`;
}

function placeInWords({ result, zone }: FullRatio, reading: Reading): string {
  if (zone === 'abstract') return 'the abstract';
  const place = placeOf(reading.manuscript, result.span);
  const row = result.cell?.row ?? '';
  if (result.cell !== undefined) {
    return `${place.table?.label || 'the table'}${row === '' ? '' : ` (${row.slice(0, 60)})`}`;
  }
  const words = describePlace(place);
  return words === 'place unknown' ? 'the text' : `the text (${words})`;
}

/** The same three numbers cannot have two p-values of one test. */
function judgePs(
  one: FullRatio,
  same: readonly FullRatio[],
  reading: Reading,
): Verdict | undefined {
  const { p } = one.result;
  const ps = same.flatMap((other) =>
    (isPlain(other.result.p) ? [{ other, p: other.result.p }] : []));
  const [first] = ps;
  if (!isPlain(p) || first === undefined || !isTelling(one)) return undefined;
  if (isToldThere(one, first.other)) return undefined;
  if (ps.some(({ p: other }) => mayBeSameP(p, other))) return undefined;
  if (wordsShared(wordsOf(one, reading), wordsOf(first.other, reading)) === 0) return undefined;
  const isOther = ({ span }: PValue): boolean => otherTestNamed(reading, span) !== undefined;
  if (isOther(p) || isOther(first.p)) return undefined;
  const place = placeInWords(first.other, reading);
  return disagrees(
    `p is ${pText(p)} here and ${pText(first.p)} in ${place}, beside the same estimate and limits`,
    { working: [`here: ${inWords(one)}, p ${pText(p)}`, `${place}: p ${pText(first.p)}`] },
  );
}

function isPlain(p: PValue | undefined): p is PValue {
  return p !== undefined && p.tests === 'result';
}

function isTelling(one: FullRatio): boolean {
  return (['estimate', 'lower', 'upper'] as const)
    .reduce((so, member) => so + tellingDigits(memberOf(one, member)), 0) >= 6;
}

function mayBeSameP(one: PValue, other: PValue): boolean {
  const [first, second] = [probabilitiesOf(one), probabilitiesOf(other)];
  return first === undefined || second === undefined || overlap(first, second);
}

function pText({ relation, printed }: PValue): string {
  return `${relation} ${printed.plain}`;
}
