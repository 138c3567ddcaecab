import type { Mark } from '../../model/index.ts';
import type { Look } from '../told.ts';

/** Elements whose words no reader of the page sees, or that are no part of its article. */
export const PASSED_OVER: ReadonlySet<string> = new Set([
  'script', 'style', 'template', 'noscript', 'nav', 'svg', 'canvas', 'iframe', 'object',
  'audio', 'video', 'select', 'textarea', 'button', 'dialog', 'datalist', 'map', 'del', 's',
  'strike', 'annotation', 'annotation-xml', 'rt', 'rp', 'title',
]);

/** Elements that begin and end a paragraph of their own. */
export const BLOCKS: ReadonlySet<string> = new Set([
  'p', 'div', 'section', 'article', 'main', 'header', 'footer', 'aside', 'address', 'blockquote',
  'body', 'html', 'center', 'details', 'summary', 'dd', 'dl', 'dt', 'fieldset', 'form', 'hgroup',
  'hr', 'li', 'menu', 'ol', 'ul', 'pre', 'legend', 'search', 'figure', 'figcaption',
]);

/** h1 to h6. */
export const HEADINGS: ReadonlySet<string> = new Set(['h1', 'h2', 'h3', 'h4', 'h5', 'h6']);

/** Parts of a formula that stand raised or lowered, by their place in it, from 0. */
export const RAISED_PARTS: ReadonlyMap<string, readonly (Mark['kind'] | undefined)[]> = new Map([
  ['msup', [undefined, 'superscript']],
  ['msub', [undefined, 'subscript']],
  ['msubsup', [undefined, 'subscript', 'superscript']],
]);

/** Elements that raise, lower or set apart what is in them. */
export const MARKS: ReadonlyMap<string, Mark['kind']> = new Map([
  ['sup', 'superscript'],
  ['sub', 'subscript'],
]);

/** Elements that set apart what is in them, as a heading may be. */
export const LOOKS: ReadonlyMap<string, Look> = new Map([
  ['b', 'strong'], ['strong', 'strong'], ['i', 'emphasis'], ['em', 'emphasis'], ['u', 'emphasis'],
]);

/** Whether an element is hidden by an attribute of its own. */
export function isHidden(attributes: Readonly<Record<string, string>>): boolean {
  if (Object.hasOwn(attributes, 'hidden')) return true;
  if (attributes['aria-hidden'] === 'true') return true;
  return /(?:display\s*:\s*none|visibility\s*:\s*hidden)/i.test(attributes['style'] ?? '');
}
