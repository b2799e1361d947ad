import { getImportReport } from '@/lib/store/imports';
import type { RegionRow } from '@/lib/store/regions';
import { Problem } from './problem';

/** The import of a region that an address names, with its report.
 *  @throws Problem 'not-found' */
export async function importOf(
  region: RegionRow,
  { import: number }: { import: string },
): Promise<{ id: number; report: unknown; mapping: unknown }> {
  const id = Number(number);
  const found = Number.isInteger(id) ? await getImportReport(region.id, id) : null;
  if (!found) throw new Problem('not-found', `${region.name} has no import ${number}.`);
  return { id, ...found };
}
