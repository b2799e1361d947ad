import type { GeoJsonObject } from 'geojson';
import { useEffect, useState } from 'react';
import { type GroundShape, groundShapes } from '../../_map/ground-shapes.ts';
import type { GroundKind } from '../../_map/ground-style.ts';
import type { GroundSource } from '../../_map/use-ground.ts';

export interface GroundPart {
  kind: GroundKind;
  shapes: GroundShape[];
}

/** The shapes of all sources that could be had, in their order; the others are named in `failed`, and the map goes on
 *  without them.
 *  @param sources  the same list between renderings */
export function useGroundParts(sources: readonly GroundSource[]): { parts: GroundPart[]; failed: string[] } {
  const [found, setFound] = useState<{ parts: GroundPart[]; failed: string[] }>({ parts: [], failed: [] });
  useEffect(() => {
    const gone = new AbortController();
    void Promise.all(
      sources.map(async ({ kind, name, url }) => {
        try {
          const answer = await fetch(url, { signal: gone.signal });
          if (!answer.ok) return name;
          return { kind, shapes: [...groundShapes((await answer.json()) as GeoJsonObject)] };
        } catch {
          return name;
        }
      }),
    ).then((all) => {
      if (gone.signal.aborted) return;
      setFound({
        parts: all.filter((part) => typeof part !== 'string'),
        failed: all.filter((part) => typeof part === 'string'),
      });
    });
    return () => gone.abort();
  }, [sources]);
  return found;
}
