export { checkJson, extractJson } from './json.ts';
export type {
  CheckedFileJson, CountJson, FileJson, FlagJson, PlaceJson, ResultJson, TableJson,
} from './json-contract.ts';
export type { Multiplier } from './ratio-scale.ts';
export { resultsList } from './results-list.ts';
export { ruleCard, ruleList } from './rule-card.ts';
export type { Screen } from './screen.ts';
export { atLeast } from './severity.ts';
export { closing, fileReport, terminalReport, type TerminalOptions } from './terminal.ts';
