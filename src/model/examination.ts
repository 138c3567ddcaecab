import type { Checked } from './flag.ts';
import type { Findings } from './findings.ts';
import type { Manuscript } from './manuscript.ts';

/** A manuscript with everything found in it and everything said of that: what reports show. */
export interface Examination {
  readonly manuscript: Manuscript;
  readonly findings: Findings;
  readonly checked: Checked;
}
