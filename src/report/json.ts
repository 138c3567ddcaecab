import type { Examination, Notice } from '../model/index.ts';
import { flagJson } from './flag-json.ts';
import { harmlessJson } from './harmless.ts';
import type { CheckedFileJson, FileJson } from './json-contract.ts';
import type { Multiplier } from './ratio-scale.ts';
import { resultJson } from './result-json.ts';

/** The text of `extract --as json`. */
export function extractJson(all: readonly Examination[], multiplier: Multiplier): string {
  return written(all.map((examination) => fileJson(examination, multiplier)));
}

/** The text of `check --as json`. */
export function checkJson(all: readonly Examination[], multiplier: Multiplier): string {
  return written(all.map((examination): CheckedFileJson => ({
    ...fileJson(examination, multiplier),
    flags: examination.checked.flags.map((flag) => flagJson(examination.manuscript, flag)),
  })));
}

function written(files: readonly FileJson[]): string {
  return `${harmlessJson(JSON.stringify(files, null, 2))}\n`;
}

function fileJson({ manuscript, findings }: Examination, multiplier: Multiplier): FileJson {
  return {
    file: manuscript.name,
    format: manuscript.format,
    notices: manuscript.notices.map(noticeInWords),
    results: findings.results.map((result) => resultJson(manuscript, result, multiplier)),
  };
}

function noticeInWords({ message, page }: Notice): string {
  return page === undefined ? message : `page ${page}: ${message}`;
}
