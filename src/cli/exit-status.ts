/**
 * How the command ends: nothing flagged, something flagged, or a file that could
 * not be examined. The last outranks the others, since then the answer is incomplete.
 */
export const NOTHING_FLAGGED = 0;
export const FLAGGED = 1;
export const COULD_NOT_RUN = 2;

/** One of the three ways in which the command ends. */
export type ExitStatus = typeof NOTHING_FLAGGED | typeof FLAGGED | typeof COULD_NOT_RUN;
