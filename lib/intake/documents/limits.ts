/** Levels within one another, and characters of one tag or text, beyond which a document is no set of time series but a
 *  means to fill the memory. */
export const DEEPEST = 200;
export const LONGEST_PIECE = 1 << 20;

/** What to do about a document beyond them. */
export const CHECK_DOCUMENT = 'Check that it is a document of time series';
