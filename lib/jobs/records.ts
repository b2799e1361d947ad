import { createHash } from 'node:crypto';
import type { Basis, BasisKey } from '../basis.ts';
import { isoDate } from '../calendar/day.ts';
import { seasonSpan } from '../calendar/season.ts';
import type { AnnualMinima } from '../lowflow/annual-minima-types.ts';
import type { FlagName } from '../series/daily-series.ts';
import { changesPresent } from '../store/changes-present.ts';
import { quantitiesPresent } from '../store/quantities-present.ts';
import type { RegionRow } from '../store/regions.ts';
import { type StationRecord, stationRecords } from '../store/stations.ts';
import { cached } from './cached.ts';
import { periodCountsOf, resolvedBasis } from './common-periods.ts';
import { packedMinimaOf } from './minima.ts';
import { minimaKey } from './minima-results.ts';
import { unpackMinima } from './pack-minima.ts';
import { joinYearDays, type PackedYearDays } from './pack-year-days.ts';
import { runTask } from './pool.ts';
import { COUNTED_FLAGS, type CountedFlag, type RegionRecords, type StationYears } from './records-types.ts';
import { checkAsRead, withInputs } from './region-inputs.ts';
import { resultKey, type StationInput } from './result-key.ts';
import { chunksOf } from './share-out.ts';

/** Days are counted by year and season; what counts as missing or usable comes with the minima. */
const KEYS: readonly BasisKey[] = ['yearStart', 'season'];

/** What the records of a region hold, station by station and low-flow year by low-flow year, under a basis.
 *  @returns `key`: equal exactly when all that the answer depends on is equal, good as an ETag
 *  @throws BasisError when the season does not fit into the low-flow year */
export async function recordsOf(
  region: Pick<RegionRow, 'id'>,
  basis: Basis,
): Promise<{ records: RegionRecords; key: string }> {
  return withInputs(region.id, async (inputs) => {
    const minima = await packedMinimaOf(inputs, basis);
    const [days, { common, key: periodsKey }] = await Promise.all([
      yearDaysOf(inputs, basis, minima.yearStart),
      periodCountsOf(inputs, minima, basis),
    ]);
    const heads = new Map((await stationRecords(region.id)).map((record) => [record.stationId, record]));
    const quantities = quantitiesPresent(region.id);
    const changes = changesPresent(region.id);
    const byStation = unpackMinima(minima.packed);
    const reasons = new Map<string, number>();
    const stations = inputs.map(
      ({ facts: { id, code, name, river, areaKm2, influence } }, i): StationYears => ({
        ...{ code, name, river, areaKm2, influence, quantities: quantities.get(id) ?? [] },
        changes: changes.get(id) ?? [],
        ...spanOf(heads.get(id)),
        ...yearsOf(byStation.get(id)!, days, i, reasons),
      }),
    );
    const resolved = resolvedBasis(basis, minima.yearStart, common);
    const { yearStart, season } = resolved;
    const years = yearsOfAll(stations);
    const records = {
      ...{ basis: resolved, ...years, reasons: [...reasons.keys()], stations },
      yearDays: rangeOf(years).map((year) => daysOfSeason(year, yearStart, season)),
    };
    const minimaKeyNow = minimaKey(inputs, basis, yearStart);
    const key = createHash('sha256')
      .update(JSON.stringify([resultKey('records', { values: basis, keys: [] }, inputs), minimaKeyNow, periodsKey]))
      .update(JSON.stringify([basis, [...quantities], [...changes]]))
      .digest('hex');
    return { records, key };
  });
}

/** Days with a value and with each flag, of all stations in their order. */
function yearDaysOf(stations: readonly StationInput[], basis: Basis, yearStart: number): Promise<PackedYearDays> {
  const key = resultKey('year-days', { values: { ...basis, yearStart }, keys: KEYS }, stations, 'none');
  return cached('year-days', key, async () => {
    const options = { yearStart, season: basis.season };
    const packs = chunksOf(stations).map(async (chunk) => {
      const read = await runTask('yearDays', { stationIds: chunk.map(({ facts }) => facts.id), options });
      checkAsRead(chunk, read.hashes);
      return read.packed;
    });
    return joinYearDays(await Promise.all(packs));
  });
}

function spanOf(head: StationRecord | undefined): Pick<StationYears, 'first' | 'last' | 'valueCount'> {
  const iso = (day: number | null | undefined) => (day === null || day === undefined ? null : isoDate(day));
  return { first: iso(head?.firstValueDay), last: iso(head?.lastValueDay), valueCount: head?.valueCount ?? 0 };
}

const NAMES: Record<CountedFlag, FlagName> = {
  provisional: 'provisional',
  estimated: 'estimated',
  ice: 'ice',
  belowDetection: 'below-detection',
  suspect: 'suspect',
  rejected: 'rejected',
};

/** The columns of one station. @param reasons  every reason met so far, with its place; what is new is added */
function yearsOf(
  minima: AnnualMinima,
  { starts, values, flagged }: PackedYearDays,
  station: number,
  reasons: Map<string, number>,
): Pick<StationYears, 'firstYear' | 'values' | 'missing' | 'flagged' | 'usable' | 'reason'> {
  const part = (days: Uint16Array) => Array.from(days.subarray(starts[station], starts[station + 1]));
  const counted: StationYears['flagged'] = {};
  for (const flag of COUNTED_FLAGS) {
    const days = part(flagged[NAMES[flag]] ?? new Uint16Array(0));
    if (days.some((count) => count > 0)) counted[flag] = days;
  }
  return {
    firstYear: minima.years.length === 0 ? null : minima.years[0],
    values: part(values),
    missing: Array.from(minima.missingDays),
    flagged: counted,
    usable: Array.from(minima.usable),
    reason: minima.reason.map((text) => placeOf(text, reasons)),
  };
}

function placeOf(reason: string, reasons: Map<string, number>): number {
  if (reason === '') return -1;
  const place = reasons.get(reason) ?? reasons.size;
  reasons.set(reason, place);
  return place;
}

type Years = Pick<RegionRecords, 'firstYear' | 'lastYear'>;

function yearsOfAll(stations: readonly StationYears[]): Years {
  let first = Number.POSITIVE_INFINITY;
  let last = Number.NEGATIVE_INFINITY;
  for (const { firstYear, values } of stations) {
    if (firstYear === null) continue;
    first = Math.min(first, firstYear);
    last = Math.max(last, firstYear + values.length - 1);
  }
  return first <= last ? { firstYear: first, lastYear: last } : { firstYear: null, lastYear: null };
}

const rangeOf = ({ firstYear, lastYear }: Years): number[] =>
  firstYear === null || lastYear === null
    ? []
    : Array.from({ length: lastYear - firstYear + 1 }, (_, i) => firstYear + i);

function daysOfSeason(year: number, yearStart: number, season: Basis['season']): number {
  const { first, last } = seasonSpan(year, yearStart, season);
  return last - first + 1;
}
