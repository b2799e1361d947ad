import type { BeyondChance } from './regional-types.ts';

/** In so large a share of regions without any trend the count is at most the bound. */
const BOUND_SHARE = 0.95;

/** A count beside what the same stations count where none has a trend.
 *  @param byChance  counts of the replicates, at least one
 *  @param count     what was found
 *  @throws RangeError without replicates
 *  Source: Livezey & Chen 1983, Mon. Weather Rev. 111:46–59, with counts of stations that depend on each other; p after
 *  Davison & Hinkley 1997, Bootstrap Methods and their Application, section 4.2.
 *  Example: byChance = [0, 0, 1, 3], count = 3 → expected 1, bound 3, p 2/5 */
export function beyondChance(byChance: Uint32Array, count: number): BeyondChance {
  const replicates = byChance.length;
  if (replicates === 0) throw new RangeError('beyondChance: byChance must hold at least one count, got none');
  const most = byChance.reduce((most, each) => Math.max(most, each), 0);
  const having = new Uint32Array(most + 1);
  let sum = 0;
  let asMany = 0;
  for (const each of byChance) {
    having[each]++;
    sum += each;
    if (each >= count) asMany++;
  }
  let bound = 0;
  for (let atMost = having[0]; atMost < BOUND_SHARE * replicates; atMost += having[bound]) bound++;
  return { count, bound, expected: sum / replicates, p: (1 + asMany) / (replicates + 1) };
}
