import type { FoundFacts } from '../intake/types.ts';
import type { Quantity } from '../series/quantities.ts';
import type { Claim } from './claim-import.ts';
import { type Connection, rows } from './connection.ts';
import { VISIBLE } from './import-claim.ts';
import { ImportRefused } from './import-refused.ts';
import { refuseDerived } from './plan-derived.ts';
import { stagedFileName } from './staged.ts';
import {
  bareFacts,
  FACT_NAMES,
  type FactChange,
  type FactName,
  type Facts,
  fillFacts,
  isChanged,
  layFacts,
  type StationInput,
} from './station-facts.ts';

/** A station as it will stand after the import. */
export interface PlannedStation {
  id: number;
  code: string;
  facts: Facts;
  /** number of the file that makes it; null when it is there already */
  madeBy: number | null;
  changed: boolean;
}

/** A part in the staging database, without its days. */
export interface StagedHead {
  id: number;
  file: number;
  code: string;
  quantity: Quantity;
}

/** A record to be laid: a station and quantity, with the staged parts that come to it in the order of their files. */
export interface Group {
  station: PlannedStation;
  quantity: Quantity;
  staged: StagedHead[];
  /** parts that stand */
  standing: number;
}

export interface Plan {
  stations: Map<string, PlannedStation>;
  /** by file, what each says of stations */
  said: Map<number, FactChange[]>;
  groups: Group[];
}

/** Works out what the staged files do to a region, writing nothing but what `idsFor` does.
 *  @param idsFor  the first of so many ids for new stations
 *  @throws ImportRefused naming the file and the station that is refused */
export function planImport(
  connection: Connection,
  { regionId, unknownStations }: Pick<Claim, 'regionId' | 'unknownStations'>,
  idsFor: (count: number) => number,
): Plan {
  const stations = standingStations(connection, regionId);
  makeRegistered(connection, stations);
  const heads = rows(connection, 'SELECT id, file, code, quantity FROM staging.part ORDER BY file, id').all([]);
  const staged = (heads as [number, number, string, Quantity][]).map(([id, file, code, quantity]) => ({
    id,
    file,
    code,
    quantity,
  }));
  for (const { code, file } of staged) {
    if (stations.has(code)) continue;
    if (unknownStations === 'refuse') throw unknownStation(connection, file, code);
    stations.set(code, { id: 0, code, facts: bareFacts(code), madeBy: file, changed: false });
  }
  const said = laySaid(connection, stations, new Set(staged.map(({ file, code }) => `${file} ${code}`)));
  const made = [...stations.values()].filter(({ madeBy }) => madeBy !== null);
  const firstId = made.length > 0 ? idsFor(made.length) : 0;
  for (const [index, station] of made.entries()) station.id = firstId + index;
  const plan = { stations, said, groups: groupsOf(connection, regionId, stations, staged) };
  refuseDerived(connection, plan);
  return plan;
}

function standingStations(connection: Connection, regionId: number): Map<string, PlannedStation> {
  const read = rows(connection, `SELECT id, code, ${FACT_NAMES.join(', ')} FROM Station WHERE regionId = ?`);
  return new Map(
    (read.all([regionId]) as [number, string, ...(string | number | null)[]][]).map(([id, code, ...values]) => {
      const facts = Object.fromEntries(FACT_NAMES.map((name, index) => [name, values[index]])) as Facts;
      return [code, { id, code, facts, madeBy: null, changed: false }];
    }),
  );
}

/** Stations that a staged registry names and that are not there yet: the first to name one makes it. */
function makeRegistered(connection: Connection, stations: Map<string, PlannedStation>): void {
  for (const row of rows(connection, 'SELECT file, stations FROM staging.registry ORDER BY file').all([])) {
    const [file, inputs] = row as [number, string];
    for (const { code } of JSON.parse(inputs) as StationInput[]) {
      if (!stations.has(code)) {
        stations.set(code, { id: 0, code, facts: bareFacts(code), madeBy: file, changed: false });
      }
    }
  }
}

/** Lays what the files say of stations over their facts, in the order of the files: registries set a fact, files of flows
 *  fill one that is empty, of the stations that they hold days of.
 *  @param withDays  "file code" of these */
function laySaid(
  connection: Connection,
  stations: Map<string, PlannedStation>,
  withDays: ReadonlySet<string>,
): Map<number, FactChange[]> {
  const said = new Map<number, FactChange[]>();
  const staged = rows(
    connection,
    `SELECT file, stations, given FROM staging.registry UNION ALL SELECT file, stations, NULL FROM staging.facts
     ORDER BY file`,
  ).all([]) as [number, string, string | null][];
  for (const [file, text, given] of staged) {
    const list = said.get(file) ?? [];
    said.set(file, list);
    for (const input of JSON.parse(text) as (StationInput & FoundFacts)[]) {
      const station = stations.get(input.code);
      if (!station || (given === null && !withDays.has(`${file} ${input.code}`))) continue;
      const what =
        given === null
          ? fillFacts(station.facts, input)
          : { fields: layFacts(station.facts, input, JSON.parse(given) as FactName[]) };
      const change: FactChange = { code: input.code, made: station.madeBy === file, ...what };
      if (station.madeBy === null && isChanged(change)) station.changed = true;
      list.push(change);
    }
  }
  return said;
}

/** Overlapping records first: a file that is refused for its values then costs no copying. */
function groupsOf(
  connection: Connection,
  regionId: number,
  stations: Map<string, PlannedStation>,
  staged: StagedHead[],
): Group[] {
  const counts = rows(
    connection,
    `SELECT p.stationId, p.quantity, COUNT(*), MAX(s.code), MAX(s.areaKm2) FROM Station s JOIN Part p ON p.stationId = s.id
     JOIN Import i ON i.id = p.importId WHERE s.regionId = ? AND i.state IN ${VISIBLE} GROUP BY p.stationId, p.quantity`,
  ).all([regionId]) as [number, Quantity, number, string, number | null][];
  const standing = new Map(counts.map(([stationId, quantity, count]) => [`${stationId} ${quantity}`, count]));
  const groups = new Map<string, Group>();
  const groupOf = (station: PlannedStation, quantity: Quantity): Group => {
    const key = `${station.id} ${quantity}`;
    const group = groups.get(key) ?? { station, quantity, staged: [], standing: standing.get(key) ?? 0 };
    groups.set(key, group);
    return group;
  };
  for (const head of staged) groupOf(stations.get(head.code)!, head.quantity).staged.push(head);
  // A depth over the drainage area weighs otherwise when a registry corrects that area.
  for (const [, quantity, count, code, areaKm2] of counts) {
    const station = stations.get(code)!;
    if (count > 1 && quantity === 'flow' && station.facts.areaKm2 !== areaKm2) groupOf(station, quantity);
  }
  const overlaps = (group: Group) => Number(group.standing + group.staged.length > 1);
  return [...groups.values()].sort((a, b) => overlaps(b) - overlaps(a));
}

function unknownStation(connection: Connection, file: number, code: string): ImportRefused {
  return new ImportRefused({
    file: stagedFileName(connection, file),
    value: code,
    message: 'the region’s registry has no station of this code',
    remedy: 'Add the station to the registry, or name the station that the file is of',
  });
}
