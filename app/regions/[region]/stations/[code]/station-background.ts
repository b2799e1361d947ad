import { type BesideFlow, besideFlow } from '@/lib/jobs/beside-flow';
import { listLinks } from '@/lib/store/links';
import { derivedWith } from '@/lib/store/station-quantities';
import { getStation, listStations, type StationRow } from '@/lib/store/stations';

/** A station's code and name, as a link to its page needs them. */
export interface NamedStation {
  code: string;
  name: string;
}

/** What a station's page says beyond its figures. */
export interface StationBackground {
  station: StationRow;
  /** the next stations up and down the river, as a person confirmed them */
  upstream: NamedStation[];
  downstream: NamedStation[];
  /** stations that a derived one comes from, by code; one that is gone bears its code as name */
  terms: ReadonlyMap<string, string>;
  /** stations derived with this one */
  uses: NamedStation[];
  beside: BesideFlow[];
}

/** @returns null when the region has no such station */
export async function stationBackground(regionId: number, code: string): Promise<StationBackground | null> {
  const [station, links, stations] = await Promise.all([
    getStation(regionId, code),
    listLinks(regionId),
    listStations(regionId),
  ]);
  if (!station) return null;
  const names = new Map(stations.map(({ code: each, name }) => [each, name]));
  const named = (each: string): NamedStation => ({ code: each, name: names.get(each) ?? each });
  return {
    station,
    upstream: links.filter(({ downstream }) => downstream === code).map(({ upstream }) => named(upstream)),
    downstream: links.filter(({ upstream }) => upstream === code).map(({ downstream }) => named(downstream)),
    terms: new Map(station.derived?.terms.map((term) => [term.code, named(term.code).name])),
    uses: derivedWith(regionId, code),
    beside: besideFlow(station),
  };
}
