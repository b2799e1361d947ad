import { whenFree } from './busy.ts';
import type { LayerKind } from './layer-kinds.ts';
import { openStore } from './open.ts';

/** A map layer without its GeoJSON. */
export interface LayerRow {
  id: number;
  name: string;
  kind: LayerKind;
}

/** A region's layers by name, without their GeoJSON. */
export async function listLayers(regionId: number): Promise<LayerRow[]> {
  const select = { id: true, name: true, kind: true };
  const found = await openStore().prisma.layer.findMany({ where: { regionId }, select, orderBy: { name: 'asc' } });
  return found.map((row) => ({ ...row, kind: row.kind as LayerKind }));
}

/** A layer's GeoJSON text, or null when the region has no such layer. */
export async function getLayer(regionId: number, id: number): Promise<string | null> {
  const row = await openStore().prisma.layer.findFirst({ where: { regionId, id }, select: { geojson: true } });
  return row?.geojson ?? null;
}

/** Adds a layer to a region, or replaces the one of that name. Leaves no import to undo: files that a person gives go
 *  through staging. */
export async function putLayer(
  regionId: number,
  { name, kind, geojson }: { name: string; kind: LayerKind; geojson: string },
): Promise<LayerRow> {
  const row = await whenFree(() =>
    openStore().prisma.layer.upsert({
      where: { regionId_name: { regionId, name } },
      create: { regionId, name, kind, geojson },
      update: { kind, geojson, importId: null },
      select: { id: true },
    }),
  );
  return { id: row.id, name, kind };
}

/** Takes a layer away.
 *  @returns false when the region has no such layer */
export async function deleteLayer(regionId: number, id: number): Promise<boolean> {
  const { count } = await whenFree(() => openStore().prisma.layer.deleteMany({ where: { regionId, id } }));
  return count > 0;
}
