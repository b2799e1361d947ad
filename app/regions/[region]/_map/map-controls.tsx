import type L from 'leaflet';
import { useSyncExternalStore } from 'react';
import styles from './station-map.module.css';

interface MapControlsProps {
  map: L.Map;
  /** null when no station has a place */
  onShowAll: (() => void) | null;
}

/** Zoom in, zoom out, and back to all stations. */
export function MapControls({ map, onShowAll }: MapControlsProps) {
  const zoom = useSyncExternalStore(
    (listener) => {
      map.on('zoomend', listener);
      return () => map.off('zoomend', listener);
    },
    () => map.getZoom(),
  );
  return (
    <div className={styles.controls}>
      <button type="button" aria-label="Zoom in" disabled={zoom >= map.getMaxZoom()} onClick={() => map.zoomIn()}>
        <Sign path="M8 3v10M3 8h10" />
      </button>
      <button type="button" aria-label="Zoom out" disabled={zoom <= map.getMinZoom()} onClick={() => map.zoomOut()}>
        <Sign path="M3 8h10" />
      </button>
      <button
        type="button"
        aria-label="Show all stations"
        title="Show all stations"
        disabled={!onShowAll}
        onClick={onShowAll ?? undefined}
      >
        <Sign path="M2.5 6v-3.5h3.5M10 2.5h3.5v3.5M13.5 10v3.5h-3.5M6 13.5h-3.5v-3.5" />
      </button>
    </div>
  );
}

function Sign({ path }: { path: string }) {
  return (
    <svg viewBox="0 0 16 16" width="16" height="16" aria-hidden="true">
      <path d={path} fill="none" stroke="currentColor" strokeWidth="1.6" strokeLinecap="round" />
    </svg>
  );
}
