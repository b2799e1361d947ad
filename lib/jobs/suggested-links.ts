import { createHash } from 'node:crypto';
import type { LinkSuggestion } from '../region/link-suggestions.ts';
import { METHODS_VERSION } from '../region/methods-version.ts';
import type { StationFacts } from '../region/ranking-types.ts';
import { getLayer, listLayers } from '../store/layers.ts';
import { type RejectedLink, rejectedLinks } from '../store/link-rejections.ts';
import { listLinks } from '../store/links.ts';
import { listStations } from '../store/stations.ts';
import { cached } from './cached.ts';
import { runTask } from './pool.ts';

/** Links that a region's river layers, or areas and places, suggest: neither made nor rejected by a person as yet. Worked
 *  out once for as long as facts and layers stay as they are, whatever a person says to them meanwhile. */
export async function suggestedLinks(
  regionId: number,
): Promise<{ suggested: LinkSuggestion[]; rejected: RejectedLink[]; hasRivers: boolean }> {
  const [stations, links, rejected, layers] = await Promise.all([
    listStations(regionId),
    listLinks(regionId),
    rejectedLinks(regionId),
    riverLayers(regionId),
  ]);
  const key = keyOf(stations, layers);
  const { suggested, hasRivers } = await cached('links', key, () => runTask('suggestLinks', { stations, layers }));
  const linked = new Set(links.map(({ upstream }) => upstream));
  const isRejected = (pair: RejectedLink) =>
    rejected.some(({ upstream, downstream }) => upstream === pair.upstream && downstream === pair.downstream);
  return {
    suggested: suggested.filter((pair) => !linked.has(pair.upstream) && !isRejected(pair)),
    rejected,
    hasRivers,
  };
}

async function riverLayers(regionId: number): Promise<string[]> {
  const rivers = (await listLayers(regionId)).filter(({ kind }) => kind === 'river');
  const texts = await Promise.all(rivers.map(({ id }) => getLayer(regionId, id)));
  return texts.filter((text) => text !== null);
}

/** SHA-256 of all that suggestions depend on. */
function keyOf(stations: readonly StationFacts[], layers: readonly string[]): string {
  const hash = createHash('sha256').update(`links ${METHODS_VERSION}`);
  for (const { code, name, river, latitude, longitude, areaKm2 } of stations) {
    hash.update(`\n${JSON.stringify([code, name, river, latitude, longitude, areaKm2])}`);
  }
  for (const layer of layers) hash.update('\0').update(layer);
  return hash.digest('hex');
}
