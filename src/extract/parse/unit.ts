import type { Item } from './item.ts';

/** Units that follow an amount. A number before one of them is no ratio. */
const UNITS = new Set(('months month years year yrs weeks week days day hours hour h minutes min mg kg '
  + 'g µg μg ml l mm cm m mmol mmhg pmol nmol points point beats units dl bpm pg ng kcal events cases '
  + 'deaths persons patients participants subjects mo yr wk micromol meq iu kj kpa hz ms s sec seconds '
  + 'db copies cells visits admissions episodes infections women men children people').split(' '));

/** Whether an item is a unit, such as "months" or "mmHg". */
export function isUnitWord(item: Item | undefined): boolean {
  return item?.kind === 'word' && UNITS.has(item.word);
}
