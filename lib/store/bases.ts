import { type Basis, parseBasis } from '../basis.ts';
import { whenFree } from './busy.ts';
import { openStore } from './open.ts';

export interface SavedBasis {
  id: number;
  name: string;
  basis: Basis;
}

/** A region's named bases, by name. */
export async function listBases(regionId: number): Promise<SavedBasis[]> {
  const found = await openStore().prisma.basis.findMany({ where: { regionId }, orderBy: { name: 'asc' } });
  return found.map(({ id, name, json }) => ({ id, name, basis: parseBasis(JSON.parse(json)) }));
}

/** Saves a basis under a name, replacing the one of that name. */
export async function saveBasis(regionId: number, name: string, basis: Basis): Promise<SavedBasis> {
  const json = JSON.stringify(basis);
  const row = await whenFree(() =>
    openStore().prisma.basis.upsert({
      where: { regionId_name: { regionId, name } },
      create: { regionId, name, json },
      update: { json },
    }),
  );
  return { id: row.id, name, basis };
}

/** @returns false when the region has no such basis */
export async function deleteBasis(regionId: number, id: number): Promise<boolean> {
  const { count } = await whenFree(() => openStore().prisma.basis.deleteMany({ where: { regionId, id } }));
  return count > 0;
}
