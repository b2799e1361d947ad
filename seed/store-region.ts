import { createHash, randomUUID } from 'node:crypto';
import { stationReport } from '../lib/intake/report.ts';
import type { ImportReport, Mapping, StagedPart, StationReport } from '../lib/intake/types.ts';
import { NO_ROW } from '../lib/series/day-codes.ts';
import { type Quantity, quantityWords, type Unit } from '../lib/series/quantities.ts';
import { applyStaging } from '../lib/store/apply-staging.ts';
import { blobOfValues } from '../lib/store/blobs.ts';
import { setLink } from '../lib/store/links.ts';
import { addMark } from '../lib/store/marks.ts';
import { createStaging, type Staging } from '../lib/store/staging.ts';
import { listStations } from '../lib/store/stations.ts';
import type { SeedBeside } from './beside.ts';
import type { SeedRecord, SeedRegion } from './generate.ts';

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
    const marked = stageFlows(staging, region, onProgress);
    staging.seal();
    const { regionId, slug } = await applyStaging(staging.jobId, { region: { name, invented: true }, by: BY });
    for (const link of region.furnishings.links) await setLink(regionId, { ...link, source: 'river-layer' });
    await markDays(regionId, marked);
    return slug;
  } finally {
    staging.discard();
  }
}

type Marked = Pick<SeedRecord, 'code' | 'marks'>;

async function markDays(regionId: number, marked: readonly Marked[]): Promise<void> {
  const ids = new Map((await listStations(regionId)).map(({ code, id }) => [code, id]));
  for (const { code, marks } of marked) {
    for (const mark of marks) await addMark({ ...mark, stationId: ids.get(code)! });
  }
}

function stageLand(staging: Staging, { stations: gauged, furnishings, layers }: SeedRegion): void {
  const stations = [...gauged, ...furnishings.extras];
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

/** Flows first; what was kept beside them is small, and follows as a file a quantity.
 *  @returns what people said of the days */
function stageFlows(staging: Staging, region: SeedRegion, onProgress: (share: number) => void): Marked[] {
  const marked: Marked[] = [];
  const beside = new Map<string, SeedBeside[]>();
  let made = 0;
  function* flows(): Generator<SeedRecord> {
    for (const record of region.records()) {
      for (const other of record.beside) {
        const name = other.quantity === 'flow' ? 'invented abstraction' : `invented ${quantityWords(other.quantity)}`;
        beside.set(name, [...(beside.get(name) ?? []), other]);
      }
      if (record.marks.length > 0) marked.push({ code: record.code, marks: record.marks });
      yield record;
      made += 1;
      onProgress(made / region.stations.length);
    }
  }
  stageTable(staging, { fileName: 'invented flows', quantity: 'flow', unit: 'm3/s' }, flows());
  for (const [fileName, records] of beside) stageTable(staging, { fileName, ...records[0] }, records);
  return marked;
}

function stageTable(
  staging: Staging,
  { fileName, quantity, unit }: { fileName: string; quantity: Quantity; unit: Unit },
  records: Iterable<StagedPart>,
): void {
  const file = staging.addFile({ kind: 'flows', fileName });
  const hash = createHash('sha256');
  const stations: StationReport[] = [];
  let rows = 0;
  for (const record of records) {
    staging.stagePart(file, record, quantity);
    hash.update(blobOfValues(record.values));
    for (const code of record.codes) if (code !== NO_ROW) rows += 1;
    stations.push(stationReport(record, 0));
  }
  const sha256 = hash.digest('hex');
  const mapping: Mapping = { ...MAPPING, unit, quantity };
  const report: ImportReport = {
    ...{ file: fileName, layout: mapping.layout, unit, mapping, rows, accepted: rows, sha256 },
    ...{ rejectedTotal: 0, rejectedFile: null, rejected: [], stations },
    warnings: [`Made by a generator: no ${quantityWords(quantity)} in this region was ever measured.`],
  };
  staging.describeFile(file, { sha256, layout: mapping.layout, unit, mapping, rows, accepted: rows, report });
}
