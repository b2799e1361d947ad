import { SHARED_FLOW } from '../../region/independent-set.ts';
import { type CorrelatedPair, correlatedPairs } from '../../statistics/correlated-pairs.ts';

/** Five years of weeks that both have: less says too little. */
const FEWEST_WEEKS = 260;

/** Pairs of stations, by place, whose weekly flows go together; those of which the first one is in [from, to). */
export function correlatedFlows(task: {
  /** shared between threads: station by station, `weeks` values each */
  values: Float32Array;
  weeks: number;
  from: number;
  to: number;
}): CorrelatedPair[] {
  const { values, weeks, from, to } = task;
  return correlatedPairs({ values, times: weeks, above: SHARED_FLOW, fewest: FEWEST_WEEKS, from, to });
}
