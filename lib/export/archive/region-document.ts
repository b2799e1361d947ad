import { BASIS_KEYS, DEFAULT_BASIS } from '../../basis.ts';
import {
  ARCHIVE_FORMAT,
  ARCHIVE_VERSION,
  type ArchivedImport,
  type RegionDocument,
} from '../../store/archived-region.ts';
import { listBases } from '../../store/bases.ts';
import { getImportReport, type ImportRow, listImports } from '../../store/imports.ts';
import type { OverlapRule } from '../../store/lay-parts.ts';
import { listLayers } from '../../store/layers.ts';
import { rejectedLinks } from '../../store/link-rejections.ts';
import { listLinks, REJECTED } from '../../store/links.ts';
import { listRegionMarks } from '../../store/marks.ts';
import { importPartHeads } from '../../store/parts.ts';
import type { RegionRow } from '../../store/regions.ts';
import { listMappings } from '../../store/saved-mappings.ts';
import { flowsMapping } from '../flows-csv.ts';
import { PROGRAM_VERSION } from '../program-version.ts';

/** region.json of an archive: all of a region that is neither a station's fact, nor a layer, nor a day of a record. */
export async function regionDocument(region: RegionRow): Promise<RegionDocument> {
  const { id, name, invented, basis, tileUrl, tileAttribution } = region;
  const [bases, mappings, links, rejected, marks, layers] = await Promise.all([
    listBases(id),
    listMappings(id),
    listLinks(id),
    rejectedLinks(id),
    listRegionMarks(id),
    listLayers(id),
  ]);
  const own = BASIS_KEYS.filter((key) => JSON.stringify(basis[key]) !== JSON.stringify(DEFAULT_BASIS[key]));
  return {
    ...{ format: ARCHIVE_FORMAT, version: ARCHIVE_VERSION, program: PROGRAM_VERSION, name, invented },
    basis: Object.fromEntries(own.map((key) => [key, basis[key]])),
    tiles: tileUrl === null ? null : { url: tileUrl, attribution: tileAttribution ?? '' },
    bases: bases.map((saved) => ({ name: saved.name, basis: { ...saved.basis } })),
    mappings: mappings.map((saved) => ({ name: saved.name, mapping: { ...saved.mapping } })),
    links: [
      ...links.map(({ upstream, downstream, source }) => ({ upstream, downstream, source })),
      ...rejected.map((pair) => ({ ...pair, source: REJECTED })),
    ],
    marks: marks.map(({ code, quantity, firstDay, lastDay, kind, reason, by, createdAt }) => ({
      ...{ station: code, quantity, firstDay, lastDay, kind, reason, by, createdAt: createdAt.toISOString() },
    })),
    layers: layers.map((layer) => ({ file: layerFile(layer.name, layer.id), name: layer.name, kind: layer.kind })),
  };
}

/** Path of a layer in the archive. */
export const layerFile = (name: string, id: number): string => `layers/${id}-${plainName(name)}.geojson`;

/** Path of an import's days in the archive. */
const flowsFile = (place: number, fileName: string): string =>
  `flows/${String(place).padStart(4, '0')}-${plainName(fileName)}.csv`;

/** A name that is safe as a file's on every system. */
export function plainName(name: string): string {
  const plain = name
    .normalize('NFKD')
    .replace(/[^A-Za-z0-9._-]+/g, '-')
    .replace(/^[-.]+|[-.]+$/g, '');
  return plain.slice(0, 80) || 'unnamed';
}

/** imports.json of an archive: the region's imports, the oldest first, with the table that holds the days of each. */
export async function importsDocument(regionId: number): Promise<(ArchivedImport & { id: number })[]> {
  const imports = (await listImports(regionId)).reverse();
  const entries: (ArchivedImport & { id: number })[] = [];
  for (const [place, entry] of imports.entries()) {
    const found = await getImportReport(regionId, entry.id);
    entries.push({ ...archivedImport(entry, place), id: entry.id, mapping: found?.mapping ?? {} });
  }
  return entries;
}

function archivedImport(entry: ImportRow, place: number): ArchivedImport {
  const { fileName, kind, sha256, createdAt, by, rule, layout, unit, rows, accepted, rejected } = entry;
  const heads = importPartHeads(entry.id);
  return {
    ...{
      fileName,
      kind,
      sha256,
      createdAt: createdAt.toISOString(),
      by,
      rule: rule as OverlapRule,
      layout,
      unit,
      rows,
      accepted,
      rejected,
    },
    mapping: {},
    file: heads.length > 0 ? flowsFile(place + 1, fileName) : null,
    read: heads.length > 0 ? flowsMapping(heads as Parameters<typeof flowsMapping>[0]) : null,
  };
}
