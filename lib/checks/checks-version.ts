/** Rises with any change in what the checks find: records checked by an earlier version count as unchecked. */
export const CHECKS_VERSION = 1;
