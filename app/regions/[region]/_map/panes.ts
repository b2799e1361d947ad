import type L from 'leaflet';

/** The ground lies over the map's tiles, which Leaflet puts at 200; the needles lie over all. */
const PANES = { ground: '250', needles: '450' };

export function makePanes(map: L.Map): void {
  for (const [name, zIndex] of Object.entries(PANES)) {
    if (map.getPane(name)) continue;
    const pane = map.createPane(name);
    pane.style.zIndex = zIndex;
    // pointing is told by the map itself
    pane.style.pointerEvents = 'none';
  }
}
