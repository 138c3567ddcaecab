/** Anything with words: tokens as the lexer gives them, or items made of them. */
export interface Worded {
  readonly kind: string;
  readonly word?: string;
}

/** A phrase found in tokens: its meaning, and the index after its last token. */
export interface Found<Meaning> {
  readonly meaning: Meaning;
  readonly end: number;
}

interface Node<Meaning> {
  readonly next: Map<string, Node<Meaning>>;
  meaning: Meaning | undefined;
}

/** Phrases by their words, so that looking one up costs no more than its length. */
export type Phrasebook<Meaning> = Node<Meaning>;

/**
 * Builds a phrasebook from lines such as "odds ratio | odds ratios" and their
 * meanings. Words are in lower case; hyphens between words make no difference.
 */
export function phrasebook<Meaning>(
  entries: readonly (readonly [string, Meaning])[],
): Phrasebook<Meaning> {
  const root: Node<Meaning> = { next: new Map(), meaning: undefined };
  for (const [phrases, meaning] of entries) {
    for (const phrase of phrases.split('|')) add(root, phrase.trim().split(/[\s-]+/), meaning);
  }
  return root;
}

function add<Meaning>(root: Node<Meaning>, words: readonly string[], meaning: Meaning): void {
  let node = root;
  for (const word of words) {
    let next = node.next.get(word);
    if (next === undefined) {
      next = { next: new Map(), meaning: undefined };
      node.next.set(word, next);
    }
    node = next;
  }
  node.meaning = meaning;
}

/** The longest phrase of the book that begins at token `at`. */
export function findPhrase<Meaning>(
  book: Phrasebook<Meaning>,
  tokens: readonly Worded[],
  at: number,
): Found<Meaning> | undefined {
  let node = book.next.get(tokens[at]?.word ?? '');
  let found: Found<Meaning> | undefined;
  let index = at;
  while (node !== undefined) {
    if (node.meaning !== undefined) found = { meaning: node.meaning, end: index + 1 };
    if (node.next.size === 0) break;
    index++;
    if (tokens[index]?.kind === 'dash') index++;
    node = node.next.get(tokens[index]?.word ?? '');
  }
  return found;
}
