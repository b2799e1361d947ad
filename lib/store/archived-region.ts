import { type Connection, change, rows } from './connection.ts';
import type { OverlapRule } from './lay-parts.ts';
import type { LayerKind } from './layer-kinds.ts';
import type { MarkKind } from './marks-on-flags.ts';

/** What region.json of an archive begins with. */
export const ARCHIVE_FORMAT = 'hungerstone-region';
export const ARCHIVE_VERSION = 1;

/** A person's word on a stretch of a station's record. */
export interface ArchivedMark {
  /** code */
  station: string;
  quantity: string;
  /** day numbers, both included */
  firstDay: number;
  lastDay: number;
  kind: MarkKind;
  reason: string;
  by: string;
  /** ISO date and time, UTC */
  createdAt: string;
}

/** What of a region is neither a station's fact, nor a layer, nor a day of a record. */
export interface ArchivedRegion {
  /** made-up data */
  invented: boolean;
  /** the keys in which the region's own basis differs from the general defaults */
  basis: Record<string, unknown>;
  tiles: { url: string; attribution: string } | null;
  bases: { name: string; basis: Record<string, unknown> }[];
  mappings: { name: string; mapping: Record<string, unknown> }[];
  /** station codes, water flowing from the first to the second; or, with source "rejected", not so */
  links: { upstream: string; downstream: string; source: string }[];
  marks: ArchivedMark[];
}

/** region.json: the same with what names and describes the archive. */
export interface RegionDocument extends ArchivedRegion {
  format: typeof ARCHIVE_FORMAT;
  version: number;
  /** of the program that wrote it */
  program: string;
  name: string;
  layers: { file: string; name: string; kind: LayerKind }[];
}

/** One entry of imports.json, in the order in which the imports were laid over one another. */
export interface ArchivedImport {
  fileName: string;
  kind: 'flows' | 'registry' | 'layer';
  sha256: string;
  /** ISO date and time, UTC */
  createdAt: string;
  by: string;
  rule: OverlapRule;
  layout: string;
  unit: string;
  rows: number;
  accepted: number;
  rejected: number;
  /** how its original file was read */
  mapping: unknown;
  /** flows: its days as a long table of the archive, and the mapping that reads it; null for other imports */
  file: string | null;
  read: unknown;
}

/** Writes what an archive says of a region beside its stations and days. A region that stands keeps its own basis, map
 *  background and what it has under a name; links and marks that it has already are not made twice. For the last slice
 *  of an import, when stations are there and no reader has seen them yet. */
export function writeArchivedRegion(
  connection: Connection,
  { regionId, regionMade }: { regionId: number; regionMade: boolean },
  region: ArchivedRegion,
): void {
  const stations = new Map(
    rows(connection, 'SELECT code, id FROM Station WHERE regionId = ?').all([regionId]) as [string, number][],
  );
  if (regionMade) {
    change(connection, 'UPDATE Region SET basis = ?, invented = ?, tileUrl = ?, tileAttribution = ? WHERE id = ?').run([
      ...[JSON.stringify(region.basis), region.invented ? 1 : 0],
      ...[region.tiles?.url ?? null, region.tiles?.attribution ?? null, regionId],
    ]);
  }
  const basis = change(connection, 'INSERT OR IGNORE INTO Basis (regionId, name, json) VALUES (?, ?, ?)');
  for (const { name, basis: json } of region.bases) basis.run([regionId, name, JSON.stringify(json)]);
  const mapping = change(connection, 'INSERT OR IGNORE INTO SavedMapping (regionId, name, json) VALUES (?, ?, ?)');
  for (const { name, mapping: json } of region.mappings) mapping.run([regionId, name, JSON.stringify(json)]);
  const link = change(
    connection,
    'INSERT OR IGNORE INTO Link (regionId, upstreamId, downstreamId, source) VALUES (?, ?, ?, ?)',
  );
  for (const { upstream, downstream, source } of region.links) {
    const [upper, lower] = [stations.get(upstream), stations.get(downstream)];
    if (upper !== undefined && lower !== undefined) link.run([regionId, upper, lower, source]);
  }
  for (const mark of region.marks) writeMark(connection, stations.get(mark.station), mark);
}

function writeMark(connection: Connection, stationId: number | undefined, mark: ArchivedMark): void {
  if (stationId === undefined) return;
  const { quantity, firstDay, lastDay, kind, reason, by, createdAt } = mark;
  const same = rows(
    connection,
    `SELECT 1 FROM Mark WHERE stationId = ? AND quantity = ? AND firstDay = ? AND lastDay = ? AND kind = ? AND reason = ?`,
  ).get([stationId, quantity, firstDay, lastDay, kind, reason]);
  if (same) return;
  change(
    connection,
    `INSERT INTO Mark (stationId, quantity, firstDay, lastDay, kind, reason, "by", createdAt)
     VALUES (?, ?, ?, ?, ?, ?, ?, ?)`,
  ).run([stationId, quantity, firstDay, lastDay, kind, reason, by, createdAt]);
}
