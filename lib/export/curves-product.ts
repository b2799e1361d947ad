import type { StationFacts } from '../region/ranking-types.ts';
import { curvesCsv } from './curves-csv.ts';
import type { Format } from './format.ts';
import { stationFeature } from './geojson.ts';
import { jsonText } from './json.ts';
import { type Narrowing, narrowTo } from './narrow.ts';
import { type Provenance, provenanceNotes } from './provenance.ts';

/** The curves of a region, in one unit. */
export interface CurvesToWrite {
  kind: string;
  unit: string;
  exceedances: Float64Array;
  curves: readonly { station: StationFacts; flows: Float64Array; days: number; years: number }[];
  leftOut: readonly { station: StationFacts; reason: string }[];
  band: { p10: Float64Array; p50: Float64Array; p90: Float64Array };
}

/** Duration curves as a file. In JSON the stations without a curve stand beside them, with the reason. */
export function curvesProduct(
  format: Format,
  region: CurvesToWrite,
  from: Provenance,
  narrowing: Narrowing = {},
): string {
  const { kind, unit, exceedances, band } = region;
  const curves = narrowTo(region.curves, narrowing, ({ station }) => station);
  const leftOut = narrowTo(region.leftOut, narrowing, ({ station }) => station);
  if (format === 'csv') {
    return curvesCsv(curves.map(({ station, flows }) => ({ code: station.code, unit, exceedances, flows })));
  }
  const head = { ...provenanceNotes(from), kind, unit, exceedances };
  const left = leftOut.map(({ station, reason }) => ({ station_code: station.code, reason }));
  if (format === 'json') {
    const list = curves.map(({ station, flows, days, years }) => ({ station_code: station.code, days, years, flows }));
    return jsonText({ ...head, curves: list, left_out: left, band });
  }
  const features = curves.map(({ station, flows, days, years }) =>
    stationFeature(station, {
      station_code: station.code,
      station_name: station.name,
      unit,
      days,
      years,
      exceedances,
      flows,
    }),
  );
  return jsonText({ type: 'FeatureCollection', features, ...head, left_out: left });
}
