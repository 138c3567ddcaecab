import type { Mark } from '../../model/index.ts';
import type { Look } from '../told.ts';

/** How words are set; what is absent is left as the style around it says. */
export interface Properties {
  readonly mark?: Mark['kind'] | 'level';
  readonly strong?: boolean;
  readonly emphasis?: boolean;
  readonly hidden?: boolean;
}

/** Nothing said of how words are set. */
export const NO_PROPERTIES: Properties = {};

/** Properties with what one of Word's elements adds: `<w:b/>`, `<w:vertAlign w:val="…"/>`. */
export function applyProperty(
  properties: Properties,
  element: string,
  value: string | undefined,
): Properties {
  switch (element) {
    case 'w:b':
      return { ...properties, strong: isOn(value) };
    case 'w:i':
      return { ...properties, emphasis: isOn(value) };
    case 'w:vanish':
      return { ...properties, hidden: isOn(value) };
    case 'w:vertAlign':
      return { ...properties, mark: markFrom(value) };
    default:
      return properties;
  }
}

function isOn(value: string | undefined): boolean {
  return value === undefined || !/^(?:0|false|off)$/.test(value);
}

function markFrom(value: string | undefined): Mark['kind'] | 'level' {
  return value === 'superscript' || value === 'subscript' ? value : 'level';
}

/** The look that properties give, if any. */
export function lookOf({ strong, emphasis }: Properties): Look | undefined {
  if (strong === true) return 'strong';
  return emphasis === true ? 'emphasis' : undefined;
}
