import { allRegions, uncheckedRecords } from '../store/checked-records.ts';
import type { RegionRow } from '../store/regions.ts';
import { listStations } from '../store/stations.ts';
import { launchJob } from './live-jobs.ts';
import { runTask, THREADS } from './pool.ts';
import { chunksOf } from './share-out.ts';
import type { CheckCounts } from './tasks/check-records.ts';
import { latestDayOnEarth } from './today.ts';

export const CHECK_JOB = 'check';

/** Where a check stands; what the event stream of its job carries. */
export interface CheckProgress {
  stage: 'checking';
  /** stations checked, of how many */
  done: number;
  stations: number;
  /** 0 to 1 */
  share: number;
}

interface CheckOptions {
  signal?: AbortSignal;
  onProgress?: (progress: CheckProgress) => void;
}

/** Checks the records of some stations in the workers, and stores what is found.
 *  @throws an AbortError when cancelled; what was checked by then is stored */
export async function checkStations(
  stationIds: readonly number[],
  { signal, onProgress }: CheckOptions = {},
): Promise<CheckCounts> {
  const today = latestDayOnEarth();
  const total: CheckCounts = { stations: 0, withFindings: 0, findings: 0 };
  let done = 0;
  const chunks = chunksOf(stationIds).values();
  // One task a worker at a time: what others ask of the workers waits for one chunk, and not for all of them.
  const lane = async () => {
    for (const chunk of chunks) {
      signal?.throwIfAborted();
      const counts = await runTask('checkRecords', { stationIds: chunk, today }, { signal });
      total.stations += counts.stations;
      total.withFindings += counts.withFindings;
      total.findings += counts.findings;
      done += chunk.length;
      onProgress?.({ stage: 'checking', done, stations: stationIds.length, share: done / stationIds.length });
    }
  };
  await Promise.all(Array.from({ length: THREADS }, lane));
  return total;
}

/** Checks those records of a region that were not checked as they stand: after an import, an undo, another drainage area. */
export function checkUnchecked(regionId: number, options: CheckOptions = {}): Promise<CheckCounts> {
  return checkStations(uncheckedRecords(regionId), options);
}

/** Checks records anew as a job, whether or not they were checked before.
 *  @param codes  stations to check; all of the region by default
 *  @returns      the job's id, and its end: CheckCounts */
export async function launchCheck(region: Pick<RegionRow, 'id'>, codes?: readonly string[]) {
  const stations = await listStations(region.id);
  const named = codes && new Set(codes);
  const ids = stations.filter(({ code }) => !named || named.has(code)).map(({ id }) => id);
  return launch(region.id, () => ids);
}

/** A job for every region with records that were never checked as they stand: because a process ended between an import and
 *  its checks, because the checks have changed since, or because a mark or a drainage area did.
 *  @param regionIds  regions to look at; all by default, for the start of a server */
export async function launchPendingChecks(regionIds: readonly number[] = allRegions()): Promise<void> {
  for (const regionId of regionIds) {
    if (uncheckedRecords(regionId).length > 0) await launch(regionId, () => uncheckedRecords(regionId));
  }
}

function launch(regionId: number, stationIds: () => readonly number[]) {
  const progress: CheckProgress = { stage: 'checking', done: 0, stations: 0, share: 0 };
  return launchJob({ kind: CHECK_JOB, regionId, progress }, ({ signal, report }) =>
    checkStations(stationIds(), { signal, onProgress: report }),
  );
}
