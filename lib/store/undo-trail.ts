import type { FactChange } from './station-facts.ts';

/** What a registry's import keeps so that it can be undone: every station it named, with what it did to it. */
export interface RegistryBefore {
  stations: FactChange[];
}

/** What a layer's import keeps: the layer of that name that stood before, null when there was none. */
export interface LayerBefore {
  layer: { name: string; old: { kind: string; geojson: string; importId: number | null } | null };
}
