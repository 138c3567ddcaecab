/*
 * Names of elements. Word writes them with the prefixes "w:" and "m:", other
 * programs with prefixes of their own; what counts is the namespace.
 */

const NAMESPACES: readonly (readonly [prefix: string, address: RegExp])[] = [
  ['w', /\/wordprocessingml\/(?:2006\/)?main$/],
  ['m', /\/officeDocument\/(?:2006\/)?math$/],
  ['mc', /\/markup-compatibility\/2006$/],
];

/** Prefixes as a file writes them, and the usual ones that they stand for. */
export type Prefixes = ReadonlyMap<string, string>;

/** The prefixes that a root element declares. */
export function prefixesOf(attributes: Readonly<Record<string, string>>): Prefixes {
  const prefixes = new Map<string, string>();
  for (const [name, address] of Object.entries(attributes)) {
    const own = /^xmlns(?::(.+))?$/.exec(name);
    const usual = NAMESPACES.find(([, pattern]) => pattern.test(address))?.[0];
    if (own !== null && usual !== undefined) prefixes.set(own[1] ?? '', usual);
  }
  return prefixes;
}

/** An element's or attribute's usual name: "w:p" for "ns0:p" where ns0 is Word's namespace. */
export function usualName(name: string, prefixes: Prefixes): string {
  const colon = name.indexOf(':');
  const usual = prefixes.get(colon < 0 ? '' : name.slice(0, colon));
  return usual === undefined ? name : `${usual}:${name.slice(colon + 1)}`;
}

/** Attributes by their local names: `{val: "Heading1"}` for `w:val="Heading1"`. */
export function localAttributes(
  attributes: Readonly<Record<string, string>>,
): Readonly<Record<string, string>> {
  const local: Record<string, string> = Object.create(null) as Record<string, string>;
  for (const [name, value] of Object.entries(attributes)) {
    local[name.slice(name.indexOf(':') + 1)] = value;
  }
  return local;
}
