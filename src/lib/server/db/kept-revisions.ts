/**
 * Saved revisions that are kept of a plot and of a layout. Runs and plans carry their own copy of what they were made
 * from, so older ones may go.
 */
export const KEPT_REVISIONS = 200;
