import { areaProblem } from './area-error.ts';
import { whenFree } from './busy.ts';
import { type Connection, immediately, rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';
import { deleteStation } from './delete-station.ts';
import { derivedStations, hasParts, rebuildDerived } from './derived.ts';
import { StoreError } from './errors.ts';
import { recipeOf } from './history-text.ts';
import { refuseWhileOthersChange, reserveIds, VISIBLE } from './import-claim.ts';
import { layParts } from './lay-parts.ts';
import { loadParts, saveRecords, standingRecord, storeLaid } from './lay-record.ts';
import { recipeProblem } from './recipes.ts';
import { editionOfFacts } from './station-edition.ts';
import { bareFacts, FACT_NAMES, type Facts, layFacts, type StationInput } from './station-facts.ts';
import { checkStation, type StationPatch } from './station-values.ts';
import { getStation, type StationRow } from './stations.ts';
import { sweep } from './withdraw.ts';
import { insertStation, updateStation } from './write-facts.ts';

export type { StationPatch };

/** Changes what is known of a station. Where its drainage area changes, a record that mixes depths over it with other units
 *  is laid anew; where the area or the recipe changes, so are the records derived from it.
 *  @param edition  of the station as it was read, by editionOf: the change is refused when it is another one by now
 *  @throws StoreError 'not-found', 'changed', or 'bad-input' naming what cannot be taken; StoreBusyError while an import is
 *          stored */
export async function editStation(
  regionId: number,
  code: string,
  patch: StationPatch,
  { edition = null }: { edition?: string | null } = {},
): Promise<StationRow> {
  checkStation(patch);
  return changed(regionId, code, (connection) => {
    const { id, facts } = readStation(connection, regionId, code);
    if (edition !== null && editionOfFacts(facts) !== edition) {
      throw new StoreError('changed', `Station "${code}" was changed after it was read. Nothing was saved.`);
    }
    const areaBefore = facts.areaKm2;
    lay(connection, regionId, { id, code }, facts, patch);
    updateStation(connection, { id, facts });
    if (facts.areaKm2 !== areaBefore) relay(connection, { id, code, areaKm2: facts.areaKm2 as number | null });
    rebuildDerived(connection, [id]);
  });
}

/** Adds a station by hand: one without days of its own as yet, or one that is derived from others.
 *  @throws StoreError 'exists' when the region has that code, 'bad-input'; StoreBusyError while an import is stored */
export async function addStation(regionId: number, { code: given, ...patch }: StationInput): Promise<StationRow> {
  const code = given.trim();
  if (code === '' || code.length > 100)
    throw new StoreError('bad-input', 'A station needs a code of 1–100 characters.');
  checkStation(patch);
  return changed(regionId, code, (connection) => {
    if (rows(connection, 'SELECT 1 FROM Region WHERE id = ?').get([regionId]) === undefined) {
      throw new StoreError('not-found', 'The region is not there any more.');
    }
    if (rows(connection, 'SELECT 1 FROM Station WHERE regionId = ? AND code = ?').get([regionId, code])) {
      throw new StoreError('exists', `The region has a station "${code}" already.`);
    }
    const facts = bareFacts(code);
    const id = reserveIds(connection, 'Station', 1);
    lay(connection, regionId, { id, code }, facts, patch);
    insertStation(connection, regionId, { id, code, facts }, null);
    rebuildDerived(connection, [id]);
  });
}

/** Takes away a station that has no imported days: those go by undoing their import.
 *  @throws StoreError 'not-found'; 'needed' while it has imported days or another station is derived from it;
 *          StoreBusyError while an import is stored */
export async function removeStation(regionId: number, code: string, path = databasePath()): Promise<void> {
  const connection = sharedConnection(path);
  const remove = () => {
    refuseWhileOthersChange(connection);
    const { id } = readStation(connection, regionId, code);
    const [file] = (rows(connection, IMPORTED).get([id]) as [string] | undefined) ?? [];
    if (file !== undefined) {
      throw new StoreError('needed', `Station "${code}" has days from ${file}; undo that import to take them away.`);
    }
    const user = derivedStations(connection, regionId).find(({ recipe }) => recipe.terms.some((t) => t.code === code));
    if (user) {
      throw new StoreError(
        'needed',
        `The record of station "${user.code}" is derived from "${code}"; change that first.`,
      );
    }
    deleteStation(connection, id);
  };
  await whenFree(() => immediately(connection, remove));
  await sweep(connection);
}

const IMPORTED = `SELECT i.fileName FROM Part p JOIN Import i ON i.id = p.importId
  WHERE p.stationId = ? AND i.state IN ${VISIBLE} ORDER BY i.id LIMIT 1`;

async function changed(regionId: number, code: string, write: (connection: Connection) => void): Promise<StationRow> {
  const connection = sharedConnection(databasePath());
  await whenFree(() =>
    immediately(connection, () => {
      // An import writes whole stations at its end, as it found them at its beginning.
      refuseWhileOthersChange(connection);
      write(connection);
    }),
  );
  await sweep(connection);
  const station = await getStation(regionId, code);
  if (!station) throw new StoreError('not-found', `Station "${code}" was taken away meanwhile.`);
  return station;
}

function readStation(connection: Connection, regionId: number, code: string): { id: number; facts: Facts } {
  const found = rows(
    connection,
    `SELECT id, ${FACT_NAMES.join(', ')} FROM Station WHERE regionId = ? AND code = ?`,
  ).get([regionId, code]) as [number, ...(string | number | null)[]] | undefined;
  if (!found) throw new StoreError('not-found', `The region has no station "${code}".`);
  const [id, ...values] = found;
  return { id, facts: Object.fromEntries(FACT_NAMES.map((name, index) => [name, values[index]])) as Facts };
}

/** Lays a checked change over a station's facts, changing `facts`, and looks at what several of them make together. */
function lay(
  connection: Connection,
  regionId: number,
  { id, code }: { id: number; code: string },
  facts: Facts,
  patch: StationPatch,
): void {
  const trimmed = { ...patch, name: patch.name?.trim(), river: patch.river?.trim() };
  layFacts(facts, { code, ...trimmed });
  if ((facts.latitude === null) !== (facts.longitude === null)) {
    throw new StoreError('bad-input', 'A position has a latitude and a longitude; give both, or leave both empty.');
  }
  if (patch.derived) checkRecipe(connection, regionId, { id, code }, recipeOf(facts.derived as string)!);
}

function checkRecipe(
  connection: Connection,
  regionId: number,
  { id, code }: { id: number; code: string },
  recipe: NonNullable<StationPatch['derived']>,
): void {
  if (hasParts(connection, id, recipe.quantity)) {
    const message = `Station "${code}" has imported days of ${recipe.quantity}; derive a station of its own instead.`;
    throw new StoreError('bad-input', message);
  }
  const others = derivedStations(connection, regionId).filter((station) => station.id !== id);
  const codes = rows(connection, 'SELECT code FROM Station WHERE regionId = ?').all([regionId]).flat() as string[];
  const problem = recipeProblem(code, recipe, {
    recipes: new Map(others.map((station) => [station.code, station.recipe])),
    codes: new Set(codes),
  });
  if (problem) throw new StoreError('bad-input', problem);
}

/** Lays a station's flows anew, where several parts meet, for a drainage area that changed. */
function relay(
  connection: Connection,
  { id, code, areaKm2 }: { id: number; code: string; areaKm2: number | null },
): void {
  const place = { stationId: id, quantity: 'flow' } as const;
  const parts = loadParts(connection, id, 'flow');
  if (parts.length < 2) return;
  const problem = areaProblem(parts, areaKm2);
  if (problem) throw new StoreError('bad-input', `Station "${code}" needs its drainage area: ${problem}.`);
  const standing = standingRecord(connection, id, 'flow');
  saveRecords(connection, [storeLaid(connection, place, layParts(parts, { areaKm2 }), { standing, importId: null })]);
}
