import type L from 'leaflet';
import { useEffect } from 'react';
import type { HoverStore } from '../hover-store.ts';
import { type Direction, nextInDirection } from './mark-index.ts';
import type { NeedleLayer } from './needle-layer.ts';
import type { DrawnStations } from './use-needle-layer.ts';

const ARROWS: Record<string, Direction> = {
  ArrowLeft: 'left',
  ArrowRight: 'right',
  ArrowUp: 'up',
  ArrowDown: 'down',
};
/** A pan by keyboard moves a quarter of the map. */
const PAN_SHARE = 0.25;

interface MapKeys {
  map: L.Map;
  layer: NeedleLayer;
  drawn: DrawnStations;
  hover: HoverStore;
  selected: string | null;
  onSelect: (code: string | null) => void;
}

/** Arrows go from station to station, with Shift they pan; + and − zoom; Home goes to the first rank; Enter selects;
 *  Escape clears. */
export function useMapKeys({ map, layer, drawn, hover, selected, onSelect }: MapKeys): void {
  useEffect(() => {
    const container = map.getContainer();

    const goTo = (index: number) => {
      const row = drawn.rows[index];
      if (!row) return;
      hover.set(row.code);
      map.panInside([row.latitude, row.longitude], { padding: [40, 40] });
    };

    const step = (direction: Direction) => {
      const here = drawn.indexOf.get(hover.get() ?? selected ?? '');
      const { xs, ys } = layer.places;
      if (here !== undefined) return goTo(nextInDirection(xs, ys, here, direction));
      // nothing is pointed at yet: begin with the station nearest to the middle
      const centre = map.latLngToLayerPoint(map.getCenter());
      goTo(nearest(xs, ys, centre));
    };

    const onKey = (event: KeyboardEvent) => {
      if (event.altKey || event.ctrlKey || event.metaKey || event.target !== container) return;
      const direction = ARROWS[event.key];
      if (direction && event.shiftKey) map.panBy(panOffset(map, direction));
      else if (direction) step(direction);
      else if (event.key === '+' || event.key === '=') map.zoomIn();
      else if (event.key === '-') map.zoomOut();
      else if (event.key === 'Home') goTo(firstRanked(drawn));
      else if (event.key === 'Enter' || event.key === ' ') onSelect(hover.get());
      else if (event.key === 'Escape') {
        onSelect(null);
        hover.set(null);
      } else return;
      event.preventDefault();
    };
    container.addEventListener('keydown', onKey);
    return () => container.removeEventListener('keydown', onKey);
  }, [map, layer, drawn, hover, selected, onSelect]);
}

/** Where the best rank stands among the drawn, or −1. */
function firstRanked({ rows }: DrawnStations): number {
  let best = -1;
  rows.forEach(({ rank }, index) => {
    if (rank !== null && (best < 0 || rank < (rows[best].rank as number))) best = index;
  });
  return best;
}

function nearest(xs: Float64Array, ys: Float64Array, to: { x: number; y: number }): number {
  let best = -1;
  let distance = Number.POSITIVE_INFINITY;
  for (let i = 0; i < xs.length; i++) {
    const d = (xs[i] - to.x) ** 2 + (ys[i] - to.y) ** 2;
    if (d < distance) [best, distance] = [i, d];
  }
  return best;
}

function panOffset(map: L.Map, direction: Direction): [number, number] {
  const size = map.getSize();
  const [x, y] = [size.x * PAN_SHARE, size.y * PAN_SHARE];
  return { left: [-x, 0], right: [x, 0], up: [0, -y], down: [0, y] }[direction] as [number, number];
}
