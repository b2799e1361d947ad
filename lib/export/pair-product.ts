import type { PairComparison, PairTrend, WeatherTrend } from '../region/pair-types.ts';
import type { StationFacts } from '../region/ranking-types.ts';
import type { Column } from './csv.ts';
import type { Format } from './format.ts';
import { jsonCell, stationFeature } from './geojson.ts';
import { PAIR_COLUMNS, pairCsv, pairRows } from './pair-csv.ts';
import { type Provenance, provenanceNotes } from './provenance.ts';
import { tableMetadata } from './table-metadata.ts';
import { WEATHER_COLUMNS, weatherCsv, weatherRows } from './weather-csv.ts';

/** A station against references as a file. GeoJSON holds the stations at their places, each with its part in it.
 *  @param stations  facts of the station and of the references */
export function pairProduct(
  format: Format,
  comparison: PairComparison,
  from: Provenance,
  stations: readonly StationFacts[],
): string {
  const { index } = from.basis;
  if (format === 'csv') return pairCsv(comparison, index);
  const summary = pairSummary(comparison);
  if (format === 'json') {
    const years = cellsOf(PAIR_COLUMNS, pairRows(comparison, index), ['station_code', 'reference_codes', 'index']);
    return JSON.stringify({ ...provenanceNotes(from), ...summary, years });
  }
  return features(stations, (code) => (code === comparison.station.code ? 'station' : 'reference'), {
    ...provenanceNotes(from),
    ...summary,
  });
}

/** The trend of minima given weather as a file; otherwise as pairProduct. */
export function weatherProduct(
  format: Format,
  trend: WeatherTrend,
  from: Provenance,
  stations: readonly StationFacts[],
): string {
  if (format === 'csv') return weatherCsv(trend);
  const summary = weatherSummary(trend);
  if (format === 'json') {
    const years = cellsOf(WEATHER_COLUMNS, weatherRows(trend), [
      'station_code',
      'quantity',
      'measured_at',
      'antecedent_days',
    ]);
    return JSON.stringify({ ...provenanceNotes(from), ...summary, years });
  }
  return features(stations, (code) => (code === trend.station.code ? 'station' : 'weather'), {
    ...provenanceNotes(from),
    ...summary,
  });
}

/** What lies beside the CSV file: its columns, what it rests on, and what the comparison came to. */
export function pairMetadata(file: string, comparison: PairComparison, from: Provenance): Record<string, unknown> {
  const title = `${from.region.name}: ${comparison.station.code} against ${comparison.references.map(({ code }) => code).join(', ')}`;
  return withSummary(tableMetadata(file, title, PAIR_COLUMNS, from), pairSummary(comparison));
}

/** The same of minima given weather. */
export function weatherMetadata(file: string, trend: WeatherTrend, from: Provenance): Record<string, unknown> {
  const title = `${from.region.name}: minima of ${trend.station.code} given the weather before them`;
  return withSummary(tableMetadata(file, title, WEATHER_COLUMNS, from), weatherSummary(trend));
}

function pairSummary(comparison: PairComparison): Record<string, unknown> {
  const { station, references, sentence, problem, correlation, stationTrend, referenceTrend, ratioTrend } = comparison;
  return {
    station_code: station.code,
    reference_codes: references.map(({ code }) => code),
    sentence,
    problem,
    rank_correlation: correlation,
    detectable_percent_per_decade: comparison.detectable,
    trends: {
      station: trendCells(stationTrend),
      reference: trendCells(referenceTrend),
      ratio: trendCells(ratioTrend),
    },
  };
}

function weatherSummary(trend: WeatherTrend): Record<string, unknown> {
  const { station, quantity, from, antecedentDays, sentence, problem, correlation, plain, adjusted, weather } = trend;
  return {
    station_code: station.code,
    quantity,
    measured_at: from.code,
    antecedent_days: antecedentDays,
    sentence,
    problem,
    rank_correlation: correlation,
    detectable_percent_per_decade: trend.detectable,
    trends: { minima: trendCells(plain), given_weather: trendCells(adjusted), weather: trendCells(weather) },
  };
}

function trendCells(trend: PairTrend | null): Record<string, number | null> | null {
  if (!trend) return null;
  return {
    slope_per_decade: trend.slopePerDecade,
    slope_ci_low: trend.low,
    slope_ci_high: trend.high,
    percent_per_decade: trend.percentPerDecade,
    percent_ci_low: trend.percentLow,
    percent_ci_high: trend.percentHigh,
    kendall_tau: trend.tau,
    z: trend.z,
    p_value: trend.p,
    lag1: trend.r1,
    serial_factor: trend.serialFactor,
  };
}

const withSummary = (metadata: Record<string, unknown>, summary: Record<string, unknown>) => ({
  ...metadata,
  notes: [...(metadata.notes as unknown[]), summary],
});

function cellsOf<Row>(columns: readonly Column<Row>[], rows: readonly Row[], without: readonly string[]) {
  const kept = columns.filter(({ name }) => !without.includes(name));
  return rows.map((row) => Object.fromEntries(kept.map(({ name, value }) => [name, jsonCell(value(row))])));
}

function features(
  stations: readonly StationFacts[],
  partOf: (code: string) => string,
  notes: Record<string, unknown>,
): string {
  return JSON.stringify({
    type: 'FeatureCollection',
    features: stations.map((station) =>
      stationFeature(station, {
        station_code: station.code,
        station_name: station.name,
        part: partOf(station.code),
      }),
    ),
    ...notes,
  });
}
