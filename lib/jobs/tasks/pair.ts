import { comparePair, type PairSite, type PairTerms } from '../../region/pair.ts';
import type { PairComparison } from '../../region/pair-types.ts';

/** A station against references. In a worker, for a serial correction may resample thousands of times. */
export function pair(task: {
  station: PairSite;
  references: PairSite[];
  terms: PairTerms;
  seed: string;
}): PairComparison {
  return comparePair(task.station, task.references, task.terms, task.seed);
}
