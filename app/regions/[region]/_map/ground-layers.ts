import type { Feature, GeoJsonObject } from 'geojson';
import L from 'leaflet';
import type { Palette } from './palette.ts';

export type GroundKind = 'outline' | 'catchment' | 'river' | 'other';

/** Panes from the ground up; the needles lie over all of them. */
const PANES: Record<GroundKind, { pane: string; zIndex: string }> = {
  outline: { pane: 'outline', zIndex: '240' },
  catchment: { pane: 'catchments', zIndex: '250' },
  other: { pane: 'others', zIndex: '255' },
  river: { pane: 'rivers', zIndex: '260' },
};

export function makePanes(map: L.Map): void {
  for (const { pane, zIndex } of Object.values(PANES)) {
    if (map.getPane(pane)) continue;
    const element = map.createPane(pane);
    element.style.zIndex = zIndex;
    element.style.pointerEvents = 'none';
  }
  if (!map.getPane('needles')) {
    const element = map.createPane('needles');
    element.style.zIndex = '450';
    element.style.pointerEvents = 'none';
  }
}

/** One GeoJSON layer through Leaflet's own canvas, which reaches past the map's edges so that a drag shows no blank
 *  strip. */
export function groundLayer(data: GeoJsonObject, kind: GroundKind, palette: Palette): L.GeoJSON {
  const { pane } = PANES[kind];
  const path: L.PathOptions = { pane, interactive: false, renderer: L.canvas({ pane, padding: 0.3 }) };
  const options: L.GeoJSONOptions = {
    style: (feature) => groundStyle(kind, palette, feature),
    // points of a layer are places, not stations: small and still
    pointToLayer: (_, at) => L.circleMarker(at, { ...path, radius: 2.5 }),
  };
  return L.geoJSON(data, { ...path, ...options });
}

export function groundStyle(kind: GroundKind, palette: Palette, feature?: Feature): L.PathOptions {
  switch (kind) {
    case 'outline':
      return feature?.properties?.kind === 'border'
        ? { color: palette.border, weight: 1, fill: false }
        : { stroke: false, fill: true, fillColor: palette.land, fillOpacity: 1 };
    case 'catchment':
      return { color: palette.catchmentEdge, weight: 1, fill: true, fillColor: palette.catchment, fillOpacity: 0.55 };
    case 'river':
      return { color: palette.water, weight: riverWeight(feature), opacity: 0.9, fill: false };
    case 'other':
      return { color: palette.catchmentEdge, weight: 1, fill: false };
  }
}

/** Rivers grow with the land they drain, or with their stream order; others are one width. */
function riverWeight(feature?: Feature): number {
  const { areaKm2, order, strahler } = feature?.properties ?? {};
  const size = Number.isFinite(areaKm2) ? Math.log10(Math.max(1, areaKm2)) : Number(order ?? strahler);
  return Number.isFinite(size) ? Math.max(0.8, Math.min(3.2, 0.2 + 0.62 * size)) : 1.4;
}
