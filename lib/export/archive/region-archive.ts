import type { Readable } from 'node:stream';
import { getLayer, listLayers } from '../../store/layers.ts';
import { readImportParts } from '../../store/parts.ts';
import type { RegionRow } from '../../store/regions.ts';
import { listStations } from '../../store/stations.ts';
import { flowsCsv } from '../flows-csv.ts';
import { jsonText } from '../json.ts';
import { waterml } from '../waterml.ts';
import { importsDocument, layerFile, plainName, regionDocument } from './region-document.ts';
import { stationsDocument } from './stations-document.ts';
import { type ArchiveFile, zipOf } from './zip.ts';

export interface ArchiveOptions {
  /** false leaves out the WaterML documents, which take the most room */
  withWaterml?: boolean;
  /** the time written on every file */
  modified?: Date;
  /** share of the files that are done, 0 to 1, and the one that begins */
  onProgress?: (share: number, file: string) => void;
  signal?: AbortSignal;
}

/** A region as one ZIP archive of open formats, as a stream: stations.geojson, the days of every import as a long table and
 *  every station's record as WaterML 2.0, imports.json, layers, and region.json with the rest. Imported elsewhere, it gives
 *  the same region. */
export async function regionArchive(
  region: RegionRow,
  { withWaterml = true, modified = new Date(), onProgress, signal }: ArchiveOptions = {},
): Promise<Readable> {
  const [document, imports, stations, layers] = await Promise.all([
    regionDocument(region),
    importsDocument(region.id),
    listStations(region.id),
    listLayers(region.id),
  ]);
  const files: ArchiveFile[] = [
    textFile('README.txt', README),
    textFile('region.json', jsonText(document)),
    textFile('imports.json', jsonText(imports.map(({ id: _, ...entry }) => entry))),
    textFile('stations.geojson', jsonText(await stationsDocument(region.id))),
    ...layers.map(({ id, name }) => ({
      name: layerFile(name, id),
      text: async function* () {
        yield (await getLayer(region.id, id)) ?? '';
      },
    })),
    ...imports.flatMap(({ id, file }) =>
      file === null ? [] : [{ name: file, text: () => flowsCsv(readImportParts(id)) }],
    ),
    ...(withWaterml
      ? stations.map((station) => ({
          name: `waterml/${plainName(station.code)}-${station.id}.xml`,
          text: () => waterml(station, { generated: modified }),
        }))
      : []),
  ];
  return zipOf(files, {
    ...{ modified, signal },
    onFile: (done) => onProgress?.(done / files.length, files[done].name),
  });
}

const textFile = (name: string, text: string): ArchiveFile => ({ name, text: () => [text] });

const README = `A region of Hungerstone, in open formats.

region.json       name, basis, saved mappings, links between stations, and what people marked on the records
stations.geojson  the stations with their facts (GeoJSON, RFC 7946)
imports.json      what was imported: file, when, by whom, SHA-256, counts, and where its days are
flows/            the days of each import as its file had them: a long CSV table, values and flags as written
waterml/          every station's record as it stands, WaterML 2.0 (OGC 10-126r4)
layers/           map layers (GeoJSON)

Importing this archive makes the same region again. Flows are screening values for planning; provisional data may change.
`;
