import { BASIS_KEYS, type Basis, DEFAULT_BASIS, parseBasis } from '../basis.ts';
import { dateOfDay } from '../calendar/day.ts';
import { whenFree } from './busy.ts';
import { rows, sharedConnection } from './connection.ts';
import { StoreError } from './errors.ts';
import { VISIBLE } from './import-claim.ts';
import { openStore } from './open.ts';
import { slugOf } from './slug.ts';

export { deleteRegion } from './delete-region.ts';
export { slugOf };

export interface RegionRow {
  id: number;
  slug: string;
  name: string;
  /** made-up data; every screen says so */
  invented: boolean;
  basis: Basis;
  tileUrl: string | null;
  tileAttribution: string | null;
}

export interface RegionSummary {
  id: number;
  slug: string;
  name: string;
  invented: boolean;
  stations: number;
  /** stations with a record of daily flows */
  records: number;
  /** calendar years of the first and last value of any record; null when there is none */
  firstYear: number | null;
  lastYear: number | null;
  /** ISO date (UTC) of the latest import; null when there is none */
  lastImport: string | null;
}

/** All regions by name, with what they hold. */
export async function listRegions(): Promise<RegionSummary[]> {
  const found = rows(
    sharedConnection(openStore().path),
    `SELECT g.id, g.slug, g.name, g.invented, COUNT(s.id), COUNT(r.id), MIN(r.firstValueDay), MAX(r.lastValueDay),
       (SELECT SUBSTR(MAX(i.createdAt), 1, 10) FROM Import i WHERE i.regionId = g.id AND i.state IN ${VISIBLE})
     FROM Region g LEFT JOIN Station s ON s.regionId = g.id
     LEFT JOIN Record r ON r.stationId = s.id AND r.quantity = 'flow'
     GROUP BY g.id ORDER BY g.name`,
  ).all([]) as [number, string, string, number, number, number, number | null, number | null, string | null][];
  const yearOf = (day: number | null) => (day === null ? null : dateOfDay(day).year);
  return found.map(([id, slug, name, invented, stations, records, first, last, lastImport]) => ({
    id,
    slug,
    name,
    invented: invented !== 0,
    stations,
    records,
    firstYear: yearOf(first),
    lastYear: yearOf(last),
    lastImport,
  }));
}

/** A region by the slug of its name, or null. */
export async function getRegion(slug: string): Promise<RegionRow | null> {
  const row = await openStore().prisma.region.findUnique({ where: { slug } });
  return row && toRegion(row);
}

/** Makes an empty region.
 *  @throws StoreError 'exists' when a region's name has the same slug, 'bad-input' when the name is empty */
export async function createRegion({
  name,
  invented = false,
}: {
  name: string;
  invented?: boolean;
}): Promise<RegionRow> {
  const data = { name: usableName(name), slug: slugOf(name), invented };
  return toRegion(await whenFree(() => unlessTaken(name, openStore().prisma.region.create({ data }))));
}

/** Gives a region another name, and with it another slug.
 *  @throws StoreError 'not-found', 'exists' or 'bad-input' */
export async function renameRegion(slug: string, name: string): Promise<RegionRow> {
  return updateRegion(slug, { name: usableName(name), slug: slugOf(name) });
}

/** Makes `basis` the region's own; only what differs from the general defaults is stored. */
export async function setRegionBasis(slug: string, basis: Basis): Promise<RegionRow> {
  const differs = BASIS_KEYS.filter((key) => JSON.stringify(basis[key]) !== JSON.stringify(DEFAULT_BASIS[key]));
  return updateRegion(slug, { basis: JSON.stringify(Object.fromEntries(differs.map((key) => [key, basis[key]]))) });
}

/** Sets or takes away (null) the map background of a region.
 *  @param url  an http(s) tile template with {z}, {x} and {y} */
export async function setRegionTiles(
  slug: string,
  tiles: { url: string; attribution: string } | null,
): Promise<RegionRow> {
  if (tiles && !/^https?:\/\/[^\s]+$/.test(tiles.url)) {
    throw new StoreError('bad-input', `A tile template starts with http:// or https://, and "${tiles.url}" does not.`);
  }
  return updateRegion(slug, { tileUrl: tiles?.url ?? null, tileAttribution: tiles?.attribution ?? null });
}

type RegionChange = Partial<Record<'name' | 'slug' | 'basis', string>> &
  Partial<Record<'tileUrl' | 'tileAttribution', string | null>>;

async function updateRegion(slug: string, data: RegionChange): Promise<RegionRow> {
  const { region } = openStore().prisma;
  const { count } = await whenFree(() => unlessTaken(data.name ?? '', region.updateMany({ where: { slug }, data })));
  if (count === 0) throw new StoreError('not-found', `There is no region "${slug}".`);
  return toRegion(await region.findUniqueOrThrow({ where: { slug: data.slug ?? slug } }));
}

async function unlessTaken<T>(name: string, change: Promise<T>): Promise<T> {
  try {
    return await change;
  } catch (cause) {
    if ((cause as { code?: string }).code !== 'P2002') throw cause;
    throw new StoreError('exists', `There is a region named "${name}", or one whose name reads alike, already.`, {
      cause,
    });
  }
}

function usableName(name: string): string {
  if (name.trim() === '') throw new StoreError('bad-input', 'A region needs a name.');
  return name.trim();
}

function toRegion(row: Omit<RegionRow, 'basis'> & { basis: string }): RegionRow {
  const { id, slug, name, invented, tileUrl, tileAttribution } = row;
  return { id, slug, name, invented, basis: parseBasis(JSON.parse(row.basis)), tileUrl, tileAttribution };
}
