import { whenFree } from './busy.ts';
import { type Connection, change, immediately, rows, timestamp } from './connection.ts';
import { StoreError } from './errors.ts';
import { refuseWhileOthersChange, reserveIds } from './import-claim.ts';
import { HAS_REGISTRY } from './known-stations.ts';
import type { OverlapRule } from './lay-parts.ts';
import { slugOf } from './slug.ts';

/** A region that exists, or the name of one, which is made when it is new. */
export type RegionGiven = { id: number } | { name: string; invented?: boolean };

export interface ClaimOptions {
  region: RegionGiven;
  /** what becomes of days whose values are unlike those that stand, where the file has no rule of its own; null: such a
   *  file is refused */
  rule: OverlapRule | null;
  by?: string;
  /** what becomes of flows of a station that nobody knows: by default they make it in a region without a registry, and
   *  are refused in one that has a registry or is given one now */
  unknownStations?: 'make' | 'refuse';
}

/** What an import goes by while it is stored. */
export interface Claim {
  regionId: number;
  slug: string;
  newRegion: { name: string; invented: boolean } | null;
  /** id of the import by number of the file; of a dry run 0 */
  imports: Map<number, number>;
  /** by number of the file; null: unlike values refuse it */
  rules: Map<number, OverlapRule | null>;
  unknownStations: 'make' | 'refuse';
}

/** Writes the imports' rows, which keep others from beginning one and are the trail by which to recover.
 *  @throws StoreBusyError while another import goes on; StoreError when the region is gone */
export function claimImports(connection: Connection, options: ClaimOptions): Promise<Claim> {
  const claim = (): Claim => {
    refuseWhileOthersChange(connection);
    const outline = outlineImport(connection, options, () => reserveIds(connection, 'Region', 1));
    const insert = change(
      connection,
      `INSERT INTO Import (regionId, createdAt, heartbeat, state, "by", kind, fileName, sha256, layout, unit, mapping, rule,
         rows, accepted, rejected, report)
       SELECT ?, COALESCE(createdAt, ?), ?, 'applying', COALESCE("by", ?), kind, fileName, sha256, layout, unit, mapping, ?,
         rows, accepted, rejected, report
       FROM staging.file WHERE id = ?`,
    );
    const now = timestamp();
    for (const [file, rule] of outline.rules) {
      const values = [outline.regionId, now, now, options.by ?? '', rule ?? 'keep', file];
      outline.imports.set(file, Number(insert.run(values).lastInsertRowid));
    }
    return outline;
  };
  return whenFree(() => immediately(connection, claim), { waitMs: 30_000 });
}

/** The same without a trace, for a look at what an import would do.
 *  @param newRegionId  the id of a region that is not there yet */
export function outlineImport(connection: Connection, options: ClaimOptions, newRegionId: () => number): Claim {
  const { region, rule, unknownStations } = options;
  const found = rows(connection, 'SELECT id, slug FROM Region WHERE id = ? OR slug = ?').get(
    'id' in region ? [region.id, null] : [null, slugOf(region.name)],
  ) as [number, string] | undefined;
  if (!found && 'id' in region) throw new StoreError('not-found', 'The region is not there any more.');
  const newRegion = found || 'id' in region ? null : { name: region.name.trim(), invented: region.invented ?? false };
  const [regionId, slug] = found ?? [newRegionId(), slugOf(newRegion?.name ?? '')];
  const files = rows(connection, 'SELECT id, rule FROM staging.file ORDER BY id').all([]) as [
    number,
    OverlapRule | null,
  ][];
  return {
    ...{ regionId, slug, newRegion },
    imports: new Map(files.map(([file]) => [file, 0])),
    rules: new Map(files.map(([file, own]) => [file, own ?? rule])),
    unknownStations: unknownStations ?? (hasRegistry(connection, regionId) ? 'refuse' : 'make'),
  };
}

/** True when the region's stations are those of a registry, given earlier or now, and not only those of its flows. */
const hasRegistry = (connection: Connection, regionId: number): boolean =>
  rows(connection, 'SELECT 1 FROM staging.registry').get([]) !== undefined ||
  (rows(connection, HAS_REGISTRY).get([regionId, regionId]) as [number])[0] === 1;
