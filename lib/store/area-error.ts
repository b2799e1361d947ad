import { ImportRefused } from './import-refused.ts';
import type { LayablePart } from './lay-parts.ts';

/** Why parts cannot be laid over one another: some are depths over the drainage area, others are not, and there is no such
 *  area. Null when they can. */
export function areaProblem(parts: readonly Pick<LayablePart, 'unit'>[], areaKm2: number | null): string | null {
  const units = new Set(parts.map(({ unit }) => unit));
  if (units.size < 2 || !units.has('mm/d') || (areaKm2 ?? 0) > 0) return null;
  return 'this station’s flows come partly in mm/d and partly in other units, and it has no drainage area to tell one by the other';
}

/** Refuses to lay parts that areaProblem names.
 *  @throws ImportRefused */
export function refuseForArea(
  parts: readonly LayablePart[],
  station: { code: string; areaKm2: number | null },
  fileName: () => string,
): void {
  const message = areaProblem(parts, station.areaKm2);
  if (message === null) return;
  throw new ImportRefused({
    file: fileName(),
    value: station.code,
    message,
    remedy: 'Give its drainage area in the station registry',
    needs: 'area',
  });
}
