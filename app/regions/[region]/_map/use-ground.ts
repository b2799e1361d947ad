import type { GeoJsonObject } from 'geojson';
import type L from 'leaflet';
import { useEffect, useMemo, useState } from 'react';
import { onThemeChange } from '@/app/components/canvas/tokens';
import { GroundLayer } from './ground-layer.ts';
import type { GroundKind } from './ground-style.ts';
import { readPalette } from './palette.ts';

export interface GroundSource {
  kind: GroundKind;
  name: string;
  url: string;
}

/** Puts an empty ground on the map and keeps it in the colours of the theme. */
export function useGround(map: L.Map): GroundLayer {
  const ground = useMemo(() => new GroundLayer(readPalette()), []);
  useEffect(() => {
    ground.addTo(map);
    const stop = onThemeChange(() => ground.setPalette(readPalette()));
    return () => {
      stop();
      ground.remove();
    };
  }, [ground, map]);
  return ground;
}

/** Fetches one source of the ground and has it drawn.
 *  @returns true when it could not be had; the map goes on without it */
export function useGroundSource(ground: GroundLayer, { kind, url }: GroundSource): boolean {
  const [failed, setFailed] = useState(false);
  useEffect(() => {
    const request = new AbortController();
    fetch(url, { signal: request.signal })
      .then((answer) => (answer.ok ? answer.json() : Promise.reject(new Error(`status ${answer.status}`))))
      .then((data: GeoJsonObject) => ground.put(url, kind, data))
      .catch(() => setFailed(!request.signal.aborted));
    return () => {
      request.abort();
      ground.drop(url);
    };
  }, [ground, url, kind]);
  return failed;
}
