import { ImportRefused } from './import-refused.ts';
import type { LayablePart } from './lay-parts.ts';

/** Refuses to lay depths over the drainage area together with flows in other units when there is no such area.
 *  @throws ImportRefused */
export function refuseForArea(
  parts: readonly LayablePart[],
  station: { code: string; areaKm2: number | null },
  fileName: () => string,
): void {
  const units = new Set(parts.map(({ unit }) => unit));
  if (units.size < 2 || !units.has('mm/d') || (station.areaKm2 ?? 0) > 0) return;
  throw new ImportRefused({
    file: fileName(),
    value: station.code,
    message:
      'this station’s flows come partly in mm/d and partly in other units, and it has no drainage area to tell one by the other',
    remedy: 'Give its drainage area in the station registry',
    needs: 'area',
  });
}
