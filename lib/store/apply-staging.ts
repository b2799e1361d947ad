import { existsSync } from 'node:fs';
import { isMainThread } from 'node:worker_threads';
import { type Plan, planImport } from './apply-plan.ts';
import { pause, StoreBusyError, whenFree } from './busy.ts';
import { type Claim, type ClaimOptions, claimImports, outlineImport } from './claim-import.ts';
import { type Connection, immediately, rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';
import { StoreError } from './errors.ts';
import { beatImports, readCounters, reserveIds } from './import-claim.ts';
import type { OverlapRule } from './lay-parts.ts';
import type { Revisions } from './revisions.ts';
import { showImport } from './show-import.ts';
import { inSlices } from './slices.ts';
import { stagingPath } from './staging.ts';
import { isChanged } from './station-facts.ts';
import { GroupWork } from './store-group.ts';
import { recoverImports, sweep, withdraw } from './withdraw.ts';

export interface ApplyOptions extends Omit<ClaimOptions, 'rule'> {
  /** what becomes of days whose values are unlike those that stand; absent: a file that holds such is refused, unless it
   *  was staged with a rule of its own */
  rule?: OverlapRule;
  /** short for rule 'take-new' */
  revise?: boolean;
  /** only looks what would come of it */
  dryRun?: boolean;
  signal?: AbortSignal;
  /** share of the parts that are stored, 0 to 1 */
  onProgress?: (share: number) => void;
  sliceMs?: number;
  path?: string;
}

export interface Applied {
  /** 0 when a dry run would make the region */
  regionId: number;
  slug: string;
  /** true when this import made the region */
  regionMade: boolean;
  /** in the order of the staged files; their ids are 0 in a dry run */
  imports: AppliedFile[];
  stationsMade: number;
  records: number;
}

export interface AppliedFile {
  id: number;
  file: string;
  kind: string;
  stationsMade: number;
  stationsChanged: number;
  /** what it did to days that stood; null for registries and layers */
  revisions: Revisions | null;
}

/** Takes the staged files of a job into the main database: all of them, or nothing.
 *
 *  The parts are copied in slices between which others can write. Until the last slice no reader sees anything of them:
 *  it writes the few small rows that records, stations, registry and layers consist of, and the records derived from
 *  others. When anything fails, or the signal aborts, what was copied is taken away again; when the process dies,
 *  recoverImports does so at the next start. A dry run reads and compares the same, and writes nothing at all.
 *  The staging database stays; the caller discards it.
 *  @throws OverlapError for values unlike those that stand where there is no rule; ImportRefused for an unknown station, a
 *          depth without an area, or days of a station that is derived; StoreBusyError when another import goes on; the
 *          signal's reason */
export async function applyStaging(jobId: string, options: ApplyOptions): Promise<Applied> {
  const path = options.path ?? databasePath();
  const connection = sharedConnection(path);
  const claiming = { ...options, rule: options.rule ?? (options.revise ? 'take-new' : null) } as const;
  await whenFree(() => attachStaging(connection, stagingPath(jobId, path)), { waitMs: 30_000 });
  try {
    if (options.dryRun)
      return await tryImport(
        connection,
        outlineImport(connection, claiming, () => 0),
        options,
      );
    await recoverImports(connection);
    const counters = readCounters(connection);
    const claim = await claimImports(connection, claiming);
    try {
      const applied = await applyClaimed(connection, claim, options);
      await sweep(connection, options);
      return applied;
    } catch (error) {
      await withdraw(connection, [...claim.imports.values()], counters);
      throw error;
    }
  } finally {
    connection.exec('DETACH DATABASE staging');
  }
}

/** One at a time in a thread: two applyStaging of one thread take turns. */
function attachStaging(connection: Connection, file: string): void {
  if (!existsSync(file))
    throw new StoreError('missing', 'The files that were read in have been cleared away; start again.');
  const attached = rows(connection, "SELECT 1 FROM pragma_database_list WHERE name = 'staging'").get([]);
  if (attached) throw new StoreBusyError('Another import is being stored; try again when it is done.');
  connection.prepare('ATTACH DATABASE ? AS staging').run([file]);
}

async function applyClaimed(connection: Connection, claim: Claim, options: ApplyOptions): Promise<Applied> {
  const { signal, onProgress, sliceMs } = options;
  const before = () => beatImports(connection, [...claim.imports.values()], 'applying');
  const stationIds = (count: number) => reserveIds(connection, 'Station', count);
  const plan = await whenFree(() => immediately(connection, () => planImport(connection, claim, stationIds)));
  const work = new GroupWork(connection, claim, false);
  await inSlices(connection, plan.groups, (group) => work.store(group), {
    ...{ signal, sliceMs, before },
    onProgress: (done) => onProgress?.(done / plan.groups.length),
  });
  work.refuseUnlike();
  signal?.throwIfAborted();
  const show = () => {
    before();
    showImport(connection, claim, plan, work);
  };
  await whenFree(() => immediately(connection, show), { waitMs: 60_000 });
  return outcome(connection, claim, plan, work);
}

/** How long a dry run reads before it lets its thread do other things, milliseconds. */
const TURN_MS = isMainThread ? 50 : 300;

async function tryImport(connection: Connection, claim: Claim, options: ApplyOptions): Promise<Applied> {
  // Stations that are not there get ids that no station has.
  const plan = planImport(connection, claim, (count) => -count);
  const work = new GroupWork(connection, claim, true);
  let turn = performance.now();
  for (const [done, group] of plan.groups.entries()) {
    options.signal?.throwIfAborted();
    work.store(group);
    if (performance.now() - turn < TURN_MS) continue;
    options.onProgress?.(done / plan.groups.length);
    await pause(0);
    turn = performance.now();
  }
  work.refuseUnlike();
  return outcome(connection, claim, plan, work);
}

function outcome(connection: Connection, claim: Claim, plan: Plan, work: GroupWork): Applied {
  const { regionId, slug, newRegion, imports } = claim;
  const files = rows(connection, 'SELECT id, fileName, kind FROM staging.file ORDER BY id').all([]);
  const made = [...plan.stations.values()].filter(({ madeBy }) => madeBy !== null);
  return {
    ...{ regionId, slug, regionMade: newRegion !== null, stationsMade: made.length, records: plan.groups.length },
    imports: (files as [number, string, string][]).map(([file, name, kind]) => ({
      ...{ id: imports.get(file)!, file: name, kind },
      stationsMade: made.filter(({ madeBy }) => madeBy === file).length,
      stationsChanged: plan.said.get(file)?.filter(isChanged).length ?? 0,
      revisions: kind === 'flows' ? work.counterOf(file).revisions() : null,
    })),
  };
}
