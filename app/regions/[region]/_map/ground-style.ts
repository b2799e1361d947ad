import type { Palette } from './palette.ts';

export type GroundKind = 'outline' | 'catchment' | 'river' | 'other';

/** How a shape of the ground is drawn; null leaves that out. */
export interface GroundStyle {
  stroke: string | null;
  width: number;
  fill: string | null;
  fillOpacity: number;
}

export function groundStyle(kind: GroundKind, palette: Palette, properties: Record<string, unknown>): GroundStyle {
  switch (kind) {
    case 'outline':
      return properties.kind === 'border'
        ? { stroke: palette.border, width: 1, fill: null, fillOpacity: 0 }
        : { stroke: null, width: 0, fill: palette.land, fillOpacity: 1 };
    case 'catchment':
      return { stroke: palette.catchmentEdge, width: 1, fill: palette.catchment, fillOpacity: 0.55 };
    case 'river':
      return { stroke: palette.water, width: riverWidth(properties), fill: null, fillOpacity: 0 };
    case 'other':
      return { stroke: palette.catchmentEdge, width: 1, fill: null, fillOpacity: 0 };
  }
}

/** Rivers grow with the land they drain, or with their stream order; others are one width. */
function riverWidth({ areaKm2, order, strahler }: Record<string, unknown>): number {
  const size = typeof areaKm2 === 'number' ? Math.log10(Math.max(1, areaKm2)) : Number(order ?? strahler);
  return Number.isFinite(size) ? Math.max(0.8, Math.min(3.2, 0.2 + 0.62 * size)) : 1.4;
}
