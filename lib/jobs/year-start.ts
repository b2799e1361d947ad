import { type Basis, BasisError, type BasisKey, seasonProblem } from '../basis.ts';
import { resolveYearStart } from '../region/year-start.ts';
import { cached } from './cached.ts';
import { keepMinima, minimaOptions } from './minima-results.ts';
import type { PackedMinima } from './pack-minima.ts';
import { runTask } from './pool.ts';
import { checkAsRead } from './region-inputs.ts';
import { resultKey, type StationInput } from './result-key.ts';
import { chunksOf } from './share-out.ts';

const KEYS: readonly BasisKey[] = ['exclude'];
const MONTHS = 12;

/** Stations whose regimes suggest the month before all are read: from all over the list, since codes run by basin. */
const SAMPLE_STATIONS = 60;

/** First month of the low-flow year: the basis's own, or for `auto` the region's wettest month.
 *  @throws BasisError when the season does not fit into the year that `auto` came to */
export async function yearStartOf(stations: readonly StationInput[], basis: Basis): Promise<number> {
  if (basis.yearStart !== 'auto') return basis.yearStart;
  const key = resultKey('regimes', { values: basis, keys: KEYS }, stations, 'none');
  const ratios = await cached('regimes', key, () => regimesOf(stations, basis));
  const yearStart = wettestMonth(stations, ratios);
  const problem = seasonProblem(basis.season, yearStart);
  if (problem) throw new BasisError(`Basis key "season" does not fit: ${problem}.`);
  return yearStart;
}

function wettestMonth(stations: readonly StationInput[], ratios: Float64Array): number {
  const regimes = stations.flatMap(({ dataHash }, i) =>
    dataHash === null ? [] : [ratios.subarray(i * MONTHS, (i + 1) * MONTHS)],
  );
  return resolveYearStart(regimes);
}

/** Monthly regimes of all stations, twelve ratios each in their order.
 *
 *  Every record is read for this, and reading costs as much as computing: so a sample of stations suggests a month, the
 *  minima of that year are computed on the way, and kept when the month turns out to be right, as it mostly does. */
async function regimesOf(stations: readonly StationInput[], basis: Basis): Promise<Float64Array> {
  const step = Math.max(1, Math.floor(stations.length / SAMPLE_STATIONS));
  const sample = stations.filter((_, i) => i % step === 0);
  const guess = wettestMonth(sample, await sampleRatios(sample, basis));
  const fits = seasonProblem(basis.season, guess) === null;
  const chunks = await Promise.all(chunksOf(stations).map((chunk) => readRegimes(chunk, basis, fits ? guess : null)));
  const ratios = new Float64Array(stations.length * MONTHS);
  let at = 0;
  for (const chunk of chunks) {
    ratios.set(chunk.ratios, at);
    at += chunk.ratios.length;
  }
  const minima = chunks.flatMap((chunk) => chunk.minima ?? []);
  if (minima.length > 0 && wettestMonth(stations, ratios) === guess) {
    await keepMinima(stations, basis, guess, minima);
  }
  return ratios;
}

/** Regimes of a sample, read by all workers at once: they start up together. */
async function sampleRatios(sample: readonly StationInput[], basis: Basis): Promise<Float64Array> {
  const half = Math.ceil(sample.length / 2);
  const parts = await Promise.all(chunksOf(sample, half).map((chunk) => readRegimes(chunk, basis, null)));
  return Float64Array.from(parts.flatMap(({ ratios }) => [...ratios]));
}

async function readRegimes(
  stations: readonly StationInput[],
  basis: Basis,
  yearStart: number | null,
): Promise<{ ratios: Float64Array; minima: PackedMinima | null }> {
  const read = await runTask('regimes', {
    stationIds: stations.map(({ facts }) => facts.id),
    exclude: basis.exclude,
    minimaOptions: yearStart === null ? null : minimaOptions(basis, yearStart),
  });
  checkAsRead(stations, read.hashes);
  return read;
}
