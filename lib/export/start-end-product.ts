import type { OnTheWire, StartEnd } from '../region/window-types.ts';
import { compactNumbers } from './compact-numbers.ts';
import { csvTable } from './csv.ts';
import { type Provenance, provenanceNotes } from './provenance.ts';
import { START_END_COLUMNS, type StartEndToWrite, startEndRows, type WindowRow } from './start-end-csv.ts';

/** A chart for a screen: its numbers with 4 significant digits, null where there is none. */
function startEndOnTheWire({ starts, ends, steadiness, windows, ...cells }: StartEnd): OnTheWire<StartEnd> {
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
export function stationStartEndProduct(format: 'csv' | 'json', station: StartEndToWrite, from: Provenance): string {
  if (format === 'csv') return csvTable(START_END_COLUMNS, startEndRows(station));
  return JSON.stringify({ ...provenanceNotes(from), ...entry(station) });
}

/** The charts of several stations as one file: in JSON a list of them. */
export function startEndsProduct(
  format: 'csv' | 'json',
  stations: readonly StartEndToWrite[],
  from: Provenance,
): string {
  if (format === 'csv') return csvTable(START_END_COLUMNS, rowsOf(stations));
  return JSON.stringify({ ...provenanceNotes(from), stations: stations.map(entry) });
}

function entry({ row, slopeUnit, chart }: StartEndToWrite) {
  return { station_code: row.code, trendOf: row.trendOf, slopeUnit, ...startEndOnTheWire(chart) };
}

function* rowsOf(stations: readonly StartEndToWrite[]): Generator<WindowRow> {
  for (const station of stations) yield* startEndRows(station);
}
