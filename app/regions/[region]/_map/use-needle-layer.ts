import type L from 'leaflet';
import { useEffect, useMemo, useRef } from 'react';
import { onThemeChange } from '@/app/components/canvas/tokens';
import type { Needle } from '@/app/components/needle';
import type { HoverStore } from '../hover-store.ts';
import type { MapRow } from '../map-row.ts';
import { hasPlace } from '../row-filter.ts';
import { NeedleLayer } from './needle-layer.ts';
import { readPalette } from './palette.ts';

export interface DrawnStations {
  /** stations that have a place, in drawing order: the steepest significant ones last, on top */
  rows: (MapRow & { latitude: number; longitude: number })[];
  /** code → place in `rows` */
  indexOf: Map<string, number>;
}

/** Not ranked lowest, then what may be chance, then significant ones from the last rank to the first. */
export function drawingOrder(rows: MapRow[]): DrawnStations {
  const height = (row: MapRow) => {
    if (row.rank === null && !row.drying) return 0;
    return row.trend === 'falling' || row.trend === 'rising' ? 2 : 1;
  };
  const drawn = rows
    .filter(hasPlace)
    .sort((a, b) => height(a) - height(b) || (b.rank ?? Number.MAX_SAFE_INTEGER) - (a.rank ?? Number.MAX_SAFE_INTEGER));
  return { rows: drawn, indexOf: new Map(drawn.map((row, index) => [row.code, index])) };
}

interface NeedleLayerState {
  map: L.Map;
  drawn: DrawnStations;
  /** codes the search finds; null when nothing is searched for */
  found: Set<string> | null;
  hover: HoverStore;
  selected: string | null;
  /** a station's mark; another function draws all anew */
  markOf: (row: MapRow) => Needle;
}

/** Puts the needles on the map and keeps them in step with rows, search, hover, selection and theme. */
export function useNeedleLayer({ map, drawn, found, hover, selected, markOf }: NeedleLayerState): NeedleLayer {
  const layer = useMemo(() => new NeedleLayer(readPalette()), []);
  const selectedIndex = useRef(-1);

  useEffect(() => {
    layer.addTo(map);
    const stop = onThemeChange(() => layer.setPalette(readPalette()));
    return () => {
      stop();
      layer.remove();
    };
  }, [layer, map]);

  useEffect(() => layer.setPlaces(drawn.rows), [layer, drawn]);

  useEffect(() => layer.setNeedles(drawn.rows.map(markOf)), [layer, drawn, markOf]);

  useEffect(() => {
    layer.setFaded(Uint8Array.from(drawn.rows, (row) => (found && !found.has(row.code) ? 1 : 0)));
  }, [layer, drawn, found]);

  useEffect(() => {
    const place = (code: string | null) => (code === null ? -1 : (drawn.indexOf.get(code) ?? -1));
    selectedIndex.current = place(selected);
    const emphasise = () => layer.setEmphasis(place(hover.get()), selectedIndex.current);
    emphasise();
    return hover.subscribe(emphasise);
  }, [layer, drawn, hover, selected]);

  return layer;
}
