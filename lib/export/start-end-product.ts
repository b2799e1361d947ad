import { INDEX_FACTS } from '../region/index-facts.ts';
import type { RankingRow } from '../region/ranking-types.ts';
import type { OnTheWire, StartEnd } from '../region/window-types.ts';
import { compactNumbers } from './compact-numbers.ts';
import { csvTable } from './csv.ts';
import { type Provenance, provenanceNotes } from './provenance.ts';
import { startEndColumns, startEndRows } from './start-end-csv.ts';
import { tableMetadata } from './table-metadata.ts';

/** A station's start–end chart with what it is of. */
export interface StartEndToWrite {
  row: Pick<RankingRow, 'code' | 'years' | 'trendOf'>;
  chart: StartEnd;
}

/** Unit of the slopes, before "per decade". */
function slopeUnitOf({ row }: StartEndToWrite, { basis }: Provenance): string {
  return row.trendOf === 'zero-days' ? 'days' : INDEX_FACTS[basis.index].slopeUnit;
}

/** A chart for a screen: its numbers with 4 significant digits, null where there is none. */
export function startEndOnTheWire({ starts, ends, steadiness, windows, ...cells }: StartEnd): OnTheWire<StartEnd> {
  const { z, p, slopePerDecade, percentPerDecade } = cells;
  return {
    starts,
    ends,
    z: compactNumbers(z),
    p: compactNumbers(p),
    slopePerDecade: compactNumbers(slopePerDecade),
    percentPerDecade: compactNumbers(percentPerDecade),
    steadiness,
    windows,
  };
}

/** A station's start–end chart as a file: in CSV a row a window, in JSON the cells by start and end. */
export function startEndProduct(format: 'csv' | 'json', station: StartEndToWrite, from: Provenance): string {
  if (format === 'csv')
    return csvTable(startEndColumns(slopeUnitOf(station, from)), startEndRows(station.row, station.chart));
  return JSON.stringify({
    ...provenanceNotes(from),
    station_code: station.row.code,
    trendOf: station.row.trendOf,
    slopeUnit: slopeUnitOf(station, from),
    ...startEndOnTheWire(station.chart),
  });
}

/** What the CSV file means. */
export function startEndMetadata(station: StartEndToWrite, from: Provenance, file: string): Record<string, unknown> {
  const title = `${from.region.name}, ${station.row.code}: trend for every start year and end year`;
  return tableMetadata(file, title, startEndColumns(slopeUnitOf(station, from)), from);
}
