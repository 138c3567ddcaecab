import type { SectionRole } from '../model/index.ts';

/**
 * What a heading opens. `rank` is its usual place in an article and in a
 * structured abstract. Minor words ("Patients", "Outcomes") also head parts of
 * other sections: under "Results" they do not lead back to the methods.
 */
export interface KnownHeading {
  readonly role: SectionRole;
  readonly rank: number;
  readonly minor: boolean;
}

/** Headings by what they open, with their rank; each line of words is one group of patterns. */
const WORDS: readonly (readonly [SectionRole, rank: number, words: readonly string[]])[] = [
  ['abstract', 0, ['(?:structured )?abstract', 'summary', 'synopsis']],
  [
    'introduction',
    1,
    [
      'introduction',
      'background',
      'rationale',
      'context',
      'importance',
      'question',
      'hypothesis',
      '(?:study )?objectives?',
      'aims?(?: of the study)?',
      'purpose',
      '(?:background|introduction|context) (?:and|\\/) (?:aims?|objectives?|purpose|methods)',
      '(?:aims?|objectives?) (?:and|\\/) (?:aims?|objectives?|purpose|methods)',
    ],
  ],
  [
    'methods',
    2,
    [
      'methods?',
      'methodology',
      '(?:material|patient|subject|participant|population|sample|design)s? and (?:methods?|methodology)',
      'methods and (?:materials|findings)',
      'methodology ?\\/ ?principal findings',
      '(?:study |research )?design(?: and (?:setting|methods|participants|patients))?',
      'design,? settings?,? and (?:participants|patients)',
      'study design, size, duration',
      'data sources?(?: and study selection)?',
      'study selection',
      'data extraction(?: and synthesis)?',
      'data synthesis',
      'setting(?:s|\\(s\\))?',
      'study population',
      'participants?',
      'subjects',
      'participants\\/materials, setting, methods',
      'patient(?:s|\\(s\\))?',
      'exposures?',
      'intervention(?:s|\\(s\\))?',
      '(?:main |primary )?outcomes?(?: and)? measures?(?:ments)?',
      'main outcome measures?\\(s\\)',
      'main outcomes and measures',
      'measurements?',
      'statistical (?:analysis|analyses|methods)',
    ],
  ],
  [
    'results',
    3,
    [
      'result(?:s|\\(s\\))?',
      '(?:main |principal |key )?findings',
      '(?:main |principal )results',
      'main results and the role of chance',
      'results and discussion',
      'results and limitations',
      'measurements and main results',
    ],
  ],
  [
    'discussion',
    4,
    [
      'discussions?',
      'conclusion(?:s|\\(s\\))?',
      'interpretation',
      'comments?',
      'significance',
      '(?:discussion|summary|comments?) and conclusions?',
      'conclusions? and relevance',
      'relevance',
      'conclusions? ?\\/ ?(?:significance|interpretation)',
      'meaning',
      'implications',
      'impact',
      '(?:strengths and )?limitations(?:, reasons for caution)?',
      'wider implications of the findings',
    ],
  ],
  [
    'references',
    5,
    [
      'references?(?: and notes)?',
      'bibliography',
      'literature cited',
      'reference list',
      'works cited',
    ],
  ],
  [
    'supplement',
    5,
    [
      'supplement(?:(?:ary|al)? (?:materials?|information|data|files?|appendix))?',
      'supporting information',
      '(?:online )?appendi(?:x|ces)(?: \\w{1,3})?',
      'additional files?',
    ],
  ],
  [
    'other',
    5,
    [
      'key ?words?',
      'mesh terms',
      'acknowledge?ments?',
      'funding(?: source| information| support)?',
      'financial support',
      'sources? of funding',
      'disclosures?',
      'abbreviations',
      'contributors',
      '(?:competing|declaration of(?: competing)?|conflicts? of|disclosure of) interests?',
      'conflict of interest statement',
      "(?:author|authors[’']?) contributions?",
      'author details',
      'data availability(?: statement)?',
      'data sharing',
      'availability of data and materials',
      '(?:clinical )?trial registration(?: number)?',
      'registration',
      'ethics(?: approval| statement)?',
      'ethical approval',
      'consent for publication',
      'study funding\\/competing interest\\(s\\)',
    ],
  ],
];

const KNOWN = WORDS.map(([role, rank, words]) => ({ role, rank, pattern: whole(words) }));

/** All of them in one, so that the many lines that are none are told at once. */
const ANY = whole(WORDS.flatMap(([, , words]) => words));

function whole(words: readonly string[]): RegExp {
  return new RegExp(`^(?:${words.join('|')})$`);
}

/** The longest known heading, with room for a number before it. */
const LONGEST = 70;

/**
 * What the words of a heading open, if they are known: "3. RESULTS" opens the
 * results. Headings begin with a capital letter or a number.
 */
export function knownHeading(words: string): KnownHeading | undefined {
  if (words.length > LONGEST || !/^\s*[A-Z\d]/.test(words)) return undefined;
  const plain = withoutNumber(words)
    .toLowerCase()
    .replace(/\s*&\s*/g, ' and ')
    .replace(/[\s:.–—-]+$/, '')
    .replace(/\s+/g, ' ')
    .trim();
  if (!ANY.test(plain)) return undefined;
  const found = KNOWN.find(({ pattern }) => pattern.test(plain));
  if (found === undefined) return undefined;
  return { role: found.role, rank: found.rank, minor: !MAJOR.test(plain) };
}

const MAJOR = new RegExp(
  'abstract|summary|introduction|background|method|results|discussion|conclusion|reference|' +
    'bibliography|cited',
);

// 3. Results     3.2 Results     III. Results
// ^^             ^^^             ^^^^
const NUMBER = /^(?:\d{1,2}(?:\.\d{1,2}){0,3}\.?|[IVX]{1,4}\.)\s+(?=\S)/;

function withoutNumber(words: string): string {
  return words.trim().replace(NUMBER, '');
}

/** Whether a line is numbered as a heading is: "3.2 Patients and follow-up". */
export function isNumberedHeading(line: string): boolean {
  const words = line.trim();
  return (
    NUMBER.test(words) &&
    words.length <= 90 &&
    /^[A-Z]/.test(withoutNumber(words)) &&
    !/[.,;:]$/.test(words) &&
    !/[=<>%]|\d\.\d{2}/.test(withoutNumber(words))
  );
}

// RESULTS: We found …      Results. We found …     Results – We found …
// ^^^^^^^^                 ^^^^^^^^                ^^^^^^^^^
const LABEL = /^([A-Z][A-Za-z()/,&’' ]{2,58}?)\s?(?::|\.(?=\s+[A-Z0-9])|[–—](?=\s))/;

/**
 * The length of a known label at the start of `line`, with its colon or stop;
 * 0 where there is none. Followed by text it is a heading run into its paragraph.
 */
export function labelLength(line: string): number {
  const match = LABEL.exec(line);
  if (match === null || knownHeading(match[1] as string) === undefined) return 0;
  return match[0].length;
}
