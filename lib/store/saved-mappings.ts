import type { Mapping } from '../intake/types.ts';
import { whenFree } from './busy.ts';
import { StoreError } from './errors.ts';
import { openStore } from './open.ts';

/** How a kind of file is to be read, kept to use again. */
export interface SavedMapping {
  id: number;
  name: string;
  mapping: Partial<Mapping>;
  createdAt: Date;
}

const MOST_NAME = 200;
const SELECT = { id: true, name: true, json: true, createdAt: true } as const;

/** The mappings kept in a region, by name. */
export async function listMappings(regionId: number): Promise<SavedMapping[]> {
  const { savedMapping } = openStore().prisma;
  const found = await savedMapping.findMany({ where: { regionId }, select: SELECT, orderBy: { name: 'asc' } });
  return found.map(toSaved);
}

/** Keeps a mapping under a name, in place of the one that has it. The caller has looked at the mapping: see parseMapping.
 *  @throws StoreError 'bad-input' for a name that is empty or too long */
export async function saveMapping(
  regionId: number,
  { name: given, mapping }: { name: string; mapping: Partial<Mapping> },
): Promise<SavedMapping> {
  const name = given.trim();
  if (name === '' || name.length > MOST_NAME) {
    throw new StoreError('bad-input', `A mapping needs a name of 1–${MOST_NAME} characters.`);
  }
  const json = JSON.stringify(mapping);
  const row = await whenFree(() =>
    openStore().prisma.savedMapping.upsert({
      where: { regionId_name: { regionId, name } },
      create: { regionId, name, json },
      update: { json, createdAt: new Date() },
      select: SELECT,
    }),
  );
  return toSaved(row);
}

/** Takes a mapping away. @returns false when the region has no such mapping */
export async function removeMapping(regionId: number, id: number): Promise<boolean> {
  const { count } = await whenFree(() => openStore().prisma.savedMapping.deleteMany({ where: { regionId, id } }));
  return count > 0;
}

const toSaved = ({ json, ...row }: { id: number; name: string; json: string; createdAt: Date }): SavedMapping => ({
  ...row,
  mapping: JSON.parse(json) as Partial<Mapping>,
});
