import type { GeoJsonObject } from 'geojson';
import type L from 'leaflet';
import { useEffect, useState } from 'react';
import { GroundLayer } from './ground-layer.ts';
import type { GroundKind } from './ground-style.ts';
import { onThemeChange, readPalette } from './palette.ts';

export interface GroundSource {
  kind: GroundKind;
  name: string;
  url: string;
}

/** Fetches one ground layer and draws it, anew when the theme changes.
 *  @returns true when it could not be had; the map goes on without it */
export function useGroundLayer(map: L.Map, { kind, url }: GroundSource): boolean {
  const [data, setData] = useState<GeoJsonObject | null>(null);
  const [failed, setFailed] = useState(false);

  useEffect(() => {
    const request = new AbortController();
    fetch(url, { signal: request.signal })
      .then((answer) => (answer.ok ? answer.json() : Promise.reject(new Error(`status ${answer.status}`))))
      .then(setData)
      .catch(() => setFailed(!request.signal.aborted));
    return () => request.abort();
  }, [url]);

  useEffect(() => {
    if (!data) return;
    const layer = new GroundLayer(data, kind, readPalette()).addTo(map);
    const stop = onThemeChange(() => layer.setPalette(readPalette()));
    return () => {
      stop();
      layer.remove();
    };
  }, [map, data, kind]);

  return failed;
}
