/** Rises with any number that the program computes otherwise than before: part of every result's key, and named in
 *  every file. A golden test fails when a figure moved and this did not. */
export const METHODS_VERSION = 2;
