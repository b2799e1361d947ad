import type { Basis, BasisKey, ResolvedBasis } from '../basis.ts';
import { regionBand } from '../curves/band.ts';
import { STANDARD_EXCEEDANCES } from '../curves/exceedances.ts';
import { normaliseCurve } from '../curves/normalise.ts';
import type { StationFacts } from '../region/ranking-types.ts';
import type { RegionRow } from '../store/regions.ts';
import { cached } from './cached.ts';
import { packedMinimaOf, type RegionMinima } from './minima.ts';
import { packMinima, unpackMinima } from './pack-minima.ts';
import { runTask } from './pool.ts';
import { rankingOf } from './ranking.ts';
import { checkAsRead, withInputs } from './region-inputs.ts';
import { resultKey, type StationInput } from './result-key.ts';
import { chunksOf } from './share-out.ts';
import type { PackedCurves } from './tasks/curves.ts';
import type { CurveKind, RegionCurves, StationCurveRow } from './types.ts';

/** Curves rest on the days of usable years in the period: on all that decides those, and not on the scale. */
const KEYS: readonly BasisKey[] = ['period', 'yearStart', 'season', 'days', 'maxMissingDays', 'exclude'];
const SCALE: readonly BasisKey[] = ['normalise'];

const UNIT = { area: 'L/s/km²', mean: '1', median: '1', none: 'm³/s' } as const;

/** Duration curves of a region's stations under a basis, normalised as it says, with the region's band.
 *  A station that has no curve on this scale is named in `leftOut` with the reason.
 *  @param kind  'period': all days of usable years pooled; 'median-annual': the median of the years' own curves
 *  @returns `key`: equal exactly when all that the curves depend on is equal, good as an ETag */
export async function curvesOf(
  region: Pick<RegionRow, 'id'>,
  basis: Basis,
  kind: CurveKind = 'period',
): Promise<RegionCurves & { key: string }> {
  return withInputs(region.id, async (inputs) => {
    const { ranking } = await rankingOf(region, basis);
    const minima = await packedMinimaOf(inputs, basis);
    const packed = await packedCurvesOf(inputs, minima, ranking.basis, kind);
    const key = resultKey(`normalised-curves ${kind}`, { values: ranking.basis, keys: [...KEYS, ...SCALE] }, inputs);
    return { ...normalised(inputs, packed, ranking.basis), basis: ranking.basis, kind, key };
  });
}

async function packedCurvesOf(
  stations: readonly StationInput[],
  minima: RegionMinima,
  basis: ResolvedBasis,
  kind: CurveKind,
): Promise<PackedCurves[]> {
  const { season, exclude, period } = basis;
  const options = { yearStart: minima.yearStart, season, exclude };
  const key = resultKey(`curves ${kind}`, { values: basis, keys: KEYS }, stations, 'none');
  return cached('curves', key, () => {
    const byStation = unpackMinima(minima.packed);
    const recorded = stations.filter(({ dataHash }) => dataHash !== null);
    return Promise.all(
      chunksOf(recorded).map(async (chunk) => {
        const entries = chunk.map(({ facts: { id } }) => ({ stationId: id, minima: byStation.get(id)! }));
        const pack = await runTask('curves', { minima: packMinima(entries), kind, options, period });
        checkAsRead(chunk, pack.hashes);
        return pack;
      }),
    );
  });
}

function normalised(
  stations: readonly StationInput[],
  packs: readonly PackedCurves[],
  basis: ResolvedBasis,
): Pick<RegionCurves, 'unit' | 'exceedances' | 'curves' | 'leftOut' | 'band'> {
  const raw = unpackCurves(packs);
  const curves: StationCurveRow[] = [];
  const leftOut: RegionCurves['leftOut'] = [];
  for (const { facts } of stations) {
    const curve = raw.get(facts.id);
    const scaled = curve && curve.days > 0 ? scaledCurve(curve, facts, basis) : NO_YEAR;
    if (curve && scaled.ok) curves.push({ station: facts, ...curve, flows: scaled.flows });
    else if (!scaled.ok) leftOut.push({ station: facts, reason: scaled.reason });
  }
  return {
    unit: UNIT[basis.normalise],
    exceedances: Float64Array.from(STANDARD_EXCEEDANCES),
    curves,
    leftOut,
    band: bandOf(curves),
  };
}

const NO_YEAR = { ok: false, reason: 'no usable year in the period' } as const;

function scaledCurve(curve: RawCurve, { areaKm2 }: StationFacts, { normalise }: ResolvedBasis) {
  return normaliseCurve(curve, { by: normalise, areaKm2 });
}

/** The band over no station at all is NaN everywhere, and of the same length. */
function bandOf(curves: readonly StationCurveRow[]): RegionCurves['band'] {
  if (curves.length > 0) return regionBand(curves.map(({ flows }) => flows));
  const none = () => new Float64Array(STANDARD_EXCEEDANCES.length).fill(Number.NaN);
  return { p10: none(), p50: none(), p90: none() };
}

type RawCurve = Omit<StationCurveRow, 'station'>;

function unpackCurves(packs: readonly PackedCurves[]): Map<number, RawCurve> {
  const length = STANDARD_EXCEEDANCES.length;
  const curves = new Map<number, RawCurve>();
  for (const { stationIds, flows, days, years, mean, median } of packs) {
    stationIds.forEach((id, i) => {
      curves.set(id, {
        flows: flows.subarray(i * length, (i + 1) * length),
        days: days[i],
        years: years[i],
        mean: mean[i],
        median: median[i],
      });
    });
  }
  return curves;
}
