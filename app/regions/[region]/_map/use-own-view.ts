import type L from 'leaflet';
import { useCallback, useEffect, useRef } from 'react';
import type { MapView } from '../map-state.ts';

/** A lone station is shown with enough land about it to know where it lies. */
export const FIT: L.FitBoundsOptions = { padding: [36, 36], maxZoom: 9 };

/** A divider that has not moved for this long, milliseconds, has come to rest. */
const AT_REST = 120;

/** Tells of the view once a person has moved the map; until then the map keeps showing all stations, also when its box
 *  changes size.
 *  @returns how to go back to all stations */
export function useOwnView(
  map: L.Map,
  bounds: [[number, number], [number, number]] | null,
  onView: (view: MapView | null) => void,
): () => void {
  const moved = useRef(false);

  useEffect(() => {
    // the box about the map holds its buttons too
    const box = map.getContainer().parentElement as HTMLElement;
    const touch = () => {
      moved.current = true;
    };
    const tell = () => {
      const { lat, lng } = map.getCenter();
      if (moved.current) onView({ latitude: lat, longitude: lng, zoom: map.getZoom() });
    };
    const hands = ['pointerdown', 'wheel', 'keydown'];
    for (const name of hands) box.addEventListener(name, touch, { capture: true, passive: true });
    map.on('moveend', tell);
    return () => {
      for (const name of hands) box.removeEventListener(name, touch, { capture: true });
      map.off('moveend', tell);
    };
  }, [map, onView]);

  useEffect(() => {
    let settled: ReturnType<typeof setTimeout>;
    const observer = new ResizeObserver(() => {
      map.invalidateSize({ pan: false, animate: false });
      clearTimeout(settled);
      settled = setTimeout(() => {
        const own = moved.current || new URLSearchParams(location.search).has('view');
        if (!own && bounds) map.fitBounds(bounds, { ...FIT, animate: false });
      }, AT_REST);
    });
    observer.observe(map.getContainer());
    return () => {
      clearTimeout(settled);
      observer.disconnect();
    };
  }, [map, bounds]);

  return useCallback(() => {
    if (bounds) map.fitBounds(bounds, FIT);
    moved.current = false;
    onView(null);
  }, [map, bounds, onView]);
}
