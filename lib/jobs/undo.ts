import { getImportReport, undoImport } from '../store/imports.ts';
import type { RegionRow } from '../store/regions.ts';
import { checkUnchecked } from './checks.ts';
import { discardRejectedRows, rejectedFileOf } from './rejected-rows.ts';

/** Undoes an import: what it brought goes, with its file of rejected rows, and what stood before comes back; the records
 *  it touched are checked again. */
export async function undo(region: Pick<RegionRow, 'id'>, importId: number): Promise<void> {
  const found = await getImportReport(region.id, importId);
  await undoImport(importId);
  await checkUnchecked(region.id);
  if (found) discardRejectedRows([rejectedFileOf(found.report)]);
}
