import { createHash, randomUUID } from 'node:crypto';
import { stationReport } from '../lib/intake/report.ts';
import type { ImportReport, Mapping, StationReport } from '../lib/intake/types.ts';
import { applyStaging } from '../lib/store/apply-staging.ts';
import { blobOfValues } from '../lib/store/blobs.ts';
import { createStaging, type Staging } from '../lib/store/staging.ts';
import type { SeedRegion } from './generate.ts';
import { NO_ROW } from './observe.ts';

/** How the flows would be read if they came as the file that writeFlowsCsv makes. */
const MAPPING: Mapping = {
  layout: 'long',
  station: { from: 'column', column: 'station' },
  date: { columns: ['date'], order: 'ymd' },
  value: { column: 'flow' },
  flag: { column: 'flag' },
  unit: 'm3/s',
  missing: [],
  decimal: '.',
  delimiter: ',',
};
const BY = 'seed';

/** Stores an invented region the way imports do: all of it or nothing, listed as imports that can be undone.
 *  @param onProgress  share of the stations that are made, 0 to 1
 *  @returns slug of the region
 *  @throws StoreError, StoreBusyError as applyStaging does */
export async function storeRegion(
  region: SeedRegion,
  { name, onProgress = () => undefined }: { name: string; onProgress?: (share: number) => void },
): Promise<string> {
  const staging = createStaging(`seed-${randomUUID()}`);
  try {
    stageLand(staging, region);
    stageFlows(staging, region, onProgress);
    staging.seal();
    return (await applyStaging(staging.jobId, { region: { name, invented: true }, by: BY })).slug;
  } finally {
    staging.discard();
  }
}

function stageLand(staging: Staging, { stations, layers }: SeedRegion): void {
  const file = staging.addFile({ kind: 'registry', fileName: 'invented stations' });
  staging.stageRegistry(file, stations);
  const sha256 = createHash('sha256').update(JSON.stringify(stations)).digest('hex');
  staging.describeFile(file, { sha256, rows: stations.length, accepted: stations.length });
  for (const { name, kind, geojson } of layers()) {
    const text = JSON.stringify(geojson);
    const layer = staging.addFile({ kind: 'layer', fileName: `invented ${name.toLowerCase()}` });
    staging.stageLayer(layer, { name, kind, geojson: text });
    const rows = geojson.features.length;
    staging.describeFile(layer, { sha256: createHash('sha256').update(text).digest('hex'), rows, accepted: rows });
  }
}

function stageFlows(staging: Staging, region: SeedRegion, onProgress: (share: number) => void): void {
  const fileName = 'invented flows';
  const file = staging.addFile({ kind: 'flows', fileName });
  const hash = createHash('sha256');
  const stations: StationReport[] = [];
  let rows = 0;
  for (const record of region.records()) {
    staging.stagePart(file, record);
    hash.update(blobOfValues(record.values));
    for (const code of record.codes) if (code !== NO_ROW) rows += 1;
    stations.push(stationReport(record, 0));
    onProgress(stations.length / region.stations.length);
  }
  const sha256 = hash.digest('hex');
  const report: ImportReport = {
    ...{ file: fileName, layout: MAPPING.layout, unit: 'm3/s', mapping: MAPPING, rows, accepted: rows, sha256 },
    ...{ rejectedTotal: 0, rejectedFile: null, rejected: [], stations },
    warnings: ['Made by a generator: no flow in this region was ever measured.'],
  };
  staging.describeFile(file, {
    ...{ sha256, layout: MAPPING.layout, unit: 'm3/s', mapping: MAPPING, rows, accepted: rows, report },
  });
}
