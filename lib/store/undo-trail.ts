import type { FactChange } from './station-facts.ts';

/** What an import keeps of the stations it spoke of so that it can be undone: every one, with what it said and did. */
export interface StationsBefore {
  stations: FactChange[];
}

/** What a layer's import keeps: the layer of that name that stood before, null when there was none. */
export interface LayerBefore {
  layer: { name: string; old: { kind: string; geojson: string; importId: number | null } | null };
}
