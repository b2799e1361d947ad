/** What is wrong with a row of a registry, the value at fault, and what to do about it. */
export interface RowProblem {
  value: string;
  reason: string;
  remedy: string;
}
