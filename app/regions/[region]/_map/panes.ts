import type L from 'leaflet';

/** From the ground up; the needles lie over all of them. The map's tiles lie under, at 200. */
const PANES = { outline: '240', catchment: '250', other: '255', river: '260', needles: '450' };

export function makePanes(map: L.Map): void {
  for (const [name, zIndex] of Object.entries(PANES)) {
    if (map.getPane(name)) continue;
    const pane = map.createPane(name);
    pane.style.zIndex = zIndex;
    // pointing is told by the map itself
    pane.style.pointerEvents = 'none';
  }
}
