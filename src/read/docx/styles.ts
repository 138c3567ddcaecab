import type { BlockKind } from '../../model/index.ts';
import { readMarkup } from '../markup.ts';
import { localAttributes, type Prefixes, prefixesOf, usualName } from './names.ts';
import { applyProperty, NO_PROPERTIES, type Properties } from './properties.ts';

/** A style: what its paragraphs are, and how its words are set. */
export interface Style {
  readonly kind?: ParagraphKind;
  readonly properties: Properties;
}

/** What a style makes of a paragraph; a plain one has none of these. */
export type ParagraphKind = Extract<BlockKind, 'title' | 'heading' | 'caption' | 'furniture'>;

/** The styles of a file, by their ids. */
export type Styles = ReadonlyMap<string, Style>;

interface Draft {
  readonly id: string;
  name: string;
  basedOn: string | undefined;
  outlined: boolean;
  properties: Properties;
}

/** Reads a file's styles. Names are Word's own English ones in files of any language. */
export function stylesOf(xml: string): Styles {
  const drafts = draftsOf(xml);
  return new Map([...drafts.keys()].map((id) => [id, styleOf(id, drafts)]));
}

function draftsOf(xml: string): ReadonlyMap<string, Draft> {
  const drafts = new Map<string, Draft>();
  let prefixes: Prefixes | undefined;
  let draft: Draft | undefined;
  readMarkup(xml, 'xml', {
    open: (tag, written) => {
      prefixes ??= prefixesOf(written);
      const attributes = localAttributes(written);
      const name = usualName(tag, prefixes);
      if (name === 'w:style') {
        const id = attributes['styleId'] ?? '';
        draft = { id, name: '', basedOn: undefined, outlined: false, properties: NO_PROPERTIES };
        drafts.set(id, draft);
      } else if (draft !== undefined) describe(draft, name, attributes);
    },
    text: () => {},
    close: (tag) => {
      if (prefixes !== undefined && usualName(tag, prefixes) === 'w:style') draft = undefined;
    },
  });
  return drafts;
}

function describe(draft: Draft, name: string, attributes: Readonly<Record<string, string>>): void {
  const { val } = attributes;
  if (name === 'w:name') draft.name = (val ?? '').toLowerCase();
  else if (name === 'w:basedOn') draft.basedOn = val;
  else if (name === 'w:outlineLvl') draft.outlined = Number(val) < 9;
  else draft.properties = applyProperty(draft.properties, name, val);
}

/** Styles are based on others; a chain longer than this is a ring. */
const LONGEST_CHAIN = 12;

function styleOf(id: string, drafts: ReadonlyMap<string, Draft>): Style {
  const chain: Draft[] = [];
  for (let at = drafts.get(id); at !== undefined && chain.length < LONGEST_CHAIN;) {
    chain.push(at);
    at = at.basedOn === undefined ? undefined : drafts.get(at.basedOn);
  }
  const kind = chain.map(kindOf).find((found) => found !== undefined);
  const properties = chain.reduceRight(
    (all, draft) => ({ ...all, ...draft.properties }),
    NO_PROPERTIES,
  );
  return { properties, ...(kind === undefined ? {} : { kind }) };
}

function kindOf({ name, outlined }: Draft): ParagraphKind | undefined {
  if (name === 'title') return 'title';
  if (/^(?:heading|head) ?\d/.test(name) || outlined) return 'heading';
  if (name === 'caption') return 'caption';
  return /^(?:toc|index|table of figures)\b/.test(name) ? 'furniture' : undefined;
}
