import type { Section } from '../model/index.ts';

/**
 * A section by its heading as printed, without the colon or stop that ends it, or
 * by its role: "Results"; null where neither is known.
 */
export function sectionName({ heading, role }: Section): string | null {
  const printed = heading.replace(/\s+/g, ' ').replace(/[\s:.]+$/, '').trim();
  if (printed !== '') return printed;
  return role === 'other' ? null : role.charAt(0).toUpperCase() + role.slice(1);
}
