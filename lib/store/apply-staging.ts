import { existsSync } from 'node:fs';
import type { FlowUnit } from '../series/flow-units.ts';
import { type Group, type Plan, planImport } from './apply-plan.ts';
import { type ArchivedRegion, writeArchivedRegion } from './archived-region.ts';
import { refuseForArea } from './area-error.ts';
import { bytesOfBlob, valuesOfBlob } from './blobs.ts';
import { StoreBusyError, whenFree } from './busy.ts';
import type { Code } from './codes.ts';
import { type Connection, change, immediately, rows, sharedConnection, timestamp } from './connection.ts';
import { databasePath } from './database-url.ts';
import { StoreError } from './errors.ts';
import { beatImports, readCounters, refuseWhileOthersChange, reserveIds } from './import-claim.ts';
import { HAS_REGISTRY } from './known-stations.ts';
import { type LayablePart, layParts, type OverlapRule } from './lay-parts.ts';
import { loadParts, type RecordHead, saveRecords, standingRecord, storeLaid } from './lay-record.ts';
import { Conflicts, OverlapError } from './overlap-error.ts';
import { inSlices } from './slices.ts';
import { slugOf } from './slug.ts';
import { stagingPath } from './staging.ts';
import { isChanged } from './station-facts.ts';
import { recoverImports, sweep, withdraw } from './withdraw.ts';
import { writeFacts, writeLayers } from './write-facts.ts';

export interface ApplyOptions {
  /** a region that exists, or the name of one, which is made when it is new */
  region: { id: number } | { name: string; invented?: boolean };
  /** what flows do where they are unlike those that stand: 'keep' refuses the file */
  rule?: OverlapRule;
  /** short for rule 'take-new' */
  revise?: boolean;
  by?: string;
  /** what becomes of flows of a station that nobody knows: by default they make it in a region without a registry, and
   *  are refused in one that has a registry or is given one now */
  unknownStations?: 'make' | 'refuse';
  signal?: AbortSignal;
  /** share of the parts that are stored, 0 to 1 */
  onProgress?: (share: number) => void;
  sliceMs?: number;
  path?: string;
}

export interface Applied {
  regionId: number;
  slug: string;
  /** true when this import made the region */
  regionMade: boolean;
  /** in the order of the staged files */
  imports: { id: number; file: string; kind: string; stationsMade: number; stationsChanged: number }[];
  stationsMade: number;
  records: number;
}

/** Takes the staged files of a job into the main database: all of them, or nothing.
 *
 *  The parts are copied in slices between which others can write. Until the last slice no reader sees anything of them:
 *  it writes the few small rows that records, stations, registry and layers consist of. When anything fails, or the
 *  signal aborts, what was copied is taken away again; when the process dies, recoverImports does so at the next start.
 *  The staging database stays; the caller discards it.
 *  @throws OverlapError for values unlike those that stand; ImportRefused for an unknown station, or a depth without an
 *          area; StoreBusyError when another import goes on; the signal's reason */
export async function applyStaging(jobId: string, options: ApplyOptions): Promise<Applied> {
  const path = options.path ?? databasePath();
  const connection = sharedConnection(path);
  await whenFree(() => attachStaging(connection, stagingPath(jobId, path)), { waitMs: 30_000 });
  try {
    await recoverImports(connection);
    const counters = readCounters(connection);
    const claim = await claimImports(connection, options);
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

interface Claim {
  regionId: number;
  slug: string;
  newRegion: { name: string; invented: boolean } | null;
  /** id of the import by number of the file */
  imports: Map<number, number>;
  unknownStations: 'make' | 'refuse';
}

/** Writes the imports' rows, which keep others from beginning one and are the trail by which to recover. */
function claimImports(connection: Connection, options: ApplyOptions): Promise<Claim> {
  const { region, by = '', unknownStations } = options;
  const rule = options.rule ?? (options.revise ? 'take-new' : 'keep');
  const claim = (): Claim => {
    refuseWhileOthersChange(connection);
    const found = rows(connection, 'SELECT id, slug FROM Region WHERE id = ? OR slug = ?').get(
      'id' in region ? [region.id, null] : [null, slugOf(region.name)],
    ) as [number, string] | undefined;
    if (!found && 'id' in region) throw new StoreError('not-found', 'The region is not there any more.');
    const newRegion = found || 'id' in region ? null : { name: region.name.trim(), invented: region.invented ?? false };
    const [regionId, slug] = found ?? [reserveIds(connection, 'Region', 1), slugOf(newRegion?.name ?? '')];
    const insert = change(
      connection,
      `INSERT INTO Import (regionId, createdAt, heartbeat, state, "by", kind, fileName, sha256, layout, unit, mapping, rule,
         rows, accepted, rejected, report)
       SELECT ?, COALESCE(createdAt, ?), ?, 'applying', COALESCE("by", ?), kind, fileName, sha256, layout, unit, mapping,
         COALESCE(rule, ?), rows, accepted, rejected, report
       FROM staging.file WHERE id = ?`,
    );
    const now = timestamp();
    const files = rows(connection, 'SELECT id FROM staging.file ORDER BY id').all([]).flat() as number[];
    const imports = new Map(
      files.map((file) => [file, Number(insert.run([regionId, now, now, by, rule, file]).lastInsertRowid)]),
    );
    return {
      ...{ regionId, slug, newRegion, imports },
      unknownStations: unknownStations ?? (hasRegistry(connection, regionId) ? 'refuse' : 'make'),
    };
  };
  return whenFree(() => immediately(connection, claim), { waitMs: 30_000 });
}

/** True when the region's stations are those of a registry, given earlier or now, and not only those of its flows. */
const hasRegistry = (connection: Connection, regionId: number): boolean =>
  rows(connection, 'SELECT 1 FROM staging.registry').get([]) !== undefined ||
  (rows(connection, HAS_REGISTRY).get([regionId, regionId]) as [number])[0] === 1;

async function applyClaimed(connection: Connection, claim: Claim, options: ApplyOptions): Promise<Applied> {
  const { signal, onProgress, sliceMs } = options;
  const importIds = [...claim.imports.values()];
  const before = () => beatImports(connection, importIds, 'applying');
  const plan = await whenFree(() =>
    immediately(connection, () => planImport(connection, claim.regionId, claim.unknownStations)),
  );
  const conflicts = new Conflicts();
  const heads: RecordHead[] = [];
  await inSlices(connection, plan.groups, (group) => storeGroup(connection, group, claim, conflicts, heads), {
    ...{ signal, sliceMs, before },
    onProgress: (done) => onProgress?.(done / plan.groups.length),
  });
  for (const [file, { count, first }] of conflicts.files)
    throw new OverlapError(fileName(connection, file), count, first);
  signal?.throwIfAborted();
  return whenFree(() => immediately(connection, () => show(connection, claim, plan, heads, before)), {
    waitMs: 60_000,
  });
}

const fileName = (connection: Connection, file: number): string =>
  (rows(connection, 'SELECT fileName FROM staging.file WHERE id = ?').get([file]) as [string])[0];

/** Copies the parts of one record, and lays them over those that stand where there are any. */
function storeGroup(
  connection: Connection,
  { station, quantity, staged, standing }: Group,
  { imports }: Claim,
  conflicts: Conflicts,
  heads: RecordHead[],
): void {
  const place = { stationId: station.id, quantity };
  if (standing === 0 && staged.length === 1) {
    if (conflicts.files.size > 0) return;
    const [{ id, file }] = staged;
    heads.push({
      ...stagedHead(connection, id),
      ...place,
      partId: copyPart(connection, id, imports.get(file)!, station.id),
    });
    return;
  }
  const parts: LayablePart[] = standing > 0 ? loadParts(connection, station.id, quantity) : [];
  const stood = parts.length;
  for (const { id, file } of staged) parts.push(stagedPart(connection, id, imports.get(file)!));
  const areaKm2 = station.facts.areaKm2 as number | null;
  refuseForArea(parts, { code: station.code, areaKm2 }, () =>
    fileName(connection, staged[0]?.file ?? registryFile(connection)),
  );
  const laid = layParts(parts, areaKm2, (part, day, stands, other) => {
    if (part < stood) return;
    conflicts.add(staged[part - stood].file, { code: station.code, day, standing: stands, other, unit: parts[0].unit });
  });
  if (conflicts.files.size > 0) return;
  const record = standingRecord(connection, station.id, quantity);
  for (const { id, file } of staged) copyPart(connection, id, imports.get(file)!, station.id);
  heads.push(storeLaid(connection, place, laid, { standing: record, importId: [...imports.values()][0] }));
}

const registryFile = (connection: Connection): number =>
  (rows(connection, 'SELECT MIN(file) FROM staging.registry').get([]) as [number])[0];

function copyPart(connection: Connection, id: number, importId: number, stationId: number): number {
  const copy = change(
    connection,
    `INSERT INTO main.Part (importId, stationId, quantity, firstDay, days, unit, codeList, "values", codes)
     SELECT ?, ?, quantity, firstDay, days, unit, codeList, "values", codes FROM staging.part WHERE id = ?`,
  );
  return Number(copy.run([importId, stationId, id]).lastInsertRowid);
}

function stagedHead(connection: Connection, id: number): Omit<RecordHead, 'stationId' | 'quantity' | 'partId'> {
  const [unit, firstDay, days, hash, valueCount, firstValueDay, lastValueDay, zeroCount] = rows(
    connection,
    'SELECT unit, firstDay, days, hash, valueCount, firstValueDay, lastValueDay, zeroCount FROM staging.part WHERE id = ?',
  ).get([id]) as [FlowUnit, number, number, string, number, number | null, number | null, number];
  return { unit, firstDay, days, hash, valueCount, firstValueDay, lastValueDay, zeroCount, laidId: null };
}

function stagedPart(connection: Connection, id: number, importId: number): LayablePart {
  const [unit, firstDay, codeList, values, codes] = rows(
    connection,
    'SELECT unit, firstDay, codeList, "values", codes FROM staging.part WHERE id = ?',
  ).get([id]) as [FlowUnit, number, string, Buffer, Buffer];
  const [rule] = rows(connection, 'SELECT rule FROM main.Import WHERE id = ?').get([importId]) as [OverlapRule];
  const days = { values: valuesOfBlob(values), codes: bytesOfBlob(codes) };
  return { unit, firstDay, codeList: JSON.parse(codeList) as Code[], ...days, rule };
}

/** The last slice: writes all that readers go by. */
function show(connection: Connection, claim: Claim, plan: Plan, heads: RecordHead[], before: () => void): Applied {
  before();
  const { regionId, slug, newRegion, imports } = claim;
  if (newRegion) {
    if (rows(connection, 'SELECT 1 FROM Region WHERE slug = ?').get([slug])) {
      throw new StoreError('exists', `A region named "${newRegion.name}" was made meanwhile; import into it.`);
    }
    change(connection, 'INSERT INTO Region (id, slug, name, invented, createdAt) VALUES (?, ?, ?, ?, ?)').run([
      regionId,
      slug,
      newRegion.name,
      newRegion.invented ? 1 : 0,
      timestamp(),
    ]);
  }
  writeFacts(connection, regionId, plan, imports);
  writeLayers(connection, regionId, imports);
  saveRecords(connection, heads);
  const archived = rows(connection, 'SELECT facts FROM staging.region').get([]) as [string] | undefined;
  if (archived) {
    const about = { regionId, regionMade: newRegion !== null };
    writeArchivedRegion(connection, about, JSON.parse(archived[0]) as ArchivedRegion);
  }
  const end = change(connection, "UPDATE Import SET state = 'applied' WHERE id = ?");
  for (const id of imports.values()) end.run([id]);
  const files = rows(connection, 'SELECT id, fileName, kind FROM staging.file ORDER BY id').all([]);
  const made = [...plan.stations.values()].filter(({ madeBy }) => madeBy !== null);
  return {
    ...{ regionId, slug, regionMade: newRegion !== null, stationsMade: made.length, records: heads.length },
    imports: (files as [number, string, string][]).map(([file, name, kind]) => ({
      ...{ id: imports.get(file)!, file: name, kind },
      stationsMade: made.filter(({ madeBy }) => madeBy === file).length,
      stationsChanged: plan.said.get(file)?.filter(isChanged).length ?? 0,
    })),
  };
}
