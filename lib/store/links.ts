import { LINK_SOURCES, type LinkSource } from '../region/link-suggestions.ts';
import { whenFree } from './busy.ts';
import { type Connection, change, immediately, rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';
import { StoreError } from './errors.ts';

export { LINK_SOURCES, type LinkSource };

/** Two stations on one river, by code: water flows from the upper one to the lower one. */
export interface LinkInput {
  upstream: string;
  downstream: string;
  source: LinkSource;
}

export interface LinkRow extends LinkInput {
  id: number;
}

/** Source of a pair that a person said is no link: it is kept so that nobody is asked again, and is not listed. */
export const REJECTED = 'rejected' as const;

const LIST = `SELECT l.id, u.code, d.code, l.source FROM Link l JOIN Station u ON u.id = l.upstreamId
  JOIN Station d ON d.id = l.downstreamId WHERE l.regionId = ? AND l.source <> '${REJECTED}'
  ORDER BY u.code, d.code`;

/** The links of a region, by the upper station's code. */
export async function listLinks(regionId: number, path = databasePath()): Promise<LinkRow[]> {
  const found = rows(sharedConnection(path), LIST).all([regionId]) as [number, string, string, LinkSource][];
  return found.map(([id, upstream, downstream, source]) => ({ id, upstream, downstream, source }));
}

/** Says that one station lies below another; naming a link again only changes its source.
 *  @throws StoreError 'not-found' for a code the region does not have, 'bad-input' for a link that would let water run in
 *          a circle, or an unknown source */
export async function setLink(regionId: number, link: LinkInput, path = databasePath()): Promise<LinkRow> {
  const [set] = await setLinks(regionId, [link], path);
  return set;
}

/** Says of several pairs that one station lies below the other: all of them or none.
 *  @returns in the order given
 *  @throws as setLink */
export async function setLinks(
  regionId: number,
  links: readonly LinkInput[],
  path = databasePath(),
): Promise<LinkRow[]> {
  for (const { upstream, downstream, source } of links) {
    if (!LINK_SOURCES.includes(source)) {
      throw new StoreError('bad-input', `A link comes from ${LINK_SOURCES.join(', ')}, not from "${source}".`);
    }
    if (upstream === downstream) throw new StoreError('bad-input', `Station "${upstream}" cannot lie below itself.`);
  }
  const connection = sharedConnection(path);
  const write = () => {
    const set = links.map((link) => ({ id: put(connection, regionId, link), ...link }));
    const below = stationsBelow(connection, regionId);
    for (const { upstream, downstream } of links) {
      const way = wayDown(below, downstream, upstream);
      if (!way) continue;
      throw new StoreError(
        'bad-input',
        `Water would run in a circle: ${[upstream, ...way].join(' → ')}. Take one of these links away first.`,
      );
    }
    return set;
  };
  return whenFree(() => immediately(connection, write));
}

function put(connection: Connection, regionId: number, { upstream, downstream, source }: LinkInput): number {
  const [upperId, lowerId] = [upstream, downstream].map((code) => idOf(connection, regionId, code));
  change(
    connection,
    `INSERT INTO Link (regionId, upstreamId, downstreamId, source) VALUES (?, ?, ?, ?)
     ON CONFLICT (upstreamId, downstreamId) DO UPDATE SET source = excluded.source`,
  ).run([regionId, upperId, lowerId, source]);
  const find = rows(connection, 'SELECT id FROM Link WHERE upstreamId = ? AND downstreamId = ?');
  return (find.get([upperId, lowerId]) as [number])[0];
}

/** Takes a link away. @returns false when the region has no such link */
export async function removeLink(regionId: number, id: number, path = databasePath()): Promise<boolean> {
  const connection = sharedConnection(path);
  const remove = () => change(connection, 'DELETE FROM Link WHERE regionId = ? AND id = ?').run([regionId, id]).changes;
  return (await whenFree(() => immediately(connection, remove))) > 0;
}

function idOf(connection: Connection, regionId: number, code: string): number {
  const find = rows(connection, 'SELECT id FROM Station WHERE regionId = ? AND code = ?');
  const found = find.get([regionId, code]) as [number] | undefined;
  if (!found) throw new StoreError('not-found', `The region has no station "${code}".`);
  return found[0];
}

/** The stations next below each station. */
function stationsBelow(connection: Connection, regionId: number): Map<string, string[]> {
  const below = new Map<string, string[]>();
  for (const [, upper, lower] of rows(connection, LIST).all([regionId]) as [number, string, string, string][]) {
    below.set(upper, [...(below.get(upper) ?? []), lower]);
  }
  return below;
}

/** The stations by which water comes from one to another, both included; null when it does not. */
function wayDown(below: ReadonlyMap<string, string[]>, from: string, to: string): string[] | null {
  const cameFrom = new Map<string, string | null>([[from, null]]);
  const queue = [from];
  for (const at of queue) {
    if (at === to) {
      const way: string[] = [];
      for (let step: string | null = at; step !== null; step = cameFrom.get(step) ?? null) way.unshift(step);
      return way;
    }
    for (const next of below.get(at) ?? []) {
      if (cameFrom.has(next)) continue;
      cameFrom.set(next, at);
      queue.push(next);
    }
  }
  return null;
}
