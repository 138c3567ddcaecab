import { absence, type Absence } from './absence.ts';
import { refuseCounts } from './admissible.ts';
import type { Margins } from './margins.ts';
import type { TwoByTwo } from './two-by-two.ts';

/** The number of exposed and of unexposed individuals. */
export function groupTotals(table: TwoByTwo): { exposed: number; unexposed: number } {
  return {
    exposed: table.exposedEvents + table.exposedNonEvents,
    unexposed: table.unexposedEvents + table.unexposedNonEvents,
  };
}

/** The share with the event among exposed and unexposed. Callers have refused empty groups. */
export function groupRisks(table: TwoByTwo): { exposed: number; unexposed: number } {
  const { exposed, unexposed } = groupTotals(table);
  return {
    exposed: table.exposedEvents / exposed,
    unexposed: table.unexposedEvents / unexposed,
  };
}

/** Everyone in the table. */
export function tableTotal(table: TwoByTwo): number {
  const { exposed, unexposed } = groupTotals(table);
  return exposed + unexposed;
}

/** The same table seen through its margins, for exact methods. */
export function marginsOf(table: TwoByTwo): Margins {
  const { exposed, unexposed } = groupTotals(table);
  return {
    marked: exposed,
    unmarked: unexposed,
    drawn: table.exposedEvents + table.unexposedEvents,
  };
}

/** The four counts, each raised by one half (Haldane 1956; Anscombe 1956). */
export function halfAdded(table: TwoByTwo): TwoByTwo {
  return {
    exposedEvents: table.exposedEvents + 0.5,
    exposedNonEvents: table.exposedNonEvents + 0.5,
    unexposedEvents: table.unexposedEvents + 0.5,
    unexposedNonEvents: table.unexposedNonEvents + 0.5,
  };
}

/** Refuses cells that are not counts, and a group with nobody in it. */
export function refuseTable(table: TwoByTwo): Absence | undefined {
  const refusal = refuseCounts({ ...table });
  if (refusal) return refusal;
  const { exposed, unexposed } = groupTotals(table);
  if (exposed === 0 || unexposed === 0) return absence('one of the groups is empty');
  return undefined;
}

/** Refuses also a table in which nobody, or everybody, has the event. */
export function refuseFlatTable(table: TwoByTwo): Absence | undefined {
  const refusal = refuseTable(table);
  if (refusal) return refusal;
  const { marked, unmarked, drawn } = marginsOf(table);
  if (drawn === 0) return absence('nobody has the event');
  if (drawn === marked + unmarked) return absence('everybody has the event');
  return undefined;
}
