import { type LinkSuggestion, suggestLinks as suggest } from '../../region/link-suggestions.ts';
import type { StationFacts } from '../../region/ranking-types.ts';
import { riverLines } from '../../region/river-lines.ts';

/** The links that river layers, areas and places suggest for stations of which none is linked yet.
 *  @param layers  GeoJSON texts of the region's river layers */
export function suggestLinks({ stations, layers }: { stations: readonly StationFacts[]; layers: readonly string[] }): {
  suggested: LinkSuggestion[];
  hasRivers: boolean;
} {
  const lines = layers.flatMap((layer) => riverLines(JSON.parse(layer)));
  return { suggested: suggest(stations, lines), hasRivers: lines.length > 0 };
}
