import type { OnTheWire, RegionStartEnd } from '../region/window-types.ts';
import { type Column, csvTable } from './csv.ts';
import { type Provenance, provenanceNotes } from './provenance.ts';
import { WINDOW } from './start-end-csv.ts';
import { tableMetadata } from './table-metadata.ts';

/** One window over the stations of a region. */
interface RegionWindowRow {
  start: number;
  end: number;
  stations: number;
  negative: number;
  falling: number;
  rising: number;
}

const COLUMNS: readonly Column<RegionWindowRow>[] = [
  ...WINDOW,
  {
    name: 'stations',
    datatype: 'integer',
    description: 'ranked stations with at least 15 usable years in the window',
    value: ({ stations }) => stations,
  },
  {
    name: 'negative',
    datatype: 'integer',
    description: 'of these, with a trend towards drier: negative S, significant or not',
    value: ({ negative }) => negative,
  },
  {
    name: 'share_negative',
    datatype: 'number',
    description: 'negative over stations, 0 to 1',
    value: ({ negative, stations }) => negative / stations,
  },
  {
    name: 'falling',
    datatype: 'integer',
    description: 'of these, falling with an unadjusted p below alpha',
    value: ({ falling }) => falling,
  },
  {
    name: 'rising',
    datatype: 'integer',
    description: 'of these, rising with an unadjusted p below alpha',
    value: ({ rising }) => rising,
  },
];

/** Every window that some station has, by start and then by end. */
function* regionWindowRows(chart: RegionStartEnd): Generator<RegionWindowRow> {
  for (let i = 0; i < chart.starts.length; i++) {
    for (let j = 0; j < chart.ends.length; j++) {
      const cell = i * chart.ends.length + j;
      if (chart.stations[cell] === 0) continue;
      yield {
        start: chart.starts[i],
        end: chart.ends[j],
        stations: chart.stations[cell],
        negative: chart.negative[cell],
        falling: chart.falling[cell],
        rising: chart.rising[cell],
      };
    }
  }
}

/** A region's start–end chart as a file: in CSV a row a window, in JSON the counts by start and end. */
export function regionStartEndProduct(format: 'csv' | 'json', chart: RegionStartEnd, from: Provenance): string {
  if (format === 'csv') return csvTable(COLUMNS, regionWindowRows(chart));
  const { starts, ends, stations, negative, falling, rising } = chart;
  const cells: OnTheWire<RegionStartEnd> = {
    starts,
    ends,
    stations: [...stations],
    negative: [...negative],
    falling: [...falling],
    rising: [...rising],
  };
  return JSON.stringify({ ...provenanceNotes(from), ...cells });
}

/** What lies beside the CSV file. */
export function regionStartEndMetadata(from: Provenance, fileName: string): Record<string, unknown> {
  return tableMetadata(fileName, `${from.region.name}: trends for every start year and end year`, COLUMNS, from);
}
