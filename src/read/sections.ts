import {
  quote,
  type Block,
  type BlockKind,
  type Section,
  type SectionRole,
  type Span,
} from '../model/index.ts';
import { knownHeading, type KnownHeading } from './headings.ts';

/** A block whose section is not known yet. `runIn` marks a label run into its paragraph. */
export interface Unsectioned {
  readonly kind: BlockKind;
  readonly span: Span;
  readonly runIn?: boolean;
}

interface Reached {
  readonly section: Section;
  /** How far a structured abstract has come; undefined outside abstracts. */
  readonly abstract?: {
    readonly rank: number;
    readonly labelled: boolean;
    readonly begun: boolean;
  };
}

const START: Reached = { section: { role: 'other', heading: '' } };

/**
 * Gives every block its section, by the headings met so far. The labels of a
 * structured abstract stay in the abstract until their order begins again.
 */
export function withSections(text: string, blocks: readonly Unsectioned[]): readonly Block[] {
  let reached = START;
  return blocks.map((block) => {
    reached =
      block.kind === 'heading'
        ? opened(reached, block, quote(text, block.span))
        : begun(reached, block);
    return {
      kind: kindIn(reached.section, block.kind),
      span: block.span,
      section: sectionOf(reached, block),
    };
  });
}

const ELSEWHERE: Section = { role: 'other', heading: '' };

/** Tables and figures that are printed after the references are no part of them. */
function sectionOf({ section }: Reached, { kind }: Unsectioned): Section {
  if (kind === 'title') return { role: 'title', heading: '' };
  return section.role === 'references' && FLOATING.has(kind) ? ELSEWHERE : section;
}

const FLOATING: ReadonlySet<BlockKind> = new Set([
  'table',
  'caption',
  'note',
  'figure',
  'furniture',
]);

function kindIn(section: Section, kind: BlockKind): BlockKind {
  return section.role === 'references' && kind === 'paragraph' ? 'references' : kind;
}

function begun(reached: Reached, { kind }: Unsectioned): Reached {
  if (reached.abstract === undefined || kind !== 'paragraph' || reached.abstract.begun)
    return reached;
  return { ...reached, abstract: { ...reached.abstract, begun: true } };
}

function opened(reached: Reached, { runIn = false }: Unsectioned, words: string): Reached {
  const known = knownHeading(words);
  if (known === undefined) return reached;
  const heading = words.trim();
  if (known.role === 'abstract') return abstractAt(heading);
  const abstract = withinAbstract(reached, known, runIn);
  if (abstract !== undefined) return { section: { role: 'abstract', heading }, abstract };
  if (known.minor && known.rank < rankOf(reached.section.role)) return reached;
  return { section: { role: known.role, heading } };
}

const ORDER: readonly SectionRole[] = [
  'introduction',
  'methods',
  'results',
  'discussion',
  'references',
];

function rankOf(role: SectionRole): number {
  return ORDER.indexOf(role) + 1;
}

function abstractAt(heading: string): Reached {
  return {
    section: { role: 'abstract', heading },
    abstract: { rank: 0, labelled: false, begun: false },
  };
}

/** Where in the abstract a heading leads, or undefined where it leads out of it. */
function withinAbstract(
  { abstract }: Reached,
  { rank }: KnownHeading,
  runIn: boolean,
): Reached['abstract'] {
  if (abstract === undefined || rank > 4) return undefined;
  const startsLabels = !abstract.labelled && (runIn || !abstract.begun);
  if (startsLabels || (abstract.labelled && rank >= abstract.rank)) {
    return { rank, labelled: true, begun: abstract.begun };
  }
  return undefined;
}
