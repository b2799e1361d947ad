import type { OverlapRule } from './lay-parts.ts';
import { openStore } from './open.ts';
import type { Revisions } from './revisions.ts';

export { type Undone, undoImport } from './undo-import.ts';

/** One file taken in, for the list of imports. */
export interface ImportRow {
  id: number;
  createdAt: Date;
  by: string;
  kind: 'flows' | 'registry' | 'layer';
  fileName: string;
  sha256: string;
  layout: string;
  unit: string;
  /** what it does where values are unlike */
  rule: OverlapRule;
  rows: number;
  accepted: number;
  rejected: number;
  /** what it did to days that stood; null for registries, layers and imports of earlier versions */
  revisions: Revisions | null;
  /** true while it is being undone */
  undoing: boolean;
}

const COLUMNS = {
  id: true,
  createdAt: true,
  by: true,
  kind: true,
  fileName: true,
  sha256: true,
  layout: true,
  unit: true,
  rule: true,
  rows: true,
  accepted: true,
  rejected: true,
  revisions: true,
  state: true,
} as const;

const VISIBLE_STATES = { in: ['applied', 'undoing'] };

/** The imports that a region rests on, newest first. */
export async function listImports(regionId: number): Promise<ImportRow[]> {
  const found = await openStore().prisma.import.findMany({
    where: { regionId, state: VISIBLE_STATES },
    select: COLUMNS,
    orderBy: { id: 'desc' },
  });
  return found.map(({ state, kind, rule, revisions, ...row }) => ({
    ...row,
    kind: kind as ImportRow['kind'],
    rule: rule as OverlapRule,
    revisions: JSON.parse(revisions) as Revisions | null,
    undoing: state === 'undoing',
  }));
}

/** The report of an import as it was given at the time, and the mapping its file was read by; null when the region has no
 *  such import. */
export async function getImportReport(
  regionId: number,
  id: number,
): Promise<{ report: unknown; mapping: unknown } | null> {
  const row = await openStore().prisma.import.findFirst({
    where: { id, regionId, state: VISIBLE_STATES },
    select: { report: true, mapping: true },
  });
  return row && { report: JSON.parse(row.report), mapping: JSON.parse(row.mapping) };
}
