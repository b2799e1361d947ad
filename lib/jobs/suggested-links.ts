import { type LinkSuggestion, suggestLinks } from '../region/link-suggestions.ts';
import { type RiverLine, riverLines } from '../region/river-lines.ts';
import { getLayer, listLayers } from '../store/layers.ts';
import { type RejectedLink, rejectedLinks } from '../store/link-rejections.ts';
import { listLinks } from '../store/links.ts';
import { listStations } from '../store/stations.ts';

/** Links that a region's river layers, or areas and places, suggest: neither made nor rejected by a person as yet. */
export async function suggestedLinks(
  regionId: number,
): Promise<{ suggested: LinkSuggestion[]; rejected: RejectedLink[]; hasRivers: boolean }> {
  const [stations, links, rejected, layers] = await Promise.all([
    listStations(regionId),
    listLinks(regionId),
    rejectedLinks(regionId),
    listLayers(regionId),
  ]);
  const lines: RiverLine[] = [];
  for (const { id } of layers.filter(({ kind }) => kind === 'river')) {
    const text = await getLayer(regionId, id);
    if (text !== null) lines.push(...riverLines(JSON.parse(text)));
  }
  const isRejected = (pair: RejectedLink) =>
    rejected.some(({ upstream, downstream }) => upstream === pair.upstream && downstream === pair.downstream);
  const suggested = suggestLinks(stations, lines, links).filter((pair) => !isRejected(pair));
  return { suggested, rejected, hasRivers: lines.length > 0 };
}
