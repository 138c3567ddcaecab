import type { Mark } from '../../model/index.ts';
import type { Look } from '../told.ts';

/** What a command makes of an argument. */
export type Role =
  | { readonly kind: 'plain' | 'skip' | 'math' | 'upright' }
  | { readonly kind: 'mark'; readonly mark: Mark['kind'] }
  | { readonly kind: 'look'; readonly look: Look }
  | { readonly kind: 'heading' | 'title' | 'caption' | 'footnote' };

/** Arguments in order, with what is printed between them. */
export type Shape = readonly (Role | string)[];

const PLAIN: Role = { kind: 'plain' };
const SKIP: Role = { kind: 'skip' };
const UPRIGHT: Role = { kind: 'upright' };

const SHAPES: readonly (readonly [shape: Shape, names: string])[] = [
  [[{ kind: 'mark', mark: 'superscript' }], 'textsuperscript tnote textsuperscripts sp'],
  [[{ kind: 'mark', mark: 'subscript' }], 'textsubscript sb'],
  [[{ kind: 'look', look: 'strong' }], 'textbf mathbf boldsymbol bm'],
  [[{ kind: 'look', look: 'emphasis' }], 'textit emph textsl underline uline'],
  [[{ kind: 'heading' }], 'part chapter section subsection subsubsection paragraph subparagraph'],
  [[{ kind: 'title' }], 'title'],
  [[{ kind: 'caption' }], 'caption'],
  [[SKIP, { kind: 'caption' }], 'captionof'],
  [[{ kind: 'footnote' }], 'footnote footnotetext tablefootnote'],
  [[{ kind: 'math' }], 'ensuremath'],
  [[UPRIGHT], 'text textrm textnormal textsf texttt textup textmd textsc mbox mathrm hbox fbox'],
  [[PLAIN], 'operatorname mathit mathsf mathcal makecell shortstack thead hl added num si unit'
    + ' overline MakeUppercase uppercase makebox framebox url nolinkurl path'],
  [['√', PLAIN], 'sqrt'],
  [[PLAIN, '/', PLAIN], 'frac dfrac tfrac cfrac nicefrac sfrac'],
  [[PLAIN, ' ', PLAIN], 'SI qty'],
  [[PLAIN, '–', PLAIN, ' ', PLAIN], 'SIrange qtyrange'],
  [[PLAIN, SKIP], 'replaced'],
  [[SKIP, PLAIN], 'href textcolor colorbox parbox rotatebox raisebox scalebox hyperref'],
  [[SKIP, SKIP, PLAIN], 'resizebox fcolorbox'],
  [[SKIP], 'label includegraphics vspace hspace bibliographystyle bibliography addbibresource'
    + ' pagestyle thispagestyle graphicspath hypersetup geometry color cline cmidrule phantom'
    + ' hphantom vphantom index todo deleted sout st thanks author affil affiliation address email'
    + ' date institute fancyhead fancyfoot captionsetup usepackage documentclass RequirePackage'
    + ' linespread nocite pdfbookmark tag bibinfo citestyle specialrule arrayrulecolor rowcolor'
    + ' cellcolor columncolor vskip hskip rowcolors usetikzlibrary pgfplotsset sisetup'
    + ' orcid corres titlerunning authorrunning ead fntext cortext shorttitle shortauthors'],
  [[SKIP, SKIP], 'setlength addtolength setcounter addtocounter fontsize rule markboth newtheorem'
    + ' newcolumntype addcontentsline'],
  [[SKIP, SKIP, SKIP], 'definecolor newenvironment renewenvironment'],
];

/** Commands with arguments, by their names without a star. */
export const COMMANDS: ReadonlyMap<string, Shape> = new Map(
  SHAPES.flatMap(([shape, names]) => names.split(' ').map((name) => [name, shape] as const)),
);

/** Commands that set the rest of their group in another look. */
export const LOOKS: ReadonlyMap<string, Look | undefined> = new Map<string, Look | undefined>([
  ['bfseries', 'strong'], ['bf', 'strong'], ['itshape', 'emphasis'], ['it', 'emphasis'],
  ['em', 'emphasis'], ['slshape', 'emphasis'], ['normalfont', undefined], ['upshape', undefined],
  ['mdseries', undefined], ['rmfamily', undefined],
]);

/** Environments whose words are no text of the manuscript: comments, listings, drawings. */
export const PASSED_OVER: ReadonlySet<string> = new Set([
  'comment', 'verbatim', 'lstlisting', 'minted', 'tikzpicture', 'filecontents', 'pgfpicture',
  'picture', 'Sinput', 'Scode', 'CCSXML',
]);

/** Environments that set formulas. */
export const FORMULAS: ReadonlySet<string> = new Set([
  'equation', 'align', 'gather', 'multline', 'eqnarray', 'displaymath', 'math', 'flalign',
  'alignat', 'dmath', 'split', 'aligned', 'cases',
]);

/** Environments that set tables, with the arguments before their cells: o "[…]", a "{…}". */
export const TABLES: ReadonlyMap<string, string> = new Map([
  ['tabular', 'oa'], ['tabularx', 'aoa'], ['tabulary', 'aoa'], ['longtable', 'oa'],
  ['supertabular', 'oa'], ['xltabular', 'aoa'], ['tabu', 'a'], ['longtabu', 'a'], ['tblr', 'oa'],
  ['array', 'oa'],
]);

/** Environments that float, and what their captions call them. */
export const FLOATS: ReadonlyMap<string, 'Table' | 'Figure'> = new Map([
  ['table', 'Table'], ['sidewaystable', 'Table'], ['wraptable', 'Table'], ['SCtable', 'Table'],
  ['longtable', 'Table'], ['xltabular', 'Table'], ['figure', 'Figure'],
  ['sidewaysfigure', 'Figure'], ['wrapfigure', 'Figure'], ['SCfigure', 'Figure'],
]);

/** Arguments of other environments that say nothing: a minipage's width, a list's widest label. */
export const ENVIRONMENT_ARGUMENTS: ReadonlyMap<string, string> = new Map([
  ['minipage', 'oooa'], ['thebibliography', 'a'], ['wraptable', 'oaoa'], ['wrapfigure', 'oaoa'],
  ['adjustbox', 'a'], ['multicols', 'a'], ['spacing', 'a'], ['adjustwidth', 'aa'], ['alignat', 'a'],
]);
